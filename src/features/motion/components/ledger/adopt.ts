/** Puts the server's answer to an edit into what every part of the page reads. */
import type { QueryClient } from '@tanstack/react-query';
import { compileModel } from '../../../../kernel/rotations';
import type { BatchAnswer, Block, Rotation, Table } from '../../../ledger/contract';
import { keys } from '../../client';
import type { MotionsAnswer } from '../../contract';

type Row = { readonly id: string };

/** The model is compiled anew here; an answer older than the page, to an edit sent again, has the page read all anew. */
export function adoptAnswer(client: QueryClient, slug: string, answer: BatchAnswer): void {
  const motions = keys.table(slug, 'draft', 'motions');
  const held = client.getQueryData<MotionsAnswer>(motions)?.revision ?? 0;
  if (answer.revision < held) {
    void client.invalidateQueries({ queryKey: keys.project(slug) });
    return;
  }
  for (const table of new Set([...answer.items, ...answer.deleted].map((item) => item.table))) {
    client.setQueryData<readonly Row[]>(keys.table(slug, 'draft', table), (rows) =>
      merged(rows ?? [], answer, table),
    );
  }
  const rowsOf = <T>(table: Table): T[] => client.getQueryData<T[]>(keys.table(slug, 'draft', table)) ?? [];
  client.setQueryData<MotionsAnswer>(motions, {
    ...compileModel(rowsOf<Block>('blocks'), rowsOf<Rotation>('rotations')),
    version: 'draft',
    revision: answer.revision,
  });
  void client.invalidateQueries({ queryKey: keys.project(slug), exact: true });
}

function merged(rows: readonly Row[], answer: BatchAnswer, table: string): Row[] {
  const gone = new Set(answer.deleted.filter((d) => d.table === table).map((d) => d.id));
  const fresh = new Map(
    answer.items
      .filter((i) => i.table === table)
      .map((i) => [i.row['id'] as string, i.row as unknown as Row]),
  );
  const kept = rows.filter((row) => !gone.has(row.id)).map((row) => fresh.get(row.id) ?? row);
  const known = new Set(rows.map((row) => row.id));
  return [...kept, ...[...fresh.values()].filter((row) => !known.has(row.id))];
}
