import { redirect } from 'react-router';
import { requireActor } from '#app/auth/middleware.server.ts';
import { readCaseNumber } from '#app/domain/case-number.ts';
import type { Actor } from '#app/domain/roles.ts';
import { problemFromError, typedValues } from '#app/http/form-result.server.ts';
import { respond } from '#app/http/to-response.server.ts';
import type { PageArgs } from './post-to-case.server.ts';

/** A new version of the measurements, as a form of one of their pages brings it. */
export interface TypedVersion {
  readonly actor: Actor;
  readonly caseNumber: number;
  readonly baseVersion: number;
  readonly note: string;
  readonly typed: Readonly<Record<string, string>>;
  readonly now: Date;
}

/** Saves and comes back to the page that the form stands on; a refusal keeps what was typed. */
export function saveVersion({ request, context, params }: PageArgs, intent: string, save: (version: TypedVersion) => Promise<unknown>) {
  return respond(async () => {
    const actor = requireActor(context, request);
    const form = await request.formData();
    const typed = typedValues(form);
    try {
      await save({ actor, caseNumber: readCaseNumber(params.caseNumber), baseVersion: Number(typed['baseVersion']), note: typed['note'] ?? '', typed, now: new Date() });
    } catch (error) {
      return problemFromError(intent, form, error);
    }
    return redirect(new URL(request.url).pathname, 303);
  });
}
