/** What an import would do to the draft: edits for the ledger, rows as the preview shows them, rows left alone. */
import type { Edit, Table } from '../../ledger/contract';
import type { PreviewRow, RejectedRow } from '../contract';

export interface ImportPlan {
  readonly edits: readonly Edit[];
  readonly preview: readonly PreviewRow[];
  /** Rows of the file that are taken, whether or not they change anything. */
  readonly accepted: number;
  readonly rejected: readonly RejectedRow[];
}

type Cells = PreviewRow['cells'];

/** Collects edits and preview rows side by side. */
export class Planner {
  readonly #edits: Edit[] = [];
  readonly #preview: PreviewRow[] = [];

  create(table: Table, fields: Record<string, unknown>): void {
    this.#edits.push({ op: 'create', table, fields });
  }

  update(table: Table, id: string, fields: Record<string, unknown>): void {
    this.#edits.push({ op: 'update', table, id, fields });
  }

  remove(table: Table, id: string): void {
    this.#edits.push({ op: 'delete', table, id });
  }

  show(line: number | null, change: PreviewRow['change'], cells: Cells): void {
    this.#preview.push({ line, change, cells });
  }

  plan(rejected: readonly RejectedRow[]): ImportPlan {
    const accepted = this.#preview.filter(({ change }) => change !== 'removed').length;
    return { edits: this.#edits, preview: this.#preview, accepted, rejected };
  }
}

const EXISTING = 'Rows with the same name stand in the draft with other values. Which are to stay?';
export const FILES = "the file's";
export const DRAFTS = "the draft's";
/** The question asked wherever a file meets rows that are there already. */
export const existingQuestion = ['existing_rows', EXISTING, [FILES, DRAFTS]] as const;
