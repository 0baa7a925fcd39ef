/**
 * `node scripts/migration.mjs NAME`: writes the next migration from db/schema.ts. drizzle-kit does not know SQLite's
 * STRICT and WITHOUT ROWID tables, so they are added here to every table a migration creates. Read the file before you commit it;
 * a table it removes on purpose needs a line `-- drops: name`, or the migration runner refuses the loss of its rows.
 */
import { spawnSync } from 'node:child_process';
import { readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { root } from './lib/provision.mjs';

const WITHOUT_ROWID = new Set(['diagrams']);
const BREAK = '--> statement-breakpoint';
const name = process.argv[2];
if (!name || !/^[a-z0-9-]+$/.test(name)) {
  console.error('Give the migration a name of lower-case words: node scripts/migration.mjs add-shelves');
  process.exit(2);
}

const folder = join(root, 'db', 'migrations');
const sqlFiles = () => readdirSync(folder).filter((file) => file.endsWith('.sql'));
const before = new Set(sqlFiles());
const { status } = spawnSync(join(root, 'node_modules/.bin/drizzle-kit'), ['generate', '--name', name], {
  cwd: root,
  stdio: 'inherit',
});
if (status !== 0) process.exit(status ?? 1);

for (const file of sqlFiles().filter((entry) => !before.has(entry))) {
  const statements = readFileSync(join(folder, file), 'utf8').split(BREAK);
  const strict = statements.map((statement) => {
    const table = /^\s*CREATE TABLE `(?:__new_)?(\w+)`/.exec(statement)?.[1];
    if (!table) return statement;
    return statement.replace(/\n\);\s*$/, WITHOUT_ROWID.has(table) ? '\n) WITHOUT ROWID, STRICT;\n' : '\n) STRICT;\n');
  });
  writeFileSync(join(folder, file), strict.join(BREAK));
  console.log(`db/migrations/${file}`);
}
