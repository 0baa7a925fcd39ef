import { spawn } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { ensureBuild } from '../../build.mjs';
import { root } from '../../lib/provision.mjs';

const PORT = Number(process.env.BENCH_PORT ?? 4390);

/** The built server with the demo's accounts on a folder of its own; `stop` removes both. */
export async function startServer() {
  await ensureBuild();
  const folder = mkdtempSync(join(tmpdir(), 'wickwork-bench-'));
  const child = spawn(process.execPath, [join(root, 'dist', 'serve.mjs')], {
    cwd: root,
    env: {
      ...process.env,
      NODE_ENV: 'production',
      PORT: String(PORT),
      DATA_DIR: folder,
      DEMO: '1',
      RATE_FACTOR: '1000',
    },
    stdio: ['ignore', 'pipe', 'pipe'],
  });
  await new Promise((ready, fail) => {
    let output = '';
    const read = (part) => {
      output += part;
      if (output.includes('Wickwork is at ')) ready();
    };
    child.stdout.on('data', read);
    child.stderr.on('data', read);
    child.once('exit', (code) => fail(new Error(`the server ended with ${code}:\n${output}`)));
  });
  return {
    base: `http://localhost:${PORT}`,
    stop: async () => {
      const ended = new Promise((done) => child.once('exit', done));
      child.kill();
      await ended;
      rmSync(folder, { recursive: true, force: true });
    },
  };
}

/** Signs up a member. @returns the session cookie as "name=value". */
export async function signUp(base) {
  const body = new URLSearchParams({
    email: 'bench@example.org',
    name: 'Bench',
    password: 'a password long enough',
  });
  const response = await fetch(`${base}/signup`, {
    method: 'POST',
    body,
    redirect: 'manual',
    headers: { origin: base },
  });
  const cookies = response.headers.getSetCookie().map((line) => line.split(';')[0]);
  if (cookies.length === 0) throw new Error(`sign-up answered ${response.status}`);
  return cookies.join('; ');
}

export const PHI4 = '1/2 (d phi)^2 - 1/2 m^2 phi^2 - lambda/4! phi^4';

/** Asks for an expansion of the quartic model. @returns its record. */
export async function expand(base, cookie, request) {
  const response = await fetch(`${base}/api/v1/expansions`, {
    method: 'POST',
    headers: { 'content-type': 'application/json', origin: base, cookie },
    body: JSON.stringify({ request: { lagrangian: PHI4, ...request } }),
  });
  const record = await response.json();
  if (!response.ok) throw new Error(JSON.stringify(record.error));
  return record;
}

/** Waits for the end of an expansion on its event stream. @returns its record. */
export async function ended(base, cookie, id) {
  await (await fetch(`${base}/api/v1/expansions/${id}/events`, { headers: { cookie } })).text();
  return (await fetch(`${base}/api/v1/expansions/${id}`, { headers: { cookie } })).json();
}
