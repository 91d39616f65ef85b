import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  angleBetween,
  centreOf,
  turn,
  turnBack,
  unit,
  viewMatrix,
  type Vec,
} from '../../../src/features/motion/globe/matrix';
import { drag, grab } from '../../../src/features/motion/globe/turning';

const onDisc = fc
  .record({
    r: fc.double({ min: 0, max: 0.97, noNaN: true }),
    a: fc.double({ min: 0, max: 6.28, noNaN: true }),
  })
  .map(({ r, a }): Vec => [r * Math.cos(a), r * Math.sin(a), Math.sqrt(1 - r * r)]);
const centre = fc.record({
  lat: fc.double({ min: -89, max: 89, noNaN: true }),
  lon: fc.double({ min: -180, max: 180, noNaN: true }),
  roll: fc.constantFrom(0, 0, 35, -120),
});

/** 0.02 pixels on a globe of 500 pixels radius. */
const CLOSE = 4e-5;

describe('dragging', () => {
  it('keeps the grabbed place under the pointer, from every view, over poles too', () => {
    fc.assert(
      fc.property(centre, onDisc, onDisc, onDisc, (from, down, through, to) => {
        let held = grab(from, down);
        for (const v of [through, to]) held = drag(held, v);
        const seen = turn(viewMatrix(held.centre), held.held);
        expect(angleBetween(seen, unit(to))).toBeLessThan(CLOSE);
      }),
      { numRuns: 500, seed: 23 },
    );
  });

  it('keeps north up for a short drag at low latitude', () => {
    const { centre: after } = drag(grab({ lat: -16, lon: 34, roll: 0 }, [0.1, 0.2, Math.sqrt(0.95)]), [
      0.3,
      -0.1,
      Math.sqrt(0.9),
    ]);
    expect(after.roll).toBe(0);
    expect(after.lon).toBeLessThan(34);
    expect(after.lat).toBeGreaterThan(-16);
  });
});

describe('view matrices', () => {
  it('give back their centre and roll', () => {
    fc.assert(
      fc.property(centre, (c) => {
        const back = centreOf(viewMatrix(c));
        for (const v of [
          [0.3, -0.5, 0.81],
          [0, 0, 1],
        ] as Vec[]) {
          // prettier-ignore
          const there = turn(viewMatrix(back), turnBack(viewMatrix(c), unit(v)));
          expect(angleBetween(there, unit(v))).toBeLessThan(1e-9);
        }
      }),
      { numRuns: 200, seed: 5 },
    );
  });

  it('put north up and east to the right (common practice, no source)', () => {
    const view = viewMatrix({ lat: 10, lon: 20, roll: 0 });
    const at = (lat: number, lon: number) => {
      const [f, l] = [(lat * Math.PI) / 180, (lon * Math.PI) / 180];
      return turn(view, [Math.cos(f) * Math.cos(l), Math.cos(f) * Math.sin(l), Math.sin(f)]);
    };
    expect(at(10, 20)[2]).toBeCloseTo(1, 12);
    expect(at(13, 20)[1]).toBeGreaterThan(0);
    expect(at(10, 23)[0]).toBeGreaterThan(0);
  });
});
