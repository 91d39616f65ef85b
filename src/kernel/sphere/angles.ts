/** Mean radius of the Earth R₁ = (2a + b)/3, km (IUGG; Moritz 2000, Geodetic Reference System 1980). */
export const EARTH_RADIUS_KM = 6371.0088;

const DEGREE = Math.PI / 180;

export const toRadians = (degrees: number): number => degrees * DEGREE;
export const toDegrees = (radians: number): number => radians / DEGREE;

/** Arc sine, radians, of a value that rounding may have carried past ±1. */
export const asin = (x: number): number => (x >= 1 ? Math.PI / 2 : x <= -1 ? -Math.PI / 2 : Math.asin(x));

/**
 * Arc cosine, radians, of a value that rounding may have carried past ±1. Loses half the digits near ±1:
 * prefer atan2 forms.
 */
export const acos = (x: number): number => (x >= 1 ? 0 : x <= -1 ? Math.PI : Math.acos(x));

/** Longitude in (−180, 180], exact: only whole turns are taken away. */
export function normalizeLongitude(degrees: number): number {
  const rest = degrees % 360;
  return rest > 180 ? rest - 360 : rest <= -180 ? rest + 360 : rest;
}

/** Quarter turns in an angle (0 to 3) and what is left over, radians in [−π/4, π/4]. */
function reduce(degrees: number): [quarter: number, rest: number] {
  const rest = degrees % 360;
  const quarters = Math.round(rest / 90);
  return [((quarters % 4) + 4) % 4, toRadians(rest - 90 * quarters)];
}

/** Sine of an angle in degrees; exactly 0 or ±1 at multiples of 90°, whole turns taken away without error. */
export function sinDegrees(degrees: number): number {
  const [quarter, rest] = reduce(degrees);
  if (quarter === 0) return Math.sin(rest);
  if (quarter === 1) return Math.cos(rest);
  return quarter === 2 ? -Math.sin(rest) : -Math.cos(rest);
}

/**
 * Cosine of an angle in degrees; exactly 0 or ±1 at multiples of 90°, whole turns taken away without error.
 */
export function cosDegrees(degrees: number): number {
  const [quarter, rest] = reduce(degrees);
  if (quarter === 0) return Math.cos(rest);
  if (quarter === 1) return -Math.sin(rest);
  return quarter === 2 ? -Math.cos(rest) : Math.sin(rest);
}
