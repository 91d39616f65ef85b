/** What a ledger's grid is given: its rows and columns, and whom it tells. */
import type { ReactNode } from 'react';
import type { Column } from '../grid/column';
import type { CellChange, Pending } from '../grid/pending';

export interface GridRow {
  readonly id: string;
  readonly fields: Readonly<Record<string, unknown>>;
  /** A row that is worked out rather than entered: shown between its neighbours, never edited. */
  readonly computed?: boolean;
  readonly tone?: 'in use' | 'conflict';
  /** Drawn before the first cell, as a mark of a finding. */
  readonly mark?: ReactNode;
  /** A heavier line above: a hand-over. */
  readonly ruled?: boolean;
}

/** A column that is shown and not edited. */
export interface ShownColumn {
  readonly key: string;
  readonly heading: string;
  readonly unit?: string;
  readonly width: string;
  /** Key of the column that it stands behind; at the end where there is none. */
  readonly after?: string;
  readonly show: (row: GridRow) => ReactNode;
}

export interface Editing extends CellChange {
  readonly column: Column;
}

export interface GridProps {
  readonly label: string;
  readonly columns: readonly Column[];
  readonly shown?: readonly ShownColumn[];
  readonly rows: readonly GridRow[];
  readonly pending: Pending;
  readonly readOnly: boolean;
  readonly empty: ReactNode;
  readonly display: (column: Column, value: unknown, row: GridRow) => ReactNode;
  readonly onChanges: (changes: readonly CellChange[], newRows: readonly string[]) => void;
  readonly onEditing: (editing: Editing | null) => void;
  readonly onDelete: (rows: readonly string[]) => void;
  readonly onAdd: (after: string | null) => void;
  readonly onRow: (row: string) => void;
  /** Puts the focus into this row's first empty cell, and edits it, when it changes. */
  readonly start?: string | null;
  /** A row to bring into sight when it changes, while the grid is not being worked in. */
  readonly inSight?: string | null;
}
