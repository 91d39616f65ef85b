import fc from 'fast-check';
import {
  type BlockInput,
  compileModel,
  type Covariance,
  fromPole,
  type Model,
  type Quaternion,
  type RotationInput,
  toVector,
  type Vector3,
} from '../../src/kernel';

export const block = (code: string, rest: Partial<BlockInput> = {}): BlockInput => ({
  code,
  kind: 'terrane',
  appears_ma: null,
  disappears_ma: null,
  ...rest,
});

export const frame = (code: string): BlockInput => block(code, { kind: 'frame' });

let rows = 0;

/** A row from [block, reference, age, pole latitude, pole longitude, angle]. */
export const row = (
  [code, relative_to, age_ma, pole_lat, pole_lon, angle_deg]: readonly [
    string,
    string,
    number,
    number,
    number,
    number,
  ],
  rest: Partial<RotationInput> = {},
): RotationInput => ({
  id: `row-${(rows += 1)}`,
  block: code,
  relative_to,
  age_ma,
  pole_lat,
  pole_lon,
  angle_deg,
  evidence: 'published',
  covariance: null,
  cov_dof: null,
  age_two_sigma_ma: null,
  source: null,
  ...rest,
});

/** The quaternion of a pose, stage or the like that the test expects to be there. */
export function placed<T extends { status: string }>(result: T): Extract<T, { status: 'placed' }> {
  if (result.status !== 'placed') throw new Error(`not placed: ${result.status}`);
  return result as Extract<T, { status: 'placed' }>;
}

/** Angle of the rotation between two, radians, exact for small differences. */
export function turnBetween(a: Quaternion, b: Quaternion): number {
  const minus = Math.hypot(a[0] - b[0], a[1] - b[1], a[2] - b[2], a[3] - b[3]);
  const plus = Math.hypot(a[0] + b[0], a[1] + b[1], a[2] + b[2], a[3] + b[3]);
  return 4 * Math.asin(Math.min(1, Math.min(minus, plus) / 2));
}

const smallest = (exponent: number): number => 10 ** exponent;

/** Latitudes that reach the poles and come ever nearer to them. */
export const latitude = fc.oneof(
  fc.double({ min: -90, max: 90, noNaN: true }),
  fc.constantFrom(-90, 90, 0),
  fc.double({ min: -12, max: -1, noNaN: true }).map((e) => 90 - smallest(e)),
);
/** Longitudes, unwrapped ones too, that reach the antimeridian and come ever nearer to it. */
export const longitude = fc.oneof(
  fc.double({ min: -180, max: 360, noNaN: true }),
  fc.constantFrom(-180, 180, 0, 90),
  fc.double({ min: -12, max: -1, noNaN: true }).map((e) => 180 - smallest(e)),
);
export const place: fc.Arbitrary<Vector3> = fc
  .tuple(latitude, longitude)
  .map(([lat, lon]) => toVector(lat, lon));

/** Angles in degrees that reach 0 and 180 and come ever nearer to them. */
export const angle = fc.oneof(
  fc.double({ min: -180, max: 180, noNaN: true }),
  fc.constantFrom(0, 180, -180, 90),
  fc.double({ min: -12, max: -1, noNaN: true }).map(smallest),
  fc.double({ min: -12, max: -1, noNaN: true }).map((e) => 180 - smallest(e)),
);
export const rotation: fc.Arbitrary<Quaternion> = fc
  .tuple(latitude, longitude, angle)
  .map(([lat, lon, degrees]) => fromPole(lat, lon, degrees));

/** A rotation well away from half-turns, as rows of a sequence are. */
export const smallRotation: fc.Arbitrary<readonly [number, number, number]> = fc.tuple(
  latitude,
  fc.double({ min: -180, max: 180, noNaN: true }),
  fc.double({ min: -40, max: 40, noNaN: true }),
);

/** A positive definite covariance of a degree or so, from a random factor. */
export const covariance: fc.Arbitrary<Covariance> = fc
  .array(fc.double({ min: -0.02, max: 0.02, noNaN: true }), { minLength: 6, maxLength: 6 })
  .map(([a = 0, b = 0, c = 0, d = 0, e = 0, f = 0]) => [
    a * a + 1e-6,
    a * b,
    a * c,
    b * b + d * d + 1e-6,
    b * c + d * e,
    c * c + e * e + f * f + 1e-6,
  ]);

/**
 * A reconstruction of seven blocks over two frames: every block hangs on one of lower rank, some change over
 * to another at a row they have in both, and their rows are spaced unevenly. Circuits reach four links.
 */
export const model: fc.Arbitrary<Model> = fc
  .tuple(
    fc.array(fc.tuple(fc.nat(), fc.nat(), fc.boolean()), { minLength: 7, maxLength: 7 }),
    fc.array(smallRotation, { minLength: 42, maxLength: 42 }),
    fc.array(fc.double({ min: 3, max: 30, noNaN: true }), { minLength: 6, maxLength: 6 }),
  )
  .map(([hangs, poles, steps]) => {
    const codes = hangs.map((_, i) => `b${i}`);
    const lower = (i: number, pick: number): string =>
      ['spin', 'mantle', ...codes.slice(0, i)][pick % (2 + i)] ?? 'spin';
    const ages = steps.map((_, k) => steps.slice(0, k + 1).reduce((sum, step) => sum + step, 0));
    const rotations = hangs.flatMap(([first, second, changes], i) =>
      ages.flatMap((age, k) => {
        const [lat, lon, degrees] = poles[6 * i + k] ?? [0, 0, 0];
        const younger = row([`b${i}`, lower(i, first), age, lat, lon, degrees]);
        const older = row([`b${i}`, lower(i, second), age, lat, lon, degrees / 2]);
        if (!changes || lower(i, first) === lower(i, second) || k < 3) return [younger];
        return k === 3 ? [younger, older] : [older];
      }),
    );
    const mantle = row(['mantle', 'spin', 300, 12, -38, 17]);
    return compileModel(
      [frame('spin'), frame('mantle'), ...codes.map((code) => block(code))],
      [...rotations, mantle],
    );
  });
