import { randomUUID } from 'node:crypto';
import { href, redirect } from 'react-router';
import { z } from 'zod';
import type { Route } from './+types/evidence-item';
import { db } from '#db/client.server.ts';
import { findCase } from '#db/queries/case-subject.server.ts';
import { getItemPage } from '#db/queries/evidence-page.server.ts';
import { requireActor } from '#app/auth/middleware.server.ts';
import { ChainTable, ExamTable } from '#app/components/evidence/chain-table.tsx';
import { CustodyLines } from '#app/components/evidence/custody-lines.tsx';
import { DisposalForm, ExamForm, HandOverForm } from '#app/components/evidence/item-forms.tsx';
import { answerTo } from '#app/components/findings/problem-fields.ts';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { ButtonLink } from '#app/components/ui/button.tsx';
import { FactList } from '#app/components/ui/fact-list.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import { readCaseNumber } from '#app/domain/case-number.ts';
import { notFound } from '#app/domain/errors.ts';
import { decideDisposalSchema, handOverSchema, recordExamSchema } from '#app/domain/evidence-form.ts';
import { readItemLetter } from '#app/domain/evidence.ts';
import type { Actor } from '#app/domain/roles.ts';
import { readMoments } from '#app/domain/typed-moment.ts';
import { fieldErrorsOf } from '#app/http/field-errors.ts';
import { formProblem, problemFromError, typedValues } from '#app/http/form-result.server.ts';
import { respond } from '#app/http/to-response.server.ts';
import { decideDisposal } from '#app/services/evidence/decide-disposal.server.ts';
import { handOverItem } from '#app/services/evidence/hand-over.server.ts';
import { recordExam } from '#app/services/evidence/record-exam.server.ts';

export function loader({ request, context, params }: Route.LoaderArgs) {
  return respond(async () => {
    const actor = requireActor(context, request);
    const page = await getItemPage(db, { actor, caseNumber: readCaseNumber(params.caseNumber), label: readItemLetter(params.letter) });
    if (!page) throw notFound('The item');
    return { ...page, now: new Date(), clientIds: { hand: randomUUID(), exam: randomUUID() } };
  });
}

const intents = z.enum(['hand-over', 'exam', 'disposal']);
interface Call {
  readonly actor: Actor;
  readonly caseNumber: number;
  readonly label: number;
  readonly zone: string;
  readonly form: FormData;
}

export async function action({ request, context, params }: Route.ActionArgs) {
  return respond(async () => {
    const actor = requireActor(context, request);
    const caseNumber = readCaseNumber(params.caseNumber);
    const found = await findCase(db, actor, caseNumber);
    if (!found) throw notFound('The case');
    const form = await request.formData();
    const intent = intents.safeParse(form.get('intent'));
    if (!intent.success) return formProblem('hand-over', form, { formErrors: ['The form is damaged. Open the page anew; what you typed can be copied from here.'] });
    try {
      const problem = await act[intent.data]({ actor, caseNumber, label: readItemLetter(params.letter), zone: found.row.zone, form });
      return problem ?? redirect(href('/cases/:caseNumber/evidence/:letter', params), 303);
    } catch (error) {
      return problemFromError(intent.data, form, error);
    }
  });
}

const act = {
  'hand-over': async ({ actor, caseNumber, label, zone, form }: Call) => {
    const typed = typedValues(form);
    const parsed = handOverSchema.safeParse(typed);
    const moments = readMoments(typed, zone, ['handedAt']);
    const handedAt = moments.at('handedAt');
    if (!parsed.success || !handedAt) return formProblem('hand-over', form, { fieldErrors: { ...(parsed.success ? {} : fieldErrorsOf(parsed.error)), ...moments.fieldErrors } });
    await handOverItem({ actor, caseNumber, label, handOver: parsed.data, handedAt, now: new Date() });
    return null;
  },
  exam: async ({ actor, caseNumber, label, zone, form }: Call) => {
    const typed = typedValues(form);
    const parsed = recordExamSchema.safeParse(typed);
    const moments = readMoments(typed, zone, ['performedAt'], ['noticeAt']);
    const performedAt = moments.at('performedAt');
    if (!parsed.success || !performedAt || Object.keys(moments.fieldErrors).length > 0) return formProblem('exam', form, { fieldErrors: { ...(parsed.success ? {} : fieldErrorsOf(parsed.error)), ...moments.fieldErrors } });
    await recordExam({ actor, caseNumber, label, exam: parsed.data, performedAt, noticeAt: moments.at('noticeAt'), now: new Date() });
    return null;
  },
  disposal: async ({ actor, caseNumber, label, form }: Call) => {
    const parsed = decideDisposalSchema.safeParse(typedValues(form));
    if (!parsed.success) return formProblem('disposal', form, { fieldErrors: fieldErrorsOf(parsed.error) });
    await decideDisposal({ actor, caseNumber, label, decision: parsed.data });
    return null;
  },
};

