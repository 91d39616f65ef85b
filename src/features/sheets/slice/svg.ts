/** Writing SVG as text: escaped, numbers short, nothing else. */
import { plain } from '../../../plain';

export const escapeXml = (text: string): string =>
  plain(text).replace(
    /[&<>"']/g,
    (c) => ({ '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;', "'": '&#39;' })[c]!,
  );

/** Two decimals at most, no trailing zeros. */
export const short = (value: number): string => String(Math.round(value * 100) / 100);

type Attributes = Readonly<Record<string, string | number | undefined>>;

export function element(name: string, attributes: Attributes, content = ''): string {
  const written = Object.entries(attributes)
    .filter(([, value]) => value !== undefined)
    .map(([key, value]) => ` ${key}="${typeof value === 'number' ? short(value) : escapeXml(value!)}"`)
    .join('');
  return content === '' ? `<${name}${written}/>` : `<${name}${written}>${content}</${name}>`;
}

export type Family = 'Inter' | 'Source Serif 4';
export interface TextStyle {
  readonly family: Family;
  readonly size: number;
  readonly weight?: 400 | 500 | 600;
  readonly italic?: boolean;
  readonly fill?: string;
  readonly anchor?: 'start' | 'middle' | 'end';
  /** Colour of a halo under the letters, for names over outlines. */
  readonly halo?: string;
}

export function textElement(x: number, y: number, text: string, style: TextStyle): string {
  const attributes = {
    x,
    y,
    'font-family': `'${style.family}'`,
    'font-size': style.size,
    'font-weight': style.weight ?? 400,
    'font-style': style.italic ? 'italic' : undefined,
    'text-anchor': style.anchor === 'start' ? undefined : style.anchor,
  };
  const letters = element('text', { ...attributes, fill: style.fill ?? '#1C2530' }, escapeXml(text));
  if (!style.halo) return letters;
  const halo = { fill: 'none', stroke: style.halo, 'stroke-width': 2.4, 'stroke-linejoin': 'round' };
  return element('text', { ...attributes, ...halo, 'aria-hidden': 'true' }, escapeXml(text)) + letters;
}
