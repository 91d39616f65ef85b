/** The legend: only what is on the map. */
import { EVIDENCE } from '../../../kernel/rotations/types';
import type { SliceQuery } from '../contract';
import type { Drawn } from './drawn';
import { textWidth } from './text-width';
import { COAST, INK, OCHRE, OUTLINE } from './palette';
import { element, textElement, type TextStyle } from './svg';
import { ARROW_PT_PER_100_MM_YR } from './velocity';

interface LegendEntry {
  readonly text: string;
  /** Of the sample, where it is wider than the others. */
  readonly width?: number;
  readonly sample: (x: number, y: number) => string;
}

/** Only what is on the map: the kinds of evidence drawn, the drift path, the coasts. */
function legendEntries(drawn: Drawn, query: SliceQuery): LegendEntry[] {
  const kinds = EVIDENCE.filter((evidence) => drawn.blocks.some((block) => block.evidence === evidence));
  const entries: LegendEntry[] = kinds.map((evidence) => {
    const dash = evidence === 'unconstrained' ? '3 1.8' : undefined;
    const look = {
      fill: `url(#ev-${evidence})`,
      stroke: OUTLINE,
      'stroke-width': 0.6,
      'stroke-dasharray': dash,
    };
    return {
      text: evidence,
      sample: (x, y) => element('rect', { x, y: y - 6, width: 17, height: 9, ...look }),
    };
  });
  if (drawn.path) {
    const sample = (x: number, y: number): string =>
      element('path', {
        d: `M${x} ${y - 1.5}h17M${x + 8.5} ${y - 4.5}v6`,
        stroke: OCHRE,
        'stroke-width': 1.2,
      });
    entries.push({ text: 'drift path', sample });
  }
  if (query.layers.includes('velocity') && drawn.blocks.length > 0) {
    const [tip, look] = [ARROW_PT_PER_100_MM_YR, { fill: 'none', stroke: INK, 'stroke-width': 0.8 }];
    const sample = (x: number, y: number): string =>
      element('path', { d: `M${x} ${y - 1.5}h${tip}m-3 -1.6l3 1.6l-3 1.6`, ...look });
    entries.push({ text: '100 mm/yr', width: tip, sample });
  }
  if (drawn.coasts.length > 0) {
    const look = { fill: 'none', stroke: COAST, 'stroke-width': 0.6, 'stroke-dasharray': '1.8 1.5' };
    entries.push({
      text: 'present coast',
      sample: (x, y) => element('path', { d: `M${x} ${y - 1.5}h17`, ...look }),
    });
  }
  return entries;
}

/** Samples do not shrink with the text. */
const ROW = 14;
const SAMPLE = 17;
const BETWEEN = 5;
const GAP = 12;

export interface Legend {
  readonly height: number;
  readonly svg: (x: number, y: number) => string;
}

/** Entries in rows no wider than `width`. */
export function legend(drawn: Drawn, query: SliceQuery, style: TextStyle, width: number): Legend {
  const rows: LegendEntry[][] = [];
  const textAt = ({ width: sample = SAMPLE }: LegendEntry): number => sample + BETWEEN;
  const wide = (entry: LegendEntry): number => textAt(entry) + textWidth(entry.text, style) + GAP;
  let used = Infinity;
  for (const entry of legendEntries(drawn, query)) {
    if (used + wide(entry) - GAP > width) {
      rows.push([]);
      used = 0;
    }
    rows.at(-1)!.push(entry);
    used += wide(entry);
  }
  const rowSvg = (row: readonly LegendEntry[], x: number, y: number): string => {
    let at = x;
    return row
      .map((entry) => {
        const svg = entry.sample(at, y) + textElement(at + textAt(entry), y + 1, entry.text, style);
        at += wide(entry);
        return svg;
      })
      .join('');
  };
  return {
    height: rows.length * ROW,
    svg: (x, y) => `<g class="legend">${rows.map((row, i) => rowSvg(row, x, y + i * ROW)).join('')}</g>`,
  };
}
