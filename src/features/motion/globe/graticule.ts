/** Meridians and parallels of the held-still frame as lines for the clipper. */
import { vectorOf, type Vec } from './matrix';
import { linesOf, type Shape } from './shape';

const STEP = 15;
/** Meridians other than each quarter turn end here, so that they don't crowd at the poles. */
const CROWDED = 75;

const line = (points: readonly Vec[]): Float32Array => Float32Array.from(points.flat());
const range = (from: number, to: number, step: number): number[] =>
  Array.from({ length: Math.round((to - from) / step) + 1 }, (_, i) => from + i * step);

const meridian = (lon: number): Float32Array => {
  const end = lon % 90 === 0 ? 90 : CROWDED;
  return line(range(-end, end, 1.5).map((lat) => vectorOf(lat, lon)));
};
const parallel = (lat: number): Float32Array => line(range(0, 360, 1.5).map((lon) => vectorOf(lat, lon)));

let lines: Shape | null = null;
export const graticule = (): Shape =>
  (lines ??= linesOf([
    ...range(-180, 180 - STEP, STEP).map(meridian),
    ...range(-CROWDED, CROWDED, STEP).filter((lat) => lat !== 0).map(parallel),
  ])); // prettier-ignore

let middle: Shape | null = null;
export const equator = (): Shape => (middle ??= linesOf([parallel(0)]));
