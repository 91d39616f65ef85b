/** The reconstruction beside today's map, turning together; ground under the pointer shows in both. */
import { age as ageText, coordinates, kilometres } from '../../format';
import { placesUnder } from '../../scene/cursor';
import { presentFrame } from '../../scene/frame';
import { useBench, useFrame, useWorkbench } from '../bench';
import { useNames } from '../use-names';
import { GlobeCanvas } from './GlobeCanvas';
import { useFrameName } from './GlobePanel';

function Reading({ label, value }: { label: string; value: string }) {
  return (
    <span className="whitespace-nowrap">
      <span className="text-ink-2 mr-2">{label}</span>
      <span className="tabular font-medium">{value}</span>
    </span>
  );
}

function UnderCursor() {
  const { model } = useBench();
  const then = useFrame();
  const cursor = useWorkbench((state) => state.cursor);
  const nameOf = useNames();
  const places = placesUnder(cursor, then, presentFrame(model, then.heldStill));
  return (
    <p
      className="t-body border-rule flex min-h-9 flex-wrap items-center gap-x-6 border-y px-5 py-1.5"
      aria-live="off"
    >
      <span className="text-kelp font-medium">
        Under the cursor{places ? `, on ${nameOf(places.block)}` : ''}
      </span>
      {places ? (
        <>
          <Reading label="then" value={coordinates(places.then.lat, places.then.lon)} />
          <Reading label="now" value={coordinates(places.now.lat, places.now.lon)} />
          <Reading label="between them" value={kilometres(places.km)} />
        </>
      ) : (
        <span className="text-ink-2">{cursor ? 'no block here' : 'move over a block to see it in both'}</span>
      )}
    </p>
  );
}

export function ThenAndNow() {
  const age = useWorkbench((state) => state.age);
  const frame = useFrameName(true);
  return (
    <>
      <div className="grid min-h-0 grow grid-cols-2 max-sm:grid-cols-1">
        <figure className="border-rule flex min-h-[280px] flex-col border-r">
          <figcaption className="px-5 py-1 max-md:px-3.5">
            <span className="t-answer mr-2.5 font-semibold">Then</span>
            <span className="t-value text-ochre-ink">{ageText(age)}</span>{' '}
            <span className="t-body text-ink-2">{frame}</span>
          </figcaption>
          <div className="min-h-0 grow">
            <GlobeCanvas label={`Then, ${ageText(age)}: drag to turn both globes`} describedBy="block-list" />
          </div>
        </figure>
        <figure className="flex min-h-[280px] flex-col">
          <figcaption className="px-5 py-1 max-md:px-3.5">
            <span className="t-answer mr-2.5 font-semibold">Now</span>
            <span className="t-value">0 Ma</span> <span className="t-body text-ink-2">today’s map</span>
          </figcaption>
          <div className="min-h-0 grow">
            <GlobeCanvas when="now" label="Now, today’s map: drag to turn both globes" />
          </div>
        </figure>
      </div>
      <UnderCursor />
    </>
  );
}
