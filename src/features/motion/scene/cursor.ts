/** What lies under the pointer, in both pictures of then and now. */
import { distanceKm } from '../../../kernel/sphere';
import type { Hit } from '../globe/hit';
import { placeOf, turn, vectorOf, type Vec } from '../globe/matrix';
import { matrixOf, type Frame } from './frame';

export interface Cursor {
  /** In the held-still frame, at the age of the picture it is on. */
  readonly at: Vec;
  readonly on: 'then' | 'now';
  /** The block under it, with the place on it in present coordinates. */
  readonly hit: Hit | null;
}

/** Where the cursor's ground lies in a frame; over no block it has no other place. */
export function cursorIn(cursor: Cursor | null, frame: Frame, when: 'then' | 'now'): Vec | null {
  if (!cursor) return null;
  if (cursor.on === when) return cursor.at;
  const pose = cursor.hit && matrixOf(frame, cursor.hit.block);
  return cursor.hit && pose ? turn(pose, vectorOf(cursor.hit.lat, cursor.hit.lon)) : null;
}

export interface Places {
  readonly block: string;
  readonly then: { readonly lat: number; readonly lon: number };
  readonly now: { readonly lat: number; readonly lon: number };
  readonly km: number;
}

/** A block's ground under the cursor then and now; null where one of the two has no place. */
export function placesUnder(cursor: Cursor | null, then: Frame, now: Frame): Places | null {
  if (!cursor?.hit) return null;
  const [a, b] = [cursorIn(cursor, then, 'then'), cursorIn(cursor, now, 'now')];
  return a && b ? { block: cursor.hit.block, then: placeOf(a), now: placeOf(b), km: distanceKm(a, b) } : null;
}
