import { and, desc, eq } from 'drizzle-orm';
import type { z } from 'zod';
import { database, type Queryable } from '~/db/client';
import { project, user, version, versionGeometry } from '~/db/schema';
import { readDraft } from '~/features/ledger/read';
import { modelOf } from '~/features/motion/model';
import { demand, type Access } from '~/server/access';
import { inBrief, Problem, type FieldError } from '~/server/problem';
import type { releaseVersion, VersionEntry } from './contract';
import { manifestOf } from './manifest';
import { blockersOf } from './rules';

const entries = (db: Queryable, access: Access) =>
  db
    .select({ version, released_by: user.name })
    .from(version)
    .leftJoin(user, eq(user.id, version.released_by))
    .where(eq(version.project_id, access.project.id))
    .orderBy(desc(version.number))
    .$dynamic();

const asEntry = ({
  version: row,
  released_by,
}: Awaited<ReturnType<typeof entries>>[number]): VersionEntry => ({
  number: row.number,
  parent: row.parent,
  sha256: row.sha256,
  title: row.title,
  note: row.note,
  licence: row.licence,
  state: row.state,
  released_at: row.released_at.toISOString(),
  released_by,
});

/** Newest first. */
export async function listVersions(access: Access): Promise<VersionEntry[]> {
  demand(access, 'version.view');
  return (await entries(database(), access)).map(asEntry);
}

/** A version with its manifest, byte for byte as it was hashed. @throws Problem `UnknownVersion` */
export async function readVersion(
  access: Access,
  number: number,
): Promise<VersionEntry & { manifest: string }> {
  demand(access, 'version.view');
  const own = and(eq(version.project_id, access.project.id), eq(version.number, number));
  const [row] = await entries(database(), access).where(own);
  if (!row) throw new Problem('UnknownVersion');
  return { ...asEntry(row), manifest: row.version.manifest };
}

/**
 * Freezes the draft as the next version.
 * @throws Problem `NotReleasable` with what stands in the way; `NothingChanged` where the last version says the same
 */
export async function release(access: Access, body: z.output<typeof releaseVersion>): Promise<VersionEntry> {
  demand(access, 'version.release');
  const { id: project_id } = access.project;
  const made = await database().transaction(async (tx) => {
    const [row] = await tx
      .select({ revision: project.revision })
      .from(project)
      .where(eq(project.id, project_id))
      .for('update');
    const ledger = await readDraft(tx, project_id);
    if (ledger.blocks.length === 0)
      throw new Problem('NothingChanged', {
        detail: 'The draft holds no block yet: there is nothing to freeze.',
      });
    refuseBlockers(blockersOf(modelOf(ledger)));
    const { text: manifest, sha256 } = manifestOf(ledger);
    const [last] = await tx
      .select({ number: version.number, sha256: version.sha256 })
      .from(version)
      .where(eq(version.project_id, project_id))
      .orderBy(desc(version.number))
      .limit(1);
    if (last?.sha256 === sha256)
      throw new Problem('NothingChanged', { detail: `Version ${last.number} says the same.` });
    const [frozen] = await tx
      .insert(version)
      .values({
        ...body,
        project_id,
        number: (last?.number ?? 0) + 1,
        parent: last?.number ?? null,
        sha256,
        manifest,
        revision: row!.revision,
        released_by: access.actor.user!.id,
      })
      .returning();
    const hashes = new Set([...ledger.outlines, ...ledger.features].map((one) => one.sha256));
    const uses = [...hashes].map((hash) => ({ version_id: frozen!.id, sha256: hash }));
    for (let i = 0; i < uses.length; i += 1000)
      await tx.insert(versionGeometry).values(uses.slice(i, i + 1000));
    return frozen!;
  });
  return asEntry({ version: made, released_by: access.actor.user!.name });
}

function refuseBlockers(errors: readonly FieldError[]): void {
  if (errors.length > 0) throw new Problem('NotReleasable', { detail: inBrief(errors), errors });
}
