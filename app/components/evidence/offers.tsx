import { href } from 'react-router';
import type { FormAnswer } from '#app/components/findings/problem-fields.ts';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { FactList } from '#app/components/ui/fact-list.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import type { OfferView } from '#app/domain/evidence-steps-view.ts';
import { DeclineForm, TakeOverForm, WithdrawForm } from './offer-forms.tsx';

/** Items that wait for the signature of their receiver; the reader's own first. */
export function WaitingOffers({ caseNumber, offers }: { readonly caseNumber: number; readonly offers: readonly OfferView[] }) {
  const sorted = offers.toSorted((a, b) => Number(b.mine) - Number(a.mine));
  return (
    <section aria-labelledby="waiting-offers">
      <SectionHeading id="waiting-offers">Waiting for a signature</SectionHeading>
      {sorted.length === 0 ? <p className="text-second">No item is offered to anybody.</p> : (
        <ul>
          {sorted.map((offer) => (
            <li key={offer.id} className="border-b border-hair py-2">
              <AppLink href={href('/cases/:caseNumber/evidence/:letter', { caseNumber: String(caseNumber), letter: offer.letter })} className="inline-flex min-h-6 items-center font-semibold">{offer.code}</AppLink>
              {offer.mine ? <span>: <b>yours to sign for</b></span> : <span>: to {offer.receiver}, {offer.role.toLowerCase()}</span>}
              <span className="block text-axis text-second">Offered {offer.offered}. Until it is signed for, the giver holds it.</span>
            </li>
          ))}
        </ul>
      )}
    </section>
  );
}

export interface OfferPanelProps {
  readonly offer: OfferView;
  readonly mayTakeOver: boolean;
  readonly mayWithdraw: boolean;
  readonly answer: FormAnswer | undefined;
}

/** The offer of this item: the receiver signs or declines, whoever made it may withdraw it, everybody else reads it. */
export function OfferPanel({ offer, mayTakeOver, mayWithdraw, answer }: OfferPanelProps) {
  return (
    <section aria-labelledby="offer" className="max-w-[64ch] space-y-4">
      <SectionHeading id="offer" note="until it is signed for, the giver holds the item">{mayTakeOver ? 'Offered to you' : `Offered to ${offer.receiver}`}</SectionHeading>
      <FactList
        layout="columns"
        facts={[
          { term: 'Offered', value: offer.offered },
          { term: 'Given by', value: offer.givenBy },
          { term: 'Taken over by', value: offer.receiver, note: offer.role },
          { term: 'Purpose', value: offer.purpose },
          { term: 'Condition', value: offer.condition },
          ...(offer.place ? [{ term: 'Kept where', value: offer.place }] : []),
        ]}
      />
      {mayTakeOver ? <TakeOverForm offer={offer} answer={answer} /> : null}
      {mayTakeOver ? <DeclineForm offer={offer} answer={answer} /> : null}
      {mayWithdraw ? <WithdrawForm offer={offer} answer={answer} /> : null}
      {mayTakeOver || mayWithdraw ? null : <p className="text-second">The receiver signs for it, or whoever offered it withdraws it.</p>}
    </section>
  );
}
