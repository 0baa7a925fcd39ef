import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { built, Client, type LiveServer, newMember, removeData, request, startServer } from '../server/harness.ts';
import { type Answer, allRows, expand, page, type Row } from './lists.ts';

let server: LiveServer;
let member: Client;

beforeAll(async () => {
  await built();
  server = await startServer();
  member = await newMember(server.base, 'author');
});
afterAll(async () => {
  await server.stop();
  removeData(server);
});

const fraction = (text: string): number => {
  const [numerator, denominator = '1'] = text.split('/');
  return Number(numerator) / Number(denominator);
};

/** Two-point function of a cubic and quartic model through third order: disconnected pieces included, so there is something to filter. */
const MIXED = {
  ...request({ total: 3 }, ['phi', 'phi'], { keep: 'normalised', through: true }),
  lagrangian: '1/2 (d phi)^2 - 1/2 m^2 phi^2 - g/3! phi^3 - lambda/4! phi^4',
};

describe('an expansion', () => {
  it('is accepted, computed, proven and stored', async () => {
    const response = await member.post('/api/v1/expansions', { request: request({ lambda: 4 }), title: '=1+1' });
    expect([200, 202]).toContain(response.status);
    const { id } = (await response.json()) as Answer;
    expect(response.headers.get('location')).toBe(`/api/v1/expansions/${id}`);
    // Connected vacuum diagrams of φ⁴ at fourth order: 10 (Kleinert, Pelster, Kastening, Bachmann, Phys. Rev. E 62 (2000) 1537, Table I).
    expect(await member.ended(id)).toMatchObject({
      state: 'complete',
      title: '=1+1',
      summary: { state: 'complete', classes: 10 },
      ledger: { state: 'balanced' },
      error: null,
      reusedFrom: null,
      mine: true,
    });
  });

  it('asked again by the same people is the same one', async () => {
    const first = await expand(member, MIXED);
    const again = await member.post('/api/v1/expansions', { request: MIXED });
    expect(again.status).toBe(200);
    expect(((await again.json()) as Answer).id).toBe(first.id);
  });

  it('of a model that is equal up to names and order of terms reuses the stored body', async () => {
    const first = await expand(member, MIXED);
    const renamed = {
      ...MIXED,
      lagrangian: '- g/4! chi^4 - y/3! chi^3 - 1/2 M^2 chi^2 + 1/2 (d chi)^2',
      legs: ['chi', 'chi'],
    };
    const second = await expand(member, renamed);
    expect(second.id).not.toBe(first.id);
    expect(second).toMatchObject({ state: 'complete', contentHash: first.contentHash, reusedFrom: first.id });
    const [a, b] = [await page(member, first.id), await page(member, second.id)];
    expect(b.items.map(({ bare }) => bare)).toEqual(a.items.map(({ bare }) => bare));
    expect(b.items[0]!.id).not.toBe(a.items[0]!.id);
    expect(JSON.stringify(b.items)).not.toMatch(/phi|lambda/);
    expect(
      server.database((db) =>
        db.prepare('SELECT count(*) FROM bodies WHERE content_hash = ?').pluck().get(first.contentHash),
      ),
    ).toBe(1);
  });

  it('does not tell a stranger where the body came from', async () => {
    await expand(member, MIXED);
    const other = await newMember(server.base, 'other');
    expect((await expand(other, MIXED)).reusedFrom).toBe('another workspace');
  });

  it('that is being computed is joined, not computed twice', async () => {
    const other = await newMember(server.base, 'joiner');
    const asked = request({ total: 2 }, ['phi', 'phi', 'phi', 'phi'], { keep: 'all' });
    const first = (await (
      await member.post('/api/v1/expansions', { request: asked, title: 'test job: slow' })
    ).json()) as Answer;
    const second = (await (await other.post('/api/v1/expansions', { request: asked })).json()) as Answer;
    const ends = await Promise.all([member.ended(first.id), other.ended(second.id)]);
    expect(ends.map(({ state }) => state)).toEqual(['complete', 'complete']);
    const count = server.database((db) =>
      db
        .prepare('SELECT count(*) FROM jobs WHERE body_id = (SELECT body_id FROM expansions WHERE id = ?)')
        .pluck()
        .get(first.id),
    );
    expect(count).toBe(1);
  });

  it('with nothing in it is complete and says none', async () => {
    const odd = await expand(member, request({ lambda: 1 }, ['phi', 'phi', 'phi']));
    expect(odd).toMatchObject({ state: 'complete', summary: { state: 'none', classes: 0 } });
    expect(await page(member, odd.id)).toEqual({ items: [], next: null, total: 0 });
  });
});

