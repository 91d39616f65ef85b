/** What a time-slice map is asked for, shared by the print page and the endpoints. */
import { z } from 'zod';
import {
  DEFAULT_PROJECTION,
  PROJECTION_NAMES,
  type ProjectionName,
} from '../../kernel/cartography/projections';
import { slug } from '../ledger/contract';
import { LAYERS, MOST_CAPTION, MOST_TITLE, USUAL_LAYERS, type Layer } from './choices';

/** Other spellings of projection names that people try. */
const ALIASES: ReadonlyMap<string, ProjectionName> = new Map([
  ['azimuthalequalarea', 'lambert-azimuthal'],
  ['lambertazimuthalequalarea', 'lambert-azimuthal'],
  ['lambert', 'lambert-azimuthal'],
  ['stereographic', 'polar-stereographic'],
  ['platecarree', 'equirectangular'],
]);
const plain = (name: string): string => name.toLowerCase().replace(/[^a-z]/g, '');
const projection = z
  .string()
  .default(DEFAULT_PROJECTION)
  .transform((name, context): ProjectionName => {
    const found = PROJECTION_NAMES.find((known) => plain(known) === plain(name)) ?? ALIASES.get(plain(name));
    if (found) return found;
    context.addIssue({
      code: 'custom',
      message: `not a projection known here: ${PROJECTION_NAMES.join(', ')}`,
    });
    return z.NEVER;
  });

const layers = z
  .string()
  .optional()
  .transform((text, context): Layer[] => {
    const names = text === undefined ? [...USUAL_LAYERS] : text.split(',').filter((name) => name !== '');
    const unknown = names.filter((name) => !LAYERS.some((layer) => layer === name));
    if (unknown.length === 0) return names as Layer[];
    context.addIssue({
      code: 'custom',
      message: `no such layer: ${unknown.join(', ')}; known are ${LAYERS.join(', ')}`,
    });
    return z.NEVER;
  });

/** A number in an address: a blank is missing, not 0. */
const number = (least: number, most: number) =>
  z
    .union([z.number(), z.string().trim().min(1).transform(Number)], { error: 'missing' })
    .refine((value) => Number.isFinite(value) && value >= least && value <= most, {
      error: `a number from ${least} to ${most} is meant, with a decimal point`,
    });

/** Words on a sheet. */
const words = (most: number) =>
  z.string().superRefine((text, context) => {
    const length = [...text].length;
    if (length <= most) return;
    const message = `has ${length} characters, and a sheet takes ${most} at most: shorten it by ${length - most}`;
    context.addIssue({ code: 'custom', message });
  });

const oneOf = <const T extends readonly [string, ...string[]]>(names: T) =>
  z.enum(names, { error: ({ input }) => `"${String(input)}" is not known here: ${names.join(', ')}` });

export const sliceQuery = z.object({
  version: z
    .union([
      z.literal('draft'),
      z
        .string()
        .regex(/^[1-9]\d{0,8}$/, '"draft" or a version’s number')
        .transform(Number),
    ])
    .optional(),
  age_ma: number(0, 4600),
  relative_to: slug.optional(),
  projection,
  centre_lat: number(-90, 90).default(0),
  centre_lon: number(-360, 360).default(0),
  /** Degrees from the centre to the edge of an azimuthal map. */
  reach_deg: number(1, 175).optional(),
  layers,
  paper: oneOf(['a3', 'a4', 'a5']).default('a4'),
  orientation: oneOf(['landscape', 'portrait']).default('landscape'),
  title: words(MOST_TITLE).optional(),
  caption: words(MOST_CAPTION).default(''),
  /** Drift path to draw: a block, a point of it in present coordinates, and a step. */
  path_block: slug.optional(),
  path_lat: number(-90, 90).optional(),
  path_lon: number(-360, 360).optional(),
  path_step_ma: number(0.1, 500).default(10),
  /** Resolution of a PNG. */
  dpi: number(50, 400).default(200),
});
export type SliceQuery = z.infer<typeof sliceQuery>;
