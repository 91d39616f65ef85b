/** Outlines on the wire: bytes and decoding time of the quantised form against the same outlines as GeoJSON. */
import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { gzipSync } from 'node:zlib';
import type { FeatureCollection, MultiPolygon } from 'geojson';
import { feature } from 'topojson-client';
import type { GeometryCollection, Topology } from 'topojson-specification';
import {
  decodeOutline,
  encodeOutline,
  outlineVectors,
  type OutlineGeometry,
} from '~/kernel/cartography/outline-codec';
import { toVector } from '~/kernel/sphere';

const REPEATS = 9;

function median(work: () => unknown): number {
  const times = Array.from({ length: REPEATS }, () => {
    const start = performance.now();
    work();
    return performance.now() - start;
  });
  return times.sort((a, b) => a - b)[Math.floor(REPEATS / 2)]!;
}

export default function outlines() {
  const file = createRequire(`${process.cwd()}/package.json`).resolve('world-atlas/land-50m.json');
  const topology = JSON.parse(readFileSync(file, 'utf8')) as Topology<{ land: GeometryCollection }>;
  const { features } = feature(topology, topology.objects.land) as FeatureCollection<MultiPolygon>;
  const land = features[0]!.geometry;
  const rounded = land.coordinates.map((rings) =>
    rings.map((ring) =>
      ring.map(([lon, lat]) => [Math.round(lon! * 1e4) / 1e4, Math.round(lat! * 1e4) / 1e4]),
    ),
  );
  const geometry = { type: 'MultiPolygon', coordinates: rounded } as unknown as OutlineGeometry;
  const text = JSON.stringify(geometry);
  const bytes = encodeOutline(geometry);
  const vertices = rounded.flat(2).length;
  const ours = median(() => outlineVectors(decodeOutline(bytes)));
  const theirs = median(() => {
    const read = JSON.parse(text) as MultiPolygon;
    return read.coordinates.map((rings) =>
      rings.map((ring) => ring.map(([lon, lat]) => toVector(lat!, lon!))),
    );
  });
  const kb = (n: number): string => (n / 1000).toFixed(0);
  return [
    {
      name: `bytes of ${vertices} vertices (GeoJSON, four decimals)`,
      ours: kb(bytes.length),
      reference: kb(text.length),
      ratio: (bytes.length / text.length).toFixed(3),
      unit: 'kB',
    },
    {
      name: 'the same, both by gzip',
      ours: kb(gzipSync(bytes).length),
      reference: kb(gzipSync(text).length),
      ratio: (gzipSync(bytes).length / gzipSync(text).length).toFixed(3),
      unit: 'kB',
    },
    {
      name: 'decoding to unit vectors (JSON.parse and the same vectors)',
      ours: ours.toFixed(1),
      reference: theirs.toFixed(1),
      ratio: (ours / theirs).toFixed(2),
      unit: 'ms',
    },
  ];
}
