/** A number as people type it: decimal point or comma, any minus sign, its unit or none. */
export interface NumberSpan {
  /** As it stands in a sentence: "an age", "a latitude". */
  readonly what: string;
  readonly unit: string;
  readonly least: number;
  readonly most: number;
}

export type ReadNumber = { readonly value: number } | { readonly problem: string };

export function readNumber(text: string, { what, unit, least, most }: NumberSpan): ReadNumber {
  const plain = text.trim().replace(/\s*(?:Ma|Myr|°)$/i, '');
  const meant = `${what} from ${written(least)} to ${written(most)} ${unit}`.replace(' °', '°');
  if (plain === '') return { problem: `Blank: type ${meant}.` };
  if (!/^[-+\u2212]?(?:\d+(?:[.,]\d*)?|[.,]\d+)$/.test(plain))
    return { problem: `Read “${text.trim()}”, which is no number: type ${meant}.` };
  const value = Number(plain.replace('\u2212', '-').replace(',', '.'));
  if (value < least || value > most)
    return { problem: `Read ${written(value)}, outside the span: type ${meant}.` };
  return { value };
}

const written = (value: number): string => String(value).replace('-', '\u2212');
