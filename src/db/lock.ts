import { createHash } from 'node:crypto';
import { closeSync, openSync, readFileSync, realpathSync, rmSync, writeSync } from 'node:fs';
import { createServer } from 'node:net';
import path from 'node:path';

/** The folder is open in another process. Two writers on one folder lose data without any error. */
export class FolderInUse extends Error {
  override readonly name = 'FolderInUse';
  constructor(readonly folder: string) {
    super(
      `The data folder ${folder} is already open in another process: stop that one first, or give this one its own DATA_DIR.`,
    );
  }
}

/**
 * Takes the folder for this process and answers the function that gives it back.
 *
 * On Linux the lock is an abstract-namespace socket named by the folder's real path, on Windows a named pipe:
 * both are exclusive and freed by the kernel however the process ends. Elsewhere it is a file holding the
 * owner's process id, taken over once that process is gone.
 */
export async function lockFolder(folder: string): Promise<() => Promise<void>> {
  const real = realpathSync(folder);
  const name = `driftwright-${createHash('sha256').update(real).digest('hex')}`;
  if (process.platform === 'linux') return lockBySocket(`\0${name}`, real);
  if (process.platform === 'win32') return lockBySocket(`\\\\.\\pipe\\${name}`, real);
  return lockByFile(path.join(real, '..', `.${path.basename(real)}.lock`), real);
}

function lockBySocket(address: string, folder: string): Promise<() => Promise<void>> {
  const server = createServer((socket) => socket.destroy());
  return new Promise((resolve, reject) => {
    server.once('error', (error: NodeJS.ErrnoException) =>
      reject(error.code === 'EADDRINUSE' ? new FolderInUse(folder) : error),
    );
    server.listen(address, () => {
      server.unref();
      resolve(() => new Promise((done) => server.close(() => done())));
    });
  });
}

function lockByFile(file: string, folder: string): Promise<() => Promise<void>> {
  for (let attempt = 0; attempt < 2; attempt++) {
    try {
      const handle = openSync(file, 'wx');
      writeSync(handle, String(process.pid));
      closeSync(handle);
      const release = () => rmSync(file, { force: true });
      process.once('exit', release);
      return Promise.resolve(() => Promise.resolve(release()));
    } catch (error) {
      if ((error as NodeJS.ErrnoException).code !== 'EEXIST') throw error;
      if (isRunning(Number(readFileSync(file, 'utf8')))) break;
      rmSync(file, { force: true });
    }
  }
  throw new FolderInUse(folder);
}

function isRunning(pid: number): boolean {
  try {
    process.kill(pid, 0);
    return true;
  } catch (error) {
    return (error as NodeJS.ErrnoException).code === 'EPERM';
  }
}
