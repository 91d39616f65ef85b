import { sql } from 'drizzle-orm';
import { check, index, integer, jsonb, pgTable, primaryKey, text } from 'drizzle-orm/pg-core';
import { user } from './accounts';
import { bytes, id, moment, oneOf, sha256 } from './columns';
import { project } from './projects';

const actions = ['edit', 'import', 'undo', 'redo', 'restore'] as const;

/**
 * One row changed by one transaction on the draft. Rows of one revision share actor, action, label and time;
 * `position` is the order in which they were made. Undo, redo, history, live updates and optimistic locking
 * all read this one table.
 */
export const change = pgTable(
  'change',
  {
    project_id: text('project_id')
      .notNull()
      .references(() => project.id, { onDelete: 'cascade' }),
    revision: integer('revision').notNull(),
    position: integer('position').notNull(),
    actor_id: text('actor_id').references(() => user.id, { onDelete: 'set null' }),
    action: text('action', { enum: actions }).notNull(),
    label: text('label').notNull(),
    /** The ledger's table: blocks, outlines, rotations … */
    entity: text('entity').notNull(),
    entity_id: text('entity_id').notNull(),
    before: jsonb('before').$type<Record<string, unknown>>(),
    after: jsonb('after').$type<Record<string, unknown>>(),
    /** The revision that an undo or redo takes back. */
    reverts_revision: integer('reverts_revision'),
    at: moment('at').notNull().defaultNow(),
  },
  (table) => [
    primaryKey({ columns: [table.project_id, table.revision, table.position] }),
    index('change_entity').on(table.project_id, table.entity, table.entity_id),
    oneOf('change_action', table.action, actions),
    check('change_something', sql`${table.before} is not null or ${table.after} is not null`),
    check(
      'change_reverts',
      sql`(${table.action} in ('undo', 'redo')) = (${table.reverts_revision} is not null)`,
    ),
  ],
);

/** An edit as its sender named it: one whose answer was lost is sent again under its name, and not made twice. */
export const editRequest = pgTable(
  'edit_request',
  {
    project_id: text('project_id')
      .notNull()
      .references(() => project.id, { onDelete: 'cascade' }),
    actor_id: text('actor_id')
      .notNull()
      .references(() => user.id, { onDelete: 'cascade' }),
    key: text('key').notNull(),
    /** The revision that it made. */
    revision: integer('revision').notNull(),
    at: moment('at').notNull().defaultNow(),
  },
  (table) => [
    primaryKey({ columns: [table.project_id, table.actor_id, table.key] }),
    index('edit_request_at').on(table.at),
    check('edit_request_key', sql`length(${table.key}) between 1 and 64`),
  ],
);

/** An uploaded file as it came, with the report that was shown and the rejected rows to mend. */
export const importFile = pgTable(
  'import_file',
  {
    id: id(),
    project_id: text('project_id')
      .notNull()
      .references(() => project.id, { onDelete: 'cascade' }),
    name: text('name').notNull(),
    kind: text('kind').notNull(),
    sha256: text('sha256').notNull(),
    content: bytes('content').notNull(),
    report: jsonb('report').$type<Record<string, unknown>>().notNull(),
    rejected: text('rejected'),
    /** The draft's revision that the import made. */
    revision: integer('revision'),
    imported_by: text('imported_by').references(() => user.id, { onDelete: 'set null' }),
    created_at: moment('created_at').notNull().defaultNow(),
  },
  (table) => [index('import_file_project').on(table.project_id), sha256('import_file_sha256', table.sha256)],
);
