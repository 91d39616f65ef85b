import fc from 'fast-check';
import { geoArea, geoCentroid, geoContains } from 'd3-geo';
import { describe, expect, it } from 'vitest';
import {
  angularDistance,
  AREA_ERROR_SR_PER_EDGE,
  areaKm2,
  BOUNDARY_TOLERANCE_RAD,
  boundingCap,
  CAP_EXCESS,
  centroid,
  contains,
  densify,
  densifyStraight,
  destination,
  distanceKm,
  distanceToArc,
  EARTH_RADIUS_KM,
  fromPole,
  interpolateArc,
  readRing,
  ringArea,
  rotate,
  STRAIGHT_EDGE_STRAY_DEG,
  toDegrees,
  toLatLon,
  toVector,
  type Vector3,
  woundRing,
  writeRing,
} from '../../../src/kernel';
import { place, rotation } from '../support';

const ring = (...positions: [lon: number, lat: number][]): Vector3[] => readRing(positions);
const reversed = (r: readonly Vector3[]): Vector3[] => [...r].reverse();
const octant = ring([0, 0], [90, 0], [0, 90]);
const equator = ring([0, 0], [120, 0], [-120, 0]);
const polarCap = ring([0, 60], [90, 60], [180, 60], [-90, 60]);

/** A star-shaped outline round a place, anticlockwise: a radius in km for each of n azimuths. */
const outline = fc
  .tuple(place, fc.array(fc.double({ min: 150, max: 4000, noNaN: true }), { minLength: 3, maxLength: 12 }))
  .map(([centre, radii]) => ({
    centre,
    ring: radii.map((km, i) => destination(centre, (-360 * i) / radii.length, km)),
  }));

describe('rings', () => {
  it('read jumping, unwrapped and 0–360 longitudes alike', () => {
    const jumping = ring([170, -10], [-170, -10], [-175, 12], [170, -10]);
    expect(ring([170, -10], [190, -10], [185, 12])).toEqual(jumping);
    expect(ring([-190, -10], [-170, -10], [-175, 12], [-190, -10])).toEqual(jumping);
    expect(jumping).toHaveLength(3);
  });

  it('drop repeated positions, all those along a pole too', () => {
    expect(ring([0, 70], [120, 70], [180, 70], [180, 90], [0, 90], [-180, 90], [-180, 70])).toHaveLength(5);
    expect(ring([3, 4], [3, 4])).toHaveLength(1);
  });

  it('come back as closed positions', () => {
    const positions = writeRing(ring([170, -10], [190, -10], [185, 12]));
    expect(positions).toHaveLength(4);
    expect(positions[0]).toEqual(positions[3]);
    const expected = [
      [170, -10],
      [-170, -10],
      [-175, 12],
    ];
    expected.forEach((p, i) =>
      p.forEach((x, j) => expect(Math.abs(x - (positions[i]?.[j] ?? NaN))).toBeLessThan(1e-12)),
    );
    expect(writeRing([])).toEqual([]);
  });
});

describe('areas', () => {
  it('of an octant, a lune and a hemisphere are exact, signed by direction', () => {
    expect(Math.abs(ringArea(octant) - Math.PI / 2)).toBeLessThan(3 * AREA_ERROR_SR_PER_EDGE);
    expect(Math.abs(ringArea(reversed(octant)) + Math.PI / 2)).toBeLessThan(3 * AREA_ERROR_SR_PER_EDGE);
    const lune = ring([10, -90], [47, 0], [10, 90], [10, 0]);
    expect(Math.abs(ringArea(lune) - (2 * 37 * Math.PI) / 180)).toBeLessThan(4 * AREA_ERROR_SR_PER_EDGE);
    expect(Math.abs(ringArea(equator) - 2 * Math.PI)).toBeLessThan(3 * AREA_ERROR_SR_PER_EDGE);
    expect(Math.abs(ringArea(reversed(equator)) - 2 * Math.PI)).toBeLessThan(3 * AREA_ERROR_SR_PER_EDGE);
    expect(ringArea(ring([0, 0], [5, 5]))).toBe(0);
  });

  it('agree with d3-geo, wherever the outline lies', () => {
    fc.assert(
      fc.property(outline, ({ ring: r }) => {
        const clockwise = writeRing(reversed(r));
        const theirs = geoArea({ type: 'Polygon', coordinates: [clockwise] });
        expect(Math.abs(ringArea(r) - theirs)).toBeLessThan(1e-9);
      }),
    );
  });

  it('stay the same however the outline is turned, and change sign when reversed', () => {
    fc.assert(
      fc.property(outline, rotation, ({ ring: r }, q) => {
        const area = ringArea(r);
        const tolerance = AREA_ERROR_SR_PER_EDGE * r.length;
        expect(Math.abs(ringArea(r.map((v) => rotate(q, v))) - area)).toBeLessThan(tolerance);
        expect(Math.abs(ringArea(reversed(r)) + area)).toBeLessThan(tolerance);
      }),
    );
  });

  it('turn a ring over where it does not run as wanted, and only there', () => {
    fc.assert(
      fc.property(outline, ({ ring: r }) => {
        expect(ringArea(woundRing(r, 'anticlockwise'))).toBeGreaterThan(0);
        expect(ringArea(woundRing(r, 'clockwise'))).toBeLessThan(0);
        expect(woundRing(r, ringArea(r) > 0 ? 'anticlockwise' : 'clockwise')).toBe(r);
      }),
    );
  });

  it('of small outlines keep their digits: a square of 10 m', () => {
    const side = 0.01;
    for (const centre of [toVector(12, 34), toVector(89.9999, 5), toVector(0, 180)]) {
      const r = [45, -45, -135, 135].map((azimuth) => destination(centre, azimuth, side / Math.SQRT2));
      expect(Math.abs(areaKm2([r]) / side ** 2 - 1)).toBeLessThan(1e-6);
    }
  });

  it('take the side that is meant, holes away, and settle a tie by direction', () => {
    const sphere = 4 * Math.PI * EARTH_RADIUS_KM ** 2;
    const hole = ring([20, 20], [40, 20], [30, 35]);
    const whole = areaKm2([octant]);
    expect(Math.abs(areaKm2([octant, hole]) + areaKm2([reversed(hole)]) - whole)).toBeLessThan(1e-3);
    expect(Math.abs(areaKm2([octant], 'larger') + whole - sphere)).toBeLessThan(1e-3);
    expect(Math.abs(areaKm2([equator], 'larger') - sphere / 2)).toBeLessThan(1e-3);
    expect(areaKm2([])).toBe(0);
  });
});

