import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { type AnyCode, STATUS } from '#contract/errors.ts';
import { built, Client, type LiveServer, removeData, startServer } from '../server/harness.ts';
import { type HostileCase, hostileCases } from '../support/hostile.ts';

/** Broken and hostile texts and requests: each is answered with 4xx, a code and a sentence; the server never stumbles. */
const cases = hostileCases();

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

const send = (path: string, body: string): Promise<Response> =>
  client.fetch(path, { method: 'POST', headers: { 'content-type': 'application/json' }, body });

async function refused(path: string, body: string): Promise<{ code: AnyCode; message: string }> {
  const response = await send(path, body);
  const value = (await response.json()) as { status: number; error: { code: AnyCode; message: string } };
  expect([path, response.status >= 400 && response.status < 500, value]).toEqual([path, true, value]);
  expect(response.headers.get('content-type')).toMatch(/^application\/problem\+json/);
  expect(value.error.message.length).toBeGreaterThan(10);
  expect(response.status).toBe(STATUS[value.error.code]);
  return value.error;
}

describe('the hostile corpus over HTTP', () => {
  it.each(cases)('$name', async ({ body, request, code }: HostileCase) => {
    const { code: estimate } = await refused('/api/v1/expansions/estimate', body);
    // A body over the server's own bound is refused before it is read.
    if (estimate !== 'too-large') expect(estimate).toBe(code);
    if (request) await refused('/api/v1/expansions', JSON.stringify({ request }));
  });

  it.each(cases.filter(({ request }) => typeof request?.lagrangian === 'string'))(
    'preview of $name',
    async ({ request }) => {
      const response = await send('/api/v1/models/preview', JSON.stringify({ lagrangian: request!.lagrangian }));
      // A text over the contract's own bound is refused; any other text is answered, its error with it.
      if (response.status !== 422 && response.status !== 413) {
        expect(response.status).toBe(200);
        const preview = (await response.json()) as { ok: boolean; error: { message: string } | null };
        expect(preview.ok).toBe(preview.error === null);
        if (preview.error) expect(preview.error.message.length).toBeGreaterThan(10);
      }
    },
  );

  it('leaves the server well', async () => {
    expect((await client.get('/readyz')).status).toBe(200);
    expect(server.output()).not.toMatch(/"status":5\d\d/);
  });
});
