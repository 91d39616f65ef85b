/** The fonts of printed sheets as files, for the converters and for measuring. */
import { createRequire } from 'node:module';
import type { Family } from './svg';

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
