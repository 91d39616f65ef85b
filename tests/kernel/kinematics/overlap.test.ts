import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  areaKm2,
  destination,
  EARTH_RADIUS_KM,
  fromPole,
  IDENTITY,
  interpolateArc,
  inverse,
  multiply,
  type Outline,
  outlineAreaKm2,
  outlineHolds,
  overlap,
  OVERLAP_ERROR_SR_PER_EDGE,
  placedAt,
  type Quaternion,
  rotate,
  separation,
  toRadians,
  unrotate,
} from '../../../src/kernel';
import { place, rotation } from '../support';
import { anyOutline, box, coast, outline, quadrangle, radii, ring, star } from './outlines';

const R2 = EARTH_RADIUS_KM ** 2;
const km2 = (a: Outline, b: Outline, q: Quaternion = IDENTITY, p: Quaternion = IDENTITY): number =>
  overlap(placedAt(a, p), placedAt(b, q)).km2;
const edgeCount = (...outlines: Outline[]): number =>
  outlines.flat().reduce((sum, { polygon }) => sum + polygon.reduce((n, r) => n + r.length, 0), 0);
const error = (...outlines: Outline[]): number => OVERLAP_ERROR_SR_PER_EDGE * edgeCount(...outlines) * R2;
const complement = (o: Outline): Outline =>
  o.map(({ polygon: [outer] }) => ({ polygon: [outer!], inside: 'larger' }));

/** Octants and lunes have areas of whole degrees of longitude. */
const octant = (west: number): Outline => outline([ring([west, 0], [west + 90, 0], [0, 90])]);
const lune = (west: number, east: number): Outline =>
  outline([ring([0, -90], [east, 0], [0, 90], [west, 0])]);

