/** One printed page: title, map, caption, legend, scale, frame, version, date, sources and the caution line. */
import { EARTH_RADIUS_KM } from '../../../kernel/sphere';
import { EVIDENCE } from '../../../kernel/rotations/types';
import { allowedCentre, fitProjection, kmPerUnit } from '../../../kernel/cartography/projections';
import { age } from '../../motion/format';
import { inText } from '../../motion/names';
import { PAPERS } from '../choices';
import type { SliceQuery } from '../contract';
import { captionLines } from './caption';
import type { Carried } from './carried';
import { CAUTION_LINE } from './caution';
import { drawnOf, type SlicePath } from './drawn';
import { factLines } from './facts';
import { embeddedFontRules } from './fonts';
import { subtitle } from './heading';
import { LEGEND_ROW, legendEntries, legendRows, legendSvg } from './legend';
import { mapSvg } from './map';
import { EVIDENCE_PATTERNS, INK, PAPER } from './palette';
import { scaleBar } from './scale-bar';
import type { SliceSubject } from './subject';
import { element, escapeXml, textElement } from './svg';
import { linesHeight, writeLines } from './text-lines';
import { SUBTITLE, TITLE } from './type';
import { blockArrows } from './velocity';

/** Points for a millimetre. */
const PT_PER_MM = 72 / 25.4;
const MARGIN = 34;
const GUTTER = 28;

export interface PageRequest {
  readonly subject: SliceSubject;
  readonly carried: Carried;
  readonly query: SliceQuery;
  readonly path: SlicePath | null;
}

type Box = Parameters<typeof fitProjection>[2];

export interface Page {
  readonly svg: string;
  readonly width_pt: number;
  readonly height_pt: number;
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
  const centre = allowedCentre(query.projection, { lat: query.centre_lat, lon: query.centre_lon });
  const fit = (box: Box) => fitProjection(query.projection, centre, box, query.reach_deg ?? null);
  const drawn = drawnOf(carried, path, query.layers, fit({ x: 0, y: 0, width, height }));
  const words = captionLines(subject, drawn, query, left);
  const facts = factLines(subject, drawn, inner - GUTTER - left);
  const entries = legendRows(legendEntries(drawn, query), inner - GUTTER - left);
  const legendHeight = entries.length * LEGEND_ROW;
  const foot = Math.max(linesHeight(words), legendHeight + 22 + linesHeight(facts)) + 14;
  const top = MARGIN + 44;
  const box = { x: MARGIN + 26, y: top, width: inner - 52, height: height - MARGIN - foot - top - 22 };
  const projection = fit(box);
  const drawnPath = drawn.path && {
    points: drawn.path.points,
    here: drawn.path.here,
    age_ma: query.age_ma,
    label_step_ma: 2 * query.path_step_ma,
  };
  const arrows = query.layers.includes('velocity')
    ? drawn.blocks.flatMap((block) => blockArrows(subject.model, block, query.age_ma, subject.frame.code))
    : [];
  const footTop = height - MARGIN - foot;
  const right = MARGIN + left + GUTTER;
  const title = query.title ?? `${subject.title}, ${age(query.age_ma)}`;
  const body = [
    element('rect', { width, height, fill: PAPER }),
    textElement(MARGIN, MARGIN + 14, title, TITLE),
    textElement(MARGIN, MARGIN + 30, subtitle(subject, query.age_ma), SUBTITLE),
    `<g class="map">${mapSvg({ drawn, projection, layers: query.layers, path: drawnPath, arrows })}</g>`,
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
