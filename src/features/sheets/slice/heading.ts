/** What stands over the map: the title, and the age with its units, the frame and the version. */
import { unitAt } from '../../../kernel/timescale';
import { age } from '../../motion/format';
import { inText } from '../../motion/names';
import type { SliceSubject } from './subject';

export function subtitle(subject: SliceSubject, age_ma: number): string {
  const names = (['period', 'epoch', 'stage'] as const)
    .map((rank) => unitAt(age_ma, rank)?.name)
    .filter((n) => n !== undefined);
  return [
    `${age(age_ma)}${names.length > 0 ? ` (${[...new Set(names)].reverse().join(', ')})` : ''}`,
    `${inText({ ...subject.frame, kind: 'frame' })} frame`,
    subject.version,
  ].join('  ·  ');
}
