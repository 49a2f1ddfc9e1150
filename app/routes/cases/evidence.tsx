import { randomUUID } from 'node:crypto';
import { href, redirect } from 'react-router';
import type { Route } from './+types/evidence';
import { db } from '#db/client.server.ts';
import { findCase } from '#db/queries/case-subject.server.ts';
import { getEvidencePage } from '#db/queries/evidence-page.server.ts';
import { requireActor } from '#app/auth/middleware.server.ts';
import { CollectForm } from '#app/components/evidence/collect-form.tsx';
import { CustodyLines } from '#app/components/evidence/custody-lines.tsx';
import { DocumentForm, DocumentTable } from '#app/components/evidence/documents.tsx';
import { ItemTable } from '#app/components/evidence/item-table.tsx';
import { NoticeLog } from '#app/components/evidence/notice-log.tsx';
import { WaitingOffers } from '#app/components/evidence/offers.tsx';
import { PlannedExams } from '#app/components/evidence/planned-exams.tsx';
import { answerTo } from '#app/components/findings/problem-fields.ts';
import { Caution } from '#app/components/ui/caution.tsx';
import { EmptyState } from '#app/components/ui/notice.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import { attachmentFormSchema, attachmentRefusal } from '#app/domain/attachment.ts';
import { readCaseNumber } from '#app/domain/case-number.ts';
import { notFound } from '#app/domain/errors.ts';
import { collectItemSchema } from '#app/domain/evidence-form.ts';
import { itemLetter } from '#app/domain/evidence.ts';
import type { Actor } from '#app/domain/roles.ts';
import { readMoments } from '#app/domain/typed-moment.ts';
import { fieldErrorsOf } from '#app/http/field-errors.ts';
import { formProblem, problemFromError, typedValues } from '#app/http/form-result.server.ts';
import { readForm } from '#app/http/multipart-form.server.ts';
import type { UploadedFile } from '#app/http/multipart-form.server.ts';
import { respond } from '#app/http/to-response.server.ts';
import { addAttachment } from '#app/services/attachments/add-attachment.server.ts';
import { collectItem } from '#app/services/evidence/collect-item.server.ts';

export function loader({ request, context, params }: Route.LoaderArgs) {
  return respond(async () => {
    const actor = requireActor(context, request);
    const now = new Date();
    const page = await getEvidencePage(db, { actor, caseNumber: readCaseNumber(params.caseNumber), now });
    if (!page) throw notFound('The case');
    return { ...page, now, clientId: randomUUID() };
  });
}

export async function action({ request, context, params }: Route.ActionArgs) {
  return respond(async () => {
    const actor = requireActor(context, request);
    const caseNumber = readCaseNumber(params.caseNumber);
    let file: UploadedFile | null = null;
    const isUpload = request.headers.get('content-type')?.startsWith('multipart/form-data') ?? false;
    const form = isUpload ? await readForm(request, async (part) => { file = part; }) : await request.formData();
    const intent = form.get('intent') === 'add-document' ? 'add-document' : 'collect';
    try {
      return intent === 'add-document' ? await addDocument(actor, caseNumber, form, file) : await collect(actor, caseNumber, form);
    } catch (error) {
      return problemFromError(intent, form, error);
    }
  });
}

async function collect(actor: Actor, caseNumber: number, form: FormData) {
  const found = await findCase(db, actor, caseNumber);
  if (!found) throw notFound('The case');
  const typed = typedValues(form);
  const parsed = collectItemSchema.safeParse(typed);
  const moments = readMoments(typed, found.row.zone, ['collectedAt']);
  const collectedAt = moments.at('collectedAt');
  if (!parsed.success || !collectedAt) return formProblem('collect', form, { fieldErrors: { ...(parsed.success ? {} : fieldErrorsOf(parsed.error)), ...moments.fieldErrors } });
  const { label } = await collectItem({ actor, caseNumber, item: parsed.data, collectedAt, now: new Date() });
  return redirect(href('/cases/:caseNumber/evidence/:letter', { caseNumber: String(caseNumber), letter: itemLetter(label) }), 303);
}

async function addDocument(actor: Actor, caseNumber: number, form: FormData, file: UploadedFile | null) {
  const parsed = attachmentFormSchema.safeParse(typedValues(form));
  if (!parsed.success || !file) return formProblem('add-document', form, { fieldErrors: { ...(parsed.success ? {} : fieldErrorsOf(parsed.error)), ...(file ? { file: ['Choose the file again: browsers do not keep it.'] } : { file: [attachmentRefusal.none] }) } });
  await addAttachment({ actor, caseNumber, about: parsed.data, file });
  return redirect(`${href('/cases/:caseNumber/evidence', { caseNumber: String(caseNumber) })}#documents`, 303);
}

export const meta: Route.MetaFunction = ({ params }) => [{ title: `Case ${params.caseNumber}, evidence · Scorchline` }];

export default function Evidence({ loaderData: page, actionData }: Route.ComponentProps) {
  const collecting = answerTo(actionData, 'collect');
  const adding = answerTo(actionData, 'add-document');
  return (
    <div>
      <h2 className="pb-4 font-serif text-title">{page.heading}</h2>
      <CustodyLines lines={page.lines} zone={page.zone} now={page.now} />
      {page.items.length > 0 ? (
        <div className="grid gap-x-12 gap-y-8 pt-6 desk:grid-cols-3">
          <WaitingOffers caseNumber={page.caseNumber} offers={page.offers} />
          <PlannedExams caseNumber={page.caseNumber} plans={page.plans} />
          <NoticeLog notices={page.notices} ofCase />
        </div>
      ) : null}
      {page.items.length > 0 ? <ItemTable caseNumber={page.caseNumber} items={page.items} /> : (
        <EmptyState title="What can be touched is kept with a label, a seal and a line of hands.">Record each item as it is collected: from then on it always has exactly one holder.{page.mayCollect ? '' : ` ${page.whoCollects}`}</EmptyState>
      )}
      <DocumentTable documents={page.documents} />
      <div className="grid gap-x-12 gap-y-8 pt-8 desk:grid-cols-[minmax(0,1.6fr)_minmax(0,1fr)]" data-print="no">
        {page.mayCollect ? (
          <section aria-labelledby="collect">
            <SectionHeading id="collect">Record an item</SectionHeading>
            <div className="pb-4"><Caution>Cover or shade rather than move. If you must move it, photograph first and say how it stood. Do not clean, throw away, or repair before release.</Caution></div>
            <CollectForm clientId={page.clientId} zone={page.zone} answer={collecting} />
          </section>
        ) : <p className="text-second">Items are recorded by those who work on the case. {page.whoCollects}</p>}
        {page.mayAddDocument ? (
          <section aria-labelledby="add-document">
            <SectionHeading id="add-document">Add a document</SectionHeading>
            <DocumentForm answer={adding} />
          </section>
        ) : null}
      </div>
    </div>
  );
}
