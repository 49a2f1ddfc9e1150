import { sql } from 'drizzle-orm';
import { timestamp, uuid } from 'drizzle-orm/pg-core';

export const id = () => uuid().primaryKey().default(sql`gen_random_uuid()`);
/** An instant, kept in UTC. The zone of the place is a column of its own. */
export const instant = () => timestamp({ withTimezone: true, mode: 'date' });
export const createdAt = () => instant().notNull().defaultNow();
export const updatedAt = () => instant().notNull().defaultNow().$onUpdate(() => new Date());
