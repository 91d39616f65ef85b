/** What of a slice is drawn: the layers asked for, and of them what falls on the map; and whose work that is. */
import { geoStream, type GeoProjection } from 'd3-geo';
import type { LineString, MultiLineString, MultiPolygon } from 'geojson';
import type { DriftPoint } from '../../../kernel/rotations';
import type { Layer } from '../choices';
import type { Carried } from './carried';
import { inOrder } from './sources';
import { visible } from './visible';

/** A drift path that was asked for. */
export interface SlicePath {
  readonly block: string;
  readonly name: string;
  readonly points: readonly DriftPoint[];
  /** The point at the age of the slice itself; null where none was asked for. */
  readonly here: DriftPoint | null;
  readonly sources: readonly string[];
}

export interface Drawn extends Carried {
  readonly path: SlicePath | null;
  /** Names under which what is drawn is cited, in alphabetical order. */
  readonly sources: readonly string[];
}

/** @param projection of the map; null where everything that has a place is shown. */
export function drawnOf(
  carried: Carried,
  asked: SlicePath | null,
  layers: readonly Layer[],
  projection: GeoProjection | null,
): Drawn {
  const shows = reachTest(projection);
  const has = (layer: Layer): boolean => layers.includes(layer);
  const blocks = carried.blocks.filter(({ area }) => shows(area));
  const coasts = has('coasts') ? carried.coasts.filter(({ line }) => shows(line)) : [];
  const path = asked && has('path') && shows(pathLine(asked.points)) ? asked : null;
  const moving = has('velocity') ? blocks.flatMap((block) => block.motion_sources) : [];
  const sources = inOrder([
    ...[...blocks, ...coasts].flatMap((part) => part.sources),
    ...moving,
    ...(path?.sources ?? []),
  ]);
  return { blocks, coasts, missing: carried.missing, path, sources };
}

/** A path's line through the ages at which it has a place. */
export function pathLine(points: readonly DriftPoint[]): LineString {
  const coordinates = points.flatMap(({ lat, lon }) => (lat === null || lon === null ? [] : [[lon, lat]]));
  return { type: 'LineString', coordinates };
}

type Shape = MultiPolygon | MultiLineString | LineString;

/** Whether any of a shape falls within an azimuthal map's reach; on a map of the whole globe, all that is not empty. */
function reachTest(projection: GeoProjection | null): (shape: Shape) => boolean {
  if (!projection?.clipAngle()) return (shape) => shape.coordinates.length > 0;
  return (shape) => {
    const positions = shape.coordinates.flat(
      shape.type === 'MultiPolygon' ? 2 : shape.type === 'LineString' ? 0 : 1,
    );
    if (positions.some((position) => visible(projection, position as [number, number]))) return true;
    let reached = false;
    const nothing = (): void => undefined;
    const sink = { point: () => void (reached = true), lineStart: nothing, lineEnd: nothing, polygonStart: nothing, polygonEnd: nothing }; // prettier-ignore
    geoStream(shape, projection.stream(sink));
    return reached;
  };
}
