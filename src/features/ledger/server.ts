import { eq, sql } from 'drizzle-orm';
import { database, type Transaction } from '~/db/client';
import { change, project } from '~/db/schema';
import { demand, type Access } from '~/server/access';
import { publish } from '~/server/events';
import type { ProjectAction } from '~/server/policy';
import { Problem } from '~/server/problem';
import { Draft, type Changed } from './apply';
import type { Edit } from './contract';
import { changedAt, changesSince } from './history';
import { labelOf } from './history-rules';
import { integrityErrors } from './integrity';
import { refuse } from './parse';
import { madeBy, remember } from './repeats';

/** `*` edits whatever revision there is: right only for rows that build on nothing read before. */
export type ExpectedRevision = number | '*';

export interface DraftChange {
  readonly expected: ExpectedRevision;
  readonly action: 'edit' | 'import' | 'undo' | 'redo' | 'restore';
  /** Left out, it is made from the rows. */
  readonly label?: string | undefined;
  readonly reverts_revision?: number;
  /** Where the edit at an index stands in the request, for errors. */
  readonly pathOf?: (index: number) => string;
  /** The sender's own name of the edit: a second one of the same name answers what the first has made. */
  readonly key?: string | null;
  /** Further writes that belong to the same transaction; gets the revision that it makes. */
  readonly alongside?: (tx: Transaction, revision: number) => Promise<void>;
}

export interface DraftResult {
  /** The revision after the change; as before where nothing changed. */
  readonly revision: number;
  readonly changed: readonly Changed[];
}

const ACTION: Readonly<Record<DraftChange['action'], ProjectAction>> = {
  edit: 'ledger.edit',
  undo: 'ledger.edit',
  redo: 'ledger.edit',
  import: 'import',
  restore: 'ledger.edit',
};

/**
 * Edits the draft: one transaction with its entries in the change log, one step of undo.
 * @throws Problem `StaleRevision` with what changed since; `InvalidRows`, `NotFound`, `Conflict` by row
 */
export const editDraft = (access: Access, edits: readonly Edit[], how: DraftChange): Promise<DraftResult> =>
  changeDraft(access, how, (draft) => draft.apply(edits));

/** The transaction around any change of the draft. */
export async function changeDraft(
  access: Access,
  how: DraftChange,
  work: (draft: Draft, tx: Transaction) => Promise<void>,
): Promise<DraftResult> {
  demand(access, ACTION[how.action]);
  const { id: projectId } = access.project;
  const user = access.actor.user!;
  const result = await database().transaction(async (tx) => {
    const standing = await lockRevision(tx, projectId);
    const repeated = how.key ? await madeBy(tx, access, how.key) : null;
    if (repeated !== null)
      return {
        revision: repeated,
        changed: await changedAt(tx, projectId, repeated),
        label: '',
        again: true,
      };
    await requireRevision(tx, projectId, how.expected, standing);
    await tx.execute(sql`set constraints all deferred`);
    const draft = new Draft(tx, projectId, how.pathOf ?? ((index) => `edits.${index}.fields`));
    await work(draft, tx);
    const touched = new Set(draft.changed.map(({ entity }) => entity));
    refuse(await integrityErrors(tx, projectId, touched, (id) => draft.pathById.get(id)));
    await tx.execute(sql`set constraints all immediate`);
    const made = await record(tx, access, how, draft.changed);
    if (how.key && made.changed.length > 0) await remember(tx, access, how.key, made.revision);
    return { ...made, again: false };
  });
  if (result.changed.length > 0 && !result.again) {
    const actor = { id: user.id, name: user.name };
    publish(projectId, { revision: result.revision, action: how.action, label: result.label, actor });
  }
  return result;
}

/** Locks the project's row until the end of the transaction: edits of one draft come one after the other. */
async function lockRevision(tx: Transaction, projectId: string): Promise<number> {
  const [row] = await tx
    .select({ revision: project.revision })
    .from(project)
    .where(eq(project.id, projectId))
    .for('update');
  if (!row) throw new Problem('NotFound');
  return row.revision;
}

/** @throws Problem `StaleRevision` */
async function requireRevision(
  tx: Transaction,
  projectId: string,
  expected: ExpectedRevision,
  revision: number,
): Promise<void> {
  if (expected === '*' || expected === revision) return;
  throw new Problem('StaleRevision', {
    detail: `The draft is at revision ${revision}, not ${expected}. Look at what changed and send the edit again.`,
    headers: { ETag: `"${revision}"` },
    members: { revision, changes: await changesSince(tx, projectId, expected) },
  });
}

const CHUNK = 1000;

async function record(tx: Transaction, access: Access, how: DraftChange, changed: readonly Changed[]) {
  const { id: project_id } = access.project;
  const own = eq(project.id, project_id);
  const label = how.label ?? labelOf(changed);
  if (changed.length === 0 && !how.alongside) {
    const [row] = await tx.select({ revision: project.revision }).from(project).where(own);
    return { revision: row!.revision, changed, label };
  }
  const raised = changed.length > 0 ? 1 : 0;
  const [row] = await tx
    .update(project)
    .set({ revision: sql`${project.revision} + ${raised}` })
    .where(own)
    .returning({ revision: project.revision });
  const { revision } = row!;
  const rows = changed.map(({ entity, entity_id, before, after }, position) => ({
    project_id,
    revision,
    position,
    actor_id: access.actor.user!.id,
    action: how.action,
    label,
    entity,
    entity_id,
    before,
    after,
    reverts_revision: how.reverts_revision ?? null,
  }));
  for (let i = 0; i < rows.length; i += CHUNK) await tx.insert(change).values(rows.slice(i, i + CHUNK));
  await how.alongside?.(tx, revision);
  return { revision, changed, label };
}
