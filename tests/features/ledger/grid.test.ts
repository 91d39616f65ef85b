/** Editing a ledger as a spreadsheet: what is typed, pasted and moved. The clipboard form is that of spreadsheets (common practice, no source). */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { readCells, writeCells } from '~/features/ledger/grid/clipboard';
import { BLANK_ROTATION, rotationColumns } from '~/features/ledger/grid/columns';
import {
  fieldsOf,
  missingIn,
  readyEdits,
  withChanges,
  rebased,
  settled,
  withNewRow,
  type Pending,
} from '~/features/ledger/grid/pending';
import { pasteAt } from '~/features/ledger/grid/paste';
import { typedStep, withoutStep } from '~/features/ledger/grid/typed-steps';
import { move, START, within } from '~/features/ledger/grid/selection';

const columns = rotationColumns(['sable', 'tarn']);
const column = (key: string) => columns.find((c) => c.key === key)!;

describe('a cell reads what people type', () => {
  it.each([
    ['pole_lat', '−29.6', -29.6],
    ['pole_lat', ' 12,5 ', 12.5],
    ['angle_deg', '1e-2', 0.01],
    ['age_two_sigma_ma', '', null],
    ['evidence', 'Fitted', 'fitted'],
    ['source', '  ', null],
  ])('%s: %j', (key, text, value) => {
    expect(column(key).read(text)).toEqual({ ok: true, value });
  });

  it.each([
    ['pole_lat', '128.4', 'latitude beyond 90°: moved decimal point?'],
    ['age_ma', '-5', 'ages run from 0 to 4600 Ma'],
    ['angle_deg', '', 'blank'],
    ['pole_lon', 'west', 'not a number'],
    ['relative_to', 'Tarn craton', 'a code: lower-case letters, digits, hyphens'],
    ['evidence', 'guess', 'one of published, fitted, posed, unconstrained'],
  ])('%s refuses %j', (key, text, problem) => {
    expect(column(key).read(text)).toEqual({ ok: false, problem });
  });
});

describe('the clipboard', () => {
  it('reads tabs, lines and quoted cells', () => {
    expect(readCells('1\t2\r\n"a\tb"\t"say ""so"""\r\n')).toEqual([
      ['1', '2'],
      ['a\tb', 'say "so"'],
    ]);
  });

  it('comes back as it was copied', () => {
    const cell = fc.string().filter((text) => !text.includes('\r'));
    const block = fc.array(fc.array(cell, { minLength: 2, maxLength: 4 }), { minLength: 1, maxLength: 5 });
    fc.assert(
      fc.property(block, (cells) => {
        expect(readCells(writeCells(cells))).toEqual(cells);
      }),
    );
  });
});

const typing = { table: 'rotations', columns, since: 7 } as const;

describe('pending edits', () => {
  it('one wrong cell holds its row back, and no other', () => {
    const pending = withChanges(
      new Map(),
      [
        { row: 'a', key: 'pole_lat', text: '91' },
        { row: 'a', key: 'angle_deg', text: '4' },
        { row: 'b', key: 'angle_deg', text: '5' },
      ],
      typing,
    );
    const ready = readyEdits(pending, 'rotations', columns);
    expect(ready.problems).toBe(1);
    expect(ready.edits).toEqual([{ op: 'update', table: 'rotations', id: 'b', fields: { angle_deg: 5 } }]);
    expect(pending.get('a')!.cells['pole_lat']).toEqual({
      text: '91',
      problem: 'latitude beyond 90°: moved decimal point?',
      since: 7,
    });
  });

  it('a new row waits until nothing required is blank', () => {
    const base = { ...BLANK_ROTATION, block: 'sable', relative_to: 'tarn' };
    const begun = withNewRow(new Map(), 'rotations', { id: 'n', base });
    const half = withChanges(begun, [{ row: 'n', key: 'age_ma', text: '60' }], typing);
    expect(missingIn(half.get('n')!, columns)).toEqual(['pole_lat', 'pole_lon', 'angle_deg']);
    expect(readyEdits(half, 'rotations', columns).edits).toEqual([]);
    const whole = withChanges(
      half,
      [
        ['pole_lat', '1'],
        ['pole_lon', '2'],
        ['angle_deg', '3'],
      ].map(([key, text]) => ({ row: 'n', key: key!, text: text! })),
      typing,
    );
    const [edit] = readyEdits(whole, 'rotations', columns).edits;
    expect(edit).toMatchObject({
      op: 'create',
      id: 'n',
      fields: {
        block: 'sable',
        relative_to: 'tarn',
        age_ma: 60,
        pole_lat: 1,
        pole_lon: 2,
        angle_deg: 3,
        covariance: null,
      },
    });
  });

  it('pastes over rows, makes new ones below, and counts what lies beyond the last column', () => {
    const at = { row: 1, column: columns.length - 1 };
    const { changes, newRows, dropped } = pasteAt([['x', 'y'], ['z']], at, ['a', 'b'], columns, () => 'new');
    expect(changes.map(({ row, text }) => [row, text])).toEqual([
      ['b', 'x'],
      ['new', 'z'],
    ]);
    expect(newRows).toEqual(['new']);
    expect(dropped).toBe(1);
  });

  it('keeps the fields that can be read', () => {
    const pending = withChanges(
      new Map(),
      [
        { row: 'a', key: 'pole_lon', text: '7,25' },
        { row: 'a', key: 'age_ma', text: '?' },
      ],
      typing,
    );
    expect(fieldsOf(pending.get('a')!, columns)).toEqual({ pole_lon: 7.25 });
  });
});

