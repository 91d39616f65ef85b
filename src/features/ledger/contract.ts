/** Shapes of the ledger's rows and edits, shared by server and client. Names and units are those of the files. */
import { z } from 'zod';
import { BLOCK_KINDS, EVIDENCE, FEATURE_KINDS } from '../../kernel/rotations/types';
import { SLUG_LENGTH, SLUG_PATTERN } from '../../slug';

export const slug = z
  .string()
  .min(1)
  .max(SLUG_LENGTH)
  .regex(new RegExp(`^${SLUG_PATTERN}$`), 'lower-case letters, digits and single hyphens');

const age = z.number().min(0, 'a negative age').max(4600, 'older than the Earth');
const latitude = z.number().min(-90, 'latitude beyond 90°').max(90, 'latitude beyond 90°');
/** Longitudes are stored as entered, so that files round-trip; ±360° covers every way of writing one. */
const longitude = z.number().min(-360, 'longitude beyond 360°').max(360, 'longitude beyond 360°');
/** Spaces around a text mean nothing and would not survive a table. */
const upTo = (most: number) => z.string().trim().max(most, `more than ${most} characters`);
const text = upTo(2000);
const nullable = <T extends z.ZodType>(schema: T) => schema.nullable().default(null);

export const evidence = z.enum(EVIDENCE);
export const blockKind = z.enum(BLOCK_KINDS);
export const insideRule = z.enum(['smaller', 'larger']);

export const blockFields = z.object({
  code: slug,
  name: upTo(120).min(1, 'blank'),
  kind: blockKind,
  appears_ma: nullable(age),
  disappears_ma: nullable(age),
  evidence: evidence.default('unconstrained'),
  source: nullable(text),
  note: nullable(text),
});

/** An outline held for a part of a block's life; null ages mean the whole of it. */
export const outlineFields = z.object({
  block: slug,
  sha256: z.string().regex(/^[0-9a-f]{64}$/),
  outline_older_ma: nullable(age),
  outline_younger_ma: nullable(age),
  inside: insideRule.default('smaller'),
  source: nullable(text),
});

/** rad²; a standard deviation of more than a whole turn says nothing. */
const variance = z.number().min(-40, 'beyond ±40 rad²').max(40, 'beyond ±40 rad²');

/** Entries xx, xy, xz, yy, yz, zz in rad², in the present coordinates of the moving block. */
export const covariance = z.tuple([variance, variance, variance, variance, variance, variance]).readonly();

export const rotationFields = z.object({
  block: slug,
  relative_to: slug,
  age_ma: age,
  pole_lat: latitude,
  pole_lon: longitude,
  angle_deg: z.number().min(-720, 'more than two turns').max(720, 'more than two turns'),
  chron: nullable(upTo(40)),
  age_two_sigma_ma: nullable(z.number().min(0).max(1000)),
  evidence: evidence.default('unconstrained'),
  covariance: nullable(covariance),
  cov_dof: nullable(z.number().positive()),
  source: nullable(text),
  note: nullable(text),
});

/** Points and lines carried by a block; the geometry is stored once by hash. */
export const featureFields = z.object({
  block: slug,
  kind: z.enum(FEATURE_KINDS),
  name: upTo(200).default(''),
  sha256: z.string().regex(/^[0-9a-f]{64}$/),
  age_ma: nullable(age),
  appears_ma: nullable(age),
  disappears_ma: nullable(age),
  chron: nullable(upTo(40)),
  side: nullable(z.enum(['left', 'right', 'north', 'south', 'east', 'west'])),
  source: nullable(text),
  note: nullable(text),
});

export const directionFields = z.object({
  site: upTo(120).min(1, 'blank'),
  lat: latitude,
  lon: longitude,
  block: nullable(slug),
  age_ma: nullable(age),
  age_min_ma: nullable(age),
  age_max_ma: nullable(age),
  declination: nullable(z.number().min(-360).max(360)),
  inclination: nullable(z.number().min(-90).max(90)),
  strike: nullable(z.number().min(-360).max(360)),
  dip: nullable(z.number().min(-180).max(180)),
  n: nullable(z.number().int().min(1).max(1_000_000)),
  k: nullable(z.number().min(0).max(1e9)),
  alpha95: nullable(z.number().min(0).max(180)),
  polarity: nullable(z.enum(['normal', 'reversed', 'mixed', 'unknown'])),
  shallowing_f: nullable(z.number().positive().max(1)),
  rock: nullable(upTo(120)),
  source: nullable(text),
  note: nullable(text),
});

export const sourceFields = z.object({
  /** The name by which rows cite it, e.g. "Tolland et al. 2021". */
  cite: upTo(200).min(1, 'blank'),
  title: z.string().max(500).default(''),
  authors: z.array(z.string().max(200)).max(200).default([]),
  year: nullable(z.number().int().min(1600).max(2200)),
  container: nullable(z.string().max(300)),
  doi: nullable(z.string().max(200)),
  licence: nullable(z.string().max(120)),
  note: nullable(text),
});

