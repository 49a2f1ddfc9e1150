import { Form } from 'react-router';
import { ChoiceChips } from '#app/components/forms/choice-chips.tsx';
import { ErrorSummary } from '#app/components/forms/error-summary.tsx';
import type { FieldLike } from '#app/components/forms/field-like.ts';
import { Select, TextArea, TextInput } from '#app/components/forms/text-field.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { photoViewLabels, photoViews } from '#app/domain/incident.ts';
import type { PhotoCard, PhotoOffer } from '#app/domain/photo-view.ts';

/** What an action said about one photo's form. */
export interface PhotoProblem {
  readonly intent: string;
  readonly formErrors: readonly string[];
  readonly fieldErrors: Readonly<Record<string, readonly string[]>>;
  readonly typed: Readonly<Record<string, string>>;
}

interface EditorProps {
  readonly card: PhotoCard;
  /** Set when the last attempt was about this photo. */
  readonly problem: PhotoProblem | null;
}

type FieldMaker = (name: string, stored: string) => FieldLike;

function fieldsFor(card: PhotoCard, intent: string, problem: PhotoProblem | null): FieldMaker {
  const mine = problem?.intent === intent ? problem : null;
  return (name, stored) => ({ name, id: `photo-${card.label}-${name}`, errors: mine?.fieldErrors[name], defaultValue: mine?.typed[name] ?? stored });
}

function Hidden({ card, intent }: { readonly card: PhotoCard; readonly intent: string }) {
  return (
    <>
      <input type="hidden" name="intent" value={intent} />
      <input type="hidden" name="photoId" value={card.id} />
    </>
  );
}

/** What the file says of time and place: put to the person, used only when taken. */
export function PhotoOffers({ card, editable }: { readonly card: PhotoCard; readonly editable: boolean }) {
  return (
    <div className="space-y-2">
      {card.offers.map((offer) => (
        <div key={offer.kind} className="border-l-4 border-hair pl-3 text-small">
          <p>{offer.says} {offer.answer === null && editable ? offer.question : null}</p>
          {offer.answer === null ? null : <p className="text-second">{offer.answer === 'accepted' ? 'Taken over.' : 'Not used.'}</p>}
          {editable ? <OfferButtons card={card} offer={offer} /> : null}
        </div>
      ))}
      {card.differenceWords ? <p className="flex gap-2 text-small font-semibold"><span aria-hidden="true">!</span><span>{card.differenceWords}</span></p> : null}
    </div>
  );
}

function OfferButtons({ card, offer }: { readonly card: PhotoCard; readonly offer: PhotoOffer }) {
  const what = offer.kind === 'time' ? `time of photo ${card.label}` : `place of photo ${card.label}`;
  return (
    <Form method="post" className="flex flex-wrap gap-x-5 pt-1">
      <Hidden card={card} intent="answer-offer" />
      <input type="hidden" name="offer" value={offer.kind} />
      {offer.answer === 'accepted' ? null : <Button look="quiet" name="answer" value="accepted" className="min-h-(--target-height)">Use it<span className="sr-only"> as the {what}</span></Button>}
      {offer.answer === 'declined' ? null : <Button look="quiet" name="answer" value="declined" className="min-h-(--target-height)">Do not use it<span className="sr-only"> as the {what}</span></Button>}
    </Form>
  );
}

/** View, caption, alternative text and clock error. */
export function PhotoDescription({ card, problem }: EditorProps) {
  const field = fieldsFor(card, 'describe', problem);
  return (
    <Form method="post" className="space-y-3">
      <Hidden card={card} intent="describe" />
      {problem?.intent === 'describe' ? <ErrorSummary errors={problem.formErrors} /> : null}
      <Select field={field('view', card.view ?? '')} label="View" emptyLabel="Not stated" options={photoViews.map((value) => ({ value, label: photoViewLabels[value] }))} />
      <TextInput field={field('caption', card.caption)} label="Caption" help="What it shows. No names." maxLength={300} />
      <TextArea field={field('altText', card.altText)} label="Description for those who cannot see it" rows={2} maxLength={500} />
      <TextInput field={field('clockErrorS', String(card.clockErrorS))} label="Clock error of the camera, in seconds" help="Reading less true time: 42 when it runs 42 s fast, -15 when slow." inputMode="numeric" />
      <Button look="outlined">Save photo {card.label}</Button>
    </Form>
  );
}

const edges = [['left', 'Left edge'], ['top', 'Upper edge'], ['right', 'Right edge'], ['bottom', 'Lower edge']] as const;

/** What of the photo may leave the house: yes or no, and boxes that are hidden when it does. */
export function PhotoRelease({ card, problem }: EditorProps) {
  const field = fieldsFor(card, 'add-mask', problem);
  return (
    <div className="space-y-4">
      <Form method="post" className="space-y-2">
        <Hidden card={card} intent="set-releasable" />
        <ChoiceChips
          field={{ name: 'releasable', id: `photo-${card.label}-releasable`, defaultValue: card.releasable }}
          legend="May it leave with a release?"
          options={[{ value: 'yes', label: 'Yes' }, { value: 'no', label: 'No' }, { value: 'undecided', label: 'Undecided', dashed: true }]}
        />
        <Button look="outlined">Save the decision on photo {card.label}</Button>
      </Form>
      {card.masks.map((mask, index) => (
        <Form key={index} method="post" className="flex flex-wrap items-baseline justify-between gap-x-4 border-b border-hair pb-1 text-small">
          <Hidden card={card} intent="remove-mask" />
          <input type="hidden" name="mask" value={index} />
          <span>Box {index + 1}, {mask.class === 'personal' ? 'personal' : 'exact place'}: {rounded(mask.leftShare)}, {rounded(mask.topShare)} to {rounded(mask.leftShare + mask.widthShare)}, {rounded(mask.topShare + mask.heightShare)} %</span>
          <Button look="quiet" className="min-h-(--target-height)">Remove<span className="sr-only"> box {index + 1} of photo {card.label}</span></Button>
        </Form>
      ))}
      <Form key={card.masks.length} method="post" className="space-y-2">
        <Hidden card={card} intent="add-mask" />
        <p className="font-semibold">Add a box to hide</p>
        <p className="text-small text-second">Edges in per cent, from the upper left corner. The original is never changed.</p>
        {problem?.intent === 'add-mask' ? <ErrorSummary errors={problem.formErrors} /> : null}
        <div className="grid grid-cols-2 gap-2.5">
          {edges.map(([name, label]) => <TextInput key={name} field={field(name, '')} label={label} inputMode="decimal" autoComplete="off" />)}
        </div>
        <ChoiceChips field={field('class', 'personal')} legend="What it hides" options={[{ value: 'personal', label: 'A person, name or plate' }, { value: 'exact-place', label: 'Where it is' }]} />
        <Button look="outlined">Add the box to photo {card.label}</Button>
      </Form>
    </div>
  );
}

const rounded = (share: number) => String(Math.round(share * 1000) / 10);
