import { drizzle } from 'drizzle-orm/postgres-js';
import type { PostgresJsDatabase } from 'drizzle-orm/postgres-js';
import postgres from 'postgres';
import { env } from '#app/env.server.ts';
import * as schema from './schema/all.ts';

export type Schema = typeof schema;
export type Db = PostgresJsDatabase<Schema>;
export type Transaction = Parameters<Parameters<Db['transaction']>[0]>[0];
export type DbOrTx = Db | Transaction;

const client = postgres(env.DATABASE_URL, { max: env.DATABASE_POOL_SIZE, onnotice: () => undefined });

export const db: Db = drizzle(client, { schema, casing: 'snake_case' });

/** Runs `work` in one transaction; anything thrown rolls it back. */
export function inTransaction<Result>(work: (tx: Transaction) => Promise<Result>): Promise<Result> {
  return db.transaction(work);
}

export function closeDatabase(): Promise<void> {
  return client.end({ timeout: 5 });
}
