/** Sliding a flat map: the grabbed place keeps to the pointer in longitude; nearer than the whole map, in latitude too. */
import { flatProjection } from './ground-flat';
import type { Centre } from './matrix';
import type { XY } from './pen';
import type { Picture } from './picture';

/** A wider step than this, device pixels, is one degree measured again. */
const PROBE = 1;

export function flatDrag(picture: Picture, from: XY): ((to: XY) => Centre | null) | null {
  const projection = flatProjection(picture);
  const held = projection.invert?.([from[0], from[1]]);
  if (!held || !held.every(Number.isFinite)) return null;
  const { centre, zoom } = picture;
  const along = (lon: number, lat: number) => projection([lon, lat]) ?? [0, 0];
  const perLon = Math.max(
    0.2,
    (along(centre.lon + PROBE, held[1])[0] ?? 0) - (along(centre.lon, held[1])[0] ?? 0),
  );
  const perLat = Math.max(
    0.2,
    (along(centre.lon, centre.lat)[1] ?? 0) - (along(centre.lon, centre.lat + PROBE)[1] ?? 0),
  );
  const share = Math.max(0, 1 - 1 / zoom);
  return (to) => {
    const lon = centre.lon - (to[0] - from[0]) / perLon;
    const lat = share === 0 ? centre.lat : centre.lat + (to[1] - from[1]) / (perLat * share);
    return { lat: Math.max(-90, Math.min(90, lat)), lon: ((((lon + 180) % 360) + 360) % 360) - 180, roll: 0 };
  };
}
