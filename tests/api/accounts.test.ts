import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { apiToken, mailOutbox, passwordReset, session, user } from '~/db/schema';
import { seedPeople } from '~/db/seed/people';
import { parseSettings, useSettings } from '~/server/env';
import { createTestApp, type Answer, type TestApp, type TestUser } from '../support/app';

let app: TestApp;
beforeAll(async () => {
  app = await createTestApp();
});
beforeEach(() => app.reset());
afterAll(() => app.close());

const person = { name: 'Hal Brook', email: 'Hal.Brook@example.org', password: 'tuff and chert 7' };
const cookieOf = (answer: Answer) => ({ cookie: answer.cookies[0]! }) as TestUser;
const form = (fields: Record<string, string>) => ({
  raw: new URLSearchParams(fields).toString(),
  headers: { 'Content-Type': 'application/x-www-form-urlencoded' },
});

describe('sign-up', () => {
  it('makes an account, signs in, and keeps only hashes', async () => {
    const made = await app.call('POST', '/api/auth/sign-up', { body: person });
    expect(made.status).toBe(201);
    expect(made.json).toMatchObject({ name: 'Hal Brook', email: 'Hal.Brook@example.org', site_role: null });
    expect(made.text).not.toContain('hash');
    const me = await app.call('GET', '/api/me', { as: cookieOf(made) });
    expect(me.json.id).toBe(made.json.id);
    const [row] = await app.db.select().from(user);
    // OWASP Password Storage Cheat Sheet: argon2id, m=19456 (19 MiB), t=2, p=1.
    expect(row!.password_hash).toMatch(/^\$argon2id\$v=19\$m=19456,t=2,p=1\$/);
    const [kept] = await app.db.select().from(session);
    expect(made.cookies[0]).not.toContain(kept!.id);
  });

  it('sets a cookie that scripts cannot read and other sites cannot send along', async () => {
    const made = await app.call('POST', '/api/auth/sign-up', { body: person });
    const cookie = made.headers.getSetCookie()[0]!;
    expect(cookie).toContain('HttpOnly');
    expect(cookie).toContain('SameSite=Lax');
    expect(cookie).toContain('Path=/');
    expect(cookie).not.toContain('Secure');
  });

  it('marks the cookie Secure where the public address is https', async () => {
    useSettings(parseSettings({ PUBLIC_URL: 'https://maps.example', DRIFTWRIGHT_DEMO: 'off' }));
    try {
      const made = await app.call('POST', '/api/auth/sign-up', {
        body: person,
        headers: { Origin: 'https://maps.example' },
      });
      expect(made.headers.getSetCookie()[0]).toContain('Secure');
      expect(made.headers.get('Strict-Transport-Security')).toMatch(/^max-age=\d{8}/);
    } finally {
      useSettings(app.settings);
    }
  });

  it('refuses a second account of one e-mail, whatever its case', async () => {
    await app.call('POST', '/api/auth/sign-up', { body: person });
    const again = await app.call('POST', '/api/auth/sign-up', {
      body: { ...person, email: 'hal.brook@EXAMPLE.org' },
    });
    expect([again.status, again.json.name]).toEqual([409, 'EmailTaken']);
    expect(again.text).not.toMatch(/constraint|user_email|duplicate key/);
  });

  it('says which value is not usable', async () => {
    const answer = await app.call('POST', '/api/auth/sign-up', {
      body: { name: ' ', email: 'hal', password: 'short' },
    });
    expect(answer.status).toBe(422);
    expect(answer.headers.get('content-type')).toBe('application/problem+json');
    expect(answer.json.errors.map(({ path }: { path: string }) => path).sort()).toEqual([
      'email',
      'name',
      'password',
    ]);
  });
});

