/** Positions with a third number (RFC 7946 §3.1.1): outlines lie on the sphere, so heights are left out, asked first. */
import type { Geometry } from 'geojson';
import type { Asking } from './ask';
import type { LocatedFeature } from './geojson-text';

const LEAVE = 'leave them out';
const REJECT = 'reject these features';

export interface Levelled {
  readonly features: readonly LocatedFeature[];
  readonly notes: readonly string[];
}

/** Heights of 0 say nothing and go with a note; others go where the answer says so. */
export function withoutHeights(features: readonly LocatedFeature[], asking: Asking): Levelled {
  let zeros = false;
  const levelled = features.map((feature) => {
    const heights = heightsOf(feature.geometry);
    if (heights.length === 0) return feature;
    const odd = heights.find((height) => height !== 0);
    if (odd === undefined) zeros = true;
    else {
      const ask = 'Positions carry heights. Outlines lie on the sphere here: leave the heights out?';
      const example = `line ${feature.line}: ${String(odd)}`;
      if (asking.ask('heights', ask, [LEAVE, REJECT], example) === REJECT) return feature;
    }
    return { ...feature, geometry: level(feature.geometry) };
  });
  return { features: levelled, notes: zeros ? ['Heights of 0 are left out.'] : [] };
}

type Node = readonly (number | Node)[];
const isPosition = (node: Node): boolean => !Array.isArray(node[0]);
const inner = (node: Node): Node[] => node.filter((one): one is Node => Array.isArray(one));
const coordinatesOf = (geometry: Geometry | null): Node | null =>
  geometry && 'coordinates' in geometry && Array.isArray(geometry.coordinates) ? geometry.coordinates : null;

function heightsOf(geometry: Geometry | null): unknown[] {
  const found: unknown[] = [];
  const walk = (node: Node): void => {
    if (!isPosition(node)) inner(node).forEach(walk);
    else if (node.length > 2) found.push(...node.slice(2));
  };
  const coordinates = coordinatesOf(geometry);
  if (coordinates) walk(coordinates);
  return found;
}

function level(geometry: Geometry | null): Geometry | null {
  const walk = (node: Node): Node => (isPosition(node) ? node.slice(0, 2) : inner(node).map(walk));
  const coordinates = coordinatesOf(geometry);
  return coordinates ? ({ ...geometry, coordinates: walk(coordinates) } as unknown as Geometry) : geometry;
}
