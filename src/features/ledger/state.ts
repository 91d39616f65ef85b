import { and, desc, eq } from 'drizzle-orm';
import { LRUCache } from 'lru-cache';
import { database } from '~/db/client';
import { project, version } from '~/db/schema';
import { parseManifest } from '~/features/versions/manifest';
import { demand, may, type Access } from '~/server/access';
import { Problem } from '~/server/problem';
import { asLedger, readDraft, type Ledger } from './read';

export type VersionName = 'draft' | number;

/** One state of a project, loaded once: the draft at a revision, or a version. */
export interface State extends Ledger {
  readonly version: VersionName;
  /** The draft's revision; for a version, the revision it was released from. */
  readonly revision: number;
  /** The version's identity; null for the draft. */
  readonly sha256: string | null;
}

/** Loaded states by content; what is derived from one (a compiled model) hangs on it by a WeakMap. */
const cache = new LRUCache<string, Ledger>({ max: 40 });

/**
 * The state that a request names. Without a name: the draft for those who may see it, the newest version for others.
 * @throws Problem `Forbidden`, `UnknownVersion` or `NoReleasedVersion`
 */
export async function loadState(access: Access, requested?: VersionName): Promise<State> {
  const name = requested ?? (may(access, 'draft.view') ? 'draft' : 'newest');
  return name === 'draft' ? loadDraft(access) : loadVersion(access, name);
}

async function loadDraft(access: Access): Promise<State> {
  demand(access, 'draft.view');
  const { id } = access.project;
  return database().transaction(
    async (tx) => {
      const [row] = await tx.select({ revision: project.revision }).from(project).where(eq(project.id, id));
      if (!row) throw new Problem('NotFound');
      const key = `${id}:${row.revision}`;
      const ledger = cache.get(key) ?? (await readDraft(tx, id));
      cache.set(key, ledger);
      return { ...ledger, version: 'draft', revision: row.revision, sha256: null };
    },
    { isolationLevel: 'repeatable read', accessMode: 'read only' },
  );
}

async function loadVersion(access: Access, number: number | 'newest'): Promise<State> {
  demand(access, 'version.view');
  const of = eq(version.project_id, access.project.id);
  const [row] = await database()
    .select({ number: version.number, sha256: version.sha256, revision: version.revision })
    .from(version)
    .where(number === 'newest' ? of : and(of, eq(version.number, number)))
    .orderBy(desc(version.number))
    .limit(1);
  if (!row) throw new Problem(number === 'newest' ? 'NoReleasedVersion' : 'UnknownVersion');
  const ledger = cache.get(row.sha256) ?? (await readVersion(access.project.id, row.number));
  cache.set(row.sha256, ledger);
  return { ...ledger, version: row.number, revision: row.revision, sha256: row.sha256 };
}

async function readVersion(projectId: string, number: number): Promise<Ledger> {
  const [row] = await database()
    .select({ manifest: version.manifest })
    .from(version)
    .where(and(eq(version.project_id, projectId), eq(version.number, number)));
  return asLedger(database(), parseManifest(row!.manifest));
}
