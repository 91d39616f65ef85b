/** What stands under the map on the left: the user's caption, what is drawn and how, the caution line. */
import { allowedCentre, PROJECTIONS, type MapCentre } from '../../../kernel/cartography/projections';
import { age, coordinates, latitude, list, longitude, number } from '../../motion/format';
import { inText } from '../../motion/names';
import type { SliceQuery } from '../contract';
import type { Drawn } from './drawn';
import { CAUTION_LINE } from './caution';
import { breakLines } from './fonts';
import type { SliceSubject } from './subject';
import type { Line } from './text-lines';
import { CAPTION, CAUTION } from './type';

/** Named here at most: a sheet is a map first. */
const MOST_MISSING = 12;

function missingNames({ missing }: Drawn): string[] {
  const named = missing.slice(0, MOST_MISSING).map((m) => `${m.name} (${m.status})`);
  const more = missing.length - named.length;
  return more > 0 ? [...named, `${more} more`] : named;
}

/** Where a map is centred; at a pole, with the meridian that runs straight down from the north pole or up from the south. */
export function centreWords({ lat, lon }: MapCentre): string {
  const digits = Number.isInteger(lat) && Number.isInteger(lon) ? 0 : 1;
  if (90 - Math.abs(lat) >= 0.5 * 10 ** -digits) return coordinates(lat, lon, digits);
  return `${latitude(lat, digits)}, meridian ${longitude(lon, digits)} ${lat > 0 ? 'down' : 'up'}`;
}

export function captionLines(subject: SliceSubject, drawn: Drawn, query: SliceQuery, width: number): Line[] {
  const kind = PROJECTIONS[query.projection];
  const centre = allowedCentre(query.projection, { lat: query.centre_lat, lon: query.centre_lon });
  const sentences = [
    query.caption.trim(),
    `Positions at ${age(query.age_ma)} in the ${inText({ ...subject.frame, kind: 'frame' })} frame.`,
    `${kind.label} projection${kind.property === 'equal-area' && !kind.label.includes('equal-area') ? ' (equal-area)' : ''}, centred on ${centreWords(centre)}.`,
    drawn.path
      ? `Ochre: drift path of ${drawn.path.name}, bars at rows, dots each ${number(query.path_step_ma)} Myr${query.layers.includes('ellipse') ? ', with the 95 % ellipse at this age' : ''}.`
      : '',
    drawn.coasts.length > 0 ? 'Dashed: present coast, for location only.' : '',
    drawn.missing.length > 0 ? `Without a place at this age: ${list(missingNames(drawn))}.` : '',
  ];
  const text = sentences.filter((s) => s !== '').join(' ');
  return [
    ...breakLines(text, CAPTION, width).map((line) => ({ text: line, style: CAPTION })),
    { text: '', style: { ...CAPTION, size: 3 } },
    ...breakLines(CAUTION_LINE, CAUTION, width).map((line) => ({ text: line, style: CAUTION })),
  ];
}
