/**
 * Vectors and row-major 3 × 3 matrices as the globe needs them: plain arrays written in place, so that a moving
 * frame allocates nothing. View coordinates: x to the right, y up, z towards the viewer.
 */
export type Vec = [x: number, y: number, z: number];
export type Mat = Float64Array;

const RADIANS = Math.PI / 180;

/** Centre of an orthographic view, degrees; `roll` turns the picture anticlockwise. */
export interface Centre {
  readonly lat: number;
  readonly lon: number;
  readonly roll: number;
}

/** Unit vector of a latitude and longitude in degrees. */
export function vectorOf(lat: number, lon: number): Vec {
  const c = Math.cos(lat * RADIANS);
  return [c * Math.cos(lon * RADIANS), c * Math.sin(lon * RADIANS), Math.sin(lat * RADIANS)];
}

/** Latitude and longitude in degrees of a vector of any length but zero; longitude 0 at a pole. */
export function placeOf(v: readonly [number, number, number]): { lat: number; lon: number } {
  const across = Math.hypot(v[0], v[1]);
  return {
    lat: Math.atan2(v[2], across) / RADIANS,
    lon: across < 1e-12 ? 0 : Math.atan2(v[1], v[0]) / RADIANS,
  };
}

/** Matrix that takes frame coordinates to view coordinates. Inverse: `centreOf`. */
export function viewMatrix({ lat, lon, roll }: Centre): Mat {
  const sf = Math.sin(lat * RADIANS);
  const cf = Math.cos(lat * RADIANS);
  const sl = Math.sin(lon * RADIANS);
  const cl = Math.cos(lon * RADIANS);
  const sr = Math.sin(roll * RADIANS);
  const cr = Math.cos(roll * RADIANS);
  const east: Vec = [-sl, cl, 0];
  const north: Vec = [-sf * cl, -sf * sl, cf];
  return Float64Array.of(
    cr * east[0] - sr * north[0],
    cr * east[1] - sr * north[1],
    -sr * north[2],
    sr * east[0] + cr * north[0],
    sr * east[1] + cr * north[1],
    cr * north[2],
    cf * cl,
    cf * sl,
    sf,
  );
}

/** Centre and roll of a view matrix; at a pole the longitude is 0 and the roll carries the whole turn. */
export function centreOf(m: ArrayLike<number>): Centre {
  const { lat, lon } = placeOf([m[6] ?? 0, m[7] ?? 0, m[8] ?? 0]);
  const base = viewMatrix({ lat, lon, roll: 0 });
  const along = (row: number) =>
    (m[0] ?? 0) * (base[row] ?? 0) + (m[1] ?? 0) * (base[row + 1] ?? 0) + (m[2] ?? 0) * (base[row + 2] ?? 0);
  return { lat, lon, roll: Math.atan2(-along(3), along(0)) / RADIANS };
}

/** out = a · b; `b` may start at an offset of a packed array of matrices. */
export function multiply(
  a: ArrayLike<number>,
  b: ArrayLike<number>,
  out: Float64Array,
  from = 0,
  to = 0,
): void {
  for (let r = 0; r < 3; r++) {
    const a0 = a[3 * r] as number;
    const a1 = a[3 * r + 1] as number;
    const a2 = a[3 * r + 2] as number;
    for (let c = 0; c < 3; c++) {
      out[to + 3 * r + c] =
        a0 * (b[from + c] as number) + a1 * (b[from + 3 + c] as number) + a2 * (b[from + 6 + c] as number);
    }
  }
}

/** m · v. Inverse for a rotation: `turnBack`. */
export function turn(m: ArrayLike<number>, v: readonly [number, number, number], at = 0): Vec {
  const row = (r: number) =>
    (m[at + r] as number) * v[0] + (m[at + r + 1] as number) * v[1] + (m[at + r + 2] as number) * v[2];
  return [row(0), row(3), row(6)];
}

/** mᵀ · v. */
export function turnBack(m: ArrayLike<number>, v: readonly [number, number, number], at = 0): Vec {
  const column = (c: number) =>
    (m[at + c] as number) * v[0] + (m[at + c + 3] as number) * v[1] + (m[at + c + 6] as number) * v[2];
  return [column(0), column(1), column(2)];
}

export const dot = (a: readonly number[], b: readonly number[]): number =>
  (a[0] as number) * (b[0] as number) +
  (a[1] as number) * (b[1] as number) +
  (a[2] as number) * (b[2] as number);

export const cross = (a: Vec, b: Vec): Vec => [
  a[1] * b[2] - a[2] * b[1],
  a[2] * b[0] - a[0] * b[2],
  a[0] * b[1] - a[1] * b[0],
];

/** A vector of length 1 along `v`; `v` itself where its length is zero. */
export function unit(v: Vec): Vec {
  const length = Math.hypot(v[0], v[1], v[2]);
  return length === 0 ? v : [v[0] / length, v[1] / length, v[2] / length];
}

/** Angle between two unit vectors in radians, exact near 0 and π. */
export const angleBetween = (a: Vec, b: Vec): number => {
  const c = cross(a, b);
  return Math.atan2(Math.hypot(c[0], c[1], c[2]), dot(a, b));
};

/** Rotation matrix that takes unit vector `a` to unit vector `b` by the shortest way; a half-turn has no unique axis and answers the identity. */
export function shortestTurn(a: Vec, b: Vec): Mat {
  const axis = cross(a, b);
  const c = dot(a, b);
  if (1 + c < 1e-12) return Float64Array.of(1, 0, 0, 0, 1, 0, 0, 0, 1);
  const k = 1 / (1 + c);
  const [x, y, z] = axis;
  return Float64Array.of(
    c + k * x * x, k * x * y - z, k * x * z + y,
    k * x * y + z, c + k * y * y, k * y * z - x,
    k * x * z - y, k * y * z + x, c + k * z * z,
  ); // prettier-ignore
}
