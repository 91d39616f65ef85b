/**
 * What people paste into a rotations table. The expected readings follow from the format's own definition
 * (rotations.csv) and RFC 4180; which mistakes are common is common practice, no source.
 */
import { describe, expect, it } from 'vitest';
import { decode } from '~/features/interchange/rules/decode';
import { readRotations } from '~/features/interchange/rules/rotations';
import { rejectedFile } from '~/features/interchange/rules/rejected-file';
import { resolveRotations } from '~/features/interchange/rules/resolve-rotations';

const HEAD = 'block,relative_to,age_ma,pole_lat,pole_lon,angle_deg';
const file = (...lines: string[]): string => [HEAD, ...lines].join('\n');
const ids = (reading: ReturnType<typeof readRotations>): string[] =>
  reading.asking.questions().map((q) => q.id);

describe('a plain table', () => {
  it('is taken as it stands, columns in any order and blanks unknown', () => {
    const text =
      'angle_deg,block,relative_to,age_ma,pole_lon,pole_lat,source\n9.64,sable,tarn,66.0,-27.04,2.54,"Ashgrove, Pell 2019"\n';
    const { candidates, rejected, asking } = readRotations(text);
    expect(rejected).toEqual([]);
    expect(asking.questions()).toEqual([]);
    expect(candidates[0]).toMatchObject({
      line: 2,
      fields: {
        block: 'sable',
        relative_to: 'tarn',
        age_ma: 66,
        pole_lat: 2.54,
        pole_lon: -27.04,
        angle_deg: 9.64,
        source: 'Ashgrove, Pell 2019',
        covariance: null,
        chron: null,
      },
    });
  });

  it('says what is missing in the heading line', () => {
    const { rejected } = readRotations('block,age_ma\nsable,10\n');
    expect(rejected[0]).toMatchObject({
      line: 1,
      problem: 'the heading line has no relative_to, pole_lat, pole_lon, angle_deg',
    });
  });

  it('maps headings of another table', () => {
    const text = 'Terrane,Against,Age,Lat,Lon,Rot\nsable,tarn,10,1,2,3\n';
    const mapping = {
      Terrane: 'block',
      Against: 'relative_to',
      Age: 'age_ma',
      Lat: 'pole_lat',
      Lon: 'pole_lon',
      Rot: 'angle_deg',
    };
    expect(readRotations(text, {}, mapping).candidates).toHaveLength(1);
  });
});

describe('what is wrong is said by line and column, with a way to mend it', () => {
  it.each([
    ['sable,tarn,10,128.4,20,5', 'pole_lat', '128.4', /latitude beyond 90°/],
    ['sable,tarn,-10,12,20,5', 'age_ma', '-10', /negative age/],
    ['sable,tarn,ten,12,20,5', 'age_ma', 'ten', /not a number/],
    ['sable,tarn,10,12,20,', 'angle_deg', '', /blank/],
    ['Sable Block,tarn,10,12,20,5', 'block', 'Sable Block', /not a code/],
    ['sable,sable,10,12,20,5', 'relative_to', 'sable', /own reference/],
    ['sable,tarn,10,12,420,5', 'pole_lon', '420', /longitude beyond/],
  ])('%s', (line, column, read, problem) => {
    const { candidates, rejected } = readRotations(
      file('sable,tarn,20,12,20,5', line, 'sable,tarn,30,12,20,5'),
    );
    expect(candidates).toHaveLength(2);
    expect(rejected).toHaveLength(1);
    expect(rejected[0]).toMatchObject({ line: 3, column, read });
    expect(rejected[0]!.problem).toMatch(problem);
    expect(rejected[0]!.hint).not.toBe('');
  });

  it('two rows of one block, reference and age; a hand-over is not one', () => {
    const { candidates, rejected } = readRotations(file('a,b,10,1,2,3', 'a,c,10,1,2,3', 'a,b,10,1,2,4'));
    expect(candidates).toHaveLength(2);
    expect(rejected[0]).toMatchObject({ line: 4, problem: 'the same block, reference and age as line 2' });
  });

  it('a covariance that is not positive semi-definite, or incomplete', () => {
    const head = `${HEAD},cov_xx,cov_xy,cov_xz,cov_yy,cov_yz,cov_zz\n`;
    const { rejected } = readRotations(
      `${head}a,b,10,1,2,3,1e-4,5e-4,0,1e-4,0,1e-4\na,b,20,1,2,3,1e-4,,0,1e-4,0,1e-4\n`,
    );
    expect(rejected.map((r) => r.line)).toEqual([2, 3]);
    expect(rejected[1]!.problem).toMatch(/lacks cov_xy/);
  });

  it('reads the published form: C = (1/κ̂) [a b c; b d e; c e f] × 10⁻ᵍ (Royer & Chang 1991)', () => {
    const { candidates } = readRotations(`${HEAD},kappa,a,b,c,d,e,f,g\nx,y,10,1,2,3,2,4,1,0,6,0,8,5\n`);
    const expected = [2e-5, 0.5e-5, 0, 3e-5, 0, 4e-5];
    candidates[0]!.fields.covariance!.forEach((entry, i) =>
      expect(Math.abs(entry - expected[i]!)).toBeLessThan(1e-18),
    );
  });
});

