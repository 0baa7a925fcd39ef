import { connect } from 'node:net';
import { gunzipSync } from 'node:zlib';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { built, Client, type LiveServer, newMember, PHI4, removeData, startServer } from '../server/harness.ts';

let server: LiveServer;
let client: Client;

beforeAll(async () => {
  await built();
  server = await startServer({ DEMO: '1' });
  client = new Client(server.base);
});
afterAll(async () => {
  await server.stop();
  removeData(server);
});

/** Sends bytes as they are, for what no HTTP client would send. */
function raw(text: string): Promise<string> {
  return new Promise((done, fail) => {
    const socket = connect(Number(new URL(server.base).port), 'localhost', () => socket.write(text));
    let answer = '';
    socket.on('data', (part) => {
      answer += part;
    });
    socket.on('end', () => done(answer));
    socket.on('error', fail);
  });
}

describe('headers', () => {
  it.each(['/', '/signin', '/conventions', '/nothing-here'])('%s carries the whole set', async (path) => {
    const { headers } = await client.get(path);
    const policy = headers.get('content-security-policy')!;
    for (const part of [
      "default-src 'self'",
      "object-src 'none'",
      "base-uri 'none'",
      "frame-ancestors 'none'",
      "form-action 'self'",
    ])
      expect(policy).toContain(part);
    expect(policy).not.toContain('unsafe');
    expect(headers.get('content-type')).toBe('text/html; charset=utf-8');
    expect(headers.get('x-content-type-options')).toBe('nosniff');
    expect(headers.get('referrer-policy')).toBe('same-origin');
    expect(headers.get('cross-origin-opener-policy')).toBe('same-origin');
    expect(headers.get('x-request-id')).toMatch(/^[0-9a-f-]{36}$/);
  });

  it('keep what belongs to a person out of caches', async () => {
    const member = await newMember(server.base, 'cached');
    expect((await member.get('/models')).headers.get('cache-control')).toBe('private, no-store');
    expect((await member.get('/api/v1/models')).headers.get('cache-control')).toBe('private, no-store');
  });

  it('give the files of the client a year, and 304 to who has them', async () => {
    const page = await (await client.get('/signin')).text();
    const address = /href="(\/_astro\/[^"]+\.css)"/.exec(page)![1]!;
    const file = await client.fetch(address, { headers: { 'accept-encoding': 'br' } });
    expect(file.headers.get('cache-control')).toContain('immutable');
    expect(file.headers.get('content-encoding')).toBe('br');
    const again = await client.fetch(address, { headers: { 'if-none-match': file.headers.get('etag')! } });
    expect(again.status).toBe(304);
  });
});

describe('compression', () => {
  it('is what the asker knows, and the text stays the same', async () => {
    const plain = await client.fetch('/conventions', { headers: { 'accept-encoding': 'identity' } });
    expect(plain.headers.get('content-encoding')).toBeNull();
    const brotli = await client.fetch('/conventions', { headers: { 'accept-encoding': 'br' } });
    expect(brotli.headers.get('content-encoding')).toBe('br');
    expect(brotli.headers.get('vary')).toMatch(/accept-encoding/i);
    expect(await brotli.text()).toBe(await plain.text());
    const answer = await raw(
      'GET /conventions HTTP/1.1\r\nHost: x\r\nAccept-Encoding: gzip\r\nConnection: close\r\n\r\n',
    );
    expect(answer).toMatch(/content-encoding: gzip/i);
    expect(gunzipSync).toBeDefined();
  });
});

