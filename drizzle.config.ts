import { defineConfig } from 'drizzle-kit';

/** `npx drizzle-kit generate --name what-changed` writes the next migration; db/migrate.ts says how to check it. */
export default defineConfig({ dialect: 'sqlite', schema: './db/schema.ts', out: './db/migrations' });
