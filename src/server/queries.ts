import { z } from 'zod';

/** Numbers in addresses: a blank is missing, not 0. */
export const queryNumber = z
  .string()
  .trim()
  .min(1, 'missing')
  .transform(Number)
  .refine((value) => Number.isFinite(value), 'not a finite number');

export const queryLatitude = queryNumber.refine((value) => Math.abs(value) <= 90, 'latitude outside ±90°');
export const queryLongitude = queryNumber.refine(
  (value) => Math.abs(value) <= 360,
  'longitude outside ±360°',
);

/** `draft` or a number; without it, the draft for those who may see it and the newest version for others. */
export const queryVersion = z
  .union([
    z.literal('draft'),
    z
      .string()
      .regex(/^[1-9]\d{0,8}$/, '"draft" or a version’s number')
      .transform(Number),
  ])
  .optional();

export const MAX_LIST = 500;
export const queryPage = {
  limit: queryNumber
    .refine((n) => Number.isInteger(n) && n >= 1 && n <= MAX_LIST, `1 to ${MAX_LIST}`)
    .default(MAX_LIST),
  cursor: z.string().max(400).optional(),
};
