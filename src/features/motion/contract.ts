/** Shapes of what the motion endpoints answer; the compiled model itself is the kernel's `Model`. */
import { z } from 'zod';
import { STATUSES, type Model } from '../../kernel/rotations/types';

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
