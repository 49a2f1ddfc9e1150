import { z } from 'zod';
import { noticeAnswers, noticeWays, partyRoles } from './evidence-notice.ts';
import { disposals, evidenceKinds, examKinds, holderRoles } from './evidence.ts';
import { plainText } from './incident.ts';

/** Forms of the evidence pages. Clock times are read beside these, in the zone of the place. */

const words = (max: number, sentence: string) => plainText(max).pipe(z.string().min(2, sentence));
const optionalWords = (max: number) => plainText(max).default('');
const damaged = 'The form is damaged. Open the page anew; what you typed can be copied from here.';
const clientId = z.uuid(damaged);

export const collectItemSchema = z.object({
  clientId,
  kind: z.enum(evidenceKinds, 'Choose what it is.'),
  description: words(300, 'Describe the item so that another person would pick the right one.'),
  fromWhere: words(300, 'Say where it was taken from.'),
  collectedBy: words(120, 'Name who collected it.'),
  sealNumber: optionalWords(60),
  condition: words(300, 'Say in what condition it was.'),
  holderRole: z.enum(holderRoles.filter((role) => role !== 'disposed'), 'Choose who holds it.'),
  holderName: words(120, 'Name the holder, or the store.'),
  place: optionalWords(200),
});
export type CollectItem = z.infer<typeof collectItemSchema>;

export const handOverSchema = z.object({
  clientId,
  /** The record that was open when the form was made. */
  sequence: z.coerce.number().int().min(1),
  holderRole: z.enum(holderRoles, 'Choose who takes it over.'),
  holderName: words(120, 'Name the person or firm that takes it over.'),
  place: optionalWords(200),
  purpose: words(300, 'Say what the hand-over is for.'),
  condition: words(300, 'Say in what condition item and seal were.'),
  givenBy: words(120, 'The one who gives it signs with their name.'),
  receivedBy: words(120, 'The one who takes it signs with their name.'),
});
export type HandOver = z.infer<typeof handOverSchema>;

const protocolAttachmentId = z.union([z.literal('').transform(() => null), z.uuid('Choose the protocol from the list.')]).default(null);

export const recordExamSchema = z.object({
  clientId,
  examKind: z.enum(examKinds, 'Choose whether it can alter the item.'),
  method: words(500, 'Say what was done, with what.'),
  result: words(1_000, 'Say what was seen or measured.'),
  performedBy: words(160, 'Say who made it.'),
  noticeTo: optionalWords(300),
  protocolAttachmentId,
  wentAheadReason: optionalWords(1_000),
});
export type RecordExam = z.infer<typeof recordExamSchema>;

export const decideDisposalSchema = z.object({
  disposal: z.enum(disposals, 'Choose what is to become of it.'),
  reason: words(500, 'Give the reason for the decision.'),
});
export type DecideDisposal = z.infer<typeof decideDisposalSchema>;

export const offerItemSchema = z.object({
  clientId,
  /** The record that was open when the form was made. */
  sequence: z.coerce.number().int().min(1),
  receiverId: z.uuid('Choose who takes it over.'),
  holderRole: z.enum(holderRoles.filter((role) => role !== 'disposed'), 'Choose the part of the person who takes it over.'),
  place: optionalWords(200),
  purpose: words(300, 'Say what the hand-over is for.'),
  condition: words(300, 'Say in what condition item and seal are.'),
  givenBy: words(120, 'The one who gives it signs with their name.'),
});
export type OfferItem = z.infer<typeof offerItemSchema>;

export const takeOverSchema = z.object({
  offerId: z.uuid(damaged),
  place: optionalWords(200),
  condition: words(300, 'Say in what condition item and seal are as you take them over.'),
});
export type TakeOver = z.infer<typeof takeOverSchema>;

export const declineOfferSchema = z.object({ offerId: z.uuid(damaged), reason: words(500, 'Say why you do not take it over.') });
export const withdrawOfferSchema = z.object({ offerId: z.uuid(damaged) });

/** Parties as one field of words with spaces between them, as the route joins the ticked boxes. */
const tellRoles = z
  .string()
  .default('')
  .transform((text) => text.split(' ').filter(Boolean))
  .pipe(z.array(z.enum(partyRoles, 'Choose from the list.')).min(1, 'Choose at least one party: an examination that may alter the item needs notice to others.'));
/** Typed days; no number is ours to propose. */
const waitingDays = z
  .string()
  .trim()
  .regex(/^\d{1,3}$/u, 'Give whole days, 0 if there is nothing to wait for.')
  .transform(Number)
  .pipe(z.number().max(365, 'Give at most 365 days.'));

export const planExamSchema = z.object({
  clientId,
  method: words(500, 'Say what is to be done, with what.'),
  performedBy: words(160, 'Say who is to make it.'),
  tellRoles,
  waitingDays,
  protocolAttachmentId,
});
export type PlanExam = z.infer<typeof planExamSchema>;

export const changePlanSchema = z.object({ planId: z.uuid(damaged), revision: z.coerce.number().int().min(1), tellRoles, waitingDays, protocolAttachmentId });
export type ChangePlan = z.infer<typeof changePlanSchema>;

export const cancelPlanSchema = z.object({ planId: z.uuid(damaged), cancelReason: words(500, 'Say why it is not made.') });
export type CancelPlan = z.infer<typeof cancelPlanSchema>;

export const recordMadeSchema = z.object({
  planId: z.uuid(damaged),
  clientId,
  performedBy: words(160, 'Say who made it.'),
  result: words(1_000, 'Say what was seen or measured.'),
  protocolAttachmentId,
  wentAheadReason: optionalWords(1_000),
});
export type RecordMade = z.infer<typeof recordMadeSchema>;

export const recordNoticeSchema = z.object({
  clientId,
  /** Empty: about the item as a whole. */
  planId: z.union([z.literal('').transform(() => null), z.uuid(damaged)]).default(null),
  partyRole: z.enum(partyRoles, 'Choose which party was told.'),
  toWhom: words(160, 'Name the person or firm that the notice went to.'),
  way: z.enum(noticeWays, 'Choose how it was sent.'),
});
export type RecordNotice = z.infer<typeof recordNoticeSchema>;

export const recordAnswerSchema = z.object({
  clientId,
  noticeId: z.uuid('Choose the notice that was answered.'),
  answer: z.enum(noticeAnswers, 'Choose what they answered.'),
  note: optionalWords(500),
});
export type RecordAnswer = z.infer<typeof recordAnswerSchema>;
