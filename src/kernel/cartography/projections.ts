/**
 * The projections that maps are drawn in, by name. Formulae: Snyder (1987), Map projections: a working manual, USGS
 * Professional Paper 1395; Equal Earth: Šavrič, Patterson & Jenny (2019); Robinson by his published table (1974).
 */
import {
  geoAzimuthalEqualArea,
  geoEqualEarth,
  geoEquirectangular,
  geoMercator,
  geoOrthographic,
  geoStereographic,
  type GeoProjection,
} from 'd3-geo';
import { geoMollweide, geoRobinson } from 'd3-geo-projection';

export interface ProjectionKind {
  readonly label: string;
  readonly property: 'equal-area' | 'conformal' | 'compromise' | 'perspective' | 'equidistant';
  /** Degrees from the centre to which the map reaches unless told otherwise, and at most; null: the whole globe. */
  readonly reach: { readonly usual: number; readonly most: number } | null;
  /** Where the centre may lie: anywhere, along the equator only, or at a pole only. */
  readonly centre: 'any' | 'equator' | 'pole';
  readonly create: () => GeoProjection;
}

export const PROJECTIONS = {
  'equal-earth': {
    label: 'Equal Earth',
    property: 'equal-area',
    reach: null,
    centre: 'equator',
    create: geoEqualEarth,
  },
  mollweide: {
    label: 'Mollweide',
    property: 'equal-area',
    reach: null,
    centre: 'equator',
    create: geoMollweide,
  },
  'lambert-azimuthal': {
    label: 'Lambert azimuthal equal-area',
    property: 'equal-area',
    reach: { usual: 90, most: 175 },
    centre: 'any',
    create: geoAzimuthalEqualArea,
  },
  robinson: {
    label: 'Robinson',
    property: 'compromise',
    reach: null,
    centre: 'equator',
    create: geoRobinson,
  },
  orthographic: {
    label: 'Orthographic',
    property: 'perspective',
    reach: { usual: 90, most: 90 },
    centre: 'any',
    create: geoOrthographic,
  },
  'polar-stereographic': {
    label: 'Polar stereographic',
    property: 'conformal',
    reach: { usual: 75, most: 120 },
    centre: 'pole',
    create: geoStereographic,
  },
  mercator: { label: 'Mercator', property: 'conformal', reach: null, centre: 'equator', create: geoMercator },
  equirectangular: {
    label: 'Equirectangular',
    property: 'equidistant',
    reach: null,
    centre: 'equator',
    create: geoEquirectangular,
  },
} as const satisfies Record<string, ProjectionKind>;

export type ProjectionName = keyof typeof PROJECTIONS;
export const PROJECTION_NAMES = Object.keys(PROJECTIONS) as ProjectionName[];
export const DEFAULT_PROJECTION: ProjectionName = 'equal-earth';

export interface MapCentre {
  readonly lat: number;
  readonly lon: number;
}

/** The centre that a projection uses: as asked, moved to the equator or the nearer pole where it allows no other. */
export function allowedCentre(name: ProjectionName, centre: MapCentre): MapCentre {
  const rule = PROJECTIONS[name].centre;
  if (rule === 'any') return centre;
  if (rule === 'equator') return { lat: 0, lon: centre.lon };
  return { lat: centre.lat < 0 ? -90 : 90, lon: centre.lon };
}

/**
 * A projection turned to its centre and fitted into a rectangle, in the rectangle's units, y down.
 * @param reach degrees from the centre to show, for projections that have a reach; the projection's own if null.
 */
export function fitProjection(
  name: ProjectionName,
  centre: MapCentre,
  box: { x: number; y: number; width: number; height: number },
  reach: number | null = null,
): GeoProjection {
  const kind: ProjectionKind = PROJECTIONS[name];
  const { lat, lon } = allowedCentre(name, centre);
  const projection = kind.create().rotate([-lon, -lat, 0]).precision(0.3);
  if (kind.reach) {
    const angle = Math.min(reach ?? kind.reach.usual, kind.reach.most);
    projection.clipAngle(angle === 90 && kind.property === 'perspective' ? 90 - 1e-6 : angle);
  }
  return projection.fitExtent(
    [
      [box.x, box.y],
      [box.x + box.width, box.y + box.height],
    ],
    { type: 'Sphere' },
  );
}

/** Kilometres along the horizontal at the map's centre for one unit of the map. */
export function kmPerUnit(projection: GeoProjection, centre: MapCentre, radiusKm: number): number {
  const step = 0.01;
  const polar = Math.abs(centre.lat) > 89;
  const end: [number, number] = polar
    ? [centre.lon, centre.lat - Math.sign(centre.lat) * step]
    : [centre.lon + step, centre.lat];
  const a = projection([centre.lon, centre.lat]);
  const b = projection(end);
  if (!a || !b) return NaN;
  const km = ((step * Math.PI) / 180) * radiusKm * (polar ? 1 : Math.cos((centre.lat * Math.PI) / 180));
  return km / Math.hypot(b[0] - a[0], b[1] - a[1]);
}
