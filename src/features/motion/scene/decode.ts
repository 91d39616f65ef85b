/** Shapes from the binary outlines that the server sends. Rings of a polygon are its outer ring and its holes. */
import { decodeOutline, outlineVectors, type OutlineShape } from '../../../kernel/cartography/outline-codec';
import { linesOf, shapeOf, type Points, type Shape } from '../globe/shape';

export interface Decoded {
  /** null for points. */
  readonly shape: Shape | null;
  /** First position, degrees: the place of a point. */
  readonly lon: number;
  readonly lat: number;
}

export function decodeShape(bytes: Uint8Array, inside: 'smaller' | 'larger' = 'smaller'): Decoded {
  const outline = decodeOutline(bytes);
  const [lon = 0, lat = 0] = outline.lonLat;
  if (outline.type.endsWith('Point')) return { shape: null, lon, lat };
  const parts = partsOf(outline);
  if (!outline.type.endsWith('Polygon')) return { shape: linesOf(parts), lon, lat };
  let first = 0;
  const polygons = [...outline.polygonEnds].map((end) => {
    const rings = parts.slice(first, end).map(opened);
    first = end;
    return rings;
  });
  return { shape: shapeOf(polygons, inside), lon, lat };
}

function partsOf(outline: OutlineShape): Points[] {
  const vectors = outlineVectors(outline);
  let first = 0;
  return [...outline.partEnds].map((end) => {
    const part = vectors.slice(3 * first, 3 * end);
    first = end;
    return part;
  });
}

/** A ring without its repeated first point. */
function opened(ring: Points): Points {
  const n = ring.length;
  const repeated = n > 3 && ring[0] === ring[n - 3] && ring[1] === ring[n - 2] && ring[2] === ring[n - 1];
  return repeated ? ring.subarray(0, n - 3) : ring;
}
