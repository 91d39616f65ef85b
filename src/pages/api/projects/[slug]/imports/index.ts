import { z } from 'zod';
import { answers, columnMapping, importReport } from '~/features/interchange/contract';
import { optionalRevision } from '~/features/ledger/answers';
import { IMPORT_KINDS, IMPORT_LIMIT_BYTES } from '~/features/interchange/files';
import { importInto } from '~/features/interchange/server';
import { fieldErrors, Problem } from '~/server/problem';
import { projectRoute } from '~/server/route';
import { readUpload } from '~/server/upload';

const flag = z.enum(['true', 'false', '1', '0']).default('false').transform((v) => v === 'true' || v === '1'); // prettier-ignore
const json = <T extends z.ZodType>(shape: T) =>
  z
    .string()
    .default('{}')
    .transform((text, context) => {
      try {
        return JSON.parse(text) as unknown;
      } catch {
        context.addIssue({ code: 'custom', message: 'not JSON' });
        return z.NEVER;
      }
    })
    .pipe(shape);
const fields = z.object({
  kind: z.enum(IMPORT_KINDS),
  dry_run: flag,
  skip_rejected: flag,
  answers: json(answers),
  mapping: json(columnMapping),
});

export const POST = projectRoute(
  {
    action: 'import',
    summary:
      'Read a file into the draft: a report of accepted and rejected rows; writes unless dry_run, questions or rejections hold it back',
    reads: ['multipart/form-data'],
    answer: importReport,
    edits: 'optional',
    limitBytes: IMPORT_LIMIT_BYTES,
  },
  async ({ request, access }) => {
    const upload = await readUpload(request, IMPORT_LIMIT_BYTES);
    const parsed = fields.safeParse(upload.fields);
    if (!parsed.success)
      throw new Problem('InvalidRows', { errors: fieldErrors(parsed.error, upload.fields) });
    if (!upload.file) throw new Problem('InvalidRows', { detail: 'The part `file` is missing.' });
    const { kind, dry_run, skip_rejected, answers, mapping } = parsed.data;
    return importInto(access, {
      file: upload.file,
      kind,
      answers,
      mapping,
      dryRun: dry_run,
      skipRejected: skip_rejected,
      expected: optionalRevision(request),
    });
  },
);
