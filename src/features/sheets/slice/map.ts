/** The map itself: sphere, graticule, blocks with their evidence, present coasts, names, a drift path. */
import { geoPath, type GeoProjection } from 'd3-geo';
import type { MultiLineString } from 'geojson';
import { shortName } from '../../motion/names';
import type { Layer } from '../choices';
import type { CarriedBlock, CarriedCoast } from './carried';
import type { Drawn } from './drawn';
import { ageLabels, pathSvg, type AgeLabel, type DrawnPath } from './drift';
import { graticuleLabels, graticuleSvg } from './graticule';
import { COAST, INK, OUTLINE, PAPER } from './palette';
import { pathWriter } from './path-writer';
import { element, escapeXml, textElement, type TextStyle } from './svg';
import { shortened, textWidth } from './text-width';
import { arrowSvg, type Arrow } from './velocity';
import { visible } from './visible';

export interface MapRequest {
  readonly drawn: Drawn;
  readonly projection: GeoProjection;
  readonly layers: readonly Layer[];
  readonly path: DrawnPath | null;
  readonly arrows: readonly Arrow[];
  /** Left and right edge of where names may stand. */
  readonly edges: readonly [number, number];
}

export function mapSvg({ drawn, projection, layers, path, arrows, edges }: MapRequest): string {
  const draw = geoPath(projection).digits(2);
  const outline = pathWriter(projection);
  const has = (layer: Layer): boolean => layers.includes(layer);
  const sphere = draw({ type: 'Sphere' }) ?? '';
  const parts = [
    element('path', { class: 'sphere', d: sphere, fill: PAPER }),
    has('graticule') ? graticuleSvg(projection) : '',
    ...drawn.blocks.map((block) => blockSvg(block, outline(block.area))),
    coastsSvg(drawn.coasts, (line) => draw(line) ?? ''),
    arrows.map((arrow) => arrowSvg(arrow, projection)).join(''),
    path ? pathSvg(path, projection, has('ellipse')) : '',
    element('path', { class: 'limb', d: sphere, fill: 'none', stroke: INK, 'stroke-width': 0.9 }),
    has('names') ? namesSvg(drawn.blocks, projection, edges, path ? ageLabels(path, projection) : []) : '',
    has('graticule') ? graticuleLabels(projection) : '',
  ];
  return parts.join('');
}

function blockSvg({ code, evidence, name }: CarriedBlock, d: string): string {
  if (d === '') return '';
  const stroke = { stroke: OUTLINE, 'stroke-width': 0.7, 'stroke-linejoin': 'round' };
  const dash = evidence === 'unconstrained' ? '5 2.6' : undefined;
  const title = element('title', {}, escapeXml(name));
  return element(
    'path',
    {
      class: 'block',
      'data-block': code,
      d,
      fill: `url(#ev-${evidence})`,
      ...stroke,
      'stroke-dasharray': dash,
    },
    title,
  );
}

function coastsSvg(coasts: readonly CarriedCoast[], draw: (line: MultiLineString) => string): string {
  const d = coasts.map(({ line }) => draw(line)).join('');
  if (d === '') return '';
  return element('path', {
    class: 'coast',
    d,
    fill: 'none',
    stroke: COAST,
    'stroke-width': 0.55,
    'stroke-dasharray': '1.8 1.5',
  });
}

interface Box {
  readonly x: number;
  readonly y: number;
  readonly half: number;
}

const NAME: TextStyle = { family: 'Inter', size: 7.5, weight: 500, anchor: 'middle', halo: PAPER };
/** Half the width of an age of three figures on a drift path. */
const AGE_HALF = 6;
/** Share of the map's width that a name takes at most. */
const MOST_NAME = 0.4;

/** Largest blocks first; a name that would lie over another is moved down or up a line or two, then left out. */
function namesSvg(
  blocks: readonly CarriedBlock[],
  projection: GeoProjection,
  [left, right]: readonly [number, number],
  ages: readonly AgeLabel[],
): string {
  const placed: Box[] = ages.map(({ x, y }) => ({ x: x - AGE_HALF, y: y - 2.5, half: AGE_HALF }));
  const sorted = [...blocks].sort((a, b) => b.area_km2 - a.area_km2);
  return sorted
    .map((block) => {
      const at: [number, number] = [block.label.lon, block.label.lat];
      const point = projection(at);
      if (!point || !visible(projection, at)) return '';
      const text = shortened(shortName({ ...block, kind: 'other' }), NAME, MOST_NAME * (right - left));
      const half = textWidth(text, NAME) / 2;
      const x = Math.min(right - half, Math.max(left + half, point[0]));
      for (const dy of [0, 11, -11, 20, -20]) {
        const box = { x, y: point[1] + dy, half: half + 1 };
        if (placed.some((p) => Math.abs(p.x - box.x) < p.half + box.half && Math.abs(p.y - box.y) < 10))
          continue;
        placed.push(box);
        return textElement(box.x, box.y + 2.5, text, NAME);
      }
      return '';
    })
    .join('');
}
