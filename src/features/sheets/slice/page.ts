/** One printed page: title, map, caption, legend, scale, frame, version, date, sources and the caution line. */
import { EARTH_RADIUS_KM } from '../../../kernel/sphere';
import { EVIDENCE } from '../../../kernel/rotations/types';
import type { DriftPoint } from '../../../kernel/rotations';
import { CHRONOSTRATIGRAPHIC_CHART, unitAt } from '../../../kernel/timescale';
import {
  allowedCentre,
  fitProjection,
  kmPerUnit,
  PROJECTIONS,
} from '../../../kernel/cartography/projections';
import { age, coordinates, list, number } from '../../motion/format';
import { inText } from '../../motion/names';
import { PAPERS } from '../choices';
import type { SliceQuery } from '../contract';
import type { Carried } from './carried';
import { breakLines, embeddedFontRules, textWidth } from './fonts';
import { mapSvg } from './map';
import { EVIDENCE_PATTERNS, INK, INK_2, OCHRE, OUTLINE, PAPER, COAST } from './palette';
import type { SliceSubject } from './subject';
import { ARROW_PT_PER_100_MM_YR, blockArrows } from './velocity';
import { element, escapeXml, textElement, type TextStyle } from './svg';

/** Points for a millimetre. */
const PT_PER_MM = 72 / 25.4;
const MARGIN = 34;
const GUTTER = 28;

const TITLE: TextStyle = { family: 'Source Serif 4', size: 17, weight: 600 };
const SUBTITLE: TextStyle = { family: 'Inter', size: 8.5, fill: INK_2 };
const CAPTION: TextStyle = { family: 'Source Serif 4', size: 9 };
const CAUTION: TextStyle = { family: 'Source Serif 4', size: 9, italic: true };
const SMALL: TextStyle = { family: 'Inter', size: 7 };

/** Stands on every sheet and cannot be left out. */
export const CAUTION_LINE =
  'A reconstruction is a model, not an observation. Palaeomagnetism gives latitude and orientation, not longitude. Not for navigation, land claims, hazard or exploration decisions.';

export interface PageRequest {
  readonly subject: SliceSubject;
  readonly carried: Carried;
  readonly query: SliceQuery;
  readonly path: {
    readonly name: string;
    readonly points: readonly DriftPoint[];
    readonly here: DriftPoint | null;
  } | null;
}

export interface Page {
  readonly svg: string;
  readonly width_pt: number;
  readonly height_pt: number;
}

interface Line {
  readonly text: string;
  readonly style: TextStyle;
}

export function pageSize(query: Pick<SliceQuery, 'paper' | 'orientation'>): {
  width: number;
  height: number;
} {
  const [long, shortSide] = PAPERS[query.paper];
  const [w, h] = query.orientation === 'landscape' ? [long, shortSide] : [shortSide, long];
  return { width: w * PT_PER_MM, height: h * PT_PER_MM };
}

