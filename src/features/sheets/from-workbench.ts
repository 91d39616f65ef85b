/** A link of the workbench as a slice: the same age, frame, centre and drift path, on the map that suits it. */
import type { KnownPoint } from './known-points';

type Query = Readonly<Record<string, string>>;

/**
 * @param query of the workbench (`age`, `frame`, `block`, `lat`, `lon`, `centre`, `path`); a query of a slice passes through.
 * @param points of the blocks, where the link has none of its own.
 */
export function sliceFromLink(
  query: Query,
  points: Readonly<Record<string, KnownPoint>>,
): Record<string, string> {
  if (query['age'] === undefined) return { ...query };
  const { age, frame, block, version, centre = '' } = query;
  const [centre_lat, centre_lon] = centre.split(',');
  const step = query['path']?.split(',')[2];
  const point = block === undefined ? null : pointOf(query, points[block]);
  return {
    age_ma: age,
    ...(version ? { version } : {}),
    ...(frame ? { relative_to: frame } : {}),
    ...(centre_lat && centre_lon ? { projection: 'lambert-azimuthal', centre_lat, centre_lon } : {}),
    ...(block && point ? { path_block: block, ...point } : {}),
    ...(step ? { path_step_ma: step } : {}),
  };
}

function pointOf({ lat, lon }: Query, known: KnownPoint | undefined): Record<string, string> | null {
  if (lat !== undefined && lon !== undefined) return { path_lat: lat, path_lon: lon };
  return known ? { path_lat: String(known.lat), path_lon: String(known.lon) } : null;
}
