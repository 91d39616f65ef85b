import { sql } from 'drizzle-orm';
import { check, foreignKey, index, integer, jsonb, pgTable, text, unique } from 'drizzle-orm/pg-core';
import { block } from './blocks';
import { anAge, id, oneOf, real, within } from './columns';
import { project } from './projects';

const ofProject = () =>
  text('project_id')
    .notNull()
    .references(() => project.id, { onDelete: 'cascade' });

const polarities = ['normal', 'reversed', 'mixed', 'unknown'] as const;

/** Palaeomagnetic directions of a site, as measured. */
export const direction = pgTable(
  'direction',
  {
    id: id(),
    project_id: ofProject(),
    site: text('site').notNull(),
    lat: real('lat').notNull(),
    lon: real('lon').notNull(),
    block: text('block'),
    age_ma: real('age_ma'),
    age_min_ma: real('age_min_ma'),
    age_max_ma: real('age_max_ma'),
    declination: real('declination'),
    inclination: real('inclination'),
    strike: real('strike'),
    dip: real('dip'),
    n: integer('n'),
    k: real('k'),
    alpha95: real('alpha95'),
    polarity: text('polarity', { enum: polarities }),
    shallowing_f: real('shallowing_f'),
    rock: text('rock'),
    source: text('source'),
    note: text('note'),
  },
  (table) => [
    foreignKey({
      name: 'direction_block',
      columns: [table.project_id, table.block],
      foreignColumns: [block.project_id, block.code],
    }).onUpdate('cascade'),
    index('direction_by_block').on(table.project_id, table.block),
    within('direction_lat', table.lat, -90, 90),
    within('direction_lon', table.lon, -360, 360),
    anAge('direction_age', table.age_ma),
    anAge('direction_age_min', table.age_min_ma),
    anAge('direction_age_max', table.age_max_ma),
    check('direction_age_range', sql`${table.age_min_ma} <= ${table.age_max_ma}`),
    within('direction_declination', table.declination, -360, 360),
    within('direction_inclination', table.inclination, -90, 90),
    check('direction_n', sql`${table.n} >= 1`),
    check('direction_k', sql`${table.k} >= 0`),
    within('direction_alpha95', table.alpha95, 0, 180),
    oneOf('direction_polarity', table.polarity, polarities),
    check('direction_shallowing', sql`${table.shallowing_f} > 0 and ${table.shallowing_f} <= 1`),
  ],
);

/** Palaeomagnetic poles, as published. */
export const pole = pgTable(
  'pole',
  {
    id: id(),
    project_id: ofProject(),
    pole: text('pole').notNull(),
    block: text('block'),
    age_ma: real('age_ma'),
    age_min_ma: real('age_min_ma'),
    age_max_ma: real('age_max_ma'),
    pole_lat: real('pole_lat').notNull(),
    pole_lon: real('pole_lon').notNull(),
    a95: real('a95'),
    n: integer('n'),
    k: real('k'),
    q_criteria: text('q_criteria'),
    r_criteria: text('r_criteria'),
    source: text('source'),
    note: text('note'),
  },
  (table) => [
    foreignKey({
      name: 'pole_block',
      columns: [table.project_id, table.block],
      foreignColumns: [block.project_id, block.code],
    }).onUpdate('cascade'),
    index('pole_by_block').on(table.project_id, table.block),
    within('pole_pole_lat', table.pole_lat, -90, 90),
    within('pole_pole_lon', table.pole_lon, -360, 360),
    anAge('pole_age', table.age_ma),
    check('pole_age_range', sql`${table.age_min_ma} <= ${table.age_max_ma}`),
    within('pole_a95', table.a95, 0, 180),
  ],
);

/** Dated rocks; ratios' errors are absolute, 2σ. */
export const dateRecord = pgTable(
  'date_record',
  {
    id: id(),
    project_id: ofProject(),
    sample: text('sample').notNull(),
    lat: real('lat'),
    lon: real('lon'),
    block: text('block'),
    method: text('method'),
    age_ma: real('age_ma'),
    two_sigma_ma: real('two_sigma_ma'),
    pb206_u238: real('pb206_u238'),
    pb206_u238_2s: real('pb206_u238_2s'),
    pb207_u235: real('pb207_u235'),
    pb207_u235_2s: real('pb207_u235_2s'),
    rho: real('rho'),
    event_dated: text('event_dated'),
    source: text('source'),
    note: text('note'),
  },
  (table) => [
    foreignKey({
      name: 'date_record_block',
      columns: [table.project_id, table.block],
      foreignColumns: [block.project_id, block.code],
    }).onUpdate('cascade'),
    index('date_record_by_block').on(table.project_id, table.block),
    within('date_record_lat', table.lat, -90, 90),
    within('date_record_lon', table.lon, -360, 360),
    anAge('date_record_age', table.age_ma),
    check('date_record_two_sigma', sql`${table.two_sigma_ma} >= 0`),
    within('date_record_rho', table.rho, -1, 1),
  ],
);

/** A statement that the project makes and that is tested again at each version. */
export const claim = pgTable(
  'claim',
  {
    id: id(),
    project_id: ofProject(),
    name: text('name').notNull(),
    statement: jsonb('statement').$type<Record<string, unknown>>().notNull(),
    source: text('source'),
    note: text('note'),
  },
  (table) => [unique('claim_name_unique').on(table.project_id, table.name)],
);

/** A project's own limit for one kind of finding, in place of the default. */
export const threshold = pgTable(
  'threshold',
  {
    id: id(),
    project_id: ofProject(),
    name: text('name').notNull(),
    value: real('value').notNull(),
    note: text('note'),
  },
  (table) => [unique('threshold_name_unique').on(table.project_id, table.name)],
);
