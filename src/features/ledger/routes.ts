import { z } from 'zod';
import { queryPage, queryVersion } from '~/server/queries';
import { json, projectRoute, type DescribedRoute } from '~/server/route';
import { expectedRevision, tableAnswerOf } from './answers';
import { CREATE, editAnswer, FIELDS, MAX_EDITS, page, ROWS, slug, type Edit, type Table } from './contract';
import { listRows } from './list';
import { editDraft, type DraftResult } from './server';
import { loadState } from './state';
import { stateAnswer } from './state-answer';

/** Outlines bring their geometry. */
export const EDIT_LIMIT_BYTES = 32 * 1024 * 1024;

const listQuery = z.object({ ...queryPage, version: queryVersion, block: slug.optional() });

export const withRevision = (answer: object, result: Pick<DraftResult, 'revision'>, status = 200): Response =>
  json(answer, status, { ETag: `"${result.revision}"` });

/** GET and POST of /api/projects/{slug}/{table}. */
export function collection<T extends Table>(table: T): { GET: DescribedRoute; POST: DescribedRoute } {
  const one = z.record(z.string(), z.unknown());
  const body = z.union([one, z.array(one).min(1).max(MAX_EDITS)]);
  return {
    GET: projectRoute(
      {
        action: 'project.view',
        summary: `The ${table} of a state`,
        query: listQuery,
        answer: page(ROWS[table]),
      },
      async ({ access, request, query: { version, ...list } }) => {
        const state = await loadState(access, version);
        return stateAnswer(request, access, state, listRows(state, table, list));
      },
    ),
    POST: projectRoute(
      {
        action: 'ledger.edit',
        summary: `Add one or many ${table}`,
        body,
        accepts: z.union([CREATE[table], z.array(CREATE[table])]),
        answer: editAnswer(ROWS[table]),
        status: 201,
        edits: true,
        limitBytes: EDIT_LIMIT_BYTES,
      },
      async ({ access, request, body: rows }) => {
        const many = Array.isArray(rows);
        const edits = (many ? rows : [rows]).map((fields): Edit => ({ op: 'create', table, fields }));
        const pathOf = (index: number) => (many ? String(index) : '');
        const result = await editDraft(access, edits, {
          expected: expectedRevision(request),
          action: 'edit',
          pathOf,
        });
        return withRevision(await tableAnswerOf(access, table, result), result, 201);
      },
    ),
  };
}

/** PATCH and DELETE of /api/projects/{slug}/{table}/{id}. */
export function member<T extends Table>(table: T): { PATCH: DescribedRoute; DELETE: DescribedRoute } {
  const change = async (call: { access: Parameters<typeof editDraft>[0]; request: Request }, edit: Edit) => {
    const how = { expected: expectedRevision(call.request), action: 'edit', pathOf: () => '' } as const;
    const result = await editDraft(call.access, [edit], how);
    return withRevision(await tableAnswerOf(call.access, table, result), result);
  };
  const answer = editAnswer(ROWS[table]);
  return {
    PATCH: projectRoute(
      {
        action: 'ledger.edit',
        summary: `Change cells of one of the ${table}`,
        body: z.record(z.string(), z.unknown()),
        accepts: FIELDS[table].partial(),
        answer,
        edits: true,
        limitBytes: EDIT_LIMIT_BYTES,
      },
      ({ access, request, params, body: fields }) =>
        change({ access, request }, { op: 'update', table, id: params['id']!, fields }),
    ),
    DELETE: projectRoute(
      { action: 'ledger.edit', summary: `Delete one of the ${table}`, answer, edits: true },
      ({ access, request, params }) =>
        change({ access, request }, { op: 'delete', table, id: params['id']! }),
    ),
  };
}
