/** Reads blocks.geojson: blocks with their outlines by age, frames without geometry. */
import type { MultiPolygon, Polygon } from 'geojson';
import { BLOCK_KINDS, EVIDENCE } from '../../../kernel/rotations/types';
import type { BlockFields, OutlineFields } from '../../ledger/contract';
import type { Answers, RejectedRow } from '../contract';
import { Asking } from './ask';
import { readFeatureCollection, unreadProperties, type LocatedFeature } from './geojson-text';
import { withoutHeights } from './heights';
import { alongStraightLines, followsStraightLines } from './long-edges';
import { outlineFaults, partsFault, readOutline } from './outline';
import { PropertyReader } from './properties';
import type { Candidate, FileReading } from './rotations';
import { ringFault } from './rings';
import { isSlug } from '../../../slug';
import { toSlug } from './slug';

export interface OutlineCandidate extends Omit<OutlineFields, 'block' | 'sha256'> {
  readonly line: number;
  readonly geometry: Polygon | MultiPolygon;
}

export interface BlockCandidate {
  readonly fields: BlockFields;
  readonly outlines: readonly OutlineCandidate[];
}

export type BlocksReading = FileReading<BlockCandidate>;

const KNOWN = new Set([
  'code', 'name', 'kind', 'appears_ma', 'disappears_ma', 'outline_older_ma', 'outline_younger_ma', 'inside',
  'evidence', 'source', 'note', 'outline_source',
]); // prettier-ignore

export function readBlocks(text: string, answers: Answers = {}): BlocksReading {
  const asking = new Asking(answers);
  const { features: read, rejected } = readFeatureCollection(text);
  const { features, notes } = withoutHeights(read, asking);
  const reader = new PropertyReader(asking);
  const swapped = outlineFaults.swapped(features, asking);
  const parts = withoutHalves(
    features,
    features.map((feature) => readFeature(feature, reader, asking, swapped)),
    reader,
  );
  const all = [...rejected, ...reader.rejected];
  const straight = followsStraightLines(
    parts.flatMap(({ outline }) => outline ?? []),
    asking,
  );
  const candidates = gather(straight ? parts.flatMap((part) => straightened(part, all)) : parts, all);
  return { candidates, rejected: all, asking, notes: [...notes, ...notesOf(features)] };
}

/** Features of one code are one block: where one of them is rejected, the others would be a part of it unasked. */
function withoutHalves(
  features: readonly LocatedFeature[],
  read: readonly (Part | null)[],
  reader: PropertyReader,
): Part[] {
  const broken = new Map<unknown, LocatedFeature>();
  features.forEach((feature, i) => {
    if (!read[i]) broken.set(feature.properties['code'], feature);
  });
  return features.flatMap((feature, i) => {
    const part = read[i];
    if (!part) return [];
    const other = broken.get(part.fields.code);
    if (!other) return [part];
    const where = other.line === feature.line ? `feature ${other.index + 1}` : `line ${other.line}`;
    const hint = 'Mend that one first: features of one code are outlines by age of one block.';
    reader.reject(feature, 'code', `the code of ${where}, which is rejected`, hint);
    return [];
  });
}

interface Part {
  readonly line: number;
  readonly entry: number;
  readonly fields: BlockFields;
  readonly outline: OutlineCandidate | null;
}

/** Great circles that keep clear of one another may still cross as straight lines: rings are checked again. */
function straightened(part: Part, rejected: RejectedRow[]): Part[] {
  if (!part.outline) return [part];
  const geometry = alongStraightLines(part.outline.geometry);
  const polygons = geometry.type === 'Polygon' ? [geometry.coordinates] : geometry.coordinates;
  const { inside } = part.outline;
  const fault =
    polygons
      .flat()
      .map(ringFault)
      .find((found) => found !== null) ?? partsFault(polygons, inside);
  if (!fault) return [{ ...part, outline: { ...part.outline, geometry } }];
  rejected.push({ line: part.line, entry: part.entry, column: 'geometry', ...fault });
  return [];
}

