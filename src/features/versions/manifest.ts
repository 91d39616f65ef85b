import canonicalize from 'canonicalize';
import { TABLES, type Table } from '~/features/ledger/contract';
import { canonicalCells, inOrder } from '~/features/ledger/order';
import type { Ledger } from '~/features/ledger/read';
import { sha256 } from '~/server/secrets';

/** Keys of a manifest; those of tables without rows are there too, so that a hash does not depend on what a program knows. */
const KEYS = [...TABLES, 'poles', 'dates', 'claims', 'thresholds'] as const;

/**
 * The canonical JSON (RFC 8785) of a state: every table's rows in natural order, outlines by hash, without ids
 * and dates of entry. Equal content gives equal text on any machine.
 */
export function manifestOf(ledger: Ledger): { readonly text: string; readonly sha256: string } {
  const content: Record<string, unknown> = Object.fromEntries(KEYS.map((key) => [key, []]));
  for (const table of TABLES) {
    content[table] = inOrder(table, ledger[table] as readonly Record<string, unknown>[]).map(
      (row) => JSON.parse(canonicalCells(row)) as unknown,
    );
  }
  const text = canonicalize(content)!;
  return { text, sha256: sha256(text) };
}

type ManifestRow = { readonly id: string } & Readonly<Record<string, unknown>>;

/** The rows of a manifest. Ids are made from the cells, so that a link to a row of a version lasts. Inverse: {@link manifestOf}. */
export function parseManifest(text: string): Readonly<Record<Table, readonly ManifestRow[]>> {
  const content = JSON.parse(text) as Record<Table, readonly Record<string, unknown>[]>;
  return Object.fromEntries(TABLES.map((table) => [table, withIds(table, content[table])])) as Record<
    Table,
    ManifestRow[]
  >;
}

function withIds(table: Table, rows: readonly Record<string, unknown>[]): ManifestRow[] {
  const seen = new Map<string, number>();
  return rows.map((row) => {
    const content = sha256(`${table}\n${canonicalCells(row)}`).slice(0, 24);
    const copies = seen.get(content) ?? 0;
    seen.set(content, copies + 1);
    return { ...row, id: copies === 0 ? content : `${content}-${copies}` };
  });
}
