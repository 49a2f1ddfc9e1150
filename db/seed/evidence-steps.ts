import { randomUUID } from 'node:crypto';
import type { DemoEvidence } from '#fixtures/demo/evidence.ts';
import type { Transaction } from '#db/client.server.ts';
import { custodyOffers, evidenceNotices, noticeReplies, plannedExams } from '#db/schema/all.ts';
import { localDay } from '#app/domain/local-time.ts';
import { moment } from './moment.ts';
import { pick } from './people-and-sites.ts';
import type { DemoPlaces } from './people-and-sites.ts';

type DemoItem = DemoEvidence['items'][number];

interface Target {
  readonly itemId: string;
  readonly zone: string;
  readonly userId: string;
  readonly places: Pick<DemoPlaces, 'userIds' | 'userNames'>;
  /** When the demonstration is set up. */
  readonly now: Date;
}

const dayMs = 86_400_000;
/** Ten in the morning at the place, so many days from now; such a time never falls in a clock change. */
const morning = ({ now, zone }: Target, days: number): Date => moment(`${localDay(new Date(now.getTime() + days * dayMs), zone)}T10:00`, zone);

/** A planned examination with its notices: some answered, some not, the waiting time running. */
export async function seedPlan(tx: Transaction, planned: NonNullable<DemoItem['planned']>, target: Target): Promise<void> {
  const { itemId, userId } = target;
  const firstTold = Math.max(...planned.notices.map((notice) => notice.daysAgo));
  const [plan] = await tx
    .insert(plannedExams)
    .values({ itemId, clientId: randomUUID(), method: planned.method, performedBy: planned.by, plannedAt: morning(target, planned.inDays), waitingDays: planned.waitingDays, tellRoles: planned.notices.map((notice) => notice.party), plannedById: userId, createdAt: morning(target, -firstTold - 1) })
    .returning({ id: plannedExams.id });
  if (!plan) throw new Error('The planned examination was not stored.');
  for (const { party, toWhom, way, daysAgo, answer } of planned.notices) {
    const sentAt = morning(target, -daysAgo);
    const [notice] = await tx.insert(evidenceNotices).values({ itemId, planId: plan.id, clientId: randomUUID(), partyRole: party, toWhom, way, sentAt, recordedById: userId, createdAt: sentAt }).returning({ id: evidenceNotices.id });
    if (!notice) throw new Error('The notice was not stored.');
    if (answer) await tx.insert(noticeReplies).values({ noticeId: notice.id, clientId: randomUUID(), answer: answer.answer, note: answer.note, answeredAt: morning(target, -answer.daysAgo), recordedById: userId, createdAt: morning(target, -answer.daysAgo) });
  }
}

/** An offer that waits for its receiver. */
export async function seedOffer(tx: Transaction, { offer, custody }: Pick<DemoItem, 'custody'> & { readonly offer: NonNullable<DemoItem['offer']> }, target: Target): Promise<void> {
  const holder = custody.at(-1);
  if (!holder) throw new Error('An item of the demonstration has no holder.');
  const { to, daysAgo, role, place, purpose, condition } = offer;
  await tx.insert(custodyOffers).values({ itemId: target.itemId, clientId: randomUUID(), sequence: custody.length, receiverId: pick(target.places.userIds, to), holderRole: role, place, purpose, condition, givenBy: holder.name, offeredById: target.userId, createdAt: morning(target, -daysAgo) });
}
