import { readdirSync } from 'node:fs';
import { join } from 'node:path';
import SQLite from 'better-sqlite3';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import {
  built,
  Client,
  type LiveServer,
  newMember,
  PHI4,
  removeData,
  request,
  root,
  startServer,
} from '../server/harness.ts';

/**
 * Who may do what, over HTTP: every route of the API, asked by everybody. The thing asked for belongs to the Saltmarsh
 * group and is private, so a stranger must not learn that it exists: 404, never 403.
 */
const ROLES = ['nobody', 'visitor', 'stranger', 'reader', 'checker', 'author', 'lead'] as const;
type RoleName = (typeof ROLES)[number];

const model = { title: 'T', input: { lagrangian: PHI4 } };
const asked = request({ loops: 1 }, ['phi', 'phi', 'phi', 'phi'], { keep: '1PI' });

interface Case {
  route: string;
  method: 'GET' | 'POST' | 'PUT' | 'DELETE';
  path: string;
  body?: object;
  /** One status per role, in the order of ROLES. */
  expect: number[];
}

const everybody = (status: number) => ROLES.map(() => status);
const members = (status: number) => [404, 404, 404, status, status, status, status];
const authors = (status: number) => [404, 404, 404, 403, 403, status, status];

/** MODEL and EXPANSION are the group's; removals come last, by the author and then (again) by nobody. */
const CASES: Case[] = [
  { route: 'models/index', method: 'GET', path: '/models', expect: everybody(200) },
  { route: 'models/index', method: 'POST', path: '/models', body: model, expect: [401, 401, 201, 201, 201, 201, 201] },
  { route: 'models/preview', method: 'POST', path: '/models/preview', body: model.input, expect: everybody(200) },
  { route: 'models/[id]/index', method: 'GET', path: '/models/MODEL', expect: members(200) },
  { route: 'models/[id]/index', method: 'PUT', path: '/models/MODEL', body: { title: 'N' }, expect: authors(200) },
  { route: 'models/[id]/revisions', method: 'GET', path: '/models/MODEL/revisions', expect: members(200) },
  { route: 'expansions/index', method: 'GET', path: '/expansions', expect: everybody(200) },
  {
    route: 'expansions/index',
    method: 'POST',
    path: '/expansions',
    body: { request: { ...asked, legs: ['psi'] } },
    expect: everybody(422),
  },
  { route: 'expansions/estimate', method: 'POST', path: '/expansions/estimate', body: asked, expect: everybody(200) },
  { route: 'expansions/[id]/index', method: 'GET', path: '/expansions/EXPANSION', expect: members(200) },
  {
    route: 'expansions/[id]/cancel',
    method: 'POST',
    path: '/expansions/EXPANSION/cancel',
    body: {},
    expect: authors(409),
  },
  {
    route: 'expansions/[id]/retry',
    method: 'POST',
    path: '/expansions/EXPANSION/retry',
    body: {},
    expect: authors(409),
  },
  {
    route: 'expansions/[id]/diagrams/index',
    method: 'GET',
    path: '/expansions/EXPANSION/diagrams',
    expect: members(200),
  },
  {
    route: 'expansions/[id]/diagrams/[label]',
    method: 'GET',
    path: '/expansions/EXPANSION/diagrams/1',
    expect: members(200),
  },
  {
    route: 'expansions/[id]/diagrams/[label].svg',
    method: 'GET',
    path: '/expansions/EXPANSION/diagrams/1.svg',
    expect: members(200),
  },
  { route: 'expansions/[id]/plates', method: 'GET', path: '/expansions/EXPANSION/plates', expect: members(200) },
  { route: 'expansions/[id]/ledger', method: 'GET', path: '/expansions/EXPANSION/ledger', expect: members(200) },
  { route: 'expansions/[id]/events', method: 'GET', path: '/expansions/EXPANSION/events', expect: members(200) },
  {
    route: 'expansions/[id]/download.[format]',
    method: 'GET',
    path: '/expansions/EXPANSION/download.json',
    expect: members(200),
  },
  {
    route: 'expansions/[id]/download.[format]',
    method: 'GET',
    path: '/expansions/EXPANSION/download.csv',
    expect: members(200),
  },
  {
    route: 'diagram',
    method: 'POST',
    path: '/diagram',
    body: {
      lines: [
        [1, 2],
        [1, 2],
        [1, 2],
      ],
      legs: [1, 2],
    },
    expect: everybody(200),
  },
  { route: '[...rest]', method: 'GET', path: '/nothing-here', expect: everybody(404) },
  { route: 'openapi.json', method: 'GET', path: '/openapi.json', expect: everybody(200) },
  { route: 'schema.json', method: 'GET', path: '/schema.json', expect: everybody(200) },
  {
    route: 'expansions/[id]/index',
    method: 'DELETE',
    path: '/expansions/EXPANSION',
    expect: [404, 404, 404, 403, 403, 204, 404],
  },
  { route: 'models/[id]/index', method: 'DELETE', path: '/models/MODEL', expect: [404, 404, 404, 403, 403, 204, 404] },
];

let server: LiveServer;
const clients = new Map<RoleName, Client>();
const ids = { MODEL: '', EXPANSION: '' };

