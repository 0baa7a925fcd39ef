import { cpSync, mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { migrateDatabase } from '#db/migrate.ts';
import { type Database, openDatabase } from '#db/open.ts';

const project = resolve(import.meta.dirname, '../../db/migrations');
let folder: string;
let db: Database;

beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'migrate-'));
  cpSync(project, join(folder, 'migrations'), { recursive: true });
  db = openDatabase(join(folder, 'test.sqlite'));
});
afterEach(() => {
  db.$client.close();
  rmSync(folder, { recursive: true });
});

const run = () => migrateDatabase(db, join(folder, 'migrations'), join(folder, 'backups'));

/** One more migration at the end of the copied history. */
function append(tag: string, sql: string): void {
  const journalFile = join(folder, 'migrations', 'meta', '_journal.json');
  const journal = JSON.parse(readFileSync(journalFile, 'utf8'));
  journal.entries.push({ idx: journal.entries.length, version: '6', when: Date.now() + 1e6, tag, breakpoints: true });
  writeFileSync(journalFile, JSON.stringify(journal));
  writeFileSync(join(folder, 'migrations', `${tag}.sql`), sql);
}

function fill(): void {
  db.$client.exec(`
    INSERT INTO users VALUES ('u1', 'a@example.org', 'A', 'x', 0, '2026-01-01', '2026-01-01');
    INSERT INTO sessions VALUES ('s1', 'u1', 1, 'p1', '2026', '2026', '', '');
    INSERT INTO "groups" VALUES ('g1', 'g', 'G', NULL, '2026-01-01');
    INSERT INTO models VALUES ('m1', 'g1', 'u1', 'private', NULL, 'T', '', 1, '2026', '2026', NULL);
    INSERT INTO revisions VALUES ('r1', 'm1', 1, '{}', 'h', 'u1', '2026');`);
}

const rows = (table: string) => db.$client.prepare(`SELECT count(*) FROM "${table}"`).pluck().get();

/** What drizzle-kit writes for the change of a default: a new table, copy, drop, rename. */
const rebuild = (copy: string) => `PRAGMA foreign_keys=OFF;--> statement-breakpoint
CREATE TABLE \`__new_models\` (id text PRIMARY KEY NOT NULL, group_id text NOT NULL, created_by text, visibility text NOT NULL,
  parent_id text, title text NOT NULL, description text NOT NULL, revision integer NOT NULL, created_at text NOT NULL,
  updated_at text NOT NULL, deleted_at text) STRICT;
--> statement-breakpoint
${copy}
--> statement-breakpoint
DROP TABLE \`models\`;--> statement-breakpoint
ALTER TABLE \`__new_models\` RENAME TO \`models\`;--> statement-breakpoint
PRAGMA foreign_keys=ON;`;

describe('migrations', () => {
  it('make an empty database and then have nothing to do', async () => {
    expect((await run()).applied).toBeGreaterThan(0);
    expect(await run()).toEqual({ applied: 0, backup: null });
    expect(rows('expansions')).toBe(0);
  });

  it('make strict tables', async () => {
    await run();
    const loose = db.$client
      .prepare(`SELECT name FROM pragma_table_list WHERE schema = 'main' AND type = 'table' AND strict = 0`)
      .pluck()
      .all()
      .filter((name) => !/^(sqlite_|__drizzle)/.test(String(name)));
    expect(loose).toEqual([]);
  });

  it('keep child rows when a table is rebuilt, and leave a backup', async () => {
    await run();
    fill();
    append('0999_rebuild', rebuild('INSERT INTO `__new_models` SELECT * FROM `models`;'));
    const { applied, backup } = await run();
    expect(applied).toBe(1);
    expect([rows('models'), rows('revisions'), rows('sessions')]).toEqual([1, 1, 1]);
    expect(db.$client.pragma('foreign_keys', { simple: true })).toBe(1);
    const copy = openDatabase(backup!);
    expect(copy.$client.prepare('SELECT count(*) FROM revisions').pluck().get()).toBe(1);
    copy.$client.close();
    expect(readdirSync(join(folder, 'backups')).length).toBeGreaterThan(0);
  });

  it('report a migration that loses rows, and name the backup', async () => {
    await run();
    fill();
    append('0999_lossy', rebuild('SELECT 1;'));
    await expect(run()).rejects.toThrow(/models: 1 → 0.*before-migration/);
  });

  it('refuse a history that is not ours', async () => {
    await run();
    db.$client.exec(`UPDATE __drizzle_migrations SET hash = 'other'`);
    await expect(run()).rejects.toThrow(/differs/);
    db.$client.exec(
      `INSERT INTO __drizzle_migrations (hash, created_at) SELECT 'newer', created_at + 1 FROM __drizzle_migrations`,
    );
    db.$client.exec(`UPDATE __drizzle_migrations SET hash = (SELECT hash FROM __drizzle_migrations LIMIT 1)`);
    await expect(run()).rejects.toThrow();
  });
});

describe('the audit table', () => {
  it('refuses changes and removals', async () => {
    await run();
    db.$client.exec(
      `INSERT INTO audit_events (at, actor, action, object, address, request_id, detail) VALUES ('', '', '', '', '', '', '')`,
    );
    expect(() => db.$client.exec(`UPDATE audit_events SET actor = 'x'`)).toThrow(/append-only/);
    expect(() => db.$client.exec('DELETE FROM audit_events')).toThrow(/append-only/);
  });
});
