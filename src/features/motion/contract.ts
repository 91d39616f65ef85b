/** Shapes of what the motion endpoints answer; the compiled model itself is the kernel's `Model`. */
import { z } from 'zod';
import { STATUSES, type Model } from '../../kernel/rotations/types';
import { covariance, evidence } from '../ledger/contract';

export const status = z.enum(STATUSES);

export const ellipse95 = z.object({
  semi_major_km: z.number(),
  semi_minor_km: z.number(),
  azimuth_deg: z.number(),
  at_least: z.boolean(),
});

export const driftPoint = z.object({
  age_ma: z.number(),
  lat: z.number().nullable(),
  lon: z.number().nullable(),
  speed_mm_yr: z.number().nullable(),
  azimuth_deg: z.number().nullable(),
  at_row: z.boolean(),
  status,
  ellipse_95: ellipse95.nullable(),
});

export const driftPath = z.object({
  block: z.string(),
  relative_to: z.string(),
  version: z.union([z.literal('draft'), z.number().int()]),
  points: z.array(driftPoint),
});
export type DriftPathAnswer = z.infer<typeof driftPath>;

/** GET …/motions: the compiled model, with the revision (draft) or hash (version) it was compiled from. */
export interface MotionsAnswer extends Model {
  readonly version: 'draft' | number;
  readonly revision: number;
}

const version = z.union([z.literal('draft'), z.number().int()]);
const quaternion = z.tuple([z.number(), z.number(), z.number(), z.number()]);
/** Null where there is no rotation; the longitude of a pole at 90° means nothing and is 0. */
const pole = {
  pole_lat: z.number().nullable(),
  pole_lon: z.number().nullable(),
  angle_deg: z.number().nullable(),
};

/** A link of the circuit in use at an age: between which rows, how far along, on whose authority. */
export const chainLink = z.object({
  block: z.string(),
  relative_to: z.string(),
  /** `down` where the circuit passes the link against its sense, as an inverse. */
  direction: z.enum(['up', 'down']),
  older_ma: z.number(),
  younger_ma: z.number(),
  fraction: z.number(),
  source: z.string().nullable(),
  evidence: z.array(evidence),
  /** Ids of the rows, younger first; an implied identity at 0 Ma has none. */
  rotations: z.array(z.string()),
});

export const rotationAnswer = z.object({
  block: z.string(),
  relative_to: z.string(),
  age_ma: z.number(),
  version,
  status,
  ...pole,
  quaternion: quaternion.nullable(),
  /** Of u in R = R̂ Exp(u), rad², in the block's present coordinates; null where nothing is known of it. */
  covariance: covariance.nullable(),
  uncertainty: z.string().nullable(),
  chain: z.array(chainLink),
});
export type RotationAnswer = z.infer<typeof rotationAnswer>;

export const stageAnswer = z.object({
  block: z.string(),
  relative_to: z.string(),
  older_ma: z.number(),
  younger_ma: z.number(),
  /** In whose coordinates the pole stands. */
  in: z.enum(['reference', 'block']),
  version,
  status,
  ...pole,
  quaternion: quaternion.nullable(),
});
export type StageAnswer = z.infer<typeof stageAnswer>;

export const quaternionsAnswer = z.object({
  age_ma: z.number(),
  relative_to: z.string(),
  version,
  blocks: z.array(z.object({ block: z.string(), status, quaternion: quaternion.nullable() })),
});
export type QuaternionsAnswer = z.infer<typeof quaternionsAnswer>;

export const velocityAnswer = z.object({
  block: z.string(),
  relative_to: z.string(),
  age_ma: z.number(),
  version,
  status,
  /** Where the point was at that age. */
  lat: z.number().nullable(),
  lon: z.number().nullable(),
  east_mm_yr: z.number().nullable(),
  north_mm_yr: z.number().nullable(),
  speed_mm_yr: z.number().nullable(),
  azimuth_deg: z.number().nullable(),
  /** Ages between which it holds. */
  older_ma: z.number().nullable(),
  younger_ma: z.number().nullable(),
  window_myr: z.number(),
  /** True where the window reached past the sequence and was cut. */
  clipped: z.boolean(),
});
export type VelocityAnswer = z.infer<typeof velocityAnswer>;

/** What `reconstruct` reads: a feature names its block in `properties.block`, or is found in the outlines. */
const geometry = z.object({
  type: z.enum(['Point', 'MultiPoint', 'LineString', 'MultiLineString', 'Polygon', 'MultiPolygon']),
  coordinates: z.array(z.unknown()),
});
const feature = z.looseObject({
  type: z.literal('Feature'),
  properties: z.record(z.string(), z.unknown()).nullable().default(null),
  geometry,
});
export const places = z.union([
  z.looseObject({ type: z.literal('FeatureCollection'), features: z.array(feature).max(20_000) }),
  feature,
  geometry,
]);
export type Places = z.infer<typeof places>;
export type PlaceFeature = z.infer<typeof feature>;
