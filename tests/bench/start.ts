/** Cold start to the first page: a new data folder with the demo, and the same folder again, against an empty Node server. */
import { spawn, type ChildProcess } from 'node:child_process';
import fs from 'node:fs';
import os from 'node:os';
import path from 'node:path';

const PORT = 4399;

async function firstPage(child: ChildProcess, url: string): Promise<number> {
  const start = performance.now();
  for (;;) {
    const answer = await fetch(url).catch(() => null);
    if (answer?.ok) {
      await answer.text();
      break;
    }
    if (child.exitCode !== null) throw new Error('the server ended before its first page');
    await new Promise((resolve) => setTimeout(resolve, 50));
  }
  const ms = performance.now() - start;
  child.kill('SIGTERM');
  await new Promise((resolve) => child.once('exit', resolve));
  return ms;
}

export default async function start() {
  const data = fs.mkdtempSync(path.join(os.tmpdir(), 'driftwright-bench-'));
  const url = `http://127.0.0.1:${PORT}/`;
  const env = {
    ...process.env,
    PORT: String(PORT),
    DATA_DIR: path.join(data, 'pglite'),
    DRIFTWRIGHT_DEMO: 'on',
    LOG_LEVEL: 'error',
  };
  const serve = (): ChildProcess => spawn(process.execPath, ['server.mjs'], { env, stdio: 'ignore' });
  const bare = `require('node:http').createServer((_, r) => r.end('ok')).listen(${PORT}, '127.0.0.1')`;
  try {
    const cold = await firstPage(serve(), url);
    const warm = await firstPage(serve(), url);
    const node = await firstPage(spawn(process.execPath, ['-e', bare], { stdio: 'ignore' }), url);
    const row = (name: string, ms: number) => ({
      name,
      ours: ms.toFixed(0),
      reference: node.toFixed(0),
      ratio: (ms / node).toFixed(1),
      unit: 'ms',
    });
    return [
      row('new data folder, migrated and seeded (bare node:http)', cold),
      row('existing data folder', warm),
    ];
  } finally {
    fs.rmSync(data, { recursive: true, force: true });
  }
}
