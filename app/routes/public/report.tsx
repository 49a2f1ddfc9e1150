import { randomUUID } from 'node:crypto';
import { data, isRouteErrorResponse, redirect, useLocation } from 'react-router';
import type { RouterContextProvider } from 'react-router';
import type { Route } from './+types/report';
import { actorContext } from '#app/auth/actor-context.ts';
import { requireActor } from '#app/auth/middleware.server.ts';
import { TaskHeader } from '#app/components/layout/app-header.tsx';
import { Page } from '#app/components/layout/page.tsx';
import { receivedAddress, reportAddress } from '#app/components/report/report-addresses.ts';
import { ReportPage } from '#app/components/report/report-page.tsx';
import { viewFromDevice } from '#app/components/report/kept-views.ts';
import { ReportFromDevice } from '#app/components/report/report-from-device.tsx';
import type { ReportView } from '#app/components/report/report-view.ts';
import { AppLink } from '#app/components/ui/app-link.tsx';
import type { ReportFormState } from '#app/components/report/report-fields.ts';
import { DomainError } from '#app/domain/errors.ts';
import { readPhotoFields } from '#app/domain/photo-details.ts';
import type { ReportHolder } from '#app/domain/report.ts';
import { clientIdSchema } from '#app/domain/report.ts';
import { clientAddressContext } from '#app/http/client-address.ts';
import { typedValues } from '#app/http/form-result.server.ts';
import { readForm } from '#app/http/multipart-form.server.ts';
import { limitReporting } from '#app/auth/report-limits.server.ts';
import { respond } from '#app/http/to-response.server.ts';
import { captionDraftPhoto } from '#app/services/photos/describe-draft-photo.server.ts';
import { storeReportPhoto } from '#app/services/photos/store-photo.server.ts';
import { removeDraftPhoto } from '#app/services/photos/remove-draft-photo.server.ts';
import { identifyHolder, isHeldBy } from '#app/services/reports/report-holder.server.ts';
import { db } from '#db/client.server.ts';
import { findSentReport } from '#db/queries/reports.server.ts';
import { photoErrors, receiveReport } from './receive-report.server.ts';
import { reportView, shellView } from './report-view.server.ts';

const guestCodeOf = (request: Request) => new URL(request.url).searchParams.get('at');
const clientIdOf = (request: Request) => clientIdSchema.safeParse(new URL(request.url).searchParams.get('report')).data ?? null;

/** The holder, or the way to the sign-in page. */
async function requireHolder(request: Request, context: Readonly<RouterContextProvider>): Promise<ReportHolder> {
  const holder = await identifyHolder(context.get(actorContext), guestCodeOf(request));
  return holder ?? { kind: 'person', actor: requireActor(context, request) };
}

export function loader({ request, context }: Route.LoaderArgs) {
  return respond(async () => {
    await limitReporting('look', null, context.get(clientAddressContext));
    // The page without anybody's data, which a phone keeps to open the form without a connection.
    if (new URL(request.url).searchParams.has('shell')) return shellView();
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
  const typed = typedValues(form);
  await captionPhotos(received, typed);
  if (intent !== 'send') return backToForm(received, { fieldErrors: photoErrors(refused, false) }, refused.length > 0 ? 400 : 200);
  const reception = await receiveReport({ holder, clientId, typed, refused });
  return reception.ok ? redirect(receivedAddress(reception.receipt, received.guestCode, clientId), 303) : backToForm(received, reception.problem, reception.status);
}

/** Without a script the form itself carries what is said of each photo. */
async function captionPhotos({ holder, clientId }: Received, typed: Readonly<Record<string, string>>): Promise<void> {
  for (const photo of readPhotoFields(typed)) await captionDraftPhoto({ holder, clientId, ...photo });
}

/** The form again, with everything that was typed and every photo that was taken. */
async function backToForm({ holder, clientId, form, guestCode }: Received, problem: Partial<Omit<ReportFormState, 'typed'>>, status: number) {
  const state: ReportFormState = { typed: typedValues(form), formErrors: [], fieldErrors: {}, repeated: {}, longWindowDays: null, ...problem };
  return data({ state, view: await reportView(holder, clientId, guestCode) }, { status });
}

export const meta: Route.MetaFunction = () => [{ title: 'Report a mark · Scorchline' }];

/** Between pages without a connection, what this device knows of the place takes over. */
export async function clientLoader({ request, serverLoader }: Route.ClientLoaderArgs): Promise<ReportView> {
  try {
    return await serverLoader();
  } catch (error) {
    const kept = isRouteErrorResponse(error) || error instanceof Response ? null : await viewFromDevice(new URL(request.url));
    if (!kept) throw error;
    return kept;
  }
}

export default function ReportRoute({ loaderData, actionData }: Route.ComponentProps) {
  if (loaderData.shell) return <ReportFromDevice shell={loaderData} />;
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
