import { existsSync } from 'node:fs';
import { availableParallelism } from 'node:os';
import { dirname, join, resolve } from 'node:path';
import { fileURLToPath } from 'node:url';
import { z } from 'zod';

const flag = z.enum(['0', '1']).transform((value) => value === '1');
const whole = (low: number, high: number) => z.coerce.number().int().min(low).max(high);
const LOCAL = new Set(['localhost', '127.0.0.1', '::1']);

/** Every setting of the server, from the environment; .env.example explains each. */
const schema = z.object({
  HOST: z.string().min(1).default('localhost'),
  PORT: whole(0, 65_535).default(4321),
  DATA_DIR: z.string().min(1).default('data'),
  /** Address people type, when a proxy stands in front: forms are accepted from it, cookies are Secure for https. */
  ORIGIN: z.url({ protocol: /^https?$/ }).optional(),
  /** Proxies whose X-Forwarded-For entry is believed (0: none). */
  TRUST_PROXY: whole(0, 5).default(0),
  DEMO: flag.optional(),
  JOBS: whole(1, 64).default(Math.max(1, Math.min(4, availableParallelism() - 1))),
  JOB_HEAP_MIB: whole(64, 65_536).optional(),
  JOB_SECONDS: whole(1, 86_400).optional(),
  LOG_LEVEL: z.enum(['fatal', 'error', 'warn', 'info', 'debug', 'trace', 'silent']).default('info'),
  /** Multiplies every request limit: tests that sign in a hundred times raise it. */
  RATE_FACTOR: whole(1, 1_000_000).default(1),
  /** Jobs that misbehave on purpose, for the tests of the limits. */
  TEST_JOBS: flag.default(false),
});

export interface Config {
  host: string;
  port: number;
  dataDir: string;
  databaseFile: string;
  origin: string | null;
  trustProxy: number;
  demo: boolean;
  jobs: number;
  jobHeapMiB: number | null;
  jobSeconds: number | null;
  logLevel: string;
  rateFactor: number;
  testJobs: boolean;
  secureCookies: boolean;
}

/** @throws Error with one line per wrong variable. */
export function readConfig(environment: Record<string, string | undefined>): Config {
  const given = Object.fromEntries(
    Object.entries(environment).filter(([, value]) => value !== undefined && value !== ''),
  );
  const read = schema.safeParse(given);
  if (!read.success) {
    const lines = read.error.issues.map(({ path, message }) => `  ${path.join('.')}: ${message}`);
    throw new Error(`The environment is not valid:\n${lines.join('\n')}\nSee .env.example.`);
  }
  const value = read.data;
  const dataDir = resolve(projectRoot, value.DATA_DIR);
  return {
    host: value.HOST,
    port: value.PORT,
    dataDir,
    databaseFile: join(dataDir, 'wickwork.sqlite'),
    origin: value.ORIGIN ? new URL(value.ORIGIN).origin : null,
    trustProxy: value.TRUST_PROXY,
    demo: value.DEMO ?? LOCAL.has(value.HOST),
    jobs: value.JOBS,
    jobHeapMiB: value.JOB_HEAP_MIB ?? null,
    jobSeconds: value.JOB_SECONDS ?? null,
    logLevel: value.LOG_LEVEL,
    rateFactor: value.RATE_FACTOR,
    testJobs: value.TEST_JOBS,
    secureCookies: value.ORIGIN?.startsWith('https:') ?? false,
  };
}

/** The folder that holds package.json, from wherever this code was bundled to. */
export const projectRoot: string = (() => {
  let folder = dirname(fileURLToPath(import.meta.url));
  while (!existsSync(join(folder, 'package.json')) && dirname(folder) !== folder) folder = dirname(folder);
  return folder;
})();
