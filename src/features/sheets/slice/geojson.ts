/**
 * A slice as GeoJSON (RFC 7946): outlines cut at the antimeridian, edges densified so that straight lines in longitude
 * and latitude stay within {@link EXPORT_ERROR_KM} of the great circles, what the map says of itself as members.
 */
import type { Feature, FeatureCollection, Geometry } from 'geojson';
import { flatten } from '../../motion/plate-carree';

import { CAUTION_LINE } from './caution';
import type { SliceQuery } from '../contract';
import { pathLine, type Drawn } from './drawn';
import type { SliceSubject } from './subject';

/** Worst distance between a written edge and its great circle. */
export const EXPORT_ERROR_KM = 1;

export function sliceGeojson(
  subject: SliceSubject,
  drawn: Drawn,
  query: SliceQuery,
): FeatureCollection & Record<string, unknown> {
  const about = { age_ma: query.age_ma, relative_to: subject.frame.code };
  const features: Feature[] = [];
  const add = (geometry: Geometry, properties: Record<string, unknown>): void => {
    const flat = flatten(geometry);
    if (flat) features.push({ type: 'Feature', properties: { ...properties, ...about }, geometry: flat });
  };
  for (const { code, name, evidence, area, area_km2 } of drawn.blocks) {
    add(area, { block: code, name, kind: 'outline', evidence, area_km2: Math.round(area_km2) });
  }
  for (const { line } of drawn.coasts) add(line, { kind: 'layer', name: 'present coast, for location only' });
  if (drawn.path)
    add(pathLine(drawn.path.points), { block: drawn.path.block, name: drawn.path.name, kind: 'drift path' });
  return {
    type: 'FeatureCollection',
    title: subject.title,
    ...about,
    version: subject.version,
    licence: subject.licence,
    sources: drawn.sources,
    missing: drawn.missing,
    caution: CAUTION_LINE,
    features,
  };
}
