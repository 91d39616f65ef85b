/** One place on the globe, of [longitude, latitude]: longitudes a whole turn apart, or any longitude at a pole. */
export function samePlace(a: readonly number[], b: readonly number[]): boolean {
  if (a[1] !== b[1]) return false;
  return Math.abs(a[1]!) === 90 || (a[0]! - b[0]!) % 360 === 0;
}
