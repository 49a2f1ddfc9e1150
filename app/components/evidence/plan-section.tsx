import { href } from 'react-router';
import type { FormAnswer } from '#app/components/findings/problem-fields.ts';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import type { PlanView } from '#app/domain/evidence-steps-view.ts';
import { CancelPlanForm, ChangePlanForm, MadeForm } from './plan-forms.tsx';
import type { DocumentChoice } from './plan-forms.tsx';
import { PlanNeeds } from './planned-exams.tsx';

export interface PlanSectionProps {
  readonly plans: readonly PlanView[];
  readonly cancelled: readonly { readonly id: string; readonly words: string }[];
  readonly zone: string;
  readonly documents: readonly DocumentChoice[];
  readonly mayWrite: boolean;
  readonly clientId: string;
  readonly answer: FormAnswer | undefined;
}

/** Planned examinations of one item: what each lacks, and what may be done with it. */
export function PlanSection({ plans, cancelled, zone, documents, mayWrite, clientId, answer }: PlanSectionProps) {
  if (plans.length === 0 && cancelled.length === 0) return null;
  return (
    <section aria-labelledby="plans">
      <SectionHeading id="plans" note="may alter the item">Planned examinations</SectionHeading>
      <div className="space-y-6">
        {plans.map((plan) => (
          <div key={plan.id} id={`plan-${plan.id}`}>
            <h3 className="font-semibold">{plan.when}, {plan.by}</h3>
            <p className="pb-1">{plan.method}</p>
            <PlanNeeds plan={plan} />
            {plan.protocolId && documents.some((document) => document.id === plan.protocolId) ? <p className="pt-1 text-small"><a href={href('/documents/:documentId', { documentId: plan.protocolId })} className="inline-flex min-h-6 items-center" download>Read the protocol</a></p> : null}
            {mayWrite ? (
              <div className="pt-1" data-print="no">
                <MadeForm key={`made-${plan.revision}`} plan={plan} zone={zone} documents={documents} clientId={clientId} answer={answer} />
                <ChangePlanForm key={`change-${plan.revision}`} plan={plan} zone={zone} documents={documents} answer={answer} />
                <CancelPlanForm plan={plan} answer={answer} />
              </div>
            ) : null}
          </div>
        ))}
      </div>
      {cancelled.length > 0 ? <ul className="pt-3 text-small text-second">{cancelled.map(({ id, words }) => <li key={id}>{words}</li>)}</ul> : null}
    </section>
  );
}
