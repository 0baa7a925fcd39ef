import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { built, Client, type LiveServer, newMember, removeData, startServer } from '../server/harness.ts';

let server: LiveServer;

beforeAll(async () => {
  await built();
  // Limits as they are in earnest.
  server = await startServer({ RATE_FACTOR: '1' });
});
afterAll(async () => {
  await server.stop();
  removeData(server);
});

const isSignedIn = async (client: Client) => (await client.get('/settings')).status === 200;

describe('an account', () => {
  it('is made, left and entered again; the session is new each time and dead after sign-out', async () => {
    const client = await newMember(server.base, 'ada');
    expect(await isSignedIn(client)).toBe(true);
    const first = client.cookies.get('session')!;
    await client.form('/signout', {});
    expect(await isSignedIn(client)).toBe(false);
    const thief = new Client(server.base);
    thief.cookies.set('session', first);
    expect(await isSignedIn(thief)).toBe(false);
    await client.form('/signin', { email: ' ADA@example.org ', password: 'long enough for ada' });
    expect(await isSignedIn(client)).toBe(true);
    expect(client.cookies.get('session')).not.toBe(first);
  });

  it('has a cookie that scripts and other sites cannot use', async () => {
    const response = await fetch(`${server.base}/signup`, {
      method: 'POST',
      redirect: 'manual',
      headers: { origin: server.base },
      body: new URLSearchParams({ email: 'cookie@example.org', name: 'C', password: 'a long enough one' }),
    });
    const cookie = response.headers.getSetCookie().find((line) => line.startsWith('session='))!;
    expect(cookie).toMatch(/HttpOnly/i);
    expect(cookie).toMatch(/SameSite=Lax/i);
    expect(cookie).toMatch(/Path=\/(;|$)/i);
    expect(cookie).not.toMatch(/Domain/i);
  });

  it('has a personal workspace that it leads', () => {
    const rows = server.database((db) =>
      db
        .prepare(
          `SELECT m.role FROM memberships m JOIN "groups" g ON g.id = m.group_id JOIN users u ON u.id = g.personal_of AND u.id = m.user_id
           WHERE u.email = 'ada@example.org'`,
        )
        .pluck()
        .all(),
    );
    expect(rows).toEqual(['lead']);
  });

  it('is told what is wrong, field by field', async () => {
    const client = new Client(server.base);
    const refused = await client.form('/signup', { email: 'nobody', name: '', password: 'short' });
    expect(refused.status).toBe(422);
    const page = await refused.text();
    for (const sentence of ['Enter an e-mail address', 'Enter a name', 'Use at least 8 characters'])
      expect(page).toContain(sentence);
    expect(
      (await client.form('/signup', { email: 'ada@example.org', name: 'A', password: 'another long one' })).status,
    ).toBe(422);
    expect(await isSignedIn(client)).toBe(false);
  });

  it('changes its password, which ends its other sessions', async () => {
    const here = await newMember(server.base, 'grace');
    const there = new Client(server.base);
    await there.form('/signin', { email: 'grace@example.org', password: 'long enough for grace' });
    expect(await isSignedIn(there)).toBe(true);
    const page = await (await here.get('/settings')).text();
    expect(page).toContain('assword');
    await here.form('/settings', {
      intent: 'password',
      current: 'long enough for grace',
      next: 'an even longer password',
    });
    expect(await isSignedIn(here)).toBe(true);
    expect(await isSignedIn(there)).toBe(false);
  });
});

describe('a copy of the database', () => {
  it('opens no session and holds no password', async () => {
    const member = await newMember(server.base, 'hash');
    const secret = member.cookies.get('session')!;
    const { stored, hash } = server.database((db) => ({
      stored: db.prepare('SELECT id FROM sessions').pluck().all() as string[],
      hash: db.prepare('SELECT password_hash FROM users LIMIT 1').pluck().get() as string,
    }));
    expect(stored).not.toContain(secret);
    for (const id of stored) {
      const thief = new Client(server.base);
      thief.cookies.set('session', id);
      expect(await isSignedIn(thief)).toBe(false);
    }
    expect(hash).toMatch(/^\$argon2id\$v=19\$m=19456,t=3,p=1\$/);
    expect(server.output()).not.toContain(secret);
    expect(server.output()).not.toContain('long enough for');
  });
});

describe('guessing', () => {
  it('meets one sentence for every cause, then 429 with the time to wait', async () => {
    const client = new Client(server.base);
    const known = await client.form('/signin', { email: 'ada@example.org', password: 'wrong' });
    const unknown = await client.form('/signin', { email: 'who@example.org', password: 'wrong' });
    expect([known.status, unknown.status]).toEqual([401, 401]);
    const statuses: number[] = [];
    for (let at = 0; at < 12; at++)
      statuses.push((await client.form('/signin', { email: 'victim@example.org', password: `guess ${at}` })).status);
    expect(statuses).toContain(429);
    expect(
      server.database((db) =>
        db.prepare(`SELECT count(*) FROM audit_events WHERE action = 'sign-in.failed'`).pluck().get(),
      ),
    ).toBeGreaterThan(3);
  });
});

describe('demo accounts', () => {
  it('do not exist unless they are asked for', async () => {
    const client = new Client(server.base);
    await client.form('/signin', { email: 'lead@saltmarsh.example', password: 'saltmarsh demo' });
    expect(await isSignedIn(client)).toBe(false);
  });
});
