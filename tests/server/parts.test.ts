import type { IncomingMessage } from 'node:http';
import { describe, expect, it } from 'vitest';
import { readConfig } from '#server/config.ts';
import { csvField } from '#server/csv.ts';
import { readCursor, writeCursor } from '#server/cursor.ts';
import { addressOf } from '#server/http/address.ts';
import { encodingFor } from '#server/http/compress.ts';
import { newId, stableJson } from '#server/ids.ts';
import { nextJob } from '#server/jobs/queue.ts';
import type { JobRow } from '#server/jobs/store.ts';
import { knownOrigins, mayChange } from '#server/origin.ts';
import { passwordProblem } from '#server/password.ts';
import { RateLimits } from '#server/rates.ts';

describe('configuration', () => {
  it('has defaults and keeps the demo to localhost', () => {
    expect(readConfig({})).toMatchObject({ host: 'localhost', port: 4321, demo: true, secureCookies: false });
    expect(readConfig({ HOST: '0.0.0.0' }).demo).toBe(false);
    expect(readConfig({ HOST: '0.0.0.0', DEMO: '1' }).demo).toBe(true);
    expect(readConfig({ ORIGIN: 'https://w.example/x' })).toMatchObject({
      origin: 'https://w.example',
      secureCookies: true,
    });
  });
  it('names every wrong variable', () => {
    expect(() => readConfig({ PORT: 'http', LOG_LEVEL: 'loud' })).toThrow(/PORT[\s\S]*LOG_LEVEL/);
  });
});

describe('requests from elsewhere', () => {
  const ours = knownOrigins(readConfig({ PORT: '4321' }));
  const ask = (method: string, headers: Record<string, string>) =>
    mayChange(new Request('http://localhost:4321/api/v1/models', { method, headers }), ours);
  const origin = 'http://localhost:4321';

  it.each(['POST', 'PUT', 'PATCH', 'DELETE'])('%s is refused from another site', (method) => {
    for (const type of ['application/json', 'application/x-www-form-urlencoded', 'text/plain'])
      for (const cookie of [null, 'session=x']) {
        const headers: Record<string, string> = { 'content-type': type, ...(cookie ? { cookie } : {}) };
        expect(ask(method, { ...headers, 'sec-fetch-site': 'cross-site', origin })).toBe(false);
        expect(ask(method, { ...headers, 'sec-fetch-site': 'same-site', origin })).toBe(false);
        expect(ask(method, { ...headers, origin: 'https://evil.example' })).toBe(false);
        expect(ask(method, { ...headers, origin: 'null' })).toBe(false);
        expect(ask(method, { ...headers, 'sec-fetch-site': 'same-origin' })).toBe(true);
        expect(ask(method, { ...headers, 'sec-fetch-site': 'none' })).toBe(true);
        expect(ask(method, { ...headers, origin })).toBe(true);
      }
  });
  it('with no word of where it comes from is let through only without cookies', () => {
    expect(ask('POST', { cookie: 'session=x' })).toBe(false);
    expect(ask('POST', {})).toBe(true);
    expect(ask('GET', { cookie: 'session=x', 'sec-fetch-site': 'cross-site' })).toBe(true);
  });
});

describe('the address of a request', () => {
  const from = (forwarded: string | undefined, trusted: number) =>
    addressOf(
      {
        socket: { remoteAddress: '10.0.0.1' },
        headers: { 'x-forwarded-for': forwarded },
      } as unknown as IncomingMessage,
      trusted,
    );
  it('is the peer unless a proxy is trusted, and never the part that anybody may write', () => {
    expect(from('1.2.3.4', 0)).toBe('10.0.0.1');
    expect(from('6.6.6.6, 1.2.3.4', 1)).toBe('1.2.3.4');
    expect(from('6.6.6.6, 1.2.3.4, 10.9.9.9', 2)).toBe('1.2.3.4');
    expect(from(undefined, 1)).toBe('10.0.0.1');
  });
});

