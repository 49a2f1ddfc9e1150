import { redirect } from 'react-router';
import type { Route } from './+types/register';
import { db } from '#db/client.server.ts';
import { getRegister } from '#db/queries/register-view.server.ts';
import { listSavedViews } from '#db/queries/saved-views.server.ts';
import { requireActorWho } from '#app/auth/middleware.server.ts';
import { Page } from '#app/components/layout/page.tsx';
import { EmptyRegister } from '#app/components/register/empty-register.tsx';
import { PagesLine } from '#app/components/register/pages-line.tsx';
import { RegisterFilters } from '#app/components/register/register-filters.tsx';
import { RegisterKeys } from '#app/components/register/register-keys.tsx';
import { RegisterTable } from '#app/components/register/register-table.tsx';
import { SavedViews } from '#app/components/register/saved-views.tsx';
import { ButtonLink } from '#app/components/ui/button.tsx';
import { PageTitle } from '#app/components/ui/page-title.tsx';
import { pageSize, readRegisterFilter, registerSearch } from '#app/domain/register-filter.ts';
import { savedViewForm } from '#app/domain/saved-view.ts';
import { formProblem, problemFromError } from '#app/http/form-result.server.ts';
import { respond } from '#app/http/to-response.server.ts';
import { changeSavedViews } from '#app/services/saved-views/change-saved-views.server.ts';
import { z } from 'zod';

export async function loader({ request, context }: Route.LoaderArgs) {
  const actor = requireActorWho(context, request, 'register:read');
  const filter = readRegisterFilter(new URL(request.url).searchParams);
  const [register, views] = await Promise.all([getRegister(db, { actor, filter, now: new Date() }), listSavedViews(db, actor)]);
  return { filter, register, views };
}

export function action({ request, context }: Route.ActionArgs) {
  return respond(async () => {
    const actor = requireActorWho(context, request, 'register:read');
    const form = await request.formData();
    const intent = String(form.get('intent') ?? '');
    const parsed = savedViewForm.safeParse(Object.fromEntries(form));
    if (!parsed.success) return formProblem(intent, form, { fieldErrors: z.flattenError(parsed.error).fieldErrors });
    try {
      await changeSavedViews({ actor, change: parsed.data });
    } catch (error) {
      return problemFromError(intent, form, error);
    }
    const search = parsed.data.intent === 'save-view' ? parsed.data.search : registerSearch(readRegisterFilter(new URL(request.url).searchParams));
    return redirect(`/cases${search}`, 303);
  });
}

export const meta: Route.MetaFunction = () => [{ title: 'Register · Scorchline' }];

export default function Register({ loaderData: { filter, register, views }, actionData: problem }: Route.ComponentProps) {
  const nothingAtAll = register.counts.all === 0;
  return (
    <Page>
      <PageTitle aside={<ButtonLink href="/report" reload>Report a mark</ButtonLink>}>{register.heading}</PageTitle>
      {nothingAtAll ? null : <RegisterFilters filter={filter} counts={register.counts} showAs="list" />}
      {nothingAtAll ? null : <SavedViews views={views} search={registerSearch(filter)} path="/cases" problem={problem} />}
      {register.rows.length === 0 ? <EmptyRegister nothingAtAll={nothingAtAll} /> : (
        <RegisterTable rows={register.rows} groupCounts={register.groupCounts} span={register.span} grouped={filter.sort === 'return' && filter.view !== 'first-look'} />
      )}
      <PagesLine page={filter.page} pages={Math.ceil(register.total / pageSize)} linkTo={(page) => `/cases${registerSearch(filter, { page })}`} what="cases" />
      {register.rows.length > 0 ? <RegisterKeys /> : null}
    </Page>
  );
}
