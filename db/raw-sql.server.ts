import { sql } from 'drizzle-orm';
import type { SQL } from 'drizzle-orm';
import type { Transaction } from './client.server.ts';

/**
 * Runs SQL text with `$1`-style placeholders inside a transaction, for the queue, which brings its own statements.
 */
export async function executeInTransaction(tx: Transaction, text: string, values: readonly unknown[]): Promise<{ rows: unknown[] }> {
  const pieces = text.split(/\$(\d+)/u);
  const chunks: SQL[] = pieces.map((piece, index) => (index % 2 === 0 ? sql.raw(piece) : sql`${asParameter(values[Number(piece) - 1])}`));
  const rows = await tx.execute(sql.join(chunks));
  return { rows: [...rows] };
}

/** The driver sends text; an object is meant for a JSON column. */
function asParameter(value: unknown): unknown {
  if (value === undefined || value === null) return null;
  return typeof value === 'object' && !(value instanceof Date) ? JSON.stringify(value) : value;
}
