/** The demo project's tables as a scene, from the text of its four files. */
import { compileModel } from '../../src/kernel/rotations';
import {
  EVIDENCE,
  type BlockInput,
  type Covariance,
  type Evidence,
  type RotationInput,
} from '../../src/kernel/rotations/types';
import type { Direction } from '../../src/features/ledger/contract';
import { lineShape, polygonShape } from '../../src/features/motion/globe/shape';
import { sceneOf, type Scene, type SceneLine, type ScenePoint } from '../../src/features/motion/scene/scene';

export interface LanternFiles {
  readonly blocks: string;
  readonly features: string;
  readonly rotations: string;
  readonly directions: string;
}

interface FeatureCollection {
  readonly features: readonly {
    readonly properties: Readonly<Record<string, unknown>>;
    readonly geometry: { readonly type: string; readonly coordinates: unknown } | null;
  }[];
}

/** Rows of a table without quoted cells; blank cells are null. */
function table(text: string): Record<string, string | null>[] {
  const [head = '', ...lines] = text.trim().split(/\r?\n/);
  const names = head.split(',');
  return lines.map((line) =>
    Object.fromEntries(line.split(',').map((cell, i) => [names[i] ?? '', cell === '' ? null : cell])),
  );
}

const num = (cell: string | null | undefined): number | null =>
  cell === null || cell === undefined ? null : Number(cell);
const text = (value: unknown): string => (typeof value === 'string' ? value : '');

export function rotationsOf(csv: string): RotationInput[] {
  return table(csv).map((row, i) => {
    const covariance = ['xx', 'xy', 'xz', 'yy', 'yz', 'zz'].map((entry) => num(row[`cov_${entry}`]));
    return {
      id: `r${i + 1}`,
      block: row['block'] ?? '',
      relative_to: row['relative_to'] ?? '',
      age_ma: Number(row['age_ma']),
      pole_lat: Number(row['pole_lat']),
      pole_lon: Number(row['pole_lon']),
      angle_deg: Number(row['angle_deg']),
      evidence: EVIDENCE.find((name) => name === row['evidence']) ?? 'unconstrained',
      covariance: covariance.every((entry) => entry !== null) ? (covariance as unknown as Covariance) : null,
      cov_dof: null,
      age_two_sigma_ma: null,
      source: row['source'] ?? null,
    };
  });
}

export function directionsOf(csv: string): Direction[] {
  return table(csv).map((row, i) => ({
    id: `d${i + 1}`,
    site: row['site'] ?? '',
    lat: Number(row['lat']),
    lon: Number(row['lon']),
    block: row['block'] ?? null,
    age_ma: num(row['age_ma']),
    age_min_ma: num(row['age_min_ma']),
    age_max_ma: num(row['age_max_ma']),
    declination: num(row['declination']),
    inclination: num(row['inclination']),
    strike: null,
    dip: null,
    n: num(row['n']),
    k: num(row['k']),
    alpha95: num(row['alpha95']),
    polarity: null,
    shallowing_f: null,
    rock: row['rock'] ?? null,
    source: null,
    note: null,
  }));
}

export function lanternScene(files: LanternFiles): Scene {
  const { features: outlines } = JSON.parse(files.blocks) as FeatureCollection;
  const { features } = JSON.parse(files.features) as FeatureCollection;
  const blocks = outlines.map(({ properties, geometry }) => ({
    code: text(properties['code']),
    name: text(properties['name']),
    kind: text(properties['kind']) as BlockInput['kind'],
    evidence: (properties['evidence'] ?? 'unconstrained') as Evidence,
    outlines: geometry ? [{ shape: polygonShape(geometry), older_ma: null, younger_ma: null }] : [],
  }));
  const carried = features.map(({ properties, geometry }) => ({
    block: text(properties['block']),
    kind: text(properties['kind']),
    name: text(properties['name']),
    appears_ma: (properties['appears_ma'] ?? null) as number | null,
    disappears_ma: (properties['disappears_ma'] ?? null) as number | null,
    geometry,
  }));
  const lines = carried.flatMap(({ geometry, ...rest }): SceneLine[] =>
    geometry && geometry.type !== 'Point' ? [{ ...rest, shape: lineShape(geometry) }] : [],
  );
  const points = carried.flatMap(({ geometry, ...rest }): ScenePoint[] => {
    if (geometry?.type !== 'Point') return [];
    const [lon = 0, lat = 0] = geometry.coordinates as number[];
    return [{ ...rest, lat, lon }];
  });
  const inputs = blocks.map(({ code, kind }) => ({ code, kind, appears_ma: null, disappears_ma: null }));
  return sceneOf({
    title: 'Closing of the Lantern Sea',
    model: compileModel(inputs, rotationsOf(files.rotations)),
    blocks,
    lines,
    points,
    directions: directionsOf(files.directions),
  });
}
