import { describe, expect, it } from 'vitest';
import { weaknessesAt } from '../../../src/features/motion/scene/weak';
import { compileModel } from '../../../src/kernel';
import { block, frame, row } from '../../kernel/support';

const known = { covariance: [1e-6, 0, 0, 1e-6, 0, 1e-6] as const };
const model = compileModel(
  [block('avon'), frame('spin')],
  [
    row(['avon', 'spin', 10, 90, 0, 5], known),
    row(['avon', 'spin', 20, 90, 0, 9]),
    row(['avon', 'spin', 30, 90, 0, 12], { ...known, evidence: 'posed' }),
    row(['avon', 'spin', 60, 90, 0, 20], known),
    row(['avon', 'spin', 260, 90, 0, 30], known),
    row(['avon', 'spin', 300, 90, 0, 34], known),
    row(['avon', 'spin', 360, 90, 0, 40], known),
  ],
);
const at = (age: number) => weaknessesAt(model.blocks[0]!, age);

describe('constraint', () => {
  it('weakens where the rows around an age have no covariance, are posed, or lie far apart', () => {
    expect(at(15)).toEqual(['no covariance']);
    expect(at(20)).toEqual(['no covariance']);
    expect(at(25)).toEqual(['no covariance', 'posed']);
    expect(at(45)).toEqual(['posed', 'long gap']);
    expect(at(100)).toEqual(['long gap']);
    expect(at(280)).toEqual([]);
    expect(at(330)).toEqual(['long gap']);
  });

  it('does not weaken at the present, at a good row, or where there are no rotations', () => {
    expect([at(0), at(5), at(10), at(60), at(400)]).toEqual([[], [], [], [], []]);
  });
});
