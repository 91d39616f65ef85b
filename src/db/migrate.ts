import { existsSync } from 'node:fs';
import path from 'node:path';
import { fileURLToPath } from 'node:url';

/** The folder of generated migrations, found upwards from this module: the source tree and the build both lie below it. */
export function migrationsFolder(): string {
  let folder = path.dirname(fileURLToPath(import.meta.url));
  for (;;) {
    const candidate = path.join(folder, 'drizzle');
    if (existsSync(path.join(candidate, 'meta', '_journal.json'))) return candidate;
    const parent = path.dirname(folder);
    if (parent === folder)
      throw new Error('The folder of migrations (drizzle/) is missing beside the program.');
    folder = parent;
  }
}
