import { and, eq, inArray, or, sql } from 'drizzle-orm';
import type { Geometry } from 'geojson';
import { database, type Queryable } from '~/db/client';
import {
  blockOutline,
  change,
  feature,
  geometry,
  membership,
  project,
  version,
  versionGeometry,
} from '~/db/schema';
import { encodeOutline } from '~/kernel/cartography/outline-codec';
import { VISITOR, type Actor } from '~/server/actor';
import { can, type ProjectAction, type Standing } from '~/server/policy';
import { Problem } from '~/server/problem';
import type { CheckedGeometry } from './geometry-rules';

/** Stores geometries once each, by hash; what is there already is left alone. */
export async function storeGeometries(tx: Queryable, checked: readonly CheckedGeometry[]): Promise<void> {
  const distinct = [...new Map(checked.map((one) => [one.sha256, one])).values()];
  const rows = distinct.map(({ sha256, geometry: shape, vertices }) => ({
    sha256,
    geojson: shape as unknown as Geometry,
    vertices,
    encoded: encodeOutline(shape),
  }));
  for (let i = 0; i < rows.length; i += 100) {
    await tx
      .insert(geometry)
      .values(rows.slice(i, i + 100))
      .onConflictDoNothing();
  }
}

/** Which of the hashes the project uses, or used: in its draft, a version or its history. */
export async function knownGeometries(
  tx: Queryable,
  projectId: string,
  hashes: readonly string[],
): Promise<Set<string>> {
  if (hashes.length === 0) return new Set();
  const wanted = inArray(geometry.sha256, [...hashes]);
  const uses = (rows: ReturnType<typeof sql>) => sql`exists ${rows}`;
  const rows = await tx
    .select({ sha256: geometry.sha256 })
    .from(geometry)
    .where(
      and(
        wanted,
        or(
          uses(
            sql`(select 1 from ${blockOutline} where ${blockOutline.project_id} = ${projectId} and ${blockOutline.sha256} = ${geometry.sha256})`,
          ),
          uses(
            sql`(select 1 from ${feature} where ${feature.project_id} = ${projectId} and ${feature.sha256} = ${geometry.sha256})`,
          ),
          uses(
            sql`(select 1 from ${versionGeometry} join ${version} on ${version.id} = ${versionGeometry.version_id} where ${version.project_id} = ${projectId} and ${versionGeometry.sha256} = ${geometry.sha256})`,
          ),
          uses(
            sql`(select 1 from ${change} where ${change.project_id} = ${projectId} and ${change.entity} in ('outlines', 'features') and ${geometry.sha256} in (${change.before} ->> 'sha256', ${change.after} ->> 'sha256'))`,
          ),
        ),
      ),
    );
  return new Set(rows.map(({ sha256 }) => sha256));
}

export interface StoredGeometry {
  readonly geojson: Geometry;
  readonly encoded: Uint8Array;
  /** True where anyone at all may see it, so that shared caches may keep it. */
  readonly shared: boolean;
}

/**
 * A geometry, for whoever may see some project's draft or version that uses it.
 * @throws Problem `NotFound` for an unknown hash and for one of others' projects alike
 */
export async function readGeometry(actor: Actor, hash: string): Promise<StoredGeometry> {
  const uses = await usesOf(actor, hash);
  const seenBy = (who: Actor) =>
    uses.some(({ action, standing }) => can(who, action, who.user ? standing : { ...standing, role: null }));
  if (!seenBy(actor)) throw new Problem('NotFound');
  const [row] = await database()
    .select({ geojson: geometry.geojson, encoded: geometry.encoded })
    .from(geometry)
    .where(eq(geometry.sha256, hash));
  return { ...row!, shared: seenBy(VISITOR) };
}

interface Use {
  readonly action: ProjectAction;
  readonly standing: Standing;
}

async function usesOf(actor: Actor, hash: string): Promise<Use[]> {
  const standing = {
    visibility: project.visibility,
    draft_public: project.draft_public,
    role: membership.role,
  };
  const mine = and(eq(membership.project_id, project.id), eq(membership.user_id, actor.user?.id ?? ''));
  const db = database();
  const drafts = db
    .select({ id: blockOutline.project_id })
    .from(blockOutline)
    .where(eq(blockOutline.sha256, hash))
    .union(db.select({ id: feature.project_id }).from(feature).where(eq(feature.sha256, hash)));
  const versions = db
    .select({ id: version.project_id })
    .from(versionGeometry)
    .innerJoin(version, eq(version.id, versionGeometry.version_id))
    .where(eq(versionGeometry.sha256, hash));
  const inDraft = await db
    .selectDistinct(standing)
    .from(project)
    .leftJoin(membership, mine)
    .where(inArray(project.id, drafts));
  const inVersion = await db
    .selectDistinct(standing)
    .from(project)
    .leftJoin(membership, mine)
    .where(inArray(project.id, versions));
  return [
    ...inDraft.map((one): Use => ({ action: 'draft.view', standing: one })),
    ...inVersion.map((one): Use => ({ action: 'version.view', standing: one })),
  ];
}
