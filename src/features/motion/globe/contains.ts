/** Whether a point lies inside a shape whose rings have their inside to the left. */
import { cross, dot, type Vec } from './matrix';
import { vertex, type Shape } from './shape';

/**
 * Walks a great-circle arc from the point to the middle of one edge and asks on which side of the first edge it meets
 * the point lies. Exact but for points within about 10⁻⁷ radians (0.6 m) of an edge, the precision of the vertices.
 */
export function contains(shape: Shape, p: Vec): boolean {
  const rings = shape.levels[0] ?? [];
  const first = rings[0];
  if (!first) return false;
  if (shape.radius < Math.PI / 2 && dot(shape.cap, p) < Math.cos(shape.radius)) return false;
  const a = vertex(first, 0);
  const b = vertex(first, 1);
  const target: Vec = [a[0] + b[0], a[1] + b[1], a[2] + b[2]];
  const arc = cross(p, target);
  let nearest = -Infinity;
  let inside = false;
  for (const ring of rings) {
    const n = ring.length / 3;
    let from = vertex(ring, n - 1);
    let sideFrom = dot(arc, from);
    for (let i = 0; i < n; i++) {
      const to = vertex(ring, i);
      const sideTo = dot(arc, to);
      if (sideFrom > 0 !== sideTo > 0) {
        const w = sideFrom / (sideFrom - sideTo);
        const x = [
          from[0] + w * (to[0] - from[0]),
          from[1] + w * (to[1] - from[1]),
          from[2] + w * (to[2] - from[2]),
        ];
        const along = dot(p, x) / Math.hypot(...x);
        // Only crossings ahead of the point, between it and the target, in order of distance.
        const ahead = dot(cross(arc, p), x) >= 0;
        if (ahead && along > nearest) {
          nearest = along;
          inside = dot(p, cross(from, to)) > 0;
        }
      }
      from = to;
      sideFrom = sideTo;
    }
  }
  return inside;
}
