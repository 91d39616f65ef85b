/**
 * An outline made ready for drawing: closed rings of unit vectors whose inside lies to the left, coarser copies for
 * each level of detail, and a cap that holds them all.
 */
import { angleBetween, dot, unit, vectorOf, type Vec } from './matrix';
import { importances } from './simplify';

/** Interleaved x, y, z; a ring doesn't repeat its first vertex. */
export type Points = Float32Array;

export interface Shape {
  /** True for rings, false for open lines. */
  readonly closed: boolean;
  /** Parts at each level of `TOLERANCES`, finest first; each level keeps every part. */
  readonly levels: readonly (readonly Points[])[];
  /** Centre of a cap that holds every vertex and edge. */
  readonly cap: Vec;
  /** Radius of that cap in radians, π where the inside may reach anywhere. */
  readonly radius: number;
  readonly vertices: number;
}

/** Stands for an outline that is on its way: nothing is drawn. */
export const NOT_YET: Shape = { closed: true, levels: [[]], cap: [0, 0, 1], radius: 0, vertices: 0 };

/** Greatest distance of a dropped vertex from the line that replaces it, radians. */
export const TOLERANCES = [0, 0.0005, 0.001, 0.002, 0.004, 0.008] as const;

/** Index of the coarsest level whose error stays below `pixels` at a globe radius in pixels. */
export function levelFor(radius_px: number, pixels: number): number {
  let level = 0;
  while (level + 1 < TOLERANCES.length && (TOLERANCES[level + 1] as number) * radius_px <= pixels) level++;
  return level;
}

type Position = readonly number[];

/** Unit vectors of [longitude, latitude] positions in degrees; `closed` drops a repeated last position. */
export function pointsOf(positions: readonly Position[], closed: boolean): Points {
  const first = positions[0];
  const last = positions[positions.length - 1];
  const repeated = closed && positions.length > 1 && first?.[0] === last?.[0] && first?.[1] === last?.[1];
  const n = positions.length - (repeated ? 1 : 0);
  const points = new Float32Array(3 * n);
  for (let i = 0; i < n; i++) {
    const [lon = 0, lat = 0] = positions[i] as Position;
    points.set(vectorOf(lat, lon), 3 * i);
  }
  return points;
}

/**
 * Area to the left of a closed ring in steradians, 0 to 4π (the sum of the signed triangles of each edge with the
 * ring's own middle, so that the reference never lies far from the ring).
 */
export function leftArea(ring: Points): number {
  const n = ring.length / 3;
  let [mx, my, mz] = [0, 0, 0];
  for (let i = 0; i < ring.length; i += 3) {
    mx += ring[i] as number;
    my += ring[i + 1] as number;
    mz += ring[i + 2] as number;
  }
  const length = Math.hypot(mx, my, mz) || 1;
  const c: Vec = length < 1e-9 ? [0.48, 0.6, 0.64] : [mx / length, my / length, mz / length];
  let sum = 0;
  for (let i = 0; i < n; i++) {
    const a = vertex(ring, i);
    const b = vertex(ring, (i + 1) % n);
    const volume =
      c[0] * (a[1] * b[2] - a[2] * b[1]) +
      c[1] * (a[2] * b[0] - a[0] * b[2]) +
      c[2] * (a[0] * b[1] - a[1] * b[0]);
    sum += 2 * Math.atan2(volume, 1 + dot(a, b) + dot(b, c) + dot(c, a));
  }
  return ((sum % (4 * Math.PI)) + 4 * Math.PI) % (4 * Math.PI);
}

export const vertex = (points: Points, i: number): Vec => [
  points[3 * i] as number,
  points[3 * i + 1] as number,
  points[3 * i + 2] as number,
];

/** Longest edge drawn as a straight line, radians: its arc rises 1.5 × 10⁻⁴ of the globe's radius above the chord. */
const LONGEST_EDGE = 0.035;

/** Adds points along the great circle of every edge longer than `LONGEST_EDGE`. */
function densified(part: Points, closed: boolean): Points {
  const n = part.length / 3;
  const out: number[] = [];
  for (let i = 0; i < n; i++) {
    const a = vertex(part, i);
    out.push(...a);
    if (i === n - 1 && !closed) break;
    const b = vertex(part, (i + 1) % n);
    const angle = angleBetween(a, b);
    const pieces = Math.ceil(angle / LONGEST_EDGE);
    for (let k = 1; k < pieces; k++) {
      const [wa, wb] = [Math.sin(angle * (1 - k / pieces)), Math.sin((angle * k) / pieces)];
      out.push(...unit([wa * a[0] + wb * b[0], wa * a[1] + wb * b[1], wa * a[2] + wb * b[2]]));
    }
  }
  return out.length === part.length ? part : Float32Array.from(out);
}

