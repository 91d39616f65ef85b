import { sql } from 'drizzle-orm';
import {
  boolean,
  check,
  index,
  integer,
  pgTable,
  primaryKey,
  text,
  unique,
  uniqueIndex,
} from 'drizzle-orm/pg-core';
import { user } from './accounts';
import { aSlug, id, moment, oneOf } from './columns';

const roles = ['lead', 'researcher', 'reviewer', 'instructor'] as const;

export const project = pgTable(
  'project',
  {
    id: id(),
    slug: text('slug').notNull(),
    title: text('title').notNull(),
    summary: text('summary').notNull().default(''),
    visibility: text('visibility', { enum: ['private', 'link', 'public'] })
      .notNull()
      .default('private'),
    /** Whether visitors of a public project see the draft as well as the released versions. */
    draft_public: boolean('draft_public').notNull().default(false),
    licence: text('licence'),
    /** A project on the real Earth: present coastlines can be cut from open data. */
    real_earth: boolean('real_earth').notNull().default(false),
    /** The block or frame that views open with held still; null for the root of each circuit. */
    held_still: text('held_still'),
    /** Raised by one with every transaction on the draft. */
    revision: integer('revision').notNull().default(0),
    created_by: text('created_by').references(() => user.id, { onDelete: 'set null' }),
    created_at: moment('created_at').notNull().defaultNow(),
  },
  (table) => [
    unique('project_slug_unique').on(table.slug),
    aSlug('project_slug', table.slug),
    oneOf('project_visibility', table.visibility, ['private', 'link', 'public']),
    check('project_revision', sql`${table.revision} >= 0`),
  ],
);

export const membership = pgTable(
  'membership',
  {
    project_id: text('project_id')
      .notNull()
      .references(() => project.id, { onDelete: 'cascade' }),
    user_id: text('user_id')
      .notNull()
      .references(() => user.id, { onDelete: 'cascade' }),
    role: text('role', { enum: roles }).notNull(),
    created_at: moment('created_at').notNull().defaultNow(),
  },
  (table) => [
    primaryKey({ columns: [table.project_id, table.user_id] }),
    index('membership_user').on(table.user_id),
    oneOf('membership_role', table.role, roles),
  ],
);

export const invitation = pgTable(
  'invitation',
  {
    id: id(),
    project_id: text('project_id')
      .notNull()
      .references(() => project.id, { onDelete: 'cascade' }),
    email: text('email').notNull(),
    role: text('role', { enum: roles }).notNull(),
    hash: text('hash').notNull(),
    invited_by: text('invited_by').references(() => user.id, { onDelete: 'set null' }),
    expires_at: moment('expires_at').notNull(),
    accepted_at: moment('accepted_at'),
    created_at: moment('created_at').notNull().defaultNow(),
  },
  (table) => [
    uniqueIndex('invitation_hash_unique').on(table.hash),
    index('invitation_project').on(table.project_id),
    oneOf('invitation_role', table.role, roles),
  ],
);
