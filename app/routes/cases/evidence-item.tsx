import { randomUUID } from 'node:crypto';
import { href, redirect } from 'react-router';
import type { Route } from './+types/evidence-item';
import { db } from '#db/client.server.ts';
import { findCase } from '#db/queries/case-subject.server.ts';
import { getItemPage } from '#db/queries/evidence-page.server.ts';
import { requireActor } from '#app/auth/middleware.server.ts';
import { ChainTable, ExamTable } from '#app/components/evidence/chain-table.tsx';
import { CustodyLines } from '#app/components/evidence/custody-lines.tsx';
import { HandOverSection } from '#app/components/evidence/hand-over-section.tsx';
import { DisposalForm, ExamForm } from '#app/components/evidence/item-forms.tsx';
import { NoticeSection } from '#app/components/evidence/notice-section.tsx';
import { OfferPanel } from '#app/components/evidence/offers.tsx';
import { PlanForm } from '#app/components/evidence/plan-forms.tsx';
import { PlanSection } from '#app/components/evidence/plan-section.tsx';
import { answerTo } from '#app/components/findings/problem-fields.ts';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { ButtonLink } from '#app/components/ui/button.tsx';
import { FactList } from '#app/components/ui/fact-list.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import { readCaseNumber } from '#app/domain/case-number.ts';
import { notFound } from '#app/domain/errors.ts';
import { readItemLetter } from '#app/domain/evidence.ts';
import { respond } from '#app/http/to-response.server.ts';
import { actOnItem } from './evidence-item-actions.server.ts';

export function loader({ request, context, params }: Route.LoaderArgs) {
  return respond(async () => {
    const actor = requireActor(context, request);
    const now = new Date();
    const page = await getItemPage(db, { actor, caseNumber: readCaseNumber(params.caseNumber), label: readItemLetter(params.letter), now });
    if (!page) throw notFound('The item');
    return { ...page, now, clientIds: { offer: randomUUID(), hand: randomUUID(), exam: randomUUID(), plan: randomUUID(), made: randomUUID(), notice: randomUUID(), answer: randomUUID() } };
  });
}

export async function action({ request, context, params }: Route.ActionArgs) {
  return respond(async () => {
    const actor = requireActor(context, request);
    const caseNumber = readCaseNumber(params.caseNumber);
    const found = await findCase(db, actor, caseNumber);
    if (!found) throw notFound('The case');
    const problem = await actOnItem({ actor, caseNumber, label: readItemLetter(params.letter), zone: found.row.zone, form: await request.formData() });
    return problem ?? redirect(href('/cases/:caseNumber/evidence/:letter', params), 303);
  });
}

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
      {page.offer ? <div className="pt-6"><OfferPanel key={page.offer.id} offer={page.offer} mayTakeOver={page.mayTakeOver} mayWithdraw={page.mayWithdraw} answer={actionData} /></div> : null}
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
            {page.pastOffers.length > 0 ? <ul className="pt-2 text-small text-second">{page.pastOffers.map(({ id, words }) => <li key={id}>{words}</li>)}</ul> : null}
          </section>
          <section aria-labelledby="exams">
            <SectionHeading id="exams">Examinations</SectionHeading>
            {item.examinations.length === 0 ? <p className="text-second">None recorded.</p> : <ExamTable code={item.code} exams={item.examinations} documents={page.documents} />}
          </section>
          <PlanSection plans={page.plans} cancelled={page.cancelled} zone={page.zone} documents={page.documents} mayWrite={page.mayWrite} clientId={page.clientIds.made} answer={actionData} />
          <NoticeSection notices={page.notices} choices={page.noticeChoices} plans={page.plans} zone={page.zone} clientIds={page.clientIds} mayWrite={page.mayWrite} answer={actionData} />
        </div>
      </div>
      {page.mayWrite || page.mayOffer ? (
        <div className="grid gap-x-12 gap-y-8 pt-8 desk:grid-cols-2" data-print="no">
          <div className="space-y-8">
            <HandOverSection zone={page.zone} clientIds={page.clientIds} offered={page.offer !== null} mayOffer={page.mayOffer} mayWrite={page.mayWrite} receivers={page.receivers} sequence={item.openSequence} holderName={item.openHolderName} answer={actionData} />
            {page.mayWrite ? (
              <section aria-labelledby="disposal">
                <SectionHeading id="disposal">Disposal</SectionHeading>
                <DisposalForm key={item.disposalWords} disposal={item.disposal} answer={answerTo(actionData, 'disposal')} />
              </section>
            ) : null}
          </div>
          {page.mayWrite ? (
            <div className="space-y-8">
              <section aria-labelledby="plan-exam">
                <SectionHeading id="plan-exam">Plan an examination that may alter the item</SectionHeading>
                <PlanForm key={page.plans.length} clientId={page.clientIds.plan} zone={page.zone} documents={page.documents} answer={answerTo(actionData, 'plan')} />
              </section>
              <section aria-labelledby="record-exam">
                <SectionHeading id="record-exam">Record an examination</SectionHeading>
                <ExamForm key={item.examinations.length} clientId={page.clientIds.exam} zone={page.zone} documents={page.documents} against={page.against} answer={answerTo(actionData, 'exam')} />
              </section>
            </div>
          ) : null}
        </div>
      ) : null}
      {page.mayWrite ? null : <p className="pt-6 text-second">Hand-overs and examinations are recorded by those who work on the case. {page.whoWrites}</p>}
    </div>
  );
}
