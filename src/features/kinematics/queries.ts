import { z } from 'zod';
import { slug } from '~/features/ledger/contract';
import { queryLatitude, queryLongitude, queryNumber, queryVersion } from '~/server/queries';

const span = {
  older_ma: queryNumber,
  younger_ma: queryNumber.default(0),
  step_ma: queryNumber.default(5),
};
const format = z.enum(['json', 'csv']).default('json');

export const convergenceQuery = z.object({
  version: queryVersion,
  /** B, left of the margin looking along its azimuth. */
  block: slug,
  /** A, right of it; left out, what the project holds still. */
  relative_to: slug.optional(),
  /** Whose coordinates place and azimuth are in; left out, those of A. */
  coordinates_of: slug.optional(),
  lat: queryLatitude,
  lon: queryLongitude,
  margin_azimuth: queryNumber.refine((value) => Math.abs(value) <= 360, 'an azimuth outside ±360°'),
  ...span,
  format,
});

export const separationQuery = z.object({
  version: queryVersion,
  block_a: slug,
  block_b: slug,
  /** Whose coordinates the nearest places are in; left out, those of block_a. */
  coordinates_of: slug.optional(),
  ...span,
  /** Two blocks no further apart are in contact. */
  tolerance_km: queryNumber.default(0),
  format,
});

export const flowLineQuery = z.object({
  version: queryVersion,
  block_a: slug,
  block_b: slug,
  /** The ridge point at younger_ma. */
  lat: queryLatitude,
  lon: queryLongitude,
  coordinates_of: slug.optional(),
  ...span,
  fraction: queryNumber.default(0.5),
  format,
});
