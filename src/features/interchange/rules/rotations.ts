/** Reads rotations.csv: rows of finite rotations, with everything that is wrong or open said by line and column. */
import { cap95ToCovariance, checkCovariance, publishedFormToCovariance } from '../../../kernel/uncertainty';
import { EVIDENCE, type Covariance } from '../../../kernel/rotations/types';
import type { RotationFields } from '../../ledger/contract';
import type { Answers, ColumnMapping, RejectedRow } from '../contract';
import { Asking } from './ask';
import { matchColumns } from './columns';
import { CellReader } from './reader';
import { isSlug } from '../../../slug';
import { toSlug } from './slug';
import { delimiterName, readTable, type TableRow } from './table';
import { settleAges, settleAngles, settleSwap, type PoleValues } from './units-asked';

export const ROTATION_COLUMNS = [
  'block', 'relative_to', 'age_ma', 'pole_lat', 'pole_lon', 'angle_deg', 'chron', 'age_two_sigma_ma', 'evidence',
  'cov_xx', 'cov_xy', 'cov_xz', 'cov_yy', 'cov_yz', 'cov_zz', 'cov_dof', 'source', 'note',
] as const; // prettier-ignore
const REQUIRED = ROTATION_COLUMNS.slice(0, 6);
const UNITS_ASKED = new Set(['age_ma', 'angle_deg', 'pole_lat', 'pole_lon']);
const PUBLISHED_FORM = ['kappa', 'a', 'b', 'c', 'd', 'e', 'f', 'g'] as const;
const READ_COLUMNS = [...ROTATION_COLUMNS, ...PUBLISHED_FORM, 'cap95_deg'];

export interface Candidate<T> {
  readonly line: number | null;
  readonly fields: T;
}

export interface FileReading<T> {
  readonly candidates: readonly Candidate<T>[];
  readonly rejected: RejectedRow[];
  readonly asking: Asking;
  readonly notes: string[];
  /** The heading line of a table and the columns read from it; absent for GeoJSON. */
  readonly table?: {
    readonly headings: readonly string[];
    readonly columns: readonly string[];
    readonly required: readonly string[];
  };
}

type Draft = PoleValues & {
  readonly row: TableRow;
  readonly rest: Omit<RotationFields, 'age_ma' | 'pole_lat' | 'pole_lon' | 'angle_deg'>;
};

export function readRotations(
  text: string,
  answers: Answers = {},
  mapping: ColumnMapping = {},
): FileReading<RotationFields> {
  const table = readTable(text);
  const match = matchColumns(table, READ_COLUMNS, REQUIRED, mapping, UNITS_ASKED);
  const asking = new Asking(answers);
  const notes: string[] = [];
  const described = { headings: table.headings, columns: READ_COLUMNS, required: REQUIRED };
  const rejected: RejectedRow[] = table.broken.map((b) => ({ ...b, column: null }));
  if (table.delimiter !== ',') notes.push(`Cells are separated by ${delimiterName(table.delimiter)}.`);
  if (match.ignored.length > 0) notes.push(`Columns not read: ${match.ignored.join(', ')}.`);
  if (match.missing.length > 0) {
    rejected.unshift({
      line: 1,
      column: match.missing[0]!,
      read: table.headings.join(table.delimiter),
      problem: `the heading line has no ${match.missing.join(', ')}`,
      hint: 'Name the columns as in rotations.csv, or say which of yours holds what.',
    });
    return { candidates: [], rejected, asking, notes, table: described };
  }
  const reader = new CellReader(match, asking);
  const drafts = table.rows.map((row) => readDraft(row, reader)).filter((draft) => draft !== null);
  settleAges(drafts, match.units.get('age_ma'), asking);
  settleAngles(drafts, match.units, asking);
  const poles = drafts.map((d) => ({ line: d.line, lat: d.pole_lat, lon: d.pole_lon }));
  if (settleSwap(poles, asking, 'Poles'))
    for (const d of drafts) [d.pole_lat, d.pole_lon] = [d.pole_lon, d.pole_lat];
  if (drafts.some((d) => Math.abs(d.pole_lon) > 180))
    notes.push('Pole longitudes beyond 180° are kept as they are written.');
  const candidates = drafts.filter((draft) => inRange(draft, reader)).map(toCandidate);
  rejected.push(...reader.rejected);
  return { candidates: withoutDuplicates(candidates, rejected), rejected, asking, notes, table: described };
}

function readDraft(row: TableRow, reader: CellReader): Draft | null {
  const before = reader.rejected.length;
  const block = readCode(row, 'block', reader);
  const relative_to = readCode(row, 'relative_to', reader);
  if (block !== '' && block === relative_to) {
    reader.reject(
      row,
      'relative_to',
      'a block cannot be its own reference',
      'Name the block or frame it moves against.',
    );
  }
  const age_ma = reader.required(row, 'age_ma');
  const pole_lat = reader.required(row, 'pole_lat');
  const pole_lon = reader.required(row, 'pole_lon');
  const angle_deg = reader.required(row, 'angle_deg');
  const age_two_sigma_ma = reader.number(row, 'age_two_sigma_ma');
  if (age_two_sigma_ma != null && age_two_sigma_ma < 0) {
    reader.reject(row, 'age_two_sigma_ma', 'an error below zero', 'Give 2σ in Myr as a positive number.');
  }
  const evidence = reader.word(row, 'evidence', EVIDENCE, 'unconstrained');
  const { covariance, cov_dof } = readCovariance(row, reader);
  if (reader.rejected.length > before || age_ma === undefined || pole_lat === undefined) return null;
  if (pole_lon === undefined || angle_deg === undefined || evidence === undefined) return null;
  const rest = {
    block,
    relative_to,
    chron: reader.optionalText(row, 'chron'),
    age_two_sigma_ma: age_two_sigma_ma ?? null,
    evidence,
    covariance,
    cov_dof,
    source: reader.optionalText(row, 'source'),
    note: reader.optionalText(row, 'note'),
  };
  return { row, line: row.line, age_ma, pole_lat, pole_lon, angle_deg, rest };
}

