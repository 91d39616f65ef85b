/** Lines of set text, one under the other. */
import { textElement, type TextStyle } from './svg';
import { breakLines } from './text-width';

export interface Line {
  readonly text: string;
  readonly style: TextStyle;
}

export const setLines = (text: string, style: TextStyle, width: number): Line[] =>
  breakLines(text, style, width).map((line) => ({ text: line, style }));

const leading = ({ style }: Line): number => style.size * 1.36;
export const linesHeight = (lines: readonly Line[]): number =>
  lines.reduce((sum, line) => sum + leading(line), 0);

export function writeLines(lines: readonly Line[], x: number, y: number): string {
  let at = y;
  return lines
    .map((line) => {
      const svg = line.text === '' ? '' : textElement(x, at, line.text, line.style);
      at += leading(line);
      return svg;
    })
    .join('');
}
