/**
 * How numbers are written: true minus, thin space in thousands, one decimal for ages and coordinates, hemisphere
 * letters after the degree sign. Pure functions of numbers; nothing here knows a locale.
 */
export const MINUS = '\u2212';
export const THIN = '\u2009';
/** Keeps a number and its unit on one line. */
export const NBSP = '\u00a0';

/** `digits` decimals, true minus, thin space in thousands; never "−0". */
export function number(value: number, digits = 0): string {
  if (!Number.isFinite(value)) return '–';
  const fixed = Math.abs(value).toFixed(digits);
  const [whole = '0', fraction] = fixed.split('.');
  const grouped = whole.replace(/\B(?=(\d{3})+$)/g, THIN);
  const negative = value < 0 && Number(fixed) !== 0;
  return `${negative ? MINUS : ''}${grouped}${fraction === undefined ? '' : `.${fraction}`}`;
}

/** As `number`, with a plus sign before what is above zero. */
export function signed(value: number, digits = 0): string {
  const text = number(value, digits);
  return value > 0 && Number(value.toFixed(digits)) !== 0 ? `+${text}` : text;
}

/** Age in Ma without its unit: "62.4". */
export const ageValue = (age_ma: number): string => number(age_ma, 1);

/** "178" for a whole age, "55.2" for another: in words and ticks. */
export const shortAge = (age_ma: number): string => ageValue(age_ma).replace(/\.0$/, '');

/** "62.4 Ma". */
export const age = (age_ma: number): string => `${ageValue(age_ma)}${NBSP}Ma`;

/** "21.1° S"; what rounds to zero reads north. */
export function latitude(deg: number, digits = 1): string {
  const rounded = Number(Math.abs(deg).toFixed(digits));
  return `${number(rounded, digits)}°${NBSP}${deg < 0 && rounded !== 0 ? 'S' : 'N'}`;
}

/** "36.6° E" for any way of writing a longitude; 180° reads east. */
export function longitude(deg: number, digits = 1): string {
  const wrapped = ((((deg + 180) % 360) + 360) % 360) - 180;
  const rounded = Number(Math.abs(wrapped).toFixed(digits));
  const west = wrapped < 0 && rounded !== 0 && rounded !== 180;
  return `${number(rounded, digits)}°${NBSP}${west ? 'W' : 'E'}`;
}

/** "21.1° S, 36.6° E"; at a pole the longitude is not defined, and says so. */
export function coordinates(lat: number, lon: number, digits = 1): string {
  if (90 - Math.abs(lat) < 0.5 * 10 ** -digits) return `${latitude(lat, digits)}, longitude undefined`;
  return `${latitude(lat, digits)}, ${longitude(lon, digits)}`;
}

/** Graticule and axis labels: "60° N", "30° W", "0°", "180°". */
export function parallel(lat: number): string {
  return lat === 0 ? '0°' : latitude(lat, 0);
}
export function meridian(lon: number): string {
  return lon === 0 || Math.abs(lon) === 180 ? `${number(Math.abs(lon))}°` : longitude(lon, 0);
}

/** "7.44°", "−8.47°". */
export const angle = (deg: number, digits = 2): string => `${number(deg, digits)}°`;

/** "529 km". */
export const kilometres = (km: number): string => `${number(km)}${NBSP}km`;

/** "109 mm/yr". */
export const speed = (mm_yr: number, digits = 0): string => `${number(mm_yr, digits)}${NBSP}mm/yr`;

/** A share of one as "24 %". */
export const percent = (share: number, digits = 0): string => `${number(100 * share, digits)}${NBSP}%`;

/** Shares of one as whole percents that add up to 100 (largest remainders). */
export function percents(shares: readonly number[]): number[] {
  const floors = shares.map((share) => Math.floor(100 * share));
  const order = shares
    .map((share, i) => ({ i, rest: 100 * share - (floors[i] ?? 0) }))
    .sort((a, b) => b.rest - a.rest);
  const left =
    Math.round(100 * shares.reduce((sum, share) => sum + share, 0)) - floors.reduce((sum, n) => sum + n, 0);
  for (const { i } of order.slice(0, left)) floors[i] = (floors[i] ?? 0) + 1;
  return floors;
}

/** Semi-axes of a 95 % ellipse: "298 × 220 km (95 %)". */
export function ellipse(semi_major_km: number, semi_minor_km: number): string {
  return `${number(semi_major_km)} × ${number(semi_minor_km)}${NBSP}km (95${NBSP}%)`;
}

/** "1 rotation", "3 rotations". */
export function count(n: number, one: string, many = `${one}s`): string {
  return `${number(n)}${NBSP}${n === 1 ? one : many}`;
}

/** "a", "a and b", "a, b and c". */
export function list(words: readonly string[]): string {
  if (words.length < 2) return words.join('');
  return `${words.slice(0, -1).join(', ')} and ${words[words.length - 1] ?? ''}`;
}
