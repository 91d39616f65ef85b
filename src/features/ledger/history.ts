import { and, asc, count, desc, eq, gt, inArray, lt, min } from 'drizzle-orm';
import { database, type Queryable } from '~/db/client';
import { change, user } from '~/db/schema';
import { demand, type Access } from '~/server/access';
import { Problem } from '~/server/problem';
import type { Changed } from './apply';
import type { ChangeEntry, Table } from './contract';
import { stacks, type Step } from './history-rules';
import type { LogRow } from './tables';

/** Transactions of a draft, one row each, newest first. */
function transactions(db: Queryable) {
  return db
    .select({
      revision: change.revision,
      action: change.action,
      label: change.label,
      reverts_revision: change.reverts_revision,
      at: min(change.at),
      rows: count(),
      actor_id: change.actor_id,
      actor_name: user.name,
    })
    .from(change)
    .leftJoin(user, eq(user.id, change.actor_id))
    .groupBy(
      change.revision,
      change.action,
      change.label,
      change.reverts_revision,
      change.actor_id,
      user.name,
    )
    .orderBy(desc(change.revision))
    .$dynamic();
}

type Transacted = Awaited<ReturnType<typeof transactions>>[number];

const asEntry = ({ revision, action, label, at, rows, actor_id, actor_name }: Transacted): ChangeEntry => ({
  revision,
  action,
  label,
  actor: actor_id === null ? null : { id: actor_id, name: actor_name ?? '' },
  at: at!.toISOString(),
  rows,
});

export interface ChangeList {
  items: ChangeEntry[];
  next_cursor: string | null;
  undo: string | null;
  redo: string | null;
}

export async function listChanges(access: Access, limit: number, cursor?: string): Promise<ChangeList> {
  demand(access, 'history.view');
  const before = cursor === undefined ? undefined : Number(cursor);
  if (cursor !== undefined && !/^\d{1,9}$/.test(cursor))
    throw new Problem('InvalidQuery', { detail: 'cursor: not one of ours' });
  const own = eq(change.project_id, access.project.id);
  const rows = await transactions(database())
    .where(and(own, before === undefined ? undefined : lt(change.revision, before)))
    .limit(limit + 1);
  const { undo, redo } = await ownStacks(database(), access);
  return {
    items: rows.slice(0, limit).map(asEntry),
    next_cursor: rows.length > limit ? String(rows[limit - 1]!.revision) : null,
    undo: undo?.label ?? null,
    redo: redo?.label ?? null,
  };
}

/** One transaction with its rows before and after. @throws Problem `NotFound` */
export async function readChange(access: Access, revision: number): Promise<ChangeEntry> {
  demand(access, 'history.view');
  const [entry] = await withRows(database(), access.project.id, [revision]);
  if (!entry) throw new Problem('NotFound');
  return entry;
}

/** What changed since a revision, oldest first, with rows: for whoever edits on a stale one. */
export async function changesSince(
  tx: Queryable,
  projectId: string,
  revision: number,
): Promise<ChangeEntry[]> {
  const since = await tx
    .selectDistinct({ revision: change.revision })
    .from(change)
    .where(and(eq(change.project_id, projectId), gt(change.revision, revision)))
    .orderBy(asc(change.revision))
    .limit(50);
  return withRows(
    tx,
    projectId,
    since.map((one) => one.revision),
  );
}

/** Every row that a revision changed, in its order. */
export async function changedAt(db: Queryable, projectId: string, revision: number): Promise<Changed[]> {
  const rows = await db
    .select()
    .from(change)
    .where(and(eq(change.project_id, projectId), eq(change.revision, revision)))
    .orderBy(change.position);
  return rows.map(({ entity, entity_id, before, after }) => ({
    entity: entity as Table,
    entity_id,
    before: before as LogRow | null,
    after: after as LogRow | null,
  }));
}

const MOST_ROWS = 1000;

async function withRows(
  db: Queryable,
  projectId: string,
  revisions: readonly number[],
): Promise<ChangeEntry[]> {
  if (revisions.length === 0) return [];
  const wanted = and(eq(change.project_id, projectId), inArray(change.revision, [...revisions]));
  const entries = (await transactions(db).where(wanted)).map(asEntry).reverse();
  const rows = await db
    .select()
    .from(change)
    .where(wanted)
    .orderBy(change.revision, change.position)
    .limit(MOST_ROWS);
  return entries.map((entry) => ({
    ...entry,
    changes: rows
      .filter(({ revision }) => revision === entry.revision)
      .map(({ entity, entity_id, before, after }) => ({ entity, entity_id, before, after })),
  }));
}

/** How far back undo looks. */
const MOST_STEPS = 1000;

/** What the caller's undo and redo would act on. */
export async function ownStacks(
  db: Queryable,
  { project, actor }: Access,
): Promise<ReturnType<typeof stacks>> {
  if (!actor.user) return { undo: null, redo: null };
  const steps: Step[] = await db
    .selectDistinct({
      revision: change.revision,
      action: change.action,
      label: change.label,
      reverts_revision: change.reverts_revision,
    })
    .from(change)
    .where(and(eq(change.project_id, project.id), eq(change.actor_id, actor.user.id)))
    .orderBy(desc(change.revision))
    .limit(MOST_STEPS);
  return stacks(steps.reverse());
}
