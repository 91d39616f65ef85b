/** Where things stand on a sheet: heading, map, and the foot under its rule. */
import type { SliceQuery } from '../contract';
import { age } from '../../motion/format';
import type { Drawn } from './drawn';
import { layFoot, type Foot } from './foot';
import { heading, type Heading } from './heading';
import { paperSize } from './paper-size';
import type { SliceSubject } from './subject';
import { PAPER_SCALE, sheetType } from './type';

/** Share of the sheet's height that the map keeps, however much is said of it. */
export const LEAST_MAP = 1 / 3;

const MARGIN = 34;
/** Round the map, for the graticule's labels. */
const [ABOVE, BESIDE, BELOW] = [10, 26, 22];

export interface Layout {
  readonly width: number;
  readonly height: number;
  readonly margin: number;
  readonly title: string;
  readonly head: Heading;
  readonly map: { readonly x: number; readonly y: number; readonly width: number; readonly height: number };
  /** Height of the rule over the foot. */
  readonly rule: number;
  readonly foot: Foot;
}

export function layOut(subject: SliceSubject, drawn: Drawn, query: SliceQuery): Layout {
  const { width, height } = paperSize(query);
  const scale = PAPER_SCALE[query.paper];
  const margin = MARGIN * scale;
  const inner = width - 2 * margin;
  const title = query.title ?? `${subject.title}, ${age(query.age_ma)}`;
  const head = heading(title, subject, query.age_ma, inner, sheetType(scale));
  const top = margin + head.height + ABOVE;
  const room = height - margin - top - BELOW;
  const most_height = room - LEAST_MAP * height;
  const foot = layFoot({ subject, drawn, query, width: inner, most_height, scale });
  return {
    width,
    height,
    margin,
    title,
    head,
    map: { x: margin + BESIDE, y: top, width: inner - 2 * BESIDE, height: room - foot.height },
    rule: height - margin - foot.height,
    foot,
  };
}
