import type { Access } from '~/server/access';
import { VISITOR } from '~/server/actor';
import { immutableResponse } from '~/server/etag';
import { can } from '~/server/policy';
import type { State } from './state';

/** True where anyone may see the version, so that shared caches may keep what is said of it. */
export const isShared = (access: Access): boolean => can(VISITOR, 'version.view', { ...access, role: null });

/** An answer computed from a state: immutable for a numbered version, with the revision as its tag for the draft. */
export function stateAnswer(
  request: Request,
  access: Access,
  state: State,
  value: unknown,
  lasts = true,
): Response {
  return stateText(request, access, state, JSON.stringify(value), 'application/json', lasts);
}

export function stateText(
  request: Request,
  access: Access,
  state: State,
  text: string | Uint8Array,
  type: string,
  /** False where the answer also depends on the project's settings, which may change under a frozen version. */
  lasts = true,
): Response {
  const asked = new URL(request.url).searchParams.get('version');
  if (lasts && state.version !== 'draft' && asked === String(state.version)) {
    return immutableResponse(request, text, type, isShared(access));
  }
  const headers = { 'Content-Type': type, 'Cache-Control': 'private, no-cache', ETag: `"${state.revision}"` };
  return new Response(text as BodyInit, { headers });
}