function reversed(ring: Points): Points {
  const out = new Float32Array(ring.length);
  for (let i = 0; i < ring.length; i += 3) {
    out.set(ring.subarray(ring.length - i - 3, ring.length - i), i);
  }
  return out;
}

/** A cap around every vertex and edge; edges shorter than a half-turn stay within the cap of their ends when it is no larger than a hemisphere. */
function capOf(parts: readonly Points[]): { cap: Vec; radius: number } {
  let [x, y, z] = [0, 0, 0];
  for (const part of parts) {
    for (let i = 0; i < part.length; i += 3) {
      x += part[i] as number;
      y += part[i + 1] as number;
      z += part[i + 2] as number;
    }
  }
  const length = Math.hypot(x, y, z);
  if (length < 1e-9) return { cap: [0, 0, 1], radius: Math.PI };
  const cap: Vec = [x / length, y / length, z / length];
  let least = 1;
  for (const part of parts) {
    for (let i = 0; i < part.length; i += 3) {
      least = Math.min(
        least,
        cap[0] * (part[i] as number) + cap[1] * (part[i + 1] as number) + cap[2] * (part[i + 2] as number),
      );
    }
  }
  const radius = Math.acos(Math.max(-1, least)) + 1e-6;
  return { cap, radius: radius < Math.PI / 2 ? radius : Math.PI };
}

function withLevels(coarse: readonly Points[], closed: boolean, whole: boolean): Shape {
  const parts = coarse.map((part) => densified(part, closed));
  const weights = parts.map((part) => importances(part, closed));
  const levels = TOLERANCES.map((tolerance) =>
    tolerance === 0 ? parts : parts.map((part, k) => thin(part, weights[k] as Float64Array, tolerance)),
  );
  const { cap, radius } = capOf(parts);
  const vertices = coarse.reduce((sum, part) => sum + part.length / 3, 0);
  return { closed, levels, cap, radius: whole ? Math.PI : radius, vertices };
}

function thin(part: Points, weight: Float64Array, tolerance: number): Points {
  let kept = 0;
  for (const w of weight) if (w >= tolerance) kept++;
  if (kept * 3 === part.length) return part;
  const out = new Float32Array(3 * kept);
  let j = 0;
  for (let i = 0; i < weight.length; i++) {
    if ((weight[i] as number) >= tolerance) {
      out.set(part.subarray(3 * i, 3 * i + 3), j);
      j += 3;
    }
  }
  return out;
}

/**
 * Shape of a block's outline. Each polygon is its outer ring and its holes. The inside is the smaller side unless
 * `larger` is stated; of two equal sides, the one to the left.
 */
export function shapeOf(
  polygons: readonly (readonly Points[])[],
  inside: 'smaller' | 'larger' = 'smaller',
): Shape {
  const rings: Points[] = [];
  let whole = false;
  for (const polygon of polygons) {
    polygon.forEach((ring, k) => {
      if (ring.length < 9) return;
      const left = leftArea(ring);
      const wantsSmall = k > 0 || inside === 'smaller';
      const leftIsWanted = wantsSmall ? left <= 2 * Math.PI + 1e-9 : left >= 2 * Math.PI - 1e-9;
      if (k === 0 && !wantsSmall) whole = true;
      const keep = k === 0 ? leftIsWanted : !leftIsWanted;
      rings.push(keep ? ring : reversed(ring));
    });
  }
  return withLevels(rings, true, whole);
}

/** Shape of open lines: coasts, ridges, paths. */
export const linesOf = (lines: readonly Points[]): Shape =>
  withLevels(
    lines.filter((line) => line.length >= 6),
    false,
    false,
  );

interface Geometry {
  readonly type: string;
  readonly coordinates: unknown;
}

/** Shape of a GeoJSON Polygon or MultiPolygon. */
export function polygonShape(geometry: Geometry, inside: 'smaller' | 'larger' = 'smaller'): Shape {
  const polygons = (
    geometry.type === 'Polygon' ? [geometry.coordinates] : geometry.coordinates
  ) as readonly (readonly (readonly Position[])[])[];
  return shapeOf(
    polygons.map((rings) => rings.map((ring) => pointsOf(ring, true))),
    inside,
  );
}

/** Shape of a GeoJSON LineString or MultiLineString. */
export function lineShape(geometry: Geometry): Shape {
  const lines = (
    geometry.type === 'LineString' ? [geometry.coordinates] : geometry.coordinates
  ) as readonly (readonly Position[])[];
  return linesOf(lines.map((line) => pointsOf(line, false)));
}
