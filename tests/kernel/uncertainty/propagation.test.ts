import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  compileModel,
  type Covariance,
  exp,
  fromPole,
  inverse,
  JACOBIAN_ERROR,
  leftJacobianInverse,
  log,
  type Matrix3,
  multiply,
  poseAt,
  poseSensitivities,
  poseUncertainty,
  type Quaternion,
  rightJacobian,
  rightJacobianInverse,
  type RotationInput,
  scale,
  stageRotation,
  stageUncertainty,
  toMatrix,
  toPole,
  toVector,
  uncertaintyOf,
  type Vector3,
} from '../../../src/kernel';
import { block, covariance, frame, place, placed, row } from '../support';

const AXES: readonly Vector3[] = [
  [1, 0, 0],
  [0, 1, 0],
  [0, 0, 1],
];
const entry = (m: Matrix3, i: number, j: number): number => m[3 * i + j] ?? NaN;
const full = ([xx, xy, xz, yy, yz, zz]: Covariance): Matrix3 => [xx, xy, xz, xy, yy, yz, xz, yz, zz];
const product = (a: Matrix3, b: Matrix3): number[] =>
  [0, 1, 2].flatMap((i) =>
    [0, 1, 2].map((j) => [0, 1, 2].reduce((sum, k) => sum + entry(a, i, k) * entry(b, k, j), 0)),
  );

/** The row moved by u in its block's present coordinates: R̂ Exp(u). */
function moved(given: RotationInput, u: Vector3): RotationInput {
  const pole = toPole(multiply(fromPole(given.pole_lat, given.pole_lon, given.angle_deg), exp(u)));
  return { ...given, ...pole };
}

const blocks = [block('avon'), block('brant'), block('corrie', { disappears_ma: 2 }), frame('spin')];
const rows = [
  row(['avon', 'spin', 20, 60, -20, 18]),
  row(['avon', 'spin', 50, 40, -35, 47]),
  row(['brant', 'avon', 30, 10, 70, -35]),
  row(['brant', 'avon', 70, -5, 95, -62]),
  row(['corrie', 'spin', 5, 33, 140, 12]),
  row(['corrie', 'spin', 45, 20, 150, 80]),
];

/**
 * u that takes the result R̂ of the rows to that of the moved rows, by central differences for each axis of
 * each row.
 */
function numericJacobian(result: (rotations: RotationInput[]) => Quaternion, i: number): Matrix3 {
  const step = 1e-5;
  const base = result(rows);
  const columns = AXES.map((axis) => {
    const at = (h: number) =>
      log(multiply(inverse(base), result(rows.map((r, k) => (k === i ? moved(r, scale(axis, h)) : r)))));
    const [a, b] = [at(step), at(-step)];
    return [0, 1, 2].map((k) => ((a[k] ?? NaN) - (b[k] ?? NaN)) / (2 * step));
  });
  return [0, 1, 2].flatMap((i2) => columns.map((c) => c[i2] ?? NaN)) as unknown as Matrix3;
}
const FINITE_DIFFERENCE = 1e-8;

describe('Jacobians of the rotation group', () => {
  it('agree with differences of Exp and Log, and with one another', () => {
    fc.assert(
      fc.property(
        place,
        fc.oneof(fc.double({ min: 0, max: 3.1, noNaN: true }), fc.constantFrom(0, 1e-9, 0.0099, 0.0101)),
        (axis, angle) => {
          const phi = scale(axis, angle);
          const jr = rightJacobian(phi);
          AXES.forEach((e, j) => {
            const step = 1e-6;
            const at = (h: number) =>
              log(
                multiply(inverse(exp(phi)), exp([phi[0] + h * e[0], phi[1] + h * e[1], phi[2] + h * e[2]])),
              );
            const [a, b] = [at(step), at(-step)];
            for (const i of [0, 1, 2])
              expect(Math.abs(((a[i] ?? NaN) - (b[i] ?? NaN)) / (2 * step) - entry(jr, i, j))).toBeLessThan(
                1e-8,
              );
          });
          product(jr, rightJacobianInverse(phi)).forEach((x, k) =>
            expect(Math.abs(x - (k % 4 === 0 ? 1 : 0))).toBeLessThan(JACOBIAN_ERROR),
          );
          const jl = leftJacobianInverse(phi);
          const jri = rightJacobianInverse(phi);
          for (const i of [0, 1, 2])
            for (const j of [0, 1, 2])
              expect(Math.abs(entry(jl, i, j) - entry(jri, j, i))).toBeLessThan(JACOBIAN_ERROR);
        },
      ),
    );
  });
});

