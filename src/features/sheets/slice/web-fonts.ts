/** Fonts inside an SVG, so that it looks the same anywhere and its text stays text. */
import fs from 'node:fs';
import { createRequire } from 'node:module';

const require = createRequire(import.meta.url);

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
