import { href, redirect } from 'react-router';
import type { Route } from './+types/undo';
import { requireActor } from '#app/auth/middleware.server.ts';
import { useCaseHeader } from '#app/components/cases/use-case-header.ts';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { Notice } from '#app/components/ui/notice.tsx';
import { readCaseNumber } from '#app/domain/case-number.ts';
import { undoSeconds } from '#app/domain/move-undo.ts';
import { problemFromError } from '#app/http/form-result.server.ts';
import { respond } from '#app/http/to-response.server.ts';
import type { UndoOutcome } from '#app/services/cases/undo-move.server.ts';
import { undoMove } from '#app/services/cases/undo-move.server.ts';

export async function action({ request, context, params }: Route.ActionArgs) {
  return respond(async () => {
    const actor = requireActor(context, request);
    const form = await request.formData();
    const caseNumber = readCaseNumber(params.caseNumber);
    try {
      const outcome = await undoMove({ actor, caseNumber, sequence: Number(form.get('sequence')) || 0 });
      return redirect(`${href('/cases/:caseNumber', { caseNumber: String(caseNumber) })}${pageOf(outcome)}`, 303);
    } catch (error) {
      return problemFromError('undo', form, error);
    }
  });
}

/** The page on which the move can be made again. */
function pageOf({ state, moveId }: UndoOutcome): string {
  if (moveId === 'send-findings') return '/findings';
  return state === 'triage' ? '/triage' : '';
}

export const meta: Route.MetaFunction = ({ params }) => [{ title: `Case ${params.caseNumber}, undo · Scorchline` }];

/** Seen only when a move was not undone. */
export default function Undo({ actionData: problem }: Route.ComponentProps) {
  const casePath = href('/cases/:caseNumber', { caseNumber: String(useCaseHeader().number) });
  return (
    <div className="max-w-[64ch] space-y-3">
      <Notice role={problem ? 'alert' : 'note'} title={problem ? 'Not undone' : 'Nothing is undone from here'}>
        {problem ? problem.formErrors.join(' ') : `A harmless move is undone on the page that follows it, within ${undoSeconds} seconds.`}
      </Notice>
      <p><AppLink href={casePath} className="inline-flex min-h-11 items-center">To the account of the case</AppLink></p>
    </div>
  );
}