describe('sensitivities', () => {
  const pose = (block_: string, age: number, from: string) => (rotations: RotationInput[]) =>
    placed(poseAt(compileModel(blocks, rotations), block_, age, from)).quaternion;

  it.each([
    ['brant', 41, 'spin'],
    ['brant', 20, 'spin'],
    ['brant', 10, 'corrie'],
    ['corrie', 33, 'brant'],
    ['avon', 50, 'spin'],
    ['spin', 44, 'brant'],
  ] as const)('of %s at %d Ma from %s agree with moving each row', (block_, age, from) => {
    const sensitivities = poseSensitivities(placed(poseAt(compileModel(blocks, rows), block_, age, from)));
    rows.forEach((r, i) => {
      const expected = numericJacobian(pose(block_, age, from), i);
      const ours = sensitivities.get(r.id)?.jacobian ?? ([0, 0, 0, 0, 0, 0, 0, 0, 0] as const);
      ours.forEach((x, k) => expect(Math.abs(x - (expected[k] ?? NaN))).toBeLessThan(FINITE_DIFFERENCE));
    });
  });

  it('beyond the oldest row, held, agree too', () => {
    const held = (rotations: RotationInput[]) =>
      placed(poseAt(compileModel(blocks, rotations), 'avon', 60, 'spin', { beyond: 'hold last stage' }));
    const sensitivities = poseSensitivities(held(rows));
    for (const i of [0, 1]) {
      const expected = numericJacobian((rotations) => held(rotations).quaternion, i);
      sensitivities
        .get(rows[i]?.id ?? '')
        ?.jacobian.forEach((x, k) =>
          expect(Math.abs(x - (expected[k] ?? NaN))).toBeLessThan(FINITE_DIFFERENCE),
        );
    }
  });

  it.each(['reference', 'block'] as const)(
    'of a stage in the coordinates of the %s add up before they are squared',
    (coordinates) => {
      const c: Covariance = [3e-5, 1e-5, -4e-6, 5e-5, 2e-6, 2e-5];
      const known = rows.map((r) => ({ ...r, covariance: c }));
      const stageOf = (rotations: RotationInput[]) =>
        placed(stageRotation(compileModel(blocks, rotations), 'brant', 44, 33, 'spin', coordinates));
      const uncertainty = stageUncertainty(stageOf(known), coordinates);
      rows.forEach((r, i) => {
        const expected = numericJacobian((rotations) => stageOf(rotations).quaternion, i);
        const ours =
          uncertainty.rows.find(({ row: { id } }) => id === r.id)?.jacobian ??
          ([0, 0, 0, 0, 0, 0, 0, 0, 0] as const);
        ours.forEach((x, k) => expect(Math.abs(x - (expected[k] ?? NaN))).toBeLessThan(FINITE_DIFFERENCE));
      });
      expect(uncertainty.at_least).toBe(false);
    },
  );
});