function readCode(row: TableRow, column: string, reader: CellReader): string {
  const code = reader.text(row, column);
  if (isSlug(code)) return code;
  const nearest = toSlug(code);
  const hint = nearest ? `Write ${nearest}?` : 'Write the code of a block or frame.';
  reader.reject(
    row,
    column,
    code === '' ? 'blank' : 'not a code: lower-case letters, digits and hyphens',
    hint,
  );
  return '';
}

const XYZ = ['cov_xx', 'cov_xy', 'cov_xz', 'cov_yy', 'cov_yz', 'cov_zz'] as const;

function readCovariance(
  row: TableRow,
  reader: CellReader,
): { covariance: Covariance | null; cov_dof: number | null } {
  const cov_dof = reader.number(row, 'cov_dof') ?? null;
  if (cov_dof !== null && cov_dof <= 0)
    reader.reject(row, 'cov_dof', 'not above zero', 'Leave it blank where κ̂ was known.');
  const entries = XYZ.map((column) => reader.number(row, column) ?? null);
  const published = PUBLISHED_FORM.map((column) => reader.number(row, column) ?? null);
  const cap = reader.number(row, 'cap95_deg') ?? null;
  const given = [entries.some(known), published.some(known), cap !== null].filter(Boolean).length;
  if (given > 1)
    reader.reject(
      row,
      'cov_xx',
      'the covariance is given twice',
      'Keep one of its forms and blank the others.',
    );
  if (given !== 1) return { covariance: null, cov_dof };
  let covariance: Covariance | null = null;
  if (cap !== null) {
    if (cap < 0 || cap > 180)
      reader.reject(row, 'cap95_deg', 'outside 0–180°', 'Give the radius of the 95 % cap in degrees.');
    else covariance = cap95ToCovariance(cap);
  } else if (published.some(known)) {
    covariance = readPublished(row, reader, published);
  } else if (entries.every(known)) {
    covariance = entries as unknown as Covariance;
  } else {
    const missing = XYZ.filter((_, i) => entries[i] === null).join(', ');
    reader.reject(
      row,
      'cov_xx',
      `the covariance lacks ${missing}`,
      'Give all six entries in rad², or none.',
      '',
    );
  }
  const wrong = covariance && checkCovariance(covariance);
  if (wrong)
    reader.reject(
      row,
      'cov_xx',
      wrong.problem,
      'A covariance is symmetric with no negative variance in any direction.',
    );
  return { covariance: wrong ? null : covariance, cov_dof };
}

const known = (value: number | null): value is number => value !== null;

function readPublished(
  row: TableRow,
  reader: CellReader,
  values: readonly (number | null)[],
): Covariance | null {
  if (!values.every(known)) {
    reader.reject(row, 'kappa', 'the published form needs kappa and a–g', 'Give all eight numbers, or none.');
    return null;
  }
  const [kappa, a, b, c, d, e, f, g] = values as [
    number,
    number,
    number,
    number,
    number,
    number,
    number,
    number,
  ];
  if (kappa <= 0) {
    reader.reject(row, 'kappa', 'κ̂ is not above zero', 'Give κ̂ as published.');
    return null;
  }
  return publishedFormToCovariance({ kappa, a, b, c, d, e, f, g });
}

function inRange(draft: Draft, reader: CellReader): boolean {
  const before = reader.rejected.length;
  const { row } = draft;
  if (draft.age_ma < 0)
    reader.reject(
      row,
      'age_ma',
      'a negative age',
      'Ages are Ma before the present: 0 is today, older is larger.',
    );
  else if (draft.age_ma > 4600) reader.reject(row, 'age_ma', 'older than the Earth', 'Give the age in Ma.');
  if (Math.abs(draft.pole_lat) > 90) {
    reader.reject(
      row,
      'pole_lat',
      'latitude beyond 90°',
      'Moved decimal point, or latitude and longitude exchanged?',
    );
  }
  if (Math.abs(draft.pole_lon) > 360)
    reader.reject(row, 'pole_lon', 'longitude beyond 360°', 'Moved decimal point?');
  if (Math.abs(draft.angle_deg) > 720)
    reader.reject(row, 'angle_deg', 'more than two turns', 'Moved decimal point?');
  return reader.rejected.length === before;
}

const toCandidate = (draft: Draft): Candidate<RotationFields> => ({
  line: draft.line,
  fields: {
    ...draft.rest,
    age_ma: draft.age_ma,
    pole_lat: draft.pole_lat,
    pole_lon: draft.pole_lon,
    angle_deg: draft.angle_deg,
  },
});

export const rotationKey = (row: { block: string; relative_to: string; age_ma: number }): string =>
  `${row.block}\n${row.relative_to}\n${row.age_ma}`;

function withoutDuplicates(
  candidates: Candidate<RotationFields>[],
  rejected: RejectedRow[],
): Candidate<RotationFields>[] {
  const first = new Map<string, number | null>();
  return candidates.filter(({ line, fields }) => {
    const key = rotationKey(fields);
    if (!first.has(key)) {
      first.set(key, line);
      return true;
    }
    rejected.push({
      line,
      column: 'age_ma',
      read: String(fields.age_ma),
      problem: `the same block, reference and age as line ${first.get(key)}`,
      hint: 'Keep one of the two rows; at a hand-over the two rows differ in their reference.',
    });
    return false;
  });
}
