/** The type of printed sheets: files for the converters, WOFF2 for SVG, and widths for breaking lines. */
import fs from 'node:fs';
import { createRequire } from 'node:module';
import * as fontkit from 'fontkit';
import type { Family, TextStyle } from './svg';

const require = createRequire(import.meta.url);
const inter = (name: string): string => require.resolve(`@expo-google-fonts/inter/${name}.ttf`);
const serif = (name: string): string => require.resolve(`@expo-google-fonts/source-serif-4/${name}.ttf`);

/** TrueType files by family, weight and slope: resvg shows no text at all with WOFF2. */
export const FONT_FILES: Readonly<Record<string, () => string>> = {
  'Inter 400': () => inter('400Regular/Inter_400Regular'),
  'Inter 500': () => inter('500Medium/Inter_500Medium'),
  'Inter 600': () => inter('600SemiBold/Inter_600SemiBold'),
  'Source Serif 4 400': () => serif('400Regular/SourceSerif4_400Regular'),
  'Source Serif 4 600': () => serif('600SemiBold/SourceSerif4_600SemiBold'),
  'Source Serif 4 400 italic': () => serif('400Regular_Italic/SourceSerif4_400Regular_Italic'),
};

export function fontKey(family: Family, weight: number, italic: boolean): string {
  const key = `${family} ${weight}${italic ? ' italic' : ''}`;
  return key in FONT_FILES ? key : `${family} 400`;
}

const opened = new Map<string, fontkit.Font>();

function fontOf(style: TextStyle): fontkit.Font {
  const key = fontKey(style.family, style.weight ?? 400, style.italic ?? false);
  let font = opened.get(key);
  if (!font) {
    font = fontkit.openSync(FONT_FILES[key]!()) as fontkit.Font;
    opened.set(key, font);
  }
  return font;
}

/** Width of a line of text in the units of its size. */
export function textWidth(text: string, style: TextStyle): number {
  const font = fontOf(style);
  return (font.layout(text).advanceWidth / font.unitsPerEm) * style.size;
}

/** Breaks text at spaces into lines no wider than `width`; a word wider than that stands alone. */
export function breakLines(text: string, style: TextStyle, width: number): string[] {
  const lines: string[] = [];
  let line = '';
  for (const word of text.split(/ +/)) {
    const longer = line === '' ? word : `${line} ${word}`;
    if (line !== '' && textWidth(longer, style) > width) {
      lines.push(line);
      line = word;
    } else line = longer;
  }
  return line === '' ? lines : [...lines, line];
}

const WEB_FONTS = [
  ['Inter', '400', 'normal', '@fontsource/inter/files/inter-latin-400-normal.woff2'],
  ['Inter', '500', 'normal', '@fontsource/inter/files/inter-latin-500-normal.woff2'],
  ['Inter', '600', 'normal', '@fontsource/inter/files/inter-latin-600-normal.woff2'],
  [
    'Source Serif 4',
    '200 900',
    'normal',
    '@fontsource-variable/source-serif-4/files/source-serif-4-latin-wght-normal.woff2',
  ],
  [
    'Source Serif 4',
    '200 900',
    'italic',
    '@fontsource-variable/source-serif-4/files/source-serif-4-latin-wght-italic.woff2',
  ],
] as const;

let webFonts: string | undefined;

/** @font-face rules with the fonts inside, so that an SVG looks the same anywhere and its text stays text. */
export function embeddedFontRules(): string {
  webFonts ??= WEB_FONTS.map(([family, weight, slope, file]) => {
    const data = fs.readFileSync(require.resolve(file)).toString('base64');
    return `@font-face{font-family:"${family}";font-weight:${weight};font-style:${slope};src:url(data:font/woff2;base64,${data}) format("woff2")}`;
  }).join('');
  return webFonts;
}
