import type { Route } from './+types/register';
import { db } from '#db/client.server.ts';
import { getRegister } from '#db/queries/register-view.server.ts';
import { requireActorWho } from '#app/auth/middleware.server.ts';
import { Page } from '#app/components/layout/page.tsx';
import { EmptyRegister } from '#app/components/register/empty-register.tsx';
import { PagesLine } from '#app/components/register/pages-line.tsx';
import { RegisterFilters } from '#app/components/register/register-filters.tsx';
import { RegisterKeys } from '#app/components/register/register-keys.tsx';
import { RegisterTable } from '#app/components/register/register-table.tsx';
import { ButtonLink } from '#app/components/ui/button.tsx';
import { PageTitle } from '#app/components/ui/page-title.tsx';
import { pageSize, readRegisterFilter, registerSearch } from '#app/domain/register-filter.ts';

export async function loader({ request, context }: Route.LoaderArgs) {
  const actor = requireActorWho(context, request, 'register:read');
  const filter = readRegisterFilter(new URL(request.url).searchParams);
  const register = await getRegister(db, { actor, filter, now: new Date() });
  return { filter, register };
}

export const meta: Route.MetaFunction = () => [{ title: 'Register · Scorchline' }];

export default function Register({ loaderData: { filter, register } }: Route.ComponentProps) {
  const nothingAtAll = register.counts.all === 0;
  return (
    <Page>
      <PageTitle aside={<ButtonLink href="/report" reload>Report a mark</ButtonLink>}>{register.heading}</PageTitle>
      {nothingAtAll ? null : <RegisterFilters filter={filter} counts={register.counts} showAs="list" />}
      {register.rows.length === 0 ? <EmptyRegister nothingAtAll={nothingAtAll} /> : (
        <RegisterTable rows={register.rows} groupCounts={register.groupCounts} span={register.span} grouped={filter.sort === 'return'} />
      )}
      <PagesLine page={filter.page} pages={Math.ceil(register.total / pageSize)} linkTo={(page) => `/cases${registerSearch(filter, { page })}`} what="cases" />
      {register.rows.length > 0 ? <RegisterKeys /> : null}
    </Page>
  );
}
