import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  angularDistance,
  BOUNDARY_TOLERANCE_RAD,
  destination,
  distanceKm,
  distanceToArc,
  EARTH_RADIUS_KM,
  eachEdge,
  fromPole,
  IDENTITY,
  multiply,
  type Outline,
  outlineAt,
  outlineHolds,
  placedAt,
  type Quaternion,
  rotate,
  separation,
  SEPARATION_ERROR_KM,
  toRadians,
  toVector,
  turnedBack,
  type Vector3,
} from '../../../src/kernel';
import { place, rotation } from '../support';
import { anyOutline, box, coast, outline, quadrangle, ring, star } from './outlines';

const KM_PER_DEGREE = toRadians(1) * EARTH_RADIUS_KM;
const km = (a: Outline, b: Outline, q: Quaternion = IDENTITY, p: Quaternion = IDENTITY): number =>
  separation(placedAt(a, p), placedAt(b, q))?.km ?? NaN;

const edges = (o: Outline): [Vector3, Vector3][] => {
  const found: [Vector3, Vector3][] = [];
  for (const { polygon } of o) for (const r of polygon) eachEdge(r, (a, b) => found.push([a, b]));
  return found;
};

/** Least distance of any corner of one from any edge of the other: right where no edges cross. */
const cornersToEdges = (a: Outline, b: Outline): number =>
  EARTH_RADIUS_KM *
  Math.min(
    ...edges(a).flatMap(([p, q]) => edges(b).map(([v]) => distanceToArc(v, p, q))),
    ...edges(b).flatMap(([p, q]) => edges(a).map(([v]) => distanceToArc(v, p, q))),
  );

