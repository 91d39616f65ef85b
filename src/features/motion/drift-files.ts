import type { Feature, FeatureCollection } from 'geojson';
import type { DriftPathAnswer } from './contract';
import { flatten } from './plate-carree';

const HEADINGS = [
  'block', 'relative_to', 'version', 'age_ma', 'lat', 'lon', 'speed_mm_yr', 'azimuth_deg', 'at_row', 'status',
  'semi_major_95_km', 'semi_minor_95_km', 'ellipse_azimuth_deg', 'at_least',
] as const; // prettier-ignore

/** RFC 4180; blank where there is no figure. Names are slugs, so no cell needs quoting. */
export function driftCsv({ block, relative_to, version, points }: DriftPathAnswer): string {
  const rows = points.map(
    ({ age_ma, lat, lon, speed_mm_yr, azimuth_deg, at_row, status, ellipse_95: ellipse }) =>
    [
      block, relative_to, version, age_ma, lat, lon, speed_mm_yr, azimuth_deg, at_row, status,
      ellipse?.semi_major_km, ellipse?.semi_minor_km, ellipse?.azimuth_deg, ellipse?.at_least,
    ].map((cell) => cell ?? '').join(','), // prettier-ignore
  );
  return [HEADINGS.join(','), ...rows, ''].join('\r\n');
}

/** The path as a line, cut at the antimeridian, and its points with their figures (RFC 7946). */
export function driftGeojson({ block, relative_to, version, points }: DriftPathAnswer): FeatureCollection {
  const about = { block, relative_to, version };
  const placed = points.flatMap((point) =>
    point.lat === null || point.lon === null ? [] : [{ ...point, position: [point.lon, point.lat] }],
  );
  const line =
    placed.length > 1
      ? flatten({ type: 'LineString', coordinates: placed.map(({ position }) => position) })
      : null;
  const marks = placed.map(({ position, lat: _lat, lon: _lon, ...figures }): Feature => ({
    type: 'Feature',
    properties: { ...about, ...figures },
    geometry: { type: 'Point', coordinates: position },
  }));
  const path: Feature[] = line
    ? [{ type: 'Feature', properties: { ...about, kind: 'drift path' }, geometry: line }]
    : [];
  return { type: 'FeatureCollection', features: [...path, ...marks] };
}
