/** What "Why is it here?" says, as text to paste: a sentence, a table, a rotation matrix, a quaternion. */
import { toMatrix } from '../../../kernel/rotations/quaternion';
import type { Quaternion } from '../../../kernel/rotations/types';
import { age as ageText, ageValue, coordinates, number } from '../format';
import type { NamedPoint } from '../scene/points';
import type { Answer } from './answer';

export const COPIES = ['sentence', 'table', 'matrix', 'quaternion'] as const;
export type Copy = (typeof COPIES)[number];

export interface Copied {
  readonly point: NamedPoint;
  readonly answer: Extract<Answer, { placed: true }>;
  readonly age: number;
  readonly heldStill: string;
  /** "Closing of the Lantern Sea, v7". */
  readonly from: string;
  readonly nameOf: (code: string) => string;
}

export function copyText(what: Copy, copied: Copied): string {
  switch (what) {
    case 'sentence':
      return sentence(copied);
    case 'table':
      return table(copied);
    case 'matrix':
      return numbersWith(copied, toMatrix(copied.answer.quaternion), 3);
    case 'quaternion':
      return numbersWith(copied, copied.answer.quaternion, 4);
  }
}

function sentence({ point, answer, age, heldStill, from, nameOf }: Copied): string {
  const { lat, lon, ellipse, rows } = answer;
  const region = ellipse
    ? `within ${ellipse.at_least ? 'at least ' : ''}${number(ellipse.semi_major_km)} × ${number(ellipse.semi_minor_km)} km (95 %)`
    : 'how surely is not known';
  const chain = rows.map((row) => `${nameOf(row.block)} in ${nameOf(row.relative_to)}`).join(', ');
  const sources = [...new Set(rows.flatMap((row) => row.sources))].join('; ');
  return [
    `At ${ageText(age)} ${point.subject} ${point.plural ? 'lie' : 'lies'} at ${coordinates(lat, lon)}, ${region}, with ${nameOf(heldStill)} held still.`,
    ...(chain ? [`Through ${chain}${sources ? ` (${sources})` : ''}.`] : []),
    `${from}.`,
  ].join(' ');
}

/** Tabs between cells, for a spreadsheet; full figures. */
function table({ answer, nameOf }: Copied): string {
  const headings = [
    'rotation', 'pole_lat', 'pole_lon', 'angle_deg', 'younger_ma', 'older_ma', 'fraction', 'evidence',
    'share', 'without_it_km', 'source',
  ]; // prettier-ignore
  const rows = answer.rows.map((row) => [
    `${nameOf(row.block)} in ${nameOf(row.relative_to)}`,
    row.lat, row.lon, row.angle, ageValue(row.younger), ageValue(row.older), row.fraction, row.evidence,
    row.share, row.withoutIt.km, row.sources.join('; '),
  ]); // prettier-ignore
  return [headings, ...rows].map((cells) => cells.map(cell).join('\t')).join('\n');
}

const cell = (value: string | number): string =>
  typeof value === 'number' ? String(Number(value.toPrecision(10))) : value.replace(/[\t\n]/g, ' ');

/** Rows of numbers under a line that says what they are. */
function numbersWith(
  { point, age, heldStill }: Copied,
  values: readonly number[] | Quaternion,
  width: number,
): string {
  const order = width === 3 ? 'columns x y z, rows x y z' : 'w x y z';
  const lines = Array.from({ length: values.length / width }, (_, i) =>
    values.slice(i * width, (i + 1) * width).join('\t'),
  );
  return [`# ${point.block} relative to ${heldStill} at ${age} Ma, ${order}`, ...lines].join('\n');
}