describe('sign-in', () => {
  beforeEach(() => app.call('POST', '/api/auth/sign-up', { body: person }));

  it('answers one problem for a wrong password and for an unknown e-mail', async () => {
    const wrong = await app.call('POST', '/api/auth/sign-in', {
      body: { email: person.email, password: 'tuff and chert 8' },
    });
    const unknown = await app.call('POST', '/api/auth/sign-in', {
      body: { email: 'nobody@example.org', password: 'tuff and chert 8' },
    });
    expect([wrong.status, unknown.status]).toEqual([401, 401]);
    expect(wrong.json).toEqual(unknown.json);
    expect(wrong.cookies).toEqual([]);
  });

  it('takes about as long for an unknown e-mail as for a wrong password', async () => {
    const time = async (email: string) => {
      const started = performance.now();
      await app.call('POST', '/api/auth/sign-in', { body: { email, password: 'tuff and chert 8' } });
      return performance.now() - started;
    };
    await time('nobody@example.org');
    const best = async (email: string) => Math.min(await time(email), await time(email), await time(email));
    const [known, unknown] = [await best(person.email), await best('nobody@example.org')];
    expect(unknown).toBeGreaterThan(0.5 * known);
    expect(unknown).toBeLessThan(2 * known);
  });

  const wrong = (address: string) =>
    app.call('POST', '/api/auth/sign-in', {
      body: { email: person.email, password: 'wrong wrong' },
      headers: { 'X-Forwarded-For': address },
    });

  it('refuses the eleventh wrong try on one account from one address with Retry-After, and nobody else', async () => {
    for (let i = 0; i < 10; i++) expect((await wrong('192.0.2.7')).status).toBe(401);
    const refused = await app.call('POST', '/api/auth/sign-in', { body: person });
    expect([refused.status, refused.json.name]).toEqual([429, 'TooManyRequests']);
    expect(Number(refused.headers.get('Retry-After'))).toBeGreaterThan(800);
    expect(Number(refused.headers.get('Retry-After'))).toBeLessThanOrEqual(900);
    const owner = await app.call('POST', '/api/auth/sign-in', {
      body: person,
      headers: { 'X-Forwarded-For': '192.0.2.8' },
    });
    expect(owner.status).toBe(200);
  });

  it('refuses guesses at one account from many addresses after a hundred', async () => {
    for (let i = 0; i < 100; i++) expect((await wrong(`192.0.2.${i}`)).status).toBe(401);
    expect((await wrong('198.51.100.1')).status).toBe(429);
  });

  it('does not count right passwords', async () => {
    for (let i = 0; i < 12; i++) {
      expect((await app.call('POST', '/api/auth/sign-in', { body: person })).status).toBe(200);
    }
  });

  it('sends a posted form on to a path of this site only, and back with the problem’s name', async () => {
    const right = { email: person.email, password: person.password };
    const on = await app.call('POST', '/api/auth/sign-in', form({ ...right, next: '/projects/x?age=62.4' }));
    expect([on.status, on.headers.get('Location')]).toEqual([303, '/projects/x?age=62.4']);
    for (const next of [
      '//evil.example',
      'https://evil.example',
      '/\\evil.example',
      '/\t/evil.example',
      'javascript:alert(1)',
    ]) {
      const answer = await app.call('POST', '/api/auth/sign-in', form({ ...right, next }));
      expect([answer.status, answer.headers.get('Location')]).toEqual([303, '/projects']);
    }
    const wrong = await app.call(
      'POST',
      '/api/auth/sign-in',
      form({ ...right, password: 'wrong wrong', next: '/projects/x' }),
    );
    expect(wrong.headers.get('Location')).toBe('/sign-in?next=%2Fprojects%2Fx&error=WrongCredentials');
    expect(wrong.cookies).toEqual([]);
  });
});

describe('sessions', () => {
  it('end on the server at sign-out', async () => {
    const signedIn = cookieOf(await app.call('POST', '/api/auth/sign-up', { body: person }));
    expect((await app.call('POST', '/api/auth/sign-out', { as: signedIn })).status).toBe(204);
    expect((await app.call('GET', '/api/me', { as: signedIn })).status).toBe(401);
    expect(await app.db.select().from(session)).toEqual([]);
  });

  it('are listed and ended by their owner alone', async () => {
    const first = await app.call('POST', '/api/auth/sign-up', {
      body: person,
      headers: { 'User-Agent': 'Field tablet' },
    });
    const second = await app.call('POST', '/api/auth/sign-in', { body: person });
    const other = await app.signedUp('Ola Ness');
    const list = (await app.call('GET', '/api/me/sessions', { as: cookieOf(first) })).json.items;
    expect(list).toHaveLength(2);
    expect(list.filter((one: { current: boolean }) => one.current)).toMatchObject([
      { user_agent: 'Field tablet' },
    ]);
    const target = list.find((one: { current: boolean }) => !one.current).id;
    expect((await app.call('DELETE', `/api/me/sessions/${target}`, { as: other })).status).toBe(404);
    expect((await app.call('GET', '/api/me', { as: cookieOf(second) })).status).toBe(200);
    expect((await app.call('DELETE', `/api/me/sessions/${target}`, { as: cookieOf(first) })).status).toBe(
      204,
    );
    expect((await app.call('GET', '/api/me', { as: cookieOf(second) })).status).toBe(401);
  });

  it('that have expired are none', async () => {
    const someone = await app.signedUp('Ola Ness');
    await app.db.update(session).set({ expiresAt: new Date(Date.now() - 1000) });
    expect((await app.call('GET', '/api/me', { as: someone })).status).toBe(401);
  });

  it('all end but the current one when the password changes, which takes the current password', async () => {
    const first = cookieOf(await app.call('POST', '/api/auth/sign-up', { body: person }));
    const second = cookieOf(await app.call('POST', '/api/auth/sign-in', { body: person }));
    const password = 'gneiss and marble';
    const wrong = await app.call('PATCH', '/api/me', {
      as: first,
      body: { password, current_password: 'guess guess' },
    });
    expect([wrong.status, wrong.json.name]).toEqual([403, 'WrongPassword']);
    expect((await app.call('PATCH', '/api/me', { as: first, body: { password } })).status).toBe(422);
    const changed = await app.call('PATCH', '/api/me', {
      as: first,
      body: { password, current_password: person.password, name: 'Hal Brook II' },
    });
    expect([changed.status, changed.json.name]).toEqual([200, 'Hal Brook II']);
    expect((await app.call('GET', '/api/me', { as: first })).status).toBe(200);
    expect((await app.call('GET', '/api/me', { as: second })).status).toBe(401);
    expect((await app.call('POST', '/api/auth/sign-in', { body: person })).status).toBe(401);
    expect((await app.call('POST', '/api/auth/sign-in', { body: { ...person, password } })).status).toBe(200);
  });
});