export function slicePage({ subject, carried, query, path }: PageRequest): Page {
  const { width, height } = pageSize(query);
  const inner = width - 2 * MARGIN;
  const left = (inner - GUTTER) * 0.56;
  const words = captionLines(subject, carried, query, path?.name ?? null, left);
  const facts = factLines(subject, carried, inner - GUTTER - left);
  const entries = legendRows(legendEntries(carried, query, path !== null), inner - GUTTER - left);
  const legendHeight = entries.length * LEGEND_ROW;
  const foot = Math.max(linesHeight(words), legendHeight + 22 + linesHeight(facts)) + 14;
  const top = MARGIN + 44;
  const box = { x: MARGIN + 26, y: top, width: inner - 52, height: height - MARGIN - foot - top - 22 };
  const centre = allowedCentre(query.projection, { lat: query.centre_lat, lon: query.centre_lon });
  const projection = fitProjection(query.projection, centre, box, query.reach_deg ?? null);
  const drawnPath = path && {
    points: path.points,
    here: path.here,
    age_ma: query.age_ma,
    label_step_ma: 2 * query.path_step_ma,
  };
  const arrows = query.layers.includes('velocity')
    ? carried.blocks.flatMap((block) => blockArrows(subject.model, block, query.age_ma, subject.frame.code))
    : [];
  const footTop = height - MARGIN - foot;
  const right = MARGIN + left + GUTTER;
  const title = query.title ?? `${subject.title}, ${age(query.age_ma)}`;
  const body = [
    element('rect', { width, height, fill: PAPER }),
    textElement(MARGIN, MARGIN + 14, title, TITLE),
    textElement(MARGIN, MARGIN + 30, subtitle(subject, query.age_ma), SUBTITLE),
    `<g class="map">${mapSvg({ carried, projection, layers: query.layers, path: drawnPath, arrows })}</g>`,
    element('path', { d: `M${MARGIN} ${footTop}H${width - MARGIN}`, stroke: INK, 'stroke-width': 0.8 }),
    writeLines(words, MARGIN, footTop + 14),
    legendSvg(entries, right, footTop + 14),
    scaleBar(right, footTop + legendHeight + 10, kmPerUnit(projection, centre, EARTH_RADIUS_KM)),
    writeLines(facts, right, footTop + legendHeight + 36),
  ];
  return {
    svg: wrap(width, height, title, subject, query, body.join('')),
    width_pt: width,
    height_pt: height,
  };
}

function wrap(
  width: number,
  height: number,
  title: string,
  subject: SliceSubject,
  query: SliceQuery,
  body: string,
): string {
  const style = `<style>${embeddedFontRules()}</style>`;
  const describe = `${subject.version}, ${inText({ ...subject.frame, kind: 'frame' })} frame, ${age(query.age_ma)}. ${CAUTION_LINE}`;
  const head = `xmlns="http://www.w3.org/2000/svg" width="${width.toFixed(2)}pt" height="${height.toFixed(2)}pt" viewBox="0 0 ${width.toFixed(2)} ${height.toFixed(2)}" role="img"`;
  const defs = `<defs>${style}${EVIDENCE.map((e) => EVIDENCE_PATTERNS[e]).join('')}</defs>`;
  return `<svg ${head}><title>${escapeXml(title)}</title><desc>${escapeXml(describe)}</desc>${defs}${body}</svg>\n`;
}

function subtitle(subject: SliceSubject, age_ma: number): string {
  const names = (['period', 'epoch', 'stage'] as const)
    .map((rank) => unitAt(age_ma, rank)?.name)
    .filter((n) => n !== undefined);
  return [
    `${age(age_ma)}${names.length > 0 ? ` (${[...new Set(names)].reverse().join(', ')})` : ''}`,
    `${inText({ ...subject.frame, kind: 'frame' })} frame`,
    subject.version,
  ].join('  ·  ');
}

/** Named here at most: a sheet is a map first. */
const MOST_MISSING = 12;

function missingNames({ missing }: Carried): string[] {
  const named = missing.slice(0, MOST_MISSING).map((m) => `${m.name} (${m.status})`);
  const more = missing.length - named.length;
  return more > 0 ? [...named, `${more} more`] : named;
}

function captionLines(
  subject: SliceSubject,
  carried: Carried,
  query: SliceQuery,
  pathName: string | null,
  width: number,
): Line[] {
  const kind = PROJECTIONS[query.projection];
  const centre = allowedCentre(query.projection, { lat: query.centre_lat, lon: query.centre_lon });
  const sentences = [
    query.caption.trim(),
    `Positions at ${age(query.age_ma)} in the ${inText({ ...subject.frame, kind: 'frame' })} frame.`,
    `${kind.label} projection${kind.property === 'equal-area' && !kind.label.includes('equal-area') ? ' (equal-area)' : ''}, centred on ${coordinates(centre.lat, centre.lon, 0)}.`,
    pathName && query.layers.includes('path')
      ? `Ochre: drift path of ${pathName}, bars at rows, dots each ${number(query.path_step_ma)} Myr${query.layers.includes('ellipse') ? ', with the 95 % ellipse at this age' : ''}.`
      : '',
    query.layers.includes('coasts') && carried.coasts.length > 0
      ? 'Dashed: present coast, for location only.'
      : '',
    carried.missing.length > 0 ? `Without a place at this age: ${list(missingNames(carried))}.` : '',
  ];
  const text = sentences.filter((s) => s !== '').join(' ');
  return [
    ...breakLines(text, CAPTION, width).map((line) => ({ text: line, style: CAPTION })),
    { text: '', style: { ...CAPTION, size: 3 } },
    ...breakLines(CAUTION_LINE, CAUTION, width).map((line) => ({ text: line, style: CAUTION })),
  ];
}

