/** One printed page: title, map, caption, legend, scale, frame, version, date, sources and the caution line. */
import { allowedCentre, fitProjection, kmPerUnit } from '../../../kernel/cartography/projections';
import { EARTH_RADIUS_KM } from '../../../kernel/sphere';
import type { SliceQuery } from '../contract';
import type { Carried } from './carried';
import { drawnOf, type Drawn, type SlicePath } from './drawn';
import { footSvg } from './foot';
import { layOut } from './layout';
import { mapSvg } from './map';
import { INK, PAPER } from './palette';
import { paperSize } from './paper-size';
import type { SliceSubject } from './subject';
import { element } from './svg';
import { svgDocument } from './svg-document';
import { blockArrows, type Arrow } from './velocity';

export interface PageRequest {
  readonly subject: SliceSubject;
  readonly carried: Carried;
  readonly query: SliceQuery;
  readonly path: SlicePath | null;
}

export interface Page {
  readonly svg: string;
  readonly width_pt: number;
  readonly height_pt: number;
}

type Box = Parameters<typeof fitProjection>[2];

export function slicePage({ subject, carried, query, path }: PageRequest): Page {
  const centre = allowedCentre(query.projection, { lat: query.centre_lat, lon: query.centre_lon });
  const fit = (box: Box) => fitProjection(query.projection, centre, box, query.reach_deg ?? null);
  const whole = fit({ x: 0, y: 0, ...paperSize(query) });
  const drawn = drawnOf(carried, path, query.layers, whole);
  const { width, height, margin, title, head, map, rule, foot } = layOut(subject, drawn, query);
  const projection = fit(map);
  const drawnPath = drawn.path && {
    points: drawn.path.points,
    here: drawn.path.here,
    age_ma: query.age_ma,
    label_step_ma: 2 * query.path_step_ma,
  };
  const drawing = mapSvg({
    drawn,
    projection,
    layers: query.layers,
    path: drawnPath,
    arrows: arrowsOf(subject, drawn, query),
    edges: [margin, width - margin],
  });
  const body = [
    element('rect', { width, height, fill: PAPER }),
    head.svg(margin, margin),
    `<g class="map">${drawing}</g>`,
    element('path', {
      class: 'rule',
      d: `M${margin} ${rule}H${width - margin}`,
      stroke: INK,
      'stroke-width': 0.8,
    }),
    footSvg(foot, margin, rule, kmPerUnit(projection, centre, EARTH_RADIUS_KM)),
  ];
  return {
    svg: svgDocument({ width, height, title, subject, age_ma: query.age_ma }, body.join('')),
    width_pt: width,
    height_pt: height,
  };
}

function arrowsOf({ model, frame }: SliceSubject, { blocks }: Drawn, query: SliceQuery): Arrow[] {
  if (!query.layers.includes('velocity')) return [];
  return blocks.flatMap((block) => blockArrows(model, block, query.age_ma, frame.code));
}
