import { Problem } from '~/server/problem';
import type { Row, Table } from './contract';
import { encodeCursor, indexAfter } from './order';
import type { State } from './state';

export interface ListQuery {
  readonly limit: number;
  readonly cursor?: string | undefined;
  /** Only the rows of one block. */
  readonly block?: string | undefined;
}

/** A page of a table of a state, in natural order. @throws Problem `InvalidQuery` for a cursor that is none */
export function listRows<T extends Table>(state: State, table: T, { limit, cursor, block }: ListQuery) {
  const all = state[table] as unknown as readonly Row<T>[];
  const column = table === 'blocks' ? 'code' : 'block';
  const rows =
    block === undefined ? all : all.filter((row) => (row as Record<string, unknown>)[column] === block);
  const start = cursor === undefined ? 0 : indexAfter(table, rows, cursor);
  if (start === null) throw new Problem('InvalidQuery', { detail: 'cursor: not one of this list' });
  const items = rows.slice(start, start + limit);
  const last = items.at(-1);
  const next_cursor = last && start + limit < rows.length ? encodeCursor(table, last) : null;
  return { items, revision: state.revision, next_cursor };
}
