import { data, Form, href, redirect } from 'react-router';
import type { ShouldRevalidateFunctionArgs } from 'react-router';
import { z } from 'zod';
import type { Route } from './+types/photos';
import { requireActor } from '#app/auth/middleware.server.ts';
import { ErrorSummary } from '#app/components/forms/error-summary.tsx';
import { PhotoDescription, PhotoOffers, PhotoRelease } from '#app/components/photos/photo-editor.tsx';
import type { PhotoProblem } from '#app/components/photos/photo-editor.tsx';
import { PhotoFigure } from '#app/components/photos/photo-figure.tsx';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import { notFound } from '#app/domain/errors.ts';
import { canOnCase } from '#app/domain/permissions.ts';
import { photoCard, photoSheetSentence } from '#app/domain/photo-view.ts';
import type { PhotoCard } from '#app/domain/photo-view.ts';
import { maskSchema, photoFileTypes, photoFormSchema } from '#app/domain/photo.ts';
import type { Actor } from '#app/domain/roles.ts';
import { problemFromError, typedValues } from '#app/http/form-result.server.ts';
import { readForm } from '#app/http/multipart-form.server.ts';
import { respond } from '#app/http/to-response.server.ts';
import { addCasePhoto } from '#app/services/photos/add-case-photo.server.ts';
import { changePhoto } from '#app/services/photos/change-photo.server.ts';
import { checkOriginals } from '#app/services/photos/check-originals.server.ts';
import { db } from '#db/client.server.ts';
import { findCase } from '#db/queries/case-subject.server.ts';
import { listCasePhotos } from '#db/queries/photos.server.ts';

const caseNumberOf = (text: string) => z.coerce.number().int().positive().catch(0).parse(text);

export function loader({ request, params, context }: Route.LoaderArgs) {
  return respond(async () => {
    const actor = requireActor(context, request);
    const caseNumber = caseNumberOf(params.caseNumber);
    const found = await findCase(db, actor, caseNumber);
    if (!found) throw notFound('The case');
    const cards = (await listCasePhotos(db, { actor, caseNumber })).map((photo) => photoCard(photo, found.row));
    return {
      caseNumber,
      heading: photoSheetSentence(cards),
      cards,
      mayAdd: canOnCase(actor, 'case:add-photo', found.subject),
      mayDecideRelease: canOnCase(actor, 'release:prepare', found.subject),
      mayReadOriginals: canOnCase(actor, 'photo:read-original', found.subject),
      mayMeasure: canOnCase(actor, 'reconstruction:read', found.subject),
    };
  });
}

export function action({ request, params, context }: Route.ActionArgs) {
  return respond(async () => {
    const actor = requireActor(context, request);
    const caseNumber = caseNumberOf(params.caseNumber);
    const refused: string[] = [];
    let added = 0;
    const form = await readForm(request, async ({ fieldName, ...file }) => {
      if (fieldName !== 'photos') return;
      const outcome = await addCasePhoto({ actor, caseNumber, file });
      if (outcome.ok) added += 1;
      else refused.push(outcome.sentence);
    });
    const sheet = href('/cases/:caseNumber/photos', { caseNumber: String(caseNumber) });
    if (form.get('intent') === 'add-photos') {
      if (refused.length > 0) return problem('add-photos', form, { photos: refused });
      return added > 0 ? redirect(sheet, 303) : problem('add-photos', form, { photos: ['Choose one photo or more first.'] });
    }
    return changeOne(actor, caseNumber, form, sheet);
  });
}

async function changeOne(actor: Actor, caseNumber: number, form: FormData, sheet: string) {
  const typed = typedValues(form);
  const read = photoFormSchema.safeParse(typed);
  if (!read.success) return problem(typed['intent'] ?? '', form, z.flattenError(read.error).fieldErrors);
  const request = read.data;
  try {
    if (request.intent === 'check-hashes') {
      await checkOriginals({ actor, caseNumber });
      return redirect(sheet, 303);
    }
    if (request.intent === 'add-mask') {
      const mask = maskSchema.safeParse(typed);
      if (!mask.success) return problem('add-mask', form, z.flattenError(mask.error).fieldErrors);
      await changePhoto({ actor, caseNumber, request: { ...request, mask: mask.data } });
    } else {
      await changePhoto({ actor, caseNumber, request });
    }
  } catch (error) {
    return problemFromError(request.intent, form, error);
  }
  return redirect(`${sheet}#photo-${request.photoId}`, 303);
}

function problem(intent: string, form: FormData, fieldErrors: Readonly<Record<string, readonly string[] | undefined>>) {
  const sentences = Object.fromEntries(Object.entries(fieldErrors).map(([name, list]) => [name, list ?? []]));
  return data({ ok: false as const, intent, formErrors: [], fieldErrors: sentences, typed: typedValues(form) }, { status: 400 });
}

/** Also after a refusal: the photos that were taken are on the sheet then. */
export const shouldRevalidate = ({ actionStatus, defaultShouldRevalidate }: ShouldRevalidateFunctionArgs): boolean => actionStatus !== undefined || defaultShouldRevalidate;

