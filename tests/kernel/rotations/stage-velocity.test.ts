import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  add,
  angularVelocity,
  compileModel,
  cross,
  EARTH_RADIUS_KM,
  fromPole,
  halfStage,
  IDENTITY,
  LINK_ERROR_RAD,
  log,
  multiply,
  norm,
  poseAt,
  rotate,
  scale,
  SPEED_ERROR_MM_YR,
  stageOf,
  stageRotation,
  subtract,
  toDegrees,
  toPole,
  toRadians,
  toVector,
  type Vector3,
  velocityAt,
  wholeStage,
  youngerFromStage,
} from '../../../src/kernel';
import { block, frame, model as anyModel, place, placed, rotation, row, turnBetween } from '../support';

const spin = frame('spin');
const difference = (a: Vector3, b: Vector3): number => norm(subtract(a, b));

describe('stage rotations', () => {
  it('lead from the older to the younger total, in either coordinates, and back', () => {
    fc.assert(
      fc.property(
        rotation,
        rotation,
        fc.constantFrom('reference', 'block'),
        (older, younger, coordinates) => {
          const stage = stageOf(older, younger, coordinates);
          expect(turnBetween(youngerFromStage(older, stage, coordinates), younger)).toBeLessThan(
            LINK_ERROR_RAD,
          );
          expect(turnBetween(multiply(stage, stageOf(younger, older, coordinates)), IDENTITY)).toBeLessThan(
            LINK_ERROR_RAD,
          );
        },
      ),
    );
  });

  it('have poles apart in the two coordinates, of one angle: the block’s is carried by the block', () => {
    const model = compileModel(
      [block('avon'), spin],
      [row(['avon', 'spin', 10, 40, 20, 25]), row(['avon', 'spin', 30, -10, 80, 40])],
    );
    const fixed = placed(stageRotation(model, 'avon', 30, 10, 'spin')).quaternion;
    const own = placed(stageRotation(model, 'avon', 30, 10, 'spin', 'block')).quaternion;
    expect(toPole(own).angle_deg).toBeCloseTo(toPole(fixed).angle_deg, 12);
    expect(turnBetween(own, fixed)).toBeGreaterThan(0.05);
    const carried = rotate(fromPole(-10, 80, 40), log(own));
    expect(difference(carried, log(fixed))).toBeLessThan(1e-14);
  });

  it('turned round are the inverse, and without a place answer why', () => {
    const model = compileModel(
      [block('avon', { appears_ma: 40 }), spin],
      [row(['avon', 'spin', 30, -10, 80, 40])],
    );
    const there = placed(stageRotation(model, 'avon', 25, 5, 'spin')).quaternion;
    const back = placed(stageRotation(model, 'avon', 5, 25, 'spin')).quaternion;
    expect(turnBetween(multiply(there, back), IDENTITY)).toBeLessThan(LINK_ERROR_RAD);
    expect(stageRotation(model, 'avon', 50, 5, 'spin')).toMatchObject({
      status: 'older than block',
      quaternion: null,
    });
    expect(stageRotation(model, 'avon', 5, 35, 'spin')).toMatchObject({
      status: 'outside rotations',
      at: 'avon',
    });
  });

  it('are shared between two flanks, and put together again', () => {
    fc.assert(
      fc.property(rotation, fc.double({ min: 0.1, max: 0.9, noNaN: true }), (stage, fraction) => {
        const [one, other] = [halfStage(stage, fraction), halfStage(stage, 1 - fraction)];
        expect(turnBetween(multiply(one, other), stage)).toBeLessThan(2 * LINK_ERROR_RAD);
        expect(turnBetween(wholeStage(one, fraction), stage)).toBeLessThan(10 * LINK_ERROR_RAD);
      }),
    );
    expect(turnBetween(halfStage(fromPole(33, 44, 50)), fromPole(33, 44, 25))).toBeLessThan(LINK_ERROR_RAD);
    expect(turnBetween(halfStage(IDENTITY), IDENTITY)).toBe(0);
    expect(() => wholeStage(IDENTITY, 0)).toThrow(/fraction 0/);
  });
});

