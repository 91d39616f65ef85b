/**
 * What has been typed and not yet saved. Cells that cannot be read stay with their text and the problem beside them;
 * nothing typed is lost by a failed save.
 */
import type { Edit, Table } from '../contract';
import type { Column } from './column';

export interface PendingCell {
  readonly text: string;
  /** Null while it is only waiting to be saved with the rest of its row. */
  readonly problem: string | null;
}

export interface PendingRow {
  /** True for a row that the server does not know yet. */
  readonly isNew: boolean;
  /** Fields of a new row that no column has set. */
  readonly base: Readonly<Record<string, unknown>>;
  readonly cells: Readonly<Record<string, PendingCell>>;
}

export type Pending = ReadonlyMap<string, PendingRow>;

export interface CellChange {
  readonly row: string;
  readonly key: string;
  readonly text: string;
}

const KNOWN: PendingRow = { isNew: false, base: {}, cells: {} };

/** Adds typed cells, each read by its column. */
export function withChanges(
  pending: Pending,
  changes: readonly CellChange[],
  columns: readonly Column[],
): Pending {
  const next = new Map(pending);
  for (const { row, key, text } of changes) {
    const column = columns.find((c) => c.key === key);
    if (!column) continue;
    const typed = column.read(text);
    const there = next.get(row) ?? KNOWN;
    next.set(row, {
      ...there,
      cells: { ...there.cells, [key]: { text, problem: typed.ok ? null : typed.problem } },
    });
  }
  return next;
}

export const withNewRow = (pending: Pending, id: string, base: Readonly<Record<string, unknown>>): Pending =>
  new Map(pending).set(id, { isNew: true, base, cells: {} });

export function without(pending: Pending, rows: Iterable<string>): Pending {
  const next = new Map(pending);
  for (const row of rows) next.delete(row);
  return next;
}

/** Values of a row's pending cells that could be read. */
export function fieldsOf(row: PendingRow, columns: readonly Column[]): Record<string, unknown> {
  const fields: Record<string, unknown> = {};
  for (const [key, cell] of Object.entries(row.cells)) {
    const typed = columns.find((c) => c.key === key)?.read(cell.text);
    if (typed?.ok) fields[key] = typed.value;
  }
  return fields;
}

/** Required columns of a new row that are still blank. */
export function missingIn(row: PendingRow, columns: readonly Column[]): string[] {
  if (!row.isNew) return [];
  const filled = { ...row.base, ...fieldsOf(row, columns) };
  return columns
    .filter((c) => !c.read('').ok && (filled[c.key] === null || filled[c.key] === ''))
    .map((c) => c.key);
}

export interface Ready {
  readonly edits: Edit[];
  /** Rows that the edits are made of, in the same order. */
  readonly rows: string[];
  /** Cells that hold others back. */
  readonly problems: number;
}

/** Edits for the rows without a problem and with nothing missing. */
export function readyEdits(pending: Pending, table: Table, columns: readonly Column[]): Ready {
  const edits: Edit[] = [];
  const rows: string[] = [];
  let problems = 0;
  for (const [id, row] of pending) {
    const wrong = Object.values(row.cells).filter((cell) => cell.problem !== null).length;
    problems += wrong;
    if (wrong > 0 || missingIn(row, columns).length > 0) continue;
    const fields = fieldsOf(row, columns);
    if (!row.isNew && Object.keys(fields).length === 0) continue;
    edits.push(
      row.isNew
        ? { op: 'create', table, id, fields: { ...row.base, ...fields } }
        : { op: 'update', table, id, fields },
    );
    rows.push(id);
  }
  return { edits, rows, problems };
}

/** A pasted block of cells from an anchor on: cells beyond the last row make new rows, beyond the last column are dropped. */
export function pasteAt(
  cells: readonly (readonly string[])[],
  anchor: { readonly row: number; readonly column: number },
  rowIds: readonly string[],
  columns: readonly Column[],
  makeId: () => string,
): { readonly changes: CellChange[]; readonly newRows: string[]; readonly dropped: number } {
  const changes: CellChange[] = [];
  const newRows: string[] = [];
  let dropped = 0;
  cells.forEach((line, i) => {
    let row = rowIds[anchor.row + i];
    if (row === undefined) {
      row = makeId();
      newRows.push(row);
    }
    line.forEach((text, j) => {
      const column = columns[anchor.column + j];
      if (column) changes.push({ row, key: column.key, text });
      else dropped++;
    });
  });
  return { changes, newRows, dropped };
}
