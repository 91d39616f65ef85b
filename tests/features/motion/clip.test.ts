import { geoContains, geoOrthographic, geoPath } from 'd3-geo';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { Clipper } from '../../../src/features/motion/globe/clip';
import { contains } from '../../../src/features/motion/globe/contains';
import { placeOf, turnBack, viewMatrix, vectorOf } from '../../../src/features/motion/globe/matrix';
import { leftArea, pointsOf, polygonShape } from '../../../src/features/motion/globe/shape';
import { Recorder } from './recorder';

type Ring = [number, number][];

/** A star-like ring around a centre, `radii` in degrees, anticlockwise seen from outside. */
function star(lat: number, lon: number, radii: number[]): Ring {
  const m = viewMatrix({ lat, lon, roll: 0 });
  const ring = radii.map((r, i): [number, number] => {
    const t = (2 * Math.PI * i) / radii.length;
    const rad = (r * Math.PI) / 180;
    const p = turnBack(m, [Math.sin(rad) * Math.cos(t), Math.sin(rad) * Math.sin(t), Math.cos(rad)]);
    const place = placeOf(p);
    return [place.lon, place.lat];
  });
  return [...ring, ring[0] as [number, number]];
}

const DISC = { cx: 0, cy: 0, radius: 100 };

/** Share of the disc's sample points where our picture and d3-geo's differ. */
function difference(rings: Ring[], centre: { lat: number; lon: number; roll: number }): number {
  const ours = new Recorder();
  const clipper = new Clipper();
  clipper.load(polygonShape({ type: 'Polygon', coordinates: rings }), 0, viewMatrix(centre));
  clipper.fill(ours, DISC);
  const theirs = new Recorder();
  const projection = geoOrthographic()
    .scale(DISC.radius)
    .translate([0, 0])
    .precision(0.05)
    .clipAngle(90)
    .rotate([-centre.lon, -centre.lat, centre.roll]);
  // d3-geo takes the inside to the right of a ring.
  const reversed = rings.map((ring) => [...ring].reverse());
  geoPath(
    projection,
    theirs as unknown as CanvasRenderingContext2D,
  )({ type: 'Polygon', coordinates: reversed });
  let differ = 0;
  let all = 0;
  for (let x = -99; x <= 99; x += 3) {
    for (let y = -99; y <= 99; y += 3) {
      if (Math.hypot(x, y) > 98.5) continue;
      all++;
      if (ours.inside(x + 0.137, y + 0.271) !== theirs.inside(x + 0.137, y + 0.271)) differ++;
    }
  }
  return differ / all;
}

const centre = fc.record({
  lat: fc.double({ min: -90, max: 90, noNaN: true }),
  lon: fc.double({ min: -180, max: 180, noNaN: true }),
  roll: fc.double({ min: -180, max: 180, noNaN: true }),
});
const radii = (min: number, max: number) =>
  fc.array(fc.double({ min, max, noNaN: true }), { minLength: 40, maxLength: 90 });

describe('horizon clipping draws the same region as d3-geo', () => {
  // Ours draws edges of up to 2 degrees as straight lines, d3-geo to a twentieth of a pixel, and samples that lie on
  // an edge fall either way: at most 10 of 3,400.
  const ALLOWED = 0.003;

  it('for blocks of every size, over poles and the limb', () => {
    fc.assert(
      fc.property(centre, centre, radii(8, 80), (view, place, r) => {
        expect(difference([star(place.lat, place.lon, r)], view)).toBeLessThanOrEqual(ALLOWED);
      }),
      { numRuns: 40, seed: 41 },
    );
  });

  it('for rings that cross the limb many times', () => {
    const teeth = Array.from({ length: 120 }, (_, i) => (i % 2 ? 94 : 82.5));
    // The inside is the smaller side: here the cap of about 89 degrees.
    expect(difference([star(14, -37, teeth)], { lat: 14.6, lon: -36.2, roll: 11 })).toBeLessThanOrEqual(
      ALLOWED,
    );
  });

  it('for a block that holds the whole horizon, with a hole in view', () => {
    const outer = star(
      -12,
      75,
      Array.from({ length: 90 }, (_, i) => 89 - (i % 3)),
    );
    const hole = star(
      -15,
      79,
      Array.from({ length: 60 }, (_, i) => 21 + (i % 5)),
    ).reverse();
    expect(difference([outer, hole], { lat: -12, lon: 75, roll: 0 })).toBeLessThanOrEqual(ALLOWED);
    expect(difference([outer, hole], { lat: 12, lon: -105, roll: 0 })).toBeLessThanOrEqual(ALLOWED);
  });
});

describe('larger side', () => {
  it('fills all but the ring where `inside: larger` is stated', () => {
    const ring = star(
      20,
      30,
      Array.from({ length: 72 }, () => 25),
    );
    const shape = polygonShape({ type: 'Polygon', coordinates: [ring] }, 'larger');
    const clipper = new Clipper();
    const seen = new Recorder();
    clipper.load(shape, 0, viewMatrix({ lat: 20, lon: 30, roll: 0 }));
    clipper.fill(seen, DISC);
    expect(seen.inside(3, 5)).toBe(false);
    expect(seen.inside(-60, 31)).toBe(true);
    const behind = new Recorder();
    clipper.load(shape, 0, viewMatrix({ lat: -20, lon: -150, roll: 0 }));
    clipper.fill(behind, DISC);
    expect(behind.inside(3, 5)).toBe(true);
  });
});

describe('contains', () => {
  it('agrees with d3-geo on random blocks and points', () => {
    let mismatches = 0;
    fc.assert(
      fc.property(centre, radii(10, 70), centre, (place, r, point) => {
        const ring = star(place.lat, place.lon, r);
        const ours = contains(
          polygonShape({ type: 'Polygon', coordinates: [ring] }),
          vectorOf(point.lat, point.lon),
        );
        const reversed = [...ring].reverse();
        const theirs = geoContains({ type: 'Polygon', coordinates: [reversed] }, [point.lon, point.lat]);
        if (ours !== theirs) mismatches++;
      }),
      { numRuns: 400, seed: 7 },
    );
    expect(mismatches).toBe(0);
  });
});

describe('leftArea', () => {
  it('gives an octant π/2 and its other side 7π/2 (common practice, no source: an eighth of the sphere)', () => {
    const octant = pointsOf([[0, 0], [90, 0], [0, 90]], true); // prettier-ignore
    const other = pointsOf([[0, 90], [90, 0], [0, 0]], true); // prettier-ignore
    expect(Math.abs(leftArea(octant) - Math.PI / 2)).toBeLessThan(1e-6);
    expect(Math.abs(leftArea(other) - (7 * Math.PI) / 2)).toBeLessThan(1e-6);
  });
});
