/** The point of each block whose drift path is offered: its first named rock, else its first site, else the middle of its outline. */
import type { Geometry, MultiPolygon, Polygon } from 'geojson';
import type { Block, Direction, Feature } from '../ledger/contract';
import { toLatLon } from '../../kernel/sphere';
import { measured } from './slice/measured';
import { polygonVectors } from './slice/shapes';

export interface KnownPoint {
  readonly lat: number;
  readonly lon: number;
  /** "Gannet beds", "the middle of its outline". */
  readonly words: string;
}

interface Ledger {
  readonly blocks: readonly Block[];
  readonly features: readonly Feature[];
  readonly directions: readonly Direction[];
}

/** @param geometryOf gives the geometries of rocks and outlines. */
export function knownPoints(
  ledger: Ledger,
  geometryOf: (sha256: string) => Geometry,
): Record<string, KnownPoint> {
  const found = ledger.blocks.flatMap((block): [string, KnownPoint][] => {
    const point = rockOf(ledger, block, geometryOf) ?? siteOf(ledger, block) ?? middleOf(block, geometryOf);
    return point ? [[block.code, point]] : [];
  });
  return Object.fromEntries(found);
}

function rockOf(
  { features }: Ledger,
  { code }: Block,
  geometryOf: (sha256: string) => Geometry,
): KnownPoint | null {
  for (const { block, kind, sha256, name } of features) {
    if (block !== code || kind !== 'rock') continue;
    const shape = geometryOf(sha256);
    if (shape.type !== 'Point') continue;
    return { lat: shape.coordinates[1]!, lon: shape.coordinates[0]!, words: name || 'a rock of it' };
  }
  return null;
}

function siteOf({ directions }: Ledger, { code }: Block): KnownPoint | null {
  const site = directions.find(({ block }) => block === code);
  return site ? { lat: site.lat, lon: site.lon, words: site.site } : null;
}

function middleOf(
  { outlines: [outline] }: Block,
  geometryOf: (sha256: string) => Geometry,
): KnownPoint | null {
  if (!outline) return null;
  const shape = geometryOf(outline.sha256) as Polygon | MultiPolygon;
  const { lat, lon } = toLatLon(
    measured(shape, polygonVectors(shape, outline.inside), outline.inside).middle,
  );
  const tenth = (degrees: number): number => Math.round(degrees * 10) / 10;
  return { lat: tenth(lat), lon: tenth(lon), words: 'the middle of its outline' };
}
