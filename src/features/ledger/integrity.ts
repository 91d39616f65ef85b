import { and, eq, isNotNull, isNull, lt, sql } from 'drizzle-orm';
import { alias } from 'drizzle-orm/pg-core';
import type { Transaction } from '~/db/client';
import { block, blockOutline, rotation, source } from '~/db/schema';
import type { FieldError } from '~/server/problem';
import type { Table } from './contract';
import { within } from './parse';
import { CARRIED, DB_TABLES } from './tables';

type PathOf = (id: string) => string | undefined;

/**
 * What must hold at the end of an edit, whatever happened within: no two rotations of one block, reference and
 * age, no two outlines of one block at one age, none on a frame, no two sources of one name, no row on a block that is not there. The database's own constraints, which
 * are deferred until then, say the same without naming the cell.
 */
export async function integrityErrors(
  tx: Transaction,
  projectId: string,
  touched: ReadonlySet<Table>,
  pathOf: PathOf,
): Promise<FieldError[]> {
  const errors: FieldError[] = [];
  if (touched.has('rotations') || touched.has('blocks'))
    errors.push(...(await duplicateRotations(tx, projectId, pathOf)));
  if (touched.has('outlines')) errors.push(...(await overlappingOutlines(tx, projectId, pathOf)));
  if (touched.has('outlines') || touched.has('blocks'))
    errors.push(...(await outlinedFrames(tx, projectId, pathOf)));
  if (touched.has('sources')) errors.push(...(await duplicateSources(tx, projectId, pathOf)));
  for (const table of CARRIED) {
    if (touched.has(table) || touched.has('blocks'))
      errors.push(...(await homeless(tx, projectId, table, pathOf)));
  }
  return errors;
}

/** Of rows alike, the one that the edit made is named; the others are what it ran into. */
const offenders = (ids: readonly string[], pathOf: PathOf): string[] => {
  const edited = ids.filter((id) => pathOf(id) !== undefined);
  return (edited.length === ids.length ? edited.slice(1) : edited).map((id) => pathOf(id)!);
};

async function duplicateRotations(tx: Transaction, projectId: string, pathOf: PathOf): Promise<FieldError[]> {
  const found = await tx
    .select({
      block: rotation.block,
      relative_to: rotation.relative_to,
      age_ma: rotation.age_ma,
      ids: sql<string[]>`array_agg(${rotation.id} order by ${rotation.id})`,
    })
    .from(rotation)
    .where(eq(rotation.project_id, projectId))
    .groupBy(rotation.block, rotation.relative_to, rotation.age_ma)
    .having(sql`count(*) > 1`);
  return found.flatMap(({ block: code, relative_to, age_ma, ids }) =>
    offenders(ids, pathOf).map((path) => ({
      path: within(path, 'age_ma'),
      read: String(age_ma),
      problem: `${code} has a row relative to ${relative_to} at ${age_ma} Ma already`,
      hint: 'Change the row that is there, or give another age.',
    })),
  );
}

/** Younger ends are excluded but for the present: a blank or 0 one takes 0 Ma in. */
const OPEN_YOUNGER_MA = -1;
const OPEN_OLDER_MA = 1e9;

async function overlappingOutlines(
  tx: Transaction,
  projectId: string,
  pathOf: PathOf,
): Promise<FieldError[]> {
  const other = alias(blockOutline, 'other');
  const younger = (t: typeof blockOutline | typeof other) =>
    sql`coalesce(nullif(${t.outline_younger_ma}, 0), ${OPEN_YOUNGER_MA})`;
  const older = (t: typeof blockOutline | typeof other) =>
    sql`coalesce(${t.outline_older_ma}, ${OPEN_OLDER_MA})`;
  const found = await tx
    .select({ block: blockOutline.block, a: blockOutline.id, b: other.id })
    .from(blockOutline)
    .innerJoin(
      other,
      and(
        eq(other.project_id, blockOutline.project_id),
        eq(other.block, blockOutline.block),
        lt(blockOutline.id, other.id),
        sql`greatest(${younger(blockOutline)}, ${younger(other)}) < least(${older(blockOutline)}, ${older(other)})`,
      ),
    )
    .where(eq(blockOutline.project_id, projectId))
    .limit(100);
  return found.flatMap(({ block: code, a, b }) =>
    offenders([a, b], pathOf).map((path) => ({
      path: within(path, 'outline_older_ma'),
      read: code,
      problem: `${code} has another outline at some of these ages`,
      hint: 'Say when each holds in outline_older_ma and outline_younger_ma, or join them as a MultiPolygon.',
    })),
  );
}

/** A frame is a point of view. Named at the outline where the edit made it, else at the block that became a frame. */
async function outlinedFrames(tx: Transaction, projectId: string, pathOf: PathOf): Promise<FieldError[]> {
  const found = await tx
    .select({ code: block.code, block: block.id, outline: blockOutline.id })
    .from(blockOutline)
    .innerJoin(block, and(eq(block.project_id, blockOutline.project_id), eq(block.code, blockOutline.block)))
    .where(and(eq(blockOutline.project_id, projectId), eq(block.kind, 'frame')))
    .limit(100);
  return found.map(({ code, block: id, outline }) => {
    const made = pathOf(outline);
    return {
      path: made === undefined ? within(pathOf(id) ?? '', 'kind') : within(made, 'block'),
      read: made === undefined ? 'frame' : code,
      problem: 'a frame has no outline',
      hint: 'Give the block another kind, or take the outline away.',
    };
  });
}

async function duplicateSources(tx: Transaction, projectId: string, pathOf: PathOf): Promise<FieldError[]> {
  const found = await tx
    .select({ cite: source.cite, ids: sql<string[]>`array_agg(${source.id} order by ${source.id})` })
    .from(source)
    .where(eq(source.project_id, projectId))
    .groupBy(source.cite)
    .having(sql`count(*) > 1`);
  return found.flatMap(({ cite, ids }) =>
    offenders(ids, pathOf).map((path) => ({
      path: within(path, 'cite'),
      read: cite,
      problem: 'the project has a source of this name',
      hint: 'Add a letter, as in 2021a.',
    })),
  );
}

async function homeless(
  tx: Transaction,
  projectId: string,
  table: (typeof CARRIED)[number],
  pathOf: PathOf,
): Promise<FieldError[]> {
  const target = DB_TABLES[table] as unknown as typeof rotation;
  const rows = await tx
    .select({ id: target.id, code: target.block })
    .from(target)
    .leftJoin(block, and(eq(block.project_id, target.project_id), eq(block.code, target.block)))
    .where(and(eq(target.project_id, projectId), isNotNull(target.block), isNull(block.id)))
    .limit(100);
  return rows.map(({ id, code }) => ({
    path: within(pathOf(id) ?? table, 'block'),
    read: code,
    problem: 'no block of this code in the project',
    hint: 'Add the block first, or mend its code.',
  }));
}
