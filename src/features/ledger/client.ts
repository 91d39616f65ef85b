/** Edits of the draft from the browser: one transaction each, against the revision that was read. */
import type { BatchAnswer, ChangeEntry, Edit } from './contract';

interface ProblemBody {
  readonly title?: string;
  readonly detail?: string;
  readonly revision?: number;
  readonly changes?: readonly ChangeEntry[];
  readonly errors?: readonly { readonly path?: string; readonly problem: string; readonly hint?: string }[];
}

const sentences = (parts: readonly (string | undefined)[]): string =>
  parts
    .flatMap((part) => (part ? [part.replace(/\.$/, '')] : []))
    .map((part) => part.charAt(0).toUpperCase() + part.slice(1))
    .join('. ');

/** The first problem with its way to mend it; where it stands is shown at the cell. */
function reasons({ errors = [] }: ProblemBody): string | null {
  const [first, ...more] = errors;
  if (!first) return null;
  const others = more.length > 0 ? `and ${more.length} more` : undefined;
  return sentences([first.problem, first.hint, others]);
}

/** Why an edit was not taken. Nothing of it was written. */
export class EditRefused extends Error {
  constructor(
    readonly status: number,
    private readonly body: ProblemBody,
  ) {
    super(reasons(body) ?? sentences([body.title ?? `The server answered ${status}`, body.detail]));
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

async function post<T>(address: string, headers: Record<string, string>, body?: unknown): Promise<T> {
  const answer = await fetch(
    address,
    body === undefined
      ? { method: 'POST', headers }
      : {
          method: 'POST',
          headers: { 'content-type': 'application/json', ...headers },
          body: JSON.stringify(body),
        },
  );
  if (answer.ok) return (await answer.json()) as T;
  throw new EditRefused(answer.status, (await answer.json().catch(() => ({}))) as ProblemBody);
}

const SIGNED_OUT = [401, 403, 404];

/** Whether a refusal comes of a session that has ended meanwhile. */
export async function isSignedOut({ status }: EditRefused): Promise<boolean> {
  if (!SIGNED_OUT.includes(status)) return false;
  const me = await fetch('/api/me').catch(() => null);
  return me?.status === 401;
}

const base = (slug: string): string => `/api/projects/${encodeURIComponent(slug)}`;

type RowChange = NonNullable<ChangeEntry['changes']>[number];

/** Rows in which others changed since what these edits change too: the same cells, or the whole row. */
export function overlap(edits: readonly Edit[], changes: readonly ChangeEntry[]): string[] {
  const own = new Map(edits.map((edit) => [edit.id, edit]));
  return changes
    .flatMap((entry) => entry.changes ?? [])
    .flatMap((change) => {
      const edit = own.get(change.entity_id);
      return edit && meets(edit, change) ? [change.entity_id] : [];
    });
}

function meets(edit: Edit, { before, after }: RowChange): boolean {
  if (edit.op !== 'update' || !isRow(before) || !isRow(after)) return true;
  return Object.keys(edit.fields).some(
    (key) => key === 'geometry' || JSON.stringify(before[key]) !== JSON.stringify(after[key]),
  );
}

const isRow = (value: unknown): value is Record<string, unknown> =>
  typeof value === 'object' && value !== null;

/** Whether every change between two revisions is there, row by row: long histories come shortened. */
function tellsAll({ changes, revision }: EditRefused, since: number): boolean {
  return (
    changes.length === (revision ?? since) - since &&
    changes.every((entry) => entry.changes !== undefined && entry.changes.length === entry.rows)
  );
}

export interface EditRequest {
  readonly edits: readonly Edit[];
  /** What the edits were made on. */
  readonly revision: number;
  /** The same each time the same edits are sent, so that they are made once whatever becomes of the answers. */
  readonly key: string;
  readonly label?: string | undefined;
  /** Revisions that this page made itself: they are nobody else's changes. */
  readonly own: ReadonlySet<number>;
}

/**
 * Sends edits. Where the draft has moved on but nobody else touched these cells, they are sent again on the new revision.
 * @throws EditRefused
 */
export async function sendEdits(
  slug: string,
  { edits, revision, key, label, own }: EditRequest,
): Promise<BatchAnswer> {
  const send = (on: number): Promise<BatchAnswer> =>
    post(
      `${base(slug)}/edits`,
      { 'if-match': `"${on}"`, 'idempotency-key': key },
      { edits, ...(label ? { label } : {}) },
    );
  try {
    return await send(revision);
  } catch (error) {
    if (!(error instanceof EditRefused) || error.revision === null || !tellsAll(error, revision)) throw error;
    const theirs = error.changes.filter((entry) => !own.has(entry.revision));
    if (overlap(edits, theirs).length > 0) throw error;
    return send(error.revision);
  }
}

/** What the newest step of the change log did. */
export async function lastLabel(slug: string): Promise<string | null> {
  const answer = await fetch(`${base(slug)}/changes?limit=1`);
  if (!answer.ok) return null;
  const { items } = (await answer.json()) as { items: readonly { label: string }[] };
  return items[0]?.label ?? null;
}

/** Takes back one's own last step, whatever others did meanwhile to other rows. */
export const sendUndo = (slug: string, which: 'undo' | 'redo'): Promise<BatchAnswer> =>
  post(`${base(slug)}/changes/${which}`, {});
