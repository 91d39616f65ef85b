import { number } from '../../motion/format';
import { INK } from './palette';
import { element, textElement, type TextStyle } from './svg';
import { textWidth } from './text-width';

const MOST_PT = 80;
const STEPS = [5, 3, 2, 1, 0.5, 0.3, 0.2, 0.1];

/** A bar of a round number of kilometres, true along the horizontal at the map's centre, its text within `width`. */
export function scaleBar(x: number, y: number, width: number, kmPerPt: number, style: TextStyle): string {
  if (!Number.isFinite(kmPerPt) || kmPerPt <= 0) return '';
  const power = 10 ** Math.floor(Math.log10(MOST_PT * kmPerPt));
  const words = (km: number): string => `${number(km, km < 1 ? 1 : 0)} km at the centre`;
  const fits = (km: number): boolean =>
    km / kmPerPt <= MOST_PT && km / kmPerPt + textWidth(words(km), style) <= width;
  const km = STEPS.map((n) => n * power).find(fits) ?? power / 10;
  const length = km / kmPerPt;
  const d = `M${x} ${y}v3.5h${length.toFixed(2)}v-3.5`;
  return (
    element('path', { class: 'scale', d, fill: 'none', stroke: INK, 'stroke-width': 0.8 }) +
    textElement(x, y + 11.5, '0', style) +
    textElement(x + length, y + 11.5, words(km), style)
  );
}