export const meta: Route.MetaFunction = ({ params }) => [{ title: `Item ${params.caseNumber}-${params.letter} · Scorchline` }];

export default function EvidenceItem({ loaderData: page, actionData, params }: Route.ComponentProps) {
  const { item } = page;
  return (
    <div>
      <p className="pb-2" data-print="no"><AppLink href={href('/cases/:caseNumber/evidence', { caseNumber: params.caseNumber })} className="inline-flex min-h-8 items-center">All items and documents</AppLink></p>
      <div className="flex flex-wrap items-start justify-between gap-4 pb-4">
        <h2 className="font-serif text-title">{item.code}: {item.description}</h2>
        <ButtonLink href={href('/cases/:caseNumber/evidence/:letter/label', params)} look="outlined">Print the label</ButtonLink>
      </div>
      <CustodyLines lines={[page.line]} zone={page.zone} now={page.now} />
      <div className="grid gap-x-12 gap-y-6 pt-6 desk:grid-cols-[minmax(0,1fr)_minmax(0,2fr)]">
        <section aria-labelledby="item-facts">
          <SectionHeading id="item-facts">The item</SectionHeading>
          <FactList
            layout="columns"
            facts={[
              { term: 'Kind', value: item.kind },
              { term: 'Taken from', value: item.fromWhere },
              { term: 'Collected', value: item.collected },
              { term: 'Seal', value: item.sealWords },
              { term: 'Held by', value: item.holder, note: `since ${item.since}` },
              { term: 'Disposal', value: item.disposalWords },
            ]}
          />
          {page.legalHold ? <p className="pt-2 font-semibold">The case is on hold: the item is not disposed of.</p> : null}
        </section>
        <div className="min-w-0 space-y-6">
          <section aria-labelledby="chain">
            <SectionHeading id="chain" note="each record begins at the moment at which the one before it ends">Custody</SectionHeading>
            <ChainTable code={item.code} custody={item.custody} />
          </section>
          <section aria-labelledby="exams">
            <SectionHeading id="exams">Examinations</SectionHeading>
            {item.examinations.length === 0 ? <p className="text-second">None recorded.</p> : <ExamTable code={item.code} exams={item.examinations} documents={page.documents} />}
          </section>
        </div>
      </div>
      {page.mayWrite ? (
        <div className="grid gap-x-12 gap-y-8 pt-8 desk:grid-cols-2" data-print="no">
          <section aria-labelledby="hand-over">
            <SectionHeading id="hand-over">Hand the item over</SectionHeading>
            <HandOverForm key={item.openSequence} clientId={page.clientIds.hand} zone={page.zone} sequence={item.openSequence} holderName={item.openHolderName} answer={answerTo(actionData, 'hand-over')} />
          </section>
          <div className="space-y-8">
            <section aria-labelledby="record-exam">
              <SectionHeading id="record-exam">Record an examination</SectionHeading>
              <ExamForm key={item.examinations.length} clientId={page.clientIds.exam} zone={page.zone} documents={page.documents} answer={answerTo(actionData, 'exam')} />
            </section>
            <section aria-labelledby="disposal">
              <SectionHeading id="disposal">Disposal</SectionHeading>
              <DisposalForm key={item.disposalWords} disposal={item.disposal} answer={answerTo(actionData, 'disposal')} />
            </section>
          </div>
        </div>
      ) : <p className="pt-6 text-second">Hand-overs and examinations are recorded by those who work on the case. {page.whoWrites}</p>}
    </div>
  );
}
