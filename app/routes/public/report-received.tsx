import { href, isRouteErrorResponse } from 'react-router';
import type { Route } from './+types/report-received';
import { actorContext } from '#app/auth/actor-context.ts';
import { TaskHeader } from '#app/components/layout/app-header.tsx';
import { Page } from '#app/components/layout/page.tsx';
import { FinishReport } from '#app/components/report/finish-report.tsx';
import { newReportAddress } from '#app/components/report/report-addresses.ts';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { ButtonLink } from '#app/components/ui/button.tsx';
import { Caution } from '#app/components/ui/caution.tsx';
import { FactList } from '#app/components/ui/fact-list.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import { notFound } from '#app/domain/errors.ts';
import { formatDayClock } from '#app/domain/local-time.ts';
import { homeFor } from '#app/domain/navigation.ts';
import { clientIdSchema } from '#app/domain/report.ts';
import { readReceipt } from '#app/domain/report-receipt.ts';
import { clientAddressContext } from '#app/http/client-address.ts';
import { limitReporting } from '#app/auth/report-limits.server.ts';
import { respond } from '#app/http/to-response.server.ts';
import { db } from '#db/client.server.ts';
import { getReportProgress } from '#db/queries/reports.server.ts';

export function loader({ request, params, context }: Route.LoaderArgs) {
  return respond(async () => {
    await limitReporting('look', null, context.get(clientAddressContext));
    const receipt = readReceipt(params.receipt);
    const progress = receipt ? await getReportProgress(db, receipt) : null;
    if (!receipt || !progress) throw notFound('The report');
    const actor = context.get(actorContext);
    const query = new URL(request.url).searchParams;
    const guestCode = query.get('at');
    return {
      receipt,
      receivedWords: formatDayClock(progress.reportedAt, progress.zone),
      photoCount: photoWords(progress.photoCount),
      /** Set right after sending: the draft of this id may leave the device. */
      sentClientId: clientIdSchema.safeParse(query.get('report')).data ?? null,
      anotherHref: guestCode || actor ? newReportAddress(guestCode) : null,
      closeHref: actor ? homeFor(actor) : '/',
      caseHref: actor && progress.reporterId === actor.userId ? href('/cases/:caseNumber', { caseNumber: String(progress.caseNumber) }) : null,
    };
  });
}

const photoWords = (count: number) => (count === 0 ? 'none' : String(count));

/** The receipt is in the address: when the connection goes right after the sending, it is shown all the same. */
export async function clientLoader({ request, params, serverLoader }: Route.ClientLoaderArgs): Promise<Awaited<ReturnType<typeof serverLoader>>> {
  try {
    return await serverLoader();
  } catch (error) {
    const receipt = readReceipt(params.receipt);
    if (!receipt || error instanceof Response || isRouteErrorResponse(error)) throw error;
    const query = new URL(request.url).searchParams;
    return { receipt, receivedWords: 'just now', photoCount: 'see there when there is signal', sentClientId: clientIdSchema.safeParse(query.get('report')).data ?? null, anotherHref: newReportAddress(query.get('at')), closeHref: '/', caseHref: null };
  }
}

export const meta: Route.MetaFunction = () => [{ title: 'Report received · Scorchline' }];

export default function ReportReceived({ loaderData }: Route.ComponentProps) {
  const { receipt, receivedWords, photoCount, sentClientId, closeHref, caseHref, anotherHref } = loaderData;
  return (
    <>
      <TaskHeader title="Your report" closeHref={closeHref} />
      <Page width="task">
        <h1 className="pt-6 font-serif text-title">Received. Thank you</h1>
        <p className="pt-1 pb-4">Your report is stored with the team. Sending it again would not make a second one.</p>
        {sentClientId ? <FinishReport clientId={sentClientId} /> : null}
        <FactList
          facts={[
            { term: 'Receipt', value: <span className="font-mono text-account">{receipt}</span> },
            { term: 'Received', value: receivedWords },
            { term: 'Photos', value: photoCount },
          ]}
        />
        <p className="py-4">Note the receipt, or keep this page. Anyone who has it can read how far the report is; that page holds no names.</p>
        <SectionHeading>What happens next</SectionHeading>
        <ol className="list-decimal space-y-2 pb-6 pl-6">
          <li>Somebody takes a first look: within one hour if the bright patch is still there or somebody was hurt, otherwise within four working hours. These are our own targets.</li>
          <li>If something is unclear you get one question. “Don't know” is a good answer.</li>
          <li>The place is measured and several explanations are tested, not only sunlight.</li>
          <li>By the receipt you can read what came of it, and add photos until then.</li>
        </ol>
        <Caution>If the bright patch comes back: cover or shade it from the shaded side, do not look along the beam, and report it again.</Caution>
        <div className="space-y-3 pt-6">
          <ButtonLink href={`/progress?code=${receipt}`} block size="large">Follow this report</ButtonLink>
          {caseHref ? <p><AppLink href={caseHref}>Open it in the register, to add a note or photos</AppLink></p> : null}
          {anotherHref ? <p><AppLink href={anotherHref}>Report another mark</AppLink></p> : null}
        </div>
      </Page>
    </>
  );
}
