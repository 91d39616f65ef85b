import type { RejectedRow } from '../contract';
import { csvTable } from '../exports';

/** The list of what was not taken, as a table to work through beside the file. */
export const rejectedCsv = (rows: readonly RejectedRow[]): string =>
  csvTable(
    ['line', 'column', 'read', 'problem', 'hint'],
    rows.map(({ line, column, read, problem, hint }) => [line, column, read, problem, hint]),
  );
