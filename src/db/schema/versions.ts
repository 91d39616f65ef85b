import { sql } from 'drizzle-orm';
import { check, index, integer, jsonb, pgTable, primaryKey, text, unique } from 'drizzle-orm/pg-core';
import { user } from './accounts';
import { id, moment, oneOf, sha256 } from './columns';
import { geometry } from './geometry';
import { project } from './projects';

const states = [
  'released',
  'in_review',
  'accepted',
  'accepted_with_changes',
  'sent_back',
  'published',
] as const;

/**
 * A frozen state. The manifest is canonical JSON (RFC 8785) and its SHA-256 the version's identity; a trigger
 * refuses to change either or to delete the row. Only title, note, licence and state may change.
 */
export const version = pgTable(
  'version',
  {
    id: id(),
    /** No cascade: a project with released versions stays. */
    project_id: text('project_id')
      .notNull()
      .references(() => project.id),
    number: integer('number').notNull(),
    parent: integer('parent'),
    sha256: text('sha256').notNull(),
    manifest: text('manifest').notNull(),
    /** The draft's revision at release: changes since are those above it. */
    revision: integer('revision').notNull(),
    title: text('title').notNull(),
    note: text('note').notNull().default(''),
    licence: text('licence'),
    state: text('state', { enum: states }).notNull().default('released'),
    released_by: text('released_by').references(() => user.id, { onDelete: 'set null' }),
    released_at: moment('released_at').notNull().defaultNow(),
  },
  (table) => [
    unique('version_number_unique').on(table.project_id, table.number),
    sha256('version_sha256', table.sha256),
    check(
      'version_number',
      sql`${table.number} >= 1 and (${table.parent} is null or ${table.parent} < ${table.number})`,
    ),
    oneOf('version_state', table.state, states),
  ],
);

/** Which geometries a version's manifest names, so that the right to see one is a join. */
export const versionGeometry = pgTable(
  'version_geometry',
  {
    version_id: text('version_id')
      .notNull()
      .references(() => version.id),
    sha256: text('sha256')
      .notNull()
      .references(() => geometry.sha256),
  },
  (table) => [
    primaryKey({ columns: [table.version_id, table.sha256] }),
    index('version_geometry_sha256').on(table.sha256),
  ],
);

/** A saved map layout: it refers to a state by version number, or to the draft by null. */
export const sheet = pgTable(
  'sheet',
  {
    id: id(),
    project_id: text('project_id')
      .notNull()
      .references(() => project.id, { onDelete: 'cascade' }),
    title: text('title').notNull(),
    version: integer('version'),
    layout: jsonb('layout').$type<Record<string, unknown>>().notNull(),
    created_by: text('created_by').references(() => user.id, { onDelete: 'set null' }),
    created_at: moment('created_at').notNull().defaultNow(),
    updated_at: moment('updated_at').notNull().defaultNow(),
  },
  (table) => [index('sheet_project').on(table.project_id)],
);
