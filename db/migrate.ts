import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, readdirSync, readFileSync, statSync, unlinkSync } from 'node:fs';
import { join } from 'node:path';
import type SQLite from 'better-sqlite3';
import { migrate } from 'drizzle-orm/better-sqlite3/migrator';
import type { Database } from './open.ts';

const KEPT_BACKUPS = 5;

export interface Migrated {
  applied: number;
  /** Where the database was copied before it was changed; null when nothing was to do or it was empty. */
  backup: string | null;
}

const tablesOf = (client: SQLite.Database): string[] =>
  client
    .prepare<[], string>(
      `SELECT name FROM sqlite_schema WHERE type = 'table' AND name NOT LIKE 'sqlite\\_%' ESCAPE '\\'`,
    )
    .pluck()
    .all();

function rowCounts(client: SQLite.Database): Map<string, number> {
  const count = (table: string) => client.prepare<[], number>(`SELECT count(*) FROM "${table}"`).pluck().get()!;
  return new Map(tablesOf(client).map((table) => [table, count(table)]));
}

interface Known {
  hash: string;
  tag: string;
  drops: string[];
}

/** Migrations of the folder in order; a file announces the tables it means to remove with `-- drops: name`. */
function knownMigrations(folder: string): Known[] {
  const journal = JSON.parse(readFileSync(join(folder, 'meta', '_journal.json'), 'utf8')) as {
    entries: { tag: string }[];
  };
  return journal.entries.map(({ tag }) => {
    const sql = readFileSync(join(folder, `${tag}.sql`), 'utf8');
    const drops = [...sql.matchAll(/^-- drops: (\w+)\s*$/gm)].map((match) => match[1]!);
    return { tag, hash: createHash('sha256').update(sql).digest('hex'), drops };
  });
}

function appliedHashes(client: SQLite.Database): string[] {
  if (!tablesOf(client).includes('__drizzle_migrations')) return [];
  return client.prepare<[], string>('SELECT hash FROM __drizzle_migrations ORDER BY id').pluck().all();
}

function checkHistory(known: readonly Known[], applied: readonly string[]): void {
  applied.forEach((hash, at) => {
    const file = known[at];
    if (!file) throw new Error('The database was written by a newer version of the program; it is left untouched.');
    if (file.hash !== hash)
      throw new Error(`Migration ${file.tag} differs from the one this database was made with; it is left untouched.`);
  });
}

async function backUp(db: Database, folder: string): Promise<string> {
  mkdirSync(folder, { recursive: true });
  const file = join(folder, `before-migration-${new Date().toISOString().replace(/[:.]/g, '-')}.sqlite`);
  await db.$client.backup(file);
  const old = readdirSync(folder)
    .filter((name) => name.startsWith('before-migration-'))
    .sort((a, b) => statSync(join(folder, a)).mtimeMs - statSync(join(folder, b)).mtimeMs);
  for (const name of old.slice(0, Math.max(0, old.length - KEPT_BACKUPS))) unlinkSync(join(folder, name));
  return file;
}

function checkRows(before: Map<string, number>, after: Map<string, number>, drops: ReadonlySet<string>): string[] {
  return [...before]
    .filter(([table]) => table !== '__drizzle_migrations' && !drops.has(table))
    .filter(([table, rows]) => (after.get(table) ?? -1) < rows)
    .map(([table, rows]) => `${table}: ${rows} → ${after.get(table) ?? 'gone'}`);
}

/**
 * Brings a database to the newest schema without losing a row.
 *
 * A migration that rebuilds a table drops the old one, and with foreign keys on that fires ON DELETE CASCADE inside
 * the migrator's transaction and empties child tables silently (drizzle-orm issues 5782, 4938). Hence: copy the file,
 * foreign keys off, migrate, foreign_key_check, compare the row count of every table, foreign keys on.
 *
 * @throws Error when the history is unknown, a key dangles or rows are missing; the message names the backup.
 */
export async function migrateDatabase(db: Database, migrations: string, backups: string | null): Promise<Migrated> {
  if (!existsSync(join(migrations, 'meta', '_journal.json')))
    throw new Error(`There are no migrations in ${migrations}.`);
  const client = db.$client;
  const known = knownMigrations(migrations);
  const applied = appliedHashes(client);
  checkHistory(known, applied);
  const pending = known.slice(applied.length);
  if (pending.length === 0) return { applied: 0, backup: null };
  const before = rowCounts(client);
  const backup = backups !== null && applied.length > 0 ? await backUp(db, backups) : null;
  client.pragma('foreign_keys = OFF');
  try {
    migrate(db, { migrationsFolder: migrations });
    const dangling = client.pragma('foreign_key_check') as unknown[];
    const lost = checkRows(before, rowCounts(client), new Set(pending.flatMap(({ drops }) => drops)));
    if (dangling.length > 0 || lost.length > 0)
      throw new Error(
        `The migration lost data (${[...lost, `${dangling.length} dangling keys`].join('; ')}). Restore the backup ${backup ?? '(none was needed: the database was new)'}.`,
      );
  } finally {
    client.pragma('foreign_keys = ON');
  }
  return { applied: pending.length, backup };
}
