import type { HolderRole } from './evidence.ts';
import { foldWord } from './folded-text.ts';

/**
 * An item offered to a person of the house, who takes it over or declines on their own account. Until then the giver
 * holds it.
 */
export const offerAnswers = ['taken', 'declined', 'withdrawn'] as const;
export type OfferAnswer = (typeof offerAnswers)[number];

export interface OfferFacts {
  readonly id: string;
  readonly receiverId: string;
  readonly receiver: string;
  readonly holderRole: HolderRole;
  readonly place: string;
  readonly purpose: string;
  readonly condition: string;
  readonly givenBy: string;
  readonly offeredById: string;
  readonly offeredBy: string;
  /** The account that made it has been switched off. */
  readonly makerLeft: boolean;
  readonly answer: OfferAnswer | null;
  readonly answerReason: string;
  readonly answeredAt: Date | null;
  readonly createdAt: Date;
}

interface Person {
  readonly userId: string;
  readonly displayName: string;
}

/** The account that holds an item: of whoever signed for it in their own name, and not for a store or a firm. */
export const holderAccount = (open: { readonly holderName: string; readonly receivedBy: string; readonly receiverId: string | null }): string | null => (foldWord(open.holderName.trim()) === foldWord(open.receivedBy.trim()) ? open.receiverId : null);

export interface OfferRules {
  /** Who may be offered it: people who may read the evidence of the case. */
  readonly receivers: readonly Person[];
  readonly openRole: HolderRole;
  /** Account of whoever holds it, when they have one. */
  readonly holderId: string | null;
  readonly actorId: string;
}

/** Why an item cannot be offered to this person, by field; empty when it can. */
export function offerObstacles({ receivers, openRole, holderId, actorId }: OfferRules, receiverId: string): Record<string, string[]> {
  if (openRole === 'disposed') return { receiverId: ['The item was disposed of; nobody can take it over.'] };
  if (receiverId === actorId) return { receiverId: ['You take it over yourself: record the hand-over with your own name as the taker.'] };
  if (receiverId === holderId) return { receiverId: ['This person holds it now. Choose who takes it over.'] };
  if (!receivers.some((person) => person.userId === receiverId)) return { receiverId: ['Choose somebody from the list: a person who may read the evidence of this case.'] };
  return {};
}

/** The person of the house whom a typed name means, as far as names tell. */
export const personNamed = (people: readonly Person[], name: string): Person | null => people.find((person) => foldWord(person.displayName.trim()) === foldWord(name.trim())) ?? null;

/** Why a hand-over to this typed name cannot be recorded for them, by field: a person with an account signs on it. */
export function typedSignatureObstacles(receivers: readonly Person[], actorId: string, names: { readonly holderName: string; readonly receivedBy: string }): Record<string, string[]> {
  const problems: Record<string, string[]> = {};
  for (const field of ['holderName', 'receivedBy'] as const) {
    const person = personNamed(receivers, names[field]);
    if (person && person.userId !== actorId) problems[field] = [`${person.displayName} has an account here: offer the item to them, so that they sign for it themselves.`];
  }
  return problems;
}
