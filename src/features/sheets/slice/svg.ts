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

/** Path data are letters and numbers made here, and long: they need no escaping. */
function written(key: string, value: string | number): string {
  if (typeof value === 'number') return short(value);
  return key === 'd' ? value : escapeXml(value);
}

export function element(name: string, attributes: Attributes, content = ''): string {
  const list = Object.entries(attributes)
    .filter(([, value]) => value !== undefined)
    .map(([key, value]) => ` ${key}="${written(key, value!)}"`)
    .join('');
  return content === '' ? `<${name}${list}/>` : `<${name}${list}>${content}</${name}>`;
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
