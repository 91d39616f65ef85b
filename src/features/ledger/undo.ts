import { and, desc, eq, gt, inArray } from 'drizzle-orm';
import { database, type Transaction } from '~/db/client';
import { change, user } from '~/db/schema';
import { demand, type Access } from '~/server/access';
import { inBrief, Problem, type FieldError } from '~/server/problem';
import type { Changed, Draft } from './apply';
import { changedAt, ownStacks } from './history';
import { canonicalCells } from './order';
import { changeDraft, type DraftResult, type ExpectedRevision } from './server';

/** Takes back the caller's last step that is not yet taken back. @throws Problem `StaleRevision`, `NothingToUndo` or `ChangedSince` */
export const undo = (access: Access, expected: ExpectedRevision = '*'): Promise<DraftResult> =>
  step(access, 'undo', expected);

/** Does again what the caller took back last. @throws Problem `NothingToRedo` or `ChangedSince` */
export const redo = (access: Access, expected: ExpectedRevision = '*'): Promise<DraftResult> =>
  step(access, 'redo', expected);

async function step(
  access: Access,
  action: 'undo' | 'redo',
  expected: ExpectedRevision,
): Promise<DraftResult> {
  demand(access, 'ledger.edit');
  const target = (await ownStacks(database(), access))[action];
  if (!target) throw new Problem(action === 'undo' ? 'NothingToUndo' : 'NothingToRedo');
  const label = `${action === 'undo' ? 'Undid' : 'Redid'}: ${target.label}`.slice(0, 200);
  const how = { expected, action, label, reverts_revision: target.revision } as const;
  return changeDraft(access, how, async (draft, tx) => {
    // Read again under the lock: another window of the same person may have been quicker.
    const still = (await ownStacks(tx, access))[action];
    if (still?.revision !== target.revision)
      throw new Problem(action === 'undo' ? 'NothingToUndo' : 'NothingToRedo');
    const made = await changedAt(tx, access.project.id, target.revision);
    const wanted = action === 'redo' ? made : made.reverse().map(inverse);
    await requireUnchanged(tx, access, draft, wanted, target.revision);
    await applyAll(draft, wanted);
    await requireNothingLeftBehind(tx, access, draft, wanted, target.revision);
  });
}

/** A block that goes again may carry rows that others have added since. @throws Problem `ChangedSince` */
async function requireNothingLeftBehind(
  tx: Transaction,
  access: Access,
  draft: Draft,
  wanted: readonly Changed[],
  revision: number,
): Promise<void> {
  for (const { entity, before, after } of wanted) {
    if (entity !== 'blocks' || after !== null) continue;
    const left = await draft.carriedBy(String(before!['code']));
    if (left.length > 0)
      throw await changedSince(
        tx,
        access,
        left.map(({ id }) => id),
        revision,
      );
  }
}

const inverse = ({ before, after, ...rest }: Changed): Changed => ({ ...rest, before: after, after: before });

/** In their order, runs of one kind at once. */
async function applyAll(draft: Draft, wanted: readonly Changed[]): Promise<void> {
  const kind = ({ entity, before, after }: Changed): string =>
    `${entity} ${before ? (after ? 'replace' : 'delete') : 'insert'}`;
  for (let start = 0; start < wanted.length;) {
    let end = start + 1;
    while (end < wanted.length && kind(wanted[end]!) === kind(wanted[start]!)) end++;
    await applyRun(draft, wanted.slice(start, end));
    start = end;
  }
}

async function applyRun(draft: Draft, run: readonly Changed[]): Promise<void> {
  const { entity, before, after } = run[0]!;
  if (!before)
    return draft.insertAll(
      entity,
      run.flatMap((one) => one.after ?? []),
    );
  if (!after)
    return draft.delete(
      entity,
      run.flatMap((one) => one.before ?? []),
    );
  // A rename carries rows along, which then stand as wanted already.
  const current = await draft.rowsById(
    entity,
    run.map(({ entity_id }) => entity_id),
  );
  await draft.replaceAll(
    entity,
    run.flatMap((one) => {
      const standing = current.get(one.entity_id);
      return standing && one.after ? [{ before: standing, after: one.after }] : [];
    }),
  );
}

/** Each row must stand as the step left it. @throws Problem `ChangedSince` naming who changed what */
async function requireUnchanged(
  tx: Transaction,
  access: Access,
  draft: Draft,
  wanted: readonly Changed[],
  revision: number,
): Promise<void> {
  const first = new Map<string, Changed>();
  for (const one of wanted) if (!first.has(one.entity_id)) first.set(one.entity_id, one);
  const differing: string[] = [];
  for (const entity of new Set(wanted.map((one) => one.entity))) {
    const own = [...first.values()].filter((one) => one.entity === entity);
    const current = await draft.rowsById(
      entity,
      own.map(({ entity_id }) => entity_id),
    );
    for (const { entity_id, before } of own) {
      const now = current.get(entity_id);
      const same = now && before ? canonicalCells(now) === canonicalCells(before) : !now && !before;
      if (!same) differing.push(entity_id);
    }
  }
  if (differing.length === 0) return;
  throw await changedSince(tx, access, differing, revision);
}

async function changedSince(
  tx: Transaction,
  access: Access,
  ids: readonly string[],
  revision: number,
): Promise<Problem> {
  const errors = await whoChanged(tx, access, ids, revision);
  return new Problem('ChangedSince', { detail: inBrief(errors), errors });
}

async function whoChanged(
  tx: Transaction,
  access: Access,
  ids: readonly string[],
  revision: number,
): Promise<FieldError[]> {
  const rows = await tx
    .select({
      id: change.entity_id,
      entity: change.entity,
      label: change.label,
      at: change.at,
      name: user.name,
    })
    .from(change)
    .leftJoin(user, eq(user.id, change.actor_id))
    .where(
      and(
        eq(change.project_id, access.project.id),
        gt(change.revision, revision),
        inArray(change.entity_id, [...ids]),
      ),
    )
    .orderBy(desc(change.revision));
  return ids.slice(0, 100).map((id) => {
    const last = rows.find((row) => row.id === id);
    const who = last ? `${last.name ?? 'someone'} at ${last.at.toISOString().slice(11, 16)} UTC` : 'someone';
    return {
      path: last ? `${last.entity}.${id}` : id,
      read: last?.label ?? '',
      problem: `changed since by ${who}${last ? `: ${last.label}` : ''}`,
      hint: 'Edit the row itself, so that their change is kept in view.',
    };
  });
}
