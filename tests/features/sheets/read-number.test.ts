import { describe, expect, it } from 'vitest';
import { readNumber } from '~/features/sheets/read-number';

const AGE = { what: 'an age', unit: 'Ma', least: 0, most: 178 };
const LATITUDE = { what: 'a latitude', unit: '°', least: -90, most: 90 };

describe('a number of the print form', () => {
  it.each([
    ['62,4', 62.4],
    ['62.4 Ma', 62.4],
    ['7,', 7],
    [' 178 ', 178],
  ])('"%s" is an age', (text, value) => expect(readNumber(text, AGE)).toEqual({ value }));

  it('takes any minus sign', () => {
    expect(readNumber('\u221229,6°', LATITUDE)).toEqual({ value: -29.6 });
    expect(readNumber('-29.6', LATITUDE)).toEqual({ value: -29.6 });
  });

  it('says what was read and the span, and never takes a nearer number', () => {
    expect(readNumber('900', AGE)).toEqual({
      problem: 'Read 900, outside the span: type an age from 0 to 178 Ma.',
    });
    expect(readNumber('1,234.5', AGE)).toEqual({
      problem: 'Read “1,234.5”, which is no number: type an age from 0 to 178 Ma.',
    });
    expect(readNumber('95', LATITUDE)).toEqual({
      problem: 'Read 95, outside the span: type a latitude from −90 to 90°.',
    });
    expect(readNumber('', AGE)).toEqual({ problem: 'Blank: type an age from 0 to 178 Ma.' });
  });
});
