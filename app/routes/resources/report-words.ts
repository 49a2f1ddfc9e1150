import type { Route } from './+types/report-words';
import { DomainError } from '#app/domain/errors.ts';
import { clientAddressContext } from '#app/http/client-address.ts';
import { typedValues } from '#app/http/form-result.server.ts';
import { readForm } from '#app/http/multipart-form.server.ts';
import { limitReporting } from '#app/auth/report-limits.server.ts';
import { receiveReport } from '#app/routes/public/receive-report.server.ts';
import { holderHeader, inJson, requireDraft } from './report-holder.server.ts';

/**
 * Takes the words of a report from the phone that kept them: a receipt, or what has to be mended. The same report sent
 * again gets the receipt of the first time.
 */
export function action(args: Route.ActionArgs): Promise<Response> {
  return inJson(async () => {
    if (!args.request.headers.has(holderHeader)) throw new DomainError('invalid-input', 'The sender did not say whose report this is. Open the report page again and send it from there.');
    const { holder, clientId } = await requireDraft(args);
    await limitReporting('send', holder, args.context.get(clientAddressContext));
    const form = await readForm(args.request, () => Promise.resolve());
    const reception = await receiveReport({ holder, clientId, typed: typedValues(form) });
    return reception.ok ? { receipt: reception.receipt } : Response.json({ problem: reception.problem }, { status: reception.status });
  });
}
