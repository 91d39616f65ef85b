import { sql } from 'drizzle-orm';
import { check, index, jsonb, pgTable, text } from 'drizzle-orm/pg-core';
import { user } from './accounts';
import { id, moment, oneOf, real } from './columns';
import { project } from './projects';

const states = ['queued', 'running', 'done', 'failed', 'cancelled'] as const;

/** Work past a few seconds, with its progress; the result is small or names where it is kept. */
export const job = pgTable(
  'job',
  {
    id: id(),
    project_id: text('project_id').references(() => project.id, { onDelete: 'cascade' }),
    kind: text('kind').notNull(),
    state: text('state', { enum: states }).notNull().default('queued'),
    progress: real('progress').notNull().default(0),
    input: jsonb('input').$type<Record<string, unknown>>().notNull(),
    result: jsonb('result').$type<Record<string, unknown>>(),
    problem: jsonb('problem').$type<Record<string, unknown>>(),
    created_by: text('created_by').references(() => user.id, { onDelete: 'set null' }),
    created_at: moment('created_at').notNull().defaultNow(),
    started_at: moment('started_at'),
    finished_at: moment('finished_at'),
  },
  (table) => [
    index('job_state').on(table.state, table.created_at),
    oneOf('job_state_known', table.state, states),
    check('job_progress', sql`${table.progress} >= 0 and ${table.progress} <= 1`),
  ],
);
