import { fileURLToPath } from 'node:url';
import { drizzle } from 'drizzle-orm/postgres-js';
import { migrate } from 'drizzle-orm/postgres-js/migrator';
import postgres from 'postgres';
import { env } from '#app/env.server.ts';

/** Applies every migration that the database has not seen; safe to run at each start and by several processes. */
const client = postgres(env.DATABASE_URL, { max: 1, onnotice: () => undefined });
try {
  await client`select pg_advisory_lock(hashtext('scorchline migrations'))`;
  await migrate(drizzle(client), { migrationsFolder: fileURLToPath(new URL('./migrations', import.meta.url)) });
} finally {
  await client.end();
}
