/** One globe or map: two canvases, its gestures and keys. */
import { useCallback, useEffect, useRef, type KeyboardEvent } from 'react';
import { COMMANDS } from '../../store/commands';
import { turnTo, zoomBy } from '../../store/actions';
import type { WorkbenchState } from '../../store/state';
import type { Gestures } from '../../globe/gesture';
import { listen } from '../../globe/listen';
import { Stage, type Shown } from '../../globe/stage';
import { nudge } from '../../globe/turning';
import { cursorIn } from '../../scene/cursor';
import { presentFrame } from '../../scene/frame';
import { partnerOf, separationAt } from '../../scene/separation';
import { useBench } from '../bench';
import { globeGestures } from './globe-gestures';

interface Props {
  /** `now` draws today's map in the same view. */
  readonly when?: 'then' | 'now';
  readonly label: string;
  readonly describedBy?: string | undefined;
  readonly shortNames?: boolean;
  readonly flat?: boolean;
  /** Share of half the smaller side that the globe takes; without it room is left for labels. */
  readonly fit?: number;
  /** A picture that is only looked at. */
  readonly still?: boolean;
}

const ARROWS: Record<string, readonly [east: number, north: number]> = {
  ArrowLeft: [-1, 0],
  ArrowRight: [1, 0],
  ArrowUp: [0, 1],
  ArrowDown: [0, -1],
};
const TURN_DEG = 5;
const BIG_TURN_DEG = 15;

export function GlobeCanvas({
  when = 'then',
  label,
  describedBy,
  shortNames = false,
  flat = false,
  fit,
  still = false,
}: Props) {
  const { store, scene, model, track, point, home, frameAt } = useBench();
  const box = useRef<HTMLDivElement>(null);
  const base = useRef<HTMLCanvasElement>(null);
  const marks = useRef<HTMLCanvasElement>(null);
  const stage = useRef<Stage | null>(null);
  const gestures = useRef<Gestures | null>(null);

  const shownOf = useCallback(
    ({ age, heldStill, block, centre, zoom, off, moving, cursor, view }: WorkbenchState): Shown => {
      const then = when === 'then';
      const frame = then ? frameAt(model, age, heldStill) : presentFrame(model, heldStill);
      const partner = then && block && !off.has('separation') ? partnerOf(scene, block) : null;
      return {
        ...{ scene, frame, flat, fit, shortNames, centre, zoom, off, moving },
        selected: block,
        point: then ? point : null,
        track: then ? track : null,
        separation: partner && block ? separationAt(scene, frame, block, partner, moving) : null,
        cursor: view === 'then-and-now' ? cursorIn(cursor, frame, when) : null,
      };
    },
    [when, model, scene, flat, fit, shortNames, point, track, frameAt],
  );

  useEffect(() => {
    if (!box.current || !base.current || !marks.current) return undefined;
    const made = new Stage(box.current, base.current, marks.current);
    stage.current = made;
    return () => {
      stage.current = null;
      made.dispose();
    };
  }, []);

  useEffect(() => {
    const show = () => stage.current?.show(shownOf(store.getState()));
    show();
    return store.subscribe(show);
  }, [store, shownOf]);

  useEffect(() => {
    const element = box.current;
    if (!element || still) return undefined;
    const made = globeGestures(store, () => stage.current, when);
    gestures.current = made;
    return listen(element, made, (factor) => zoomBy(store, factor));
  }, [store, still, when]);

  const onKeyDown = (event: KeyboardEvent) => {
    if (event.ctrlKey || event.metaKey || event.altKey) return;
    const { centre, zoom } = store.getState();
    const arrow = ARROWS[event.key];
    const step = (event.shiftKey ? BIG_TURN_DEG : TURN_DEG) / Math.max(1, zoom);
    const command = [COMMANDS.zoomIn, COMMANDS.zoomOut, COMMANDS.home].find(({ matches }) => matches(event));
    if (event.key === 'Escape' && !gestures.current?.cancel()) return;
    if (arrow) turnTo(store, nudge(centre, arrow[0] * step, arrow[1] * step));
    else if (command) command.run({ store, oldest: scene.oldest, home });
    else if (event.key !== 'Escape') return;
    event.preventDefault();
    event.stopPropagation();
  };

  const live = still
    ? {}
    : { tabIndex: 0, onKeyDown, role: 'application', 'aria-roledescription': flat ? 'map' : 'globe' };
  return (
    <div
      ref={box}
      {...(still ? { role: 'img' } : live)}
      aria-label={label}
      aria-describedby={describedBy}
      className={`relative size-full min-h-0 overflow-hidden ${still ? '' : 'cursor-grab touch-none active:cursor-grabbing'}`}
    >
      <canvas ref={base} className="absolute inset-0 size-full" aria-hidden="true" />
      <canvas ref={marks} className="absolute inset-0 size-full" aria-hidden="true" />
    </div>
  );
}
