import { randomUUID } from 'node:crypto';
import { data, isRouteErrorResponse, redirect, useLocation } from 'react-router';
import type { RouterContextProvider } from 'react-router';
import type { Route } from './+types/report';
import { actorContext } from '#app/auth/actor-context.ts';
import { requireActor } from '#app/auth/middleware.server.ts';
import { TaskHeader } from '#app/components/layout/app-header.tsx';
import { Page } from '#app/components/layout/page.tsx';
import { ReportPage, reportAddress } from '#app/components/report/report-page.tsx';
import { AppLink } from '#app/components/ui/app-link.tsx';
import type { ReportFormState } from '#app/components/report/report-fields.ts';
import { DomainError } from '#app/domain/errors.ts';
import type { ReportHolder } from '#app/domain/report.ts';
import { clientIdSchema, readReport } from '#app/domain/report.ts';
import { clientAddressContext } from '#app/http/client-address.ts';
import { typedValues } from '#app/http/form-result.server.ts';
import { readForm } from '#app/http/multipart-form.server.ts';
import { limitReporting } from '#app/auth/report-limits.server.ts';
import { respond, statusFor } from '#app/http/to-response.server.ts';
import { storeReportPhoto } from '#app/services/photos/store-photo.server.ts';
import { removeDraftPhoto } from '#app/services/photos/remove-draft-photo.server.ts';
import { identifyHolder, isHeldBy } from '#app/services/reports/report-holder.server.ts';
import { submitReport } from '#app/services/reports/submit-report.server.ts';
import { db } from '#db/client.server.ts';
import { findSentReport, listReportSites } from '#db/queries/reports.server.ts';
import { reportView } from './report-view.server.ts';

const guestCodeOf = (request: Request) => new URL(request.url).searchParams.get('at');
const clientIdOf = (request: Request) => clientIdSchema.safeParse(new URL(request.url).searchParams.get('report')).data ?? null;

/** With the link's code, so that another mark can be reported from there, and the id whose draft may leave the device. */
const receivedAddress = (receipt: string, guestCode: string | null, clientId: string) => `/received/${receipt}?${new URLSearchParams({ ...(guestCode ? { at: guestCode } : {}), report: clientId }).toString()}`;

/** The holder, or the way to the sign-in page. */
async function requireHolder(request: Request, context: Readonly<RouterContextProvider>): Promise<ReportHolder> {
  const holder = await identifyHolder(context.get(actorContext), guestCodeOf(request));
  return holder ?? { kind: 'person', actor: requireActor(context, request) };
}

export function loader({ request, context }: Route.LoaderArgs) {
  return respond(async () => {
    await limitReporting('look', null, context.get(clientAddressContext));
    const holder = await requireHolder(request, context);
    const guestCode = guestCodeOf(request);
    const clientId = clientIdOf(request);
    // The id stands in the address, so that a reload without a script goes on with the same report.
    if (!clientId) throw redirect(reportAddress(randomUUID(), guestCode));
    const sent = await findSentReport(db, clientId);
    if (sent) throw redirect(isHeldBy(sent, holder) ? receivedAddress(sent.receipt, guestCode, clientId) : reportAddress(randomUUID(), guestCode));
    return reportView(holder, clientId, guestCode);
  });
}

export function action({ request, context }: Route.ActionArgs) {
  return respond(async () => {
    const holder = await requireHolder(request, context);
    await limitReporting('send', holder, context.get(clientAddressContext));
    const clientId = clientIdOf(request);
    if (!clientId) throw new DomainError('invalid-input', 'This report lost its number on the way. Open the report page again; what you typed is kept on this device.');
    const refused: string[] = [];
    const form = await readForm(request, async ({ fieldName, ...file }) => {
      if (fieldName !== 'photos') return;
      const outcome = await storeReportPhoto({ holder, clientId, file });
      if (!outcome.ok) refused.push(outcome.sentence);
    });
    return answer({ holder, clientId, form, refused, guestCode: guestCodeOf(request) });
  });
}

interface Received {
  readonly holder: ReportHolder;
  readonly clientId: string;
  readonly form: FormData;
  /** Sentences about files that were not taken. */
  readonly refused: readonly string[];
  readonly guestCode: string | null;
}

async function answer(received: Received) {
  const { holder, clientId, form, refused } = received;
  const intent = String(form.get('intent') ?? 'send');
  const [what, photoId] = intent.split(':');
  const toRemove = what === 'remove-photo' ? clientIdSchema.safeParse(photoId).data : undefined;
  if (toRemove) await removeDraftPhoto({ holder, clientId, photoId: toRemove });
  if (intent !== 'send') return backToForm(received, { fieldErrors: photoErrors(refused, false) }, refused.length > 0 ? 400 : 200);
  const typed = typedValues(form);
  const site = (await listReportSites(db, holder)).find((one) => one.id === typed['siteId']) ?? null;
  const reading = readReport(typed, { site, now: new Date() });
  if (!reading.ok) return backToForm(received, { ...reading, fieldErrors: { ...reading.fieldErrors, ...photoErrors(refused, false) } }, 400);
  if (refused.length > 0) return backToForm(received, { fieldErrors: photoErrors(refused, true) }, 400);
  try {
    const { receipt } = await submitReport({ holder, clientId, report: reading.report });
    return redirect(receivedAddress(receipt, received.guestCode, clientId), 303);
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    return backToForm(received, { formErrors: [error.message] }, statusFor(error));
  }
}

function photoErrors(refused: readonly string[], restIsFine: boolean): Record<string, string[]> {
  if (refused.length === 0) return {};
  return { photos: [...refused, restIsFine ? 'Everything else is fine: press Send again to send without it, or choose another file.' : 'Everything else is still here.'] };
}

/** The form again, with everything that was typed and every photo that was taken. */
async function backToForm({ holder, clientId, form, guestCode }: Received, problem: Partial<Omit<ReportFormState, 'typed'>>, status: number) {
  const state: ReportFormState = { typed: typedValues(form), formErrors: [], fieldErrors: {}, repeated: {}, longWindowDays: null, ...problem };
  return data({ state, view: await reportView(holder, clientId, guestCode) }, { status });
}

export const meta: Route.MetaFunction = () => [{ title: 'Report a mark · Scorchline' }];

export default function ReportRoute({ loaderData, actionData }: Route.ComponentProps) {
  // After a post without a script the photos of the answer are newer than those of the loader.
  const view = actionData?.view ?? loaderData;
  return <ReportPage key={view.clientId} view={view} problem={actionData?.state ?? null} />;
}

/** A refusal says why; anything else is most often a connection that broke, and the draft is still on the device. */
export function ErrorBoundary({ error }: Route.ErrorBoundaryProps) {
  const { pathname, search } = useLocation();
  const refusal = isRouteErrorResponse(error) && typeof error.data === 'object' && error.data !== null && 'message' in error.data ? String(error.data.message) : null;
  return (
    <>
      <TaskHeader title="Report a mark" closeHref="/" />
      <Page width="task">
        <h1 className="pt-6 pb-2 font-serif text-title">{refusal ? 'This report cannot be opened' : 'Not sent yet'}</h1>
        <p className="pb-4">{refusal ?? 'The connection broke off, or something failed on our side. What you typed is kept on this device. Open the report again and send it: it is never filed twice.'}</p>
        {refusal ? <AppLink href="/progress">Look up a report by its receipt</AppLink> : <AppLink href={`${pathname}${search}`} reload>Open the report again</AppLink>}
      </Page>
    </>
  );
}
