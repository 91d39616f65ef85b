/** Steps of typing, so that what is not saved yet can be taken back and done again one step at a time. */
import type { Table } from '../contract';
import type { Column } from './column';
import type { CellChange, Pending, PendingCell } from './pending';

export interface NewRow {
  readonly id: string;
  readonly base: Readonly<Record<string, unknown>>;
}

/** Cells typed or pasted at once, with the rows that were made for them. */
export interface Typed {
  readonly table: Table;
  readonly columns: readonly Column[];
  readonly changes: readonly CellChange[];
  readonly made: readonly NewRow[];
}

export interface TypedStep extends Typed {
  /** What stood unsaved in each cell before, in the order of the changes; null where nothing did. */
  readonly before: readonly (PendingCell | null)[];
}

export const typedStep = (pending: Pending, typed: Typed): TypedStep => ({
  ...typed,
  before: typed.changes.map(({ row, key }) => pending.get(row)?.cells[key] ?? null),
});

/** Without what a step typed, as far as it is unsaved still; null where all of it is saved or typed over. */
export function withoutStep(pending: Pending, { changes, made, before }: TypedStep): Pending | null {
  const next = new Map(pending);
  let taken = 0;
  for (const { id } of made) if (next.get(id)?.isNew && next.delete(id)) taken++;
  changes.forEach(({ row: id, key, text }, i) => {
    const row = next.get(id);
    if (row?.cells[key]?.text !== text) return;
    taken++;
    const { [key]: _typed, ...others } = row.cells;
    const earlier = before[i];
    const cells = earlier ? { ...others, [key]: earlier } : others;
    if (!row.isNew && Object.keys(cells).length === 0) next.delete(id);
    else next.set(id, { ...row, cells });
  });
  return taken > 0 ? next : null;
}
