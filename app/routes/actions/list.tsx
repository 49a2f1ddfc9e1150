import { useState } from 'react';
import { Form, href, redirect } from 'react-router';
import type { RouterContextProvider } from 'react-router';
import { z } from 'zod';
import type { Route } from './+types/list';
import { db } from '#db/client.server.ts';
import { listActionLines } from '#db/queries/action-list.server.ts';
import type { ListedLine } from '#db/queries/action-list.server.ts';
import { listColleagues } from '#db/queries/recipients.server.ts';
import { requireActor, requireActorWho } from '#app/auth/middleware.server.ts';
import { ActionList } from '#app/components/corrective-actions/action-list.tsx';
import { ActionFilterLine } from '#app/components/corrective-actions/action-filter-line.tsx';
import { BulkPanel, bulkActs, bulkWords } from '#app/components/corrective-actions/bulk-panel.tsx';
import { FixedBar, Page } from '#app/components/layout/page.tsx';
import { Button, ButtonLink } from '#app/components/ui/button.tsx';
import { EmptyState } from '#app/components/ui/notice.tsx';
import { PageTitle } from '#app/components/ui/page-title.tsx';
import { actionsCsv } from '#app/domain/action-export.ts';
import { actionFilterHref, chosenValue, passesFilter, readActionFilter, readChosen } from '#app/domain/action-filter.ts';
import { reassignSchema, reDateSchema } from '#app/domain/action-form.ts';
import { actionsHeading, actionViews, dueDayMeaning, inView, isUnfinished } from '#app/domain/action-list.ts';
import { formatIsoDay } from '#app/domain/local-time.ts';
import { fieldErrorsOf } from '#app/http/field-errors.ts';
import { formProblem, problemFromError } from '#app/http/form-result.server.ts';
import { respond } from '#app/http/to-response.server.ts';
import { reassignActions } from '#app/services/corrective-actions/reassign-actions.server.ts';
import { reDateActions } from '#app/services/corrective-actions/re-date-actions.server.ts';
import { remindOwners } from '#app/services/corrective-actions/remind-owners.server.ts';

/** Whoever owns or verifies an action has a list; an empty one opens only to those whose roles give actions out. */
async function readList(request: Request, context: Readonly<RouterContextProvider>) {
  const actor = requireActor(context, request);
  const all = await listActionLines(db, { actor, now: new Date() });
  if (all.length === 0) requireActorWho(context, request, 'actions:read');
  return { actor, all };
}

/** A page cannot answer with a file, so the export is answered before the page is made. */
export const middleware: Route.MiddlewareFunction[] = [
  async ({ request, context }, next) => {
    const url = new URL(request.url);
    if (request.method !== 'GET' || url.searchParams.get('format') !== 'csv') return next();
    const { actor, all } = await readList(request, context);
    const filter = readActionFilter(url.searchParams);
    const lines = all.filter((line) => passesFilter(line, filter, actor.userId));
    return new Response(actionsCsv(lines), {
      headers: { 'Content-Type': 'text/csv; charset=utf-8', 'Content-Disposition': 'attachment; filename="actions.csv"', 'Cache-Control': 'private, no-store' },
    });
  },
];

export function loader({ request, context }: Route.LoaderArgs) {
  return respond(async () => {
    const { actor, all } = await readList(request, context);
    const search = new URL(request.url).searchParams;
    const filter = readActionFilter(search);
    const unfinished = all.filter(isUnfinished);
    const act = bulkActs.find((known) => known === search.get('bulk'));
    const bulk = act ? bulkView(act, all, search) : null;
    return {
      filter,
      heading: actionsHeading(all),
      below: belowTitle(unfinished),
      counts: Object.fromEntries(actionViews.map((view) => [view, all.filter((line) => inView(line, view, actor.userId)).length])),
      sites: [...new Set(all.map((line) => line.siteName))].sort(),
      lines: all.filter((line) => passesFilter(line, filter, actor.userId)).map(({ nextReturnAt: _nextReturnAt, ...line }) => line),
      total: all.length,
      todayOn: new Date().toISOString().slice(0, 10),
      bulk,
      people: bulk?.act === 'reassign' ? await listColleagues(db, actor.organisationId) : [],
    };
  });
}

function belowTitle(unfinished: readonly ListedLine[]): string {
  if (unfinished.length === 0) return 'No action is open.';
  const sites = new Set(unfinished.map((line) => line.siteName)).size;
  const next = unfinished.filter((line) => line.nextReturnAt !== null).sort((a, b) => Number(a.nextReturnAt) - Number(b.nextReturnAt))[0];
  const soonest = next ? ` The soonest return is ${next.siteName}, ${next.returnWords}, ${next.returnNote}.` : '';
  return `${unfinished.length} open ${unfinished.length === 1 ? 'action' : 'actions'} at ${sites} ${sites === 1 ? 'site' : 'sites'}.${soonest}`;
}

