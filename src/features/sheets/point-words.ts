import type { SliceSettings } from './address';
import type { KnownPoint } from './known-points';

type Point = Pick<SliceSettings, 'path_block' | 'path_lat' | 'path_lon'>;

const same = (a: Point, b: Point): boolean => a.path_lat === b.path_lat && a.path_lon === b.path_lon;

/** Which point of the block a drift path is drawn through, as the form says it. */
export function pointWords(settings: Point, opened: Point, known: KnownPoint | undefined): string {
  if (settings.path_lat === null || settings.path_lon === null)
    return 'No point yet: type one, and its path is drawn.';
  if (known && settings.path_lat === known.lat && settings.path_lon === known.lon)
    return `Through ${known.words}; type another point to draw its path.`;
  if (settings.path_block === opened.path_block && same(settings, opened))
    return 'Through the point that the link passes; type another to draw its path.';
  return 'Through the point typed here.';
}
