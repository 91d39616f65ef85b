/** Editing a ledger as a spreadsheet: what is typed, pasted and moved. The clipboard form is that of spreadsheets (common practice, no source). */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { readCells, writeCells } from '~/features/ledger/grid/clipboard';
import { BLANK_ROTATION, rotationColumns } from '~/features/ledger/grid/columns';
import {
  fieldsOf,
  missingIn,
  pasteAt,
  readyEdits,
  withChanges,
  withNewRow,
} from '~/features/ledger/grid/pending';
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

describe('pending edits', () => {
  it('one wrong cell holds its row back, and no other', () => {
    const pending = withChanges(
      new Map(),
      [
        { row: 'a', key: 'pole_lat', text: '91' },
        { row: 'a', key: 'angle_deg', text: '4' },
        { row: 'b', key: 'angle_deg', text: '5' },
      ],
      columns,
    );
    const ready = readyEdits(pending, 'rotations', columns);
    expect(ready.problems).toBe(1);
    expect(ready.edits).toEqual([{ op: 'update', table: 'rotations', id: 'b', fields: { angle_deg: 5 } }]);
    expect(pending.get('a')!.cells['pole_lat']).toEqual({
      text: '91',
      problem: 'latitude beyond 90°: moved decimal point?',
    });
  });

  it('a new row waits until nothing required is blank', () => {
    const base = { ...BLANK_ROTATION, block: 'sable', relative_to: 'tarn' };
    const begun = withNewRow(new Map(), 'n', base);
    const half = withChanges(begun, [{ row: 'n', key: 'age_ma', text: '60' }], columns);
    expect(missingIn(half.get('n')!, columns)).toEqual(['pole_lat', 'pole_lon', 'angle_deg']);
    expect(readyEdits(half, 'rotations', columns).edits).toEqual([]);
    const whole = withChanges(
      half,
      [
        ['pole_lat', '1'],
        ['pole_lon', '2'],
        ['angle_deg', '3'],
      ].map(([key, text]) => ({ row: 'n', key: key!, text: text! })),
      columns,
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
      columns,
    );
    expect(fieldsOf(pending.get('a')!, columns)).toEqual({ pole_lon: 7.25 });
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