const withId = { id: z.string() };
export const block = blockFields.extend({
  ...withId,
  outlines: z.array(outlineFields.omit({ block: true }).extend({ ...withId, vertices: z.number().int() })),
});
export const outline = outlineFields.extend({ ...withId, vertices: z.number().int() });
export const rotation = rotationFields.extend(withId);
export const feature = featureFields.extend({ ...withId, vertices: z.number().int() });
export const direction = directionFields.extend(withId);
export const source = sourceFields.extend(withId);

export type Block = z.infer<typeof block>;
export type BlockFields = z.infer<typeof blockFields>;
export type Outline = z.infer<typeof outline>;
export type OutlineFields = z.infer<typeof outlineFields>;
export type Rotation = z.infer<typeof rotation>;
export type RotationFields = z.infer<typeof rotationFields>;
export type Feature = z.infer<typeof feature>;
export type FeatureFields = z.infer<typeof featureFields>;
export type Direction = z.infer<typeof direction>;
export type DirectionFields = z.infer<typeof directionFields>;
export type Source = z.infer<typeof source>;
export type SourceFields = z.infer<typeof sourceFields>;

/** The tables of the ledger, as they stand in addresses: /api/projects/{slug}/{table}. */
export const TABLES = ['blocks', 'outlines', 'rotations', 'features', 'directions', 'sources'] as const;
export type Table = (typeof TABLES)[number];

/** What people enter in each table. */
export const FIELDS = {
  blocks: blockFields,
  outlines: outlineFields,
  rotations: rotationFields,
  features: featureFields,
  directions: directionFields,
  sources: sourceFields,
} as const satisfies Record<Table, z.ZodObject>;

/** What each table answers. */
export const ROWS = {
  blocks: block,
  outlines: outline,
  rotations: rotation,
  features: feature,
  directions: direction,
  sources: source,
} as const;
export type Row<T extends Table> = z.infer<(typeof ROWS)[T]>;

/** Every list answer: rows in natural order, the revision they were read at, a cursor for the next page. */
export const page = <T extends z.ZodType>(row: T) =>
  z.object({ items: z.array(row), revision: z.number().int(), next_cursor: z.string().nullable() });

/** Every edit's answer: the revision it made and the rows as they now stand (ids only, where deleted). */
export const editAnswer = <T extends z.ZodType>(row: T) =>
  z.object({ revision: z.number().int(), items: z.array(row), deleted: z.array(z.string()) });

/** One transaction of the change log, newest first in lists. */
export const changeEntry = z.object({
  revision: z.number().int(),
  action: z.enum(['edit', 'import', 'undo', 'redo', 'restore']),
  label: z.string(),
  actor: z.object({ id: z.string(), name: z.string() }).nullable(),
  at: z.iso.datetime(),
  rows: z.number().int(),
  changes: z
    .array(z.object({ entity: z.string(), entity_id: z.string(), before: z.unknown(), after: z.unknown() }))
    .optional(),
});
export type ChangeEntry = z.infer<typeof changeEntry>;

/** A geometry in longitude and latitude; stored once by the hash of its canonical form. */
export const geometry = z.object({
  type: z.enum(['Point', 'MultiPoint', 'LineString', 'MultiLineString', 'Polygon', 'MultiPolygon']),
  coordinates: z.array(z.unknown()),
});
export const outlineGeometry = geometry.extend({ type: z.enum(['Polygon', 'MultiPolygon']) });

/** What is sent to make a row: an outline or a feature brings its geometry, or names one that the project has by hash. */
export const CREATE = {
  ...FIELDS,
  outlines: outlineFields.partial({ sha256: true }).extend({ geometry: outlineGeometry.optional() }),
  features: featureFields.partial({ sha256: true }).extend({ geometry: geometry.optional() }),
} as const satisfies Record<Table, z.ZodObject>;

/** The most rows that one edit takes. */
export const MAX_EDITS = 5000;
const table = z.enum(TABLES);
const id = z.string().min(1).max(64);
/** Cells by column; each is checked against its table's fields, and an unknown column is refused. */
const cells = z.record(z.string(), z.unknown());

/** One row of an edit. A new row may bring its own id (a UUID), so that a screen can name it before the answer. */
export const edit = z.discriminatedUnion('op', [
  z.strictObject({ op: z.literal('create'), table, id: z.uuid().optional(), fields: cells }),
  z.strictObject({ op: z.literal('update'), table, id, fields: cells }),
  z.strictObject({ op: z.literal('delete'), table, id }),
]);
export type Edit = z.infer<typeof edit>;

/** POST …/edits: rows of any tables in one transaction, one step of undo. */
export const editBatch = z.strictObject({
  label: z.string().trim().min(1).max(200).optional(),
  edits: z.array(edit).min(1).max(MAX_EDITS),
});

/** The rows touched as they now stand, those of renamed or deleted blocks included. */
export const batchAnswer = z.object({
  revision: z.number().int(),
  items: z.array(z.object({ table, row: z.record(z.string(), z.unknown()) })),
  deleted: z.array(z.object({ table, id: z.string() })),
});
export type BatchAnswer = z.infer<typeof batchAnswer>;

export const changeList = z.object({
  items: z.array(changeEntry),
  revision: z.number().int(),
  next_cursor: z.string().nullable(),
  /** Labels of what undo and redo would do for the caller now; null where there is nothing. */
  undo: z.string().nullable(),
  redo: z.string().nullable(),
});
