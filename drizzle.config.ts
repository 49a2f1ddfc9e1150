import { defineConfig } from 'drizzle-kit';

// Migrations are generated from the schema alone; no database is contacted, so no credentials belong here.
export default defineConfig({
  dialect: 'postgresql',
  schema: './db/schema/all.ts',
  out: './db/migrations',
  casing: 'snake_case',
  migrations: { prefix: 'timestamp' },
});
