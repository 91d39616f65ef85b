/** What stands under the map on the left: the user's caption, then what is drawn and how. */
import { allowedCentre, PROJECTIONS, type MapCentre } from '../../../kernel/cartography/projections';
import { age, coordinates, latitude, list, longitude, NBSP, shortAge } from '../../motion/format';
import { inText } from '../../motion/names';
import type { SliceQuery } from '../contract';
import type { Drawn } from './drawn';
import { shortList } from './short-list';
import type { SliceSubject } from './subject';

/** Where a map is centred; at a pole, with the meridian that runs straight down from the north pole or up from the south. */
export function centreWords({ lat, lon }: MapCentre): string {
  const digits = Number.isInteger(lat) && Number.isInteger(lon) ? 0 : 1;
  if (90 - Math.abs(lat) >= 0.5 * 10 ** -digits) return coordinates(lat, lon, digits);
  return `${latitude(lat, digits)}, meridian ${longitude(lon, digits)} ${lat > 0 ? 'down' : 'up'}`;
}

/** @param shown how many blocks without a place are named. */
export function captionText(subject: SliceSubject, drawn: Drawn, query: SliceQuery, shown: number): string {
  const kind = PROJECTIONS[query.projection];
  const centre = allowedCentre(query.projection, { lat: query.centre_lat, lon: query.centre_lon });
  const property =
    kind.property === 'equal-area' && !kind.label.includes('equal-area') ? ' (equal-area)' : '';
  return [
    query.caption.trim(),
    `Positions at ${age(query.age_ma)} in the ${inText({ ...subject.frame, kind: 'frame' })} frame.`,
    `${kind.label} projection${property}, centred on ${centreWords(centre)}.`,
    pathSentence(drawn, query),
    drawn.coasts.length > 0 ? 'Dashed: present coast, for location only.' : '',
    missingSentence(drawn, shown),
  ]
    .filter((sentence) => sentence !== '')
    .join(' ');
}

function pathSentence({ path }: Drawn, query: SliceQuery): string {
  if (!path) return '';
  const ellipse =
    query.layers.includes('ellipse') && path.here?.ellipse_95
      ? `, with the 95${NBSP}% ellipse at this age`
      : '';
  return `Ochre: drift path of ${path.name}, bars at rows, dots each ${shortAge(query.path_step_ma)}${NBSP}Myr${ellipse}.`;
}

function missingSentence({ missing }: Drawn, shown: number): string {
  if (missing.length === 0) return '';
  const names = missing.map(({ name, status }) => `${name} (${status})`);
  return `Without a place at this age: ${shown < names.length ? shortList(names, shown, ',') : list(names)}.`;
}
