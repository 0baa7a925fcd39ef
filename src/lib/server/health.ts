import { statfsSync } from 'node:fs';
import { runtime } from './runtime.ts';

const LEAST_FREE_BYTES = 50_000_000;

export interface Readiness {
  ok: boolean;
  database: boolean;
  disk: boolean;
  jobs: number;
}

function databaseWrites(): boolean {
  try {
    const client = runtime().db.$client;
    // Takes the write lock and gives it back: nothing changes.
    client.exec('BEGIN IMMEDIATE; ROLLBACK;');
    return true;
  } catch {
    return false;
  }
}

function diskHasRoom(): boolean {
  const { bavail, bsize } = statfsSync(runtime().config.dataDir);
  return bavail * bsize > LEAST_FREE_BYTES;
}

export function readiness(): Readiness {
  const { jobs } = runtime();
  const database = databaseWrites();
  const disk = diskHasRoom();
  return { ok: database && disk, database, disk, jobs: jobs.busy };
}
