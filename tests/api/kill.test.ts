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

interface Item {
  readonly code: string;
  readonly note: string | null;
  readonly block: string;
  readonly label: string;
  readonly revision: number;
  readonly rows: number;
}

/** Everything of a list, page by page, with the revision it was read at. */
async function all(path: string, cookie: string): Promise<{ items: Item[]; revision: number }> {
  const items: Item[] = [];
  for (let cursor = ''; ;) {
    const { status, body } = await json(`${path}?limit=500${cursor && `&cursor=${cursor}`}`, { cookie });
    expect(status).toBe(200);
    items.push(...(body.items as Item[]));
    if (body.next_cursor === null) return { items, revision: body.revision as number };
    cursor = body.next_cursor as string;
  }
}

const WRITERS = ['ash', 'elm'] as const;
const P = '/api/projects/kept';

/** One edit is three new rows and a change of the writer's own: any part of it alone would show. */
const editOf = (writer: string, marker: string, name: string): object => ({
  label: name,
  edits: [
    ...[`${name}-a`, `${name}-b`].map((code) => ({ op: 'create', table: 'blocks', fields: { code, name: code, kind: 'terrane' } })),
    { op: 'create', table: 'rotations', fields: { block: `${name}-a`, relative_to: `${name}-b`, age_ma: 10, pole_lat: 1, pole_lon: 2, angle_deg: 3 } },
    { op: 'update', table: 'blocks', id: marker, fields: { note: name, name: writer } },
  ],
}); // prettier-ignore

/** What stands after a restart, against what was acknowledged before: name of the edit → revision answered. */
async function expectWhole(cookie: string, acknowledged: ReadonlyMap<string, number>): Promise<Set<string>> {
  const blocks = await all(`${P}/blocks`, cookie);
  const rotations = await all(`${P}/rotations`, cookie);
  const log = await all(`${P}/changes`, cookie);
  const codes = new Set(blocks.items.map(({ code }) => code));
  const named = (suffix: string): string[] =>
    [...codes].flatMap((code) => (code.endsWith(suffix) ? [code.slice(0, -suffix.length)] : [])).sort();
  const kept = named('-a');
  expect(named('-b')).toEqual(kept);
  expect(rotations.items.map(({ block }) => block.slice(0, -'-a'.length)).sort()).toEqual(kept);
  expect([...acknowledged.keys()].filter((name) => !kept.includes(name))).toEqual([]);

  const [made, ...edits] = log.items.toReversed();
  expect(made).toMatchObject({ revision: 1, rows: WRITERS.length });
  expect(edits.map(({ revision }) => revision)).toEqual(edits.map((_, i) => i + 2));
  expect(edits.map(({ label }) => label).sort()).toEqual(kept);
  expect(edits.every(({ rows }) => rows === 4)).toBe(true);
  const revisionOf = new Map(edits.map(({ label, revision }) => [label, revision]));
  for (const [name, revision] of acknowledged) expect([name, revisionOf.get(name)]).toEqual([name, revision]);
  for (const { revision } of [blocks, rotations, log]) expect(revision).toBe(1 + kept.length);
  for (const writer of WRITERS) {
    const last = edits.findLast(({ label }) => label.startsWith(writer))?.label;
    expect(blocks.items.find(({ code }) => code === writer)?.note).toBe(last);
  }
  return new Set(kept);
}

describe.runIf(BUILT)('a killed server', () => {
  it(`keeps every acknowledged edit through ${KILLS} kills, whole, and no part of any other`, async () => {
    let server = serve();
    await ready();
    const { cookie } = await json('/api/auth/sign-up', {
      method: 'POST',
      body: { name: 'Kit Marsh', email: 'kit@example.org', password: 'lava over sand 9' },
    });
    await json('/api/projects', { method: 'POST', cookie, body: { title: 'Kept', slug: 'kept' } });
    const { body: markers } = await json(`${P}/blocks`, {
      method: 'POST',
      cookie,
      body: WRITERS.map((code) => ({ code, name: code, kind: 'terrane' })),
    });
    const markerOf = (writer: string): string =>
      (markers.items as { id: string; code: string }[]).find(({ code }) => code === writer)!.id;

    const acknowledged = new Map<string, number>();
    for (let kill = 0; kill < KILLS; kill++) {
      let alive = true;
      const write = async (writer: string): Promise<void> => {
        for (let i = 0; alive; i++) {
          const name = `${writer}-k${kill}-e${i}`;
          const body = editOf(writer, markerOf(writer), name);
          const answer = await json(`${P}/edits`, { method: 'POST', cookie, body }).catch(() => null);
          if (answer && answer.status < 300) acknowledged.set(name, answer.body.revision as number);
          else if (answer) throw new Error(`refused with ${answer.status}`);
        }
      };
      const before = (await all(`${P}/changes`, cookie)).revision - 1;
      const answered = acknowledged.size;
      const writing = Promise.all(WRITERS.map(write));
      while (acknowledged.size < answered + LEAST_EDITS)
        await new Promise((resolve) => setTimeout(resolve, 1 + ((37 * kill) % 11)));
      server.child.kill('SIGKILL');
      await server.ended;
      alive = false;
      await writing;
      server = serve();
      await ready();
      const kept = await expectWhole(cookie, acknowledged);
      // At most the edit that each writer had under way when the server died.
      expect(kept.size - before - (acknowledged.size - answered)).toBeLessThanOrEqual(WRITERS.length);
    }
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
