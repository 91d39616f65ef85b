/** Shapes of what is said of two blocks and of the motion between them. */
import { z } from 'zod';
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
