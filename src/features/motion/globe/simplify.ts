/**
 * How much each vertex of a line matters: the greatest tolerance at which the line, thinned by Douglas and Peucker
 * (1973), still keeps it. One pass serves every level of detail.
 */
type Points = Float32Array;

/** Squared chord distance from vertex `i` to the straight segment between vertices `a` and `b`. */
function offLine(p: Points, i: number, a: number, b: number): number {
  const ax = p[3 * a] as number;
  const ay = p[3 * a + 1] as number;
  const az = p[3 * a + 2] as number;
  const dx = (p[3 * b] as number) - ax;
  const dy = (p[3 * b + 1] as number) - ay;
  const dz = (p[3 * b + 2] as number) - az;
  const ex = (p[3 * i] as number) - ax;
  const ey = (p[3 * i + 1] as number) - ay;
  const ez = (p[3 * i + 2] as number) - az;
  const length2 = dx * dx + dy * dy + dz * dz;
  const t = length2 === 0 ? 0 : Math.min(1, Math.max(0, (ex * dx + ey * dy + ez * dz) / length2));
  return (ex - t * dx) ** 2 + (ey - t * dy) ** 2 + (ez - t * dz) ** 2;
}

/** One weight per vertex, in radians of arc for short distances; ends and anchors weigh infinity. */
export function importances(points: Points, closed: boolean): Float64Array {
  const n = points.length / 3;
  const weight = new Float64Array(n);
  if (n === 0) return weight;
  if (closed) anchorRing(points, n, weight);
  else {
    weight[0] = weight[n - 1] = Infinity;
    split(points, weight, 0, n - 1);
  }
  return weight;
}

/** A ring is cut at its first vertex and at the vertex farthest from it; a third one keeps it from collapsing. */
function anchorRing(points: Points, n: number, weight: Float64Array): void {
  let far = 0;
  let distance = -1;
  for (let i = 1; i < n; i++) {
    const d =
      ((points[3 * i] as number) - (points[0] as number)) ** 2 +
      ((points[3 * i + 1] as number) - (points[1] as number)) ** 2 +
      ((points[3 * i + 2] as number) - (points[2] as number)) ** 2;
    if (d > distance) [far, distance] = [i, d];
  }
  const wrapped = new Float32Array(points.length + 3);
  wrapped.set(points);
  wrapped.set(points.subarray(0, 3), points.length);
  const w = new Float64Array(n + 1);
  split(wrapped, w, 0, far);
  split(wrapped, w, far, n);
  weight.set(w.subarray(0, n));
  weight[0] = weight[far] = Infinity;
  let third = -1;
  for (let i = 0; i < n; i++) {
    if (weight[i] !== Infinity && (third < 0 || (weight[i] as number) > (weight[third] as number))) third = i;
  }
  if (third >= 0) weight[third] = Infinity;
}

/** Fills the weights strictly between two kept vertices, never above the weight that split them. */
function split(points: Points, weight: Float64Array, from: number, to: number): void {
  const stack: [number, number, number][] = [[from, to, Infinity]];
  for (let job = stack.pop(); job; job = stack.pop()) {
    const [a, b, limit] = job;
    if (b - a < 2) continue;
    let worst = -1;
    let at = a + 1;
    for (let i = a + 1; i < b; i++) {
      const d = offLine(points, i, a, b);
      if (d > worst) [worst, at] = [d, i];
    }
    const w = Math.min(limit, Math.sqrt(worst));
    weight[at] = w;
    stack.push([a, at, w], [at, b, w]);
  }
}