describe('what is open is asked, once each, and never changed silently', () => {
  it('a byte-order mark is no part of the first heading', () => {
    const { text, notes } = decode(new TextEncoder().encode('\uFEFF' + file('sable,tarn,10,12,20,5')));
    expect(notes).toHaveLength(1);
    expect(readRotations(text).candidates).toHaveLength(1);
  });

  it('semicolons with decimal commas', () => {
    const text = 'block;relative_to;age_ma;pole_lat;pole_lon;angle_deg\nsable;tarn;66,0;2,54;-27,04;9,64\n';
    const open = readRotations(text);
    expect(ids(open)).toEqual(['decimal_comma']);
    expect(open.asking.questions()[0]!.examples[0]).toBe('line 2: 66,0');
    const answered = readRotations(text, { decimal_comma: 'decimal commas' });
    expect(answered.asking.questions()).toEqual([]);
    expect(answered.candidates[0]!.fields).toMatchObject({
      age_ma: 66,
      pole_lat: 2.54,
      pole_lon: -27.04,
      angle_deg: 9.64,
    });
    expect(readRotations(text, { decimal_comma: 'reject these rows' }).candidates).toEqual([]);
  });

  it.each([
    ["29°36'S", -29.6],
    ['41 12 N', 41.2],
    ['-29°36′', -29.6],
    ['12°30\'36"N', 12.51],
  ])('degrees and minutes: %s', (written, value) => {
    const text = file(`sable,tarn,10,"${written.replaceAll('"', '""')}",20,5`);
    expect(ids(readRotations(text))).toEqual(['degrees_minutes']);
    const { candidates } = readRotations(text, { degrees_minutes: 'convert' });
    expect(Math.abs(candidates[0]!.fields.pole_lat - value)).toBeLessThan(1e-12);
  });

  it('latitude and longitude exchanged', () => {
    const text = file('sable,tarn,10,120.5,20,5', 'sable,tarn,20,140.25,30,7');
    expect(ids(readRotations(text))).toEqual(['swapped_lat_lon']);
    const { candidates } = readRotations(text, { swapped_lat_lon: 'exchange them' });
    expect(candidates[0]!.fields).toMatchObject({ pole_lat: 20, pole_lon: 120.5 });
    const kept = readRotations(text, { swapped_lat_lon: 'keep them' });
    expect(kept.rejected.map((r) => r.read)).toEqual(['120.5', '140.25']);
  });

  it('ages in ka, by size or by heading', () => {
    const text = file('sable,tarn,10000,12,20,5', 'sable,tarn,20000,12,20,10');
    expect(ids(readRotations(text))).toEqual(['age_unit']);
    expect(readRotations(text, { age_unit: 'ka' }).candidates[0]!.fields.age_ma).toBe(10);
    const named = text.replace('age_ma', 'age_ka');
    expect(ids(readRotations(named))).toEqual(['age_unit']);
  });

  it('angles in radians', () => {
    const text = file(
      'sable,tarn,10,42.5,120,0.0873',
      'sable,tarn,20,42.5,121,0.1745',
      'sable,tarn,30,42.5,122,0.2618',
    );
    expect(ids(readRotations(text))).toEqual(['angle_unit']);
    const { candidates } = readRotations(text, { angle_unit: 'radians' });
    expect(Math.abs(candidates[1]!.fields.angle_deg - 9.998)).toBeLessThan(1e-3);
    expect(candidates[1]!.fields.pole_lat).toBe(42.5);
    expect(readRotations(text, { angle_unit: 'degrees' }).candidates[1]!.fields.angle_deg).toBe(0.1745);
  });

  it('all ages negative', () => {
    const text = file('sable,tarn,-10,12,20,5', 'sable,tarn,-20,12,20,9');
    expect(ids(readRotations(text))).toEqual(['age_sign']);
    expect(readRotations(text, { age_sign: 'drop the minus sign' }).candidates[1]!.fields.age_ma).toBe(20);
  });
});

