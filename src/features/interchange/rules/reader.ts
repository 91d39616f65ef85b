/** Reads the cells of one file: numbers in whatever form, asking before any reading that is not literal. */
import type { RejectedRow } from '../contract';
import type { Asking } from './ask';
import { cell, type ColumnMatch } from './columns';
import { readNumber, type NumberForm } from './number';
import type { TableRow } from './table';

export interface Rejection extends RejectedRow {
  readonly line: number | null;
}

const FORM_QUESTIONS: Record<Exclude<NumberForm, 'plain'>, { id: string; ask: string; yes: string }> = {
  'decimal comma': {
    id: 'decimal_comma',
    ask: 'Numbers are written with commas. Are they decimal commas?',
    yes: 'decimal commas',
  },
  'degrees-minutes': {
    id: 'degrees_minutes',
    ask: 'Angles are written in degrees and minutes. Convert them to decimal degrees?',
    yes: 'convert',
  },
  hemisphere: {
    id: 'hemisphere_letters',
    ask: 'Angles carry a hemisphere letter. Read south and west as negative?',
    yes: 'south and west negative',
  },
};
const NO = 'reject these rows';

/** Columns whose numbers are angles, and those that a hemisphere's letter can stand in. */
const ANGLES = /^(?:pole_)?(?:lat|lon)$|^(?:angle_deg|declination|inclination|strike|dip)$/;
const LETTERS: Readonly<Record<string, RegExp>> = { lat: /[NS]$/i, lon: /[EW]$/i };

/** An age has no minutes, and a latitude no east: what is wrong and how to mend it, or null. */
function unsuited(column: string, form: NumberForm, read: string): readonly [string, string] | null {
  if (form === 'plain' || form === 'decimal comma') return null;
  const wanted = LETTERS[column.replace('pole_', '')];
  const lettered = /[NSEW]\s*$/i.test(read);
  if (wanted && lettered && !wanted.test(read.trim()))
    return ['the letter of the other coordinate', 'Are latitude and longitude exchanged in the headings?'];
  if (ANGLES.test(column) && (wanted || !lettered)) return null;
  return ['written as an angle', 'Write a decimal number with a point.'];
}

export class CellReader {
  readonly rejected: Rejection[] = [];

  constructor(
    private readonly match: ColumnMatch,
    private readonly asking: Asking,
  ) {}

  text(row: TableRow, column: string): string {
    return cell(row, this.match, column);
  }

  reject(row: TableRow, column: string, problem: string, hint: string, read = this.text(row, column)): void {
    this.rejected.push({
      line: row.line,
      column: this.match.heading.get(column) ?? column,
      read,
      problem,
      hint,
    });
  }

  /** @returns the number, null where blank, undefined where the row is rejected. */
  number(row: TableRow, column: string): number | null | undefined {
    const read = this.text(row, column);
    const reading = readNumber(read);
    if (!reading.ok) {
      this.reject(row, column, reading.problem, reading.hint);
      return undefined;
    }
    const odd = unsuited(column, reading.form, read);
    if (odd) {
      this.reject(row, column, ...odd);
      return undefined;
    }
    if (reading.form !== 'plain') {
      const { id, ask, yes } = FORM_QUESTIONS[reading.form];
      const answer = this.asking.ask(id, ask, [yes, NO], `line ${row.line}: ${read}`);
      if (answer === NO) {
        this.reject(row, column, `written as ${reading.form}`, 'Write a decimal number with a point.');
        return undefined;
      }
    }
    return reading.value;
  }

  /** Like `number`, but a blank is a rejection. */
  required(row: TableRow, column: string): number | undefined {
    const value = this.number(row, column);
    if (value !== null) return value;
    this.reject(row, column, 'blank', `Give ${column}, or leave the row out.`);
    return undefined;
  }

  /** One of a list of words, a default where blank, undefined where the row is rejected. */
  word<T extends string, B extends T | null>(
    row: TableRow,
    column: string,
    words: readonly T[],
    blank: B,
  ): T | B | undefined {
    const read = this.text(row, column);
    if (read === '') return blank;
    const found = words.find((word) => word === read.toLowerCase());
    if (found !== undefined) return found;
    this.reject(row, column, 'not one of the words known here', `Write one of: ${words.join(', ')}.`);
    return undefined;
  }

  optionalText(row: TableRow, column: string): string | null {
    const read = this.text(row, column);
    return read === '' ? null : read;
  }
}
