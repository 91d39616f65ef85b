import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, readdirSync, readFileSync, renameSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { PGlite } from '@electric-sql/pglite';
import { sql } from 'drizzle-orm';
import { drizzle } from 'drizzle-orm/pglite';
import { migrate } from 'drizzle-orm/pglite/migrator';
import type { Database } from '~/db/client';
import * as schema from '~/db/schema';

const MIGRATIONS = path.resolve('drizzle');

/** A migrated, empty data folder as an archive, made once for each state of the migrations. */
async function template(): Promise<Blob> {
  const hash = createHash('sha256');
  for (const name of readdirSync(MIGRATIONS)
    .filter((file) => file.endsWith('.sql'))
    .sort()) {
    hash.update(readFileSync(path.join(MIGRATIONS, name)));
  }
  const file = path.resolve('.cache', `test-database-${hash.digest('hex').slice(0, 16)}.tar.gz`);
  if (!existsSync(file)) {
    const client = await PGlite.create();
    await migrate(drizzle(client), { migrationsFolder: MIGRATIONS });
    const archive = await client.dumpDataDir('gzip');
    await client.close();
    mkdirSync(path.dirname(file), { recursive: true });
    const unfinished = `${file}.${process.pid}`;
    writeFileSync(unfinished, Buffer.from(await archive.arrayBuffer()));
    renameSync(unfinished, file);
  }
  return new Blob([readFileSync(file)]);
}

export interface TestDatabase {
  readonly db: Database;
  /** Empties every table. */
  readonly truncate: () => Promise<void>;
  readonly close: () => Promise<void>;
}

/** An empty migrated database in memory. */
export async function openTestDatabase(): Promise<TestDatabase> {
  const client = await PGlite.create({ loadDataDir: await template() });
  const db: Database = drizzle(client, { schema });
  const { rows } = await client.query<{ name: string }>(
    `select quote_ident(tablename) as name from pg_tables where schemaname = 'public'`,
  );
  const all = rows.map(({ name }) => name).join(', ');
  return {
    db,
    truncate: async () => {
      await db.execute(sql.raw(`truncate ${all} cascade`));
    },
    close: () => client.close(),
  };
}
