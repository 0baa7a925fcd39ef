import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { type AnyCode, STATUS } from '#contract/errors.ts';
import { built, Client, type LiveServer, removeData, root, startServer } from '../server/harness.ts';

/** Broken and hostile texts and requests: each is answered with 4xx, a code and a sentence; the server never stumbles. */
interface Entry {
  name: string;
  lagrangian?: string;
  request?: unknown;
  expect: 'input' | 'limit';
  code?: AnyCode;
}

const corpus = JSON.parse(readFileSync(join(root, 'tests/reference/hostile.json'), 'utf8')) as
  | Entry[]
  | { entries: Entry[] };
const entries = Array.isArray(corpus) ? corpus : corpus.entries;

let server: LiveServer;
let client: Client;

beforeAll(async () => {
  await built();
  server = await startServer();
  client = new Client(server.base);
});
afterAll(async () => {
  await server.stop();
  removeData(server);
});

const requestOf = ({ request, lagrangian }: Entry): unknown => request ?? { lagrangian, legs: [], order: { total: 1 } };

describe('the hostile corpus over HTTP', () => {
  it('has at least 200 entries', () => {
    expect(entries.length).toBeGreaterThanOrEqual(200);
  });

  it.each(entries)('$name', async (entry) => {
    for (const path of ['/api/v1/expansions/estimate', '/api/v1/expansions']) {
      const asked = requestOf(entry);
      const response = await client.post(path, path.endsWith('estimate') ? asked : { request: asked });
      const value = (await response.json()) as { status: number; error: { code: AnyCode; message: string } };
      expect([path, response.status >= 400 && response.status < 500, value]).toEqual([path, true, value]);
      expect(response.headers.get('content-type')).toMatch(/^application\/problem\+json/);
      expect(value.error.message.length).toBeGreaterThan(10);
      expect(response.status).toBe(STATUS[value.error.code]);
      if (entry.code) expect(value.error.code).toBe(entry.code);
      if (entry.expect === 'limit')
        expect(['limit', 'too-large', 'bad-request', 'malformed']).toContain(value.error.code);
    }
  });

  it.each(entries.filter(({ lagrangian }) => lagrangian !== undefined))('preview of $name', async ({ lagrangian }) => {
    const response = await client.post('/api/v1/models/preview', { lagrangian });
    // A text over the contract's own bound is refused; any other text is answered, its error with it.
    if (response.status !== 422) {
      expect(response.status).toBe(200);
      expect(await response.json()).toMatchObject({
        ok: false,
        error: { code: expect.any(String), message: expect.any(String) },
      });
    }
  });

  it('leaves the server well', async () => {
    expect((await client.get('/readyz')).status).toBe(200);
    expect(server.output()).not.toMatch(/"status":5\d\d/);
  });
});
