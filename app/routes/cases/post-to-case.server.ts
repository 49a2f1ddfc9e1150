import { redirect } from 'react-router';
import type { RouterContextProvider } from 'react-router';
import { db } from '#db/client.server.ts';
import { findCase } from '#db/queries/case-subject.server.ts';
import { requireActor } from '#app/auth/middleware.server.ts';
import { readCaseNumber } from '#app/domain/case-number.ts';
import { notFound } from '#app/domain/errors.ts';
import type { Actor } from '#app/domain/roles.ts';
import type { formProblem } from '#app/http/form-result.server.ts';
import { problemFromError, typedValues } from '#app/http/form-result.server.ts';
import { respond } from '#app/http/to-response.server.ts';

export interface PageArgs {
  readonly request: Request;
  readonly context: Readonly<RouterContextProvider>;
  readonly params: { readonly caseNumber: string };
}

/** A form that a page of a case has sent. */
export interface CasePost {
  readonly actor: Actor;
  readonly caseNumber: number;
  /** Zone of the place: times are typed in its clock. */
  readonly zone: string;
  readonly form: FormData;
  readonly typed: Readonly<Record<string, string>>;
  readonly now: Date;
}

type Problem = ReturnType<typeof formProblem>;
type Act = (post: CasePost) => Promise<Problem | string>;

/**
 * Acts on a form of a page of a case, by the intent that its button names.
 *
 * @param acts What each intent does: it gives the path to go on to, or what to mend. A form without a known intent is
 *   taken for the first. A refusal by the domain becomes sentences in the form.
 */
export function postToCase({ request, context, params }: PageArgs, acts: Readonly<Record<string, Act>>) {
  return respond(async () => {
    const actor = requireActor(context, request);
    const caseNumber = readCaseNumber(params.caseNumber);
    const found = await findCase(db, actor, caseNumber);
    if (!found) throw notFound('The case');
    const form = await request.formData();
    const typed = typedValues(form);
    const [intent, act] = Object.entries(acts).find(([name]) => name === typed['intent']) ?? Object.entries(acts)[0] ?? [];
    if (intent === undefined || act === undefined) throw new Error('A page that takes forms names what they do.');
    try {
      const outcome = await act({ actor, caseNumber, zone: found.row.zone, form, typed, now: new Date() });
      return typeof outcome === 'string' ? redirect(outcome, 303) : outcome;
    } catch (error) {
      return problemFromError(intent, form, error);
    }
  });
}