function readFeature(
  feature: LocatedFeature,
  reader: PropertyReader,
  asking: Asking,
  swapped: boolean,
): Part | null {
  const before = reader.rejected.length;
  const code = reader.text(feature, 'code') ?? '';
  if (!isSlug(code)) {
    const from = toSlug(code || (reader.text(feature, 'name') ?? ''));
    const problem = code === '' ? 'no code' : 'not a code: lower-case letters, digits and hyphens';
    reader.reject(feature, 'code', problem, from ? `Write ${from}?` : 'Give each block a short code.');
  }
  const kind = reader.word(feature, 'kind', BLOCK_KINDS, feature.geometry ? 'other' : 'frame');
  const evidence = reader.word(feature, 'evidence', EVIDENCE, 'unconstrained');
  const inside = reader.word(feature, 'inside', ['smaller', 'larger'] as const, null);
  const ages = ['appears_ma', 'disappears_ma', 'outline_older_ma', 'outline_younger_ma'].map((c) =>
    reader.age(feature, c),
  );
  const [appears_ma, disappears_ma, outline_older_ma, outline_younger_ma] = ages as (number | null)[];
  if (appears_ma != null && disappears_ma != null && disappears_ma >= appears_ma) {
    reader.reject(
      feature,
      'disappears_ma',
      'the block disappears before it appears',
      'appears_ma is the older age, disappears_ma the younger.',
    );
  }
  if (outline_older_ma != null && outline_younger_ma != null && outline_younger_ma >= outline_older_ma) {
    reader.reject(
      feature,
      'outline_younger_ma',
      'the outline ends before it begins',
      'outline_older_ma is the older age.',
    );
  }
  if (kind === 'frame' && feature.geometry) {
    reader.reject(
      feature,
      'geometry',
      'a frame has no outline',
      'Set the geometry to null, or give the block another kind.',
      feature.geometry.type,
    );
  }
  const outline =
    feature.geometry && reader.rejected.length === before
      ? readOutline(feature, inside ?? null, reader, asking, swapped)
      : null;
  if (reader.rejected.length > before) return null;
  const fields: BlockFields = {
    code,
    name: reader.text(feature, 'name') ?? code,
    kind: kind ?? 'other',
    appears_ma: appears_ma ?? null,
    disappears_ma: disappears_ma ?? null,
    evidence: evidence ?? 'unconstrained',
    source: reader.text(feature, 'source'),
    note: reader.text(feature, 'note'),
  };
  const span = { outline_older_ma: outline_older_ma ?? null, outline_younger_ma: outline_younger_ma ?? null };
  return {
    line: feature.line,
    entry: feature.index + 1,
    fields,
    outline: outline && {
      line: feature.line,
      ...span,
      inside: outline.inside,
      source: reader.text(feature, 'outline_source'),
      geometry: outline.geometry,
    },
  };
}

/** Features of one code become one block with outlines by age; the block's own fields must agree. */
function gather(parts: readonly Part[], rejected: RejectedRow[]): Candidate<BlockCandidate>[] {
  const byCode = new Map<string, { line: number; fields: BlockFields; outlines: OutlineCandidate[] }>();
  for (const part of parts) {
    const { code } = part.fields;
    const block = byCode.get(code);
    if (!block) {
      byCode.set(code, {
        line: part.line,
        fields: part.fields,
        outlines: part.outline ? [part.outline] : [],
      });
      continue;
    }
    const differs = (Object.keys(part.fields) as (keyof BlockFields)[]).find(
      (k) => part.fields[k] !== block.fields[k],
    );
    const overlap = part.outline && block.outlines.find((o) => overlapping(o, part.outline!));
    const row = { line: part.line, entry: part.entry, column: 'code', read: code };
    if (differs) {
      const problem = `${differs} differs from line ${block.line} of the same code`;
      rejected.push({
        ...row,
        problem,
        hint: 'Several features of one code are outlines by age of one block: give them equal properties.',
      });
    } else if (!part.outline || overlap) {
      const problem = `a second outline at the same ages as line ${overlap ? overlap.line : block.line}`;
      rejected.push({
        ...row,
        problem,
        hint: 'Say when each holds in outline_older_ma and outline_younger_ma, or join them as a MultiPolygon.',
      });
    } else block.outlines.push(part.outline);
  }
  return [...byCode.values()].map(({ line, fields, outlines }) => ({ line, fields: { fields, outlines } }));
}

function overlapping(a: OutlineCandidate, b: OutlineCandidate): boolean {
  const older = Math.min(a.outline_older_ma ?? Infinity, b.outline_older_ma ?? Infinity);
  const younger = Math.max(a.outline_younger_ma ?? -1, b.outline_younger_ma ?? -1);
  return younger < older;
}

function notesOf(features: readonly LocatedFeature[]): string[] {
  const notes = unreadProperties(features, KNOWN);
  if (features.some((f) => outlineFaults.beyond180(f))) {
    notes.push('Longitudes beyond 180° are kept as they are written; they mean the same places.');
  }
  return notes;
}
