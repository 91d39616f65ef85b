/** The composite log: age column and strips on one age axis, crossed by the age line. */
import { useCallback, useMemo, useRef, type PointerEvent } from 'react';
import { coordinates, shortAge } from '../../format';
import { columnsOf, oldestPlaced, usedLinks, type UsedLink } from '../../log/columns';
import { gapsOf } from '../../log/gaps';
import { ageAt, layoutOf, type Heading, type StripId } from '../../log/layout';
import { observedOn } from '../../log/observed';
import { latitudeCurve, speedSteps } from '../../log/series';
import { rootFrame } from '../../scene/defaults';
import { findSceneBlock } from '../../scene/scene';
import { setAge, setMoving } from '../../store/actions';
import { useBench, useWorkbench } from '../bench';
import { useSize } from '../use-size';
import { useStale } from '../stale';
import { AgeColumn } from './AgeColumn';
import { AgeLine } from './AgeLine';
import { latitudeAxis, LatitudeStrip } from './LatitudeStrip';
import { Reach } from './Reach';
import { RotationsStrip } from './RotationsStrip';
import { speedAxis, SpeedStrip } from './SpeedStrip';
import { useNames } from '../use-names';

interface Props {
  readonly strips?: readonly StripId[];
  readonly heading?: Heading;
  /** id of an element with a globe that the age line runs on to. */
  readonly reachTo?: string | undefined;
  readonly hint?: string;
  /** Size before the page has been measured, and where scripts don't run. */
  readonly first?: { readonly width: number; readonly height: number };
}

const ALL: readonly StripId[] = ['age', 'rotations', 'latitude', 'speed'];
const FIRST = { width: 605, height: 554 };

export function Log({ strips = ALL, heading = 'full', first = FIRST, reachTo, hint = '' }: Props) {
  const { store, scene, model, point } = useBench();
  const [box, { width, height }] = useSize<HTMLDivElement>(first);
  const handle = useRef<SVGGElement>(null);
  const nameOf = useNames();
  const code = useWorkbench((state) => state.block);
  const heldStill = useWorkbench((state) => state.heldStill);
  const block = findSceneBlock(scene, code);
  const { oldest } = scene;

  const oldestHere = useMemo(
    () => (code ? oldestPlaced(model, code, heldStill) : null),
    [model, code, heldStill],
  );
  const latitudeFrame = useMemo(() => rootFrame(model, code), [model, code]);
  const curve = useMemo(
    () => (point ? latitudeCurve(model, point, latitudeFrame) : []),
    [model, point, latitudeFrame],
  );
  const steps = useMemo(() => (point ? speedSteps(model, point, heldStill) : []), [model, point, heldStill]);
  const observed = useMemo(() => (code ? observedOn(scene.directions, code) : []), [scene.directions, code]);
  const axes = useMemo(
    () => ({ latitude: latitudeAxis(curve, observed), speed: speedAxis(steps) }),
    [curve, observed, steps],
  );
  // As text, so that the columns are made again only when the age line passes a row.
  const used = useWorkbench(({ age }) => JSON.stringify(code ? usedLinks(model, code, age, heldStill) : []));
  const columns = useMemo(() => columnsOf(model, JSON.parse(used) as UsedLink[]), [model, used]);
  const reach = oldestHere === null ? null : shortAge(oldestHere);
  const isOutside = useWorkbench(({ age }) => oldestHere !== null && age > oldestHere);

  const beyond = useMemo(
    () =>
      oldestHere === null || isOutside
        ? null
        : { age: oldestHere, words: `no rotations older than ${shortAge(oldestHere)} Ma` },
    [oldestHere, isOutside],
  );

  const gaps = useMemo(
    () => (code ? gapsOf(model, code, heldStill, oldestHere, nameOf) : []),
    [model, code, heldStill, oldestHere, nameOf],
  );
  const stale = useStale();

  const links = columns.length;
  const layout = useMemo(
    () => layoutOf({ width, height, oldest, heading, links, strips }),
    [width, height, oldest, heading, links, strips],
  );
  const strip = (id: StripId) => layout.strips.find((candidate) => candidate.id === id);

  // Several moves may come within one frame; the page is drawn once for the last of them.
  const waiting = useRef({ request: 0, y: 0 });
  const follow = useCallback(
    (event: PointerEvent<SVGSVGElement>) => {
      const next = waiting.current;
      next.y = event.clientY - event.currentTarget.getBoundingClientRect().top;
      next.request ||= requestAnimationFrame(() => {
        next.request = 0;
        setAge(store, Math.round(ageAt(layout, next.y) * 10) / 10, oldest);
      });
    },
    [store, layout, oldest],
  );
  const subject = point?.name ?? (point ? coordinates(point.lat, point.lon, 0) : 'nothing selected');
  const [age, rotations, latitude, speed] = ALL.map(strip);
  return (
    <div ref={box} className={`relative size-full min-h-0 ${reachTo ? '' : 'overflow-hidden'}`}>
      <svg
        width={width}
        height={height}
        viewBox={`0 0 ${width} ${height}`}
        className="absolute inset-0 touch-pan-x select-none"
        onPointerDown={(event) => {
          if (event.button !== 0) return;
          event.currentTarget.setPointerCapture(event.pointerId);
          setMoving(store, true);
          follow(event);
          handle.current?.focus({ preventScroll: true });
          event.preventDefault();
        }}
        onPointerMove={(event) => {
          if (event.currentTarget.hasPointerCapture(event.pointerId)) follow(event);
        }}
        onPointerUp={() => setMoving(store, false)}
        onPointerCancel={() => setMoving(store, false)}
      >
        {heading !== 'plain' && (
          <line x1={0} x2={width} y1={layout.head - 0.5} y2={layout.head - 0.5} className="stroke-frame" />
        )}
        {layout.strips.slice(1).map(({ id, x }) => (
          <line key={id} x1={x + 0.5} x2={x + 0.5} y1={8} y2={height} className="stroke-rule" />
        ))}
        {age && <AgeColumn layout={layout} strip={age} />}
        {rotations && (
          <RotationsStrip
            layout={layout}
            strip={rotations}
            columns={columns}
            subject={block ? `circuit of ${block.short}` : 'nothing selected'}
            nameOf={nameOf}
          />
        )}
        {latitude && (
          <LatitudeStrip
            layout={layout}
            strip={latitude}
            curve={curve}
            observed={observed}
            subject={latitudeFrame === heldStill ? subject : `${subject} in ${nameOf(latitudeFrame)}`}
            beyond={beyond}
            gaps={gaps}
            stale={stale}
          />
        )}
        {speed && (
          <SpeedStrip
            layout={layout}
            strip={speed}
            steps={steps}
            frame={heldStill ? `in ${nameOf(heldStill)}` : ''}
            gaps={gaps}
            stale={stale !== null}
          />
        )}
        <AgeLine
          layout={layout}
          latitudeFrame={latitudeFrame}
          latitude={latitude ? axes.latitude : null}
          speed={speed ? axes.speed : null}
          outside={isOutside && block ? `${block.short} has no place older than ${reach}` : null}
          handle={handle}
        />
      </svg>
      {reachTo && <Reach layout={layout} to={reachTo} hint={hint} />}
    </div>
  );
}
