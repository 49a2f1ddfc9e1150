import { answerTo } from '#app/components/findings/problem-fields.ts';
import type { FormAnswer } from '#app/components/findings/problem-fields.ts';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import { HandOverForm } from './item-forms.tsx';
import { OfferForm } from './offer-forms.tsx';
import type { OfferFormProps } from './offer-forms.tsx';

export interface HandOverSectionProps extends Pick<OfferFormProps, 'receivers' | 'sequence' | 'holderName'> {
  readonly zone: string;
  readonly clientIds: { readonly offer: string; readonly hand: string };
  /** The item is offered to somebody who has not answered. */
  readonly offered: boolean;
  readonly mayOffer: boolean;
  /** May type the signatures of people without an account. */
  readonly mayWrite: boolean;
  readonly answer: FormAnswer | undefined;
}

/** Two ways on: to somebody of the house, who signs, or to somebody outside, for whom the recorder types. */
export function HandOverSection({ zone, clientIds, offered, mayOffer, mayWrite, receivers, sequence, holderName, answer }: HandOverSectionProps) {
  const typing = answerTo(answer, 'hand-over');
  const offering = answerTo(answer, 'offer');
  // A refusal for an offer that came in between must be read where the form was.
  const waits = offered && !typing && !offering;
  return (
    <section aria-labelledby="hand-over">
      <SectionHeading id="hand-over">Hand the item over</SectionHeading>
      {waits ? <p className="text-second">The item is offered to somebody who has not answered. It is handed over when they sign, or on another way once the offer is withdrawn or declined.</p> : null}
      {!waits && mayOffer && receivers.length > 0 ? <OfferForm key={`offer-${sequence}`} clientId={clientIds.offer} sequence={sequence} holderName={holderName} receivers={receivers} answer={offering} /> : null}
      {!waits && mayWrite ? (
        <details open={typing !== null || receivers.length === 0} className="mt-4 border-y border-hair">
          <summary className="inline-flex min-h-11 items-center underline decoration-ember decoration-2 underline-offset-4 desk:min-h-9">To somebody without an account, a store, or yourself</summary>
          <div className="pt-1 pb-4">
            <HandOverForm key={sequence} clientId={clientIds.hand} zone={zone} sequence={sequence} holderName={holderName} answer={typing} />
          </div>
        </details>
      ) : null}
    </section>
  );
}