describe('a field of a CSV file', () => {
  it.each([
    ['=1+1', "'=1+1"],
    ['@SUM(A1)', "'@SUM(A1)"],
    ['-2+3', "'-2+3"],
    ['\tx', "'\tx"],
    ['-12', '-12'],
    [7, '7'],
    ['a,b', '"a,b"'],
    ['say "x"', '"say ""x"""'],
    ['=a\nb', '"\'=a\nb"'],
  ])('%j becomes %j', (value, field) => {
    expect(csvField(value)).toBe(field);
  });
});

describe('cursors', () => {
  it('come back as they went out and refuse anything else', () => {
    expect(readCursor(writeCursor([2, 'a', 17]))).toEqual(['2', 'a', '17']);
    for (const text of [
      'x',
      'bnVsbA',
      Buffer.from('[{}]').toString('base64url'),
      Buffer.from('[]').toString('base64url'),
    ])
      expect(() => readCursor(text)).toThrow(/next/);
  });
});

describe('rate limits', () => {
  it('allow a burst, then refuse with the seconds to wait, then refill', () => {
    const rates = new RateLimits();
    for (let at = 0; at < 3; at++) rates.take('k', 3, 30, 'slow down', 0);
    expect(() => rates.take('k', 3, 30, 'slow down', 0)).toThrow(
      expect.objectContaining({ code: 'rate', retryAfter: 10 }),
    );
    rates.take('other', 3, 30, 'slow down', 0);
    expect(() => rates.take('k', 3, 30, 'slow down', 10_000)).not.toThrow();
  });
});

describe('encodings', () => {
  it('prefer Brotli and respect a refusal', () => {
    expect(encodingFor('gzip, deflate, br')).toBe('br');
    expect(encodingFor('gzip;q=1.0, br;q=0')).toBe('gzip');
    expect(encodingFor('identity')).toBeNull();
    expect(encodingFor(undefined)).toBeNull();
  });
});

describe('passwords', () => {
  it('need length, not ornament', () => {
    expect(passwordProblem('short', 'a@example.org')).toMatch(/8/);
    expect(passwordProblem('password1', 'a@example.org')).toMatch(/first/);
    expect(passwordProblem('aaaaaaaaaaaa', 'a@example.org')).toMatch(/first/);
    expect(passwordProblem('x'.repeat(1_025), 'a@example.org')).toMatch(/1 024/);
    expect(passwordProblem('four plain words here', 'a@example.org')).toBeNull();
  });
});

describe('ids and hashes', () => {
  it('are long, plain and different', () => {
    const ids = new Set(Array.from({ length: 1_000 }, newId));
    expect(ids.size).toBe(1_000);
    for (const id of ids) expect(id).toMatch(/^[0-9a-z]{24}$/);
  });
  it('do not depend on the order of keys', () => {
    expect(stableJson({ b: [{ y: 1, x: 2 }], a: 1 })).toBe(stableJson({ a: 1, b: [{ x: 2, y: 1 }] }));
    expect(stableJson({ a: [1, 2] })).not.toBe(stableJson({ a: [2, 1] }));
  });
});

describe('the queue', () => {
  const job = (id: string, owner: string) => ({ id, owner }) as JobRow;
  it('serves who has least running, then who waited longest', () => {
    const waiting = [...Array.from({ length: 50 }, (_, at) => job(`a${at}`, 'a')), job('b0', 'b')];
    expect(nextJob(waiting, ['a'], new Map())!.id).toBe('b0');
    expect(nextJob(waiting, [], new Map([['a', 5]]))!.id).toBe('b0');
    expect(nextJob(waiting, ['b'], new Map([['a', 5]]))!.id).toBe('a0');
    expect(nextJob([], [], new Map())).toBeNull();
  });
  it('serves one of 51 within three jobs of one place', () => {
    const waiting = [...Array.from({ length: 50 }, (_, at) => job(`a${at}`, 'a')), job('b0', 'b')];
    const served = new Map<string, number>();
    const order: string[] = [];
    for (let turn = 1; turn <= 3; turn++) {
      const next = nextJob(waiting, [], served)!;
      served.set(next.owner, turn);
      waiting.splice(waiting.indexOf(next), 1);
      order.push(next.id);
    }
    expect(order).toContain('b0');
  });
  it('gives nobody more than four places', () => {
    expect(nextJob([job('a1', 'a')], ['a', 'a', 'a', 'a'], new Map())).toBeNull();
  });
});
