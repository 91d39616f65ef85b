/** Cells as spreadsheets put them on the clipboard: tabs between cells, lines between rows, quotes round either. */

export function readCells(text: string): string[][] {
  const rows: string[][] = [[]];
  let cell = '';
  let quoted = false;
  const body = text.replace(/\r\n?/g, '\n').replace(/\n$/, '');
  for (let i = 0; i < body.length; i++) {
    const c = body[i]!;
    if (quoted) {
      if (c === '"' && body[i + 1] === '"') cell += body[++i]!;
      else if (c === '"') quoted = false;
      else cell += c;
    } else if (c === '"' && cell === '') quoted = true;
    else if (c === '\t' || c === '\n') {
      rows.at(-1)!.push(cell);
      cell = '';
      if (c === '\n') rows.push([]);
    } else cell += c;
  }
  rows.at(-1)!.push(cell);
  return rows;
}

/** The inverse: a block of cells as text. */
export const writeCells = (rows: readonly (readonly string[])[]): string =>
  rows
    .map((row) =>
      row.map((cell) => (/[\t\n"]/.test(cell) ? `"${cell.replaceAll('"', '""')}"` : cell)).join('\t'),
    )
    .join('\n');
