import { mkdirSync } from 'node:fs';
import { PGlite } from '@electric-sql/pglite';
import type { ExtractTablesWithRelations } from 'drizzle-orm';
import { drizzle as drizzlePostgres } from 'drizzle-orm/node-postgres';
import { migrate as migratePostgres } from 'drizzle-orm/node-postgres/migrator';
import type { PgDatabase, PgQueryResultHKT, PgTransaction } from 'drizzle-orm/pg-core';
import { drizzle as drizzlePglite } from 'drizzle-orm/pglite';
import { migrate as migratePglite } from 'drizzle-orm/pglite/migrator';
import { Pool } from 'pg';
import { lockFolder } from './lock';
import { migrationsFolder } from './migrate';
import * as schema from './schema/index';

/** One type for both drivers. */
export type Database = PgDatabase<PgQueryResultHKT, typeof schema>;
export type Transaction = PgTransaction<
  PgQueryResultHKT,
  typeof schema,
  ExtractTablesWithRelations<typeof schema>
>;
/** What a query runs on: inside a transaction pass `tx`, since the outer database then waits for ever on PGlite. */
export type Queryable = Database | Transaction;

export interface OpenDatabase {
  readonly db: Database;
  readonly close: () => Promise<void>;
}

export interface DatabaseSettings {
  readonly DATABASE_URL?: string | undefined;
  /** A folder, or `memory://`. */
  readonly DATA_DIR: string;
}

/** Opens and migrates. */
export function openDatabase(settings: DatabaseSettings): Promise<OpenDatabase> {
  return settings.DATABASE_URL ? openPostgres(settings.DATABASE_URL) : openEmbedded(settings.DATA_DIR);
}

/** Any number of processes may start at once: an advisory lock lets one of them migrate at a time. */
async function openPostgres(url: string): Promise<OpenDatabase> {
  const pool = new Pool({ connectionString: url });
  pool.on('error', () => undefined);
  const client = await pool.connect();
  try {
    await client.query(`select pg_advisory_lock(hashtext('driftwright migrations'))`);
    await migratePostgres(drizzlePostgres(client), { migrationsFolder: migrationsFolder() });
  } finally {
    client.release(true);
  }
  return { db: drizzlePostgres(pool, { schema }), close: () => pool.end() };
}

async function openEmbedded(dataDir: string): Promise<OpenDatabase> {
  const inMemory = dataDir.startsWith('memory://');
  if (!inMemory) mkdirSync(dataDir, { recursive: true });
  const unlock = inMemory ? () => Promise.resolve() : await lockFolder(dataDir);
  try {
    const client = await PGlite.create(dataDir);
    const db = drizzlePglite(client, { schema });
    await migratePglite(db, { migrationsFolder: migrationsFolder() });
    return { db, close: () => client.close().finally(unlock) };
  } catch (error) {
    await unlock();
    throw error;
  }
}

const KEY = Symbol.for('driftwright.database');
const holder = globalThis as { [KEY]?: Database };

/** The process's database; `src/server/start.ts` opens it. Kept on `globalThis`, so that a reload in development keeps it. */
export function database(): Database {
  const db = holder[KEY];
  if (!db) throw new Error('The database is asked for before it is open.');
  return db;
}

export function useDatabase(db: Database | undefined): void {
  if (db) holder[KEY] = db;
  else delete holder[KEY];
}
