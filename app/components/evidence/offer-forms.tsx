import { Form } from 'react-router';
import { ErrorSummary } from '#app/components/forms/error-summary.tsx';
import { Select, TextArea, TextInput } from '#app/components/forms/text-field.tsx';
import { answerTo, problemFields } from '#app/components/findings/problem-fields.ts';
import type { FormAnswer } from '#app/components/findings/problem-fields.ts';
import { Button } from '#app/components/ui/button.tsx';
import type { OfferView } from '#app/domain/evidence-steps-view.ts';
import { holderRoleLabels, holderRoles } from '#app/domain/evidence.ts';

const partOptions = holderRoles.filter((role) => role !== 'disposed').map((value) => ({ value, label: holderRoleLabels[value] }));

export interface OfferFormProps {
  /** Makes a repeated sending harmless. */
  readonly clientId: string;
  readonly sequence: number;
  readonly holderName: string;
  readonly receivers: readonly { readonly userId: string; readonly displayName: string }[];
  readonly answer: FormAnswer | null;
}

/** The giver signs; the receiver signs on their own account, and holds the item from then on. */
export function OfferForm({ clientId, sequence, holderName, receivers, answer }: OfferFormProps) {
  const field = problemFields(answer, { givenBy: holderName }, 'offer-');
  const names = [['receiverId', 'Who takes it over'], ['holderRole', 'Their part'], ['purpose', 'Purpose'], ['condition', 'Condition of item and seal'], ['givenBy', 'Signed by the giver']] as const;
  return (
    <Form method="post" className="space-y-4">
      <input type="hidden" name="intent" value="offer" />
      <input type="hidden" name="clientId" value={answer?.typed['clientId'] ?? clientId} />
      <input type="hidden" name="sequence" value={sequence} />
      <ErrorSummary errors={answer?.formErrors} fields={names.map(([name, label]) => ({ field: field(name), label }))} />
      <div className="grid gap-4 tablet:grid-cols-2">
        <Select field={field('receiverId', { required: true })} label="Who takes it over" emptyLabel="Choose" options={receivers.map(({ userId, displayName }) => ({ value: userId, label: displayName }))} />
        <Select field={field('holderRole', { required: true })} label="Their part" emptyLabel="Choose" options={partOptions} />
        <TextInput field={field('place')} label="Kept where" aside="room, shelf" />
        <TextInput field={field('purpose', { required: true })} label="Purpose" />
      </div>
      <TextInput field={field('condition', { required: true })} label="Condition of item and seal" />
      <TextInput field={field('givenBy', { required: true })} label="Signed by the giver" autoComplete="off" />
      <Button>Sign as giver and offer it</Button>
      <p className="text-axis text-second">The receiver hears of it by mail and signs on their own device. Until then the giver still holds it.</p>
    </Form>
  );
}

interface AnswerProps {
  readonly offer: OfferView;
  readonly answer: FormAnswer | undefined;
}

/** For the receiver: signs that the item is in their hands. */
export function TakeOverForm({ offer, answer: given }: AnswerProps) {
  const answer = answerTo(given, 'take-over');
  const field = problemFields(answer, { condition: offer.condition, place: offer.place }, 'take-');
  return (
    <Form method="post" className="space-y-4">
      <input type="hidden" name="intent" value="take-over" />
      <input type="hidden" name="offerId" value={offer.id} />
      <ErrorSummary errors={answer?.formErrors} fields={[{ field: field('condition'), label: 'Condition as you take it over' }]} />
      <TextInput field={field('condition', { required: true })} label="Condition as you take it over" help="As the giver wrote it. Change it if you see something else." />
      <TextInput field={field('place')} label="Where you keep it" aside="room, shelf" />
      <Button>Take it over and sign</Button>
    </Form>
  );
}

/** For the receiver: says why not. */
export function DeclineForm({ offer, answer: given }: AnswerProps) {
  const answer = answerTo(given, 'decline');
  const field = problemFields(answer, {}, 'decline-');
  return (
    <details open={answer !== null}>
      <summary className="inline-flex min-h-11 items-center underline decoration-ember decoration-2 underline-offset-4 desk:min-h-9">Decline it</summary>
      <Form method="post" className="space-y-4 pt-1">
        <input type="hidden" name="intent" value="decline" />
        <input type="hidden" name="offerId" value={offer.id} />
        <ErrorSummary errors={answer?.formErrors} fields={[{ field: field('reason'), label: 'Why you decline' }]} />
        <TextArea field={field('reason', { required: true })} label="Why you decline" rows={2} />
        <Button look="outlined">Decline the item</Button>
      </Form>
    </details>
  );
}

/** For whoever offered it. */
export function WithdrawForm({ offer, answer: given }: AnswerProps) {
  const answer = answerTo(given, 'withdraw');
  return (
    <Form method="post" className="space-y-2">
      <input type="hidden" name="intent" value="withdraw" />
      <input type="hidden" name="offerId" value={offer.id} />
      <ErrorSummary errors={answer?.formErrors} title="Not withdrawn." />
      <Button look="outlined">Withdraw the offer</Button>
    </Form>
  );
}