describe('the list of diagrams', () => {
  let id: string;
  let plain: Row[];
  beforeAll(async () => {
    id = (await expand(member, MIXED)).id;
    plain = await allRows(member, id, 'limit=200');
  });

  it.each(['position', '-position', 'loops', '-loops', 'factor', '-factor', 'shape', '-shape'])(
    'sorted by %s shows every diagram once, in order',
    async (sort) => {
      const rows = await allRows(member, id, `limit=3&sort=${sort}`);
      expect(new Set(rows.map(({ position }) => position)).size).toBe(plain.length);
      expect(rows.length).toBe(plain.length);
      const key = {
        position: (row: Row) => row.position,
        loops: (row: Row) => row.loops,
        factor: (row: Row) => Number(row.symmetryFactor),
      }[sort.replace('-', '') as 'position'];
      if (!key) return;
      const values = rows.map(key);
      expect(values).toEqual([...values].sort((a, b) => (sort.startsWith('-') ? b - a : a - b)));
    },
  );

  it.each([
    ['onePI=true', (row: Row) => row.onePI],
    ['onePI=false', (row: Row) => !row.onePI],
    ['tadpole=true', (row: Row) => row.hasTadpole],
    ['factor=12', (row: Row) => row.symmetryFactor === '12'],
    ['find=1%2F12', (row: Row) => row.weight === '1/12'],
    ['find=S%3D8', (row: Row) => row.symmetryFactor === '8'],
    ['find=%232', (row: Row) => row.position === 2],
    ['find=not%201PI', (row: Row) => !row.onePI],
    ['find=no%20tadpole', (row: Row) => !row.hasTadpole],
    ['find=three%20loops', (row: Row) => row.loops === 3],
  ] as const)('filtered by %s', async (query, keeps) => {
    const answer = await page(member, id, `limit=200&${query}`);
    expect(answer.items).toEqual(plain.filter(keeps));
    expect(answer.total).toBe(answer.items.length);
    expect(answer.items.length).toBeLessThan(plain.length);
  });

  it('refuses a cursor of another sort, and what find cannot be', async () => {
    const { next } = await page(member, id, 'limit=2&sort=factor');
    for (const query of [`sort=loops&after=${next}`, 'sort=colour', 'limit=501', 'factor=x', `find=${'a '.repeat(20)}`])
      expect([query, (await member.get(`/api/v1/expansions/${id}/diagrams?${query}`)).status]).toEqual([query, 422]);
  });

  it.each(['couplings', 'loops', 'factor', 'shape'])('grouped by %s adds up to the ledger', async (by) => {
    const { items } = (await (await member.get(`/api/v1/expansions/${id}/plates?by=${by}`)).json()) as {
      items: { count: number; weight: string; first: number }[];
    };
    expect(items.reduce((sum, plate) => sum + plate.count, 0)).toBe(plain.length);
    const { ledger } = (await (await member.get(`/api/v1/expansions/${id}`)).json()) as Answer;
    expect(items.reduce((sum, plate) => sum + fraction(plate.weight), 0)).toBeCloseTo(fraction(ledger!.weight), 10);
  });

  it('leads from one diagram to the next, by id and by position', async () => {
    const first = (await (await member.get(`/api/v1/expansions/${id}/diagrams/1`)).json()) as {
      id: string;
      bare: string;
      previous: null;
      next: string;
    };
    expect(first.previous).toBeNull();
    const address = `/api/v1/expansions/${id}/diagrams/${encodeURIComponent(first.next)}`;
    const second = await member.get(address);
    expect(await second.json()).toMatchObject({ position: 2, previous: first.id, working: { agree: true } });
    const again = await member.fetch(address, { headers: { 'if-none-match': second.headers.get('etag')! } });
    expect(again.status).toBe(304);
    expect((await member.get(`/api/v1/expansions/${id}/diagrams/no-such-label`)).status).toBe(404);
  });
});

