/** The map itself: sphere, graticule, blocks with their evidence, present coasts, names, a drift path. */
import { geoPath, type GeoProjection } from 'd3-geo';
import type { MultiLineString } from 'geojson';
import { shortName } from '../../motion/names';
import type { Layer } from '../choices';
import type { CarriedBlock, CarriedCoast } from './carried';
import type { Drawn } from './drawn';
import { pathSvg, type DrawnPath } from './drift';
import { graticuleLabels, graticuleSvg } from './graticule';
import { COAST, INK, OUTLINE, PAPER } from './palette';
import { pathWriter } from './path-writer';
import { element, escapeXml, textElement } from './svg';
import { arrowSvg, type Arrow } from './velocity';
import { visible } from './visible';

export interface MapRequest {
  readonly drawn: Drawn;
  readonly projection: GeoProjection;
  readonly layers: readonly Layer[];
  readonly path: DrawnPath | null;
  readonly arrows: readonly Arrow[];
}

export function mapSvg({ drawn, projection, layers, path, arrows }: MapRequest): string {
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
    has('names') ? namesSvg(drawn.blocks, projection) : '',
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

/** Largest blocks first; a name that would lie over another is moved down or up a line, then left out. */
function namesSvg(blocks: readonly CarriedBlock[], projection: GeoProjection): string {
  const placed: Box[] = [];
  const sorted = [...blocks].sort((a, b) => b.area_km2 - a.area_km2);
  return sorted
    .map((block) => {
      const at: [number, number] = [block.label.lon, block.label.lat];
      const point = projection(at);
      if (!point || !visible(projection, at)) return '';
      const text = shortName({ ...block, kind: 'other' });
      const half = text.length * 2.1;
      for (const dy of [0, 11, -11]) {
        const box = { x: point[0], y: point[1] + dy, half };
        if (placed.some((p) => Math.abs(p.x - box.x) < p.half + half && Math.abs(p.y - box.y) < 10)) continue;
        placed.push(box);
        return textElement(box.x, box.y + 2.5, text, {
          family: 'Inter',
          size: 7.5,
          weight: 500,
          anchor: 'middle',
          halo: PAPER,
        });
      }
      return '';
    })
    .join('');
}
