import { z } from 'zod';
import { disposals, evidenceKinds, examKinds, holderRoles } from './evidence.ts';
import { plainText } from './incident.ts';

/** Forms of the evidence pages. Clock times are read beside these, in the zone of the place. */

const words = (max: number, sentence: string) => plainText(max).pipe(z.string().min(2, sentence));
const optionalWords = (max: number) => plainText(max).default('');
const clientId = z.uuid('The form is damaged. Open the page anew; what you typed can be copied from here.');

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

export const recordExamSchema = z.object({
  clientId,
  examKind: z.enum(examKinds, 'Choose whether it can alter the item.'),
  method: words(500, 'Say what was done, with what.'),
  result: words(1_000, 'Say what was seen or measured.'),
  performedBy: words(160, 'Say who made it.'),
  noticeTo: optionalWords(300),
  protocolAttachmentId: z.union([z.literal('').transform(() => null), z.uuid('Choose the protocol from the list.')]).default(null),
});
export type RecordExam = z.infer<typeof recordExamSchema>;

export const decideDisposalSchema = z.object({
  disposal: z.enum(disposals, 'Choose what is to become of it.'),
  reason: words(500, 'Give the reason for the decision.'),
});
export type DecideDisposal = z.infer<typeof decideDisposalSchema>;
