import { readdir, readFile } from 'node:fs/promises';
import path from 'node:path';
import { z } from 'zod';
import { env } from '#app/env.server.ts';

const entrySchema = z.object({
  id: z.string(),
  receivedAt: z.string(),
  to: z.string(),
  from: z.string(),
  subject: z.string(),
  text: z.string(),
});
export type MailboxEntry = z.infer<typeof entrySchema>;

const idPattern = /^[\w-]+$/u;
const shown = 200;

/** The mail stand-in keeps its messages in this folder; without it there is no mailbox to read. */
export const mailboxFolder = (): string | null => env.DEV_MAILBOX_DIR ?? null;

/** Newest messages first. */
export async function listMailbox(folder: string): Promise<MailboxEntry[]> {
  const names = (await readdir(folder)).filter((name) => name.endsWith('.json') && !name.startsWith('.')).sort().reverse();
  const entries = await Promise.all(names.slice(0, shown).map((name) => readEntry(folder, name.slice(0, -'.json'.length))));
  return entries.filter((entry) => entry !== null);
}

export async function readEntry(folder: string, id: string): Promise<MailboxEntry | null> {
  if (!idPattern.test(id)) return null;
  try {
    return entrySchema.parse(JSON.parse(await readFile(path.join(folder, `${id}.json`), 'utf8')));
  } catch (error) {
    if (error instanceof Error && 'code' in error && error.code === 'ENOENT') return null;
    throw error;
  }
}
