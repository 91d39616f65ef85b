import type { Database } from '../client';
import { user } from '../schema';
import { NO_PASSWORD } from '~/features/accounts/password';
import { DEMO_PEOPLE } from '~/features/accounts/people';

/** Makes the demo's people where they are missing. None has a password: they sign in by one click while the demo is on. */
export async function seedPeople(db: Database): Promise<void> {
  const people = DEMO_PEOPLE.map(({ name, email, role }) => ({
    name,
    email,
    password_hash: NO_PASSWORD,
    site_role: role === 'admin' ? ('admin' as const) : null,
    is_demo: true,
  }));
  await db.insert(user).values(people).onConflictDoNothing();
}
