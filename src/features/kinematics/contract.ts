/** Shapes of what is said of two blocks and of the motion between them. */
import { z } from 'zod';
import { STATUSES } from '../../kernel/rotations/types';
import { status } from '../motion/contract';

const version = z.union([z.literal('draft'), z.number().int()]);

export const convergencePoint = z.object({
  age_ma: z.number(),
  /** Towards 90° right of the margin's azimuth, closing; null where there is no motion to speak of. */
  normal_mm_yr: z.number().nullable(),
  /** Along the margin's azimuth. */
  tangential_mm_yr: z.number().nullable(),
  speed_mm_yr: z.number().nullable(),
  azimuth_deg: z.number().nullable(),
  /** Between the relative velocity and the normal, 0 to 90. */
  obliquity_deg: z.number().nullable(),
  at_row: z.boolean(),
  status,
});

export const convergenceAnswer = z.object({
  block: z.string(),
  relative_to: z.string(),
  coordinates_of: z.string(),
  lat: z.number(),
  lon: z.number(),
  margin_azimuth: z.number(),
  version,
  points: z.array(convergencePoint),
});
export type ConvergenceAnswer = z.infer<typeof convergenceAnswer>;

const place = z.object({ lat: z.number(), lon: z.number() });

export const separationPoint = z.object({
  age_ma: z.number(),
  /** 0 where the two overlap or touch. */
  distance_km: z.number().nullable(),
  overlap_km2: z.number().nullable(),
  /** Of the smaller of the two. */
  overlap_percent: z.number().nullable(),
  /** The nearest place of each, in the coordinates asked for. */
  nearest_a: place.nullable(),
  nearest_b: place.nullable(),
  at_row: z.boolean(),
  status: z.enum([...STATUSES, 'no outline']),
});

export const firstContact = z.discriminatedUnion('status', [
  z.object({
    status: z.literal('contact'),
    age_ma: z.number(),
    older_ma: z.number(),
    younger_ma: z.number(),
    /** By motion; in contact as soon as both have a place and an outline; or across a jump. */
    by: z.enum(['motion', 'first place', 'jump']),
  }),
  z.object({ status: z.literal('apart'), least_km: z.number(), least_ma: z.number() }),
  z.object({ status: z.literal('not placed') }),
]);

export const separationAnswer = z.object({
  block_a: z.string(),
  block_b: z.string(),
  coordinates_of: z.string(),
  tolerance_km: z.number(),
  version,
  points: z.array(separationPoint),
  /** Forward in time, the first age at which the separation falls to the tolerance; null where it never does. */
  first_contact_ma: z.number().nullable(),
  first_contact: firstContact,
});
export type SeparationAnswer = z.infer<typeof separationAnswer>;

const flank = z.object({ lat: z.number(), lon: z.number(), rate_mm_yr: z.number().nullable() });

export const flowLineAnswer = z.object({
  block_a: z.string(),
  block_b: z.string(),
  coordinates_of: z.string(),
  lat: z.number(),
  lon: z.number(),
  /** Share of the opening that block_a gains. */
  fraction: z.number(),
  version,
  points: z.array(
    z.object({
      age_ma: z.number(),
      /** Sea floor of that age today, on each block in its own present coordinates. */
      a: flank.nullable(),
      b: flank.nullable(),
      full_rate_mm_yr: z.number().nullable(),
      at_row: z.boolean(),
      status,
    }),
  ),
});
export type FlowLineAnswer = z.infer<typeof flowLineAnswer>;