export const meta: Route.MetaFunction = ({ params }) => [{ title: `Photos · Case ${params.caseNumber} · Scorchline` }];

export default function CasePhotos({ loaderData, actionData }: Route.ComponentProps) {
  const { caseNumber, cards, heading, mayAdd, mayReadOriginals } = loaderData;
  return (
    <div className="space-y-6 pt-4">
      <div className="flex flex-wrap items-baseline justify-between gap-4">
        <div>
          <h2 className="font-serif text-title">{heading}</h2>
          <p className="text-small text-second">{cards.length === 0 ? 'None came with the report. One of the mark and one of the whole scene help most.' : 'Originals are kept and never shown here; these are view copies, with position and camera data removed.'}</p>
        </div>
        {mayReadOriginals && cards.length > 0 ? (
          <Form method="post">
            <input type="hidden" name="intent" value="check-hashes" />
            <Button look="outlined">Check all originals</Button>
          </Form>
        ) : null}
      </div>
      <ul className="grid gap-x-8 gap-y-10 tablet:grid-cols-2 desk:grid-cols-3">
        {cards.map((card) => <SheetItem key={card.id} card={card} rights={loaderData} problem={problemOf(card, actionData)} />)}
      </ul>
      {mayAdd ? <AddPhotos key={cards.length} caseNumber={caseNumber} problem={actionData?.intent === 'add-photos' ? actionData : null} /> : null}
    </div>
  );
}

function problemOf(card: PhotoCard, actionData: PhotoProblem | undefined): PhotoProblem | null {
  return actionData && actionData.typed['photoId'] === card.id ? actionData : null;
}

interface SheetItemProps {
  readonly card: PhotoCard;
  readonly rights: { readonly caseNumber: number; readonly mayAdd: boolean; readonly mayDecideRelease: boolean; readonly mayReadOriginals: boolean; readonly mayMeasure: boolean };
  readonly problem: PhotoProblem | null;
}

const marksWords = (count: number) => (count === 0 ? 'Draw on a copy' : `${count} ${count === 1 ? 'mark' : 'marks'} on a copy`);

const linkLook = 'inline-flex min-h-(--target-height) items-center';
const summaryLook = 'inline-flex min-h-(--target-height) items-center text-small underline decoration-ember decoration-2 underline-offset-4';

function SheetItem({ card, rights, problem }: SheetItemProps) {
  return (
    <li id={`photo-${card.id}`} className="min-w-0 space-y-1">
      <PhotoFigure card={card} caseNumber={rights.caseNumber} />
      <p className="text-small"><AppLink href={href('/cases/:caseNumber/photos/:label/marks', { caseNumber: String(rights.caseNumber), label: String(card.label) })} className={linkLook}>{marksWords(card.marks.length)}<span className="sr-only"> over photo {card.label}</span></AppLink></p>
      <PhotoOffers card={card} editable={rights.mayAdd} />
      {rights.mayAdd ? (
        <details open={problem?.intent === 'describe' || undefined}>
          <summary className={summaryLook}>Describe<span className="sr-only"> photo {card.label}</span></summary>
          <PhotoDescription card={card} problem={problem} />
        </details>
      ) : null}
      {rights.mayDecideRelease ? (
        <details open={problem?.intent === 'add-mask' || undefined}>
          <summary className={summaryLook}>For releases: {card.releasable === 'undecided' ? 'undecided' : card.releasable === 'yes' ? 'may leave' : 'stays'}{card.masks.length > 0 ? `, ${card.masks.length} hidden` : ''}<span className="sr-only">, photo {card.label}</span></summary>
          <PhotoRelease card={card} problem={problem} />
        </details>
      ) : null}
      {rights.mayMeasure && card.state === 'ready' ? <p className="text-small"><AppLink href={href('/cases/:caseNumber/photos/:photoId/measure', { caseNumber: String(rights.caseNumber), photoId: card.id })} className={linkLook}>Measure on photo {card.label}</AppLink></p> : null}
      {rights.mayReadOriginals ? <p className="text-small"><a href={`/photos/${card.id}/original`} download className={linkLook}>Original of photo {card.label}</a></p> : null}
    </li>
  );
}

function AddPhotos({ caseNumber, problem: wrong }: { readonly caseNumber: number; readonly problem: PhotoProblem | null }) {
  const field = { name: 'photos', id: 'add-photo-files', errors: wrong?.fieldErrors['photos'] };
  return (
    <section className="max-w-[64ch] space-y-3">
      <SectionHeading note="they get the next labels">Add photos</SectionHeading>
      {wrong ? <ErrorSummary fields={[{ field, label: 'Photos' }]} title="Not all photos were taken. Those that were are above." /> : null}
      <Form method="post" encType="multipart/form-data" className="space-y-3">
        <label htmlFor={field.id} className="block font-semibold">Photos for case {caseNumber}</label>
        <input type="file" id={field.id} name="photos" multiple accept={photoFileTypes} className="field-box" />
        <Button name="intent" value="add-photos" look="outlined">Add them</Button>
      </Form>
    </section>
  );
}
