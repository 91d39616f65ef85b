/** Outlines under edit. Expected places follow from geometry on the sphere; ring direction from RFC 7946, section 3.1.6. */
import { describe, expect, it } from 'vitest';
import {
  added,
  middle,
  moved,
  nudged,
  outlineFault,
  present,
  removed,
  ringAt,
  ringNames,
  ringsOf,
  seen,
  split,
  toGeometry,
  toPolygon,
  toPosition,
  withRing,
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
    const [lon = NaN, lat = NaN] = toPosition(nudged(vectorOf(60, 10), 1, 0.1));
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
    expect(ringsOf(toPolygon(square))[0]![0]!.map(toPosition)).toEqual(square.map(toPosition));
  });

  it('is refused with fewer than three corners, or crossing itself', () => {
    expect(outlineFault(square.slice(0, 2))).toMatch(/three corners/);
    expect(outlineFault([square[0]!, square[2]!, square[1]!, square[3]!])).toMatch(/crosses itself/);
    expect(outlineFault(square)).toBeNull();
  });

  it('of several parts, with a hole, comes back as it was to the last digit, but for the corner moved', () => {
    const outer = [[170.123456789, -10, 12], [190, -10.5], [189, 12], [170.123456789, -10, 12]]; // prettier-ignore
    const hole = [[175, -5], [176, -2], [180, -5], [175, -5]]; // prettier-ignore
    const island = [[0, 0], [3, 0], [3, 4], [0, 0]]; // prettier-ignore
    const geometry = { type: 'MultiPolygon' as const, coordinates: [[outer, hole], [island]] };
    const rings = ringsOf(geometry);
    expect(toGeometry(rings)).toEqual(geometry);
    expect(ringNames(rings).map(({ name }) => name)).toEqual(['Part 1', 'Part 1, hole 1', 'Part 2']);
    const at = { part: 0, ring: 1 };
    const changed = toGeometry(withRing(rings, at, moved(ringAt(rings, at), 1, vectorOf(-1.5, 177))));
    expect(changed.coordinates).toEqual([[outer, [[175, -5], [177, -1.5], [180, -5], [175, -5]]], [island]]); // prettier-ignore
    expect(toGeometry(ringsOf({ type: 'Polygon', coordinates: [island] })).type).toBe('Polygon');
  });
});
