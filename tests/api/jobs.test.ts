/** Jobs: queued, told of, cancelled, kept; of nobody but who began them. */
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { eq } from 'drizzle-orm';
import { job } from '~/db/schema';
import { endInterrupted, startJob, type Work } from '~/features/jobs/server';
import { createTestApp, type TestApp, type TestUser } from '../support/app';

let app: TestApp;
let ada: TestUser;
let bo: TestUser;
beforeAll(async () => {
  app = await createTestApp();
});
beforeEach(async () => {
  await app.reset();
  ada = await app.signedUp('Ada Thorne');
  bo = await app.signedUp('Bo Lind');
});
afterAll(() => app.close());

const start = (work: Work, user = ada) =>
  startJob({
    actor: { user: { ...user, site_role: null }, via: 'session', scope: 'write' } as never,
    project_id: null,
    kind: 'test',
    input: {},
    work,
  });
/** Work that goes on until it is told to end, or until it is let go. */
function held() {
  let letGo = () => {};
  const gate = new Promise<void>((go) => (letGo = go));
  const work: Work = ({ signal, progress }) => {
    progress(0.25);
    return new Promise((done, fail) => {
      void gate.then(() => done({ sum: 5 }));
      signal.addEventListener('abort', () => fail(new Error('aborted')));
    });
  };
  return { work, letGo: () => letGo() };
}
const read = async (id: string, as = ada) => app.call('GET', `/api/jobs/${id}`, { as });
const until = (id: string, state: string) =>
  expect.poll(async () => (await read(id)).json.state, { timeout: 5_000 }).toBe(state);

describe('a job', () => {
  it('is told of while it runs, and keeps its result', async () => {
    const { work, letGo } = held();
    const { id } = await start(work);
    await until(id, 'running');
    expect((await read(id)).json).toMatchObject({ kind: 'test', progress: 0.25, result: null });
    const response = await app.respond('GET', `/api/jobs/${id}/events`, { as: ada });
    letGo();
    const events = (await response.text()).split('\n\n').filter(Boolean);
    expect(JSON.parse(events.at(-1)!.split('data: ')[1]!)).toMatchObject({
      state: 'done',
      progress: 1,
      result: { sum: 5 },
    });
    expect((await read(id)).json).toMatchObject({ state: 'done', result: { sum: 5 }, problem: null });
  });

  it('is cancelled by who began it, and by nobody else', async () => {
    const { id } = await start(held().work);
    await until(id, 'running');
    expect((await read(id, bo)).status).toBe(404);
    expect((await app.call('DELETE', `/api/jobs/${id}`, { as: bo })).status).toBe(404);
    expect((await app.call('GET', `/api/jobs/${id}/events`, { as: bo })).status).toBe(404);
    expect((await app.call('DELETE', `/api/jobs/${id}`, { as: ada })).status).toBe(200);
    await until(id, 'cancelled');
  });

  it('that fails says why in the words of a problem, without what is inside', async () => {
    const { id } = await start(() => Promise.reject(new Error('secret path')));
    await until(id, 'failed');
    const { json } = await read(id);
    expect(json.problem.name).toBe('Unexpected');
    expect(JSON.stringify(json)).not.toContain('secret');
  });
});

describe('jobs', () => {
  it('wait while two run, go on in their order, and one person has four at most', async () => {
    const works = [held(), held(), held(), held()];
    const jobs = [];
    for (const { work } of works) jobs.push(await start(work));
    await until(jobs[1]!.id, 'running');
    expect((await read(jobs[2]!.id)).json.state).toBe('queued');
    await expect(start(held().work)).rejects.toThrow(/4 of your jobs/);
    await app.call('DELETE', `/api/jobs/${jobs[2]!.id}`, { as: ada });
    works[0]!.letGo();
    await until(jobs[0]!.id, 'done');
    await until(jobs[2]!.id, 'cancelled');
    await until(jobs[3]!.id, 'running');
    for (const { letGo } of works) letGo();
    await until(jobs[3]!.id, 'done');
  });

  it('of a process that ended are marked as failed at the next start', async () => {
    const [row] = await app.db
      .insert(job)
      .values({ kind: 'test', input: {}, state: 'running', created_by: ada.id })
      .returning();
    await endInterrupted(app.db);
    const [after] = await app.db.select().from(job).where(eq(job.id, row!.id));
    expect(after).toMatchObject({ state: 'failed', problem: { name: 'Unexpected' } });
  });
});
