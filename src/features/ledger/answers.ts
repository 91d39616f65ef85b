import { database } from '~/db/client';
import type { Access } from '~/server/access';
import { Problem } from '~/server/problem';
import { TABLES, type BatchAnswer, type Table } from './contract';
import { asAnswered } from './read';
import type { DraftResult, ExpectedRevision } from './server';
import type { LogRow } from './tables';

/** The revision that `If-Match` names: `"12"`, or `*` for any. @throws Problem `RevisionRequired` or `InvalidRequest` */
export function expectedRevision(request: Request): ExpectedRevision {
  const header = request.headers.get('if-match')?.trim();
  if (!header)
    throw new Problem('RevisionRequired', {
      detail: 'Send If-Match: "<revision>", as the last answer gave it.',
    });
  if (header === '*') return '*';
  const revision = /^(?:W\/)?"?(\d{1,9})"?$/.exec(header)?.[1];
  if (revision === undefined)
    throw new Problem('InvalidRequest', { detail: `If-Match reads ${header}: a revision is expected.` });
  return Number(revision);
}

/** As {@link expectedRevision}, any where the header is missing. */
export const optionalRevision = (request: Request): ExpectedRevision =>
  request.headers.has('if-match') ? expectedRevision(request) : '*';

/** The rows that an edit touched as they stand after it, by table. */
async function touched(access: Access, { changed }: DraftResult) {
  const last = new Map<string, { id: string; table: Table; row: LogRow | null }>();
  for (const { entity, entity_id: id, after } of changed)
    last.set(`${entity} ${id}`, { id, table: entity, row: after });
  const items: { table: Table; row: LogRow }[] = [];
  const deleted: { table: Table; id: string }[] = [];
  for (const table of TABLES) {
    const own = [...last.values()].filter((one) => one.table === table);
    const rows = own.flatMap(({ row }) => row ?? []);
    const answered = await asAnswered(database(), access.project.id, table, rows);
    items.push(...answered.map((row) => ({ table, row: row })));
    deleted.push(...own.flatMap(({ id, row }) => (row ? [] : { table, id })));
  }
  return { items, deleted };
}

export async function batchAnswerOf(access: Access, result: DraftResult): Promise<BatchAnswer> {
  return { revision: result.revision, ...(await touched(access, result)) };
}

/** Of one table only; rows of others that went along with a block are in the change log. */
export async function tableAnswerOf(access: Access, table: Table, result: DraftResult) {
  const { items, deleted } = await touched(access, result);
  return {
    revision: result.revision,
    items: items.filter((one) => one.table === table).map(({ row }) => row),
    deleted: deleted.filter((one) => one.table === table).map(({ id }) => id),
  };
}
