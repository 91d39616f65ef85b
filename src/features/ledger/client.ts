/** Edits of the draft from the browser: one transaction each, against the revision that was read. */
import type { BatchAnswer, ChangeEntry, Edit } from './contract';

interface ProblemBody {
  readonly title?: string;
  readonly detail?: string;
  readonly revision?: number;
  readonly changes?: readonly ChangeEntry[];
  readonly errors?: readonly { readonly path?: string; readonly problem: string; readonly hint?: string }[];
}

/** Why an edit was not taken. Nothing of it was written. */
export class EditRefused extends Error {
  constructor(
    readonly status: number,
    private readonly body: ProblemBody,
  ) {
    super([body.title ?? `The server answered ${status}`, body.detail].filter(Boolean).join('. '));
  }

  /** The revision that the draft has by now, where the edit was made on an older one. */
  get revision(): number | null {
    return this.status === 412 ? (this.body.revision ?? null) : null;
  }

  /** What was changed since, oldest first. */
  get changes(): readonly ChangeEntry[] {
    return this.body.changes ?? [];
  }

  /** Problems by the edit's index and the field's name. */
  get cells(): readonly { readonly edit: number; readonly field: string | null; readonly problem: string }[] {
    return (this.body.errors ?? []).map(({ path, problem, hint }) => {
      const [, index, field] = /^edits\.(\d+)(?:\.fields(?:\.(\w+))?)?/.exec(path ?? '') ?? [];
      return {
        edit: Number(index ?? 0),
        field: field ?? null,
        problem: hint ? `${problem}: ${hint}` : problem,
      };
    });
  }
}

async function post<T>(address: string, revision: number | null, body?: unknown): Promise<T> {
  const answer = await fetch(address, {
    method: 'POST',
    headers: {
      ...(body === undefined ? {} : { 'content-type': 'application/json' }),
      ...(revision === null ? {} : { 'if-match': `"${revision}"` }),
    },
    ...(body === undefined ? {} : { body: JSON.stringify(body) }),
  });
  if (answer.ok) return (await answer.json()) as T;
  throw new EditRefused(answer.status, (await answer.json().catch(() => ({}))) as ProblemBody);
}

const base = (slug: string): string => `/api/projects/${encodeURIComponent(slug)}`;

/** Rows that others changed since and that these edits touch too. */
export function overlap(edits: readonly Edit[], changes: readonly ChangeEntry[]): string[] {
  const own = new Set(edits.map((edit) => edit.id));
  return changes
    .flatMap((entry) => entry.changes ?? [])
    .flatMap(({ entity_id }) => (own.has(entity_id) ? [entity_id] : []));
}

/**
 * Sends edits. Where the draft has moved on but none of these rows was touched, they are sent again on the new revision.
 * @throws EditRefused
 */
export async function sendEdits(
  slug: string,
  revision: number,
  edits: readonly Edit[],
  label?: string,
): Promise<BatchAnswer> {
  try {
    return await post<BatchAnswer>(`${base(slug)}/edits`, revision, { edits, ...(label ? { label } : {}) });
  } catch (error) {
    if (
      !(error instanceof EditRefused) ||
      error.revision === null ||
      overlap(edits, error.changes).length > 0
    )
      throw error;
    return post<BatchAnswer>(`${base(slug)}/edits`, error.revision, { edits, ...(label ? { label } : {}) });
  }
}

export const sendUndo = (slug: string, which: 'undo' | 'redo', revision: number): Promise<BatchAnswer> =>
  post<BatchAnswer>(`${base(slug)}/changes/${which}`, revision);
