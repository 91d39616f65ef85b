import { number } from '../../motion/format';
import { INK } from './palette';
import { element, textElement } from './svg';
import { SMALL } from './type';

/** A bar of a round number of kilometres, true along the horizontal at the map's centre. */
export function scaleBar(x: number, y: number, kmPerPt: number): string {
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