describe('against the draft', () => {
  const whole = { appears_ma: null, disappears_ma: null };
  const blocks = [
    { code: 'sable', kind: 'terrane' as const, ...whole },
    { code: 'tarn', kind: 'craton' as const, ...whole },
    { code: 'axis', kind: 'frame' as const, ...whole },
  ];

  it('asks about references and blocks that are not there', () => {
    const reading = readRotations(file('sable,mantle,10,12,20,5', 'corrie,tarn,10,12,20,5'));
    resolveRotations(reading.candidates, { blocks, rotations: [] }, reading.asking);
    expect(ids(reading)).toEqual(['missing_reference', 'missing_block']);
    const answers = { missing_reference: 'add as frames', missing_block: 'reject these rows' };
    const again = readRotations(file('sable,mantle,10,12,20,5', 'corrie,tarn,10,12,20,5'), answers);
    const resolved = resolveRotations(again.candidates, { blocks, rotations: [] }, again.asking);
    expect(resolved.addFrames).toEqual(['mantle']);
    expect(resolved.rejected).toMatchObject([{ line: 3, column: 'block', read: 'corrie' }]);
  });

  it('refuses the rows that close a loop, and names the loop with its ages', () => {
    const lines = [
      'sable,tarn,0,0,0,0',
      'sable,tarn,40,12,20,5',
      'tarn,sable,20,12,20,5',
      'tarn,sable,40,12,20,8',
    ];
    const reading = readRotations(file(...lines));
    const { rejected } = resolveRotations(reading.candidates, { blocks, rotations: [] }, reading.asking);
    expect(rejected.length).toBeGreaterThan(0);
    expect(rejected[0]!.problem).toMatch(/closes a loop between 40 and 0 Ma: .*sable → tarn|tarn → sable/);
  });

  it('tells new rows from changed and unchanged ones', () => {
    const rest = {
      chron: null,
      age_two_sigma_ma: null,
      evidence: 'unconstrained' as const,
      covariance: null,
      cov_dof: null,
      source: null,
      note: null,
    };
    const existing = [
      {
        id: '1',
        block: 'sable',
        relative_to: 'tarn',
        age_ma: 10,
        pole_lat: 12,
        pole_lon: 20,
        angle_deg: 5,
        ...rest,
      },
      {
        id: '2',
        block: 'sable',
        relative_to: 'tarn',
        age_ma: 20,
        pole_lat: 12,
        pole_lon: 20,
        angle_deg: 9,
        ...rest,
      },
    ];
    const text = file('sable,tarn,10,12,20,5', 'sable,tarn,20,12,20,9.5', 'sable,tarn,30,12,20,12');
    const open = readRotations(text);
    resolveRotations(open.candidates, { blocks, rotations: existing }, open.asking);
    expect(ids(open)).toEqual(['existing_rows']);
    const answered = readRotations(text, { existing_rows: "the file's" });
    const resolved = resolveRotations(answered.candidates, { blocks, rotations: existing }, answered.asking);
    expect(resolved.unchanged.map((c) => c.line)).toEqual([2]);
    expect(resolved.replace.map((c) => [c.line, c.id])).toEqual([[3, '2']]);
    expect(resolved.create.map((c) => c.line)).toEqual([4]);
  });
});

