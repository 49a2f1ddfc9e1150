import { ensureTemplate } from './database.ts';

/** Runs once before the database tests, so that the files do not wait for each other's migrations. */
export default async function setup(): Promise<void> {
  await ensureTemplate();
}