function factLines(subject: SliceSubject, carried: Carried, width: number): Line[] {
  const sources = carried.sources.length > 0 ? carried.sources.join('; ') : 'none named';
  const facts = [
    `Frame: ${inText({ ...subject.frame, kind: 'frame' })}. ${subject.version}. Drawn ${subject.date}.`,
    `Sources: ${sources}.`,
    `Ages: ${CHRONOSTRATIGRAPHIC_CHART.edition}.${subject.licence ? ` Licence ${subject.licence}.` : ' No licence stated.'}`,
  ];
  return facts.flatMap((fact) => breakLines(fact, SMALL, width).map((text) => ({ text, style: SMALL })));
}

const leading = ({ style }: Line): number => style.size * 1.36;
const linesHeight = (lines: readonly Line[]): number => lines.reduce((sum, line) => sum + leading(line), 0);

function writeLines(lines: readonly Line[], x: number, y: number): string {
  let at = y;
  return lines
    .map((line) => {
      const svg = line.text === '' ? '' : textElement(x, at, line.text, line.style);
      at += leading(line);
      return svg;
    })
    .join('');
}

interface LegendEntry {
  readonly text: string;
  readonly sample: (x: number, y: number) => string;
}

/** Only what is on the map: the kinds of evidence drawn, the drift path, the coasts. */
function legendEntries(carried: Carried, query: SliceQuery, path: boolean): LegendEntry[] {
  const drawn = EVIDENCE.filter((evidence) => carried.blocks.some((block) => block.evidence === evidence));
  const entries: LegendEntry[] = drawn.map((evidence) => {
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
  if (path && query.layers.includes('path')) {
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
  if (carried.coasts.length > 0 && query.layers.includes('coasts')) {
    const look = { fill: 'none', stroke: COAST, 'stroke-width': 0.6, 'stroke-dasharray': '1.8 1.5' };
    entries.push({
      text: 'present coast',
      sample: (x, y) => element('path', { d: `M${x} ${y - 1.5}h17`, ...look }),
    });
  }
  return entries;
}

const LEGEND_ROW = 14;
const entryWidth = (entry: LegendEntry): number => 22 + textWidth(entry.text, SMALL) + 12;

/** Entries in rows no wider than `width`. */
function legendRows(entries: readonly LegendEntry[], width: number): LegendEntry[][] {
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

function legendSvg(rows: readonly (readonly LegendEntry[])[], x: number, y: number): string {
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

/** A bar of a round number of kilometres, true along the horizontal at the map's centre. */
function scaleBar(x: number, y: number, kmPerPt: number): string {
  if (!Number.isFinite(kmPerPt) || kmPerPt <= 0) return '';
  const most = 80 * kmPerPt;
  const power = 10 ** Math.floor(Math.log10(most));
  const km = [5, 3, 2, 1].map((n) => n * power).find((n) => n <= most) ?? power;
  const length = km / kmPerPt;
  const d = `M${x} ${y}v3.5h${length.toFixed(2)}v-3.5`;
  return (
    element('path', { class: 'scale', d, fill: 'none', stroke: INK, 'stroke-width': 0.8 }) +
    textElement(x, y + 11.5, '0', SMALL) +
    textElement(x + length, y + 11.5, `${number(km)} km at the centre`, { ...SMALL, anchor: 'start' })
  );
}

export const sliceFileName = (slug: string, version: string, age_ma: number, extension: string): string =>
  `${slug}-${version === 'draft' ? 'draft' : `v${version}`}-${age_ma.toFixed(1)}-ma.${extension}`;
