/** Ages without a place: expected spans follow from the rows by hand (a leg holds from its youngest to its oldest row). */
import { describe, expect, it } from 'vitest';
import { oldestPlaced } from '~/features/motion/log/columns';
import { gapsOf } from '~/features/motion/log/gaps';
import { compileModel } from '~/kernel/rotations';
import type { BlockInput, RotationInput } from '~/kernel/rotations/types';

const block = (code: string): BlockInput => ({ code, kind: 'other', appears_ma: null, disappears_ma: null });
const row = (of: string, relative_to: string, age_ma: number): RotationInput => ({
  ...{ id: `${of}-${relative_to}-${age_ma}`, block: of, relative_to, age_ma },
  ...{ pole_lat: 40 + age_ma / 10, pole_lon: -20, angle_deg: age_ma / 5, evidence: 'published' },
  ...{ covariance: null, cov_dof: null, age_two_sigma_ma: null, source: null },
});
const model = (...rows: RotationInput[]) => compileModel(['a', 'b', 'c'].map(block), rows);
const find = (m: ReturnType<typeof model>, code: string) =>
  gapsOf(m, code, 'a', oldestPlaced(m, code, 'a'), (name) => name.toUpperCase());

describe('gaps', () => {
  it('are none where rotations run through', () => {
    expect(find(model(row('b', 'a', 0), row('b', 'a', 60)), 'b')).toEqual([]);
  });

  it('lie between the legs of a block, and stop whatever refers to it', () => {
    const m = model(
      ...[0, 41].map((age) => row('b', 'a', age)),
      ...[44, 90].map((age) => row('b', 'c', age)),
      ...[0, 90].map((age) => row('c', 'a', age)),
    );
    const gap = { younger: 41, older: 44, at: 'b', words: expect.stringContaining('B has no') };
    expect(find(m, 'b')).toMatchObject([gap]);
    expect(gapsOf(m, 'c', 'b', 90, (code) => code)).toMatchObject([{ younger: 41, older: 44, at: 'b' }]);
  });

  it('are not the ages older than every rotation, which the strips name themselves', () => {
    const m = model(row('b', 'a', 0), row('b', 'a', 50), row('c', 'b', 0), row('c', 'b', 90));
    expect(find(m, 'c')).toEqual([]);
  });

  it('are marked where a circuit runs in a loop, at the ages of the loop only', () => {
    const m = model(
      ...[0, 20].map((age) => row('b', 'a', age)),
      ...[20, 80].map((age) => row('b', 'c', age)),
      ...[0, 70].map((age) => row('c', 'b', age)),
    );
    expect(find(m, 'b')).toMatchObject([
      { younger: 20, older: 70, words: expect.stringContaining('loop, B and C, between 20 and 70 Ma') },
    ]);
  });
});
