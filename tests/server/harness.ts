import { type ChildProcess, spawn } from 'node:child_process';
import { once } from 'node:events';
import { mkdtempSync, rmSync } from 'node:fs';
import { createServer } from 'node:net';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';
import SQLite from 'better-sqlite3';

export const root = resolve(import.meta.dirname, '..', '..');

/** The built server; built again only when its sources changed. */
export async function built(): Promise<void> {
  // A path that the type checker does not follow: the script is plain JavaScript.
  const script: string = join(root, 'scripts', 'build.mjs');
  const { ensureBuild } = (await import(script)) as { ensureBuild(): Promise<void> };
  await ensureBuild();
}

async function freePort(): Promise<number> {
  const probe = createServer().listen(0, 'localhost');
  await once(probe, 'listening');
  const { port } = probe.address() as { port: number };
  probe.close();
  await once(probe, 'close');
  return port;
}

export interface LiveServer {
  readonly base: string;
  readonly dataDir: string;
  readonly process: ChildProcess;
  /** Everything the server wrote. */
  output(): string;
  /** Ends the process with a signal and waits for its end. @returns exit code, or null after a kill. */
  stop(signal?: NodeJS.Signals): Promise<number | null>;
  /** Opens the database file beside the server, read-only. */
  database<T>(look: (db: SQLite.Database) => T): T;
}

/** Starts the built server on a free port with a data folder of its own. */
export async function startServer(
  environment: Record<string, string> = {},
  dataDir = mkdtempSync(join(tmpdir(), 'wickwork-')),
): Promise<LiveServer> {
  const port = await freePort();
  const child = spawn(process.execPath, [join(root, 'dist', 'serve.mjs')], {
    cwd: root,
    env: {
      PATH: process.env.PATH,
      NODE_ENV: 'production',
      PORT: String(port),
      DATA_DIR: dataDir,
      DEMO: '0',
      TEST_JOBS: '1',
      RATE_FACTOR: '1000',
      ...environment,
    },
    stdio: ['ignore', 'pipe', 'pipe'],
  });
  let output = '';
  const ready = new Promise<void>((done, fail) => {
    const read = (part: Buffer) => {
      output += part.toString();
      if (output.includes('Wickwork is at ')) done();
    };
    child.stdout!.on('data', read);
    child.stderr!.on('data', read);
    child.once('exit', (code) => fail(new Error(`the server ended with ${code}:\n${output}`)));
  });
  await ready;
  return {
    base: `http://localhost:${port}`,
    dataDir,
    process: child,
    output: () => output,
    stop: async (signal = 'SIGTERM') => {
      if (child.exitCode !== null || child.signalCode !== null) return child.exitCode;
      const ended = once(child, 'exit');
      child.kill(signal);
      const [code] = (await ended) as [number | null];
      return code;
    },
    database: (look) => {
      const db = new SQLite(join(dataDir, 'wickwork.sqlite'), { readonly: true });
      try {
        return look(db);
      } finally {
        db.close();
      }
    },
  };
}

export function removeData(server: LiveServer): void {
  rmSync(server.dataDir, { recursive: true, force: true });
}

/** What one browser does: keeps cookies, sends Origin and Sec-Fetch-Site as browsers do. */
export class Client {
  readonly cookies = new Map<string, string>();

  constructor(readonly base: string) {}

  async fetch(path: string, init: RequestInit = {}): Promise<Response> {
    const headers = new Headers(init.headers);
    if (this.cookies.size > 0)
      headers.set('cookie', [...this.cookies].map(([name, value]) => `${name}=${value}`).join('; '));
    if (init.method && !['GET', 'HEAD'].includes(init.method) && !headers.has('origin'))
      headers.set('origin', this.base);
    const response = await fetch(this.base + path, { redirect: 'manual', ...init, headers });
    for (const line of response.headers.getSetCookie()) {
      const [pair = ''] = line.split(';');
      const at = pair.indexOf('=');
      if (/max-age=0/i.test(line) || pair.slice(at + 1) === '') this.cookies.delete(pair.slice(0, at));
      else this.cookies.set(pair.slice(0, at), pair.slice(at + 1));
    }
    return response;
  }

  get = (path: string): Promise<Response> => this.fetch(path);
  delete = (path: string): Promise<Response> => this.fetch(path, { method: 'DELETE' });
  send(method: 'POST' | 'PUT', path: string, value: unknown): Promise<Response> {
    return this.fetch(path, {
      method,
      headers: { 'content-type': 'application/json' },
      body: typeof value === 'string' ? value : JSON.stringify(value),
    });
  }
  post = (path: string, value: unknown): Promise<Response> => this.send('POST', path, value);
  form(path: string, fields: Record<string, string>): Promise<Response> {
    return this.fetch(path, { method: 'POST', body: new URLSearchParams(fields) });
  }

  /** Waits until an expansion has ended, on its event stream. @returns its record. */
  async ended(id: string): Promise<Record<string, unknown> & { state: string }> {
    await (await this.get(`/api/v1/expansions/${id}/events`)).text();
    return (await this.get(`/api/v1/expansions/${id}`)).json();
  }
}

/** A new account, signed in. */
export async function newMember(base: string, name: string): Promise<Client> {
  const client = new Client(base);
  const response = await client.form('/signup', {
    email: `${name}@example.org`,
    name,
    password: `long enough for ${name}`,
  });
  if (response.status !== 303 && response.status !== 302)
    throw new Error(`sign-up answered ${response.status}: ${(await response.text()).slice(0, 500)}`);
  return client;
}

export const PHI4 = '1/2 (d phi)^2 - 1/2 m^2 phi^2 - lambda/4! phi^4';

/** A request on the quartic model. */
export const request = (order: Record<string, number>, legs: string[] = [], more: object = {}) => ({
  lagrangian: PHI4,
  legs,
  order,
  ...more,
});
