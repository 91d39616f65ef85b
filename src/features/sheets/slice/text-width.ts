/** Widths of set text, and lines broken by them. */
import * as fontkit from 'fontkit';
import { LRUCache } from 'lru-cache';
import { FONT_FILES, fontKey } from './fonts';
import type { TextStyle } from './svg';

const opened = new Map<string, fontkit.Font>();

function openFont(key: string): fontkit.Font {
  let font = opened.get(key);
  if (!font) {
    font = fontkit.openSync(FONT_FILES[key]!()) as fontkit.Font;
    opened.set(key, font);
  }
  return font;
}

/** Widths of words in ems: laying out a word takes far longer than remembering it. */
const widths = new LRUCache<string, number>({ max: 20_000 });

function wordWidth(key: string, word: string): number {
  const name = `${key}/${word}`;
  let width = widths.get(name);
  if (width === undefined) {
    const font = openFont(key);
    width = font.layout(word).advanceWidth / font.unitsPerEm;
    widths.set(name, width);
  }
  return width;
}

/** Width of a line of text in the units of its size, but for the kerning of spaces. */
export function textWidth(text: string, style: TextStyle): number {
  const key = fontKey(style.family, style.weight ?? 400, style.italic ?? false);
  const words = text.split(' ');
  const ems = words.reduce((sum, word) => sum + (word === '' ? 0 : wordWidth(key, word)), 0);
  return (ems + (words.length - 1) * wordWidth(key, ' ')) * style.size;
}

/** Breaks text into lines no wider than `width`: at spaces, and within a word where it is wider than a line. */
export function breakLines(text: string, style: TextStyle, width: number): string[] {
  const lines: string[] = [];
  let line = '';
  for (const word of text.split(/[ \n\t]+/).flatMap((whole) => pieces(whole, style, width))) {
    const longer = line === '' ? word : `${line} ${word}`;
    if (line !== '' && textWidth(longer, style) > width) {
      lines.push(line);
      line = word;
    } else line = longer;
  }
  return line === '' ? lines : [...lines, line];
}

function pieces(word: string, style: TextStyle, width: number): string[] {
  if (textWidth(word, style) <= width) return [word];
  const parts: string[] = [];
  let part = '';
  for (const letter of word) {
    if (part !== '' && textWidth(part + letter, style) > width) {
      parts.push(part);
      part = '';
    }
    part += letter;
  }
  return [...parts, part];
}

/** The text, or as much of its beginning as fits, with an ellipsis. */
export function shortened(text: string, style: TextStyle, width: number): string {
  if (textWidth(text, style) <= width) return text;
  const letters = [...text];
  while (letters.length > 1 && textWidth(`${letters.join('').trimEnd()}…`, style) > width) letters.pop();
  return `${letters.join('').trimEnd()}…`;
}
