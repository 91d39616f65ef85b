import { KernelError, requireAge, requireFinite } from '../errors';
import { toVector } from '../sphere/vector';
import type { Vector3 } from './types';

/** A span of ages and the step at which it is asked, from its younger end; ends included. */
export interface Span {
  readonly older_ma: number;
  readonly younger_ma: number;
  /** Above 0. */
  readonly step_ma: number;
}

/** An age of a span; `at_row` where it is that of a row, at which a motion may change its pole and rate. */
export interface SpanAge {
  readonly age_ma: number;
  readonly at_row: boolean;
}

/** A span may not have more steps than this. */
export const MOST_AGES = 100_000;
/** Ages nearer than this, Myr, are one. */
const SAME_AGE_MYR = 1e-9;

function outOfRange(quantity: string, value: number, problem: string): never {
  throw new KernelError('OutOfRange', { quantity, value, problem });
}

/**
 * @throws {KernelError} `NegativeAge`, `NonFinite`, `OutOfRange` (ages in the wrong order, a step of 0 or less,
 * too many).
 */
export function requireSpan({ older_ma, younger_ma, step_ma }: Span): void {
  requireAge('older_ma', older_ma);
  requireAge('younger_ma', younger_ma);
  requireFinite('step_ma', step_ma);
  if (older_ma < younger_ma) outOfRange('older_ma', older_ma, `younger than younger_ma ${younger_ma}`);
  if (!(step_ma > 0)) outOfRange('step_ma', step_ma, 'a step is above 0');
  if ((older_ma - younger_ma) / step_ma > MOST_AGES)
    outOfRange('step_ma', step_ma, `more than ${MOST_AGES} ages`);
}

/** Unit vector of a place in degrees. @throws {KernelError} `NonFinite`, `OutOfRange` for a latitude. */
export function requirePlace(lat: number, lon: number): Vector3 {
  requireFinite('lon', lon);
  if (!(Math.abs(requireFinite('lat', lat)) <= 90))
    outOfRange('lat', lat, 'a latitude lies between −90 and 90');
  return toVector(lat, lon);
}

/** Ages of a span, youngest first: every step from the younger end, the older end, and the rows’ among them. */
export function spanAges({ older_ma, younger_ma, step_ma }: Span, rows: readonly number[] = []): SpanAge[] {
  const count = Math.ceil((older_ma - younger_ma) / step_ma - SAME_AGE_MYR);
  const steps = Array.from(
    { length: Math.max(0, count) },
    (_, k) => Math.round((younger_ma + k * step_ma) * 1e9) / 1e9,
  );
  return mergeAges([...steps, older_ma], rows);
}

function mergeAges(asked: readonly number[], rows: readonly number[]): SpanAge[] {
  const all = [
    ...rows.map((age_ma) => ({ age_ma, at_row: true })),
    ...asked.map((age_ma) => ({ age_ma, at_row: false })),
  ];
  const merged: SpanAge[] = [];
  for (const next of all.sort((a, b) => a.age_ma - b.age_ma || Number(b.at_row) - Number(a.at_row))) {
    const last = merged.at(-1);
    if (!last || next.age_ma - last.age_ma > SAME_AGE_MYR) merged.push(next);
    else if (next.at_row && !last.at_row) merged[merged.length - 1] = next;
  }
  return merged;
}
