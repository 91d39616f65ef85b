import { Quaternion as ThreeQuaternion } from 'three';
import { quat } from 'gl-matrix';
import { describe, expect, it } from 'vitest';
import cases from '../../cases/rotations-high-precision.json';
import {
  angularDistance,
  evaluateStage,
  fromPole,
  interpolate,
  INTERPOLATE_ERROR_RAD,
  multiply,
  PRODUCT_ERROR_RAD,
  type Quaternion,
  rotate,
  ROTATE_ERROR_RAD,
  stageBetween,
  toVector,
  type Vector3,
} from '../../../src/kernel';
import { turnBetween } from '../support';

interface PoleCase {
  pole_lat: number;
  pole_lon: number;
  angle_deg: number;
}
const rotationOf = ({ pole_lat, pole_lon, angle_deg }: PoleCase): Quaternion =>
  fromPole(pole_lat, pole_lon, angle_deg);
const four = ([w = NaN, x = NaN, y = NaN, z = NaN]: number[]): Quaternion => [w, x, y, z];
const worst = (errors: number[]): number => Math.max(...errors);

describe(`against ${cases.source}`, () => {
  it(`composes ${cases.compositions.length} pairs to PRODUCT_ERROR_RAD`, () => {
    const errors = cases.compositions.map(({ first, second, quaternion }) =>
      turnBetween(multiply(rotationOf(second), rotationOf(first)), four(quaternion)),
    );
    expect(worst(errors)).toBeLessThan(PRODUCT_ERROR_RAD);
  });

  it(`interpolates ${cases.interpolations.length} stages to INTERPOLATE_ERROR_RAD`, () => {
    const errors = cases.interpolations.map(({ younger, older, fraction, quaternion, stage_deg }) => ({
      error: turnBetween(interpolate(rotationOf(younger), rotationOf(older), fraction), four(quaternion)),
      bound: INTERPOLATE_ERROR_RAD / Math.cos(((stage_deg / 2) * Math.PI) / 180),
    }));
    expect(errors.filter(({ error, bound }) => !(error < bound))).toEqual([]);
  });

  it('evaluates a prepared stage as it interpolates', () => {
    const errors = cases.interpolations.map(({ younger, older, fraction, quaternion, stage_deg }) => {
      const stage = stageBetween(
        { age_ma: 31.7, quaternion: rotationOf(younger) },
        { age_ma: 52.3, quaternion: rotationOf(older) },
      );
      const at = evaluateStage(stage, 31.7 + fraction * (52.3 - 31.7));
      return turnBetween(at, four(quaternion)) * Math.cos(((stage_deg / 2) * Math.PI) / 180);
    });
    expect(worst(errors)).toBeLessThan(INTERPOLATE_ERROR_RAD);
  });

  it(`rotates ${cases.points.length} points to ROTATE_ERROR_RAD`, () => {
    const errors = cases.points.map(({ rotation, lat, lon, vector: [x = NaN, y = NaN, z = NaN] }) => {
      const expected: Vector3 = [x, y, z];
      return angularDistance(rotate(rotationOf(rotation), toVector(lat, lon)), expected);
    });
    expect(worst(errors)).toBeLessThan(ROTATE_ERROR_RAD);
  });
});

describe('against the quaternions of three and gl-matrix', () => {
  it('composes alike', () => {
    for (const { first, second } of cases.compositions) {
      const [a, b] = [rotationOf(first), rotationOf(second)];
      const ours = multiply(b, a);
      const three = new ThreeQuaternion(b[1], b[2], b[3], b[0]).multiply(
        new ThreeQuaternion(a[1], a[2], a[3], a[0]),
      );
      expect(turnBetween(ours, [three.w, three.x, three.y, three.z])).toBeLessThan(PRODUCT_ERROR_RAD);
      const theirs = quat.multiply(new Float64Array(4), [b[1], b[2], b[3], b[0]], [a[1], a[2], a[3], a[0]]);
      const [x = NaN, y = NaN, z = NaN, w = NaN] = theirs;
      expect(turnBetween(ours, [w, x, y, z])).toBeLessThan(PRODUCT_ERROR_RAD);
    }
  });

  /**
   * Both shortcut small angles and weigh linearly there, so that the check is loose; see the 60-digit cases
   * for the exact one.
   */
  const SLERP_SHORTCUT_RAD = 1e-5;

  it('interpolates alike within their shortcuts', () => {
    for (const { younger, older, fraction, stage_deg } of cases.interpolations) {
      if (fraction > 1 || stage_deg > 178) continue;
      const [a, b] = [rotationOf(younger), rotationOf(older)];
      const three = new ThreeQuaternion(a[1], a[2], a[3], a[0]).slerp(
        new ThreeQuaternion(b[1], b[2], b[3], b[0]),
        fraction,
      );
      expect(turnBetween(interpolate(a, b, fraction), [three.w, three.x, three.y, three.z])).toBeLessThan(
        SLERP_SHORTCUT_RAD,
      );
    }
  });
});