describe('what an outline holds', () => {
  it('agrees with d3-geo', () => {
    fc.assert(
      fc.property(outline, place, ({ ring: r }, v) => {
        fc.pre(r.every((a, i) => distanceToArc(v, a, r[(i + 1) % r.length] ?? a) > 1e-6));
        const { lat, lon } = toLatLon(v);
        expect(contains([r], v)).toBe(
          geoContains({ type: 'Polygon', coordinates: [writeRing(reversed(r))] }, [lon, lat]),
        );
      }),
      { numRuns: 500 },
    );
  });

  it('is the same for either direction, and the rest of the sphere for the larger side', () => {
    fc.assert(
      fc.property(outline, place, ({ ring: r, centre }, v) => {
        fc.pre(r.every((a, i) => distanceToArc(v, a, r[(i + 1) % r.length] ?? a) > 1e-6));
        expect(contains([reversed(r)], v)).toBe(contains([r], v));
        expect(contains([r], v, 'larger')).toBe(!contains([r], v));
        if (r.length > 3) expect(contains([r], centre)).toBe(true);
      }),
    );
  });

  it('is right at poles and antipodes', () => {
    const [north, south] = [toVector(90, 0), toVector(-90, 0)];
    expect([contains([polarCap], north), contains([polarCap], south)]).toEqual([true, false]);
    expect([contains([polarCap], north, 'larger'), contains([polarCap], south, 'larger')]).toEqual([
      false,
      true,
    ]);
    const band = ring(...Array.from({ length: 12 }, (_, i): [number, number] => [30 * i, i % 2 ? 25 : -25]));
    expect(contains([band], north) && contains([band], south)).toBe(false);
    expect(contains([octant], toVector(-35, -135))).toBe(false);
  });

  it('knows outlines that reach a pole along the antimeridian and back', () => {
    const cut = ring([-180, -90], [-180, -70], [-60, -65], [60, -72], [180, -70], [180, -90]);
    expect(contains([cut], toVector(-80, 179.99))).toBe(true);
    expect(contains([cut], toVector(-80, -179.99))).toBe(true);
    expect(contains([cut], toVector(-50, 10))).toBe(false);
    const plain = ring([-60, -65], [60, -72], [180, -70]);
    expect(Math.abs(areaKm2([cut]) - areaKm2([plain]))).toBeLessThan(1e-3);
  });

  it('includes its edges and corners, those of holes too, to BOUNDARY_TOLERANCE_RAD', () => {
    fc.assert(
      fc.property(outline, fc.nat(11), fc.double({ min: 0, max: 1, noNaN: true }), ({ ring: r }, i, s) => {
        const [a = toVector(90, 0), b = toVector(90, 0)] = [r[i % r.length], r[(i + 1) % r.length]];
        expect(contains([r], interpolateArc(a, b, s))).toBe(true);
        expect(contains([r], a)).toBe(true);
      }),
    );
    const hole = ring([20, 20], [40, 20], [30, 35]);
    expect(contains([octant, hole], toVector(20, 20))).toBe(true);
    expect(contains([octant, hole], toVector(25, 30))).toBe(false);
    const beside = destination(toVector(0, 45), 180, 10 * BOUNDARY_TOLERANCE_RAD * EARTH_RADIUS_KM);
    expect(contains([octant], beside)).toBe(false);
  });

  it('is the left side of a ring that halves the sphere', () => {
    for (const inside of ['smaller', 'larger'] as const) {
      expect(contains([equator], toVector(50, 12), inside)).toBe(true);
      expect(contains([equator], toVector(-50, 12), inside)).toBe(false);
      expect(contains([reversed(equator)], toVector(-50, 12), inside)).toBe(true);
    }
  });

  it('is nothing for fewer than three corners', () => {
    expect(contains([], toVector(1, 2))).toBe(false);
    expect(contains([ring([0, 0], [10, 0])], toVector(0, 5))).toBe(false);
  });
});

