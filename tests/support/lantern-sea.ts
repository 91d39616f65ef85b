/** The demo project's tables, read from the seed. */
import { readFileSync } from 'node:fs';
import { lanternScene } from './lantern-scene';

const read = (name: string): string =>
  readFileSync(new URL(`../../src/db/seed/lantern-sea/${name}`, import.meta.url), 'utf8');

export const lanternSea = () =>
  lanternScene({
    blocks: read('blocks.geojson'),
    features: read('features.geojson'),
    rotations: read('rotations.csv'),
    directions: read('directions.csv'),
  });
