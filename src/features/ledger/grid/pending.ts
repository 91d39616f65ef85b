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
  /** The revision on the page when the cell was opened: what others changed since is not overwritten unseen. */
  readonly since: number;
}

export interface PendingRow {
  readonly table: Table;
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

const known = (table: Table): PendingRow => ({ table, isNew: false, base: {}, cells: {} });

/** Where and on what revision cells are typed. */
export interface Typing {
  readonly table: Table;
  readonly columns: readonly Column[];
  readonly since: number;
}

/** Adds typed cells, each read by its column. */
export function withChanges(
  pending: Pending,
  changes: readonly CellChange[],
  { table, columns, since }: Typing,
): Pending {
  const next = new Map(pending);
  for (const { row, key, text } of changes) {
    const column = columns.find((c) => c.key === key);
    if (!column) continue;
    const typed = column.read(text);
    const there = next.get(row) ?? known(table);
    const first = Math.min(since, there.cells[key]?.since ?? since);
    next.set(row, {
      ...there,
      cells: { ...there.cells, [key]: { text, problem: typed.ok ? null : typed.problem, since: first } },
    });
  }
  return next;
}

export const withNewRow = (
  pending: Pending,
  table: Table,
  { id, base }: { readonly id: string; readonly base: Readonly<Record<string, unknown>> },
): Pending => new Map(pending).set(id, { table, isNew: true, base, cells: {} });

/** What is left once rows have been saved as they stood in `sent`: cells typed anew meanwhile stay. */
export function settled(pending: Pending, sent: Pending, rows: Iterable<string>): Pending {
  const next = new Map(pending);
  for (const id of rows) {
    const row = next.get(id);
    if (!row) continue;
    const saved = sent.get(id)?.cells ?? {};
    const anew = Object.entries(row.cells).filter(([key, { text }]) => saved[key]?.text !== text);
    if (anew.length === 0) next.delete(id);
    else next.set(id, { ...known(row.table), cells: Object.fromEntries(anew) });
  }
  return next;
}

export function without(pending: Pending, rows: Iterable<string>): Pending {
  const next = new Map(pending);
  for (const row of rows) next.delete(row);
  return next;
}

/** Cells of these rows as typed on a revision that the reader has seen. */
export function rebased(pending: Pending, rows: Iterable<string>, since: number): Pending {
  const next = new Map(pending);
  for (const id of rows) {
    const row = next.get(id);
    if (!row) continue;
    const cells: Record<string, PendingCell> = {};
    for (const [key, cell] of Object.entries(row.cells)) cells[key] = { ...cell, since };
    next.set(id, { ...row, cells });
  }
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
  /** The oldest revision that one of their cells was opened on; null where none names one. */
  readonly since: number | null;
  /** Cells that hold others back. */
  readonly problems: number;
}

/** Edits for the rows without a problem and with nothing missing. */
export function readyEdits(pending: Pending, table: Table, columns: readonly Column[]): Ready {
  const edits: Edit[] = [];
  const rows: string[] = [];
  let since: number | null = null;
  let problems = 0;
  for (const [id, row] of pending) {
    if (row.table !== table) continue;
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
    for (const cell of Object.values(row.cells)) since = Math.min(since ?? cell.since, cell.since);
  }
  return { edits, rows, since, problems };
}
