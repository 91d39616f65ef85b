/**
 * Turning by hand: the place that was grabbed stays under the pointer. North stays up where it can; where a place
 * near a pole is dragged past what that allows, the globe turns the shortest way instead and north tilts.
 */
import {
  centreOf,
  multiply,
  placeOf,
  shortestTurn,
  turnBack,
  viewMatrix,
  type Centre,
  type Vec,
} from './matrix';

export interface Grab {
  /** The grabbed place in frame coordinates. */
  readonly held: Vec;
  readonly northUp: boolean;
  readonly centre: Centre;
}

/** Beyond this latitude a drag may tilt north from the start. */
const POLAR = 75;
const DEGREES = 180 / Math.PI;

export function grab(centre: Centre, v: Vec): Grab {
  const held = turnBack(viewMatrix(centre), v);
  return { held, northUp: Math.abs(centre.roll) < 0.05 && Math.abs(placeOf(held).lat) <= POLAR, centre };
}

/** The centre that brings the grabbed place under a view vector, and the grab to go on with. */
export function drag(from: Grab, v: Vec): Grab {
  const upright = from.northUp ? uprightCentre(from.held, v, from.centre) : null;
  if (upright) return { ...from, centre: upright };
  const view = viewMatrix(from.centre);
  const turned = new Float64Array(9);
  const held = from.held;
  const now: Vec = [
    (view[0] as number) * held[0] + (view[1] as number) * held[1] + (view[2] as number) * held[2],
    (view[3] as number) * held[0] + (view[4] as number) * held[1] + (view[5] as number) * held[2],
    (view[6] as number) * held[0] + (view[7] as number) * held[1] + (view[8] as number) * held[2],
  ];
  multiply(shortestTurn(now, v), view, turned);
  return { held, northUp: false, centre: centreOf(turned) };
}

/** With north up: x = cos φ sin Δλ fixes the longitude, y the latitude of the centre; null where neither can be. */
function uprightCentre(held: Vec, v: Vec, near: Centre): Centre | null {
  const { lat, lon } = placeOf(held);
  const [sf, cf] = [Math.sin(lat / DEGREES), Math.cos(lat / DEGREES)];
  const s = v[0] / cf;
  if (Math.abs(s) > 1) return null;
  const d = Math.asin(s);
  // The place lies on the near side in longitude unless the view looks over a pole.
  const toward = cf * Math.cos(d);
  const tilt = Math.hypot(sf, toward);
  if (Math.abs(v[1]) > tilt) return null;
  const up = Math.atan2(sf, toward);
  const candidates = [up - Math.asin(v[1] / tilt)].map((x) => x * DEGREES);
  const centreLat = candidates.find((x) => Math.abs(x) <= 90);
  if (centreLat === undefined) return null;
  const centreLon = wrap(lon - d * DEGREES);
  if (Math.abs(wrap(centreLon - near.lon)) > 120) return null;
  return { lat: centreLat, lon: centreLon, roll: 0 };
}

const wrap = (deg: number): number => ((((deg + 180) % 360) + 360) % 360) - 180;

/** A turn by keys: degrees to the east and to the north, less the nearer one looks. */
export function nudge({ lat, lon, roll }: Centre, east: number, north: number): Centre {
  return { lat: Math.max(-90, Math.min(90, lat + north)), lon: wrap(lon + east), roll };
}
