/** The corners of an outline under edit, over the globe: drag or arrows move one, Delete removes it, a midpoint makes one. */
import { useRef, type KeyboardEvent, type PointerEvent } from 'react';
import { coordinates } from '../../format';
import { middle, nudged, type Corners } from '../../globe/outline-edit';
import { placeOf, type Vec } from '../../globe/matrix';
import type { XY } from '../../globe/pen';
import type { Projector } from './use-disc';

interface Props {
  readonly corners: Corners;
  readonly closed: boolean;
  readonly disc: Projector;
  /** Present coordinates to the frame shown. */
  readonly show: (v: Vec) => Vec;
  readonly hide: (v: Vec) => Vec;
  readonly onMove: (i: number, v: Vec) => void;
  readonly onRemove: (i: number) => void;
  readonly onSplit: (i: number) => void;
}

/** Handles nearer than this, CSS pixels, are left out until the globe is nearer. */
const LEAST_APART = 12;
const FEW = 60;
const STEP_DEG = 0.1;
const BIG_STEP_DEG = 1;
const ARROWS: Record<string, readonly [number, number]> = {
  ArrowLeft: [-1, 0],
  ArrowRight: [1, 0],
  ArrowUp: [0, 1],
  ArrowDown: [0, -1],
};

export function OutlineHandles({ corners, closed, disc, show, hide, onMove, onRemove, onSplit }: Props) {
  const places = corners.map((corner) => disc.at(show(corner)));
  const edges = closed ? corners.length : corners.length - 1;
  const parts = Array.from({ length: Math.max(0, edges) }, (_, i) =>
    edgePath(corners[i]!, corners[(i + 1) % corners.length]!, show, disc),
  );
  return (
    <svg className="pointer-events-none absolute inset-0 size-full overflow-hidden">
      <path d={parts.join('')} className="stroke-ochre" fill="none" strokeWidth="1.9" />
      {apart(places).map(({ i, xy }) => (
        <Corner
          key={i}
          i={i}
          n={corners.length}
          xy={xy}
          corner={corners[i]!}
          disc={disc}
          hide={hide}
          onMove={onMove}
          onRemove={onRemove}
        />
      ))}
      {closed &&
        corners.length <= FEW &&
        corners.map((corner, i) => {
          const xy = disc.at(show(middle(corner, corners[(i + 1) % corners.length]!)));
          if (!xy) return null;
          return (
            <circle
              key={`m${i}`}
              cx={xy[0]}
              cy={xy[1]}
              r="3"
              className="fill-paper stroke-ochre pointer-events-auto cursor-copy"
              onPointerDown={(event) => {
                event.stopPropagation();
                onSplit(i);
              }}
            />
          );
        })}
    </svg>
  );
}

/** The corners in sight; of many, those far enough from the one drawn before. */
function apart(places: readonly (XY | null)[]): { readonly i: number; readonly xy: XY }[] {
  const drawn: { i: number; xy: XY }[] = [];
  places.forEach((xy, i) => {
    const last = drawn.at(-1)?.xy;
    const near = last && xy && Math.hypot(xy[0] - last[0], xy[1] - last[1]) < LEAST_APART;
    if (xy && !(near && places.length > FEW)) drawn.push({ i, xy });
  });
  return drawn;
}

interface CornerProps extends Pick<Props, 'disc' | 'hide' | 'onMove' | 'onRemove'> {
  readonly i: number;
  readonly n: number;
  readonly xy: XY;
  readonly corner: Vec;
}

function Corner({ i, n, xy, corner, disc, hide, onMove, onRemove }: CornerProps) {
  const held = useRef(false);
  const { lat, lon } = placeOf(corner);
  const drag = (event: PointerEvent<SVGCircleElement>): void => {
    if (!held.current) return;
    const box = event.currentTarget.ownerSVGElement!.getBoundingClientRect();
    const v = disc.under([event.clientX - box.left, event.clientY - box.top]);
    if (v) onMove(i, hide(v));
  };
  const onKeyDown = (event: KeyboardEvent): void => {
    const arrow = ARROWS[event.key];
    const step = event.shiftKey ? BIG_STEP_DEG : STEP_DEG;
    if (arrow) onMove(i, nudged(corner, arrow[0] * step, arrow[1] * step));
    else if (event.key === 'Delete') onRemove(i);
    else return;
    event.preventDefault();
    event.stopPropagation();
  };
  return (
    <circle
      cx={xy[0]}
      cy={xy[1]}
      r="5"
      tabIndex={0}
      role="button"
      aria-label={`Corner ${i + 1} of ${n}, ${coordinates(lat, lon)}: arrows move, Delete removes`}
      className="fill-ochre stroke-paper pointer-events-auto cursor-move"
      strokeWidth="1.5"
      onPointerDown={(event) => {
        event.stopPropagation();
        held.current = true;
        event.currentTarget.setPointerCapture(event.pointerId);
      }}
      onPointerMove={drag}
      onPointerUp={() => (held.current = false)}
      onKeyDown={onKeyDown}
    />
  );
}

/** A great-circle edge in pieces, as far as it is seen. */
function edgePath(a: Vec, b: Vec, show: (v: Vec) => Vec, disc: Projector): string {
  const between = (from: Vec, to: Vec, depth: number): Vec[] => {
    if (depth === 0) return [to];
    const m = middle(from, to);
    return [...between(from, m, depth - 1), ...between(m, to, depth - 1)];
  };
  let d = '';
  let pen = false;
  for (const v of [a, ...between(a, b, 3)]) {
    const xy = disc.at(show(v));
    if (xy) d += `${pen ? 'L' : 'M'}${xy[0].toFixed(1)} ${xy[1].toFixed(1)}`;
    pen = xy !== null;
  }
  return d;
}
