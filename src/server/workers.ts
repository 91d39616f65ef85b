import { Piscina } from 'piscina';
import { fileURLToPath } from 'node:url';
import { Problem } from './problem';

const KEY = Symbol.for('driftwright.pools');
const holder = globalThis as { [KEY]?: Map<string, Piscina> };

/** Tasks that may wait for a thread. */
const MOST_WAITING = 64;

/** Idle threads end after this, milliseconds. */
const IDLE_MS = 30_000;

/**
 * Runs a task of a worker file (imported as `./name.task.ts?nodeworker`) on a pool of its own.
 * @throws AbortError where the signal fires first
 */
export async function runInWorker<Job, Result>(
  file: string,
  job: Job,
  signal?: AbortSignal,
): Promise<Result> {
  const pools: Map<string, Piscina> = (holder[KEY] ??= new Map<string, Piscina>());
  let pool = pools.get(file);
  if (!pool) {
    pool = new Piscina({
      filename: fileURLToPath(file),
      minThreads: 0,
      maxThreads: 2,
      idleTimeout: IDLE_MS,
      maxQueue: MOST_WAITING,
    });
    pools.set(file, pool);
  }
  if (pool.queueSize >= MOST_WAITING)
    throw new Problem('Busy', {
      detail: 'Many maps are being made. Try again in a moment.',
      headers: { 'Retry-After': '5' },
    });
  return (await pool.run(job, signal ? { signal } : {})) as Result;
}

/** Ends every pool; for tests and for closing. */
export async function closeWorkers(): Promise<void> {
  await Promise.all([...(holder[KEY]?.values() ?? [])].map((pool) => pool.destroy()));
  holder[KEY]?.clear();
}
