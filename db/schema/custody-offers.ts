import { sql } from 'drizzle-orm';
import { check, index, integer, pgTable, text, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import { offerAnswers } from '#app/domain/custody-offer.ts';
import { holderRoles } from '#app/domain/evidence.ts';
import { createdAt, id, instant } from './_columns.ts';
import { evidenceItems } from './evidence.ts';
import { users } from './people.ts';

/** An item offered to a person with an account. The custody record of a hand-over that was taken carries this id as its client id. */
export const custodyOffers = pgTable(
  'custody_offers',
  {
    id: id(),
    itemId: uuid().notNull().references(() => evidenceItems.id, { onDelete: 'restrict' }),
    clientId: uuid().notNull().unique(),
    /** The custody record that was open when it was offered. */
    sequence: integer().notNull(),
    receiverId: uuid().notNull().references(() => users.id, { onDelete: 'restrict' }),
    holderRole: text({ enum: holderRoles }).notNull(),
    place: text().notNull().default(''),
    purpose: text().notNull(),
    condition: text().notNull(),
    /** Name of the giver as signed with the offer. Class personal. */
    givenBy: text().notNull(),
    offeredById: uuid().notNull().references(() => users.id, { onDelete: 'restrict' }),
    /** Null while it waits. */
    answer: text({ enum: offerAnswers }),
    answerReason: text().notNull().default(''),
    answeredAt: instant(),
    createdAt: createdAt(),
  },
  (table) => [
    uniqueIndex('custody_offers_one_open').on(table.itemId).where(sql`${table.answer} is null`),
    index('custody_offers_item_id_idx').on(table.itemId),
    index('custody_offers_receiver_id_idx').on(table.receiverId),
    index('custody_offers_offered_by_id_idx').on(table.offeredById),
    check('custody_offers_answered', sql`(${table.answer} is null) = (${table.answeredAt} is null)`),
    check('custody_offers_declined_why', sql`${table.answer} is distinct from 'declined' or ${table.answerReason} <> ''`),
    check('custody_offers_holder', sql`${table.holderRole} <> 'disposed'`),
  ],
);
