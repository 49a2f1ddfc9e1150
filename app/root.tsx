import { useEffect } from 'react';
import type { ReactNode } from 'react';
import { isRouteErrorResponse, Links, Meta, Outlet, Scripts, ScrollRestoration, useLocation, useRouteError, useRouteLoaderData } from 'react-router';
import './app.css';
import type { Route } from './+types/root';
import { actorContext } from '#app/auth/actor-context.ts';
import { sessionMiddleware } from '#app/auth/middleware.server.ts';
import { AppHeader, PublicHeader } from '#app/components/layout/app-header.tsx';
import { Page } from '#app/components/layout/page.tsx';
import { forgetPerson } from '#app/components/report/forget-person.ts';
import { MapTilesContext } from '#app/components/scene/map-tiles.ts';
import { PageTitle } from '#app/components/ui/page-title.tsx';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { homeFor, initialsOf, navigationFor, personLinksFor, rolesInWords } from '#app/domain/navigation.ts';
import { env } from '#app/env.server.ts';

export const middleware: Route.MiddlewareFunction[] = [sessionMiddleware];

export function loader({ context }: Route.LoaderArgs) {
  const actor = context.get(actorContext);
  const tiles = env.MAP_TILE_URL ? { url: env.MAP_TILE_URL, attribution: env.MAP_TILE_ATTRIBUTION } : null;
  if (!actor) return { person: null, tiles };
  return {
    tiles,
    person: {
      name: actor.displayName,
      initials: initialsOf(actor.displayName),
      roles: rolesInWords(actor),
      home: homeFor(actor),
      navigation: navigationFor(actor),
      ownLinks: personLinksFor(actor),
      searches: navigationFor(actor).some((entry) => entry.href === '/cases'),
    },
  };
}

export const links: Route.LinksFunction = () => [
  { rel: 'icon', href: '/favicon.svg', type: 'image/svg+xml' },
  { rel: 'apple-touch-icon', href: '/icon-180.png' },
  { rel: 'manifest', href: '/manifest.webmanifest' },
];

export const meta: Route.MetaFunction = () => [{ title: 'Scorchline' }];

export function Layout({ children }: { readonly children: ReactNode }) {
  return (
    <html lang="en">
      <head>
        <meta charSet="utf-8" />
        <meta name="viewport" content="width=device-width, initial-scale=1" />
        <meta name="color-scheme" content="light dark" />
        <meta name="theme-color" content="#f6f1e7" media="(prefers-color-scheme: light)" />
        <meta name="theme-color" content="#12181c" media="(prefers-color-scheme: dark)" />
        <Meta />
        <Links />
      </head>
      <body>
        {children}
        <ScrollRestoration />
        <Scripts />
      </body>
    </html>
  );
}

/** Pages that bring a head of their own: the report on a phone, and the landing page. */
const ownHead = /^\/(?:report|received)(?:\/|$)/u;

function Head() {
  const data = useRouteLoaderData<typeof loader>('root');
  const { pathname } = useLocation();
  const own = ownHead.test(pathname);
  const signedOut = data?.person === null && !own;
  useEffect(() => {
    // Where storage is switched off, nothing is kept.
    if (signedOut) forgetPerson().catch(() => undefined);
  }, [signedOut]);
  if (own) return null;
  const person = data?.person;
  if (!person) return <PublicHeader links={[{ href: '/report', label: 'Report' }, { href: '/how-we-compute', label: 'How we compute' }, { href: '/sign-in', label: 'Sign in' }]} />;
  const current = (href: string) => pathname === href || pathname.startsWith(`${href}/`);
  return (
    <AppHeader
      homeHref={person.home}
      nav={person.navigation.map((entry) => ({ ...entry, current: current(entry.href) }))}
      {...(person.searches ? { search: { action: '/cases' } } : {})}
      person={{ initials: person.initials, name: person.name, detail: person.roles }}
      personLinks={person.ownLinks}
      signOutAction="/sign-out"
    />
  );
}

export default function Root({ loaderData }: Route.ComponentProps) {
  return (
    <MapTilesContext value={loaderData.tiles}>
      <Head />
      <Outlet />
    </MapTilesContext>
  );
}

interface Problem {
  readonly title: string;
  readonly message: string;
}

/** Payloads of expected refusals are `{ code, message }`; nothing else is shown to a person. */
function problemOf(error: unknown): Problem {
  if (isRouteErrorResponse(error)) {
    const message = typeof error.data === 'object' && error.data !== null && 'message' in error.data ? String(error.data.message) : null;
    if (error.status === 404) return { title: 'Nothing is here', message: message ?? 'The address leads nowhere, or to something that is not yours to see.' };
    if (error.status === 403) return { title: 'This page is not open to you', message: message ?? 'Your roles do not include it.' };
    return { title: 'That did not work', message: message ?? 'Nothing was changed. Go back and try again.' };
  }
  return { title: 'Something failed on our side', message: 'What you sent may not be stored. Go back, check, and send it again: the same report is never filed twice.' };
}

export function ErrorBoundary() {
  const problem = problemOf(useRouteError());
  return (
    <>
      <Head />
      <Page width="reading">
        <PageTitle>{problem.title}</PageTitle>
        <p className="text-account font-serif">{problem.message}</p>
        <p className="pt-4">
          <AppLink href="/">Go to the first page</AppLink>
        </p>
      </Page>
    </>
  );
}
