/** A point's drift path as the globe draws it: unit vectors in the held-still frame, youngest first. */
import type { DriftPoint } from '../../../kernel/rotations';
import { driftPath } from './tolerant';
import type { Model } from '../../../kernel/rotations/types';
import { vectorOf, type Vec } from '../globe/matrix';
import type { PathSpan } from '../store/state';
import type { NamedPoint } from './points';

export interface TrackPoint {
  readonly age: number;
  readonly v: Vec;
  readonly ellipse: DriftPoint['ellipse_95'];
}

export interface Track {
  readonly points: readonly TrackPoint[];
  /** Myr between ticks. */
  readonly tick: number;
}

/** Myr between the computed positions; ticks fall on them. */
const FINE = 1;

/** null where the point has no place at any age of the span. */
export function trackOf(model: Model, point: NamedPoint, heldStill: string, span: PathSpan): Track | null {
  const older_ma = span.older_ma ?? model.oldest_ma;
  const younger_ma = Math.min(span.younger_ma ?? 0, older_ma);
  const step_ma = span.step_ma % FINE === 0 ? FINE : span.step_ma;
  const path = driftPath(model, { ...point, older_ma, younger_ma, step_ma, relative_to: heldStill });
  const points = path.flatMap(placed);
  return points.length > 0 ? { points, tick: tickOf(span.step_ma, older_ma - younger_ma) } : null;
}

/** More ticks than this would run together. */
const MOST_TICKS = 30;

/** The step itself, or as many of it between two ticks as keep them apart. */
function tickOf(step: number, span: number): number {
  const factor = [1, 2, 5, 10, 20, 50, 100, 200, 500].find((n) => span / (n * step) <= MOST_TICKS) ?? 1000;
  return factor * step;
}

function placed({ age_ma, lat, lon, ellipse_95 }: DriftPoint): TrackPoint[] {
  return lat === null || lon === null ? [] : [{ age: age_ma, v: vectorOf(lat, lon), ellipse: ellipse_95 }];
}
