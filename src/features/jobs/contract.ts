/** Shapes of jobs: work past a few seconds, with its progress. */
import { z } from 'zod';

export const JOB_STATES = ['queued', 'running', 'done', 'failed', 'cancelled'] as const;

export const job = z.object({
  id: z.string(),
  kind: z.string(),
  state: z.enum(JOB_STATES),
  /** From 0 to 1. */
  progress: z.number(),
  /** Null until it is done. */
  result: z.record(z.string(), z.unknown()).nullable(),
  /** Why it failed; null otherwise. */
  problem: z.object({ name: z.string(), detail: z.string() }).nullable(),
  created_at: z.iso.datetime(),
  finished_at: z.iso.datetime().nullable(),
});
export type Job = z.infer<typeof job>;
