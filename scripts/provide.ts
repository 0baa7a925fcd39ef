import { join } from 'node:path';
import type { Logger } from 'pino';
import { migrateDatabase } from '#db/migrate.ts';
import { closeDatabase, openDatabase } from '#db/open.ts';
import { type Config, projectRoot } from '#server/config.ts';

/** Brings the data folder up to date before anything is served: migrations (with a backup), then the demo. */
export async function provide(config: Config, log: Logger): Promise<void> {
  const db = openDatabase(config.databaseFile);
  try {
    const { applied, backup } = await migrateDatabase(
      db,
      join(projectRoot, 'db', 'migrations'),
      join(config.dataDir, 'backups'),
    );
    if (applied > 0) log.info({ applied, backup }, 'migrated the database');
  } finally {
    closeDatabase(db);
  }
}
