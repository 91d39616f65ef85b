/** The legend: only what is on the map. */
import { EVIDENCE } from '../../../kernel/rotations/types';
import type { SliceQuery } from '../contract';
import type { Drawn } from './drawn';
import { textWidth } from './fonts';
import { COAST, INK, OCHRE, OUTLINE } from './palette';
import { element, textElement } from './svg';
import { SMALL } from './type';
import { ARROW_PT_PER_100_MM_YR } from './velocity';

export interface LegendEntry {
  readonly text: string;
  readonly sample: (x: number, y: number) => string;
}

/** Only what is on the map: the kinds of evidence drawn, the drift path, the coasts. */
export function legendEntries(drawn: Drawn, query: SliceQuery): LegendEntry[] {
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
  if (query.layers.includes('velocity')) {
    const [tip, look] = [ARROW_PT_PER_100_MM_YR, { fill: 'none', stroke: INK, 'stroke-width': 0.8 }];
    const sample = (x: number, y: number): string =>
      element('path', { d: `M${x} ${y - 1.5}h${tip}m-3 -1.6l3 1.6l-3 1.6`, ...look });
    entries.push({ text: '  100 mm/yr', sample });
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

export const LEGEND_ROW = 14;
const entryWidth = (entry: LegendEntry): number => 22 + textWidth(entry.text, SMALL) + 12;

/** Entries in rows no wider than `width`. */
export function legendRows(entries: readonly LegendEntry[], width: number): LegendEntry[][] {
  const rows: LegendEntry[][] = [[]];
  let used = 0;
  for (const entry of entries) {
    if (used > 0 && used + entryWidth(entry) - 12 > width) {
      rows.push([]);
      used = 0;
    }
    rows.at(-1)!.push(entry);
    used += entryWidth(entry);
  }
  return rows;
}

export function legendSvg(rows: readonly (readonly LegendEntry[])[], x: number, y: number): string {
  const written = rows.map((row, i) => {
    let at = x;
    return row
      .map((entry) => {
        const svg =
          entry.sample(at, y + i * LEGEND_ROW) +
          textElement(at + 22, y + 1 + i * LEGEND_ROW, entry.text, SMALL);
        at += entryWidth(entry);
        return svg;
      })
      .join('');
  });
  return `<g class="legend">${written.join('')}</g>`;
}
