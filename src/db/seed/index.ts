import type { Settings } from '~/server/env';
import type { Database } from '../client';
import { seedDemo } from './demo';
import { seedPeople } from './people';

/** Puts into a new database what the demo shows; does nothing where it is off, or to what is there already. */
export async function seedIfEmpty(db: Database, settings: Pick<Settings, 'demo'>): Promise<void> {
  if (!settings.demo) return;
  await seedPeople(db);
  await seedDemo(db);
}