describe('separation', () => {
  it('along a meridian, from corner to edge, is that of the latitudes', () => {
    // The northern edge of the southern one is a great circle; the corner above stands on its middle.
    const south = box(-10, -20, 10, 0);
    const north = outline([ring([0, 7], [5, 20], [-5, 20])]);
    expect(Math.abs(km(south, north) - 7 * KM_PER_DEGREE)).toBeLessThan(SEPARATION_ERROR_KM);
    const found = separation(placedAt(south), placedAt(north))!;
    expect(distanceKm(found.on_a, toVector(0, 0))).toBeLessThan(1e-8);
    expect(distanceKm(found.on_b, toVector(7, 0))).toBeLessThan(1e-8);
  });

  it('is measured to the arc of a great circle, not to its parallel', () => {
    // A great circle from (50, −30) to (50, 30) is highest at tan φ = tan 50°/cos 30°.
    const top = Math.atan(Math.tan(toRadians(50)) / Math.cos(toRadians(30)));
    const low = outline([ring([-30, 50], [0, 20], [30, 50])]);
    const high = outline([ring([0, 70], [10, 80], [-10, 80])]);
    expect(Math.abs(km(low, high) - (toRadians(70) - top) * EARTH_RADIUS_KM)).toBeLessThan(
      SEPARATION_ERROR_KM,
    );
  });

  it('between corners, where those are nearest', () => {
    const a = outline([ring([0, 0], [-10, 5], [-10, -5])]);
    const b = outline([ring([4, 0], [10, -5], [10, 5])]);
    expect(Math.abs(km(a, b) - 4 * KM_PER_DEGREE)).toBeLessThan(SEPARATION_ERROR_KM);
  });

  it('over the antimeridian and over a pole', () => {
    expect(
      Math.abs(
        km(outline([ring([179, 0], [160, 5], [160, -5])]), box(-178, -3, -160, 3)) - 3 * KM_PER_DEGREE,
      ),
    ).toBeLessThan(SEPARATION_ERROR_KM);
    const here = outline([ring([20, 85], [10, 70], [30, 70])]);
    const beyond = outline([ring([-160, 84], [-170, 70], [-150, 70])]);
    expect(Math.abs(km(here, beyond) - 11 * KM_PER_DEGREE)).toBeLessThan(SEPARATION_ERROR_KM);
  });

  it('is 0 where one holds the other, where only edges cross, and where they touch', () => {
    expect(km(box(-20, -20, 20, 20), box(-1, -1, 1, 1))).toBe(0);
    expect(km(box(-1, -1, 1, 1), box(-20, -20, 20, 20))).toBe(0);
    expect(km(box(-20, -2, 20, 2), box(-2, -20, 2, 20))).toBe(0);
    expect(km(box(0, 0, 10, 10), box(10, 0, 20, 10))).toBe(0);
    expect(km(box(0, -10, 10, 0), box(5, 0, 7, 10))).toBe(0);
    const same = box(3, 4, 9, 11);
    expect(km(same, same)).toBe(0);
    const { on_a, on_b } = separation(placedAt(box(-20, -2, 20, 2)), placedAt(box(-2, -20, 2, 20)))!;
    expect(on_b).toEqual(on_a);
    expect(outlineHolds(box(-20.01, -2.01, 20.01, 2.01), on_a)).toBe(true);
    expect(outlineHolds(box(-2.01, -20.01, 2.01, 20.01), on_a)).toBe(true);
  });

  it('BOUNDARY_TOLERANCE_RAD: what touches', () => {
    const above = (times: number): Outline =>
      outline([[[1, 0, times * BOUNDARY_TOLERANCE_RAD], toVector(10, 5), toVector(10, -5)]]);
    expect([0.5, 2].map((times) => km(box(-10, -20, 10, 0), above(times)) === 0)).toEqual([true, false]);
  });

  it('is measured across a hole, and to the larger side', () => {
    const holed = outline([quadrangle(-20, -20, 20, 20), quadrangle(-10, -10, 10, 10)]);
    const island = outline([ring([0, 4], [-2, -2], [2, -2])]);
    expect(km(holed, island)).toBeGreaterThan(5.9 * KM_PER_DEGREE);
    expect(km(holed, island)).toBeLessThan(6.2 * KM_PER_DEGREE);
    const ocean = outline([quadrangle(-10, -10, 10, 10)], 'larger');
    expect(km(ocean, island)).toBe(km(holed, island));
    expect(km(ocean, box(30, 0, 40, 10))).toBe(0);
  });

  it('is that of the nearest part, and none without edges', () => {
    const parts = [...box(40, 0, 50, 10), ...box(-50, -10, -40, 10)];
    expect(Math.abs(km(parts, box(-38, -3, 0, 3)) - 2 * KM_PER_DEGREE)).toBeLessThan(1);
    expect(separation(placedAt([]), placedAt(parts))).toBeNull();
    expect(separation(placedAt(parts), placedAt(outline([ring([1, 2], [3, 4])])))).toBeNull();
  });

  it('is that of all corners from all edges, wherever the outlines are turned', () => {
    let apart = 0;
    fc.assert(
      fc.property(anyOutline, anyOutline, rotation, rotation, (a, b, p, q) => {
        const found = separation(placedAt(a, p), placedAt(b, q))!;
        const turnedA = outline(a[0]!.polygon.map((r) => r.map((v) => rotate(p, v))));
        const turnedB = outline(b[0]!.polygon.map((r) => r.map((v) => rotate(q, v))));
        if (found.km > 0) {
          apart++;
          expect(Math.abs(found.km - cornersToEdges(turnedA, turnedB))).toBeLessThan(1e-9);
          expect(Math.abs(distanceKm(found.on_a, found.on_b) - found.km)).toBeLessThan(1e-9);
        }
        const onEdge = (o: Outline, v: Vector3): number =>
          Math.min(...edges(o).map(([s, t]) => distanceToArc(v, s, t)));
        const holds = (o: Outline, v: Vector3): boolean => outlineHolds(o, v) || onEdge(o, v) < 1e-12;
        expect(holds(turnedA, found.on_a)).toBe(true);
        expect(holds(turnedB, found.on_b)).toBe(true);
        const back = turnedBack(placedAt(b, q), found.on_b);
        expect(angularDistance(rotate(q, back), found.on_b)).toBeLessThan(1e-14);
      }),
      { numRuns: 300 },
    );
    expect(apart).toBeGreaterThan(150);
  });

  it('is 0 just where a fine grid finds a place in both', () => {
    fc.assert(
      fc.property(
        anyOutline,
        fc.double({ min: 0, max: 360, noNaN: true }),
        fc.double({ min: 0, max: 4000, noNaN: true }),
        (a, az, far) => {
          const centre = destination(a[0]!.polygon[0]![0]!, az, far);
          const b = outline([star(centre, [900, 300, 1200, 700])]);
          const shared = Array.from({ length: 600 }, (_, i) =>
            destination(centre, i * 137.508, 1200 * Math.sqrt(i / 600)),
          ).some((v) => outlineHolds(a, v) && outlineHolds(b, v));
          if (shared) expect(km(a, b)).toBe(0);
        },
      ),
    );
  });

  it('is the same from either side and in every frame, within the stated error', () => {
    let worst = 0;
    fc.assert(
      fc.property(
        place,
        fc.double({ min: 1, max: 120, noNaN: true }),
        rotation,
        rotation,
        (at, deg, p, q) => {
          // Two triangles that point at each other, along a great circle of known length.
          const corner = destination(at, 30, deg * KM_PER_DEGREE);
          const spike = (tip: Vector3, azimuth: number): Outline =>
            outline([[tip, destination(tip, azimuth - 20, 400), destination(tip, azimuth + 20, 400)]]);
          const [a, b] = [spike(at, 210), spike(corner, bearing(corner, at) + 180)];
          const exact = distanceKm(at, corner);
          for (const found of [km(a, b), km(b, a), km(a, b, multiply(p, q), multiply(p, q)), km(a, b, p, p)])
            worst = Math.max(worst, Math.abs(found - exact));
        },
      ),
      { numRuns: 2000 },
    );
    expect(worst).toBeLessThanOrEqual(SEPARATION_ERROR_KM);
    expect(worst).toBeGreaterThan(SEPARATION_ERROR_KM / 10);
  });

  it('of two coasts of 5,000 corners looks at a small part of their 25 million pairs', () => {
    const [a, b] = [coast(10, 20, 5000, 1000, 7), coast(12, 47, 5000, 1000, 11)];
    const turn = fromPole(80, 10, 3);
    const first = km(a, b);
    const started = performance.now();
    for (let i = 0; i < 10; i++) expect(km(a, b, turn, turn)).toBeCloseTo(first, 9);
    // 25 million distances take over a second; a loaded machine has some ten milliseconds each here.
    expect(performance.now() - started).toBeLessThan(2000);
    expect(Math.abs(first - cornersToEdges(thin(a, b), thin(b, a)))).toBeLessThan(1e-9);
  });
});

