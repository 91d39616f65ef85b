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
/** Each field as it is to be; what is left out stays. */
export const patchProject = z
  .strictObject({
    title: z.string().trim().min(1).max(160),
    summary: z.string().max(4000),
    visibility: z.enum(VISIBILITIES),
    licence: z.string().max(120).nullable(),
    real_earth: z.boolean(),
    /** Whether visitors of a public project see the draft as well as the released versions. */
    draft_public: z.boolean(),
    /** The block or frame that views open with held still; null for the root of each circuit. */
    held_still: slug.nullable(),
  })
  .partial();

export const project = createProject.extend({
  id: z.string(),
  draft_public: z.boolean(),
  held_still: z.string().nullable(),
  revision: z.number().int(),
  /** The caller's role; null for a visitor. */
  role: z.enum(ROLES).nullable(),
  /** What the caller may do here, so that a button that cannot act can say why. */
  can: z.record(z.string(), z.boolean()),
  /** The newest released version's number, hash, title and date; null before the first. */
  latest_version: z
    .object({
      number: z.number().int(),
      sha256: z.string(),
      title: z.string(),
      released_at: z.iso.datetime(),
    })
    .nullable(),
  /** Transactions on the draft since that version, or since the beginning. */
  changes_since_version: z.number().int(),
  created_at: z.iso.datetime(),
});
export type Project = z.infer<typeof project>;

export const projectList = z.object({ items: z.array(project), next_cursor: z.string().nullable() });

export const member = z.object({
  /** The account's id. */
  id: z.string(),
  name: z.string(),
  /** Null for visitors, who see names and roles only. */
  email: z.string().nullable(),
  role: z.enum(ROLES),
  joined_at: z.iso.datetime(),
});
export type Member = z.infer<typeof member>;
export const members = z.object({ items: z.array(member) });
export const addMember = z.object({ email: z.string().trim().min(3).max(254), role: z.enum(ROLES) });
export const patchMember = z.object({ role: z.enum(ROLES) });
