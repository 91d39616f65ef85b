import { describe, expect, it } from 'vitest';
import {
  acrossHandOver,
  compileModel,
  distanceKm,
  fromPole,
  handOverJumps,
  jumpKm,
  poseAt,
  rotate,
  toVector,
} from '../../../src/kernel';
import { block, frame, placed, row } from '../support';

const blocks = [block('avon'), block('brant'), block('corrie'), frame('spin')];
const rows = [
  row(['corrie', 'avon', 30, 20, 30, 8]),
  row(['corrie', 'brant', 30, 24, 31, 9]),
  row(['corrie', 'brant', 50, 25, 28, 14]),
  row(['corrie', 'avon', 50, 24, 27, 13]),
  row(['corrie', 'avon', 80, 30, 20, 25]),
  row(['avon', 'spin', 100, 50, 60, 30]),
  row(['brant', 'spin', 100, 48, 66, 28]),
];

describe('hand-overs', () => {
  it('are where a block changes its reference: two for A → B → A', () => {
    expect(
      handOverJumps(compileModel(blocks, rows)).map((j) => [
        j.block,
        j.age_ma,
        j.younger_reference,
        j.older_reference,
      ]),
    ).toEqual([
      ['corrie', 30, 'avon', 'brant'],
      ['corrie', 50, 'brant', 'avon'],
    ]);
  });

  it('jump as far as positions just older and at the age itself lie apart', () => {
    const model = compileModel(blocks, rows);
    const p = toVector(-33, 71);
    for (const jump of handOverJumps(model)) {
      const at = (age: number) => rotate(placed(poseAt(model, 'corrie', age, 'spin')).quaternion, p);
      expect(
        Math.abs((jumpKm(jump, p) ?? NaN) - distanceKm(at(jump.age_ma), at(jump.age_ma + 1e-7))),
      ).toBeLessThan(1e-4);
      expect(jumpKm(jump, p) ?? NaN).toBeLessThanOrEqual((jump.greatest_km ?? NaN) + 1e-9);
      const older = rotate(jump.older ?? fromPole(0, 0, 0), p);
      expect(distanceKm(acrossHandOver(jump, older) ?? older, rotate(jump.younger, p))).toBeLessThan(1e-8);
    }
  });

  it('jump nowhere where both legs say the same', () => {
    const agreeing = [
      row(['brant', 'spin', 40, 12, 34, 10]),
      row(['corrie', 'spin', 20, 12, 34, 25]),
      row(['corrie', 'brant', 20, 12, 34, 20]),
      row(['corrie', 'brant', 40, 12, 34, 30]),
    ];
    const [jump] = handOverJumps(compileModel(blocks, agreeing));
    expect(jump?.greatest_km ?? NaN).toBeLessThan(1e-9);
  });

  it('jump an unknown way where the references do not meet, or run in a loop', () => {
    const apart = [
      row(['corrie', 'avon', 30, 20, 30, 8]),
      row(['corrie', 'limbo', 30, 24, 31, 9]),
      row(['corrie', 'limbo', 50, 25, 28, 14]),
    ];
    const [jump] = handOverJumps(compileModel(blocks, apart));
    expect(jump).toMatchObject({ older: null, jump_deg: null, greatest_km: null });
    expect(jump && jumpKm(jump, toVector(1, 2))).toBeNull();
    expect(jump && acrossHandOver(jump, toVector(1, 2))).toBeNull();
    const looped = [
      ...rows.slice(0, 5),
      row(['avon', 'brant', 90, 1, 2, 3]),
      row(['brant', 'avon', 90, 1, 2, 3]),
    ];
    expect(handOverJumps(compileModel(blocks, looped)).map(({ jump_deg }) => jump_deg)).toEqual([null, null]);
  });

  it('are none over a gap', () => {
    expect(
      handOverJumps(
        compileModel(blocks, [row(['avon', 'spin', 10, 1, 2, 3]), row(['avon', 'brant', 14, 1, 2, 3])]),
      ),
    ).toEqual([]);
  });
});
