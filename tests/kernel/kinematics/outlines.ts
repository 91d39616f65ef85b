import fc from 'fast-check';
import {
  destination,
  type Inside,
  type Outline,
  type Polygon,
  readRing,
  toVector,
  type Vector3,
} from '../../../src/kernel';
import { place } from '../support';

/** A ring from [longitude, latitude] positions in degrees. */
export const ring = (...positions: [lon: number, lat: number][]): Vector3[] => readRing(positions);

export const outline = (polygon: Polygon, inside: Inside = 'smaller'): Outline => [{ polygon, inside }];

/** Corners of a quadrangle, anticlockwise; its edges are great circles. */
export const quadrangle = (west: number, south: number, east: number, north: number): Vector3[] =>
  ring([west, south], [east, south], [east, north], [west, north]);

export const box = (west: number, south: number, east: number, north: number): Outline =>
  outline([quadrangle(west, south, east, north)]);

/** Star-shaped round a place, anticlockwise: a distance in km for each of as many azimuths. */
export const star = (centre: Vector3, radii: readonly number[]): Vector3[] =>
  radii.map((km, i) => destination(centre, (-360 * i) / radii.length, km));

/** A rough coast of n corners round a place. */
export function coast(lat: number, lon: number, corners: number, km: number, seed: number): Outline {
  let state = seed;
  const random = (): number => (state = (state * 16807) % 2147483647) / 2147483647;
  return outline([
    star(
      toVector(lat, lon),
      Array.from({ length: corners }, (_, i) => km * (1 + 0.1 * Math.sin(i / 40) + 0.03 * random())),
    ),
  ]);
}

/** Distances in km for the azimuths of a {@link star}. */
export const radii = (max: number): fc.Arbitrary<number[]> =>
  fc.array(fc.double({ min: max / 20, max, noNaN: true }), { minLength: 3, maxLength: 12 });

/** Up to 2,500 km across, one in three with a hole in its middle. */
export const anyOutline: fc.Arbitrary<Outline> = fc
  .tuple(place, radii(2500), fc.nat(2))
  .map(([centre, out, holes]) => {
    const outer = star(centre, out);
    return outline(holes ? [outer] : [outer, star(centre, [20, 40, 30])]);
  });
