/** What stands under the map on the right in small type: frame, version, date, sources, chart and licence. */
import { CHRONOSTRATIGRAPHIC_CHART } from '../../../kernel/timescale';
import { inText } from '../../motion/names';
import type { Drawn } from './drawn';
import { breakLines } from './fonts';
import type { SliceSubject } from './subject';
import type { Line } from './text-lines';
import { SMALL } from './type';

export function factLines(subject: SliceSubject, { sources: names }: Drawn, width: number): Line[] {
  const sources = names.length > 0 ? names.join('; ') : 'none named';
  const facts = [
    `Frame: ${inText({ ...subject.frame, kind: 'frame' })}. ${subject.version}. Drawn ${subject.date}.`,
    `Sources: ${sources}.`,
    `Ages: ${CHRONOSTRATIGRAPHIC_CHART.edition}.${subject.licence ? ` Licence ${subject.licence}.` : ' No licence stated.'}`,
  ];
  return facts.flatMap((fact) => breakLines(fact, SMALL, width).map((text) => ({ text, style: SMALL })));
}
