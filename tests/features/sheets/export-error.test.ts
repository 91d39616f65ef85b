/**
 * How far exported edges stray from great circles, measured over many edges. Distances between places are
 * geographiclib's on a sphere (f = 0); a great circle's points are weighted sums of its ends.
 */
import type { LineString, MultiLineString, Position } from 'geojson';
import { Geodesic } from 'geographiclib-geodesic';
import { describe, expect, it } from 'vitest';
import { flatten } from '~/features/motion/plate-carree';
import { EXPORT_ERROR_KM } from '~/features/sheets/slice/geojson';
import { distanceToArc, EARTH_RADIUS_KM, toVector } from '~/kernel/sphere';

/** Mulberry32: the same cases every time. */
let state = 20190402;
function random(): number {
  state = (state + 0x6d2b79f5) | 0;
  let t = Math.imul(state ^ (state >>> 15), 1 | state);
  t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
  return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
}
const between = (low: number, high: number): number => low + (high - low) * random();
const vector = ([lon = 0, lat = 0]: Position) => toVector(lat, lon);
const sphere = new Geodesic.Geodesic(EARTH_RADIUS_KM * 1000, 0);

const apartKm = ([lon0, lat0]: Position, [lon1, lat1]: Position): number =>
  sphere.Inverse(lat0!, lon0!, lat1!, lon1!).s12! / 1000;
/** Six decimals of a degree are written: 0.1 m. */
const WRITTEN_KM = 0.0001;

type Edge = readonly [from: Position, to: Position];
const anywhere = (): Position => [between(-180, 180), between(-89.9, 89.9)];
const KINDS: readonly (readonly [string, () => Edge])[] = [
  ['anywhere', () => [anywhere(), anywhere()]],
  ['no longer than a continent', () => {
    const [lon = 0, lat = 0] = anywhere();
    return [[lon, lat], [lon + between(-25, 25), Math.max(-89, Math.min(89, lat + between(-25, 25)))]];
  }],
  ['evenly over the equator', () => {
    const [lon, lat] = [between(-180, 180), between(-25, 25)];
    return [[lon, -lat], [lon + between(-25, 25), lat]];
  }],
  ['close by a pole', () => {
    const [lon, side] = [between(-180, 180), random() < 0.5 ? -1 : 1];
    const across = lon + 180 + 10 ** between(-6, 1);
    return [[lon, side * between(30, 89)], [across, side * between(30, 89.9)]];
  }],
  ['along a parallel, the antimeridian in between', () => {
    const lat = between(-85, 85);
    return [[between(120, 179), lat], [between(-179, -120), lat]];
  }],
]; // prettier-ignore

const written = ([from, to]: Edge): Position[][] => {
  const flat = flatten({ type: 'LineString', coordinates: [[...from], [...to]] });
  const { type, coordinates } = flat as LineString | MultiLineString;
  return type === 'LineString' ? [coordinates] : coordinates;
};

/** Places along the written edges, straight in longitude and latitude. */
const along = (lines: readonly Position[][], shares: readonly number[]): Position[] =>
  lines.flatMap((line) =>
    line.slice(1).flatMap(([lon = 0, lat = 0], i) => {
      const [lon0 = 0, lat0 = 0] = line[i]!;
      return shares.map((s) => [lon0 + s * (lon - lon0), lat0 + s * (lat - lat0)]);
    }),
  );

describe(`exported edges follow great circles to EXPORT_ERROR_KM, ${EXPORT_ERROR_KM} km`, () => {
  it.each(KINDS)('%s', (_, edge) => {
    let worst = 0;
    for (let run = 0; run < 1500; run++) {
      const [from, to] = edge();
      for (const at of along(written([from, to]), [0, 0.125, 0.3, 0.5, 0.7, 0.875, 1]))
        worst = Math.max(worst, distanceToArc(vector(at), vector(from), vector(to)) * EARTH_RADIUS_KM);
    }
    expect(worst).toBeLessThanOrEqual(EXPORT_ERROR_KM);
    // The bound says something: a tenth of it would not hold.
    expect(worst).toBeGreaterThan(EXPORT_ERROR_KM / 10);
  });

  it.each(KINDS)('leaving nothing out: %s', (_, edge) => {
    for (let run = 0; run < 40; run++) {
      const [from, to] = edge();
      const lines = written([from, to]);
      const [first, last] = [lines[0]![0]!, lines.at(-1)!.at(-1)!];
      expect(apartKm(first, from)).toBeLessThan(WRITTEN_KM);
      expect(apartKm(last, to)).toBeLessThan(WRITTEN_KM);
      const [a, b] = [vector(from), vector(to)];
      const places = along(
        lines,
        Array.from({ length: 21 }, (_unused, i) => i / 20),
      );
      for (const s of [0.15, 0.5, 0.85]) {
        const [x = 0, y = 0, z = 0] = a.map((n, i) => n * (1 - s) + b[i]! * s);
        const [lat, lon] = [Math.atan2(z, Math.hypot(x, y)), Math.atan2(y, x)].map(
          (r) => (r * 180) / Math.PI,
        );
        const nearest = Math.min(...places.map((at) => apartKm(at, [lon!, lat!])));
        const longest = Math.max(
          ...lines.flatMap((line) => line.slice(1).map((at, i) => apartKm(at, line[i]!))),
        );
        expect(nearest).toBeLessThan(EXPORT_ERROR_KM + longest / 20);
      }
    }
  });
});
