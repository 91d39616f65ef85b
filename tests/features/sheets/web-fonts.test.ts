import * as fontkit from 'fontkit';
import { describe, expect, it } from 'vitest';
import { textElement, type TextStyle } from '~/features/sheets/slice/svg';
import { embeddedFontRules } from '~/features/sheets/slice/web-fonts';

const TITLE: TextStyle = { family: 'Source Serif 4', size: 17, weight: 600 };
const NAME: TextStyle = { family: 'Inter', size: 7, weight: 500 };

/** The fonts of the rules, in their order. */
const fonts = (rules: string) =>
  [...rules.matchAll(/font-family:"([^"]+)".*?unicode-range:([^;]+);.*?base64,([^)]+)\)/g)].map(
    ([, family, range, data]) => ({ family, range, font: fontkit.create(Buffer.from(data!, 'base64')) as fontkit.Font }),
  ); // prettier-ignore

describe('fonts inside an SVG', () => {
  it('are the Latin subset of each face used, where no more is needed', () => {
    const used = fonts(embeddedFontRules(textElement(0, 0, 'Old Harrow', NAME)));
    expect(used).toHaveLength(1);
    expect(used[0]!.family).toBe('Inter');
  });

  it.each([
    ['Latin extended', 'Łódź, Ōsaka, Ağrı'],
    ['Cyrillic', 'Мозаика, Ґанок'],
    ['Greek', 'Λαύριο, Ψάθα'],
    ['Vietnamese', 'Phú Quốc, Đồng bằng ở đây'],
  ])('hold the letters of %s titles and names', (_, text) => {
    for (const style of [TITLE, NAME]) {
      const used = fonts(embeddedFontRules(textElement(0, 0, text, style)));
      for (const letter of text)
        expect(
          used.some(({ font }) => font.hasGlyphForCodePoint(letter.codePointAt(0)!)),
          `${letter} in ${style.family}`,
        ).toBe(true);
      expect(used.length).toBeLessThanOrEqual(3);
    }
  });
});