describe('overlap', () => {
  it('of an outline with itself is all of it', () => {
    for (const o of [box(0, 50, 20, 60), octant(30), lune(-170, 170), coast(3, 175, 400, 900, 5)]) {
      const { km2: shared, percent } = overlap(placedAt(o), placedAt(o));
      expect(Math.abs(shared - outlineAreaKm2(o))).toBeLessThan(error(o, o));
      expect(percent).toBeCloseTo(100, 9);
    }
    // 50–60° N, 0–20° E with great-circle edges, by spherical excess.
    expect(Math.round(km2(box(0, 50, 20, 60), box(0, 50, 20, 60)))).toBe(1_402_079);
  });

  it('of outlines that are apart or only touch is 0, edges in common or not', () => {
    const apart: [Outline, Outline][] = [
      [box(0, 0, 10, 10), box(20, 0, 30, 10)],
      [box(0, 0, 10, 10), box(10, 0, 20, 10)],
      [box(0, 0, 10, 10), box(10, 3, 20, 7)],
      [box(0, -10, 10, 0), outline([ring([5, 0], [6, 3], [4, 3])])],
      [box(0, 0, 10, 10), outline([ring([10, 10], [20, 10], [20, 20])])],
      [octant(0), octant(90)],
      [octant(0), lune(90, 200)],
      [outline([quadrangle(-20, -20, 20, 20), quadrangle(-5, -5, 5, 5)]), box(-5, -5, 5, 5)],
      [outline([quadrangle(-20, -20, 20, 20), quadrangle(-5, -5, 5, 5)]), box(-1, -1, 1, 1)],
      [box(0, 0, 10, 10), outline([quadrangle(0, 0, 10, 10)], 'larger')],
    ];
    for (const [a, b] of apart)
      for (const [x, y] of [
        [a, b],
        [b, a],
      ] as const)
        expect(km2(x, y)).toBe(0);
  });

  it('of octants and lunes is exact, poles, antimeridian and edges in common included', () => {
    const cases: [Outline, Outline, degrees: number][] = [
      [octant(0), octant(37), 53],
      [octant(0), octant(60), 30],
      [octant(150), octant(-170), 50],
      [octant(0), lune(0, 90), 90],
      [octant(0), lune(20, 50), 30],
      [octant(0), lune(-20, 90), 90],
      [lune(170, 260), lune(-150, 10), 2 * 50],
      [lune(-100, 60), octant(-50), 90],
    ];
    for (const [a, b, degrees] of cases) {
      expect(Math.abs(km2(a, b) - toRadians(degrees) * R2)).toBeLessThan(error(a, b));
      expect(Math.abs(km2(b, a) - toRadians(degrees) * R2)).toBeLessThan(error(a, b));
    }
  });

  it('of what lies within is the smaller outline, 100 % of it; a hole counts for nothing', () => {
    const [large, small] = [box(-20, -20, 20, 20), box(-3, -4, 5, 6)];
    expect(overlap(placedAt(large), placedAt(small)).percent).toBeCloseTo(100, 9);
    expect(Math.abs(km2(small, large) - outlineAreaKm2(small))).toBeLessThan(error(large, small));
    const holed = outline([quadrangle(-20, -20, 20, 20), quadrangle(-3, -4, 0, 6)]);
    const rest = outlineAreaKm2(small) - areaKm2([quadrangle(-3, -4, 0, 6)]);
    // The hole's northern and southern edges bulge a little less than those of the whole: near its area, and exact
    // with what the hole takes.
    const parts = km2(holed, small) + km2(box(-3, -4, 0, 6), small);
    expect(Math.abs(parts - outlineAreaKm2(small))).toBeLessThan(error(holed, small, small));
    expect(km2(holed, small) / rest).toBeCloseTo(1, 2);
  });

  it('of two oceans is what neither continent covers', () => {
    const [a, b] = [quadrangle(0, 0, 40, 40), quadrangle(60, -30, 90, 10)];
    const shared = km2(outline([a], 'larger'), outline([b], 'larger'));
    expect(Math.abs(shared - (4 * Math.PI * R2 - areaKm2([a]) - areaKm2([b])))).toBeLessThan(1e-5);
    const sphere = overlap(placedAt(outline([a], 'larger')), placedAt(outline([a])));
    expect(sphere.percent).toBe(0);
  });

  it('is none without an area', () => {
    expect(overlap(placedAt([]), placedAt(box(0, 0, 1, 1)))).toEqual({ km2: 0, percent: 0 });
    expect(km2(outline([ring([0, 0], [1, 1])]), box(0, 0, 1, 1))).toBe(0);
  });

  it('with an outline and with its complement make up the whole, and is 0 just where they are apart', () => {
    let partly = 0;
    fc.assert(
      fc.property(anyOutline, rotation, fc.double({ min: 0, max: 3000, noNaN: true }), (a, q, far) => {
        const corner = a[0]!.polygon[0]![0]!;
        const b = outline([star(destination(corner, 77, far), [1500, 700, 1900, 400, 1100])]);
        const [into, out] = [km2(a, b, q, q), km2(a, complement(b), q, q)];
        if (into > 0 && out > 0) partly++;
        expect(Math.abs(into + out - outlineAreaKm2(a))).toBeLessThan(2 * error(a, b));
        expect(Math.abs(km2(b, a) - into)).toBeLessThan(2 * error(a, b));
        expect(into > 0).toBe(separation(placedAt(a), placedAt(b))!.km === 0);
      }),
      { numRuns: 500 },
    );
    expect(partly).toBeGreaterThan(100);
  });

  it('has the stated error, wherever octants and lunes are turned', () => {
    let worst = 0;
    fc.assert(
      fc.property(rotation, fc.double({ min: 1, max: 89, noNaN: true }), (q, west) => {
        for (const b of [octant(west), lune(west, 170)]) {
          const miss = Math.abs(km2(octant(0), b, q, q) - toRadians(90 - west) * R2);
          worst = Math.max(worst, miss / R2 / edgeCount(octant(0), b));
        }
        const strip = lune(0, west);
        const miss = Math.abs(km2(strip, lune(-1, west / 2), q, q) - toRadians(west) * R2);
        worst = Math.max(worst, miss / R2 / (2 * edgeCount(strip)));
      }),
      { numRuns: 3000 },
    );
    expect(worst).toBeLessThanOrEqual(OVERLAP_ERROR_SR_PER_EDGE);
    expect(worst).toBeGreaterThan(OVERLAP_ERROR_SR_PER_EDGE / 10);
  });

  it('with itself under rotations that agree but for rounding is all of it', () => {
    fc.assert(
      fc.property(anyOutline, rotation, rotation, (o, p, q) => {
        const there = multiply(multiply(p, q), inverse(q));
        expect(Math.abs(km2(o, o, there, p) - outlineAreaKm2(o))).toBeLessThan(2e-14 * edgeCount(o) * R2);
        const turned = outline(o[0]!.polygon.map((r) => r.map((v) => rotate(p, v))));
        expect(Math.abs(km2(turned, o, p) - outlineAreaKm2(o))).toBeLessThan(2e-14 * edgeCount(o) * R2);
      }),
    );
  });

  it('with the pieces of a cut outline, edges and corners in common, adds up to it', () => {
    const shares = fc.array(fc.double({ min: 0, max: 1, noNaN: true }), { minLength: 3, maxLength: 3 });
    fc.assert(
      fc.property(place, radii(2500), rotation, shares, (centre, out, q, [s = 0, t = 0, u = 0]) => {
        const outer = star(centre, out);
        const whole = outline([outer]);
        // More corners on every edge, and a wedge to each piece of edge from the middle of the star.
        const cut = outer.flatMap((v, i) => {
          const next = outer[(i + 1) % outer.length]!;
          return [v, interpolateArc(v, next, [s, t, u][i % 3]!)];
        });
        const loose = 2e-14 * cut.length * R2;
        const area = outlineAreaKm2(whole);
        expect(Math.abs(km2(whole, outline([cut]), q, q) - area)).toBeLessThan(loose);
        const wedges = cut.map((v, i) => outline([[centre, v, cut[(i + 1) % cut.length]!]]));
        const sum = wedges.reduce((total, wedge) => total + km2(whole, wedge, q, q), 0);
        expect(Math.abs(sum - area)).toBeLessThan(loose);
        expect(Math.abs(km2(whole, wedges.flat(), q, q) - area)).toBeLessThan(loose);
      }),
    );
  });

  it('agrees with counting places', () => {
    const [a, b] = [
      outline([quadrangle(-20, -10, 15, 20), quadrangle(-5, 0, 5, 8)]),
      outline([ring([-10, -15], [25, 5], [0, 12], [-2, 30])]),
    ];
    const q = fromPole(12, 30, 9);
    const [centre, radius] = [rotate(q, ring([2, 5])[0]!), toRadians(35)];
    const [n, cap] = [40_000, 2 * Math.PI * (1 - Math.cos(radius)) * R2];
    let both = 0;
    for (let i = 0; i < n; i++) {
      const at = destination(
        centre,
        i * 137.50776405,
        EARTH_RADIUS_KM * Math.acos(1 - ((i + 0.5) / n) * (1 - Math.cos(radius))),
      );
      if (outlineHolds(a, at) && outlineHolds(b, unrotate(q, at))) both++;
    }
    const share = both / n;
    expect(share).toBeGreaterThan(0.05);
    const deviation = cap * Math.sqrt((share * (1 - share)) / n);
    expect(Math.abs(km2(a, b, q) - share * cap)).toBeLessThan(2 * deviation);
  });

  it('of coasts of 5,000 corners takes no square of them, the same coast twice over included', () => {
    const [a, b] = [coast(10, 20, 5000, 1000, 7), coast(12, 32, 5000, 1000, 11)];
    const started = performance.now();
    const [into, out] = [km2(a, b), km2(a, complement(b))];
    expect(Math.abs(into + out - outlineAreaKm2(a))).toBeLessThan(2 * error(a, b));
    expect(into).toBeGreaterThan(1000);
    const q: Quaternion = fromPole(40, 70, 25);
    expect(Math.abs(km2(a, a, q, multiply(multiply(q, q), inverse(q))) - outlineAreaKm2(a))).toBeLessThan(1);
    expect(performance.now() - started).toBeLessThan(6000);
  });
});
