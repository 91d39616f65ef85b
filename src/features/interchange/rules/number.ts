/**
 * Reads the ways in which people write numbers and angles. Only a plain decimal is taken as it stands; every other
 * form is returned with its name, so that the import can ask before it uses the reading.
 */
export type NumberForm = 'plain' | 'decimal comma' | 'degrees-minutes' | 'hemisphere';

export type Reading =
  | { readonly ok: true; readonly value: number | null; readonly form: NumberForm }
  | { readonly ok: false; readonly problem: string; readonly hint: string };

const MINUS = /[\u2212\u2013\u2012\uFE63\uFF0D]/g;
const PLAIN = /^[+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?$/;
const COMMA = /^[+-]?\d+,\d+(?:[eE][+-]?\d+)?$/;
const HEMISPHERE = /^(\d+(?:[.,]\d+)?)\s*°?\s*([NSEW])$/i;
const MINUTES =
  /^([+-]?)\s*(\d{1,3})\s*(?:°|º|d|deg|\s)\s*(\d{1,2}(?:[.,]\d+)?)\s*(?:['′’m]|min)?\s*(?:(\d{1,2}(?:[.,]\d+)?)\s*(?:"|″|”|''|s|sec)?)?\s*([NSEW])?$/i;

/** @param cell text of one cell; blank means unknown. */
export function readNumber(cell: string): Reading {
  const text = cell
    .replace(MINUS, '-')
    .replace(/[\u00A0\u2009\u202F]/g, ' ')
    .trim();
  if (text === '') return { ok: true, value: null, form: 'plain' };
  if (PLAIN.test(text)) return finite(Number(text), 'plain');
  if (COMMA.test(text)) return finite(Number(text.replace(',', '.')), 'decimal comma');
  const hemisphere = HEMISPHERE.exec(text);
  if (hemisphere) {
    const value = Number(hemisphere[1]!.replace(',', '.'));
    return finite(/[SW]/i.test(hemisphere[2]!) ? -value : value, 'hemisphere');
  }
  const angle = MINUTES.exec(text);
  if (angle) return degreesMinutes(angle);
  return {
    ok: false,
    problem: 'not a number',
    hint: 'Write a decimal number with a point, for example -29.6; leave the cell blank where it is unknown.',
  };
}

function degreesMinutes(match: RegExpExecArray): Reading {
  const [, sign, degrees, minutes, seconds = '0', hemisphere = ''] = match;
  const m = Number(minutes!.replace(',', '.'));
  const s = Number(seconds.replace(',', '.'));
  if (m >= 60 || s >= 60) {
    return {
      ok: false,
      problem: 'minutes or seconds of 60 or more',
      hint: 'Write the angle as decimal degrees.',
    };
  }
  const size = Number(degrees) + m / 60 + s / 3600;
  const negative = sign === '-' || /[SW]/i.test(hemisphere);
  return finite(negative ? -size : size, 'degrees-minutes');
}

function finite(value: number, form: NumberForm): Reading {
  if (Number.isFinite(value)) return { ok: true, value, form };
  return { ok: false, problem: 'too large to be a number', hint: 'Check the exponent.' };
}
