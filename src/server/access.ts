import { and, eq } from 'drizzle-orm';
import { database } from '~/db/client';
import { membership, project } from '~/db/schema';
import type { Role } from '~/features/projects/contract';
import { isSlug } from '~/slug';
import type { Actor } from './actor';
import { can, requireCan, type ProjectAction, type Standing } from './policy';
import { Problem } from './problem';

export type ProjectRow = typeof project.$inferSelect;

/** A project opened by someone who may do at least one thing in it. Features take this, not a slug. */
export interface Access extends Standing {
  readonly actor: Actor;
  readonly project: ProjectRow;
}

/**
 * Opens a project for an action.
 * @throws Problem `NotFound` where the actor may not know of it, `Forbidden` where the role does not allow the action
 */
export async function openProject(actor: Actor, slug: string, action: ProjectAction): Promise<Access> {
  if (!isSlug(slug)) throw new Problem('NotFound');
  const [found] = await database()
    .select({ project, role: membership.role })
    .from(project)
    .leftJoin(
      membership,
      and(eq(membership.project_id, project.id), eq(membership.user_id, actor.user?.id ?? '')),
    )
    .where(eq(project.slug, slug));
  if (!found) throw new Problem('NotFound');
  const access = accessTo(actor, found.project, found.role);
  requireCan(actor, action, access);
  return access;
}

export const accessTo = (actor: Actor, row: ProjectRow, role: Role | null): Access => ({
  actor,
  project: row,
  role,
  visibility: row.visibility,
  draft_public: row.draft_public,
});

/** Asked again by each feature function, whoever calls it. */
export const demand = (access: Access, action: ProjectAction): void =>
  requireCan(access.actor, action, access);
export const may = (access: Access, action: ProjectAction): boolean => can(access.actor, action, access);
