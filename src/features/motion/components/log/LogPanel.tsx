/** The log with its jump field; on a phone one strip at a time; with T as tables. */
import { useState } from 'react';
import { Tabs } from '../../../../components/ui/Tabs';
import { toggleTables } from '../../store/actions';
import type { StripId } from '../../log/layout';
import { useBench, useWorkbench } from '../bench';
import { Jump } from '../help/Jump';
import { PHONE, useMedia } from '../use-media';
import { Log } from './Log';
import { LogTables } from './LogTables';

const STRIPS = [
  { id: 'latitude', label: 'Latitude' },
  { id: 'rotations', label: 'Rotations' },
  { id: 'speed', label: 'Speed' },
] as const;

export function LogPanel() {
  const { store } = useBench();
  const phone = useMedia(PHONE);
  const asTable = useWorkbench((state) => state.asTable);
  const [strip, setStrip] = useState<StripId>('latitude');
  const shown: readonly StripId[] = ['age', strip];
  return (
    <section aria-label="Log" className="relative flex h-full min-h-0 flex-col">
      <Jump />
      {asTable ? (
        <LogTables />
      ) : phone ? (
        <Tabs
          label="Strip"
          items={STRIPS}
          value={strip as (typeof STRIPS)[number]['id']}
          onChange={setStrip}
          className="grow"
        >
          <div className="h-[300px]">
            <Log strips={shown} heading="low" first={{ width: 360, height: 300 }} />
          </div>
        </Tabs>
      ) : (
        <div className="min-h-0 grow">
          <Log />
        </div>
      )}
      {!phone && (
        <button
          type="button"
          aria-pressed={asTable}
          onClick={() => toggleTables(store)}
          className="t-label bg-paper text-ink-2 absolute right-2 bottom-0 z-10 min-h-6 cursor-pointer px-1 underline-offset-2 opacity-0 hover:underline focus-visible:opacity-100 aria-pressed:opacity-100"
        >
          {asTable ? 'Tables as charts' : 'Charts as tables'}
        </button>
      )}
    </section>
  );
}
