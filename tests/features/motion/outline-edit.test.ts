/** Outlines under edit. Expected places follow from geometry on the sphere; ring direction from RFC 7946, section 3.1.6. */
import { describe, expect, it } from 'vitest';
import {
  added,
  cornersOf,
  middle,
  moved,
  nudged,
  outlineFault,
  present,
  removed,
  seen,
  split,
  toPolygon,
  toPosition,
  type Corners,
} from '~/features/motion/globe/outline-edit';
import { vectorOf } from '~/features/motion/globe/matrix';
import { fromPole, toMatrix } from '~/kernel/rotations';

const at = (...places: [lat: number, lon: number][]): Corners =>
  places.map(([lat, lon]) => vectorOf(lat, lon));
const square = at([0, 10], [0, 30], [20, 30], [20, 10]);

describe('corners', () => {
  it('are added, moved, removed and split without touching the others', () => {
    expect(added(square, vectorOf(5, 5)).map(toPosition)).toEqual([[10, 0], [30, 0], [30, 20], [10, 20], [5, 5]]); // prettier-ignore
    expect(moved(square, 2, vectorOf(25, 31)).map(toPosition)[2]).toEqual([31, 25]);
    expect(removed(square, 0).map(toPosition)).toEqual([[30, 0], [30, 20], [10, 20]]); // prettier-ignore
    // The middle of an arc of the equator lies on it; the last edge leads back to the first corner.
    expect(split(square, 0).map(toPosition)[1]).toEqual([20, 0]);
    expect(split(square, 3).map(toPosition)[4]).toEqual([10, 10]);
    expect(toPosition(middle(vectorOf(60, 0), vectorOf(60, 180)))).toEqual([0, 90]);
  });

  it('move by degrees on the ground, not past a pole', () => {
    const [lon, lat] = toPosition(nudged(vectorOf(60, 10), 1, 0.1));
    expect(Math.abs(lat - 60.1)).toBeLessThan(1e-4);
    expect(Math.abs((lon - 10) * Math.cos((60.1 * Math.PI) / 180) - 1)).toBeLessThan(1e-3);
    expect(toPosition(nudged(vectorOf(89.95, 10), 0, 1))[1]).toBe(89.9);
  });

  it('clicked at an age come back to where they lie today', () => {
    const pose = toMatrix(fromPole(35, -70, 61));
    for (const corner of square) {
      const back = present(seen(corner, pose), pose);
      back.forEach((x, i) => expect(Math.abs(x - corner[i]!)).toBeLessThan(1e-12));
    }
    expect(seen(square[1]!, null)).toBe(square[1]);
  });
});

describe('an outline', () => {
  it('is closed and anticlockwise whichever way it was drawn', () => {
    const forward = toPolygon(square).coordinates[0]!;
    const backward = toPolygon([...square].reverse()).coordinates[0]!;
    for (const ring of [forward, backward]) {
      expect(ring[0]).toEqual(ring.at(-1));
      const area = ring.slice(1).reduce((sum, [x, y], i) => sum + ring[i]![0]! * y! - x! * ring[i]![1]!, 0);
      expect(area).toBeGreaterThan(0);
    }
    expect(cornersOf(toPolygon(square))!.map(toPosition)).toEqual(square.map(toPosition));
  });

  it('is refused with fewer than three corners, or crossing itself', () => {
    expect(outlineFault(square.slice(0, 2))).toMatch(/three corners/);
    expect(outlineFault([square[0]!, square[2]!, square[1]!, square[3]!])).toMatch(/crosses itself/);
    expect(outlineFault(square)).toBeNull();
  });

  it('of several parts or with a hole is left to the file', () => {
    const ring = toPolygon(square).coordinates[0]!;
    expect(cornersOf({ type: 'MultiPolygon', coordinates: [[ring], [ring]] })).toBeNull();
    expect(cornersOf({ type: 'Polygon', coordinates: [ring, ring] })).toBeNull();
  });
});
