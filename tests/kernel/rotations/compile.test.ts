import { describe, expect, it } from 'vitest';
import { compileModel, type ModelProblem, poseAt, type RotationInput } from '../../../src/kernel';
import { block, frame, row } from '../support';

const spin = frame('spin');
const problemsOf = (
  rotations: RotationInput[],
  blocks = [block('avon'), block('brant'), block('corrie'), spin],
): readonly ModelProblem[] => compileModel(blocks, rotations).problems;

describe('compiling', () => {
  it('makes legs of maximal runs of one reference: A → B → A is three', () => {
    const model = compileModel(
      [block('avon'), block('brant'), block('corrie'), spin],
      [
        row(['corrie', 'avon', 30, 20, 30, 8]),
        row(['corrie', 'brant', 30, 21, 31, 9]),
        row(['corrie', 'brant', 50, 25, 28, 14]),
        row(['corrie', 'avon', 50, 24, 27, 13]),
        row(['corrie', 'avon', 80, 30, 20, 25]),
        row(['avon', 'spin', 100, 50, 60, 30]),
        row(['brant', 'spin', 100, 48, 66, 28]),
      ],
    );
    const legs = model.blocks.find(({ code }) => code === 'corrie')?.legs ?? [];
    expect(
      legs.map((leg) => [leg.relative_to, leg.younger_ma, leg.older_ma, leg.rows.length, leg.stages.length]),
    ).toEqual([
      ['avon', 0, 30, 2, 1],
      ['brant', 30, 50, 2, 1],
      ['avon', 50, 80, 2, 1],
    ]);
    expect(model.problems).toEqual([]);
    expect(model.oldest_ma).toBe(100);
  });

  it('orders rows however they are given, the reference that goes on last at a tie', () => {
    const rows = [
      row(['corrie', 'avon', 80, 30, 20, 25]),
      row(['corrie', 'brant', 20, 20, 30, 8]),
      row(['corrie', 'avon', 20, 21, 31, 9]),
    ];
    for (const given of [rows, [...rows].reverse()]) {
      const legs =
        compileModel([block('avon'), block('brant'), block('corrie'), spin], given).blocks[2]?.legs ?? [];
      expect(legs.map((leg) => [leg.relative_to, leg.younger_ma, leg.older_ma])).toEqual([
        ['brant', 0, 20],
        ['avon', 20, 80],
      ]);
    }
  });

  it('implies an exact identity at 0 for a block still present that has rows but none there', () => {
    const rowsOf = (disappears_ma: number | null, ages: number[]) =>
      compileModel(
        [block('avon', { disappears_ma }), spin],
        ages.map((age) => row(['avon', 'spin', age, 10, 20, age])),
      ).blocks[0]?.legs[0]?.rows ?? [];
    expect(rowsOf(null, [25]).map(({ age_ma, implied }) => [age_ma, implied])).toEqual([
      [0, true],
      [25, false],
    ]);
    expect(rowsOf(0, [25])[0]).toMatchObject({
      implied: true,
      angle_deg: 0,
      covariance: null,
      quaternion: [1, 0, 0, 0],
    });
    expect(rowsOf(null, [0, 25]).map(({ implied }) => implied)).toEqual([false, false]);
    expect(rowsOf(12, [25]).map(({ age_ma }) => age_ma)).toEqual([25]);
    expect(rowsOf(null, [])).toEqual([]);
  });

  it('stays plain JSON, the same after a journey', () => {
    const model = compileModel([block('avon'), spin], [row(['avon', 'spin', 25, 10, 20, 30])]);
    const travelled = JSON.parse(JSON.stringify(model)) as typeof model;
    expect(travelled).toEqual(model);
    expect(poseAt(travelled, 'avon', 11, 'spin')).toEqual(poseAt(model, 'avon', 11, 'spin'));
  });
});