describe('password reset', () => {
  const linkIn = (text: string) => /http:\/\/127\.0\.0\.1:4321\/reset\/(\S+)/.exec(text)?.[1];

  it('works once, within the hour, and ends all sessions', async () => {
    const signedIn = cookieOf(await app.call('POST', '/api/auth/sign-up', { body: person }));
    const asked = await app.call('POST', '/api/auth/reset-request', {
      body: { email: 'hal.brook@example.org' },
    });
    expect(asked.status).toBe(202);
    const [mail] = await app.db.select().from(mailOutbox);
    expect(mail).toMatchObject({ to: person.email, status: 'kept' });
    const token = linkIn(mail!.text)!;
    const [kept] = await app.db.select().from(passwordReset);
    expect(kept!.hash).not.toContain(token);
    // 1 h, as the mail says.
    expect(Math.abs(kept!.expires_at.getTime() - kept!.created_at.getTime() - 3_600_000)).toBeLessThan(
      10_000,
    );

    const password = 'gneiss and marble';
    expect((await app.call('POST', '/api/auth/reset', { body: { token, password } })).status).toBe(204);
    expect((await app.call('GET', '/api/me', { as: signedIn })).status).toBe(401);
    expect((await app.call('POST', '/api/auth/sign-in', { body: { ...person, password } })).status).toBe(200);
    const again = await app.call('POST', '/api/auth/reset', { body: { token, password: 'third password' } });
    expect([again.status, again.json.name]).toEqual([410, 'ResetLinkSpent']);
  });

  it('refuses an expired link', async () => {
    await app.call('POST', '/api/auth/sign-up', { body: person });
    await app.call('POST', '/api/auth/reset-request', { body: { email: person.email } });
    await app.db.update(passwordReset).set({ expires_at: new Date(Date.now() - 1000) });
    const [mail] = await app.db.select().from(mailOutbox);
    const body = { token: linkIn(mail!.text), password: 'gneiss and marble' };
    expect((await app.call('POST', '/api/auth/reset', { body })).status).toBe(410);
    expect((await app.call('POST', '/api/auth/sign-in', { body: person })).status).toBe(200);
  });

  it('says the same, after the same time, for an unknown e-mail, and mails nobody', async () => {
    await app.call('POST', '/api/auth/sign-up', { body: person });
    const timed = async (email: string) => {
      const started = performance.now();
      const answer = await app.call('POST', '/api/auth/reset-request', { body: { email } });
      return { ms: performance.now() - started, status: answer.status, text: answer.text };
    };
    const unknown = await timed('nobody@example.org');
    expect(await app.db.select().from(mailOutbox)).toEqual([]);
    const known = await timed(person.email);
    expect([unknown.status, unknown.text]).toEqual([known.status, known.text]);
    expect(Math.abs(unknown.ms - known.ms)).toBeLessThan(60);
  });

  it('never takes the link’s address from the request', async () => {
    await app.call('POST', '/api/auth/sign-up', { body: person });
    await app.call('POST', '/api/auth/reset-request', {
      body: { email: person.email },
      headers: { 'X-Forwarded-Host': 'evil.example' },
    });
    const [mail] = await app.db.select().from(mailOutbox);
    expect(mail!.text).not.toContain('evil.example');
    expect(linkIn(mail!.text)).toBeDefined();
  });

  it('sends nothing where the request names another host', async () => {
    await app.call('POST', '/api/auth/sign-up', { body: person });
    const refused = await app.call('POST', '/api/auth/reset-request', {
      body: { email: person.email },
      headers: { Host: 'evil.example', Origin: 'http://evil.example' },
    });
    expect([refused.status, refused.json.name]).toEqual([421, 'UnknownHost']);
    expect(await app.db.select().from(mailOutbox)).toEqual([]);
  });
});

