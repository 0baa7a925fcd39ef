/** The whole data model; one file per part. Migrations are generated from it (see db/migrate.ts). */
export * from './schema/accounts.ts';
export * from './schema/expansions.ts';
export * from './schema/library.ts';
export * from './schema/models.ts';
export * from './schema/operations.ts';