const bearing = (from: Vector3, to: Vector3): number => {
  const east: Vector3 = [-from[1], from[0], 0];
  const north: Vector3 = [-from[2] * from[0], -from[2] * from[1], from[0] ** 2 + from[1] ** 2];
  const along = (u: Vector3): number => u[0] * to[0] + u[1] * to[1] + u[2] * to[2];
  return (Math.atan2(along(east), along(north)) * 180) / Math.PI;
};

/** The 60 edges about the corner nearest to the middle of another outline’s nearest corner. */
function thin(o: Outline, other: Outline): Outline {
  const found = separation(placedAt(o), placedAt(other))!;
  const r = o[0]!.polygon[0]!;
  const i = r.reduce(
    (best, v, k) => (distanceKm(v, found.on_a) < distanceKm(r[best]!, found.on_a) ? k : best),
    0,
  );
  return outline([Array.from({ length: 60 }, (_, k) => r[(i + k - 30 + r.length) % r.length]!)]);
}

describe('the outline at an age', () => {
  const [young, old] = [box(0, 0, 10, 10), box(20, 0, 30, 10)];
  const dated = [
    { outline: young, appears_ma: 40, disappears_ma: null },
    { outline: old, appears_ma: null, disappears_ma: 20 },
  ];

  it('is that which holds, or all that do, found again as the same object', () => {
    expect(outlineAt(dated, 0)).toBe(young);
    expect(outlineAt(dated, 20)).toBe(young);
    expect(outlineAt(dated, 30)).toEqual([...young, ...old]);
    expect(outlineAt(dated, 30)).toBe(outlineAt(dated, 40));
    expect(outlineAt(dated, 41)).toBe(old);
    expect(outlineAt([{ ...dated[0]!, appears_ma: 10 }], 11)).toBeNull();
  });
});
