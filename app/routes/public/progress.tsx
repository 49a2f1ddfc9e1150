import { Form, redirect } from 'react-router';
import type { ShouldRevalidateFunctionArgs } from 'react-router';
import { z } from 'zod';
import type { Route } from './+types/progress';
import { actorContext } from '#app/auth/actor-context.ts';
import { ChoiceChips } from '#app/components/forms/choice-chips.tsx';
import { ErrorSummary } from '#app/components/forms/error-summary.tsx';
import type { FieldLike } from '#app/components/forms/field-like.ts';
import { TextArea, TextInput } from '#app/components/forms/text-field.tsx';
import { Page } from '#app/components/layout/page.tsx';
import { ProgressLine } from '#app/components/report/progress-line.tsx';
import { ProgressPhotos } from '#app/components/report/progress-photos.tsx';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { Caution } from '#app/components/ui/caution.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import { plainText } from '#app/domain/incident.ts';
import { formatDay, formatDayClock } from '#app/domain/local-time.ts';
import { photoClosedWords, progressHeading, progressSteps } from '#app/domain/report-progress.ts';
import { readReceipt } from '#app/domain/report-receipt.ts';
import { clientAddressContext } from '#app/http/client-address.ts';
import type { FormProblem } from '#app/http/form-result.server.ts';
import { formProblem, problemFromError } from '#app/http/form-result.server.ts';
import { limitRate } from '#app/auth/rate-limit.server.ts';
import { respond } from '#app/http/to-response.server.ts';
import { answerQuestion } from '#app/services/reports/answer-question.server.ts';
import { db } from '#db/client.server.ts';
import { getReportProgress } from '#db/queries/reports.server.ts';
import type { ReportProgress } from '#db/queries/reports.server.ts';
import { receivePhotos } from './receive-photos.server.ts';

/** Look-ups by one network address: enough for an office behind one, too few to search for receipts. */
const lookups = { hits: 60, windowS: 600 } as const;

export function loader({ request, context }: Route.LoaderArgs) {
  return respond(async () => {
    const { searchParams } = new URL(request.url);
    const typed = searchParams.get('code')?.trim() ?? '';
    if (typed === '') return { typed, report: null, problem: null };
    await limitRate(`progress:${context.get(clientAddressContext)}`, lookups.hits, lookups.windowS);
    const receipt = readReceipt(typed);
    const progress = receipt ? await getReportProgress(db, receipt) : null;
    if (!receipt || !progress) {
      return { typed, report: null, problem: receipt ? 'No report has this receipt. Check it letter by letter.' : 'A receipt has eight letters and digits, such as KC-7Q4M-R2, without I, O, 0 and 1.' };
    }
    const { zone, question, answerDueAt } = progress;
    const steps = progressSteps(progress, progress);
    return {
      typed,
      problem: null,
      report: {
        receipt,
        heading: progressHeading(progress),
        sentWords: formatDayClock(progress.reportedAt, zone),
        photos: { words: photoWords(progress), closedWords: photoClosedWords(progress.state), justStored: searchParams.get('photos') === 'stored' },
        question: question ? { words: question, dueWords: answerDueAt ? formatDay(answerDueAt, zone) : null } : null,
        steps: steps.map(({ state, name, words, at, reached, now }) => ({ state, name, words, reached, when: [at ? formatDayClock(at, zone) : '', now ? 'now' : ''].filter(Boolean).join(', ') })),
      },
    };
  });
}

function photoWords({ photoCount, lastPhotoAt, zone }: ReportProgress): string {
  if (photoCount === 0) return 'No photo is with this report.';
  const came = lastPhotoAt ? `${photoCount === 1 ? 'It' : 'The last one'} came ${formatDayClock(lastPhotoAt, zone)}.` : '';
  return `${photoCount === 1 ? 'One photo is' : `${photoCount} photos are`} with this report. ${came}`;
}

const answerSchema = z.object({ code: z.string(), choice: z.enum(['', 'Yes', 'No', "Don't know"]).catch(''), words: plainText(2_000) });

export function action({ request, context }: Route.ActionArgs) {
  return respond(async () => {
    const { searchParams } = new URL(request.url);
    const address = context.get(clientAddressContext);
    if (searchParams.get('add') === 'photos') return receivePhotos({ request, code: searchParams.get('code') ?? '', actor: context.get(actorContext), address });
    await limitRate(`answer:${address}`, 20, 600);
    const form = await request.formData();
    const read = answerSchema.safeParse({ code: form.get('code') ?? '', choice: form.get('choice') ?? '', words: form.get('words') ?? '' });
    if (!read.success) return formProblem('answer', form, { fieldErrors: z.flattenError(read.error).fieldErrors });
    const receipt = readReceipt(read.data.code);
    if (!receipt) return formProblem('answer', form, { formErrors: ['The receipt was lost on the way. Look the report up again.'] });
    try {
      await answerQuestion({ receipt, answer: [read.data.choice, read.data.words].filter(Boolean).join('. '), actor: context.get(actorContext) });
    } catch (error) {
      return problemFromError('answer', form, error);
    }
    return redirect(`/progress?code=${receipt}`, 303);
  });
}

