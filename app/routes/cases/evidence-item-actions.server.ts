import { z } from 'zod';
import {
  cancelPlanSchema, changePlanSchema, decideDisposalSchema, declineOfferSchema, handOverSchema, offerItemSchema, planExamSchema, recordAnswerSchema, recordExamSchema, recordMadeSchema, recordNoticeSchema, takeOverSchema, withdrawOfferSchema,
} from '#app/domain/evidence-form.ts';
import type { Actor } from '#app/domain/roles.ts';
import { readMoments } from '#app/domain/typed-moment.ts';
import { fieldErrorsOf } from '#app/http/field-errors.ts';
import { formProblem, problemFromError, typedValues } from '#app/http/form-result.server.ts';
import { declineOffer, takeOverItem, withdrawOffer } from '#app/services/evidence/answer-offer.server.ts';
import { decideDisposal } from '#app/services/evidence/decide-disposal.server.ts';
import { handOverItem } from '#app/services/evidence/hand-over.server.ts';
import { offerItem } from '#app/services/evidence/offer-item.server.ts';
import { cancelPlan, changePlan, planExam } from '#app/services/evidence/plan-exam.server.ts';
import { recordExam } from '#app/services/evidence/record-exam.server.ts';
import { recordMadeExam } from '#app/services/evidence/record-made-exam.server.ts';
import { recordAnswer, recordNotice } from '#app/services/evidence/record-notice.server.ts';

interface Call {
  readonly actor: Actor;
  readonly caseNumber: number;
  readonly label: number;
  readonly zone: string;
  readonly form: FormData;
}

interface Where extends Pick<Call, 'actor' | 'caseNumber' | 'label'> {
  readonly now: Date;
}

/** A form of the page: what it holds, the clock times in it, and what becomes of it. */
interface ItemForm<Schema extends z.ZodType> {
  readonly schema: Schema;
  /** A clock time that must be there. */
  readonly moment?: string;
  /** One that may be. */
  readonly mayHave?: string;
  readonly run: (where: Where, value: z.infer<Schema>, at: Date, mayBe: Date | null) => Promise<void>;
}

const itemForm = <Schema extends z.ZodType>({ schema, moment, mayHave, run }: ItemForm<Schema>) => async ({ form, zone, actor, caseNumber, label }: Call) => {
  const typed = typedValues(form);
  const parsed = schema.safeParse(typed);
  const moments = readMoments(typed, zone, moment ? [moment] : [], mayHave ? [mayHave] : []);
  const now = new Date();
  if (!parsed.success || Object.keys(moments.fieldErrors).length > 0) return { ...(parsed.success ? {} : fieldErrorsOf(parsed.error)), ...moments.fieldErrors };
  await run({ actor, caseNumber, label, now }, parsed.data, (moment && moments.at(moment)) || now, mayHave ? moments.at(mayHave) : null);
  return null;
};

const forms = {
  offer: itemForm({ schema: offerItemSchema, run: (where, offer) => offerItem({ ...where, offer }) }),
  'take-over': itemForm({ schema: takeOverSchema, run: (where, takeOver) => takeOverItem({ ...where, takeOver }) }),
  decline: itemForm({ schema: declineOfferSchema, run: (where, { offerId, reason }) => declineOffer({ ...where, offerId, reason }) }),
  withdraw: itemForm({ schema: withdrawOfferSchema, run: (where, { offerId }) => withdrawOffer({ ...where, offerId }) }),
  'hand-over': itemForm({ schema: handOverSchema, moment: 'handedAt', run: (where, handOver, handedAt) => handOverItem({ ...where, handOver, handedAt }) }),
  exam: itemForm({ schema: recordExamSchema, moment: 'performedAt', mayHave: 'noticeAt', run: (where, exam, performedAt, noticeAt) => recordExam({ ...where, exam, performedAt, noticeAt }) }),
  plan: itemForm({ schema: planExamSchema, moment: 'plannedAt', run: (where, plan, plannedAt) => planExam({ ...where, plan, plannedAt }) }),
  'change-plan': itemForm({ schema: changePlanSchema, moment: 'plannedAt', run: (where, change, plannedAt) => changePlan({ ...where, change, plannedAt }) }),
  'cancel-plan': itemForm({ schema: cancelPlanSchema, run: (where, cancel) => cancelPlan({ ...where, cancel }) }),
  made: itemForm({ schema: recordMadeSchema, moment: 'performedAt', run: (where, made, performedAt) => recordMadeExam({ ...where, made, performedAt }) }),
  notice: itemForm({ schema: recordNoticeSchema, moment: 'sentAt', run: (where, notice, sentAt) => recordNotice({ ...where, notice, sentAt }) }),
  answer: itemForm({ schema: recordAnswerSchema, moment: 'answeredAt', run: (where, reply, answeredAt) => recordAnswer({ ...where, reply, answeredAt }) }),
  disposal: itemForm({ schema: decideDisposalSchema, run: (where, decision) => decideDisposal({ ...where, decision }) }),
};
const intents = z.enum(['offer', 'take-over', 'decline', 'withdraw', 'hand-over', 'exam', 'plan', 'change-plan', 'cancel-plan', 'made', 'notice', 'answer', 'disposal']);

/** Carries out what a form of the item's page asks; what has to be mended, or null when it is done. */
export async function actOnItem(call: Call) {
  const { form } = call;
  const intent = intents.safeParse(form.get('intent'));
  if (!intent.success) return formProblem('offer', form, { formErrors: ['The form is damaged. Open the page anew; what you typed can be copied from here.'] });
  // The ticked parties come as one field each; from here on they are one field of words.
  if (form.has('tellRoles')) form.set('tellRoles', form.getAll('tellRoles').join(' '));
  try {
    const fieldErrors = await forms[intent.data](call);
    return fieldErrors && formProblem(intent.data, form, { fieldErrors });
  } catch (error) {
    return problemFromError(intent.data, form, error);
  }
}