describe('a code one slip away from one of the project', () => {
  const draft = {
    blocks: ['alder', 'spin-axis', 'arc-1'].map((code) => ({
      code,
      kind: 'other' as const,
      appears_ma: null,
      disappears_ma: null,
    })),
    rotations: [],
  };
  const read = (answers: Record<string, string>, ...lines: string[]) => {
    const { candidates, asking } = readRotations(file(...lines), answers);
    return { asking, ...resolveRotations(candidates, draft, asking) };
  };

  it('is asked about by itself, and read as answered', () => {
    const line = 'birch,aldr,10,1,2,3';
    const open = read({}, line);
    const question = open.asking.questions().find((q) => q.id === 'spelling:aldr');
    expect(question?.choices).toEqual(['alder', 'aldr, a new one', 'reject these rows']);
    const meant = read({ 'spelling:aldr': 'alder', missing_block: 'add without outline' }, line);
    expect(meant.create[0]?.fields.relative_to).toBe('alder');
    const rejected = read({ 'spelling:aldr': 'reject these rows' }, line);
    expect(rejected.rejected[0]).toMatchObject({ column: 'relative_to', read: 'aldr', hint: 'Write alder?' });
  });

  it('is not, where the two are a series', () => {
    expect(
      read({}, 'arc-2,spin-axis,10,1,2,3')
        .asking.questions()
        .map((q) => q.id),
    ).toEqual(['missing_block']);
  });
});

describe('one age that is too old among good ones', () => {
  it('is rejected by itself, as written, and the unit of the others is not in question', () => {
    const rows = [10.5, 20, 30, 20000].map((age) => `birch,alder,${age},1,2,3`);
    const { candidates, rejected, asking } = readRotations(file(...rows));
    expect(asking.questions()).toEqual([]);
    expect(candidates.map((c) => c.fields.age_ma)).toEqual([10.5, 20, 30]);
    expect(rejected).toMatchObject([
      { line: 5, column: 'age_ma', read: '20000', problem: 'older than the Earth' },
    ]);
  });
});

describe('a loop that the rows of a file reach across', () => {
  it('is refused, though no row of the file lies at its ages', () => {
    const own = (block: string, relative_to: string, age_ma: number) => ({
      ...{
        id: `${block}${age_ma}`,
        block,
        relative_to,
        age_ma,
        pole_lat: 1,
        pole_lon: 2,
        angle_deg: age_ma / 9,
      },
      ...{ chron: null, age_two_sigma_ma: null, evidence: 'posed' as const, covariance: null, cov_dof: null },
      ...{ source: null, note: null },
    });
    const draft = {
      blocks: ['alder', 'birch'].map((code) => ({
        code,
        kind: 'other' as const,
        appears_ma: null,
        disappears_ma: null,
      })),
      rotations: [own('alder', 'birch', 20), own('alder', 'birch', 50)],
    };
    const { candidates, asking } = readRotations(file('birch,alder,10,1,2,3', 'birch,alder,90,1,2,9'));
    const { rejected, create } = resolveRotations(candidates, draft, asking);
    expect(create).toEqual([]);
    expect(rejected.map((row) => [row.line, row.column])).toEqual([
      [2, 'relative_to'],
      [3, 'relative_to'],
    ]);
  });
});

