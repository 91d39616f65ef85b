/** How one column of a ledger is shown, read from what is typed, and filled. */
import { EVIDENCE } from '../../../kernel/rotations/types';
import { isSlug } from '../../../slug';

export type Typed =
  { readonly ok: true; readonly value: unknown } | { readonly ok: false; readonly problem: string };

export interface Column {
  /** Name of the field. */
  readonly key: string;
  readonly heading: string;
  /** Stands under the heading. */
  readonly unit?: string;
  readonly numeric?: boolean;
  /** Track of the CSS grid. */
  readonly width: string;
  /** Text of a value as it is typed, and as it is copied. */
  readonly write: (value: unknown) => string;
  /** What typed text means. */
  readonly read: (text: string) => Typed;
  /** Words to choose from. */
  readonly choices?: readonly string[];
}

const ok = (value: unknown): Typed => ({ ok: true, value });
const no = (problem: string): Typed => ({ ok: false, problem });

const plainText = (value: unknown): string => (value === null || value === undefined ? '' : String(value));

interface NumberRule {
  readonly least: number;
  readonly most: number;
  readonly blank?: boolean;
  /** What to say beyond the range. */
  readonly beyond: string;
}

/** Reads a number with a point or comma and any minus; the range is the contract's. */
export function readNumberCell(text: string, { least, most, blank = false, beyond }: NumberRule): Typed {
  const trimmed = text
    .trim()
    .replace(/[\u2212\u2013]/g, '-')
    .replace(/^([+-]?\d+),(\d+)$/, '$1.$2');
  if (trimmed === '') return blank ? ok(null) : no('blank');
  const value = Number(trimmed);
  if (!Number.isFinite(value)) return no('not a number');
  return value < least || value > most ? no(beyond) : ok(value);
}

export const numberColumn = (
  key: string,
  heading: string,
  unit: string,
  width: string,
  rule: NumberRule,
): Column => ({
  key,
  heading,
  unit,
  width,
  numeric: true,
  write: plainText,
  read: (text) => readNumberCell(text, rule),
});

export const textColumn = (key: string, heading: string, width: string, most = 2000): Column => ({
  key,
  heading,
  width,
  write: plainText,
  read: (text) =>
    text.length > most ? no(`more than ${most} characters`) : ok(text.trim() === '' ? null : text.trim()),
});

export const codeColumn = (
  key: string,
  heading: string,
  width: string,
  choices: readonly string[] = [],
): Column => ({
  key,
  heading,
  width,
  choices,
  write: plainText,
  read: (text) => (isSlug(text.trim()) ? ok(text.trim()) : no('a code: lower-case letters, digits, hyphens')),
});

export const wordColumn = (
  key: string,
  heading: string,
  width: string,
  words: readonly string[],
): Column => ({
  key,
  heading,
  width,
  choices: words,
  write: plainText,
  read: (text) => {
    const found = words.find((word) => word === text.trim().toLowerCase());
    return found === undefined ? no(`one of ${words.join(', ')}`) : ok(found);
  },
});

export const evidenceColumn = (width: string): Column => wordColumn('evidence', 'Evidence', width, EVIDENCE);
const ageRule = (blank: boolean): NumberRule => ({
  least: 0,
  most: 4600,
  blank,
  beyond: 'ages run from 0 to 4600 Ma',
});
export const ageColumn = (key: string, heading: string, width: string, blank: boolean): Column =>
  numberColumn(key, heading, 'Ma', width, ageRule(blank));
