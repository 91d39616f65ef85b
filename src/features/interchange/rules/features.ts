/** Reads features.geojson: points and lines carried by a block. */
import type { Geometry, Position } from 'geojson';
import { FEATURE_KINDS } from '../../../kernel/rotations/types';
import type { FeatureFields } from '../../ledger/contract';
import type { Answers } from '../contract';
import { Asking } from './ask';
import { readFeatureCollection, unreadProperties, type LocatedFeature } from './geojson-text';
import { withoutHeights } from './heights';
import { alongStraightLines, followsStraightLines } from './long-edges';
import { PropertyReader } from './properties';
import type { FileReading } from './rotations';
import { isSlug } from '../../../slug';
import { toSlug } from './slug';

export interface FeatureCandidate {
  readonly fields: Omit<FeatureFields, 'sha256'>;
  readonly geometry: Geometry;
}

const KNOWN = new Set([
  'block', 'kind', 'name', 'age_ma', 'appears_ma', 'disappears_ma', 'chron', 'side', 'source', 'note',
]); // prettier-ignore
const SIDES = ['left', 'right', 'north', 'south', 'east', 'west'] as const;
const SHAPES = ['Point', 'MultiPoint', 'LineString', 'MultiLineString', 'Polygon', 'MultiPolygon'] as const;

/** @param blocks codes of the project's blocks: a feature is carried by one of them. */
export function readFeatures(
  text: string,
  blocks: ReadonlySet<string>,
  answers: Answers = {},
): FileReading<FeatureCandidate> {
  const asking = new Asking(answers);
  const { features: located, rejected } = readFeatureCollection(text);
  const { features, notes } = withoutHeights(located, asking);
  const reader = new PropertyReader(asking);
  const read = features
    .map((feature) => ({ line: feature.line, fields: readOne(feature, reader, blocks) }))
    .filter((c): c is { line: number; fields: FeatureCandidate } => c.fields !== null);
  const lines = read.map(({ line, fields }) => ({ line, geometry: fields.geometry }));
  const candidates = followsStraightLines(lines, asking)
    ? read.map(({ line, fields }) => ({
        line,
        fields: { ...fields, geometry: alongStraightLines(fields.geometry) },
      }))
    : read;
  return {
    candidates,
    rejected: [...rejected, ...reader.rejected],
    asking,
    notes: [...notes, ...unreadProperties(features, KNOWN)],
  };
}

function readOne(
  feature: LocatedFeature,
  reader: PropertyReader,
  blocks: ReadonlySet<string>,
): FeatureCandidate | null {
  const before = reader.rejected.length;
  const block = reader.text(feature, 'block') ?? '';
  if (!isSlug(block) || !blocks.has(block)) {
    const hint = blocks.has(toSlug(block))
      ? `Write ${toSlug(block)}?`
      : 'Import the block first, or correct the code.';
    reader.reject(feature, 'block', block === '' ? 'no block' : 'not a block of the project', hint);
  }
  const kind = reader.word(feature, 'kind', FEATURE_KINDS, null);
  if (kind === null) reader.reject(feature, 'kind', 'no kind', `Write one of: ${FEATURE_KINDS.join(', ')}.`);
  const side = reader.word(feature, 'side', SIDES, null);
  const [age_ma, appears_ma, disappears_ma] = ['age_ma', 'appears_ma', 'disappears_ma'].map((c) =>
    reader.age(feature, c),
  );
  if (appears_ma != null && disappears_ma != null && disappears_ma >= appears_ma) {
    reader.reject(
      feature,
      'disappears_ma',
      'it disappears before it appears',
      'appears_ma is the older age, disappears_ma the younger.',
    );
  }
  const { geometry } = feature;
  if (!geometry || !SHAPES.some((shape) => shape === geometry.type)) {
    reader.reject(
      feature,
      'geometry',
      'no points or lines',
      'Give a point, a line or a multi-part of them.',
      geometry?.type ?? 'null',
    );
  } else if (!inRange((geometry as { coordinates: unknown }).coordinates)) {
    reader.reject(
      feature,
      'geometry',
      'a position off the globe',
      'Positions are [longitude, latitude]: latitude within 90°.',
      geometry.type,
    );
  }
  if (reader.rejected.length > before || !kind || !geometry) return null;
  const fields = {
    block,
    kind,
    name: reader.text(feature, 'name') ?? '',
    age_ma: age_ma ?? null,
    appears_ma: appears_ma ?? null,
    disappears_ma: disappears_ma ?? null,
    chron: reader.text(feature, 'chron'),
    side: side ?? null,
    source: reader.text(feature, 'source'),
    note: reader.text(feature, 'note'),
  };
  return { fields, geometry };
}

function inRange(node: unknown): boolean {
  if (!Array.isArray(node) || node.length === 0) return false;
  if (!Array.isArray(node[0])) {
    const [lon, lat] = node as Position;
    return Number.isFinite(lon) && Number.isFinite(lat) && Math.abs(lat!) <= 90 && Math.abs(lon!) <= 540;
  }
  return node.every(inRange);
}
