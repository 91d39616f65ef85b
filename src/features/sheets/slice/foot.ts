/**
 * What stands under the map, in two columns: caption and caution on the left, legend, scale and facts on the right.
 * It keeps to the height it is given: first the columns shift, then lists are cut short, then the type gets smaller.
 */
import type { SliceQuery } from '../contract';
import { captionText } from './caption';
import { CAUTION_LINE } from './caution';
import type { Drawn } from './drawn';
import { factParagraphs } from './facts';
import { legend, type Legend } from './legend';
import { scaleBar } from './scale-bar';
import type { SliceSubject } from './subject';
import { linesHeight, setLines, writeLines, type Line } from './text-lines';
import { sheetType, type SheetType } from './type';

/** Named at most, however much room there is: a sheet is a map first. */
const MOST_MISSING = 12;
const MOST_SOURCES = 24;
const GUTTER = 28;
/** Of the left column. */
const SHARES = [0.56, 0.64, 0.48];
const SCALES = [1, 0.9, 0.8, 0.7, 0.6];
/** From the rule to the first line, and round the scale bar. */
const FOOT_LEAD = 14;
const SCALE_ROOM = 22;

export interface Foot {
  readonly height: number;
  readonly type: SheetType;
  readonly left: { readonly width: number; readonly lines: readonly Line[] };
  readonly right: {
    readonly offset: number;
    readonly width: number;
    readonly legend: Legend;
    readonly lines: readonly Line[];
  };
}

interface FootRequest {
  readonly subject: SliceSubject;
  readonly drawn: Drawn;
  readonly query: SliceQuery;
  readonly width: number;
  readonly most_height: number;
  /** Of the paper's type. */
  readonly scale: number;
}

export function layFoot(request: FootRequest): Foot {
  for (const scale of SCALES) {
    const tries = SHARES.map((share) => layColumns(request, sheetType(request.scale * scale), share));
    const fitting = tries.filter(({ foot }) => foot.height <= request.most_height);
    const most = Math.max(...fitting.map(({ named }) => named));
    const best = fitting.find(({ named }) => named === most);
    if (best) return best.foot;
  }
  return layColumns(request, sheetType(request.scale * SCALES.at(-1)!), SHARES[0]!).foot;
}

/** The columns at one type and one share, with as many names as there is room for. */
function layColumns(request: FootRequest, type: SheetType, share: number): { foot: Foot; named: number } {
  const { subject, drawn, query } = request;
  const room = request.most_height - FOOT_LEAD;
  const left = (request.width - GUTTER) * share;
  const right = request.width - GUTTER - left;
  const caption = (shown: number): Line[] => [
    ...setLines(captionText(subject, drawn, query, shown), type.caption, left),
    { text: '', style: { ...type.caption, size: 3 } },
    ...setLines(CAUTION_LINE, type.caution, left),
  ];
  const facts = (shown: number): Line[] =>
    factParagraphs(subject, drawn, shown).flatMap((text) => setLines(text, type.small, right));
  const signs = legend(drawn, query, type.small, right);
  const above = signs.height + SCALE_ROOM;
  const missing = mostThatFit(caption, Math.min(MOST_MISSING, drawn.missing.length), room);
  const sources = mostThatFit(facts, Math.min(MOST_SOURCES, drawn.sources.length), room - above);
  const height = Math.max(linesHeight(missing.lines), above + linesHeight(sources.lines)) + FOOT_LEAD;
  return {
    named: missing.shown + sources.shown,
    foot: {
      height,
      type,
      left: { width: left, lines: missing.lines },
      right: { offset: left + GUTTER, width: right, legend: signs, lines: sources.lines },
    },
  };
}

/** By halving: more names never take less room. */
function mostThatFit(
  set: (shown: number) => Line[],
  most: number,
  room: number,
): { shown: number; lines: Line[] } {
  const fits = (shown: number): boolean => linesHeight(set(shown)) <= room;
  if (fits(most)) return { shown: most, lines: set(most) };
  let [shown, over] = [0, most];
  while (over - shown > 1) {
    const middle = (shown + over) >> 1;
    if (fits(middle)) shown = middle;
    else over = middle;
  }
  return { shown, lines: set(shown) };
}

export function footSvg({ left, right, type }: Foot, margin: number, rule: number, kmPerPt: number): string {
  const [x, y] = [margin + right.offset, rule + FOOT_LEAD];
  const below = y + right.legend.height;
  return [
    writeLines(left.lines, margin, y),
    right.legend.svg(x, y),
    scaleBar(x, below - 4, right.width, kmPerPt, type.small),
    writeLines(right.lines, x, below + SCALE_ROOM),
  ].join('');
}
