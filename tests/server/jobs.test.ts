import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { built, Client, type LiveServer, newMember, removeData, request, startServer } from './harness.ts';

/** Four legs at total order 4: enough diagrams that a slow job is under way for seconds. */
const LARGE = request({ total: 4 }, ['phi', 'phi', 'phi', 'phi']);

let server: LiveServer;
let member: Client;

beforeAll(async () => {
  await built();
  server = await startServer({ JOB_HEAP_MIB: '96', JOB_SECONDS: '2', JOBS: '2' });
  member = await newMember(server.base, 'runner');
});
afterAll(async () => {
  await server.stop();
  removeData(server);
});

const start = async (client: Client, title: string, asked: object = LARGE) =>
  (await client.post('/api/v1/expansions', { title, request: asked })).json() as Promise<{ id: string; state: string }>;

/** Different requests, so that none is answered by another's result. */
let variant = 0;
const fresh = () => request({ total: 2 }, Array(2 * (++variant % 5)).fill('phi'), { keep: 'all' });

describe('a job that misbehaves', () => {
  it.each([
    ['hog', /memory/],
    ['buffers', /memory/],
    ['spin', /2 s/],
    ['crash', /unexpectedly/],
  ])('%s: ends with a sentence, and the server lives', async (kind, sentence) => {
    const { id } = await start(member, `test job: ${kind}`, fresh());
    const record = await member.ended(id);
    expect(record).toMatchObject({ state: 'failed', summary: null, ledger: null });
    expect((record.error as unknown as { message: string }).message).toMatch(sentence);
    expect((await member.get('/readyz')).status).toBe(200);
    expect((await member.get(`/api/v1/expansions/${id}/diagrams`)).status).toBe(409);
    expect(server.database((db) => db.pragma('foreign_key_check'))).toEqual([]);
  });

  it('can be started again under its own address', async () => {
    const { id } = await start(member, 'test job: crash', fresh());
    await member.ended(id);
    expect((await member.post(`/api/v1/expansions/${id}/retry`, {})).status).toBe(202);
    expect((await member.ended(id)).state).toBe('failed');
  });
});

describe('cancelling', () => {
  it('ends a running job and its process, and leaves nothing readable', async () => {
    const { id } = await start(member, 'test job: slow', LARGE);
    await first(member, id, 'diagrams');
    const answer = await member.delete(`/api/v1/expansions/${id}`);
    expect(answer.status).toBe(200);
    expect(await answer.json()).toMatchObject({ state: 'cancelled', summary: null });
    while (((await (await member.get('/readyz')).json()) as { jobs: number }).jobs > 0);
    expect((await member.get(`/api/v1/expansions/${id}/diagrams`)).status).toBe(409);
    expect((await member.delete(`/api/v1/expansions/${id}`)).status).toBe(204);
    expect((await member.get(`/api/v1/expansions/${id}`)).status).toBe(404);
  });

  it('does not end what somebody else waits for', async () => {
    const other = await newMember(server.base, 'joiner');
    const asked = request({ total: 3 }, ['phi', 'phi', 'phi', 'phi'], { keep: 'all' });
    const mine = await start(member, 'test job: slow', asked);
    await first(member, mine.id, 'diagrams');
    const theirs = await start(other, 'joined', asked);
    expect(theirs.id).not.toBe(mine.id);
    await member.delete(`/api/v1/expansions/${mine.id}`);
    expect((await member.get(`/api/v1/expansions/${mine.id}`)).status).toBe(200);
    // Two seconds are not enough for the slow job: it fails for the one who waited, and only for them.
    expect((await other.ended(theirs.id)).state).toBe('failed');
    expect(await (await member.get(`/api/v1/expansions/${mine.id}`)).json()).toMatchObject({ state: 'cancelled' });
  });
});

