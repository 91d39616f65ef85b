import { describe, expect, it } from 'vitest';
import { sliceQuery } from '~/features/sheets/contract';

const problem = (query: Record<string, string>): string =>
  sliceQuery
    .safeParse({ age_ma: '10', ...query })
    .error?.issues.map(({ message }) => message)
    .join('; ') ?? '';

describe('a query that cannot be drawn', () => {
  it('says how long a title or caption is, and how long it may be', () => {
    const rule = 'has 612 characters, and a sheet takes 600 at most: shorten it by 12';
    expect(problem({ caption: 'a'.repeat(612) })).toBe(rule);
    expect(problem({ title: 'a'.repeat(161) })).toContain('takes 160 at most');
    expect(problem({ caption: '𝛼'.repeat(600) })).toBe('');
  });

  it('names what is known, and what a number should be', () => {
    expect(problem({ paper: 'b5' })).toBe('"b5" is not known here: a3, a4, a5');
    expect(problem({ age_ma: '62,4' })).toContain('a number from 0 to 4600');
    expect(problem({ age_ma: ' ' })).toBe('missing');
  });
});