describe('two sequences of one block for the same ages', () => {
  const whole = { appears_ma: null, disappears_ma: null };
  const blocks = [
    { code: 'sable', kind: 'terrane' as const, ...whole },
    { code: 'tarn', kind: 'frame' as const, ...whole },
    { code: 'mere', kind: 'frame' as const, ...whole },
  ];
  const lines = [10, 20, 30].flatMap((age) => [`sable,tarn,${age},12,20,5`, `sable,mere,${age},14,20,5`]);
  const read = (answers: Record<string, string>, given = lines, rotations: never[] = []) => {
    const { candidates, asking } = readRotations(file(...given), answers);
    return { asking, ...resolveRotations(candidates, { blocks, rotations }, asking) };
  };

  it('are asked about, and those not chosen are refused by line', () => {
    expect(read({}).asking.questions()).toMatchObject([
      { id: 'parallel:sable:10-30', choices: ['mere', 'tarn'] },
    ]);
    const chosen = read({ 'parallel:sable:10-30': 'tarn' });
    expect(chosen.create.map(({ fields }) => fields.relative_to)).toEqual(['tarn', 'tarn', 'tarn']);
    expect(chosen.rejected.map(({ line, column, read }) => [line, column, read])).toEqual([
      [3, 'relative_to', 'mere'],
      [5, 'relative_to', 'mere'],
      [7, 'relative_to', 'mere'],
    ]);
  });

  it('keep the row of a hand-over where the other goes on', () => {
    const on = [...lines, 'sable,mere,50,14,20,9'];
    const chosen = read({ 'parallel:sable:10-30': 'tarn' }, on);
    expect(chosen.create.map(({ fields }) => `${fields.relative_to} ${fields.age_ma}`)).toEqual([
      'tarn 10',
      'tarn 20',
      'tarn 30',
      'mere 30',
      'mere 50',
    ]);
  });

  it('take the draft’s out where the file’s are chosen', () => {
    const { candidates } = readRotations(file(...lines));
    const draft = candidates
      .filter(({ fields }) => fields.relative_to === 'mere')
      .map(({ fields }, i) => ({ ...fields, id: `draft-${i}`, author: null }));
    const files = lines.filter((line) => line.includes('tarn'));
    const chosen = read({ 'parallel:sable:10-30': 'tarn' }, files, draft as never[]);
    expect(chosen.remove.map(({ id }) => id)).toEqual(['draft-0', 'draft-1', 'draft-2']);
    expect(chosen.create).toHaveLength(3);
    expect(chosen.rejected).toEqual([]);
  });
});

describe('where a row stands and what its cells may be', () => {
  it('is the line it begins on, with cells of several lines and blank lines before the headings', () => {
    const text =
      `\n\n${HEAD};note\n`.replaceAll(',', ';') + 'sable;tarn;10;1;2;3;"two\nlines"\nsable;tarn;x;1;2;3;\n';
    const { rejected, candidates } = readRotations(text);
    expect(candidates.map(({ line }) => line)).toEqual([4]);
    expect(rejected).toMatchObject([{ line: 6, column: 'age_ma', read: 'x' }]);
  });

  it('is the line by which a row with cells of several lines is kept to mend', () => {
    const text =
      file('sable,tarn,10,1,2,3').replace(HEAD, `${HEAD},note`) + ',\nsable,tarn,x,1,2,3,"two\nlines"\n';
    const { rejected } = readRotations(text);
    expect(rejected).toMatchObject([{ line: 3, read: 'x' }]);
    const kept = rejectedFile('rotations', text, rejected);
    expect(kept).toContain('sable,tarn,x,1,2,3,"two\nlines",age_ma: not a number,');
    expect(kept).not.toContain('sable,tarn,10');
  });

  it.each([
    ['66 30,1,2,3', 'age_ma'],
    ['66 E,1,2,3', 'age_ma'],
    ['66,12,20,3 E', 'angle_deg'],
  ])('%s is refused at %s', (cells, column) => {
    const reading = readRotations(file(`sable,tarn,${cells}`));
    expect(reading.rejected).toMatchObject([{ line: 2, column, problem: 'written as an angle' }]);
    expect(ids(reading)).toEqual([]);
  });

  it.each([
    ['66,12 E,2,3', 'pole_lat'],
    ['66,12,20 N,3', 'pole_lon'],
  ])('%s has its letters the wrong way round', (cells, column) => {
    const { rejected } = readRotations(file(`sable,tarn,${cells}`));
    expect(rejected).toMatchObject([{ line: 2, column, problem: 'the letter of the other coordinate' }]);
  });

  it('12 30 N, 20 W is asked about as ever', () => {
    expect(ids(readRotations(file('sable,tarn,66,12 30 N,20 W,3')))).toEqual([
      'degrees_minutes',
      'hemisphere_letters',
    ]);
  });

  it('radians are given their reason', () => {
    const text = 'block,relative_to,age_ma,pole_lat_rad,pole_lon_rad,angle_deg\nsable,tarn,10,0.5,0.5,30\n';
    const [question] = readRotations(text)
      .asking.questions()
      .filter(({ id }) => id === 'angle_unit');
    expect(question?.ask).toMatch(/in radians by their heading/);
  });
});
