import { openDatabase, useDatabase } from '~/db/client';
import { seedIfEmpty } from '~/db/seed';
import { cancelAll, endInterrupted } from '~/features/jobs/server';
import { settings, type Settings } from './env';
import { endStreams } from './events';
import { log } from './log';
import { keepSendingMail } from './mail';
import { closeWorkers } from './workers';

/** What server.mjs, which stands outside the bundle, takes over once the first request has started everything. */
interface Runtime {
  readonly settings: Settings;
  /** Ends the streams that would not end by themselves. */
  readonly endStreams: () => void;
  readonly close: () => Promise<void>;
}

const READY = Symbol.for('driftwright.ready');
const RUNTIME = Symbol.for('driftwright.runtime');
const holder = globalThis as { [READY]?: Promise<void>; [RUNTIME]?: Runtime | { readonly error: Error } };

/** Parses the settings, opens, migrates and seeds the database: once a process, on the first request. */
export function ready(): Promise<void> {
  return (holder[READY] ??= start().catch((error: Error) => {
    delete holder[READY];
    holder[RUNTIME] = { error };
    log.fatal({ err: error }, 'not started');
    throw error;
  }));
}

async function start(): Promise<void> {
  const current = settings();
  const { db, close } = await openDatabase(current);
  useDatabase(db);
  await seedIfEmpty(db, current);
  await endInterrupted(db);
  const stopMail = keepSendingMail();
  holder[RUNTIME] = {
    settings: current,
    endStreams,
    close: async () => {
      stopMail();
      cancelAll();
      await closeWorkers();
      useDatabase(undefined);
      delete holder[READY];
      await close();
    },
  };
}

/** Tests bring their own open database. */
export function readyAlready(): void {
  holder[READY] = Promise.resolve();
}
