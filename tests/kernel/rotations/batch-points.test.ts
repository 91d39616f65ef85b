import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  angularDistance,
  BATCH_ERROR_RAD,
  compileModel,
  matricesAt,
  poseAt,
  reconstructPoints,
  rotate,
  rotatePoints,
  STATUSES,
  toMatrix,
  toVector,
  unrotatePoints,
  type Vector3,
} from '../../../src/kernel';
import { block, frame, model as anyModel, place, placed, rotation, row } from '../support';

const vectorAt = (xyz: ArrayLike<number>, i: number): Vector3 => [
  xyz[3 * i] ?? NaN,
  xyz[3 * i + 1] ?? NaN,
  xyz[3 * i + 2] ?? NaN,
];
const places = fc.array(place, { minLength: 1, maxLength: 20 });

describe('points by the batch', () => {
  it('turn as one by one, and back, in double precision', () => {
    fc.assert(
      fc.property(rotation, places, fc.nat(3), (q, points, skip) => {
        const matrix = new Float64Array(9 * (skip + 1));
        matrix.set(toMatrix(q), 9 * skip);
        const given = Float64Array.from(points.flat());
        const turned = new Float64Array(given.length);
        rotatePoints(matrix, 9 * skip, given, turned);
        points.forEach((p, i) =>
          expect(angularDistance(vectorAt(turned, i), rotate(q, p))).toBeLessThan(BATCH_ERROR_RAD),
        );
        unrotatePoints(matrix, 9 * skip, turned, turned);
        points.forEach((p, i) =>
          expect(angularDistance(vectorAt(turned, i), p)).toBeLessThan(BATCH_ERROR_RAD),
        );
      }),
    );
  });

  it('keep single precision where that is what is given: a metre on the ground', () => {
    const given = Float32Array.from([...toVector(12, 34), ...toVector(-80, 170)]);
    const turned = new Float32Array(6);
    const q = [0.6, 0.48, -0.6, 0.2] as const;
    const length = Math.hypot(...q);
    const unit = [q[0] / length, q[1] / length, q[2] / length, q[3] / length] as const;
    rotatePoints(Float64Array.from(toMatrix(unit)), 0, given, turned);
    expect(angularDistance(vectorAt(turned, 1), rotate(unit, toVector(-80, 170)))).toBeLessThan(1.5e-7);
  });

  it('have matrices that are those of the poses', () => {
    fc.assert(
      fc.property(anyModel, fc.double({ min: 0, max: 50, noNaN: true }), (model, age) => {
        const matrices = new Float64Array(9 * model.blocks.length);
        const statuses = new Uint8Array(model.blocks.length);
        matricesAt(model, age, 'b2', matrices, statuses);
        model.blocks.forEach(({ code }, i) => {
          const pose = poseAt(model, code, age, 'b2');
          const given = [...matrices.subarray(9 * i, 9 * i + 9)];
          expect(STATUSES[statuses[i] ?? -1]).toBe(pose.status);
          if (pose.status !== 'placed') return expect(given.every(Number.isNaN)).toBe(true);
          toMatrix(pose.quaternion).forEach((x, k) =>
            expect(Math.abs(x - (given[k] ?? NaN))).toBeLessThan(BATCH_ERROR_RAD),
          );
        });
      }),
      { numRuns: 50 },
    );
  });

  const model = compileModel(
    [block('avon'), block('brant', { appears_ma: 10 }), frame('spin')],
    [row(['avon', 'spin', 30, 40, 50, 60]), row(['brant', 'avon', 30, -10, 20, 70])],
  );

  it('go to the past and come back to the present, each by its own block', () => {
    const blockOf = Int32Array.of(0, 1, 0, -1, 2);
    const given = Float64Array.from(
      [toVector(1, 2), toVector(3, 4), toVector(-85, 170), toVector(7, 8), toVector(9, 10)].flat(),
    );
    const past = new Float64Array(15);
    const present = new Float64Array(15);
    const statuses = new Uint8Array(5);
    reconstructPoints(model, 9, 'spin', blockOf, given, past, statuses);
    expect([...statuses].map((s) => STATUSES[s])).toEqual([
      'placed',
      'placed',
      'placed',
      'no block here',
      'placed',
    ]);
    const { quaternion } = placed(poseAt(model, 'brant', 9, 'spin'));
    expect(angularDistance(vectorAt(past, 1), rotate(quaternion, toVector(3, 4)))).toBeLessThan(
      BATCH_ERROR_RAD,
    );
    reconstructPoints(model, 9, 'spin', blockOf, past, present, statuses, { direction: 'present' });
    for (const i of [0, 1, 2, 4])
      expect(angularDistance(vectorAt(present, i), vectorAt(given, i))).toBeLessThan(BATCH_ERROR_RAD);
    expect(vectorAt(present, 3)).toEqual([NaN, NaN, NaN]);
  });

  it('say why a point has no place', () => {
    const statuses = new Uint8Array(2);
    const out = new Float64Array(6);
    reconstructPoints(
      model,
      20,
      'spin',
      Int32Array.of(1, 0),
      Float64Array.from([1, 0, 0, 0, 1, 0]),
      out,
      statuses,
    );
    expect([...statuses].map((s) => STATUSES[s])).toEqual(['older than block', 'placed']);
    expect([...out.subarray(0, 3)]).toEqual([NaN, NaN, NaN]);
  });

  it('may be turned in place', () => {
    const points = Float64Array.from([...toVector(3, 4), ...toVector(50, 60)]);
    const expected = placed(poseAt(model, 'avon', 12, 'spin')).quaternion;
    reconstructPoints(model, 12, 'spin', Int32Array.of(0, 0), points, points, new Uint8Array(2));
    expect(angularDistance(vectorAt(points, 1), rotate(expected, toVector(50, 60)))).toBeLessThan(
      BATCH_ERROR_RAD,
    );
  });
});
