/** The same answers as tables (RFC 4180). */
import { csvTable } from '~/features/interchange/exports';
import type { ConvergenceAnswer } from './contract';

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