function bulkView(act: (typeof bulkActs)[number], all: readonly ListedLine[], search: URLSearchParams) {
  const ids = readChosen(search.getAll('chosen')).map((choice) => choice.actionId);
  const dueOn = z.iso.date().safeParse(search.get('dueOn')).data ?? '';
  const chosen = all.filter((line) => line.changeable && ids.includes(line.id));
  if (chosen.length === 0) return null;
  return { act, dueOn, chosen: chosen.map((line) => ({ value: chosenValue(line), title: `${line.caseNumber}, ${line.title}`, now: `${line.owner}, due ${line.dueWords}`, preview: act === 're-date' && dueOn !== '' ? previewOf(line, dueOn) : '' })) };
}

/** Whether the sun is back before the new day. */
function previewOf(line: ListedLine, dueOn: string): string {
  const moved = `${line.dueWords} becomes ${formatIsoDay(dueOn)}`;
  const meaning = dueDayMeaning(dueOn, line.today, line.nextReturnOn);
  if (!meaning) return `${moved}; no fixed return of the sun.`;
  const days = `${meaning.days} ${meaning.days === 1 ? 'day' : 'days'}`;
  return meaning.sunFirst ? `${moved}; the sun is back first, on ${line.returnWords}${meaning.days === 0 ? ', the same day' : `, ${days} before`}.` : `${moved}, ${days} before the sun is back.`;
}

export async function action({ request, context }: Route.ActionArgs) {
  const actor = requireActor(context, request);
  const form = await request.formData();
  const intent = z.enum(bulkActs).catch('remind').parse(form.get('intent'));
  const actions = readChosen(form.getAll('chosen'));
  if (actions.length === 0) return formProblem(intent, form, { formErrors: ['No row is chosen.'] });
  const fields = Object.fromEntries(form);
  try {
    if (intent === 're-date') {
      const typed = reDateSchema.safeParse(fields);
      if (!typed.success) return formProblem(intent, form, { fieldErrors: fieldErrorsOf(typed.error) });
      await reDateActions({ actor, actions, ...typed.data });
    } else if (intent === 'reassign') {
      const typed = reassignSchema.safeParse(fields);
      if (!typed.success) return formProblem(intent, form, { fieldErrors: fieldErrorsOf(typed.error) });
      await reassignActions({ actor, actions, ...typed.data });
    } else {
      await remindOwners({ actor, actions });
    }
    const search = new URL(request.url).searchParams;
    for (const name of ['view', 'risk', 'state', 'site']) {
      const kept = form.get(name);
      if (typeof kept === 'string') search.set(name, kept);
    }
    return redirect(actionFilterHref(readActionFilter(search)), 303);
  } catch (error) {
    return respond(async () => problemFromError(intent, form, error));
  }
}

export const meta: Route.MetaFunction = () => [{ title: 'Actions · Scorchline' }];

const bulkFormId = 'bulk-form';

export default function Actions({ loaderData: page, actionData }: Route.ComponentProps) {
  const [chosen, setChosen] = useState<readonly string[]>([]);
  const choose = (value: string, picked: boolean) => setChosen((before) => (picked ? [...before, value] : before.filter((other) => other !== value)));
  const { filter } = page;
  const kept = [['view', filter.view], ['risk', filter.risk ?? ''], ['state', filter.state ?? ''], ['site', filter.site ?? '']] as const;
  const changeable = page.bulk === null && page.lines.some((line) => line.changeable);
  return (
    <Page withBar={changeable}>
      <PageTitle below={page.below} aside={<ButtonLink href={href('/actions/calendar')} look="outlined" reload>Calendar file</ButtonLink>}>{page.heading}</PageTitle>
      <ActionFilterLine filter={filter} counts={page.counts} sites={page.sites} />
      {page.bulk ? <BulkPanel bulk={page.bulk} people={page.people} todayOn={page.todayOn} answer={actionData} closeHref={actionFilterHref(filter)} kept={kept.filter(([, value]) => value !== '')} /> : null}
      {page.lines.length === 0 ? (
        <EmptyState title={page.total === 0 ? 'No action is given yet, to you or on a case that you may see.' : 'No action matches.'} action={page.total === 0 ? <ButtonLink href={href('/cases')} look="outlined">Open the register</ButtonLink> : <ButtonLink href="/actions" look="outlined">Show what is open</ButtonLink>}>An action is given on its case, to one person, with another to verify it.</EmptyState>
      ) : (
        <ActionList lines={page.lines} todayOn={page.todayOn} formId={bulkFormId} onChoose={choose} />
      )}
      {changeable ? (
        <FixedBar
          title={chosen.length === 0 ? 'Chosen rows' : `${chosen.length} chosen`}
          detail={<span className="max-tablet:hidden">A re-date asks for a reason and shows whether the sun is back first.</span>}
          action={
            <Form method="get" id={bulkFormId} className="flex gap-2.5">
              {kept.filter(([, value]) => value !== '').map(([name, value]) => <input key={name} type="hidden" name={name} value={value} />)}
              {bulkActs.map((act, index) => <Button key={act} name="bulk" value={act} look={index === 0 ? 'filled' : 'outlined'}>{bulkWords[act]}</Button>)}
            </Form>
          }
        />
      ) : null}
    </Page>
  );
}