describe('API tokens', () => {
  it('are shown once, stored hashed, and act for their owner by scope', async () => {
    const owner = await app.signedUp('Ola Ness');
    const made = await app.call('POST', '/api/me/tokens', {
      as: owner,
      body: { name: 'laptop', scope: 'read', expires_in_days: 30 },
    });
    expect(made.status).toBe(201);
    const bearer = { headers: { Authorization: `Bearer ${made.json.token}`, Origin: '' } };
    expect((await app.call('GET', '/api/me', bearer)).json.id).toBe(owner.id);
    const [kept] = await app.db.select().from(apiToken);
    expect(kept!.hash).not.toContain(made.json.token);
    expect((await app.call('GET', '/api/me/tokens', { as: owner })).text).not.toContain(made.json.token);
    const written = await app.call('POST', '/api/projects', { ...bearer, body: { title: 'T', slug: 't' } });
    expect([written.status, written.json.name]).toEqual([403, 'ReadOnlyToken']);
    expect((await app.call('POST', '/api/me/tokens', { ...bearer, body: { name: 'more' } })).status).toBe(
      403,
    );
  });

  it('with the scope to write make a project without an Origin', async () => {
    const owner = await app.signedUp('Ola Ness');
    const made = await app.call('POST', '/api/me/tokens', {
      as: owner,
      body: { name: 'laptop', scope: 'write' },
    });
    const headers = { Authorization: `Bearer ${made.json.token}`, Origin: '' };
    expect(
      (await app.call('POST', '/api/projects', { headers, body: { title: 'T', slug: 't' } })).status,
    ).toBe(201);
  });

  it('expire, and a wrong one is refused even beside a good cookie', async () => {
    const owner = await app.signedUp('Ola Ness');
    const made = await app.call('POST', '/api/me/tokens', { as: owner, body: { name: 'laptop' } });
    await app.db
      .update(apiToken)
      .set({ expires_at: new Date(Date.now() - 1000) })
      .where(eq(apiToken.user_id, owner.id));
    const expired = await app.call('GET', '/api/me', {
      as: owner,
      headers: { Authorization: `Bearer ${made.json.token}` },
    });
    expect([expired.status, expired.json.name]).toEqual([401, 'InvalidToken']);
    expect(expired.headers.get('WWW-Authenticate')).toMatch(/^Bearer/);
  });

  it('are revoked by their owner alone', async () => {
    const [owner, other] = [await app.signedUp('Ola Ness'), await app.signedUp('Per Lie')];
    const made = await app.call('POST', '/api/me/tokens', { as: owner, body: { name: 'laptop' } });
    expect((await app.call('DELETE', `/api/me/tokens/${made.json.id}`, { as: other })).status).toBe(404);
    expect((await app.call('DELETE', `/api/me/tokens/${made.json.id}`, { as: owner })).status).toBe(204);
    expect(
      (await app.call('GET', '/api/me', { headers: { Authorization: `Bearer ${made.json.token}` } })).status,
    ).toBe(401);
  });
});

describe('the demo', () => {
  it('signs in by one click as each role while it is on', async () => {
    await seedPeople(app.db);
    useSettings({ ...app.settings, demo: true });
    try {
      for (const [role, name] of [
        ['lead', 'Mara Kell'],
        ['researcher', 'Tobin Ashgrove'],
        ['reviewer', 'Ines Harrowgate'],
        ['instructor', 'Bram Teasdale'],
        ['admin', 'Wilma Oake'],
      ]) {
        // prettier-ignore
        const answer = await app.call('POST', '/api/auth/demo', { body: { role } });
        expect([answer.status, answer.json.name]).toEqual([200, name]);
        expect((await app.call('GET', '/api/me', { as: cookieOf(answer) })).json.name).toBe(name);
      }
    } finally {
      useSettings(app.settings);
    }
  });

  it('once off lets nobody in, and ends the sessions it gave', async () => {
    await seedPeople(app.db);
    useSettings({ ...app.settings, demo: true });
    const given = cookieOf(await app.call('POST', '/api/auth/demo', { body: { role: 'admin' } }));
    useSettings(app.settings);
    expect((await app.call('POST', '/api/auth/demo', { body: { role: 'admin' } })).status).toBe(404);
    expect((await app.call('GET', '/api/admin/outbox', { as: given })).status).toBe(401);
    const body = { email: 'wilma.oake@lantern.example', password: '!' };
    expect((await app.call('POST', '/api/auth/sign-in', { body })).status).toBe(401);
  });
});

describe('theme', () => {
  it('is kept in a cookie', async () => {
    const answer = await app.call('POST', '/api/theme', form({ theme: 'dark', next: '/projects' }));
    expect([answer.status, answer.headers.get('Location'), answer.cookies]).toEqual([
      303,
      '/projects',
      ['theme=dark'],
    ]);
  });
});
