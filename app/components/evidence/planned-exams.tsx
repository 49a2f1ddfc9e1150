import { href } from 'react-router';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { Caution } from '#app/components/ui/caution.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import { TickLine } from '#app/components/ui/tick-line.tsx';
import type { PlanView } from '#app/domain/evidence-steps-view.ts';

/** What a planned examination has and what it still lacks, a line each. */
export function PlanNeeds({ plan }: { readonly plan: PlanView }) {
  return (
    <div className="text-small">
      {plan.needs.map((need) => <TickLine key={need.key} done={need.done} note={need.note}>{need.words}</TickLine>)}
      {plan.passed ? <p className="pt-2 font-semibold">The day has passed. Record it as made, move it, or cancel it.</p> : null}
    </div>
  );
}

/** Planned examinations of a case, each leading to its item. */
export function PlannedExams({ caseNumber, plans }: { readonly caseNumber: number; readonly plans: readonly PlanView[] }) {
  return (
    <section aria-labelledby="planned-exams">
      <SectionHeading id="planned-exams">Planned examinations that may alter an item</SectionHeading>
      {plans.length === 0 ? <p className="text-second">None is planned.</p> : (
        <div className="space-y-5">
          {plans.map((plan) => (
            <div key={plan.id}>
              <p className="pb-1"><AppLink href={`${href('/cases/:caseNumber/evidence/:letter', { caseNumber: String(caseNumber), letter: plan.letter })}#plan-${plan.id}`} className="inline-flex min-h-6 items-center font-semibold">{plan.code}</AppLink>, {plan.when}: {plan.method}</p>
              <PlanNeeds plan={plan} />
            </div>
          ))}
          <Caution>Do not clean the optic. Do not repeat the ignition. A change to an item cannot be undone.</Caution>
        </div>
      )}
    </section>
  );
}