beforeAll(async () => {
  await built();
  server = await startServer({ DEMO: '1' });
  clients.set('nobody', new Client(server.base));
  const visitor = new Client(server.base);
  visitor.cookies.set('visitor', 'a'.repeat(40));
  clients.set('visitor', visitor);
  clients.set('stranger', await newMember(server.base, 'stranger'));
  for (const role of ROLES.slice(3)) {
    const client = new Client(server.base);
    await client.form('/signin', { email: `${role}@saltmarsh.example`, password: 'saltmarsh demo' });
    expect(client.cookies.has('session')).toBe(true);
    clients.set(role, client);
  }
  const db = new SQLite(join(server.dataDir, 'wickwork.sqlite'));
  for (const [name, table] of [
    ['MODEL', 'models'],
    ['EXPANSION', 'expansions'],
  ] as const) {
    ids[name] = db
      .prepare(`SELECT id FROM ${table} WHERE visibility = 'public' ORDER BY id LIMIT 1`)
      .pluck()
      .get() as string;
    db.prepare(`UPDATE ${table} SET visibility = 'private' WHERE id = ?`).run(ids[name]);
  }
  db.close();
});
afterAll(async () => {
  await server.stop();
  removeData(server);
});

const pathOf = ({ path }: Case) => `/api/v1${path.replace('MODEL', ids.MODEL).replace('EXPANSION', ids.EXPANSION)}`;

async function ask(role: RoleName, entry: Case): Promise<Response> {
  const client = clients.get(role)!;
  const response = entry.body
    ? await client.send(entry.method as 'POST' | 'PUT', pathOf(entry), entry.body)
    : await client.fetch(pathOf(entry), { method: entry.method });
  if (role === 'nobody') client.cookies.clear();
  return response;
}

describe('every route, asked by everybody', () => {
  it.each(CASES)('$method $path', async (entry) => {
    const got: Record<string, number> = {};
    for (const role of ROLES) {
      const response = await ask(role, entry);
      got[role] = response.status;
      const text = await response.text();
      if (response.status >= 400) {
        expect(response.headers.get('content-type')).toMatch(/^application\/problem\+json/);
        const value = JSON.parse(text);
        expect(value).toMatchObject({
          status: response.status,
          detail: expect.any(String),
          error: { message: expect.any(String) },
        });
        expect(Object.keys(value.error)).toEqual(expect.arrayContaining(['code', 'message', 'line', 'column']));
      }
    }
    expect(got).toEqual(Object.fromEntries(ROLES.map((role, at) => [role, entry.expect[at]])));
  });

  it('leaves out no route', () => {
    const folder = join(root, 'src/pages/api/v1');
    const routes = readdirSync(folder, { recursive: true, encoding: 'utf8' })
      .filter((name) => name.endsWith('.ts'))
      .map((name) => name.slice(0, -3));
    expect(new Set(CASES.map(({ route }) => route))).toEqual(new Set(routes));
  });

  it('gives a drawing as a file, and 304 to who has it', async () => {
    const lead = clients.get('lead')!;
    // The matrix has removed its expansion; another public one of the demo is asked.
    const { items } = await (await lead.get('/api/v1/expansions')).json();
    const path = `/api/v1/expansions/${items.find(({ state }: { state: string }) => state === 'complete').id}/diagrams/1`;
    const { bare, description, symmetryFactor } = await (await lead.get(path)).json();
    const first = await lead.get(`${path}.svg`);
    expect(first.headers.get('content-type')).toBe('image/svg+xml; charset=utf-8');
    expect(first.headers.get('content-disposition')).toBe(`attachment; filename="wickwork-${bare}.svg"`);
    const text = await first.text();
    expect(text).toMatch(/^<svg [^>]*>\n<title>/);
    expect(text).toContain(`<desc>${description}`);
    expect(text).toContain(
      `symmetry factor S = ${symmetryFactor}, weight 1/S. external legs labelled; made by Wickwork `,
    );
    const etag = first.headers.get('etag')!;
    expect((await lead.fetch(`${path}.svg`, { headers: { 'if-none-match': etag } })).status).toBe(304);
    expect((await lead.fetch(path, { headers: { 'if-none-match': etag } })).status).toBe(200);
    expect((await lead.get(`${path.slice(0, -1)}999999.svg`)).status).toBe(404);
  });

  it('answers 405 with the methods that work to every other one', async () => {
    const methods = new Map<string, Set<string>>();
    for (const { path, method } of CASES) methods.set(path, (methods.get(path) ?? new Set()).add(method));
    methods.delete('/nothing-here');
    for (const [path, known] of methods)
      for (const method of ['GET', 'POST', 'PUT', 'PATCH', 'DELETE'].filter((name) => !known.has(name))) {
        const response = await clients.get('lead')!.fetch(`/api/v1${path}`, { method });
        expect([path, method, response.status]).toEqual([path, method, 405]);
        expect(response.headers.get('allow')).toContain([...known][0]);
      }
  });

  it('refuses keys that a request does not have', async () => {
    const stranger = clients.get('stranger')!;
    for (const extra of [{ owner: 'x' }, { role: 'lead' }, { groupId: 'g' }, { visibility: 'public' }]) {
      expect((await stranger.post('/api/v1/models', { ...model, ...extra })).status).toBe(422);
      expect((await stranger.post('/api/v1/expansions', { request: asked, ...extra })).status).toBe(422);
    }
  });
});
