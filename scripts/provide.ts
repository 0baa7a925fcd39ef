import { join } from 'node:path';
import type { Logger } from 'pino';
import { migrateDatabase } from '#db/migrate.ts';
import { closeDatabase, openDatabase } from '#db/open.ts';
import { type Config, projectRoot } from '#server/config.ts';
import { startRuntime } from '#server/runtime.ts';
import { seedDemo } from '#server/seed.ts';

async function migrated(config: Config, log: Logger): Promise<void> {
  const db = openDatabase(config.databaseFile);
  try {
    const folder = join(projectRoot, 'db', 'migrations');
    const { applied, backup } = await migrateDatabase(db, folder, join(config.dataDir, 'backups'));
    if (applied > 0) log.info({ applied, backup }, 'migrated the database');
  } finally {
    closeDatabase(db);
  }
}

async function seeded(config: Config, log: Logger): Promise<void> {
  // The demo may not fail the start: without it the program still does its work.
  const runtime = startRuntime(config, { recover: false });
  try {
    const { computed, failed } = await seedDemo();
    if (computed > 0) log.info({ computed }, 'computed the demo');
    if (failed.length > 0) log.error({ failed }, 'parts of the demo could not be computed');
  } catch (error) {
    log.error({ err: error }, 'the demo could not be filled in');
  } finally {
    await runtime.close();
  }
}

/** Brings the data folder up to date before anything is served: migrations (with a backup), then the demo. */
export async function provide(config: Config, log: Logger): Promise<void> {
  await migrated(config, log);
  if (config.demo) await seeded(config, log);
}
