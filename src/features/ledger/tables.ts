import { block, blockOutline, direction, feature, rotation, source } from '~/db/schema';
import type { Covariance } from '~/kernel/rotations/types';
import { FIELDS, type Table } from './contract';

/** A row as the change log keeps it: its id and what people entered. */
export type LogRow = { readonly id: string } & Readonly<Record<string, unknown>>;
type Columns = Record<string, unknown>;

/**
 * The tables of the database. They have id and project_id in common; as one type, so that the same code edits
 * each, they go by the smallest of them.
 */
export const DB_TABLES = {
  blocks: block,
  outlines: blockOutline,
  rotations: rotation,
  features: feature,
  directions: direction,
  sources: source,
} as unknown as Readonly<Record<Table, typeof block>>;

/** Tables whose rows name the block that carries them. */
export const CARRIED = [
  'outlines',
  'rotations',
  'features',
  'directions',
] as const satisfies readonly Table[];

const COVARIANCE = ['cov_xx', 'cov_xy', 'cov_xz', 'cov_yy', 'cov_yz', 'cov_zz'] as const;

/** Columns of the database for fields of the contract; the covariance's six entries are six columns. */
export function toColumns(
  table: Table,
  fields: Readonly<Record<string, unknown>>,
): typeof block.$inferInsert {
  const { covariance, ...rest } = fields;
  const columns: Columns = rest;
  if (table === 'rotations' && covariance !== undefined) {
    const entries = covariance as Covariance | null;
    COVARIANCE.forEach((name, i) => (columns[name] = entries?.[i] ?? null));
  }
  return columns as typeof block.$inferInsert;
}

/** Fields of the contract, with the row's id, for columns of the database. Inverse: {@link toColumns}. */
export function toFields(table: Table, columns: Columns): LogRow {
  const fields: Columns = { id: columns['id'] };
  for (const name of Object.keys(FIELDS[table].shape)) {
    fields[name] = name === 'covariance' ? covarianceOf(columns) : columns[name];
  }
  return fields as LogRow;
}

function covarianceOf(columns: Columns): unknown {
  return columns['cov_xx'] === null ? null : COVARIANCE.map((name) => columns[name]);
}
