/** Reads directions.csv: site means of palaeomagnetic directions. */
import type { DirectionFields } from '../../ledger/contract';
import type { Answers, ColumnMapping, RejectedRow } from '../contract';
import { Asking } from './ask';
import { matchColumns } from './columns';
import { CellReader } from './reader';
import type { Candidate, FileReading } from './rotations';
import { toSlug } from './slug';
import { delimiterName, readTable, type TableRow } from './table';
import { settleSwap } from './units-asked';

export const DIRECTION_COLUMNS = [
  'site', 'lat', 'lon', 'block', 'age_ma', 'age_min_ma', 'age_max_ma', 'declination', 'inclination', 'strike', 'dip',
  'n', 'k', 'alpha95', 'polarity', 'shallowing_f', 'rock', 'source', 'note',
] as const; // prettier-ignore
const REQUIRED = ['site', 'lat', 'lon'];
const POLARITIES = ['normal', 'reversed', 'mixed', 'unknown'] as const;

/** Least and greatest value of each number, both included. */
const RANGES = {
  age_ma: [0, 4600],
  age_min_ma: [0, 4600],
  age_max_ma: [0, 4600],
  declination: [-360, 360],
  inclination: [-90, 90],
  strike: [-360, 360],
  dip: [-180, 180],
  n: [1, 1e6],
  k: [0, 1e9],
  alpha95: [0, 180],
  shallowing_f: [Number.MIN_VALUE, 1],
} as const;
type Measure = keyof typeof RANGES;

export function readDirections(
  text: string,
  blocks: ReadonlySet<string>,
  answers: Answers = {},
  mapping: ColumnMapping = {},
): FileReading<DirectionFields> {
  const table = readTable(text);
  const match = matchColumns(table, DIRECTION_COLUMNS, REQUIRED, mapping);
  const asking = new Asking(answers);
  const notes: string[] = [];
  const described = { headings: table.headings, columns: DIRECTION_COLUMNS, required: REQUIRED };
  const rejected: RejectedRow[] = table.broken.map((b) => ({ ...b, column: null }));
  if (table.delimiter !== ',') notes.push(`Cells are separated by ${delimiterName(table.delimiter)}.`);
  if (match.ignored.length > 0) notes.push(`Columns not read: ${match.ignored.join(', ')}.`);
  if (match.missing.length > 0) {
    const read = table.headings.join(table.delimiter);
    const problem = `the heading line has no ${match.missing.join(', ')}`;
    rejected.unshift({
      line: 1,
      column: match.missing[0]!,
      read,
      problem,
      hint: 'Name the columns as in directions.csv, or say which of yours holds what.',
    });
    return { candidates: [], rejected, asking, notes, table: described };
  }
  const reader = new CellReader(match, asking);
  const sites = table.rows.map((row) => readSite(row, reader, blocks)).filter((site) => site !== null);
  const places = sites.map((s) => ({ line: s.row.line, lat: s.fields.lat, lon: s.fields.lon }));
  if (settleSwap(places, asking, 'Sites'))
    for (const { fields } of sites) [fields.lat, fields.lon] = [fields.lon, fields.lat];
  const candidates: Candidate<DirectionFields>[] = [];
  for (const { row, fields } of sites) {
    if (Math.abs(fields.lat) > 90)
      reader.reject(
        row,
        'lat',
        'latitude beyond 90°',
        'Moved decimal point, or latitude and longitude exchanged?',
      );
    else if (Math.abs(fields.lon) > 360)
      reader.reject(row, 'lon', 'longitude beyond 360°', 'Moved decimal point?');
    else candidates.push({ line: row.line, fields });
  }
  return { candidates, rejected: [...rejected, ...reader.rejected], asking, notes, table: described };
}

function readSite(
  row: TableRow,
  reader: CellReader,
  blocks: ReadonlySet<string>,
): { row: TableRow; fields: DirectionFields } | null {
  const before = reader.rejected.length;
  const site = reader.text(row, 'site');
  if (site === '') reader.reject(row, 'site', 'blank', 'Name the site.');
  const lat = reader.required(row, 'lat');
  const lon = reader.required(row, 'lon');
  const block = reader.optionalText(row, 'block');
  if (block !== null && !blocks.has(block)) {
    const hint = blocks.has(toSlug(block))
      ? `Write ${toSlug(block)}?`
      : 'Import the block first, or leave the cell blank.';
    reader.reject(row, 'block', 'not a block of the project', hint);
  }
  const measures = {} as Record<Measure, number | null>;
  for (const column of Object.keys(RANGES) as Measure[]) {
    const value = reader.number(row, column);
    const [least, most] = RANGES[column];
    if (value != null && (value < least || value > most)) {
      reader.reject(
        row,
        column,
        `outside ${least === Number.MIN_VALUE ? 'above 0' : least} to ${most}`,
        'Moved decimal point, or another unit?',
      );
    }
    measures[column] = value ?? null;
  }
  if (measures.n !== null && !Number.isInteger(measures.n))
    reader.reject(row, 'n', 'not a whole number', 'n counts samples or sites.');
  const { age_min_ma, age_max_ma } = measures;
  if (age_min_ma !== null && age_max_ma !== null && age_min_ma > age_max_ma) {
    reader.reject(
      row,
      'age_min_ma',
      'the youngest age is older than the oldest',
      'age_min_ma is the younger age.',
    );
  }
  const polarity = reader.word(row, 'polarity', POLARITIES, null);
  if (reader.rejected.length > before || lat === undefined || lon === undefined || polarity === undefined)
    return null;
  const texts = {
    rock: reader.optionalText(row, 'rock'),
    source: reader.optionalText(row, 'source'),
    note: reader.optionalText(row, 'note'),
  };
  return { row, fields: { site, lat, lon, block, ...measures, polarity, ...texts } };
}
