import { DrizzlePostgreSQLAdapter } from '@lucia-auth/adapter-drizzle';
import { db } from './client.server.ts';
import { sessions, users } from './schema/all.ts';

/** lucia's storage of sessions; the only place that knows both lucia and the tables. */
export const sessionAdapter = new DrizzlePostgreSQLAdapter(db, sessions, users);
