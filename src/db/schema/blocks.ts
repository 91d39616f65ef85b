import { foreignKey, index, pgTable, text, unique } from 'drizzle-orm/pg-core';
import { BLOCK_KINDS, EVIDENCE } from '../../kernel/rotations/types';
import { aSlug, anAge, id, older, oneOf, real } from './columns';
import { geometry } from './geometry';
import { project } from './projects';

export const block = pgTable(
  'block',
  {
    id: id(),
    project_id: text('project_id')
      .notNull()
      .references(() => project.id, { onDelete: 'cascade' }),
    code: text('code').notNull(),
    name: text('name').notNull(),
    kind: text('kind', { enum: BLOCK_KINDS }).notNull(),
    appears_ma: real('appears_ma'),
    disappears_ma: real('disappears_ma'),
    evidence: text('evidence', { enum: EVIDENCE }).notNull().default('unconstrained'),
    source: text('source'),
    note: text('note'),
  },
  (table) => [
    unique('block_code_unique').on(table.project_id, table.code),
    aSlug('block_code', table.code),
    oneOf('block_kind', table.kind, BLOCK_KINDS),
    oneOf('block_evidence', table.evidence, EVIDENCE),
    anAge('block_appears', table.appears_ma),
    anAge('block_disappears', table.disappears_ma),
    older('block_life', table.appears_ma, table.disappears_ma),
  ],
);

/** An outline held for a part of a block's life; null ages mean the whole of it. */
export const blockOutline = pgTable(
  'block_outline',
  {
    id: id(),
    project_id: text('project_id')
      .notNull()
      .references(() => project.id, { onDelete: 'cascade' }),
    block: text('block').notNull(),
    sha256: text('sha256')
      .notNull()
      .references(() => geometry.sha256),
    outline_older_ma: real('outline_older_ma'),
    outline_younger_ma: real('outline_younger_ma'),
    inside: text('inside', { enum: ['smaller', 'larger'] })
      .notNull()
      .default('smaller'),
    source: text('source'),
  },
  (table) => [
    foreignKey({
      name: 'block_outline_block',
      columns: [table.project_id, table.block],
      foreignColumns: [block.project_id, block.code],
    }).onUpdate('cascade'),
    index('block_outline_by_block').on(table.project_id, table.block),
    index('block_outline_geometry').on(table.sha256),
    anAge('block_outline_older', table.outline_older_ma),
    anAge('block_outline_younger', table.outline_younger_ma),
    older('block_outline_life', table.outline_older_ma, table.outline_younger_ma),
    oneOf('block_outline_inside', table.inside, ['smaller', 'larger']),
  ],
);
