import { sql } from 'drizzle-orm';
import type { SQL } from 'drizzle-orm';
import type { Transaction } from './client.server.ts';

/**
 * Runs SQL text with `$1`-style placeholders inside a transaction, for the queue, which brings its own statements.
 */
export async function executeInTransaction(tx: Transaction, text: string, values: readonly unknown[]): Promise<{ rows: unknown[] }> {
  const pieces = text.split(/\$(\d+)/u);
  const chunks: SQL[] = pieces.map((piece, index) => (index % 2 === 0 ? sql.raw(piece) : sql`${values[Number(piece) - 1] ?? null}`));
  const rows = await tx.execute(sql.join(chunks));
  return { rows: [...rows] };
}
