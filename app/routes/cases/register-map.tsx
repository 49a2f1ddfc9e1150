import { useMemo } from 'react';
import { href, useNavigate } from 'react-router';
import type { Route } from './+types/register-map';
import { db } from '#db/client.server.ts';
import { getRegister } from '#db/queries/register-view.server.ts';
import { requireActorWho } from '#app/auth/middleware.server.ts';
import { BurnCard } from '#app/components/burn-card/burn-card.tsx';
import { Columns, Page } from '#app/components/layout/page.tsx';
import { EmptyRegister } from '#app/components/register/empty-register.tsx';
import { PagesLine } from '#app/components/register/pages-line.tsx';
import { RegisterFilters } from '#app/components/register/register-filters.tsx';
import { CaseMap } from '#app/components/scene/base-map-lazy.tsx';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { ButtonLink } from '#app/components/ui/button.tsx';
import { PageTitle, SectionHeading } from '#app/components/ui/page-title.tsx';
import { StateMark } from '#app/components/ui/state-mark.tsx';
import type { RegisterRowView } from '#app/domain/case-view.ts';
import { formatClock } from '#app/domain/local-time.ts';
import { pageSize, readRegisterFilter, registerSearch } from '#app/domain/register-filter.ts';
import { sunOverhead } from '#app/domain/sun-now.ts';

export async function loader({ request, context }: Route.LoaderArgs) {
  const actor = requireActorWho(context, request, 'register:read');
  const filter = readRegisterFilter(new URL(request.url).searchParams);
  const now = new Date();
  const register = await getRegister(db, { actor, filter, now });
  return { filter, register, overhead: sunOverhead(now), nowWords: `${formatClock(now, 'UTC')} UTC` };
}

export const meta: Route.MetaFunction = () => [{ title: 'Register, map · Scorchline' }];

const caseHref = (row: RegisterRowView) => href('/cases/:caseNumber', { caseNumber: String(row.number) });

export default function RegisterMap({ loaderData: { filter, register, overhead, nowWords } }: Route.ComponentProps) {
  const navigate = useNavigate();
  const points = useMemo(
    () => register.rows.map((row) => ({
      number: String(row.number),
      title: row.title,
      href: caseHref(row),
      ...row.position,
      note: row.nextReturn ? `${row.nextReturn.words.split(',')[0]}, ${row.nextReturn.inWords}` : null,
      litBeforeFix: row.group === 'before-fix',
      sunAzimuthDeg: row.sunAzimuthDeg,
    })),
    [register.rows],
  );
  return (
    <Page>
      <PageTitle aside={<ButtonLink href="/report" reload>Report a mark</ButtonLink>}>{register.heading}</PageTitle>
      <RegisterFilters filter={filter} counts={register.counts} showAs="map" />
      {register.rows.length === 0 ? <EmptyRegister nothingAtAll={register.counts.all === 0} /> : (
        <Columns sideLabel="The same cases as a list" side={<NextToBeLit rows={register.rows} />}>
          <CaseMap points={points} sunOverhead={overhead} onFollow={(to) => void navigate(to)} />
          <p className="pt-2 text-small text-second">
            Shaded: sun below the horizon at {nowWords}. Blue wedge: where the sun stood when the mark was made, from the attached reconstruction. Filled dot: the sun returns before the fix is proven. Places to two decimals, no address lookup.
          </p>
        </Columns>
      )}
      <PagesLine page={filter.page} pages={Math.ceil(register.total / pageSize)} linkTo={(page) => `/cases/map${registerSearch(filter, { page })}`} what="cases" />
    </Page>
  );
}

function NextToBeLit({ rows }: { readonly rows: readonly RegisterRowView[] }) {
  return (
    <section aria-labelledby="map-list">
      <SectionHeading id="map-list">The same cases, soonest first</SectionHeading>
      <ol>
        {rows.map((row) => (
          <li key={row.number} className="grid grid-cols-[2.75rem_minmax(0,1fr)] border-b border-hair py-2">
            <span className="font-serif text-group text-second">{row.number}</span>
            <div>
              <AppLink href={caseHref(row)} className="font-semibold no-underline hover:underline">{row.title}</AppLink>
              <p className="text-axis text-second">{row.place}</p>
              <BurnCard model={row.card} size="S" label={`Case ${row.number}`} />
              <p className="text-small">{row.nextReturn ? <><span className="font-semibold">{row.nextReturn.words}</span>, {row.nextReturn.inWords}</> : <StateMark state={row.state} note={row.returnWords} />}</p>
            </div>
          </li>
        ))}
      </ol>
    </section>
  );
}
