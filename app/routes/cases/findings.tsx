import { Form, href, redirect } from 'react-router';
import { z } from 'zod';
import type { Route } from './+types/findings';
import { db } from '#db/client.server.ts';
import { getFindingPage } from '#db/queries/finding-page.server.ts';
import { requireActor } from '#app/auth/middleware.server.ts';
import { FindingForm } from '#app/components/findings/finding-form.tsx';
import { FindingText } from '#app/components/findings/finding-words.tsx';
import { answerTo } from '#app/components/findings/problem-fields.ts';
import { ReviewComments } from '#app/components/findings/review-comments.tsx';
import { ReviewInputs } from '#app/components/findings/review-inputs.tsx';
import { ReviewMoves, signFormId } from '#app/components/findings/review-moves.tsx';
import { VersionDiff } from '#app/components/findings/version-diff.tsx';
import { VersionList } from '#app/components/findings/version-list.tsx';
import { Columns } from '#app/components/layout/page.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { HatchSection } from '#app/components/ui/hatch.tsx';
import { EmptyState, Notice } from '#app/components/ui/notice.tsx';
import { readCaseNumber } from '#app/domain/case-number.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import { findingFormSchema, reviewCommentSchema } from '#app/domain/finding-form.ts';
import { plainText } from '#app/domain/incident.ts';
import type { Actor } from '#app/domain/roles.ts';
import { fieldErrorsOf } from '#app/http/field-errors.ts';
import { formProblem, problemFromError } from '#app/http/form-result.server.ts';
import { respond } from '#app/http/to-response.server.ts';
import { moveCase } from '#app/services/cases/move-case.server.ts';
import { addReviewComment, settleReviewComment } from '#app/services/findings/review-comments.server.ts';
import { saveFinding } from '#app/services/findings/save-finding.server.ts';
import { showOpinion } from '#app/services/findings/show-opinion.server.ts';
import { hashOf } from '#app/storage/sha256.server.ts';

export function loader({ request, context, params }: Route.LoaderArgs) {
  return respond(async () => {
    const actor = requireActor(context, request);
    const asked = Number(new URL(request.url).searchParams.get('version'));
    const page = await getFindingPage(db, { actor, caseNumber: readCaseNumber(params.caseNumber), version: asked > 0 ? asked : null });
    if (!page) throw notFound('The case');
    if (!page.allowed) throw new DomainError('forbidden', `The finding is not open to you. ${page.whoCan}`);
    const { signed, ...view } = page;
    return { ...view, hashAgrees: signed ? hashOf(signed.frozen) === signed.frozenHash : null, frozenText: signed ? JSON.stringify(signed.frozen, null, 2) : null };
  });
}

const intents = z.enum(['save-draft', 'send', 'show-opinion', 'add-comment', 'settle-comment', 'send-back', 'sign']);
type Intent = z.infer<typeof intents>;
const words = plainText(2_000).default('');
const moveSchema = z.object({ version: z.coerce.number().int(), reason: words, reconstructionWaiver: words, evidenceWaiver: words });

/** Groups of inputs that a reviewer ticks before signing. */
const inputGroups = ['onset-window', 'optic', 'mark', 'weather', 'reconstruction', 'photos'] as const;

interface Call {
  readonly actor: Actor;
  readonly caseNumber: number;
  readonly form: FormData;
}

export async function action({ request, context, params }: Route.ActionArgs) {
  const actor = requireActor(context, request);
  const form = await request.formData();
  const intent = intents.safeParse(form.get('intent'));
  if (!intent.success) return formProblem('save-draft', form, { formErrors: ['The form is damaged. Open the page anew; what you typed can be copied from here.'] });
  try {
    const problem = await act(intent.data, { actor, caseNumber: readCaseNumber(params.caseNumber), form });
    return problem ?? redirect(href('/cases/:caseNumber/findings', { caseNumber: params.caseNumber }), 303);
  } catch (error) {
    return respond(async () => problemFromError(intent.data, form, error));
  }
}

async function act(intent: Intent, call: Call) {
  const { actor, caseNumber, form } = call;
  const fields = Object.fromEntries(form);
  switch (intent) {
    case 'save-draft':
    case 'send':
      return keepDraft(intent, call);
    case 'show-opinion':
      await showOpinion({ actor, caseNumber });
      return null;
    case 'add-comment': {
      const comment = reviewCommentSchema.safeParse(fields);
      if (!comment.success) return formProblem(intent, form, { fieldErrors: fieldErrorsOf(comment.error) });
      await addReviewComment({ actor, caseNumber, ...comment.data });
      return null;
    }
    case 'settle-comment': {
      const settle = z.object({ commentId: z.uuid(), reason: words }).parse(fields);
      await settleReviewComment({ actor, caseNumber, ...settle });
      return null;
    }
    case 'send-back':
    case 'sign':
      return reviewMove(intent, call);
  }
}

