/**
 * Fonts inside an SVG, so that it looks the same anywhere and its text stays text: of each face that a page uses, the
 * subsets that its letters need.
 */
import fs from 'node:fs';
import { createRequire } from 'node:module';
import type { Family } from './svg';

const require = createRequire(import.meta.url);

/** The last that holds a letter is used for it, as browsers take the last rule whose range does. */
const SUBSETS = [
  'cyrillic-ext',
  'cyrillic',
  'greek-ext',
  'greek',
  'vietnamese',
  'latin-ext',
  'latin',
] as const;
type Subset = (typeof SUBSETS)[number];

const PACKAGES: Readonly<Record<Family, string>> = {
  Inter: '@fontsource/inter',
  'Source Serif 4': '@fontsource-variable/source-serif-4',
};

interface Face {
  readonly family: Family;
  /** One file holds every weight of the serif. */
  readonly weight: string;
  readonly slope: 'normal' | 'italic';
}

/** @font-face rules for the text elements of a drawing. */
export function embeddedFontRules(drawing: string): string {
  return [...lettersByFace(drawing)]
    .map(([name, letters]) => faceRules(JSON.parse(name) as Face, letters))
    .join('');
}

function lettersByFace(drawing: string): Map<string, Set<string>> {
  const faces = new Map<string, Set<string>>();
  for (const [, attributes = '', text = ''] of drawing.matchAll(/<text ([^>]*)>([^<]*)</g)) {
    const name = JSON.stringify(faceOf(attributes));
    const letters = faces.get(name) ?? new Set();
    for (const letter of text) letters.add(letter);
    faces.set(name, letters);
  }
  return faces;
}

function faceOf(attributes: string): Face {
  const slope = attributes.includes('font-style="italic"') ? 'italic' : 'normal';
  if (attributes.includes('Serif')) return { family: 'Source Serif 4', weight: '200 900', slope };
  return { family: 'Inter', weight: /font-weight="(\d+)"/.exec(attributes)?.[1] ?? '400', slope };
}

function faceRules(face: Face, letters: ReadonlySet<string>): string {
  const ranges = rangesOf(face.family);
  const needed = new Set([...letters].map((letter) => subsetOf(letter.codePointAt(0)!, ranges)));
  return SUBSETS.filter((subset) => needed.has(subset))
    .map((subset) => faceRule(face, subset, ranges.get(subset)!.text))
    .join('');
}

interface Range {
  /** As style sheets write it. */
  readonly text: string;
  readonly spans: readonly (readonly [number, number])[];
}
type Ranges = ReadonlyMap<Subset, Range>;

const subsetOf = (code: number, ranges: Ranges): Subset | undefined =>
  SUBSETS.findLast((subset) =>
    ranges.get(subset)?.spans.some(([first, last]) => first <= code && code <= last),
  );

const known = new Map<Family, Ranges>();

function rangesOf(family: Family): Ranges {
  let ranges = known.get(family);
  if (!ranges) {
    const file = require.resolve(`${PACKAGES[family]}/unicode.json`);
    const read = JSON.parse(fs.readFileSync(file, 'utf8')) as Partial<Record<Subset, string>>;
    ranges = new Map(SUBSETS.flatMap((subset) => (read[subset] ? [[subset, parseRange(read[subset])]] : [])));
    known.set(family, ranges);
  }
  return ranges;
}

const parseRange = (text: string): Range => ({
  text,
  spans: text.split(',').map((part) => {
    const [first = '', last = first] = part.trim().replace('U+', '').split('-');
    return [parseInt(first, 16), parseInt(last, 16)];
  }),
});

const rules = new Map<string, string>();

function faceRule({ family, weight, slope }: Face, subset: Subset, range: string): string {
  const stem = family === 'Inter' ? `inter-${subset}-${weight}` : `source-serif-4-${subset}-wght`;
  const file = `${PACKAGES[family]}/files/${stem}-${slope}.woff2`;
  let rule = rules.get(file);
  if (rule === undefined) {
    const data = fs.readFileSync(require.resolve(file)).toString('base64');
    rule = `@font-face{font-family:"${family}";font-weight:${weight};font-style:${slope};unicode-range:${range};src:url(data:font/woff2;base64,${data}) format("woff2")}`;
    rules.set(file, rule);
  }
  return rule;
}
