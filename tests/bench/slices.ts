/**
 * Time slices: making the SVG of 100,000 vertices in 300 blocks against projecting the same vertices and writing
 * nothing, in one process and one run.
 */
import type { MultiPolygon } from 'geojson';
import { fitProjection } from '~/kernel/cartography/projections';
import { compileModel, type RotationInput } from '~/kernel/rotations';
import { carry } from '~/features/sheets/slice/carried';
import { sliceQuery } from '~/features/sheets/contract';
import { slicePage } from '~/features/sheets/slice/page';
import type { SliceSubject } from '~/features/sheets/slice/subject';

const BLOCKS = 300;
const VERTICES = 100_000;
const REPEATS = 5;

/** Blobs spread by the golden angle, each turning about a pole of its own. */
function subject(): SliceSubject {
  const perBlock = Math.floor(VERTICES / BLOCKS);
  const shapes = new Map<string, MultiPolygon>();
  const codes = Array.from({ length: BLOCKS }, (_, i) => `b${i}`);
  codes.forEach((code, i) => {
    const lat = (Math.asin(1 - (2 * (i + 0.5)) / BLOCKS) * 180) / Math.PI;
    const lon = ((i * 137.508) % 360) - 180;
    const ring = Array.from({ length: perBlock }, (_, k) => {
      const t = (2 * Math.PI * k) / perBlock;
      const r = 4 + 0.6 * Math.sin(7 * t + i) + 0.2 * Math.sin(31 * t);
      const y = Math.max(-89.9, Math.min(89.9, lat + r * Math.sin(t)));
      return [lon + (r * Math.cos(t)) / Math.max(0.1, Math.cos((y * Math.PI) / 180)), y];
    });
    shapes.set(code, { type: 'MultiPolygon', coordinates: [[[...ring, ring[0]!]]] });
  });
  const life = { appears_ma: null, disappears_ma: null };
  const rows = codes.flatMap(
    (block, i): RotationInput[] =>
    [0, 100].map((age_ma) => ({
      id: `${block} ${age_ma}`, block, relative_to: 'axis', age_ma, pole_lat: 40 - (i % 80), pole_lon: (i * 53) % 360 - 180,
      angle_deg: age_ma / 4, evidence: 'fitted', covariance: null, cov_dof: null, age_two_sigma_ma: null, source: null,
    })), // prettier-ignore
  );
  const inputs = [
    ...codes.map((code) => ({ code, kind: 'terrane' as const, ...life })),
    { code: 'axis', kind: 'frame' as const, ...life },
  ];
  return {
    title: 'Bench', version: 'Draft', licence: null, date: '', model: compileModel(inputs, rows), frame: { code: 'axis', name: 'Axis' },
    blocks: codes.map((code) => ({ code, name: code, evidence: 'fitted', source: null, outlines: [{ sha256: code, inside: 'smaller', outline_older_ma: null, outline_younger_ma: null, source: null }] })),
    coasts: [],
    geometryOf: (code) => shapes.get(code)!,
  }; // prettier-ignore
}

function median(work: () => unknown): number {
  const times = Array.from({ length: REPEATS }, () => {
    const start = performance.now();
    work();
    return performance.now() - start;
  });
  return times.sort((a, b) => a - b)[Math.floor(REPEATS / 2)]!;
}

export default function slices() {
  const given = subject();
  const query = sliceQuery.parse({ age_ma: '62.4', layers: '' });
  const projection = fitProjection(
    'equal-earth',
    { lat: 0, lon: 0 },
    { x: 0, y: 0, width: 800, height: 400 },
  );
  const carried = carry(given, 62.4, 'axis');
  const points = carried.blocks.flatMap(({ area }) => area.coordinates.flat(2));
  const bare = median(() => {
    let sum = 0;
    for (const point of points) sum += projection(point as [number, number])![0];
    return sum;
  });
  const page = median(() => slicePage({ subject: given, carried, query, path: null }));
  const whole = median(() =>
    slicePage({ subject: given, carried: carry(given, 62.4, 'axis'), query, path: null }),
  );
  const row = (name: string, ms: number) => ({
    name,
    ours: ms.toFixed(0),
    reference: bare.toFixed(0),
    ratio: (ms / bare).toFixed(1),
    unit: 'ms',
  });
  return [
    row(`SVG page of ${points.length} vertices (bare projection)`, page),
    row('the same, with carrying the outlines to the age', whole),
  ];
}