describe('what is refused before it is read', () => {
  it('TRACE, strange methods, long addresses, bodies too large or of unknown length', async () => {
    expect(await raw('TRACE / HTTP/1.1\r\nHost: x\r\n\r\n')).toMatch(/^HTTP\/1.1 405/);
    expect(await raw('PROPFIND / HTTP/1.1\r\nHost: x\r\n\r\n')).toMatch(/^HTTP\/1.1 405/);
    expect(await raw(`GET /${'a'.repeat(9_000)} HTTP/1.1\r\nHost: x\r\n\r\n`)).toMatch(/^HTTP\/1.1 414/);
    expect(await raw('POST /signin HTTP/1.1\r\nHost: x\r\nContent-Length: 60000000\r\n\r\n')).toMatch(/^HTTP\/1.1 413/);
    expect(await raw('POST /signin HTTP/1.1\r\nHost: x\r\nTransfer-Encoding: chunked\r\n\r\n')).toMatch(
      /^HTTP\/1.1 411/,
    );
    expect(await raw('GET http://evil.example/ HTTP/1.1\r\nHost: x\r\nConnection: close\r\n\r\n')).toMatch(
      /^HTTP\/1.1 400/,
    );
    expect(await raw('nonsense\r\n\r\n')).toMatch(/^HTTP\/1.1 400/);
  });

  it('nothing outside the client folder is a file', async () => {
    for (const path of [
      '/../package.json',
      '/%2e%2e/package.json',
      '/.env',
      '/.git/config',
      '/data/wickwork.sqlite',
      '/_astro/../../serve.mjs',
    ])
      expect(await raw(`GET ${path} HTTP/1.1\r\nHost: x\r\nConnection: close\r\n\r\n`)).toMatch(/^HTTP\/1.1 404/);
  });
});

describe('a body that is no request', () => {
  const post = (body: string, type = 'application/json') =>
    client.fetch('/api/v1/models/preview', { method: 'POST', headers: { 'content-type': type }, body });

  it.each([
    ['{', 400, 'malformed'],
    ['', 400, 'malformed'],
    [`{"lagrangian":${'['.repeat(5_000)}${']'.repeat(5_000)}}`, 400, 'malformed'],
    ['{"lagrangian":"x","__proto__":{"a":1}}', 422, 'bad-request'],
    ['{"lagrangian":"x","colour":"red"}', 422, 'bad-request'],
    ['[]', 422, 'bad-request'],
    ['null', 422, 'bad-request'],
    ['{"lagrangian":7}', 422, 'bad-request'],
    ['{"lagrangian":"x","model":{"terms":[]}}', 422, 'bad-request'],
    [`{"lagrangian":"${'x'.repeat(50_000)}"}`, 422, 'limit'],
  ])('%# is answered with its code', async (body, status, code) => {
    const response = await post(body);
    expect(response.status).toBe(status);
    expect(((await response.json()) as { error: { code: string } }).error.code).toBe(code);
  });

  it('says where JSON breaks, and asks for JSON', async () => {
    const response = await post('{"lagrangian":\n  oops}');
    expect(await response.json()).toMatchObject({ error: { code: 'malformed', line: 2 } });
    expect((await post(`{"lagrangian":"${PHI4}"}`, 'text/plain')).status).toBe(400);
  });

  it('bytes that are no UTF-8 are malformed', async () => {
    const body = Buffer.from([0x7b, 0x22, 0xff, 0xfe, 0x22, 0x7d]);
    const response = await client.fetch('/api/v1/models/preview', {
      method: 'POST',
      headers: { 'content-type': 'application/json' },
      body,
    });
    expect(response.status).toBe(400);
  });
});

describe('a query that is no query', () => {
  it('is answered with 422', async () => {
    for (const query of ['limit=0', 'limit=9999', 'limit=x', 'limit=5&limit=6', 'after=zzz', 'colour=red'])
      expect([query, (await client.get(`/api/v1/models?${query}`)).status]).toEqual([query, 422]);
  });
});

describe('requests from another site', () => {
  it.each(['POST', 'PUT', 'DELETE'])('%s is refused, on pages and on the API', async (method) => {
    for (const path of ['/api/v1/models', '/signin', '/signout'])
      for (const [name, value] of [
        ['sec-fetch-site', 'cross-site'],
        ['sec-fetch-site', 'same-site'],
        ['origin', 'https://evil.example'],
      ] as const)
        for (const type of ['application/json', 'application/x-www-form-urlencoded', 'text/plain']) {
          const response = await fetch(server.base + path, {
            method,
            headers: { [name]: value, 'content-type': type },
            body: 'a=b',
          });
          expect(response.status).toBe(403);
        }
  });

  it('opens nothing to other origins', async () => {
    const response = await client.fetch('/api/v1/models', { headers: { origin: 'https://evil.example' } });
    expect(response.headers.get('access-control-allow-origin')).toBeNull();
  });
});

describe('a client that drips its request', () => {
  it('does not keep others waiting', async () => {
    const socket = connect(Number(new URL(server.base).port), 'localhost');
    socket.write('POST /signin HTTP/1.1\r\nHost: x\r\nContent-Length: 100\r\n\r\na');
    expect((await client.get('/healthz')).status).toBe(200);
    socket.destroy();
  });
});
