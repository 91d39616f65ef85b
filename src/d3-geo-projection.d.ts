/** The part of d3-geo-projection that is used here; the package ships no types. */
declare module 'd3-geo-projection' {
  import type { GeoProjection, GeoRawProjection } from 'd3-geo';
  import type { Feature, FeatureCollection, Geometry } from 'geojson';

  export function geoMollweide(): GeoProjection;
  export function geoRobinson(): GeoProjection;
  export const geoMollweideRaw: GeoRawProjection;
  export const geoRobinsonRaw: GeoRawProjection;
  export function geoProject<T extends Feature | FeatureCollection | Geometry>(
    object: T,
    projection: unknown,
  ): T | null;
}