/** Sending keeps the draft first, so that nothing typed is lost when something is still missing. */
async function keepDraft(intent: 'save-draft' | 'send', { actor, caseNumber, form }: Call) {
  const fields = Object.fromEntries(form);
  const draft = findingFormSchema.safeParse(fields);
  const opened = z.union([z.literal('').transform(() => null), z.iso.datetime().transform((text) => new Date(text))]).safeParse(form.get('openedAt'));
  if (!draft.success) return formProblem(intent, form, { fieldErrors: fieldErrorsOf(draft.error) });
  if (!opened.success) return formProblem(intent, form, { formErrors: ['The form is damaged. Open the page anew; what you typed can be copied from here.'] });
  await saveFinding({ actor, caseNumber, openedAt: opened.data, draft: draft.data });
  if (intent === 'send') {
    const { version, reason, reconstructionWaiver, evidenceWaiver } = moveSchema.parse(fields);
    await moveCase({ actor, caseNumber, moveId: 'send-findings', version, reason, extra: { reconstructionWaiver, evidenceWaiver } });
  }
  return null;
}

async function reviewMove(intent: 'send-back' | 'sign', { actor, caseNumber, form }: Call) {
  const { version, reason } = moveSchema.parse(Object.fromEntries(form));
  const read = form.getAll('read');
  // Ticks come several to a name; a page that comes back with a sentence shows them again from this one field.
  form.set('ticked', read.join(' '));
  if (intent === 'sign' && !inputGroups.every((group) => read.includes(group))) {
    return formProblem(intent, form, { fieldErrors: { read: ['Tick each group of inputs once you have read it; the ticks stand at the right of the headings.'] } });
  }
  const moveId = intent === 'sign' && form.get('after') === 'no-action' ? 'sign-no-action' : intent;
  await moveCase({ actor, caseNumber, moveId, version, reason });
  return null;
}

export const meta: Route.MetaFunction = ({ params }) => [{ title: `Case ${params.caseNumber}, finding · Scorchline` }];

export default function Findings({ loaderData: page, actionData }: Route.ComponentProps) {
  const signing = answerTo(actionData, 'sign');
  const side = (
    <div className="space-y-8">
      <ReviewComments pins={page.comments} mayAdd={page.mode === 'review'} answer={answerTo(actionData, 'add-comment')} />
      {page.mode === 'review' || page.reviewClosed !== null ? (
        <ReviewMoves caseVersion={page.caseVersion} whoCan={page.reviewClosed} openComments={page.openComments} opinionShown={page.opinionShown} sendBackAnswer={answerTo(actionData, 'send-back')} signAnswer={signing} />
      ) : null}
    </div>
  );
  const settling = answerTo(actionData, 'settle-comment') ?? answerTo(actionData, 'show-opinion');
  return (
    <div>
      <h2 className="pb-4 font-serif text-title">{page.heading}</h2>
      {settling ? <div className="pb-4"><Notice role="alert" title="Not done">{settling.formErrors.join(' ')}</Notice></div> : null}
      {page.form ? <FindingForm key={page.form.openedAt} view={page.form} answer={answerTo(actionData, 'save-draft') ?? answerTo(actionData, 'send')} /> : null}
      <div className={page.form ? 'pt-8' : ''}>
        <Columns side={side} sideLabel="Comments and moves">
          {page.mode === 'review' && !page.opinionShown ? <HiddenOpinion /> : null}
          {page.chosen ? <FindingText words={page.chosen.words} note={page.chosen.note} /> : null}
          {page.mode === 'review' ? <div className="pt-6"><ReviewInputs groups={page.inputs} pins={page.comments} formId={signFormId} ticked={(signing?.typed['ticked'] ?? '').split(' ')} errors={signing?.fieldErrors['read']} /></div> : null}
          {page.versions.length === 0 && !page.form ? <EmptyState title="No finding is open to you yet.">It is written by an investigator and signed by a technical reviewer who is not the author.</EmptyState> : null}
          {page.chosen && page.before ? <VersionDiff earlier={page.before} later={page.chosen.words} /> : null}
          <VersionList versions={page.versions} chosen={page.chosenVersion} hashAgrees={page.hashAgrees} />
          {page.frozenText ? <FrozenText text={page.frozenText} /> : null}
        </Columns>
      </div>
    </div>
  );
}

function HiddenOpinion() {
  return (
    <div className="pb-6">
      <HatchSection withheld="The author's opinion, the certainty and causes, and the results of the hypotheses are hidden until the inputs are read. What the engine computed is data, and open. Showing the rest writes a line in the log.">
        <Form method="post">
          <input type="hidden" name="intent" value="show-opinion" />
          <Button look="outlined">Show the opinion</Button>
        </Form>
      </HatchSection>
    </div>
  );
}

function FrozenText({ text }: { readonly text: string }) {
  return (
    <details className="mt-4">
      <summary>What was signed, whole</summary>
      <pre className="mt-2 border border-hair bg-sheet p-3 font-mono text-axis break-words whitespace-pre-wrap">{text}</pre>
      <p className="pt-1 text-axis text-second">The hash is the SHA-256 of these values as JSON with the keys in order and no spaces.</p>
    </details>
  );
}
