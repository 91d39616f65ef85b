import type { Transaction } from '~/db/client';
import { fieldErrors, inBrief, Problem, shown, type FieldError } from '~/server/problem';
import { FIELDS, geometry, outlineGeometry, type Table } from './contract';
import { knownGeometries, storeGeometries } from './geometry';
import { checkGeometry, isFieldError, type CheckedGeometry } from './geometry-rules';
import { rowErrors } from './row-rules';

/** Cells of one row, and where they stand in the request. */
export interface PlacedCells {
  readonly cells: Readonly<Record<string, unknown>>;
  readonly path: string;
}

/** A place inside a place; a request of one row has no place of its own. */
export const within = (path: string, inner: string | undefined): string =>
  [path, inner].filter(Boolean).join('.');

const at = (path: string, error: FieldError): FieldError => ({ ...error, path: within(path, error.path) });

/** @throws Problem `InvalidRows` with every error found, up to a hundred */
export function refuse(errors: readonly FieldError[]): void {
  if (errors.length === 0) return;
  throw new Problem('InvalidRows', { detail: inBrief(errors), errors: errors.slice(0, 100) });
}

/** Made once: a schema compiles itself at its first use. */
const STRICT = {
  blocks: FIELDS.blocks.strict(),
  outlines: FIELDS.outlines.strict(),
  rotations: FIELDS.rotations.strict(),
  features: FIELDS.features.strict(),
  directions: FIELDS.directions.strict(),
  sources: FIELDS.sources.strict(),
} as const satisfies Record<Table, unknown>;

/** Each row by its table's contract, unknown columns refused. @throws Problem `InvalidRows` */
export function parseCells(table: Table, rows: readonly PlacedCells[]): Record<string, unknown>[] {
  const shape = STRICT[table];
  const errors: FieldError[] = [];
  const parsed = rows.map(({ cells, path }) => {
    const result = shape.safeParse(cells);
    if (!result.success) errors.push(...fieldErrors(result.error, cells).map((error) => at(path, error)));
    else errors.push(...rowErrors(table, result.data).map((error) => at(path, error)));
    return result.success ? result.data : {};
  });
  refuse(errors);
  return parsed;
}

/**
 * Replaces a `geometry` in the cells by the hash under which it is stored; a hash that is given must be one of
 * the project's own.
 * @throws Problem `InvalidRows`
 */
export async function resolveGeometries(
  tx: Transaction,
  projectId: string,
  table: Table,
  rows: readonly PlacedCells[],
): Promise<readonly PlacedCells[]> {
  if (table !== 'outlines' && table !== 'features') return rows;
  const errors: FieldError[] = [];
  const checked = new Map<PlacedCells, CheckedGeometry>();
  for (const row of rows) {
    if (row.cells['geometry'] === undefined) continue;
    const result = parseGeometry(table, row.cells['geometry']);
    if (Array.isArray(result)) errors.push(...result.map((error) => at(within(row.path, 'geometry'), error)));
    else checked.set(row, result);
  }
  const given = rows.flatMap((row) =>
    checked.has(row) || !('sha256' in row.cells) ? [] : [String(row.cells['sha256'])],
  );
  const known = await knownGeometries(tx, projectId, given);
  for (const row of rows) {
    const hash = row.cells['sha256'];
    if (checked.has(row) || typeof hash !== 'string' || known.has(hash)) continue;
    errors.push({
      path: within(row.path, 'sha256'),
      read: shown(hash),
      problem: 'the project has no such geometry',
      hint: 'Send the geometry itself.',
    });
  }
  refuse(errors);
  await storeGeometries(tx, [...checked.values()]);
  return rows.map((row) => {
    const stored = checked.get(row);
    const { geometry: _geometry, ...cells } = row.cells;
    return { path: row.path, cells: stored ? { ...cells, sha256: stored.sha256 } : cells };
  });
}

function parseGeometry(table: 'outlines' | 'features', value: unknown): CheckedGeometry | FieldError[] {
  const result = (table === 'outlines' ? outlineGeometry : geometry).safeParse(value);
  if (!result.success) return fieldErrors(result.error, value);
  const checked = checkGeometry(result.data);
  return isFieldError(checked) ? [checked] : checked;
}
