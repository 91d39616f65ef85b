/** Worker task: cuts the present coastline (Natural Earth 1:50 million, in the world-atlas package) by outlines. */
import { createRequire } from 'node:module';
import fs from 'node:fs';
import type { MultiPolygon, Polygon as GeoPolygon } from 'geojson';
import { mesh } from 'topojson-client';
import type { GeometryObject, Topology } from 'topojson-specification';
import { readRing } from '../../kernel/sphere';
import { coastVectors, cutCoast, type Line } from './rules/cut-coast';

export interface CoastJob {
  readonly blocks: readonly {
    readonly code: string;
    readonly outlines: readonly {
      readonly geometry: GeoPolygon | MultiPolygon;
      readonly inside: 'smaller' | 'larger';
    }[];
  }[];
}

export interface CutCoast {
  readonly code: string;
  readonly lines: [number, number][][];
}

const require = createRequire(import.meta.url);
let coast: Line[] | undefined;

function coastline(): Line[] {
  if (coast) return coast;
  const file = require.resolve('world-atlas/land-50m.json');
  const topology = JSON.parse(fs.readFileSync(file, 'utf8')) as Topology<{ land: GeometryObject }>;
  coast = coastVectors(mesh(topology, topology.objects.land).coordinates);
  return coast;
}

export default function cut({ blocks }: CoastJob): CutCoast[] {
  return blocks.map(({ code, outlines }) => ({
    code,
    lines: outlines.flatMap(({ geometry, inside }) => {
      const polygons = geometry.type === 'Polygon' ? [geometry.coordinates] : geometry.coordinates;
      return polygons.flatMap((rings) => cutCoast(coastline(), rings.map(readRing), inside));
    }),
  }));
}
