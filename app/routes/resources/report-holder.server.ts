import type { RouterContextProvider } from 'react-router';
import { actorContext } from '#app/auth/actor-context.ts';
import { DomainError } from '#app/domain/errors.ts';
import type { ReportHolder } from '#app/domain/report.ts';
import { clientIdSchema } from '#app/domain/report.ts';
import { statusFor } from '#app/http/to-response.server.ts';
import { holderKeyOf, identifyHolder } from '#app/services/reports/report-holder.server.ts';

interface Asked {
  readonly request: Request;
  readonly params: { readonly clientId: string };
  readonly context: Readonly<RouterContextProvider>;
}

/** Header in which a device says whose report it sends. A page from elsewhere cannot set it. */
export const holderHeader = 'Scorchline-Holder';

/**
 * Who asks, and for which report under way. A report that was written by somebody else on the same device is never taken
 * in the name of the person who is signed in now.
 */
export async function requireDraft({ request, context, params }: Asked): Promise<{ holder: ReportHolder; clientId: string }> {
  const clientId = clientIdSchema.safeParse(params.clientId).data;
  if (!clientId) throw new DomainError('not-found', 'There is no such report.');
  const guestCode = new URL(request.url).searchParams.get('at');
  const holder = await identifyHolder(context.get(actorContext), guestCode);
  if (!holder) throw signInNeeded('You are signed out. The report is kept on this device: sign in, and it goes by itself.');
  const writtenBy = request.headers.get(holderHeader);
  if (writtenBy === null || writtenBy === holderKeyOf(holder)) return { holder, clientId };
  // Written as a guest, by a link that still opens the same site, and sent after somebody signed in: a guest's it stays.
  const guest = guestCode ? await identifyHolder(null, guestCode) : null;
  if (guest && writtenBy === holderKeyOf(guest)) return { holder: guest, clientId };
  throw signInNeeded('This report was written under another account. It is kept on this device, and goes when that person is signed in.');
}

const signInNeeded = (message: string) => Response.json({ code: 'sign-in', message }, { status: 401, headers: { 'Cache-Control': 'no-store' } });

/** Answers in JSON, refusals included: a script reads it. */
export async function inJson(work: () => Promise<unknown>): Promise<Response> {
  try {
    const answer = await work();
    return answer instanceof Response ? answer : Response.json(answer, { headers: { 'Cache-Control': 'no-store' } });
  } catch (error) {
    if (error instanceof Response) return error;
    if (!(error instanceof DomainError)) throw error;
    return Response.json({ code: error.code, message: error.message }, { status: statusFor(error) });
  }
}