describe('caps and centres', () => {
  it('bound all corners and edges, little above the least', () => {
    fc.assert(
      fc.property(outline, ({ ring: r, centre }) => {
        const cap = boundingCap(r);
        for (const v of densify(r, 1))
          expect(angularDistance(cap.centre, v)).toBeLessThanOrEqual(cap.radius + 1e-14);
        const round = Math.max(...r.map((v) => angularDistance(centre, v)));
        expect(cap.radius).toBeLessThan(round * (1 + CAP_EXCESS));
      }),
    );
  });

  it('are the whole sphere where the corners do not fit under a hemisphere', () => {
    expect(boundingCap(equator)).toEqual({ centre: [0, 0, 1], radius: Math.PI, cosRadius: -1 });
    expect(boundingCap([]).radius).toBe(Math.PI);
    expect(boundingCap([toVector(5, 6)]).radius).toBeLessThan(1e-14);
  });

  it('centre outlines where d3-geo does', () => {
    fc.assert(
      fc.property(outline, ({ ring: r }) => {
        const [lon, lat] = geoCentroid({ type: 'Polygon', coordinates: [writeRing(reversed(r))] });
        expect(distanceKm(centroid([r]), toVector(lat, lon))).toBeLessThan(1e-3);
        expect(distanceKm(centroid([reversed(r)]), centroid([r]))).toBeLessThan(1e-6);
      }),
    );
  });

  it('centre the larger side, holes and bands', () => {
    expect(toLatLon(centroid([polarCap]))).toEqual({ lat: 90, lon: 0 });
    expect(toLatLon(centroid([polarCap], 'larger'))).toEqual({ lat: -90, lon: 0 });
    const hole = ring([5, 5], [40, 5], [5, 40]);
    const without = centroid([octant, hole]);
    expect(angularDistance(without, toVector(5, 5))).toBeGreaterThan(
      angularDistance(centroid([octant]), toVector(5, 5)),
    );
  });
});

describe('denser outlines', () => {
  it('keep their shape along great circles, no edge longer than asked', () => {
    const dense = densify(octant, 7);
    expect(dense).toHaveLength(39);
    dense.forEach((a, i) => expect(toDegrees(angularDistance(a, dense[(i + 1) % 39] ?? a))).toBeLessThan(7));
    expect(Math.abs(ringArea(dense) - ringArea(octant))).toBeLessThan(39 * AREA_ERROR_SR_PER_EDGE);
    expect(densify(octant, 7, { closed: false })).toHaveLength(27);
    expect(() => densify(octant, 0)).toThrow(/max_deg 0/);
  });

  it('follow edges straight in longitude and latitude to STRAIGHT_EDGE_STRAY_DEG', () => {
    const edges = [
      [
        [-20, 60],
        [75, 60],
      ],
      [
        [170, 10],
        [-160, 40],
      ],
      [
        [0, 80],
        [120, 86],
      ],
      [
        [33, 50],
        [73, 90],
      ],
      [
        [10, -20],
        [14, 70],
      ],
    ] as [[number, number], [number, number]][];
    for (const [from, to] of edges) {
      const dense = densifyStraight([from, to], 1);
      const east = ((to[0] - from[0] + 540) % 360) - 180;
      dense.slice(1).forEach((_, i) => {
        const [a, b] = [dense[i] ?? from, dense[i + 1] ?? to];
        const middle = toVector(
          (a[1] + b[1]) / 2,
          (a[0] + (Math.abs(b[0] - a[0]) < 180 ? b[0] : b[0] + 360)) / 2,
        );
        const stray = distanceToArc(middle, toVector(a[1], a[0]), toVector(b[1], b[0]));
        expect(toDegrees(stray)).toBeLessThan(STRAIGHT_EDGE_STRAY_DEG);
      });
      expect(dense.length - 1).toBe(Math.ceil(Math.max(Math.abs(east), Math.abs(to[1] - from[1]))));
      expect(dense.at(-1)).toEqual(to);
    }
    expect(() => densifyStraight([[0, 0]], NaN)).toThrow(/max_deg/);
  });

  it('are turned edge by edge as the whole is', () => {
    const q = fromPole(-34, 71, 123);
    const turned = densify(
      octant.map((v) => rotate(q, v)),
      10,
    );
    densify(octant, 10).forEach((v, i) =>
      expect(angularDistance(rotate(q, v), turned[i] ?? v)).toBeLessThan(1e-14),
    );
  });
});
