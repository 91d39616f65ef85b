/** Delimited text to rows that remember their line. RFC 4180 quoting; comma, semicolon, tab or bar between cells. */
import { parse } from 'csv-parse/sync';
import { isPlain, plain } from '../../../plain';

export interface TableRow {
  readonly line: number;
  readonly cells: Readonly<Record<string, string>>;
}

export interface Table {
  readonly delimiter: string;
  readonly headings: readonly string[];
  readonly rows: readonly TableRow[];
  /** Lines whose quoting cannot be read, or with more cells than headings. */
  readonly broken: readonly { line: number; read: string; problem: string; hint: string }[];
}

const DELIMITERS = [',', ';', '\t', '|'] as const;
const NAMES: Record<string, string> = { ',': 'commas', ';': 'semicolons', '\t': 'tabs', '|': 'bars' };
export const delimiterName = (delimiter: string): string => NAMES[delimiter] ?? delimiter;

/** The delimiter that splits the heading line into the most cells; a comma where none does. */
export function sniffDelimiter(text: string): string {
  const body = text.replace(/^[\uFEFF\s]*[\r\n]/, '');
  const heading = body.slice(0, body.search(/[\r\n]|$/));
  const counts = DELIMITERS.map((d) => heading.split(d).length);
  return DELIMITERS[counts.indexOf(Math.max(...counts))] ?? ',';
}

interface Parsed {
  record: string[];
  info: { lines: number };
  /** The record as written, its line end included. */
  raw: string;
}

/** Line ends inside a record, in its quoted cells. */
const linesWithin = (raw: string): number =>
  (raw.replace(/^[\r\n]+|[\r\n]+$/g, '').match(/\r\n|\r|\n/g) ?? []).length;

export interface TableRecord {
  readonly cells: readonly string[];
  /** Of its beginning, whatever lines its cells hold. */
  readonly line: number;
}

/** Every record of a table, the heading line's too. @throws where a quoted cell is not closed */
export function readRecords(text: string): TableRecord[] {
  const parsed = parse(text, {
    delimiter: sniffDelimiter(text),
    info: true,
    bom: true,
    relax_column_count: true,
    relax_quotes: true,
    skip_empty_lines: true,
    max_record_size: 1_000_000,
    raw: true,
  }) as unknown as Parsed[];
  return parsed.map(({ record, info, raw }) => ({ cells: record, line: info.lines - linesWithin(raw) }));
}

export function readTable(text: string): Table {
  const delimiter = sniffDelimiter(text);
  let records: TableRecord[];
  try {
    records = readRecords(text);
  } catch (error) {
    const line = (error as { lines?: number }).lines ?? 1;
    const problem = 'a quoted cell is not closed';
    const hint = 'Close the double quote, or write two of them for one inside a cell.';
    return { delimiter, headings: [], rows: [], broken: [{ line, read: '', problem, hint }] };
  }
  const [first, ...rest] = records;
  const headings = (first?.cells ?? []).map((h) => h.trim());
  const twice = headings.find((h, i) => h !== '' && headings.indexOf(h) !== i);
  if (twice !== undefined) {
    const problem = 'two columns have this heading';
    const hint = 'Give each column a heading of its own, or take one of them out.';
    return { delimiter, headings, rows: [], broken: [{ line: 1, read: twice, problem, hint }] };
  }
  const rows: TableRow[] = [];
  const broken: Table['broken'][number][] = [];
  for (const { cells: record, line } of rest) {
    if (record.every((cell) => cell.trim() === '')) continue;
    const unplain = record.find((cell) => !isPlain(cell));
    if (unplain !== undefined) {
      const problem = 'holds control characters or half a character';
      const hint = 'Type the text again, without what cannot be seen.';
      broken.push({ line, read: plain(unplain), problem, hint });
      continue;
    }
    const extra = record.slice(headings.length).filter((cell) => cell.trim() !== '');
    if (extra.length > 0) {
      const hint =
        delimiter === ','
          ? 'Put text with commas between double quotes, and write decimals with a point.'
          : 'Put text that holds the separator between double quotes.';
      broken.push({ line, read: record.join(delimiter), problem: 'more cells than headings', hint });
      continue;
    }
    rows.push({ line, cells: Object.fromEntries(headings.map((h, i) => [h, (record[i] ?? '').trim()])) });
  }
  return { delimiter, headings, rows, broken };
}
