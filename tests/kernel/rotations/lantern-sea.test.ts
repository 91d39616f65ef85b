import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import cases from '../../cases/lantern-sea.json';
import {
  compileModel,
  type Covariance,
  handOverJumps,
  jumpKm,
  pointEllipse,
  poseAt,
  poseUncertainty,
  rotate,
  type RotationInput,
  toLatLon,
  toVector,
} from '../../../src/kernel';
import { block, frame, placed, row } from '../support';

/** The demo project's table: no quoted cells in the columns read here. */
function readRotations(): RotationInput[] {
  const file = new URL('../../../src/db/seed/lantern-sea/rotations.csv', import.meta.url);
  const [head = '', ...lines] = readFileSync(file, 'utf8').trim().split(/\r?\n/);
  const columns = head.split(',');
  return lines.map((line) => {
    const cells = line.split(',');
    const cell = (name: string): string => cells[columns.indexOf(name)] ?? '';
    const [age, lat, lon, angle] = ['age_ma', 'pole_lat', 'pole_lon', 'angle_deg'].map((name) =>
      Number(cell(name)),
    ) as [number, number, number, number];
    const entries = ['cov_xx', 'cov_xy', 'cov_xz', 'cov_yy', 'cov_yz', 'cov_zz'].map(cell);
    const covariance = entries[0] === '' ? null : (entries.map(Number) as unknown as Covariance);
    return row([cell('block'), cell('relative_to'), age, lat, lon, angle], { covariance });
  });
}

describe(`the Lantern Sea (${cases.source})`, () => {
  const rotations = readRotations();
  const codes = new Set(rotations.map((r) => r.block));
  const model = compileModel([frame('spin-axis'), ...[...codes].map((code) => block(code))], rotations);
  const { lat, lon } = cases.gannet_beds;
  const beds = toVector(lat, lon);

  it('compiles without a problem', () => expect(model.problems).toEqual([]));

  it('puts the Gannet beds where the picture says, as surely', () => {
    const expected = cases.gannet_beds;
    const pose = placed(poseAt(model, 'sable', expected.age_ma, 'spin-axis'));
    const at = toLatLon(rotate(pose.quaternion, beds));
    const ellipse = pointEllipse(pose, poseUncertainty(model, pose), beds);
    expect(Math.abs(at.lat - expected.palaeo_lat)).toBeLessThan(cases.rounding_deg);
    expect(Math.abs(at.lon - expected.palaeo_lon)).toBeLessThan(cases.rounding_deg);
    expect(Math.abs((ellipse?.semi_major_km ?? NaN) - expected.semi_major_km)).toBeLessThan(
      cases.rounding_km,
    );
    expect(Math.abs((ellipse?.semi_minor_km ?? NaN) - expected.semi_minor_km)).toBeLessThan(
      cases.rounding_km,
    );
    expect(ellipse?.at_least).toBe(false);
  });

  it('hands Sable over where the picture says, by as much', () => {
    const [jump, ...more] = handOverJumps(model);
    expect(more).toEqual([]);
    expect(jump).toMatchObject({ block: 'sable', age_ma: cases.hand_over.age_ma });
    const km = jump ? jumpKm(jump, beds) : null;
    expect(Math.abs((km ?? NaN) - cases.hand_over.km)).toBeLessThan(cases.rounding_km);
  });
});
