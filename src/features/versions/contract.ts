/** Shapes of versions, shared by server and client. */
import { z } from 'zod';

export const releaseVersion = z.strictObject({
  title: z.string().trim().min(1).max(160),
  note: z.string().max(8000).default(''),
  licence: z.string().max(120).nullable().default(null),
});

export const versionEntry = z.object({
  number: z.number().int(),
  parent: z.number().int().nullable(),
  sha256: z.string(),
  title: z.string(),
  note: z.string(),
  licence: z.string().nullable(),
  state: z.enum(['released', 'in_review', 'accepted', 'accepted_with_changes', 'sent_back', 'published']),
  released_at: z.iso.datetime(),
  released_by: z.string().nullable(),
});
export type VersionEntry = z.infer<typeof versionEntry>;
export const versions = z.object({ items: z.array(versionEntry) });
