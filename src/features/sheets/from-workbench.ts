/** A link of the workbench as a slice: the same age, frame, centre and drift path, on the map that suits it. */
import type { Geometry } from 'geojson';

interface Carried {
  readonly block: string;
  readonly kind: string;
  readonly sha256: string;
}

type Query = Readonly<Record<string, string>>;

/**
 * @param query of the workbench (`age`, `frame`, `block`, `lat`, `lon`, `centre`, `path`); a query of a slice passes through.
 * @param geometryOf gives a block's named rock where the link has no point of its own.
 */
export function sliceFromLink(
  query: Query,
  features: readonly Carried[],
  geometryOf: (sha256: string) => Geometry,
): Record<string, string> {
  if (query['age'] === undefined) return { ...query };
  const { age, frame, block, version, centre = '' } = query;
  const [centre_lat, centre_lon] = centre.split(',');
  const step = query['path']?.split(',')[2];
  const point = block === undefined ? null : pointOf(query, block, features, geometryOf);
  return {
    age_ma: age,
    ...(version ? { version } : {}),
    ...(frame ? { relative_to: frame } : {}),
    ...(centre_lat && centre_lon ? { projection: 'lambert-azimuthal', centre_lat, centre_lon } : {}),
    ...(block && point ? { path_block: block, path_lat: String(point[1]), path_lon: String(point[0]) } : {}),
    ...(step ? { path_step_ma: step } : {}),
  };
}

function pointOf(
  { lat, lon }: Query,
  block: string,
  features: readonly Carried[],
  geometryOf: (sha256: string) => Geometry,
): readonly [number, number] | null {
  if (lat !== undefined && lon !== undefined) return [Number(lon), Number(lat)];
  const rock = features.find((feature) => feature.block === block && feature.kind === 'rock');
  const shape = rock && geometryOf(rock.sha256);
  return shape?.type === 'Point' ? [shape.coordinates[0]!, shape.coordinates[1]!] : null;
}
