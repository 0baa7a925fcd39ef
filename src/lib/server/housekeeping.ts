import { removeExpiredSessions } from './auth.ts';
import { removeExpired } from './expansions.ts';
import { runtime } from './runtime.ts';

const HOUR_MS = 3_600_000;
const KEY = Symbol.for('wickwork.housekeeping');
const shelf = globalThis as { [KEY]?: NodeJS.Timeout };

async function tidy(): Promise<void> {
  try {
    removeExpired();
    await removeExpiredSessions();
  } catch (error) {
    runtime().log.error({ err: error }, 'housekeeping failed');
  }
}

/** Removes what has expired: now, and every hour as long as the process lives. */
export function keepHouse(): void {
  if (shelf[KEY]) return;
  shelf[KEY] = setInterval(() => void tidy(), HOUR_MS).unref();
  void tidy();
}
