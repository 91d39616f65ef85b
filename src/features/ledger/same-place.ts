/** 0.1 mm at most: 512.2 − 152.2 is not quite 360 in binary. */
const ROUNDING_DEG = 1e-9;

/** One place on the globe, of [longitude, latitude]: longitudes a whole turn apart, or any longitude at a pole. */
export function samePlace(a: readonly number[], b: readonly number[]): boolean {
  if (a[1] !== b[1]) return false;
  const turns = (a[0]! - b[0]!) / 360;
  return Math.abs(a[1]!) === 90 || Math.abs(turns - Math.round(turns)) * 360 < ROUNDING_DEG;
}
