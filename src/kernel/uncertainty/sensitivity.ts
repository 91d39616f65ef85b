import type { PlacedPose } from '../rotations/circuit';
import { isIdentityAtPresent } from '../rotations/compile';
import { exp, inverse, log, multiply, toMatrix } from '../rotations/quaternion';
import type { CompiledRow, Link, Matrix3, Vector3 } from '../rotations/types';
import { add, scale } from '../sphere/vector';
import { leftJacobianInverse, rightJacobian, rightJacobianInverse } from './jacobians';
import { addMatrices, applyMatrix, IDENTITY3, multiplyMatrices, scaleMatrix, transpose } from './matrix3';

/**
 * How the error u of a rotation R̂ Exp(u) follows from one row's: u = jacobian · u(row) + age_jacobian ·
 * (error of the row's age, Myr).
 */
export interface Sensitivity {
  readonly row: CompiledRow;
  readonly jacobian: Matrix3;
  /** rad/Myr. */
  readonly age_jacobian: Vector3;
}

/**
 * Sensitivities by row id: a row met twice has one entry, the sum, so that it is correlated with itself, or
 * cancels.
 */
export type Sensitivities = ReadonlyMap<string, Sensitivity>;

/** The identity at 0 Ma is exact: it says that present coordinates are present coordinates. */
export const isExact = (row: CompiledRow): boolean =>
  row.implied || (row.covariance === null && isIdentityAtPresent(row));

export const sumOf = (a: Sensitivities, b: Sensitivities): Sensitivities => {
  const sum = new Map(a);
  for (const [id, s] of b) {
    const known = sum.get(id);
    sum.set(
      id,
      known
        ? {
            row: s.row,
            jacobian: addMatrices(known.jacobian, s.jacobian),
            age_jacobian: add(known.age_jacobian, s.age_jacobian),
          }
        : s,
    );
  }
  return sum;
};

/** u′ = M u for every row. */
export const transformed = (m: Matrix3, sensitivities: Sensitivities): Sensitivities =>
  new Map(
    [...sensitivities].map(([id, { row, jacobian, age_jacobian }]) => [
      id,
      { row, jacobian: multiplyMatrices(m, jacobian), age_jacobian: applyMatrix(m, age_jacobian) },
    ]),
  );

/** Of R₁ R₂: u = R₂ᵀ u₁ + u₂. */
export const composed = (first: Sensitivities, r2: Matrix3, second: Sensitivities): Sensitivities =>
  sumOf(transformed(transpose(r2), first), second);

/** Of R⁻¹: u′ = −R u. */
export const inverted = (r: Matrix3, sensitivities: Sensitivities): Sensitivities =>
  transformed(scaleMatrix(r, -1), sensitivities);

/**
 * Of a link at its age. Between rows, with φ = Log(R₁⁻¹ R₂): u = Exp(−sφ) u₁ + s Jr(sφ) (Jr⁻¹(φ) u₂ − Jl⁻¹(φ)
 * u₁). An error δ of a row's age acts as the error φ/(t₂ − t₁) δ of its rotation, by the stage in use.
 */
export function linkSensitivities({
  younger,
  older,
  fraction,
  stage,
  direction,
  quaternion,
}: Link): Sensitivities {
  const stored = direction === 'up' ? quaternion : inverse(quaternion);
  const along = stage
    ? applyMatrix(transpose(toMatrix(stage.start)), scale(stage.axis, stage.rate))
    : ([0, 0, 0] as const);
  const entry = (row: CompiledRow, jacobian: Matrix3): Sensitivities =>
    new Map(isExact(row) ? [] : [[row.id, { row, jacobian, age_jacobian: applyMatrix(jacobian, along) }]]);

  let sensitivities: Sensitivities;
  if (younger === older || younger.id === older.id) {
    sensitivities = entry(younger, IDENTITY3);
  } else {
    const phi = log(multiply(inverse(younger.quaternion), older.quaternion));
    const part = scale(phi, fraction);
    const slope = scaleMatrix(rightJacobian(part), fraction);
    const ofYounger = addMatrices(
      toMatrix(exp(scale(part, -1))),
      scaleMatrix(multiplyMatrices(slope, leftJacobianInverse(phi)), -1),
    );
    sensitivities = sumOf(
      entry(younger, ofYounger),
      entry(older, multiplyMatrices(slope, rightJacobianInverse(phi))),
    );
  }
  return direction === 'up' ? sensitivities : inverted(toMatrix(stored), sensitivities);
}

/** Of a whole circuit: its links' errors carried to the block's present coordinates and added. */
export function poseSensitivities({ links }: Pick<PlacedPose, 'links'>): Sensitivities {
  let whole: Sensitivities = new Map();
  let below: Matrix3 = IDENTITY3;
  for (const link of links) {
    whole = sumOf(whole, transformed(transpose(below), linkSensitivities(link)));
    below = multiplyMatrices(toMatrix(link.quaternion), below);
  }
  return whole;
}