describe('downloads', () => {
  it('JSON holds the whole result with its conventions and cautions', async () => {
    const { id, summary } = await expand(member, MIXED);
    const response = await member.get(`/api/v1/expansions/${id}/download.json`);
    expect(response.headers.get('content-disposition')).toContain('attachment');
    const value = (await response.json()) as Record<string, unknown> & { diagrams: Row[]; cautions: string[] };
    expect(value.diagrams.length).toBe(summary!.classes);
    for (const key of ['request', 'summary', 'ledger', 'rules', 'conventions', 'engine', 'contentHash'])
      expect(value).toHaveProperty(key);
    expect(value.cautions.join(' ')).toMatch(/asymptotic[\s\S]*counting/);
  });

  it('CSV holds whole numbers in columns of their own, and no formula', async () => {
    const { id, summary } = await expand(member, request({ lambda: 4 }), { title: '=1+1' });
    const text = await (await member.get(`/api/v1/expansions/${id}/download.csv`)).text();
    const lines = text.trimEnd().split('\r\n');
    expect(lines[0]).toBe("# title,'=1+1");
    const head = lines.findIndex((line) => line.startsWith('position,'));
    const rows = lines.slice(head + 1).map((line) => line.split(','));
    expect(rows.length).toBe(summary!.classes);
    const column = (name: string) => lines[head]!.split(',').indexOf(name);
    let sum = 0;
    for (const row of rows) {
      for (const name of ['weight_numerator', 'weight_denominator', 'symmetry_factor', 'pairings'])
        expect(row[column(name)]).toMatch(/^\d+$/);
      sum += Number(row[column('weight_numerator')]) / Number(row[column('weight_denominator')]);
    }
    expect(sum).toBeCloseTo(fraction(summary!.weight), 12);
    for (const line of lines) expect(line).not.toMatch(/(^|,)[=+@]/);
  });

  it('knows two formats', async () => {
    const { id } = await expand(member, MIXED);
    expect((await member.get(`/api/v1/expansions/${id}/download.exe`)).status).toBe(404);
  });
});

describe('a visitor', () => {
  it('runs a small expansion, keeps it under a cookie, and takes it along by signing up', async () => {
    const visitor = new Client(server.base);
    const mine = await expand(visitor, request({ loops: 1 }, ['phi', 'phi', 'phi', 'phi'], { keep: '1PI' }));
    expect(mine).toMatchObject({ state: 'complete', summary: { classes: 3 } });
    expect(visitor.cookies.has('visitor')).toBe(true);
    expect((await new Client(server.base).get(`/api/v1/expansions/${mine.id}`)).status).toBe(404);
    const kept = server.database((db) =>
      db.prepare('SELECT expires_at FROM expansions WHERE id = ?').pluck().get(mine.id),
    );
    expect(Date.parse(kept as string) - Date.now()).toBeGreaterThan(23 * 3_600_000);
    await visitor.form('/signup', { email: 'new@example.org', name: 'New', password: 'a long enough one' });
    expect(await (await visitor.get(`/api/v1/expansions/${mine.id}`)).json()).toMatchObject({ mine: true });
    expect(
      server.database((db) => db.prepare('SELECT expires_at FROM expansions WHERE id = ?').pluck().get(mine.id)),
    ).toBeNull();
  });

  it('is told before anything runs when it is too large, and so is a member', async () => {
    const large = request({ total: 9 }, ['phi', 'phi', 'phi', 'phi']);
    const visitor = new Client(server.base);
    const estimate = (await (await visitor.post('/api/v1/expansions/estimate', large)).json()) as {
      allowed: boolean;
      reason: string;
    };
    expect(estimate.allowed).toBe(false);
    expect(estimate.reason).toMatch(/2000|2 000|5 s/);
    const refused = await visitor.post('/api/v1/expansions', { request: large });
    expect(refused.status).toBe(422);
    expect(await refused.json()).toMatchObject({ error: { code: 'limit' } });
    expect(server.database((db) => db.prepare(`SELECT count(*) FROM jobs WHERE state = 'queued'`).pluck().get())).toBe(
      0,
    );
  });

  it('has one expansion under way at a time', async () => {
    const visitor = new Client(server.base);
    const slow = request({ total: 2 }, ['phi', 'phi', 'phi', 'phi', 'phi', 'phi'], { keep: 'all' });
    expect((await visitor.post('/api/v1/expansions', { request: slow, title: 'test job: slow' })).status).toBe(202);
    const second = await visitor.post('/api/v1/expansions', { request: request({ total: 1 }, ['phi', 'phi']) });
    expect(second.status).toBe(429);
    expect(second.headers.get('retry-after')).toMatch(/^\d+$/);
  });
});
