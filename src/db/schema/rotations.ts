import { sql } from 'drizzle-orm';
import { check, foreignKey, index, integer, pgTable, text, unique } from 'drizzle-orm/pg-core';
import { EVIDENCE } from '../../kernel/rotations/types';
import { block } from './blocks';
import { aSlug, anAge, id, oneOf, real, within } from './columns';
import { project } from './projects';

/** One symmetric matrix for several rotations fitted together: the upper triangle of 3n × 3n, row by row, in rad². */
export const covariance = pgTable(
  'covariance',
  {
    id: id(),
    project_id: text('project_id')
      .notNull()
      .references(() => project.id, { onDelete: 'cascade' }),
    rows: integer('rows').notNull(),
    entries: real('entries').array().notNull(),
    cov_dof: real('cov_dof'),
    source: text('source'),
  },
  (table) => [
    index('covariance_project').on(table.project_id),
    check('covariance_rows', sql`${table.rows} >= 2`),
    check(
      'covariance_entries',
      sql`cardinality(${table.entries}) = (3 * ${table.rows}) * (3 * ${table.rows} + 1) / 2`,
    ),
  ],
);

/**
 * A finite rotation of `block` seen from `relative_to` at an age. The reference has no foreign key: a draft may
 * name a block that is still to come, and the audit says so.
 */
export const rotation = pgTable(
  'rotation',
  {
    id: id(),
    project_id: text('project_id')
      .notNull()
      .references(() => project.id, { onDelete: 'cascade' }),
    block: text('block').notNull(),
    relative_to: text('relative_to').notNull(),
    age_ma: real('age_ma').notNull(),
    pole_lat: real('pole_lat').notNull(),
    pole_lon: real('pole_lon').notNull(),
    angle_deg: real('angle_deg').notNull(),
    chron: text('chron'),
    age_two_sigma_ma: real('age_two_sigma_ma'),
    evidence: text('evidence', { enum: EVIDENCE }).notNull().default('unconstrained'),
    cov_xx: real('cov_xx'),
    cov_xy: real('cov_xy'),
    cov_xz: real('cov_xz'),
    cov_yy: real('cov_yy'),
    cov_yz: real('cov_yz'),
    cov_zz: real('cov_zz'),
    cov_dof: real('cov_dof'),
    joint_covariance: text('joint_covariance').references(() => covariance.id),
    joint_position: integer('joint_position'),
    source: text('source'),
    note: text('note'),
  },
  (table) => [
    unique('rotation_row_unique').on(table.project_id, table.block, table.relative_to, table.age_ma),
    foreignKey({
      name: 'rotation_block',
      columns: [table.project_id, table.block],
      foreignColumns: [block.project_id, block.code],
    }).onUpdate('cascade'),
    check('rotation_other', sql`${table.block} <> ${table.relative_to}`),
    aSlug('rotation_relative_to', table.relative_to),
    anAge('rotation_age', table.age_ma),
    within('rotation_pole_lat', table.pole_lat, -90, 90),
    within('rotation_pole_lon', table.pole_lon, -360, 360),
    within('rotation_angle', table.angle_deg, -720, 720),
    check('rotation_age_two_sigma', sql`${table.age_two_sigma_ma} >= 0`),
    oneOf('rotation_evidence', table.evidence, EVIDENCE),
    check(
      'rotation_covariance_whole',
      sql`num_nulls(${table.cov_xx}, ${table.cov_xy}, ${table.cov_xz}, ${table.cov_yy}, ${table.cov_yz}, ${table.cov_zz}) in (0, 6)`,
    ),
    check(
      'rotation_covariance_diagonal',
      sql`${table.cov_xx} is null or (${table.cov_xx} >= 0 and ${table.cov_yy} >= 0 and ${table.cov_zz} >= 0)`,
    ),
    check('rotation_cov_dof', sql`${table.cov_dof} > 0`),
    check(
      'rotation_joint',
      sql`(${table.joint_covariance} is null) = (${table.joint_position} is null) and (${table.joint_covariance} is null or ${table.cov_xx} is null)`,
    ),
  ],
);
