import { href, redirect } from 'react-router';
import { z } from 'zod';
import type { Route } from './+types/photo-measure';
import { db } from '#db/client.server.ts';
import { getMeasuredCase } from '#db/queries/measure-pages.server.ts';
import { listCasePhotos } from '#db/queries/photos.server.ts';
import { requireActor } from '#app/auth/middleware.server.ts';
import { PhotoMeasure } from '#app/components/scene/photo-measure.tsx';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { EmptyState } from '#app/components/ui/notice.tsx';
import { readCaseNumber } from '#app/domain/case-number.ts';
import { notFound } from '#app/domain/errors.ts';
import { photoCard } from '#app/domain/photo-view.ts';
import { problemFromError, typedValues } from '#app/http/form-result.server.ts';
import { respond } from '#app/http/to-response.server.ts';
import { applyPhotoMeasure } from '#app/services/scenes/use-photo-measure.server.ts';

export function loader({ request, context, params }: Route.LoaderArgs) {
  return respond(async () => {
    const actor = requireActor(context, request);
    const caseNumber = readCaseNumber(params.caseNumber);
    const { row, version, mayEdit, whoEdits } = await getMeasuredCase(db, { actor, caseNumber });
    const photo = (await listCasePhotos(db, { actor, caseNumber })).find((one) => one.id === params.photoId);
    if (!photo) throw notFound('The photo');
    const card = photoCard(photo, row);
    return { caseNumber, photoId: card.id, label: `${caseNumber}-${card.label}`, alt: card.alternative, ready: card.state === 'ready', viewWords: card.viewWords, version, mayEdit, whoEdits };
  });
}

export function action({ request, context, params }: Route.ActionArgs) {
  return respond(async () => {
    const actor = requireActor(context, request);
    const caseNumber = readCaseNumber(params.caseNumber);
    const photoId = z.uuid().safeParse(params.photoId).data;
    if (!photoId) throw notFound('The photo');
    const form = await request.formData();
    const typed = typedValues(form);
    try {
      await applyPhotoMeasure({ actor, caseNumber, photoId, baseVersion: Number(typed['baseVersion']), typed, now: new Date() });
    } catch (error) {
      return problemFromError('use-photo', form, error);
    }
    return redirect(href('/cases/:caseNumber/measurements', { caseNumber: String(caseNumber) }), 303);
  });
}

export const meta: Route.MetaFunction = ({ params }) => [{ title: `Case ${params.caseNumber}, measuring on a photo · Scorchline` }];

export default function PhotoMeasurePage({ loaderData: data, actionData: problem }: Route.ComponentProps) {
  const sheet = href('/cases/:caseNumber/photos', { caseNumber: String(data.caseNumber) });
  return (
    <div>
      <p className="pb-2" data-print="no"><AppLink href={sheet} className="inline-flex min-h-(--target-height) items-center">All photos</AppLink></p>
      <h2 className="font-serif text-title">Measure on photo {data.label}</h2>
      <p className="max-w-[64ch] pb-4 text-second">{data.viewWords}. Something flat of known size that lay in the plane of the mark, such as a card or a rule, makes the photo square-on. Measure on paper too if you can get there: the two should agree.</p>
      {data.ready ? (
        <PhotoMeasure label={data.label} source={`/photos/${data.photoId}/view`} alt={data.alt} baseVersion={data.version} mayEdit={data.mayEdit} whoEdits={data.whoEdits} problem={problem} />
      ) : (
        <EmptyState title="No copy of this photo can be shown yet.">It is being prepared, or could not be made. Try again in a few seconds.</EmptyState>
      )}
    </div>
  );
}