describe('covariances of poses', () => {
  it('of a row are the row’s own; of its inverse R C Rᵀ', () => {
    fc.assert(
      fc.property(covariance, (c) => {
        const model = compileModel(
          [block('avon'), frame('spin')],
          [row(['avon', 'spin', 10, 40, 50, 60], { covariance: c })],
        );
        const there = poseUncertainty(model, placed(poseAt(model, 'avon', 10, 'spin')));
        there.covariance.forEach((x, k) => expect(Math.abs(x - (c[k] ?? NaN))).toBeLessThan(1e-15));
        const back = poseUncertainty(model, placed(poseAt(model, 'spin', 10, 'avon')));
        const r = toMatrix(fromPole(40, 50, 60));
        const expected = product(product(r, full(c)) as unknown as Matrix3, [
          r[0],
          r[3],
          r[6],
          r[1],
          r[4],
          r[7],
          r[2],
          r[5],
          r[8],
        ]);
        full(back.covariance).forEach((x, k) =>
          expect(Math.abs(x - (expected[k] ?? NaN))).toBeLessThan(1e-14),
        );
      }),
    );
  });

  it('compose by C = R₂ᵀ C₁ R₂ + C₂', () => {
    const [c1, c2]: [Covariance, Covariance] = [
      [4e-4, 1e-4, -5e-5, 2e-4, 3e-5, 6e-4],
      [1e-4, -3e-5, 2e-5, 5e-4, 1e-5, 2e-4],
    ];
    const model = compileModel(blocks, [
      row(['avon', 'spin', 10, 40, 50, 60], { covariance: c1 }),
      row(['brant', 'avon', 10, -20, 10, 35], { covariance: c2 }),
    ]);
    const { covariance: c } = poseUncertainty(model, placed(poseAt(model, 'brant', 10, 'spin')));
    const r2 = toMatrix(fromPole(-20, 10, 35));
    const turned = product(
      product(
        [r2[0], r2[3], r2[6], r2[1], r2[4], r2[7], r2[2], r2[5], r2[8]],
        full(c1),
      ) as unknown as Matrix3,
      r2,
    );
    full(c).forEach((x, k) =>
      expect(Math.abs(x - ((turned[k] ?? NaN) + (full(c2)[k] ?? NaN)))).toBeLessThan(1e-15),
    );
  });

  it('leave out a row that both blocks pass: it cancels', () => {
    const rotations = [
      row(['avon', 'spin', 30, 40, 50, 60], { covariance: [1, 0, 0, 1, 0, 1] }),
      row(['brant', 'avon', 30, -20, 10, 35], { covariance: [1e-4, 0, 0, 1e-4, 0, 1e-4] }),
      row(['corrie', 'avon', 30, 5, 90, -15], { covariance: [2e-4, 0, 0, 2e-4, 0, 2e-4] }),
    ];
    const model = compileModel(blocks, rotations);
    const result = poseUncertainty(model, placed(poseAt(model, 'brant', 30, 'corrie')));
    expect(result.rows.map(({ row: { id } }) => id)).toEqual([rotations[1]?.id, rotations[2]?.id]);
    [3e-4, 0, 0, 3e-4, 0, 3e-4].forEach((x, k) =>
      expect(Math.abs((result.covariance[k] ?? NaN) - x)).toBeLessThan(1e-15),
    );
  });

  it('are those of many draws (Monte Carlo), between rows of a chain', () => {
    const draw = normals(7);
    const factors = rows.map((_, i): Matrix3 => [
      0.012 + 0.001 * i,
      0,
      0,
      0.004,
      0.008,
      0,
      -0.003,
      0.002,
      0.006,
    ]);
    const known = rows.map((r, i) => {
      const f = factors[i] ?? factors[0];
      const c = f && product(f, [f[0], f[3], f[6], f[1], f[4], f[7], f[2], f[5], f[8]]);
      return c ? { ...r, covariance: [c[0], c[1], c[2], c[4], c[5], c[8]] as unknown as Covariance } : r;
    });
    const at = (rotations: RotationInput[]) =>
      placed(poseAt(compileModel(blocks, rotations), 'brant', 41, 'corrie'));
    const base = at(known);
    const samples = Array.from({ length: 4000 }, () => {
      const shaken = known.map((r, i) => {
        const [a, b, c] = [draw(), draw(), draw()];
        const f = factors[i] ?? [0, 0, 0, 0, 0, 0, 0, 0, 0];
        return moved(r, [f[0] * a, f[3] * a + f[4] * b, f[6] * a + f[7] * b + f[8] * c]);
      });
      return log(multiply(inverse(base.quaternion), at(shaken).quaternion));
    });
    const { covariance: c } = poseUncertainty(compileModel(blocks, known), base);
    const size = Math.max(c[0], c[3], c[5]);
    [0, 1, 2].forEach((i) =>
      [0, 1, 2].forEach((j) => {
        const mean = samples.reduce((sum, u) => sum + (u[i] ?? NaN) * (u[j] ?? NaN), 0) / samples.length;
        expect(Math.abs(mean - entry(full(c), i, j))).toBeLessThan(0.08 * size);
      }),
    );
  });

  it('shrink between rows, whose errors are taken as independent', () => {
    const c: Covariance = [1e-4, 0, 0, 1e-4, 0, 1e-4];
    const model = compileModel(
      [block('avon'), frame('spin')],
      [
        row(['avon', 'spin', 10, 40, 50, 8], { covariance: c }),
        row(['avon', 'spin', 20, 40, 50, 16], { covariance: c }),
      ],
    );
    const along = (age: number): number => {
      const { covariance: got } = poseUncertainty(model, placed(poseAt(model, 'avon', age, 'spin')));
      const axis = toVector(40, 50);
      return [0, 1, 2].reduce(
        (sum, i) =>
          sum +
          [0, 1, 2].reduce((s, j) => s + (axis[i] ?? NaN) * entry(full(got), i, j) * (axis[j] ?? NaN), 0),
        0,
      );
    };
    expect(Math.abs(along(15) - 0.5e-4)).toBeLessThan(1e-12);
    expect(Math.abs(along(12.5) - (0.75 ** 2 + 0.25 ** 2) * 1e-4)).toBeLessThan(1e-12);
    expect(Math.abs(along(5) - 0.25e-4)).toBeLessThan(1e-12);
  });
});

