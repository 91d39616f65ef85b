/**
 * Whole-file readings of a rotations table that no single cell can settle: ages in thousands of years, angles in
 * radians, latitude and longitude exchanged, ages written as negative. Each is asked, and applied only as answered;
 * while it is open the first choice is used for the preview.
 */
import type { Asking } from './ask';

export interface PoleValues {
  readonly line: number;
  age_ma: number;
  pole_lat: number;
  pole_lon: number;
  angle_deg: number;
}

const OLDEST_MA = 4600;
const DEGREES = 180 / Math.PI;
/** Slower than this in every row is slower than blocks move, if the angles are degrees. Common practice, no source. */
const SLOWEST_DEG_PER_MYR = 0.03;

const example = (row: PoleValues, value: number): string => `line ${row.line}: ${value}`;

function askEach(
  asking: Asking,
  id: string,
  ask: string,
  choices: readonly [string, string],
  rows: readonly string[],
): boolean {
  let answer: string | null = null;
  for (const row of rows.length > 0 ? rows : [undefined]) answer = asking.ask(id, ask, choices, row);
  return answer === null || answer === choices[0];
}

export function settleAges(rows: PoleValues[], unit: string | undefined, asking: Asking): void {
  const tooOld = rows.filter((row) => Math.abs(row.age_ma) > OLDEST_MA);
  // One odd age among good ones is a slip, not a unit: it is rejected by itself.
  const most = 2 * tooOld.length >= rows.filter((row) => row.age_ma !== 0).length;
  if (unit === 'ka' || (tooOld.length > 0 && most)) {
    const ask =
      unit === 'ka'
        ? 'The heading says ka. Divide the ages by 1,000 to have them in Ma?'
        : 'Some ages are older than the Earth in Ma. Are they in ka (thousands of years)?';
    const examples = (unit === 'ka' ? rows : tooOld).map((row) => example(row, row.age_ma));
    if (askEach(asking, 'age_unit', ask, ['ka', 'Ma'], examples)) for (const row of rows) row.age_ma /= 1000;
  }
  const negative = rows.filter((row) => row.age_ma < 0);
  if (negative.length > 0 && rows.every((row) => row.age_ma <= 0)) {
    const ask = 'All ages are negative. Ages count backwards from the present here: drop the minus sign?';
    const choices = ['drop the minus sign', 'reject these rows'] as const;
    if (
      askEach(
        asking,
        'age_sign',
        ask,
        choices,
        negative.map((row) => example(row, row.age_ma)),
      )
    ) {
      for (const row of rows) row.age_ma = Math.abs(row.age_ma);
    }
  }
}

export function settleAngles(rows: PoleValues[], units: ReadonlyMap<string, string>, asking: Asking): void {
  const turning = rows.filter((row) => row.angle_deg !== 0 && row.age_ma > 0);
  const says = (column: string): boolean => /^rad/.test(units.get(column) ?? '');
  const named = says('angle_deg') || says('pole_lat');
  const small =
    turning.length >= 3 &&
    turning.every((row) => Math.abs(row.angle_deg) <= Math.PI) &&
    turning.every((row) => Math.abs(row.angle_deg) / row.age_ma < SLOWEST_DEG_PER_MYR) &&
    turning.some((row) => !Number.isInteger(row.angle_deg));
  if (!named && !small) return;
  const polesToo =
    says('pole_lat') ||
    (rows.every((row) => Math.abs(row.pole_lat) <= Math.PI / 2 && Math.abs(row.pole_lon) <= 2 * Math.PI) &&
      rows.some((row) => !Number.isInteger(row.pole_lat) || !Number.isInteger(row.pole_lon)));
  const what = polesToo ? 'Poles and angles' : 'Rotation angles';
  const why = named
    ? 'are in radians by their heading'
    : 'look like radians: every block would move slower than 0.03° per Myr if they were degrees';
  const ask = `${what} ${why}. Which are they?`;
  const examples = turning.map((row) => example(row, row.angle_deg));
  if (!askEach(asking, 'angle_unit', ask, ['radians', 'degrees'], examples)) return;
  for (const row of rows) {
    row.angle_deg *= DEGREES;
    if (polesToo) {
      row.pole_lat *= DEGREES;
      row.pole_lon *= DEGREES;
    }
  }
}

/** Asks where latitudes go beyond 90° and every row would be valid with the two exchanged. */
export function settleSwap<T extends { line: number; lat: number; lon: number }>(
  rows: T[],
  asking: Asking,
  what: string,
): boolean {
  const beyond = rows.filter((row) => Math.abs(row.lat) > 90);
  const swapped =
    beyond.length > 0 && rows.every((row) => Math.abs(row.lon) <= 90 && Math.abs(row.lat) <= 360);
  if (!swapped || (beyond.length === 1 && rows.length > 1)) return false;
  const ask = `${what} go beyond 90° as latitudes, and all would be valid the other way round. Are latitude and longitude exchanged?`;
  const examples = beyond.map((row) => `line ${row.line}: latitude ${row.lat}`);
  return askEach(asking, 'swapped_lat_lon', ask, ['exchange them', 'keep them'], examples);
}
