/** What stands over the map: the title, and the age with its units, the frame and the version. */
import { unitAt } from '../../../kernel/timescale';
import { age } from '../../motion/format';
import { inText } from '../../motion/names';
import { textElement } from './svg';
import type { SliceSubject } from './subject';
import { breakLines } from './text-width';
import type { SheetType } from './type';

/** Smaller type is tried before a title takes more lines than this. */
const MOST_TITLE_LINES = 2;
const TITLE_SCALES = [1, 0.85, 0.7, 0.6];

export interface Heading {
  readonly height: number;
  readonly svg: (x: number, y: number) => string;
}

export function heading(
  title: string,
  subject: SliceSubject,
  age_ma: number,
  width: number,
  type: SheetType,
): Heading {
  const tries = TITLE_SCALES.map((scale) => {
    const style = { ...type.title, size: type.title.size * scale };
    return { style, lines: breakLines(title, style, width) };
  });
  const { style, lines } = tries.find((one) => one.lines.length <= MOST_TITLE_LINES) ?? tries.at(-1)!;
  const [titleStep, stepBelow, lineStep] = [1.2 * style.size, 16 * type.scale, 1.36 * type.subtitle.size];
  const below = breakLines(subtitle(subject, age_ma), type.subtitle, width);
  const first = 0.82 * style.size;
  const underTitle = first + (lines.length - 1) * titleStep + stepBelow;
  return {
    height: underTitle + (below.length - 1) * lineStep + 0.5 * type.subtitle.size,
    svg: (x, y) =>
      lines.map((line, i) => textElement(x, y + first + i * titleStep, line, style)).join('') +
      below.map((line, i) => textElement(x, y + underTitle + i * lineStep, line, type.subtitle)).join(''),
  };
}

/** A dot ends a line rather than begins one. */
const DOT = '\u00a0\u00a0·\u00a0 ';

function subtitle(subject: SliceSubject, age_ma: number): string {
  const names = (['period', 'epoch', 'stage'] as const)
    .map((rank) => unitAt(age_ma, rank)?.name)
    .filter((n) => n !== undefined);
  return [
    `${age(age_ma)}${names.length > 0 ? ` (${[...new Set(names)].reverse().join(', ')})` : ''}`,
    `${inText({ ...subject.frame, kind: 'frame' })} frame`,
    subject.version,
  ].join(DOT);
}
