import { mkdirSync } from 'node:fs';
import { dirname } from 'node:path';
import SQLite from 'better-sqlite3';
import { type BetterSQLite3Database, drizzle } from 'drizzle-orm/better-sqlite3';
import * as schema from './schema.ts';

export type Database = BetterSQLite3Database<typeof schema> & { $client: SQLite.Database };

/**
 * Opens a database file (":memory:" for tests) with the settings every connection of the program uses.
 *
 * WAL, so that readers never wait for a writer; synchronous FULL, so that an acknowledged write survives a power cut;
 * five seconds of patience for a lock; foreign keys enforced. It does not migrate: see migrate.ts.
 */
export function openDatabase(path: string): Database {
  if (path !== ':memory:') mkdirSync(dirname(path), { recursive: true });
  const client = new SQLite(path);
  client.pragma('journal_mode = WAL');
  client.pragma('synchronous = FULL');
  client.pragma('busy_timeout = 5000');
  client.pragma('foreign_keys = ON');
  client.pragma('cache_size = -32000');
  return drizzle(client, { schema });
}

/** Flushes the write-ahead log into the file and closes it. */
export function closeDatabase(db: Database): void {
  if (!db.$client.open) return;
  db.$client.pragma('wal_checkpoint(TRUNCATE)');
  db.$client.close();
}
