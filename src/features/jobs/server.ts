/**
 * Jobs of this process: queued, run two at a time, told of while they run, cancelled on request. What a job is asked and
 * what it answers stands in the database; a queue of several processes would take the place of this file alone.
 */
import { EventEmitter } from 'node:events';
import { and, eq, inArray } from 'drizzle-orm';
import { database, type Database } from '~/db/client';
import { job } from '~/db/schema';
import type { Actor } from '~/server/actor';
import { log } from '~/server/log';
import { Problem, toProblem } from '~/server/problem';
import type { Job } from './contract';

const MOST_RUNNING = 2;
const MOST_QUEUED = 16;
const MOST_OF_ONE = 4;
/** Between two notes of progress in the database, milliseconds. */
const NOTE_MS = 500;

export interface JobContext {
  readonly signal: AbortSignal;
  /** Share that is done, from 0 to 1. */
  readonly progress: (share: number) => void;
}

/** @throws AbortError soon after the signal fires */
export type Work = (context: JobContext) => Promise<Record<string, unknown>>;

export interface JobRequest {
  readonly actor: Actor;
  readonly project_id: string | null;
  readonly kind: string;
  /** What was asked, as it is kept. */
  readonly input: Record<string, unknown>;
  readonly work: Work;
}

interface Live {
  readonly owner: string;
  readonly controller: AbortController;
  progress: number;
  state: 'queued' | 'running';
}

interface Queue {
  readonly live: Map<string, Live>;
  readonly waiting: (() => void)[];
  running: number;
  readonly told: EventEmitter;
}

const KEY = Symbol.for('driftwright.jobs');
const holder = globalThis as { [KEY]?: Queue };
const queue = (): Queue =>
  (holder[KEY] ??= {
    live: new Map(),
    waiting: [],
    running: 0,
    told: new EventEmitter().setMaxListeners(0),
  });

/** @throws Problem `Busy` or `TooManyRequests` where too many wait already */
export async function startJob({ actor, project_id, kind, input, work }: JobRequest): Promise<Job> {
  const { live } = queue();
  const owner = actor.user!.id;
  if ([...live.values()].filter((one) => one.owner === owner).length >= MOST_OF_ONE)
    throw new Problem('TooManyRequests', {
      detail: `${MOST_OF_ONE} of your jobs are under way. Wait for one, or cancel it.`,
      headers: { 'Retry-After': '10' },
    });
  if (live.size >= MOST_RUNNING + MOST_QUEUED)
    throw new Problem('Busy', {
      detail: 'Many jobs are waiting. Try again in a moment.',
      headers: { 'Retry-After': '30' },
    });
  const [row] = await database()
    .insert(job)
    .values({ project_id, kind, input, created_by: owner })
    .returning();
  const { id } = row!;
  live.set(id, { owner, controller: new AbortController(), progress: 0, state: 'queued' });
  void run(id, work);
  return asJob(row!);
}

async function run(id: string, work: Work): Promise<void> {
  const jobs = queue();
  const { controller } = jobs.live.get(id)!;
  if (jobs.running >= MOST_RUNNING) await new Promise<void>((go) => jobs.waiting.push(go));
  else jobs.running++;
  try {
    await carryOut(id, work, controller.signal);
  } catch (error) {
    log.error({ err: error, job: id }, 'a job could not be kept');
  } finally {
    jobs.live.delete(id);
    const next = jobs.waiting.shift();
    if (next) next();
    else jobs.running--;
    jobs.told.emit(id);
  }
}

async function carryOut(id: string, work: Work, signal: AbortSignal): Promise<void> {
  const jobs = queue();
  const live = jobs.live.get(id)!;
  let noted = 0;
  const progress = (share: number): void => {
    live.progress = Math.min(1, Math.max(live.progress, share));
    jobs.told.emit(id);
    if (Date.now() - noted < NOTE_MS) return;
    noted = Date.now();
    void keep(id, { progress: live.progress }).catch(() => undefined);
  };
  if (signal.aborted) return keep(id, { state: 'cancelled', finished_at: new Date() });
  live.state = 'running';
  await keep(id, { state: 'running', started_at: new Date() });
  jobs.told.emit(id);
  try {
    const result = await work({ signal, progress });
    await keep(id, { state: 'done', progress: 1, result, finished_at: new Date() });
  } catch (error) {
    if (signal.aborted) return keep(id, { state: 'cancelled', finished_at: new Date() });
    const { name, message: detail } = toProblem(error);
    await keep(id, { state: 'failed', problem: { name, detail }, finished_at: new Date() });
  }
}

const keep = async (id: string, values: Partial<typeof job.$inferInsert>): Promise<void> => {
  await database().update(job).set(values).where(eq(job.id, id));
};

type Row = typeof job.$inferSelect;

function asJob(row: Row): Job {
  const live = queue().live.get(row.id);
  return {
    id: row.id,
    kind: row.kind,
    state: live?.state ?? row.state,
    progress: live?.progress ?? row.progress,
    result: row.result,
    problem: row.problem as Job['problem'],
    created_at: row.created_at.toISOString(),
    finished_at: row.finished_at?.toISOString() ?? null,
  };
}

/** One of the actor's own. @throws Problem `NotFound` */
export async function readJob(actor: Actor, id: string): Promise<Job> {
  const [row] = await database()
    .select()
    .from(job)
    .where(and(eq(job.id, id), eq(job.created_by, actor.user?.id ?? '')));
  if (!row) throw new Problem('NotFound');
  return asJob(row);
}

/** Asks a job to end; one that has ended stays as it is. @throws Problem `NotFound` */
export async function cancelJob(actor: Actor, id: string): Promise<Job> {
  await readJob(actor, id);
  queue().live.get(id)?.controller.abort();
  return readJob(actor, id);
}

/** @returns the function that ends the subscription */
export function onJob(id: string, listener: () => void): () => void {
  const { told } = queue();
  told.on(id, listener);
  return () => told.off(id, listener);
}

/** Jobs of a process that has ended cannot go on: they say so. */
export async function endInterrupted(db: Database): Promise<void> {
  const problem = {
    name: 'Unexpected',
    detail: 'The server was started anew meanwhile. Start the job again.',
  };
  await db
    .update(job)
    .set({ state: 'failed', problem, finished_at: new Date() })
    .where(inArray(job.state, ['queued', 'running']));
}

/** Cancels what is under way; for closing. */
export function cancelAll(): void {
  for (const { controller } of queue().live.values()) controller.abort();
}
