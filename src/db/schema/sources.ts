import { integer, jsonb, pgTable, text, unique } from 'drizzle-orm/pg-core';
import { id, within } from './columns';
import { project } from './projects';

/** Rows cite a source by its `cite` text, without a foreign key: a draft may cite what is still to be described. */
export const source = pgTable(
  'source',
  {
    id: id(),
    project_id: text('project_id')
      .notNull()
      .references(() => project.id, { onDelete: 'cascade' }),
    cite: text('cite').notNull(),
    title: text('title').notNull().default(''),
    authors: jsonb('authors').$type<string[]>().notNull().default([]),
    year: integer('year'),
    container: text('container'),
    doi: text('doi'),
    licence: text('licence'),
    note: text('note'),
  },
  (table) => [
    unique('source_cite_unique').on(table.project_id, table.cite),
    within('source_year', table.year, 1600, 2200),
  ],
);
