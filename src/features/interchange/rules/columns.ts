/** Matches a file's headings with the columns of a format: by name whatever the case, or by the user's mapping. */
import type { ColumnMapping } from '../contract';
import type { Table, TableRow } from './table';

export interface ColumnMatch {
  /** Column of the format → heading in the file. */
  readonly heading: ReadonlyMap<string, string>;
  readonly missing: readonly string[];
  /** Headings that no column claims. */
  readonly ignored: readonly string[];
  /** Units that headings carry in brackets or as an ending, by column: "age (ka)" → ka. */
  readonly units: ReadonlyMap<string, string>;
}

const UNIT = /[\s_([]+(ka|ma|rad|radians|deg|degrees|°)[\])]?$/i;
/** Units that no column of the formats is in. */
const FOREIGN = /^(ka|rad)/i;
const bare = (heading: string): string =>
  heading
    .toLowerCase()
    .replace(/[\s-]+/g, '_')
    .replace(/[()[\]°]/g, '');
const stem = (heading: string): string => bare(heading.replace(UNIT, ''));

export function matchColumns(
  table: Table,
  columns: readonly string[],
  required: readonly string[],
  mapping: ColumnMapping = {},
  /** Columns whose unit is asked about; in any other a unit that is not the format's own leaves the heading unread. */
  asked: ReadonlySet<string> = new Set(),
): ColumnMatch {
  const heading = new Map<string, string>();
  const units = new Map<string, string>();
  for (const name of table.headings) {
    const target =
      mapping[name] ??
      columns.find((c) => c === bare(name)) ??
      columns.find((c) => stem(c) === stem(name) && !heading.has(c));
    if (!target || !columns.includes(target) || heading.has(target)) continue;
    const unit = UNIT.exec(name)?.[1];
    if (unit && FOREIGN.test(unit) && !asked.has(target) && mapping[name] === undefined) continue;
    heading.set(target, name);
    if (unit) units.set(target, unit.toLowerCase());
  }
  const claimed = new Set(heading.values());
  return {
    heading,
    units,
    missing: required.filter((c) => !heading.has(c)),
    ignored: table.headings.filter((h) => h !== '' && !claimed.has(h)),
  };
}

/** The text of a column in a row; blank where the file has no such column. */
export function cell(row: TableRow, match: ColumnMatch, column: string): string {
  const heading = match.heading.get(column);
  return heading === undefined ? '' : (row.cells[heading] ?? '');
}
