/** The right half of the workbench: globe, map, or then and now, with the legend. */
import { useMemo, type ReactNode } from 'react';
import { Segmented } from '../../../../components/ui/Segmented';
import { age as ageText, coordinates, count, meridian, parallel } from '../../format';
import { frameAt, matrixOf } from '../../scene/frame';
import { placeOf } from '../../globe/matrix';
import { setView } from '../../store/actions';
import type { View } from '../../store/state';
import { useBench, useCalmAge, useWorkbench } from '../bench';
import { frameName } from '../../names';
import { useNames } from '../use-names';
import { BlockList } from './BlockList';
import { GlobeCanvas } from './GlobeCanvas';
import { Legend, LegendRow } from './Legend';
import { ThenAndNow } from './ThenAndNow';

const VIEWS: readonly { readonly id: View; readonly label: string }[] = [
  { id: 'globe', label: 'Globe' },
  { id: 'map', label: 'Map' },
  { id: 'then-and-now', label: 'Then and now' },
];

/** The frame's name as a heading, or inside a sentence. */
export function useFrameName(within = false): string {
  const { scene } = useBench();
  const heldStill = useWorkbench((state) => state.heldStill);
  const block = scene.blocks.find(({ code }) => code === heldStill);
  return block
    ? frameName(block, within)
    : heldStill || (within ? 'present coordinates' : 'Present coordinates');
}

function Heading({ view }: { view: View }) {
  const frame = useFrameName();
  const age = useWorkbench((state) => state.age);
  const centre = useWorkbench((state) => state.centre);
  if (view === 'then-and-now') {
    return (
      <>
        <h2 className="t-answer">Then and now</h2>
        <p className="t-body text-ink-2 max-sm:hidden">both orthographic, the same scale</p>
      </>
    );
  }
  const where =
    view === 'map'
      ? `Mollweide, equal-area, centred on ${meridian(Math.round(centre.lon))}`
      : `orthographic, centred on ${parallel(Math.round(centre.lat))}, ${meridian(Math.round(centre.lon))}`;
  return (
    <>
      <h2 className="t-answer whitespace-nowrap">
        {frame}, {ageText(age)}
      </h2>
      <p className="t-body text-ink-2 max-md:hidden">{where}</p>
    </>
  );
}

/** Where the pointer is; while it is elsewhere, how many blocks are missing from the picture. */
function UnderPointer() {
  const { scene, model } = useBench();
  const age = useCalmAge();
  const heldStill = useWorkbench((state) => state.heldStill);
  const unplaced = useMemo(() => {
    const frame = frameAt(model, age, heldStill);
    return scene.blocks.filter((block) => block.outlines.length > 0 && !matrixOf(frame, block.code)).length;
  }, [scene.blocks, model, age, heldStill]);
  const cursor = useWorkbench((state) => state.cursor);
  const nameOf = useNames();
  const place = cursor && placeOf(cursor.at);
  return (
    <p className="t-label tabular text-ink-2 pointer-events-none absolute bottom-2 left-5 h-[14px]">
      {!place && unplaced > 0 && `${count(unplaced, 'block has', 'blocks have')} no place at this age`}
      {place &&
        `${coordinates(place.lat, place.lon)}${cursor?.hit ? `, on ${nameOf(cursor.hit.block)}` : ''}`}
    </p>
  );
}

/** In place of a picture: there is nothing to draw yet, and two ways on. */
function NoBlocks({ importHref }: { importHref: string | undefined }) {
  return (
    <div className="pointer-events-none absolute inset-0 flex flex-col items-center justify-center gap-2">
      <p className="t-answer bg-sheet px-2">No blocks with an outline yet.</p>
      {importHref && (
        <p className="t-body text-ink-2 bg-sheet px-2">
          Draw one here, or{' '}
          <a className="link pointer-events-auto" href={importHref}>
            import a file
          </a>
          .
        </p>
      )}
    </div>
  );
}

interface Props {
  readonly importHref?: string | undefined;
  /** What can be done on the globe itself, over it. */
  readonly tools?: ReactNode;
}

export function GlobePanel({ importHref, tools }: Props) {
  const { store, scene } = useBench();
  const view = useWorkbench((state) => state.view);
  const frame = useFrameName();
  const empty = !scene.blocks.some(({ outlines }) => outlines.length > 0);
  return (
    <section aria-label="Globe" className="flex h-full min-h-0 flex-col">
      <header className="flex min-h-11 flex-wrap items-center gap-x-4 gap-y-1 px-5 pt-1.5 max-md:px-3.5">
        <Heading view={view} />
        <div className="ml-auto">
          <Segmented label="View" options={VIEWS} value={view} onChange={(next) => setView(store, next)} />
        </div>
      </header>
      {view === 'then-and-now' ? (
        <>
          <ThenAndNow />
          <LegendRow />
        </>
      ) : (
        <div className="grid min-h-0 grow grid-cols-[minmax(0,1fr)_190px] gap-x-2 pr-5 max-md:grid-cols-1 max-md:pr-0">
          <div className="relative min-h-[320px]">
            <GlobeCanvas
              label={`${frame}: drag to turn, arrows turn, plus and minus zoom`}
              describedBy="block-list"
              flat={view === 'map'}
            />
            <UnderPointer />
            {empty && <NoBlocks importHref={importHref} />}
            {view === 'globe' && tools}
          </div>
          <div className="overflow-auto py-4 max-md:hidden">
            <Legend />
          </div>
        </div>
      )}
      <BlockList id="block-list" />
    </section>
  );
}
