import { join } from 'node:path';
import type { Logger } from 'pino';
import { closeDatabase, type Database, openDatabase } from '#db/open.ts';
import { type Config, projectRoot, readConfig } from './config.ts';
import { Jobs } from './jobs.ts';
import { makeLog } from './log.ts';
import { RateLimits } from './rates.ts';

/** What lives as long as the process: one of each, also across hot reloads and bundles. */
export interface Runtime {
  readonly config: Config;
  readonly log: Logger;
  readonly db: Database;
  readonly jobs: Jobs;
  readonly rates: RateLimits;
  close(): Promise<void>;
}

const KEY = Symbol.for('wickwork.runtime');
const shelf = globalThis as { [KEY]?: Runtime };

/** @param options.recover whether to take up the jobs that a crash left (the seed does not: the server will). */
export function startRuntime(config: Config, options: { recover: boolean } = { recover: true }): Runtime {
  const log = makeLog(config.logLevel);
  const db = openDatabase(config.databaseFile);
  const jobs = new Jobs(db, log, {
    slots: config.jobs,
    entry: join(projectRoot, 'dist', 'jobs', 'expand.mjs'),
    heapMiB: config.jobHeapMiB,
    seconds: config.jobSeconds,
    testJobs: config.testJobs,
  });
  const value: Runtime = {
    config,
    log,
    db,
    jobs,
    rates: new RateLimits(config.rateFactor),
    close: async () => {
      await jobs.close();
      closeDatabase(db);
      delete shelf[KEY];
    },
  };
  shelf[KEY] = value;
  if (options.recover) jobs.recover();
  return value;
}

/** The running process's runtime; the first use starts it from the environment. */
export function runtime(): Runtime {
  return shelf[KEY] ?? startRuntime(readConfig(process.env));
}