describe('what is not known', () => {
  const c: Covariance = [1e-4, 0, 0, 1e-4, 0, 1e-4];
  const rotations = [
    row(['avon', 'spin', 10, 40, 50, 8], { covariance: c }),
    row(['avon', 'spin', 20, 40, 50, 16]),
    row(['avon', 'spin', 30, 40, 50, 20], { covariance: c }),
  ];
  const model = compileModel([block('avon'), frame('spin')], rotations);
  const at = (age: number) => poseUncertainty(model, placed(poseAt(model, 'avon', age, 'spin')));

  it('makes the result “at least” between and at rows without a covariance, and names them', () => {
    expect([5, 10, 15, 20, 25, 30].map((age) => at(age).at_least)).toEqual([
      false,
      false,
      true,
      true,
      true,
      false,
    ]);
    expect(at(15).without.map(({ id }) => id)).toEqual([rotations[1]?.id]);
    expect(at(5).without).toEqual([]);
  });

  it('is nothing at 0 Ma: present coordinates are exact, entered or implied', () => {
    expect(at(0)).toMatchObject({ covariance: [0, 0, 0, 0, 0, 0], at_least: false, rows: [] });
    const entered = compileModel(
      [block('avon'), frame('spin')],
      [row(['avon', 'spin', 0, 0, 0, 0]), ...rotations],
    );
    const between5 = poseUncertainty(entered, placed(poseAt(entered, 'avon', 5, 'spin')));
    expect(between5).toMatchObject({ at_least: false });
    between5.covariance.forEach((x, k) => expect(x).toBeCloseTo(at(5).covariance[k] ?? NaN, 18));
  });

  it('adds the error of a row’s age along the motion: (v σ)²', () => {
    const dated = compileModel(
      [block('avon'), frame('spin')],
      [row(['avon', 'spin', 20, 90, 0, 30], { covariance: c, age_two_sigma_ma: 1.6 })],
    );
    const got = poseUncertainty(dated, placed(poseAt(dated, 'avon', 20, 'spin'))).covariance;
    const turn = ((30 / 20) * Math.PI) / 180;
    [1e-4, 0, 0, 1e-4, 0, 1e-4 + (turn * 0.8) ** 2].forEach((x, k) =>
      expect(Math.abs((got[k] ?? NaN) - x)).toBeLessThan(1e-15),
    );
    const half = poseUncertainty(dated, placed(poseAt(dated, 'avon', 10, 'spin'))).covariance;
    expect(Math.abs(half[5] - (0.25e-4 + (turn * 0.4) ** 2))).toBeLessThan(1e-15);
  });

  it('is nothing of a result without rows', () => {
    expect(uncertaintyOf(new Map())).toEqual({
      covariance: [0, 0, 0, 0, 0, 0],
      at_least: false,
      without: [],
      rows: [],
    });
  });
});

/** Seeded standard normal numbers (mulberry32, Box–Muller), so that the draws are the same each time. */
function normals(seed: number): () => number {
  let state = seed;
  const uniform = (): number => {
    state = (state + 0x6d2b79f5) | 0;
    let t = Math.imul(state ^ (state >>> 15), 1 | state);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return (((t ^ (t >>> 14)) >>> 0) + 0.5) / 4294967296;
  };
  return () => Math.sqrt(-2 * Math.log(uniform())) * Math.cos(2 * Math.PI * uniform());
}
