/**
 * A slice as GeoJSON (RFC 7946): outlines cut at the antimeridian, edges densified so that straight lines in longitude
 * and latitude stay within {@link EXPORT_ERROR_KM} of the great circles, what the map says of itself as members.
 */
import type { Feature, FeatureCollection, Geometry } from 'geojson';
import { flatten } from '../../motion/plate-carree';
import type { Carried } from './carried';
import { CAUTION_LINE } from './caution';
import type { SliceQuery } from '../contract';
import type { SliceSubject } from './subject';

/** Worst distance between a written edge and its great circle. */
export const EXPORT_ERROR_KM = 1;

export function sliceGeojson(
  subject: SliceSubject,
  carried: Carried,
  query: SliceQuery,
): FeatureCollection & Record<string, unknown> {
  const about = { age_ma: query.age_ma, relative_to: subject.frame.code };
  const features: Feature[] = [];
  const add = (geometry: Geometry, properties: Record<string, unknown>): void => {
    const flat = flatten(geometry);
    if (flat) features.push({ type: 'Feature', properties: { ...properties, ...about }, geometry: flat });
  };
  for (const { code, name, evidence, area, area_km2 } of carried.blocks) {
    add(area, { block: code, name, kind: 'outline', evidence, area_km2: Math.round(area_km2) });
  }
  if (query.layers.includes('coasts'))
    for (const line of carried.coasts) add(line, { kind: 'layer', name: 'present coast, for location only' });
  return {
    type: 'FeatureCollection',
    title: subject.title,
    ...about,
    version: subject.version,
    licence: subject.licence,
    sources: carried.sources,
    missing: carried.missing,
    caution: CAUTION_LINE,
    features,
  };
}
