/**
 * A server killed at any moment keeps every edit that it acknowledged, and two servers never share a data folder. The
 * real build runs as its own process; LONG=1 kills it more often.
 */
import { spawn, type ChildProcess } from 'node:child_process';
import fs from 'node:fs';
import net from 'node:net';
import os from 'node:os';
import path from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';

const ROOT = path.resolve(import.meta.dirname, '../..');
/** Edits acknowledged before each kill, which then comes in the middle of the next ones. */
const LEAST_EDITS = 12;
const KILLS = process.env['LONG'] ? 15 : 2;

let folder: string;
let port: number;
let base: string;
const running = new Set<ChildProcess>();

async function freePort(): Promise<number> {
  const server = net.createServer().listen(0, '127.0.0.1');
  await new Promise((resolve) => server.once('listening', resolve));
  const { port: free } = server.address() as net.AddressInfo;
  await new Promise((resolve) => server.close(resolve));
  return free;
}

beforeAll(async () => {
  folder = fs.mkdtempSync(path.join(os.tmpdir(), 'driftwright-kill-'));
  port = await freePort();
  base = `http://127.0.0.1:${port}`;
});
afterAll(() => {
  for (const child of running) child.kill('SIGKILL');
  fs.rmSync(folder, { recursive: true, force: true });
});

function serve(onPort = port): {
  child: ChildProcess;
  ended: Promise<{ code: number | null; said: string }>;
} {
  const env = {
    ...process.env,
    PORT: String(onPort),
    DATA_DIR: path.join(folder, 'pglite'),
    DRIFTWRIGHT_DEMO: 'off',
    LOG_LEVEL: 'silent',
  };
  const child = spawn(process.execPath, ['server.mjs'], {
    cwd: ROOT,
    env,
    stdio: ['ignore', 'pipe', 'pipe'],
  });
  running.add(child);
  let said = '';
  for (const stream of [child.stdout, child.stderr])
    stream.on('data', (chunk: Buffer) => (said += chunk.toString()));
  const ended = new Promise<{ code: number | null; said: string }>((resolve) =>
    child.once('close', (code) => {
      running.delete(child);
      resolve({ code, said });
    }),
  );
  return { child, ended };
}

async function ready(): Promise<void> {
  for (let i = 0; i < 600; i++) {
    const answer = await fetch(`${base}/api/health`).catch(() => null);
    if (answer?.ok) return;
    await new Promise((resolve) => setTimeout(resolve, 50));
  }
  throw new Error('the server did not come up');
}

const json = async (
  path: string,
  init: { method?: string; body?: unknown; cookie?: string } = {},
): Promise<{ status: number; body: any; cookie: string }> => {
  const answer = await fetch(base + path, {
    method: init.method ?? 'GET',
    headers: {
      origin: base,
      ...(init.cookie ? { cookie: init.cookie } : {}),
      ...(init.body ? { 'content-type': 'application/json', 'if-match': '*' } : {}),
    },
    ...(init.body ? { body: JSON.stringify(init.body) } : {}),
  });
  return {
    status: answer.status,
    body: await answer.json().catch(() => null),
    cookie: answer.headers.getSetCookie()[0]?.split(';')[0] ?? '',
  };
};

const BUILT = fs.existsSync(path.join(ROOT, 'dist/server/entry.mjs'));

describe.runIf(BUILT)('a killed server', () => {
  it(`keeps every acknowledged edit through ${KILLS} kills`, async () => {
    let server = serve();
    await ready();
    const { cookie } = await json('/api/auth/sign-up', {
      method: 'POST',
      body: { name: 'Kit Marsh', email: 'kit@example.org', password: 'lava over sand 9' },
    });
    await json('/api/projects', { method: 'POST', cookie, body: { title: 'Kept', slug: 'kept' } });
    const acknowledged = new Set<string>();
    for (let kill = 0; kill < KILLS; kill++) {
      let alive = true;
      const writing = (async () => {
        for (let i = 0; alive; i++) {
          const code = `k${kill}-b${i}`;
          const answer = await json('/api/projects/kept/blocks', {
            method: 'POST',
            cookie,
            body: { code, name: code, kind: 'terrane' },
          }).catch(() => null);
          if (answer && answer.status < 300) acknowledged.add(code);
        }
      })();
      const enough = acknowledged.size + LEAST_EDITS;
      while (acknowledged.size < enough)
        await new Promise((resolve) => setTimeout(resolve, 1 + ((37 * kill) % 11)));
      server.child.kill('SIGKILL');
      await server.ended;
      alive = false;
      await writing;
      server = serve();
      await ready();
      const kept = new Set<string>();
      for (let cursor: string | null = ''; cursor !== null;) {
        const { body } = await json(
          `/api/projects/kept/blocks?limit=500${cursor ? `&cursor=${cursor}` : ''}`,
          { cookie },
        );
        for (const { code } of body.items) kept.add(code);
        cursor = body.next_cursor;
      }
      expect([...acknowledged].filter((code) => !kept.has(code))).toEqual([]);
      const { body: changes } = await json('/api/projects/kept/changes', { cookie });
      expect(changes.revision).toBe(kept.size);
    }
    expect(acknowledged.size).toBeGreaterThanOrEqual(LEAST_EDITS * KILLS);
    server.child.kill('SIGTERM');
    expect((await server.ended).code).toBe(0);
  }, 300_000);

  it('is not joined by a second one on the same folder, which says so and ends', async () => {
    const first = serve();
    await ready();
    const second = await serve(await freePort()).ended;
    expect(second.code).toBe(1);
    expect(second.said).toMatch(/another process|in use|already/i);
    expect((await json('/api/health')).status).toBe(200);
    first.child.kill('SIGTERM');
    await first.ended;
  }, 120_000);
});

it('has a build to run', () => {
  expect(BUILT, 'npm test builds before these tests').toBe(true);
});
