import { checkCovariance } from '~/kernel/uncertainty/forms';
import type { Covariance } from '~/kernel/rotations/types';
import type { FieldError } from '~/server/problem';
import type { Table } from './contract';

type Cells = Readonly<Record<string, unknown>>;

/** Younger and older end of the interval that each table's rows hold for, and whether it may have no length. */
const INTERVALS: Readonly<
  Partial<Record<Table, readonly [younger: string, older: string, mayBeEmpty: boolean]>>
> = {
  blocks: ['disappears_ma', 'appears_ma', false],
  outlines: ['outline_younger_ma', 'outline_older_ma', false],
  features: ['disappears_ma', 'appears_ma', false],
  directions: ['age_min_ma', 'age_max_ma', true],
};

/** What a row's cells, each right by itself, say wrong together. */
export function rowErrors(table: Table, row: Cells): FieldError[] {
  const errors: FieldError[] = [];
  const interval = INTERVALS[table];
  if (interval) {
    const [younger, older] = [row[interval[0]], row[interval[1]]] as (number | null)[];
    if (
      typeof younger === 'number' &&
      typeof older === 'number' &&
      (interval[2] ? younger > older : younger >= older)
    ) {
      errors.push({
        path: interval[0],
        read: String(younger),
        problem: `not younger than ${interval[1]} ${older}`,
        hint: 'Give the older age there, or leave one of them blank.',
      });
    }
  }
  if (table === 'rotations') errors.push(...rotationErrors(row));
  return errors;
}

function rotationErrors(row: Cells): FieldError[] {
  const errors: FieldError[] = [];
  if (row['block'] === row['relative_to']) {
    errors.push({
      path: 'relative_to',
      read: String(row['relative_to']),
      problem: 'a block cannot be its own reference',
      hint: 'Name another block or a frame.',
    });
  }
  const covariance = row['covariance'] as Covariance | null;
  const wrong = covariance && checkCovariance(covariance);
  if (wrong) {
    errors.push({
      path: 'covariance',
      read: covariance.join(', '),
      problem: `the matrix is ${wrong.problem}`,
      hint: 'Entries are xx, xy, xz, yy, yz, zz in rad².',
    });
  }
  return errors;
}
