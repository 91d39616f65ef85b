import { and, asc, desc, eq, gt, isNotNull, or } from 'drizzle-orm';
import type { z } from 'zod';
import { database, type Queryable } from '~/db/client';
import { block, membership, project, version } from '~/db/schema';
import { accessTo, demand, may, type Access } from '~/server/access';
import type { Actor } from '~/server/actor';
import { PROJECT_ACTIONS, requireSite } from '~/server/policy';
import { inBrief, Problem } from '~/server/problem';
import type { createProject, patchProject, Project, Role } from './contract';

/** Projects with the actor's role and the newest version: one query, whatever the condition. */
function withStanding(db: Queryable, actor: Actor) {
  const latest = db
    .selectDistinctOn([version.project_id], {
      project_id: version.project_id,
      number: version.number,
      sha256: version.sha256,
      title: version.title,
      released_at: version.released_at,
      revision: version.revision,
    })
    .from(version)
    .orderBy(version.project_id, desc(version.number))
    .as('latest');
  return db
    .select({
      project,
      role: membership.role,
      latest: {
        number: latest.number,
        sha256: latest.sha256,
        title: latest.title,
        released_at: latest.released_at,
        revision: latest.revision,
      },
    })
    .from(project)
    .leftJoin(
      membership,
      and(eq(membership.project_id, project.id), eq(membership.user_id, actor.user?.id ?? '')),
    )
    .leftJoin(latest, eq(latest.project_id, project.id))
    .$dynamic();
}

type Row = Awaited<ReturnType<typeof withStanding>>[number];

function asProject(actor: Actor, { project: row, role, latest }: Row): Project {
  const access = accessTo(actor, row, role);
  const { id, slug, title, summary, visibility, draft_public, licence, real_earth, held_still, revision } =
    row;
  return {
    id,
    slug,
    title,
    summary,
    visibility,
    draft_public,
    licence,
    real_earth,
    held_still,
    revision,
    role,
    can: Object.fromEntries(PROJECT_ACTIONS.map((action) => [action, may(access, action)])),
    latest_version: latest && {
      number: latest.number,
      sha256: latest.sha256,
      title: latest.title,
      released_at: latest.released_at.toISOString(),
    },
    changes_since_version: revision - (latest?.revision ?? 0),
    created_at: row.created_at.toISOString(),
  };
}

/** Projects the actor has a role in, and public ones, by slug. */
export async function listProjects(
  actor: Actor,
  { limit, cursor, mine = false }: { limit: number; cursor?: string | undefined; mine?: boolean },
): Promise<{ items: Project[]; next_cursor: string | null }> {
  requireSite(actor, 'project.list');
  const seen = mine
    ? isNotNull(membership.role)
    : or(isNotNull(membership.role), eq(project.visibility, 'public'));
  const rows = await withStanding(database(), actor)
    .where(and(seen, cursor === undefined ? undefined : gt(project.slug, cursor)))
    .orderBy(asc(project.slug))
    .limit(limit + 1);
  const items = rows.slice(0, limit).map((row) => asProject(actor, row));
  return { items, next_cursor: rows.length > limit ? items.at(-1)!.slug : null };
}

export async function readProject(access: Access): Promise<Project> {
  demand(access, 'project.view');
  const [row] = await withStanding(database(), access.actor).where(eq(project.id, access.project.id));
  if (!row) throw new Problem('NotFound');
  return asProject(access.actor, row);
}

/** Whoever makes a project leads it. @throws Problem `SlugTaken` */
export async function makeProject(actor: Actor, body: z.output<typeof createProject>): Promise<Project> {
  requireSite(actor, 'project.create');
  const role: Role = 'lead';
  const row = await database().transaction(async (tx) => {
    const [made] = await tx
      .insert(project)
      .values({ ...body, created_by: actor.user!.id })
      .returning();
    await tx.insert(membership).values({ project_id: made!.id, user_id: actor.user!.id, role });
    return made!;
  });
  return asProject(actor, { project: row, role, latest: null });
}

/** @throws Problem `InvalidRows` for a block to hold still that is not there */
export async function changeProject(access: Access, body: z.output<typeof patchProject>): Promise<Project> {
  demand(access, 'project.settings');
  if (Object.keys(body).length > 0) {
    if (body.held_still) await requireBlock(access, body.held_still);
    await database().update(project).set(body).where(eq(project.id, access.project.id));
  }
  return readProject(access);
}

/** @throws Problem `InvalidRows` where the draft has no such block */
async function requireBlock(access: Access, code: string): Promise<void> {
  const [found] = await database()
    .select({ code: block.code })
    .from(block)
    .where(and(eq(block.project_id, access.project.id), eq(block.code, code)));
  if (found) return;
  const error = {
    path: 'held_still',
    read: code,
    problem: 'the draft has no block or frame of this code',
    hint: 'Give the code of one, or null for the usual frame.',
  };
  throw new Problem('InvalidRows', { detail: inBrief([error]), errors: [error] });
}

/** @throws Problem `ProjectHasVersions`: what was released stays citable */
export async function deleteProject(access: Access): Promise<void> {
  demand(access, 'project.delete');
  await database().delete(project).where(eq(project.id, access.project.id));
}