/** Reads an event stream until an event of a kind has come. */
async function first(client: Client, id: string, kind: string): Promise<void> {
  const response = await client.get(`/api/v1/expansions/${id}/events`);
  const reader = response.body!.getReader();
  let text = '';
  while (!text.includes(`event: ${kind}`)) {
    const { done, value } = await reader.read();
    if (done) throw new Error(`the stream ended without "${kind}":\n${text}`);
    text += new TextDecoder().decode(value);
  }
  await reader.cancel();
}

describe('kill -9 in the middle of a job', () => {
  it('leaves a sound database, nothing half complete, and the job is taken up again', async () => {
    let mortal = await startServer({ JOBS: '1' });
    try {
      const before = await newMember(mortal.base, 'survivor');
      const { id } = await start(before, 'test job: slow', LARGE);
      await first(before, id, 'diagrams');
      await mortal.stop('SIGKILL');
      mortal.database((db) => {
        expect(db.pragma('integrity_check', { simple: true })).toBe('ok');
        expect(db.pragma('foreign_key_check')).toEqual([]);
        expect(db.prepare('SELECT state FROM expansions WHERE id = ?').pluck().get(id)).toBe('running');
        expect(db.prepare(`SELECT count(*) FROM bodies WHERE state = 'complete'`).pluck().get()).toBe(0);
      });
      // Without the test switch the same job runs at full speed.
      mortal = await startServer({ JOBS: '1', TEST_JOBS: '0' }, mortal.dataDir);
      const after = new Client(mortal.base);
      for (const [name, value] of before.cookies) after.cookies.set(name, value);
      const record = await after.ended(id);
      expect(record).toMatchObject({ state: 'complete', ledger: { state: 'balanced' } });
      const { classes } = record.summary as unknown as { classes: number };
      mortal.database((db) => {
        const stored = db.prepare('SELECT count(*), count(DISTINCT label), max(position) FROM diagrams').raw().get();
        expect(stored).toEqual([classes, classes, classes]);
      });
    } finally {
      await mortal.stop();
      removeData(mortal);
    }
  });

  it('a job that was tried three times is interrupted, and can be started again', async () => {
    let mortal = await startServer({ JOBS: '1' });
    try {
      const before = await newMember(mortal.base, 'unlucky');
      const { id } = await start(before, 'test job: slow', LARGE);
      for (let crash = 0; crash < 3; crash++) {
        const client = new Client(mortal.base);
        for (const [name, value] of before.cookies) client.cookies.set(name, value);
        await first(client, id, 'diagrams');
        await mortal.stop('SIGKILL');
        mortal = await startServer({ JOBS: '1' }, mortal.dataDir);
      }
      const client = new Client(mortal.base);
      for (const [name, value] of before.cookies) client.cookies.set(name, value);
      expect(await client.ended(id)).toMatchObject({
        state: 'interrupted',
        error: { code: 'interrupted' },
        summary: null,
      });
      expect((await client.post(`/api/v1/expansions/${id}/retry`, {})).status).toBe(202);
    } finally {
      await mortal.stop();
      removeData(mortal);
    }
  });
});

describe('SIGTERM', () => {
  it('lets a request under way end, then ends with code 0; an unfinished job waits for the next start', async () => {
    const polite = await startServer({ JOBS: '1' });
    const client = await newMember(polite.base, 'polite');
    const { id } = await start(client, 'test job: slow', LARGE);
    await first(client, id, 'diagrams');
    const answers = Array.from({ length: 5 }, () => client.get('/api/v1/expansions'));
    await Promise.all(answers);
    const late = client.form('/signin', { email: 'polite@example.org', password: 'wrong, and slow to check' });
    await new Promise((resolve) => setImmediate(resolve));
    const code = polite.stop();
    expect((await late).status).toBeLessThan(500);
    expect(await code).toBe(0);
    polite.database((db) => {
      expect(db.pragma('integrity_check', { simple: true })).toBe('ok');
      expect(db.prepare('SELECT state FROM jobs').pluck().all()).toEqual(['running']);
    });
    removeData(polite);
  });
});
