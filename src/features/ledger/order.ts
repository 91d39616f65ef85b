import canonicalize from 'canonicalize';
import type { Table } from './contract';

type Cells = Readonly<Record<string, unknown>>;
type Key = readonly (string | number | null)[];

/** The columns by which people, files and manifests sort each table; what they leave equal is sorted by all cells. */
const NATURAL: Readonly<Record<Table, readonly string[]>> = {
  blocks: ['code'],
  outlines: ['block', 'outline_younger_ma', 'outline_older_ma', 'sha256'],
  rotations: ['block', 'age_ma', 'relative_to'],
  features: ['block', 'kind', 'name', 'age_ma', 'sha256'],
  directions: ['site', 'age_ma'],
  sources: ['cite'],
};

/** The columns of a row that its place in the table follows. */
export const naturalKey = (table: Table, row: Cells): Key =>
  NATURAL[table].map((column) => row[column] as Key[number]);

/** What was entered, as canonical JSON (RFC 8785): the cells without ids and without what is derived. */
export function canonicalCells(row: Cells): string {
  const { id: _id, vertices: _vertices, outlines: _outlines, ...cells } = row;
  return canonicalize(cells)!;
}

/** Null first, numbers by size, text by code unit: the same order on every machine. */
export function compareKeys(a: Key, b: Key): number {
  for (let i = 0; i < a.length; i++) {
    const [x, y] = [a[i] ?? null, b[i] ?? null];
    if (x === y) continue;
    if (x === null) return -1;
    if (y === null) return 1;
    return x < y ? -1 : 1;
  }
  return 0;
}

/** A copy of the rows in natural order; rows alike in every cell are ordered by their ids. */
export function inOrder<R extends Cells>(table: Table, rows: readonly R[]): R[] {
  return rows
    .map((row) => ({
      row,
      key: [...naturalKey(table, row), canonicalCells(row), (row['id'] as string | undefined) ?? null],
    }))
    .sort((a, b) => compareKeys(a.key, b.key))
    .map(({ row }) => row);
}

/** Where a page of a list ends: the row's id and its natural key, should the row be gone by the next request. */
export const encodeCursor = (table: Table, row: Cells): string =>
  Buffer.from(JSON.stringify([row['id'], ...naturalKey(table, row)])).toString('base64url');

/** Index of the first row after the cursor; null for a cursor that is none of ours. */
export function indexAfter(table: Table, rows: readonly Cells[], cursor: string): number | null {
  let parts: unknown;
  try {
    parts = JSON.parse(Buffer.from(cursor, 'base64url').toString());
  } catch {
    return null;
  }
  if (!Array.isArray(parts) || parts.length !== NATURAL[table].length + 1) return null;
  const [id, ...key] = parts as [string, ...Key];
  const known = rows.findIndex((row) => row['id'] === id);
  if (known >= 0) return known + 1;
  const next = rows.findIndex((row) => compareKeys(naturalKey(table, row), key) > 0);
  return next < 0 ? rows.length : next;
}
