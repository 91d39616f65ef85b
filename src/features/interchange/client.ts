/** Sends a file to be read or taken; the same call previews (`dry_run`) and writes. */
import { FEATURE_KINDS } from '../../kernel/rotations/types';
import type { Answers, ColumnMapping, ImportReport } from './contract';
import type { ImportKind } from './files';

export interface ImportRequest {
  readonly slug: string;
  readonly file: File;
  readonly kind: ImportKind;
  readonly answers: Answers;
  readonly mapping: ColumnMapping;
  readonly dryRun: boolean;
  readonly skipRejected: boolean;
  /** The revision that was previewed; null for a preview. */
  readonly previewed: number | null;
}

/** What the server refused, in its own words. */
export class ImportRefused extends Error {}

export async function sendImport(request: ImportRequest): Promise<ImportReport> {
  const body = new FormData();
  body.set('kind', request.kind);
  body.set('dry_run', String(request.dryRun));
  body.set('skip_rejected', String(request.skipRejected));
  body.set('answers', JSON.stringify(request.answers));
  if (Object.keys(request.mapping).length > 0) body.set('mapping', JSON.stringify(request.mapping));
  body.set('file', request.file);
  const answer = await fetch(`/api/projects/${request.slug}/imports`, {
    method: 'POST',
    body,
    ...(request.previewed === null ? {} : { headers: { 'if-match': `"${request.previewed}"` } }),
  });
  if (answer.ok) return (await answer.json()) as ImportReport;
  if (answer.status === 412)
    throw new ImportRefused(
      'Someone changed the draft since this preview. Nothing was written: read the file again, then accept.',
    );
  const problem = (await answer.json().catch(() => ({}))) as { title?: string; detail?: string };
  throw new ImportRefused(
    [problem.title ?? `The server answered ${answer.status}`, problem.detail].filter(Boolean).join('. '),
  );
}

const OF_FEATURES = new RegExp(`"(age_ma|side|chron)"|"kind"\\s*:\\s*"(${FEATURE_KINDS.join('|')})"`);

/** What a file most likely holds, by its name and first characters; the user can say otherwise. */
export function guessKind(name: string, head: string): ImportKind {
  const lower = name.toLowerCase();
  if (/^\s*\uFEFF?\s*[{[]/.test(head) || /\.(geo)?json$/.test(lower)) {
    return OF_FEATURES.test(head) ? 'features' : 'blocks';
  }
  return /inclination|declination|alpha95|site/i.test(head.split(/\r?\n/, 1)[0] ?? '')
    ? 'directions'
    : 'rotations';
}
