import { useState } from 'react';
import { Form, href, redirect } from 'react-router';
import { z } from 'zod';
import type { Route } from './+types/photo-marks';
import { db } from '#db/client.server.ts';
import { findCase } from '#db/queries/case-subject.server.ts';
import { findPhotoByLabel } from '#db/queries/photos.server.ts';
import { requireActor } from '#app/auth/middleware.server.ts';
import { answerTo } from '#app/components/findings/problem-fields.ts';
import { MarkDrawer } from '#app/components/photos/mark-drawer.tsx';
import { MarksLayer } from '#app/components/photos/marks-layer.tsx';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { Notice } from '#app/components/ui/notice.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import { readCaseNumber } from '#app/domain/case-number.ts';
import { notFound } from '#app/domain/errors.ts';
import { canOnCase, whoCan } from '#app/domain/permissions.ts';
import { markWords, photoMarkSchema } from '#app/domain/photo-marks.ts';
import { photoCard } from '#app/domain/photo-view.ts';
import { fieldErrorsOf } from '#app/http/field-errors.ts';
import { formProblem, problemFromError, typedValues } from '#app/http/form-result.server.ts';
import { respond } from '#app/http/to-response.server.ts';
import { addMark, removeMark } from '#app/services/photos/mark-photo.server.ts';

export function loader({ request, context, params }: Route.LoaderArgs) {
  return respond(async () => {
    const actor = requireActor(context, request);
    const caseNumber = readCaseNumber(params.caseNumber);
    const found = await findCase(db, actor, caseNumber);
    const photo = found && (await findPhotoByLabel(db, { actor, caseNumber, label: readCaseNumber(params.label) }));
    if (!found || !photo) throw notFound('The photo');
    const { alternative, label, viewWords, state } = photoCard(photo, found.row);
    return {
      photo: { id: photo.id, label, viewWords, alternative, ready: state === 'ready', widthPx: photo.widthPx, heightPx: photo.heightPx },
      marks: photo.marks,
      mayDraw: canOnCase(actor, 'evidence:write', found.subject),
      whoDraws: whoCan('evidence:write'),
    };
  });
}

const removal = z.object({ photoId: z.uuid(), position: z.coerce.number().int().min(0), words: z.string() });

export async function action({ request, context, params }: Route.ActionArgs) {
  return respond(async () => {
    const actor = requireActor(context, request);
    const caseNumber = readCaseNumber(params.caseNumber);
    const form = await request.formData();
    const typed = typedValues(form);
    const intent = typed['intent'] === 'remove-mark' ? 'remove-mark' : 'add-mark';
    try {
      if (intent === 'remove-mark') {
        await removeMark({ actor, caseNumber, ...removal.parse(typed) });
      } else {
        const mark = photoMarkSchema.safeParse(typed);
        if (!mark.success) return formProblem(intent, form, { fieldErrors: fieldErrorsOf(mark.error) });
        await addMark({ actor, caseNumber, photoId: z.uuid().parse(typed['photoId']), mark: mark.data });
      }
    } catch (error) {
      return problemFromError(intent, form, error);
    }
    return redirect(href('/cases/:caseNumber/photos/:label/marks', params), 303);
  });
}

export const meta: Route.MetaFunction = ({ params }) => [{ title: `Case ${params.caseNumber}, marks on photo ${params.label} · Scorchline` }];

export default function PhotoMarks({ loaderData: { photo, marks, mayDraw, whoDraws }, actionData, params }: Route.ComponentProps) {
  const [shown, setShown] = useState(true);
  const source = `/photos/${photo.id}/view`;
  const removing = answerTo(actionData, 'remove-mark');
  return (
    <div>
      <p className="pb-2" data-print="no"><AppLink href={href('/cases/:caseNumber/photos', { caseNumber: params.caseNumber })} className="inline-flex min-h-(--target-height) items-center">All photos</AppLink></p>
      <h2 className="pb-1 font-serif text-title">{marks.length === 0 ? `Nothing is drawn over photo ${photo.label}` : `${marks.length} ${marks.length === 1 ? 'mark' : 'marks'} over photo ${photo.label}`}</h2>
      <p className="pb-4 text-small text-second">{params.caseNumber}-{photo.label} {photo.viewWords}. Marks lie on a layer of their own over a copy; the original keeps its hash.</p>
      {removing ? <div className="pb-4"><Notice role="alert" title="Not removed">{removing.formErrors.join(' ')}</Notice></div> : null}
      {!photo.ready ? <p className="text-second">The copy is being prepared. Reload in a few seconds.</p> : mayDraw ? (
        <MarkDrawer key={marks.length} photoId={photo.id} source={source} alt={photo.alternative} widthPx={photo.widthPx} heightPx={photo.heightPx} marks={shown ? marks : []} answer={answerTo(actionData, 'add-mark')} />
      ) : (
        <div className="relative max-w-[60rem] bg-wash">
          <img src={source} alt={photo.alternative} width={photo.widthPx} height={photo.heightPx} className="block h-auto w-full" />
          {shown ? <MarksLayer marks={marks} widthPx={photo.widthPx} heightPx={photo.heightPx} /> : null}
        </div>
      )}
      {marks.length > 0 ? (
        <section aria-labelledby="marks" className="max-w-[60rem] pt-6">
          <SectionHeading id="marks" aside={<Button type="button" look="quiet" className="min-h-(--target-height)" aria-pressed={!shown} onClick={() => setShown(!shown)}>{shown ? 'Hide the marks' : 'Show the marks'}</Button>}>Marks in words</SectionHeading>
          <ol>
            {marks.map((mark, index) => (
              <li key={index} className="flex flex-wrap items-baseline justify-between gap-x-6 border-b border-hair py-1.5">
                <span>{index + 1}. {markWords(mark)}</span>
                {mayDraw ? (
                  <Form method="post">
                    <input type="hidden" name="intent" value="remove-mark" />
                    <input type="hidden" name="photoId" value={photo.id} />
                    <input type="hidden" name="position" value={index} />
                    <input type="hidden" name="words" value={markWords(mark)} />
                    <Button look="quiet" className="min-h-(--target-height)">Remove<span className="sr-only"> mark {index + 1}</span></Button>
                  </Form>
                ) : null}
              </li>
            ))}
          </ol>
        </section>
      ) : null}
      {mayDraw ? null : <p className="pt-4 text-second">Marks are drawn by those who work on the case. {whoDraws}</p>}
    </div>
  );
}
