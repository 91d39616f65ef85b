import { createRequire } from 'node:module';
import { feature } from 'topojson-client';
import type { GeometryCollection, Topology } from 'topojson-specification';
import { describe, expect, it } from 'vitest';
import fit from '../../cases/south-atlantic-fit.json';
import {
  angularDistance,
  boundingCap,
  compileModel,
  densify,
  distanceToArc,
  EARTH_RADIUS_KM,
  poseAt,
  readRing,
  rotate,
  toVector,
  type Vector3,
} from '../../../src/kernel';
import { block, frame, placed, row } from '../support';

interface Stretch {
  from: Place;
  by: Place;
  to: Place;
}
interface Place {
  name: string;
  lat: number;
  lon: number;
}

const land = createRequire(import.meta.url)('world-atlas/land-50m.json') as Topology<{
  land: GeometryCollection;
}>;

function coastRings(): Vector3[][] {
  return feature(land, land.objects.land).features.flatMap(({ geometry }) =>
    geometry.type === 'MultiPolygon' ? geometry.coordinates.map(([outer = []]) => readRing(outer)) : [],
  );
}

const nearestCorner = (ring: readonly Vector3[], to: Vector3): number =>
  ring.reduce((best, v, i) => (angularDistance(v, to) < angularDistance(ring[best] ?? v, to) ? i : best), 0);

/** The part of a continent's coast from one named place by another to a third. */
function stretch(rings: readonly Vector3[][], { from, by, to }: Stretch): Vector3[] {
  const [a, b, c] = [from, by, to].map(({ lat, lon }) => toVector(lat, lon)) as [Vector3, Vector3, Vector3];
  const off = (ring: readonly Vector3[]): number =>
    Math.max(...[a, b, c].map((p) => angularDistance(p, ring[nearestCorner(ring, p)] ?? [0, 0, 1])));
  const ring = rings.reduce((best, next) => (off(next) < off(best) ? next : best));
  expect(off(ring) * EARTH_RADIUS_KM).toBeLessThan(40);
  const [start, middle, end] = [a, b, c].map((p) => nearestCorner(ring, p)) as [number, number, number];
  const along = (i: number): number => (i - start + ring.length) % ring.length;
  const turned = [...ring.slice(start), ...ring.slice(0, start)];
  const forwards = along(middle) < along(end);
  return forwards
    ? turned.slice(0, along(end) + 1)
    : [...turned.slice(along(end)), ring[start] ?? a].reverse();
}

/**
 * Root mean square over both coasts of the distance from each of its evenly spaced places to the other, km.
 */
function symmetricRms(a: readonly Vector3[], b: readonly Vector3[]): number {
  const squares = [...distances(a, b), ...distances(b, a)].map((angle) => (angle * EARTH_RADIUS_KM) ** 2);
  return Math.sqrt(squares.reduce((sum, x) => sum + x, 0) / squares.length);
}
const distances = (from: readonly Vector3[], to: readonly Vector3[]): number[] =>
  densify(from, fit.spacing_deg, { closed: false }).map((v) =>
    to.slice(1).reduce((least, end, i) => Math.min(least, distanceToArc(v, to[i] ?? end, end)), Math.PI),
  );

describe(`the South Atlantic closed (${fit.source})`, () => {
  const { pole_lat, pole_lon, angle_deg } = fit.rotation;
  const model = compileModel(
    [block('south-america'), block('africa'), frame('mantle')],
    [
      row(['south-america', 'africa', 120, pole_lat, pole_lon, angle_deg]),
      row(['africa', 'mantle', 150, 5, -40, 25]),
    ],
  );
  const rings = coastRings();
  const [america, africa] = [stretch(rings, fit.south_america), stretch(rings, fit.africa)];

  it(`brings the coasts within ${fit.tolerance_rms_km} km rms, Africa held still`, () => {
    const { quaternion } = placed(poseAt(model, 'south-america', 120, 'africa'));
    const rms = symmetricRms(
      america.map((v) => rotate(quaternion, v)),
      africa,
    );
    console.info(`South Atlantic fit: symmetric rms distance of the present coasts ${rms.toFixed(0)} km`);
    expect(rms).toBeLessThan(fit.tolerance_rms_km);
    expect(symmetricRms(america, africa)).toBeGreaterThan(fit.unrotated_at_least_km);
  });

  it('parts them when turned the other way', () => {
    const { quaternion } = placed(poseAt(model, 'africa', 120, 'south-america'));
    const wrong = america.map((v) => rotate(quaternion, v));
    expect(angularDistance(boundingCap(wrong).centre, boundingCap(africa).centre)).toBeGreaterThan(1.2);
  });
});
