/** What stands under the map on the right in small type: frame, version, date, sources, chart and licence. */
import { CHRONOSTRATIGRAPHIC_CHART } from '../../../kernel/timescale';
import { inText } from '../../motion/names';
import type { Drawn } from './drawn';
import { shortList } from './short-list';
import type { SliceSubject } from './subject';

/** @param shown how many sources are named. */
export function factParagraphs(subject: SliceSubject, { sources }: Drawn, shown: number): string[] {
  const names = sources.length > 0 ? shortList(sources, shown, ';') : 'none named';
  return [
    `Frame: ${inText({ ...subject.frame, kind: 'frame' })}. ${subject.version}. Drawn ${subject.date}.`,
    `Sources: ${names}.`,
    `Ages: ${CHRONOSTRATIGRAPHIC_CHART.edition}.${subject.licence ? ` Licence ${subject.licence}.` : ' No licence stated.'}`,
  ];
}
