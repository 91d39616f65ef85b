import { foreignKey, index, pgTable, text } from 'drizzle-orm/pg-core';
import { FEATURE_KINDS } from '../../kernel/rotations/types';
import { block } from './blocks';
import { anAge, id, older, oneOf, real } from './columns';
import { geometry } from './geometry';
import { project } from './projects';

const sides = ['left', 'right', 'north', 'south', 'east', 'west'] as const;

/** Points and lines carried by a block: boundaries, sutures, picks, rocks, layers. */
export const feature = pgTable(
  'feature',
  {
    id: id(),
    project_id: text('project_id')
      .notNull()
      .references(() => project.id, { onDelete: 'cascade' }),
    block: text('block').notNull(),
    kind: text('kind', { enum: FEATURE_KINDS }).notNull(),
    name: text('name').notNull().default(''),
    sha256: text('sha256')
      .notNull()
      .references(() => geometry.sha256),
    age_ma: real('age_ma'),
    appears_ma: real('appears_ma'),
    disappears_ma: real('disappears_ma'),
    chron: text('chron'),
    side: text('side', { enum: sides }),
    source: text('source'),
    note: text('note'),
  },
  (table) => [
    foreignKey({
      name: 'feature_block',
      columns: [table.project_id, table.block],
      foreignColumns: [block.project_id, block.code],
    }).onUpdate('cascade'),
    index('feature_by_block').on(table.project_id, table.block),
    index('feature_geometry').on(table.sha256),
    oneOf('feature_kind', table.kind, FEATURE_KINDS),
    oneOf('feature_side', table.side, sides),
    anAge('feature_age', table.age_ma),
    anAge('feature_appears', table.appears_ma),
    anAge('feature_disappears', table.disappears_ma),
    older('feature_life', table.appears_ma, table.disappears_ma),
  ],
);
