/** Edits that are sent again because their answer was lost: each is made once (draft-ietf-httpapi-idempotency-key-header). */
import { and, eq, lt } from 'drizzle-orm';
import type { Transaction } from '~/db/client';
import { editRequest } from '~/db/schema';
import type { Access } from '~/server/access';
import { Problem } from '~/server/problem';

const KEPT_MS = 7 * 86_400_000;

/** The name under which an edit is sent, null without one. @throws Problem `InvalidRequest` */
export function requestKey(request: Request): string | null {
  const key = request.headers.get('idempotency-key');
  if (key === null || /^[\x21-\x7e]{1,64}$/.test(key)) return key;
  throw new Problem('InvalidRequest', { detail: 'Idempotency-Key takes 1 to 64 printable characters.' });
}

/** The revision that an edit of this name has made already. */
export async function madeBy(
  tx: Transaction,
  { project, actor }: Access,
  key: string,
): Promise<number | null> {
  const [made] = await tx
    .select({ revision: editRequest.revision })
    .from(editRequest)
    .where(
      and(
        eq(editRequest.project_id, project.id),
        eq(editRequest.actor_id, actor.user!.id),
        eq(editRequest.key, key),
      ),
    );
  return made?.revision ?? null;
}

/** Remembers what an edit made, and forgets those that nobody sends again. */
export async function remember(
  tx: Transaction,
  { project, actor }: Access,
  key: string,
  revision: number,
): Promise<void> {
  await tx.insert(editRequest).values({ project_id: project.id, actor_id: actor.user!.id, key, revision });
  await tx.delete(editRequest).where(lt(editRequest.at, new Date(Date.now() - KEPT_MS)));
}
