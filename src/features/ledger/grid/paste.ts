import type { Column } from './column';
import type { CellChange } from './pending';

/** A pasted block of cells from an anchor on: cells beyond the last row make new rows, beyond the last column are dropped. */
export function pasteAt(
  cells: readonly (readonly string[])[],
  anchor: { readonly row: number; readonly column: number },
  rowIds: readonly string[],
  columns: readonly Column[],
  makeId: () => string,
): { readonly changes: CellChange[]; readonly newRows: string[]; readonly dropped: number } {
  const changes: CellChange[] = [];
  const newRows: string[] = [];
  let dropped = 0;
  cells.forEach((line, i) => {
    let row = rowIds[anchor.row + i];
    if (row === undefined) {
      row = makeId();
      newRows.push(row);
    }
    line.forEach((text, j) => {
      const column = columns[anchor.column + j];
      if (column) changes.push({ row, key: column.key, text });
      else dropped++;
    });
  });
  return { changes, newRows, dropped };
}
