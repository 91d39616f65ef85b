/** The same answers as tables (RFC 4180). */
import { csvTable } from '~/features/interchange/exports';
import type { ConvergenceAnswer, FlowLineAnswer, SeparationAnswer } from './contract';

const CONVERGENCE = [
  'age_ma', 'normal_mm_yr', 'tangential_mm_yr', 'speed_mm_yr', 'azimuth_deg', 'obliquity_deg',
] as const; // prettier-ignore

/** One row an age; what was asked stands in every row, so that tables can be joined. */
export function convergenceCsv({ points, ...asked }: ConvergenceAnswer): string {
  const { block, relative_to, coordinates_of, version, lat, lon, margin_azimuth } = asked;
  const fixed = { block, relative_to, coordinates_of, version, lat, lon, margin_azimuth };
  return csvTable(
    [...Object.keys(fixed), ...CONVERGENCE, 'at_row', 'status'],
    points.map((point) => [
      ...Object.values(fixed),
      ...CONVERGENCE.map((name) => point[name]),
      String(point.at_row),
      point.status,
    ]),
  );
}

/** One row an age; the first contact is in the JSON answer. */
export function separationCsv({
  points,
  block_a,
  block_b,
  coordinates_of,
  version,
}: SeparationAnswer): string {
  const headings = [
    'block_a', 'block_b', 'coordinates_of', 'version', 'age_ma', 'distance_km', 'overlap_km2', 'overlap_percent',
    'nearest_a_lat', 'nearest_a_lon', 'nearest_b_lat', 'nearest_b_lon', 'at_row', 'status',
  ]; // prettier-ignore
  return csvTable(
    headings,
    points.map((point) => [
      block_a, block_b, coordinates_of, version, point.age_ma, point.distance_km, point.overlap_km2,
      point.overlap_percent, point.nearest_a?.lat, point.nearest_a?.lon, point.nearest_b?.lat, point.nearest_b?.lon,
      String(point.at_row), point.status,
    ]), // prettier-ignore
  );
}

export function flowLineCsv({ points, ...asked }: FlowLineAnswer): string {
  const headings = [
    'age_ma',
    'a_lat',
    'a_lon',
    'a_rate_mm_yr',
    'b_lat',
    'b_lon',
    'b_rate_mm_yr',
    'full_rate_mm_yr',
  ];
  return csvTable(
    [...Object.keys(asked), ...headings, 'at_row', 'status'],
    points.map(({ age_ma, a, b, full_rate_mm_yr, at_row, status }) => [
      ...Object.values(asked),
      ...[age_ma, a?.lat, a?.lon, a?.rate_mm_yr, b?.lat, b?.lon, b?.rate_mm_yr, full_rate_mm_yr],
      String(at_row),
      status,
    ]),
  );
}