describe('velocities', () => {
  it('are Ω × x, with speed and azimuth of their components', () => {
    fc.assert(
      fc.property(place, rotation, (x, q) => {
        const omega = scale(log(q), 0.05);
        const { east_mm_yr, north_mm_yr, speed_mm_yr, azimuth_deg } = velocityAt(x, omega);
        expect(Math.abs(speed_mm_yr - EARTH_RADIUS_KM * norm(cross(omega, x)))).toBeLessThan(
          SPEED_ERROR_MM_YR,
        );
        if (azimuth_deg === null) return;
        expect(Math.abs(speed_mm_yr * Math.sin(toRadians(azimuth_deg)) - east_mm_yr)).toBeLessThan(
          SPEED_ERROR_MM_YR,
        );
        expect(Math.abs(speed_mm_yr * Math.cos(toRadians(azimuth_deg)) - north_mm_yr)).toBeLessThan(
          SPEED_ERROR_MM_YR,
        );
      }),
    );
    expect(velocityAt(toVector(10, 20), [0, 0, 0])).toEqual({
      east_mm_yr: 0,
      north_mm_yr: 0,
      speed_mm_yr: 0,
      azimuth_deg: null,
    });
    expect(velocityAt(toVector(31, 62), scale(toVector(31, 62), 0.1)).azimuth_deg).toBeNull();
  });

  it('over a window end at the jump of a hand-over, which is no motion', () => {
    const rates = compileModel(
      [block('avon'), block('brant'), spin],
      [
        row(['avon', 'spin', 30, 90, 0, 30]),
        row(['avon', 'brant', 30, 90, 0, 30.5]),
        row(['avon', 'brant', 60, 90, 0, 90.5]),
        row(['brant', 'spin', 60, 90, 0, 0]),
      ],
    );
    const at = (age: number, window_myr: number) =>
      placed(angularVelocity(rates, 'avon', age, 'spin', { window_myr }));
    const rate = ({ omega }: { omega: Vector3 }) => toDegrees(norm(omega));
    for (const window of [0.1, 2, 20]) {
      expect(rate(at(30, window))).toBeCloseTo(1, 9);
      expect(rate(at(29.99, window))).toBeCloseTo(1, 9);
      expect(rate(at(30.01, window))).toBeCloseTo(2, 6);
    }
    expect(at(30, 2)).toMatchObject({ older_ma: 30, younger_ma: 29, clipped: true });
    expect(at(31, 4).younger_ma).toBeCloseTo(30, 8);
    expect(at(40, 2)).toMatchObject({ older_ma: 41, younger_ma: 39, clipped: false });
    expect(() => angularVelocity(rates, 'avon', 30, 'spin', { window_myr: -5 })).toThrow(/window_myr -5/);
  });

  it('over a window go on through a hand-over without a jump', () => {
    const model = compileModel(
      [block('avon'), block('brant'), spin],
      [
        row(['avon', 'spin', 30, 90, 0, 30]),
        row(['avon', 'brant', 30, 90, 0, 30]),
        row(['avon', 'brant', 60, 90, 0, 90]),
        row(['brant', 'spin', 60, 90, 0, 0]),
      ],
    );
    const across = placed(angularVelocity(model, 'avon', 30, 'spin', { window_myr: 4 }));
    expect(across).toMatchObject({ older_ma: 32, younger_ma: 28, clipped: false });
    expect(toDegrees(norm(across.omega))).toBeCloseTo(1.5, 12);
  });

  it('through a circuit agree with the paths of points', () => {
    const code = fc.constantFrom('b1', 'b3', 'b5', 'b6', 'mantle');
    fc.assert(
      fc.property(
        anyModel,
        code,
        code,
        fc.double({ min: 0.1, max: 55, noNaN: true }),
        place,
        (model, a, x, t, p) => {
          const velocity = angularVelocity(model, a, t, x);
          if (velocity.status !== 'placed' || velocity.older_ma - velocity.younger_ma < 0.01) return;
          const step = 1e-4;
          fc.pre(t - step > velocity.younger_ma && t + step < velocity.older_ma);
          const at = (age: number): Vector3 => rotate(placed(poseAt(model, a, age, x)).quaternion, p);
          const moved = scale(subtract(at(t - step), at(t + step)), 1 / (2 * step));
          expect(difference(moved, cross(velocity.omega, at(t)))).toBeLessThan(1e-7);
        },
      ),
      { numRuns: 300 },
    );
  });

  it('add up: Ω(B|F) = Ω(A|F) + R(A|F) Ω(B|A), and turn round with the point of view', () => {
    fc.assert(
      fc.property(
        anyModel,
        fc.constantFrom('b2', 'b4', 'b6'),
        fc.constantFrom('b1', 'b3', 'mantle'),
        fc.double({ min: 0, max: 40, noNaN: true }),
        (model, b, a, t) => {
          const seen = (block_: string, from: string) => angularVelocity(model, block_, t, from);
          const [bf, af, ba, ab] = [seen(b, 'spin'), seen(a, 'spin'), seen(b, a), seen(a, b)];
          if (
            bf.status !== 'placed' ||
            af.status !== 'placed' ||
            ba.status !== 'placed' ||
            ab.status !== 'placed'
          )
            return;
          const r = placed(poseAt(model, a, t, 'spin')).quaternion;
          expect(difference(bf.omega, add(af.omega, rotate(r, ba.omega)))).toBeLessThan(1e-14);
          const back = placed(poseAt(model, b, t, a)).quaternion;
          expect(difference(ba.omega, scale(rotate(back, ab.omega), -1))).toBeLessThan(1e-14);
        },
      ),
    );
  });

  const rows = [
    row(['avon', 'spin', 10, 90, 0, 10]),
    row(['avon', 'spin', 30, 90, 0, 50]),
    row(['brant', 'avon', 25, 90, 0, 50]),
    row(['corrie', 'spin', 40, 90, 0, 4]),
    row(['corrie', 'spin', 60, 90, 0, 10]),
  ];
  const model = compileModel(
    [block('avon'), block('brant'), block('corrie', { disappears_ma: 35 }), block('dunlin'), spin],
    rows,
  );
  const degrees = (b: string, t: number, window_myr = 0) => {
    const { omega, status: _status, ...rest } = placed(angularVelocity(model, b, t, 'spin', { window_myr }));
    return { z: Math.round(toDegrees(omega[2]) * 1e9) / 1e9, ...rest };
  };

  it('take the younger stage at a row’s age, the first at 0, and intersect the ages of the links', () => {
    expect(degrees('avon', 0)).toEqual({ z: -1, older_ma: 10, younger_ma: 0, clipped: false });
    expect(degrees('avon', 10)).toEqual({ z: -1, older_ma: 10, younger_ma: 0, clipped: false });
    expect(degrees('avon', 10.001)).toEqual({ z: -2, older_ma: 30, younger_ma: 10, clipped: false });
    expect(degrees('brant', 15)).toEqual({ z: -4, older_ma: 25, younger_ma: 10, clipped: false });
    expect(degrees('corrie', 40)).toEqual({ z: -0.3, older_ma: 60, younger_ma: 40, clipped: false });
    expect(placed(angularVelocity(model, 'avon', 5, 'avon'))).toMatchObject({
      omega: [0, 0, 0],
      older_ma: 60,
      younger_ma: 0,
    });
  });

  it('over a window are the mean rate, cut to the sequence and said so', () => {
    expect(degrees('avon', 10, 8)).toEqual({ z: -1.5, older_ma: 14, younger_ma: 6, clipped: false });
    expect(degrees('avon', 2, 8)).toEqual({ z: -1, older_ma: 6, younger_ma: 0, clipped: true });
    expect(degrees('avon', 28, 8)).toEqual({ z: -2, older_ma: 30, younger_ma: 24, clipped: true });
    expect(degrees('brant', 20, 30)).toEqual({ z: -3.75, older_ma: 25, younger_ma: 5, clipped: true });
    expect(degrees('corrie', 41, 8)).toEqual({ z: -0.3, older_ma: 45, younger_ma: 40, clipped: true });
  });

  it('go on over a hand-over, and stop where the next circuit does not meet', () => {
    const handed = [
      row(['avon', 'spin', 20, 90, 0, 20]),
      row(['avon', 'limbo', 20, 90, 0, 5]),
      row(['avon', 'limbo', 50, 90, 0, 5]),
    ];
    const over = [
      row(['avon', 'brant', 20, 90, 0, 20]),
      row(['avon', 'spin', 20, 90, 0, 20]),
      row(['avon', 'spin', 50, 90, 0, 80]),
      row(['brant', 'spin', 60, 90, 0, 0]),
    ];
    const mean = (rs: typeof rows, t: number) => {
      const m = compileModel([block('avon'), block('brant'), spin], rs);
      const {
        omega,
        status: _status,
        ...rest
      } = placed(angularVelocity(m, 'avon', t, 'spin', { window_myr: 10 }));
      return { z: toDegrees(omega[2]).toFixed(6), ...rest };
    };
    expect(mean(over, 20)).toEqual({ z: '-1.500000', older_ma: 25, younger_ma: 15, clipped: false });
    expect(mean(handed, 18)).toEqual({ z: '-1.000000', older_ma: 20, younger_ma: 13, clipped: true });
    const back = [
      row(['avon', 'limbo', 20, 90, 0, 20]),
      row(['avon', 'spin', 20, 90, 0, 5]),
      row(['avon', 'spin', 50, 90, 0, 65]),
    ];
    expect(mean(back, 22)).toMatchObject({ z: '-2.000000', older_ma: 27, clipped: true });
  });

  it('say why there are none', () => {
    expect(angularVelocity(model, 'corrie', 20, 'spin')).toEqual({
      status: 'younger than block',
      at: 'corrie',
    });
    expect(angularVelocity(model, 'avon', 31, 'spin')).toEqual({ status: 'outside rotations', at: 'avon' });
    expect(angularVelocity(model, 'dunlin', 0, 'spin')).toEqual({
      status: 'outside rotations',
      at: 'dunlin',
    });
    expect(angularVelocity(model, 'avon', 0, 'dunlin').status).toBe('outside rotations');
    expect(angularVelocity(model, 'dunlin', 0, 'dunlin')).toMatchObject({
      status: 'placed',
      omega: [0, 0, 0],
    });
    const one = compileModel(
      [block('eider', { disappears_ma: 5 }), spin],
      [row(['eider', 'spin', 20, 1, 2, 3])],
    );
    expect(poseAt(one, 'eider', 20, 'spin').status).toBe('placed');
    expect(angularVelocity(one, 'eider', 20, 'spin')).toEqual({ status: 'outside rotations', at: 'eider' });
    expect(angularVelocity(one, 'eider', 20, 'spin', { window_myr: 4 }).status).toBe('outside rotations');
    expect(() => angularVelocity(model, 'avon', 5, 'spin', { window_myr: NaN })).toThrow(/window_myr/);
  });
});