describe('what is typed while a save is under way', () => {
  const cell = (row: string, key: string, text: string) => ({ row, key, text });
  const typed = (changes: ReturnType<typeof cell>[], made: { id: string; base: object }[] = []) => ({
    table: 'rotations' as const,
    columns,
    changes,
    made: made as { id: string; base: Record<string, unknown> }[],
  });

  it('stays when the save is through, and is sent by itself', () => {
    const sent = withChanges(new Map(), [cell('a', 'angle_deg', '4'), cell('b', 'angle_deg', '5')], typing);
    const more = withChanges(sent, [cell('a', 'pole_lat', '12'), cell('b', 'angle_deg', '6')], {
      ...typing,
      since: 9,
    });
    const left = settled(more, sent, ['a', 'b']);
    expect(readyEdits(left, 'rotations', columns)).toMatchObject({
      edits: [
        { id: 'a', fields: { pole_lat: 12 } },
        { id: 'b', fields: { angle_deg: 6 } },
      ],
      since: 7,
    });
    expect(settled(sent, sent, ['a', 'b']).size).toBe(0);
  });

  it('of a new row is an update once the row is there', () => {
    const base = { ...BLANK_ROTATION, block: 'sable', relative_to: 'tarn', age_ma: 5 };
    const sent = withChanges(
      withNewRow(new Map(), 'rotations', { id: 'n', base }),
      [cell('n', 'pole_lat', '1'), cell('n', 'pole_lon', '2'), cell('n', 'angle_deg', '3')],
      typing,
    );
    const more = withChanges(sent, [cell('n', 'source', 'Pell')], typing);
    expect(readyEdits(settled(more, sent, ['n']), 'rotations', columns).edits).toMatchObject([
      { op: 'update', id: 'n', fields: { source: 'Pell' } },
    ]);
  });

  it('goes with its own table, and counts from the oldest revision that a cell was opened on', () => {
    const first = withChanges(new Map(), [cell('a', 'angle_deg', '4')], typing);
    const again = withChanges(first, [cell('a', 'angle_deg', '5')], { ...typing, since: 12 });
    expect(readyEdits(again, 'rotations', columns).since).toBe(7);
    expect(readyEdits(rebased(again, ['a'], 12), 'rotations', columns).since).toBe(12);
    expect(readyEdits(again, 'blocks', columns).edits).toEqual([]);
  });

  it('is taken back one step at a time, as far as it is unsaved', () => {
    const one = typed([cell('a', 'angle_deg', '4')]);
    const two = typed([cell('a', 'angle_deg', '5'), cell('b', 'pole_lat', '1')]);
    const three = typed([cell('n', 'pole_lat', '3')], [{ id: 'n', base: {} }]);
    let pending: Pending = new Map();
    const steps = [one, two, three].map((step) => {
      const taken = typedStep(pending, step);
      const started = step.made.reduce<Pending>((map, row) => withNewRow(map, 'rotations', row), pending);
      pending = withChanges(started, step.changes, typing);
      return taken;
    });
    const texts = (map: Pending | null) =>
      map && [...map].map(([id, row]) => [id, ...Object.values(row.cells).map(({ text }) => text)]);
    const withoutThree = withoutStep(pending, steps[2]!)!;
    expect(texts(withoutThree)).toEqual([['a', '5'], ['b', '1']]); // prettier-ignore
    const withoutTwo = withoutStep(withoutThree, steps[1]!)!;
    expect(texts(withoutTwo)).toEqual([['a', '4']]);
    expect(texts(withoutStep(withoutTwo, steps[0]!))).toEqual([]);
    expect(withoutStep(withoutTwo, steps[1]!)).toBeNull();
  });
});

describe('moving', () => {
  const size = { rows: 5, columns: 3 };
  const press = (key: string, more: object = {}) => ({ key, shiftKey: false, command: false, ...more });

  it('stays inside, and Shift draws a block of cells', () => {
    const corner = move(START, press('ArrowDown', { command: true }), size)!;
    expect(corner.at).toEqual({ row: 4, column: 0 });
    expect(move(corner, press('PageDown'), size)!.at).toEqual({ row: 4, column: 0 });
    const block = move(corner, press('ArrowRight', { shiftKey: true }), size)!;
    expect(within(block, { row: 4, column: 0 })).toBe(true);
    expect(within(block, { row: 3, column: 0 })).toBe(false);
    expect(move(START, press('a'), size)).toBeNull();
  });
});
