import { spawnSync } from 'node:child_process';
import { resolve } from 'node:path';

export const root = resolve(import.meta.dirname, '..', '..');

export interface Ran {
  readonly exit: number | null;
  readonly out: string;
  readonly err: string;
}

/** Runs a command of the project as `npm run --silent <name> -- …` does, with a text on standard input. */
export function run(name: 'expand' | 'diagram', input: string, ...options: string[]): Ran {
  const { status, stdout, stderr } = spawnSync(process.execPath, [`scripts/${name}.mjs`, '-', ...options], {
    cwd: root,
    input,
    encoding: 'utf8',
    maxBuffer: 2 ** 28,
  });
  return { exit: status, out: stdout, err: stderr };
}

/** The answer of a command that must succeed. */
export function answer<T>(name: 'expand' | 'diagram', request: unknown, ...options: string[]): T {
  const ran = run(name, JSON.stringify(request), ...options);
  if (ran.exit !== 0) throw new Error(`${name} ended with ${ran.exit}: ${ran.err}`);
  return JSON.parse(ran.out) as T;
}
