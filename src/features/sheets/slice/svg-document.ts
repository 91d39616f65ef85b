/** The SVG round a page: size, title and description for readers of the file, patterns and fonts. */
import { EVIDENCE } from '../../../kernel/rotations/types';
import { age } from '../../motion/format';
import { inText } from '../../motion/names';
import { CAUTION_LINE } from './caution';
import { EVIDENCE_PATTERNS } from './palette';
import type { SliceSubject } from './subject';
import { escapeXml } from './svg';
import { embeddedFontRules } from './web-fonts';

interface About {
  readonly width: number;
  readonly height: number;
  readonly title: string;
  readonly subject: SliceSubject;
  readonly age_ma: number;
}

export function svgDocument({ width, height, title, subject, age_ma }: About, body: string): string {
  const [w, h] = [width.toFixed(2), height.toFixed(2)];
  const describe = `${subject.version}, ${inText({ ...subject.frame, kind: 'frame' })} frame, ${age(age_ma)}. ${CAUTION_LINE}`;
  const head = `xmlns="http://www.w3.org/2000/svg" width="${w}pt" height="${h}pt" viewBox="0 0 ${w} ${h}" role="img"`;
  const defs = `<defs><style>${embeddedFontRules(body)}</style>${EVIDENCE.map((e) => EVIDENCE_PATTERNS[e]).join('')}</defs>`;
  return `<svg ${head}><title>${escapeXml(title)}</title><desc>${escapeXml(describe)}</desc>${defs}${body}</svg>\n`;
}
