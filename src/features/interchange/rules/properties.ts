/** Reads the properties of GeoJSON features with the same care as the cells of a table. */
import { isPlain, plain } from '../../../plain';
import type { RejectedRow } from '../contract';
import type { Asking } from './ask';
import type { LocatedFeature } from './geojson-text';
import { readNumber } from './number';

export class PropertyReader {
  readonly rejected: RejectedRow[] = [];

  constructor(private readonly asking: Asking) {}

  reject(feature: LocatedFeature, column: string, problem: string, hint: string, read?: string): void {
    const value = feature.properties[column];
    const text =
      read ?? (value === undefined ? '' : typeof value === 'string' ? value : JSON.stringify(value));
    const place = { line: feature.line, entry: feature.index + 1 };
    this.rejected.push({ ...place, column, read: text.slice(0, 200), problem, hint });
  }

  text(feature: LocatedFeature, column: string): string | null {
    const value = feature.properties[column];
    if (value === null || value === undefined || value === '') return null;
    const text = typeof value === 'string' ? value.trim() : String(value);
    if (!isPlain(text))
      this.reject(
        feature,
        column,
        'holds control characters or half a character',
        'Type the text again, without what cannot be seen.',
        plain(text),
      );
    return text;
  }

  /** A number or its text; null where absent or blank; undefined where rejected. */
  number(feature: LocatedFeature, column: string): number | null | undefined {
    const value = feature.properties[column];
    if (value === null || value === undefined) return null;
    if (typeof value === 'number' && Number.isFinite(value)) return value;
    const reading = readNumber(String(value));
    if (!reading.ok) {
      this.reject(feature, column, reading.problem, reading.hint);
      return undefined;
    }
    if (reading.form === 'degrees-minutes' || reading.form === 'hemisphere') {
      this.reject(feature, column, 'written as an angle', 'Write a decimal number with a point.');
      return undefined;
    }
    if (reading.form === 'decimal comma') {
      const ask = 'Numbers are written with commas. Are they decimal commas?';
      const choices = ['decimal commas', 'reject these rows'] as const;
      const answer = this.asking.ask('decimal_comma', ask, choices, `line ${feature.line}: ${String(value)}`);
      if (answer === 'reject these rows') {
        this.reject(feature, column, 'written with a decimal comma', 'Write a number with a point.');
        return undefined;
      }
    }
    return reading.value;
  }

  /** An age in Ma: from 0 to the age of the Earth. */
  age(feature: LocatedFeature, column: string): number | null | undefined {
    const value = this.number(feature, column);
    if (value == null) return value;
    if (value < 0)
      this.reject(
        feature,
        column,
        'a negative age',
        'Ages are Ma before the present: 0 is today, older is larger.',
      );
    else if (value > 4600)
      this.reject(feature, column, 'older than the Earth', 'Give the age in Ma; are these ka?');
    else return value;
    return undefined;
  }

  word<T extends string, B extends T | null>(
    feature: LocatedFeature,
    column: string,
    words: readonly T[],
    blank: B,
  ): T | B | undefined {
    const read = this.text(feature, column);
    if (read === null) return blank;
    const found = words.find((word) => word === read.toLowerCase());
    if (found === undefined) {
      this.reject(feature, column, 'not one of the words known here', `Write one of: ${words.join(', ')}.`);
    }
    return found;
  }
}