describe('what compiling finds wrong', () => {
  it('blocks given twice, and rows of blocks or on references that are not there', () => {
    const rows = [
      row(['ghost', 'spin', 10, 1, 2, 3]),
      row(['avon', 'limbo', 10, 1, 2, 3]),
      row(['avon', 'limbo', 40, 1, 2, 5]),
    ];
    expect(problemsOf(rows, [block('avon'), block('avon'), spin])).toEqual([
      { name: 'DuplicateBlock', block: 'avon' },
      { name: 'UnknownBlock', block: 'ghost', rotation: rows[0]?.id },
      { name: 'MissingReference', block: 'avon', relative_to: 'limbo', older_ma: 40, younger_ma: 0 },
    ]);
  });

  it('rows of one block, reference and age, of which the first is used', () => {
    const rows = [
      row(['avon', 'spin', 10, 1, 2, 3]),
      row(['avon', 'spin', 10, 1, 2, 4]),
      row(['avon', 'brant', 10, 1, 2, 3]),
    ];
    expect(problemsOf(rows)).toEqual([
      {
        name: 'DuplicateRow',
        block: 'avon',
        relative_to: 'spin',
        age_ma: 10,
        rotations: [rows[0]?.id, rows[1]?.id],
      },
    ]);
    expect(
      compileModel([block('avon'), spin], rows.slice(0, 2)).blocks[0]?.legs[0]?.rows.map(
        ({ angle_deg }) => angle_deg,
      ),
    ).toEqual([0, 3]);
  });

  it('rows that hold no rotation', () => {
    const wrong = [
      row(['avon', 'spin', -1, 1, 2, 3]),
      row(['avon', 'spin', NaN, 1, 2, 3]),
      row(['avon', 'spin', 10, 128.4, 2, 3]),
      row(['avon', 'spin', 10, 1, Infinity, 3]),
      row(['avon', 'spin', 10, 1, 2, NaN]),
    ];
    const found = problemsOf(wrong).map((p) => (p.name === 'InvalidRow' ? [p.quantity, p.read] : p.name));
    expect(found).toEqual([
      ['age_ma', '-1'],
      ['age_ma', 'NaN'],
      ['pole_lat', '128.4'],
      ['pole_lon', 'Infinity'],
      ['angle_deg', 'NaN'],
    ]);
  });

  it('a turn at 0 Ma', () => {
    const rows = [
      row(['avon', 'spin', 0, 1, 2, 0.01]),
      row(['avon', 'spin', 10, 1, 2, 3]),
      row(['brant', 'spin', 0, 45, 45, 360]),
    ];
    expect(problemsOf(rows)).toEqual([
      { name: 'NonIdentityAtPresent', block: 'avon', rotation: rows[0]?.id },
    ]);
  });

  it('a stage within 1° of a half-turn, but none beside it', () => {
    const rows = [
      row(['avon', 'spin', 10, 12, 34, 179.2]),
      row(['brant', 'spin', 10, 12, 34, 178.9]),
      row(['corrie', 'spin', 10, 12, 34, -180.7]),
    ];
    const found = problemsOf(rows);
    expect(found.map((p) => ('block' in p ? [p.name, p.block] : []))).toEqual([
      ['NearHalfTurnStage', 'avon'],
      ['NearHalfTurnStage', 'corrie'],
    ]);
    expect(found[1]).toMatchObject({ older_ma: 10, younger_ma: 0, relative_to: 'spin' });
    expect(found[1] && 'angle_deg' in found[1] ? found[1].angle_deg : NaN).toBeCloseTo(179.3, 9);
  });

  it('a gap between two legs', () => {
    const rows = [
      row(['avon', 'spin', 10, 1, 2, 3]),
      row(['avon', 'brant', 14, 1, 2, 3]),
      row(['avon', 'brant', 30, 1, 2, 4]),
    ];
    expect(problemsOf(rows)).toEqual([{ name: 'LegGap', block: 'avon', older_ma: 14, younger_ma: 10 }]);
  });

  it('loops, each with the ages at which it holds', () => {
    const rows = [
      row(['avon', 'brant', 40, 1, 2, 3]),
      row(['brant', 'spin', 20, 1, 2, 3]),
      row(['brant', 'corrie', 20, 1, 2, 3]),
      row(['brant', 'corrie', 60, 1, 2, 3]),
      row(['corrie', 'avon', 30, 1, 2, 3]),
      row(['corrie', 'spin', 30, 1, 2, 3]),
      row(['corrie', 'spin', 90, 1, 2, 3]),
    ];
    expect(problemsOf(rows)).toEqual([
      { name: 'Cycle', loop: ['avon', 'brant', 'corrie'], older_ma: 30, younger_ma: 20 },
    ]);
    expect(problemsOf([row(['avon', 'avon', 15, 1, 2, 3])])).toEqual([
      { name: 'Cycle', loop: ['avon'], older_ma: 15, younger_ma: 0 },
    ]);
  });

  it('two loops at once, and one that goes on over a row', () => {
    const rows = [
      row(['avon', 'brant', 10, 1, 2, 3]),
      row(['avon', 'brant', 50, 1, 2, 3]),
      row(['brant', 'avon', 25, 1, 2, 3]),
      row(['corrie', 'corrie', 50, 1, 2, 3]),
    ];
    expect(problemsOf(rows)).toEqual([
      { name: 'Cycle', loop: ['avon', 'brant'], older_ma: 25, younger_ma: 0 },
      { name: 'Cycle', loop: ['corrie'], older_ma: 50, younger_ma: 0 },
    ]);
  });

  it('nothing in an empty draft', () => {
    expect(compileModel([], [])).toEqual({ blocks: [], problems: [], oldest_ma: 0 });
  });
});

describe('sequences side by side', () => {
  const both = (ages: number[]) =>
    ages.flatMap((age) => [
      row(['corrie', 'avon', age, 20, 30, age]),
      row(['corrie', 'brant', age, 25, 28, age]),
    ]);
  const parallel = (rotations: RotationInput[]) =>
    problemsOf(rotations).filter(({ name }) => name === 'ParallelSequences');
  const rest = [row(['avon', 'spin', 100, 50, 60, 30]), row(['brant', 'spin', 100, 48, 66, 28])];

  it('are a problem, with their references and ages', () => {
    expect(parallel([...rest, ...both([10, 20, 30])])).toEqual([
      {
        name: 'ParallelSequences',
        block: 'corrie',
        references: ['avon', 'brant'],
        older_ma: 30,
        younger_ma: 10,
      },
    ]);
    expect(parallel([...rest, ...both([0, 20]), row(['corrie', 'avon', 60, 20, 30, 40])])).toHaveLength(1);
    expect(parallel([...rest, ...both([10, 20])])).toHaveLength(1);
    expect(
      parallel([
        ...rest,
        row(['corrie', 'avon', 5, 20, 30, 4]),
        ...both([10, 20, 30]),
        row(['corrie', 'avon', 60, 20, 30, 40]),
      ]),
    ).toMatchObject([{ older_ma: 30, younger_ma: 10 }]);
  });

  it('are none where one leg stands between two hand-overs, or at one hand-over', () => {
    const younger = row(['corrie', 'avon', 5, 20, 30, 4]);
    const older = row(['corrie', 'avon', 60, 20, 30, 40]);
    expect(parallel([...rest, younger, ...both([10, 20]), older])).toEqual([]);
    expect(parallel([...rest, younger, ...both([10]), row(['corrie', 'brant', 60, 20, 30, 40])])).toEqual([]);
  });
});
