import { group } from 'd3-array';
import { eq, inArray } from 'drizzle-orm';
import type { Queryable } from '~/db/client';
import { geometry } from '~/db/schema';
import {
  TABLES,
  type Block,
  type Direction,
  type Feature,
  type Outline,
  type Rotation,
  type Row,
  type Source,
  type Table,
} from './contract';
import { inOrder } from './order';
import { DB_TABLES, toFields, type LogRow } from './tables';

/** All rows of one state, each table in natural order. */
export interface Ledger {
  readonly blocks: readonly Block[];
  readonly outlines: readonly Outline[];
  readonly rotations: readonly Rotation[];
  readonly features: readonly Feature[];
  readonly directions: readonly Direction[];
  readonly sources: readonly Source[];
}

type Rows = Readonly<Record<Table, readonly LogRow[]>>;

/** The draft's rows, read inside a transaction that sees one state of them. */
export async function readDraft(db: Queryable, projectId: string): Promise<Ledger> {
  const rows = {} as Record<Table, readonly LogRow[]>;
  for (const table of TABLES) {
    const target = DB_TABLES[table];
    const found = await db.select().from(target).where(eq(target.project_id, projectId));
    rows[table] = found.map((row) => toFields(table, row));
  }
  return asLedger(db, rows);
}

/** Rows as the contract answers them: in natural order, with vertex counts, blocks with their outlines. */
export async function asLedger(db: Queryable, rows: Rows): Promise<Ledger> {
  const vertices = await verticesOf(db, [...rows.outlines, ...rows.features]);
  const outlines = inOrder(
    'outlines',
    rows.outlines.map((row) => ({ ...row, vertices: vertices.get(row['sha256'])! })),
  );
  const byBlock = group(outlines as unknown as Outline[], ({ block }) => block);
  return {
    blocks: inOrder(
      'blocks',
      rows.blocks.map((row) => withOutlines(row, byBlock.get(String(row['code'])) ?? [])),
    ),
    outlines,
    rotations: inOrder('rotations', rows.rotations),
    features: inOrder(
      'features',
      rows.features.map((row) => ({ ...row, vertices: vertices.get(row['sha256'])! })),
    ),
    directions: inOrder('directions', rows.directions),
    sources: inOrder('sources', rows.sources),
  } as unknown as Ledger;
}

/** Rows of one table after an edit, as a list would answer them. */
export async function asAnswered<T extends Table>(
  db: Queryable,
  projectId: string,
  table: T,
  rows: readonly LogRow[],
): Promise<Row<T>[]> {
  if (table === 'outlines' || table === 'features') {
    const vertices = await verticesOf(db, rows);
    return rows.map((row) => ({ ...row, vertices: vertices.get(row['sha256'])! })) as unknown as Row<T>[];
  }
  if (table !== 'blocks') return rows as unknown as Row<T>[];
  const target = DB_TABLES.outlines;
  const found = await db.select().from(target).where(eq(target.project_id, projectId));
  const outlines = await asAnswered(
    db,
    projectId,
    'outlines',
    found.map((row) => toFields('outlines', row)),
  );
  const byBlock = group(inOrder('outlines', outlines), ({ block }) => block);
  return rows.map((row) => withOutlines(row, byBlock.get(String(row['code'])) ?? [])) as unknown as Row<T>[];
}

const withOutlines = (row: LogRow, outlines: readonly Outline[]) => ({
  ...row,
  outlines: outlines.map(({ block: _block, ...outline }) => outline),
});

async function verticesOf(db: Queryable, rows: readonly LogRow[]): Promise<Map<unknown, number>> {
  const hashes = [...new Set(rows.map((row) => String(row['sha256'])))];
  const vertices = new Map<unknown, number>();
  for (let i = 0; i < hashes.length; i += 1000) {
    const found = await db
      .select({ sha256: geometry.sha256, vertices: geometry.vertices })
      .from(geometry)
      .where(inArray(geometry.sha256, hashes.slice(i, i + 1000)));
    for (const row of found) vertices.set(row.sha256, row.vertices);
  }
  return vertices;
}