/** Also after a refusal: of several photos some may have been stored. */
export const shouldRevalidate = ({ actionStatus, defaultShouldRevalidate }: ShouldRevalidateFunctionArgs): boolean => actionStatus !== undefined || defaultShouldRevalidate;

export const meta: Route.MetaFunction = () => [{ title: 'How far is my report? · Scorchline' }];

export default function Progress({ loaderData, actionData }: Route.ComponentProps) {
  const { report, typed, problem } = loaderData;
  if (!report) return <LookUp typed={typed} problem={problem} />;
  const photos = <ProgressPhotos key={report.photos.words} receipt={report.receipt} photos={report.photos} justStored={report.photos.justStored} problem={actionData?.intent === 'photos' ? actionData : null} />;
  return (
    <Page width="task">
      <h1 className="pt-6 font-serif text-title">{report.heading}</h1>
      <p className="pt-1 pb-4 text-second">Report <span className="font-mono">{report.receipt}</span>, sent {report.sentWords}</p>
      {report.question ? <Question receipt={report.receipt} question={report.question} problem={actionData?.intent === 'answer' ? actionData : undefined} /> : null}
      {report.question ? photos : null}
      <SectionHeading>What happened with it</SectionHeading>
      <div className="pt-2 pb-6"><ProgressLine steps={report.steps} /></div>
      {report.question ? null : photos}
      <Caution>
        If you see the bright patch again: cover or shade it from the shaded side, and <AppLink href="/report">report it</AppLink>. Do not look along the beam.
      </Caution>
      <p className="pt-6 text-small text-second">Anyone with the receipt can read this page{report.photos.closedWords ? '' : ' and add photos'}. It holds no names.</p>
    </Page>
  );
}

function LookUp({ typed, problem }: { readonly typed: string; readonly problem: string | null }) {
  const code: FieldLike = { name: 'code', defaultValue: typed, ...(problem ? { errors: [problem] } : {}) };
  return (
    <Page width="task">
      <h1 className="pt-6 pb-4 font-serif text-title">How far is my report?</h1>
      <Form method="get" className="space-y-4">
        <TextInput field={code} label="Receipt" help="Eight letters and digits, such as KC-7Q4M-R2" autoComplete="off" autoCapitalize="characters" spellCheck={false} className="font-mono" maxLength={20} />
        <Button size="large" block>Look it up</Button>
      </Form>
      <p className="pt-6 text-second">You got the receipt when the report was sent. Nothing personal is shown here.</p>
    </Page>
  );
}

interface QuestionProps {
  readonly receipt: string;
  readonly question: { readonly words: string; readonly dueWords: string | null };
  readonly problem: FormProblem | undefined;
}

/** The one question of a returned report; a choice, words, or both. */
function Question({ receipt, question, problem }: QuestionProps) {
  const errors = problem?.fieldErrors['answer'] ?? problem?.fieldErrors['words'];
  const words: FieldLike = { name: 'words', defaultValue: problem?.typed['words'], ...(errors ? { errors } : {}) };
  const answers = ['Yes', 'No', "Don't know"].map((value) => ({ value, label: value, dashed: value === "Don't know" }));
  return (
    <section className="mb-6 border-t-2 border-ink pt-3">
      <h2 className="font-semibold">One question for you</h2>
      <p className="py-2 font-serif text-account">{question.words}</p>
      {question.dueWords ? <p className="pb-2 text-small text-second">An answer is hoped for by {question.dueWords}.</p> : null}
      <Form method="post" className="space-y-4">
        <input type="hidden" name="code" value={receipt} />
        <ErrorSummary errors={problem?.formErrors} fields={[{ field: words, label: 'Answer' }]} title="Not sent yet. What you typed is still here." />
        <ChoiceChips field={{ name: 'choice', defaultValue: problem?.typed['choice'] }} legend={<span className="sr-only">Short answer</span>} options={answers} size="large" spread />
        <TextArea field={words} label="Or in words" rows={3} maxLength={2000} help="No names, nothing about injuries." />
        <Button size="large" block>Send the answer</Button>
      </Form>
    </section>
  );
}
