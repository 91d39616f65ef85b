import { sql } from 'drizzle-orm';
import { check, integer, jsonb, pgTable, text } from 'drizzle-orm/pg-core';
import type { Geometry } from 'geojson';
import { bytes, moment, sha256 } from './columns';

/** Geometries are stored once by the SHA-256 of their canonical GeoJSON, however many rows and versions use them. */
export const geometry = pgTable(
  'geometry',
  {
    sha256: text('sha256').primaryKey(),
    geojson: jsonb('geojson').$type<Geometry>().notNull(),
    vertices: integer('vertices').notNull(),
    /** Quantised for the wire by `kernel/cartography/outline-codec`. */
    encoded: bytes('encoded').notNull(),
    created_at: moment('created_at').notNull().defaultNow(),
  },
  (table) => [
    sha256('geometry_sha256', table.sha256),
    check('geometry_vertices', sql`${table.vertices} > 0`),
  ],
);
