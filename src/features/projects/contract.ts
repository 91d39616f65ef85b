/** Shapes of projects, members and roles, shared by server and client. */
import { z } from 'zod';
import { slug } from '../ledger/contract';

export const ROLES = ['lead', 'researcher', 'reviewer', 'instructor'] as const;
export type Role = (typeof ROLES)[number];
export const VISIBILITIES = ['private', 'link', 'public'] as const;

export const createProject = z.object({
  title: z.string().trim().min(1).max(160),
  slug,
  summary: z.string().max(4000).default(''),
  visibility: z.enum(VISIBILITIES).default('private'),
  licence: z.string().max(120).nullable().default(null),
  /** True for a project on the real Earth: present coastlines can be cut from open data. */
  real_earth: z.boolean().default(false),
});
export const patchProject = createProject.omit({ slug: true }).partial();

export const project = createProject.extend({
  id: z.string(),
  revision: z.number().int(),
  /** The caller's role; null for a visitor. */
  role: z.enum(ROLES).nullable(),
  /** What the caller may do here, so that a button that cannot act can say why. */
  can: z.record(z.string(), z.boolean()),
  /** The newest released version's number, hash, title and date; null before the first. */
  latest_version: z
    .object({ number: z.number().int(), sha256: z.string(), title: z.string(), released_at: z.iso.datetime() })
    .nullable(),
  changes_since_version: z.number().int(),
  created_at: z.iso.datetime(),
});
export type Project = z.infer<typeof project>;
