import { describe, expect, it } from 'vitest';
import cases from '../../cases/exact-rotations.json';
import {
  angularVelocity,
  compileModel,
  distanceKm,
  EARTH_RADIUS_KM,
  fromPole,
  halfStage,
  handOverJumps,
  jumpKm,
  log,
  longitudeUndefined,
  type Model,
  poseAt,
  rotate,
  scale,
  stageRotation,
  toDegrees,
  toLatLon,
  toPole,
  toVector,
  velocityAt,
} from '../../../src/kernel';
import { block, frame, placed, row, turnBetween } from '../support';

/** Printed digits of the cases file. */
const RATE = 5e-6;
const EXACT_KM = 1e-9;

type Row = [string, string, number, number, number, number];
const modelOf = (rotations: unknown): Model => {
  const rows = rotations as Row[];
  const codes = [...new Set(rows.map(([code]) => code))];
  return compileModel(
    [...codes.map((code) => block(code)), frame('spin')],
    rows.map((r) => row(r)),
  );
};

describe(`exact cases (${cases.source})`, () => {
  it.each(cases.points)('$title', ({ pole, from, to, longitude_undefined }) => {
    const [lat = NaN, lon = NaN, angle = NaN] = pole;
    const moved = rotate(fromPole(lat, lon, angle), toVector(from[0] ?? NaN, from[1] ?? NaN));
    expect(distanceKm(moved, toVector(to[0] ?? NaN, to[1] ?? NaN))).toBeLessThan(EXACT_KM);
    expect(longitudeUndefined(moved)).toBe(longitude_undefined ?? false);
    if (longitude_undefined) expect(toLatLon(moved)).toEqual({ lat: 90, lon: 0 });
  });

  it.each(cases.sequences)('$title', ({ rotations, block: code, age_ma, pole_lat, pole_lon, angle_deg }) => {
    const pole = toPole(placed(poseAt(modelOf(rotations), code, age_ma, 'spin')).quaternion);
    expect(Math.abs(pole.pole_lat - pole_lat)).toBeLessThan(1e-12);
    expect(Math.abs(pole.pole_lon - pole_lon)).toBeLessThan(1e-12);
    expect(Math.abs(pole.angle_deg - angle_deg)).toBeLessThan(1e-12);
  });

  it(`stage: ${cases.stage.title}`, () => {
    const { rotations, older_ma, younger_ma, angle_about_north_deg, speed_at_equator_mm_yr, azimuth_deg } =
      cases.stage;
    const model = modelOf(rotations);
    const stage = placed(stageRotation(model, 'sable', older_ma, younger_ma, 'spin'));
    const pole = toPole(stage.quaternion, { pole_lat: 90, pole_lon: 0, angle_deg: angle_about_north_deg });
    expect(pole.pole_lat).toBe(90);
    expect(Math.abs(pole.angle_deg - angle_about_north_deg)).toBeLessThan(1e-12);
    const velocity = velocityAt(toVector(0, 47), placed(angularVelocity(model, 'sable', 14, 'spin')).omega);
    expect(Math.abs(velocity.speed_mm_yr - speed_at_equator_mm_yr)).toBeLessThan(RATE);
    expect(Math.abs((velocity.azimuth_deg ?? NaN) - azimuth_deg)).toBeLessThan(1e-12);
  });

  it(`half-stage: ${cases.half_stage.title}`, () => {
    const stage = placed(
      stageRotation(modelOf(cases.half_stage.rotations), 'sable', 20, 0, 'spin'),
    ).quaternion;
    const speed = (q: typeof stage) => velocityAt(toVector(0, -12), scale(log(q), 1 / 20)).speed_mm_yr;
    expect(Math.abs(speed(stage) - cases.half_stage.full_mm_yr)).toBeLessThan(RATE);
    expect(Math.abs(speed(halfStage(stage)) - cases.half_stage.half_mm_yr)).toBeLessThan(RATE);
  });

  it(`hand-over: ${cases.hand_over.title}`, () => {
    const jumps = handOverJumps(modelOf(cases.hand_over.rotations));
    expect(jumps).toHaveLength(1);
    const [jump] = jumps;
    if (!jump) return;
    expect(jump).toMatchObject({
      block: 'brant',
      age_ma: 30,
      younger_reference: 'avon',
      older_reference: 'corrie',
    });
    expect(Math.abs((jump.jump_deg ?? NaN) - cases.hand_over.jump_deg)).toBeLessThan(1e-12);
    for (const { lat, lon, km } of cases.hand_over.places) {
      expect(Math.abs((jumpKm(jump, toVector(lat, lon)) ?? NaN) - km)).toBeLessThan(1e-6);
    }
    expect(Math.abs((jump.greatest_km ?? NaN) - (Math.PI / 360) * EARTH_RADIUS_KM)).toBeLessThan(EXACT_KM);
  });

  it(`velocity: ${cases.velocity.title}`, () => {
    const velocity = placed(angularVelocity(modelOf(cases.velocity.rotations), 'sable', 17, 'spin'));
    expect(Math.abs(toDegrees(velocity.omega[2]) - 1)).toBeLessThan(1e-12);
    for (const { lat, lon, speed_mm_yr, azimuth_deg } of cases.velocity.places) {
      const at = velocityAt(toVector(lat, lon), velocity.omega);
      expect(Math.abs(at.speed_mm_yr - speed_mm_yr)).toBeLessThan(RATE);
      expect(Math.abs((at.azimuth_deg ?? NaN) - azimuth_deg)).toBeLessThan(1e-12);
    }
  });

  it(`circuit: ${cases.two_links.title}`, () => {
    const { rotations, age_ma, quaternion, tolerance_deg } = cases.two_links;
    const pose = placed(poseAt(modelOf(rotations), 'brant', age_ma, 'spin'));
    const [w = 0, x = 0, y = 0, z = 0] = quaternion;
    expect(toDegrees(turnBetween(pose.quaternion, [w, x, y, z]))).toBeLessThan(tolerance_deg);
  });
});
