import type { ReactNode } from 'react';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { LogoMark } from './logo-mark.tsx';

export interface NavItem {
  readonly href: string;
  readonly label: string;
  readonly current?: boolean;
  /** Shown in a small square after the word, as for "My work". */
  readonly count?: number;
}
export interface HeaderPerson {
  readonly initials: string;
  readonly name: string;
  /** Roles or organisation, one line. */
  readonly detail?: string;
}
export interface AppHeaderProps {
  readonly nav: readonly NavItem[];
  readonly homeHref?: string;
  /** Left out: no search, as for a reader of case files. */
  readonly search?: { readonly action?: string; readonly query?: string };
  readonly now?: { readonly iso: string; readonly words: string };
  readonly myWork?: NavItem;
  readonly person?: HeaderPerson;
  /** Links in the person's menu, such as settings. */
  readonly personLinks?: readonly NavItem[];
  readonly signOutAction?: string;
}

/** Head of every page inside: works without a script, at 320 px too. */
export function AppHeader(props: AppHeaderProps) {
  return (
    <header className="border-b-2 border-ink">
      <a href="#main" className="sr-only focus:not-sr-only focus:absolute focus:z-30 focus:bg-sheet focus:px-4 focus:py-2">Skip to the page</a>
      <div className="mx-auto flex min-h-13.5 max-w-[1600px] items-stretch gap-x-6 px-(--page-margin)">
        <AppLink href={props.homeHref ?? '/cases'} className="flex items-center gap-2.5 text-[1.0625rem] font-semibold no-underline">
          <LogoMark />
          Scorchline
        </AppLink>
        <nav aria-label="Parts of the register" className="hidden tablet:block">
          <ul className="flex h-full gap-4.5 desk:gap-6">{props.nav.map((item) => <li key={item.href} className="flex"><NavWord item={item} /></li>)}</ul>
        </nav>
        <div className="ml-auto hidden items-center gap-5 tablet:flex desk:gap-7">
          {props.search ? <div className="max-desk:hidden"><SearchForm {...props.search} id="find-desk" /></div> : null}
          {props.search ? <AppLink href={props.search.action ?? '/cases'} data-print="no" className="inline-flex min-h-11 items-center text-small no-underline desk:hidden">Find</AppLink> : null}
          {props.now ? <time dateTime={props.now.iso} className="text-small text-second max-desk:hidden">{props.now.words}</time> : null}
          {props.myWork ? <span className="flex self-stretch"><NavWord item={props.myWork} /></span> : null}
          {props.person ? <Folded summary={<><span className="sr-only">Your account, </span>{props.person.initials}</>}><PersonMenu {...props} /></Folded> : null}
        </div>
        <div className="ml-auto flex items-center tablet:hidden">
          <Folded summary="Menu" wide><PhoneMenu {...props} /></Folded>
        </div>
      </div>
    </header>
  );
}

function NavWord({ item }: { readonly item: NavItem }) {
  return (
    <AppLink
      href={item.href}
      {...(item.current ? { 'aria-current': 'page' as const } : {})}
      className={`flex items-center gap-2 border-y-4 border-t-transparent text-body no-underline ${item.current ? 'border-b-here font-semibold' : 'border-b-transparent font-medium'}`}
    >
      {item.label}
      {item.count === undefined ? null : <span className="border-[1.5px] border-current px-1.5 text-axis font-semibold">{item.count}</span>}
    </AppLink>
  );
}

function SearchForm({ action = '/cases', query = '', id }: { readonly action?: string; readonly query?: string; readonly id: string }) {
  return (
    <form role="search" method="get" action={action} className="relative">
      <label htmlFor={id} className="sr-only">Find a case, place or mark</label>
      <input id={id} type="search" name="q" defaultValue={query} placeholder="Find a case, place or mark" aria-keyshortcuts="/" className="field-box !min-h-(--target-height) w-full !py-1 desk:w-60" />
    </form>
  );
}

function Folded({ summary, wide = false, children }: { readonly summary: ReactNode; readonly wide?: boolean; readonly children: ReactNode }) {
  return (
    <details className="group relative" data-print="no">
      <summary className="flex min-h-11 min-w-11 list-none items-center justify-end font-medium [&::-webkit-details-marker]:hidden">{summary}</summary>
      <div className={`absolute right-0 z-20 border-2 border-ink bg-sheet p-4 ${wide ? 'w-[calc(100vw-2*var(--page-margin))]' : 'w-64'}`}>{children}</div>
    </details>
  );
}

function PersonMenu({ person, personLinks = [], signOutAction = '/logout' }: AppHeaderProps) {
  if (!person) return null;
  return (
    <div className="space-y-3">
      <div>
        <p className="font-semibold">{person.name}</p>
        {person.detail ? <p className="text-small text-second">{person.detail}</p> : null}
      </div>
      {personLinks.map((link) => <p key={link.href}><AppLink href={link.href} className="inline-flex min-h-(--target-height) items-center">{link.label}</AppLink></p>)}
      <form method="post" action={signOutAction}>
        <button type="submit" className="min-h-11 w-full cursor-pointer border-2 border-ember font-semibold text-ember">Sign out</button>
      </form>
    </div>
  );
}

function PhoneMenu(props: AppHeaderProps) {
  const items = props.myWork ? [...props.nav, props.myWork] : props.nav;
  return (
    <div className="space-y-4">
      {props.search ? <SearchForm {...props.search} id="find-phone" /> : null}
      <nav aria-label="Parts of the register">
        <ul>
          {items.map((item) => (
            <li key={item.href} className="border-b border-hair">
              <AppLink href={item.href} {...(item.current ? { 'aria-current': 'page' as const } : {})} className={`flex min-h-12 items-center justify-between no-underline ${item.current ? 'border-l-4 border-here pl-3 font-semibold' : ''}`}>
                {item.label}
                {item.count === undefined ? null : <span className="border-[1.5px] border-current px-1.5 text-axis font-semibold">{item.count}</span>}
              </AppLink>
            </li>
          ))}
        </ul>
      </nav>
      {props.now ? <p className="text-small text-second"><time dateTime={props.now.iso}>{props.now.words}</time></p> : null}
      <PersonMenu {...props} />
    </div>
  );
}

export interface TaskHeaderProps {
  readonly title: string;
  readonly closeHref: string;
  readonly closeLabel?: string;
  /** No rule below on phones, where the ink block follows at once. */
  readonly open?: boolean;
}

/** Head of a page that does one thing on a phone: sign, task, way out. */
export function TaskHeader({ title, closeHref, closeLabel = 'Close', open = false }: TaskHeaderProps) {
  return (
    <header className={`border-ink ${open ? 'desk:border-b-2' : 'border-b-2'}`}>
      <div className="mx-auto flex min-h-12.5 max-w-[1600px] items-center justify-between gap-4 px-(--page-margin)">
        <p className="flex items-center gap-2.5 text-[1.0625rem] font-semibold"><LogoMark />{title}</p>
        <AppLink href={closeHref} reload className="inline-flex min-h-11 items-center">{closeLabel}</AppLink>
      </div>
    </header>
  );
}

export interface PublicHeaderProps {
  readonly links: readonly NavItem[];
}

/** Head of the pages that need no account. */
export function PublicHeader({ links }: PublicHeaderProps) {
  return (
    <header className="border-b-2 border-ink">
      <div className="mx-auto flex min-h-13.5 max-w-[1600px] flex-wrap items-center justify-between gap-x-6 px-(--page-margin)">
        <AppLink href="/" className="flex min-h-11 items-center gap-2.5 text-[1.0625rem] font-semibold no-underline"><LogoMark />Scorchline</AppLink>
        <nav aria-label="About">
          <ul className="flex flex-wrap gap-x-5">
            {links.map((link) => <li key={link.href}><AppLink href={link.href} className="inline-flex min-h-11 items-center text-small no-underline hover:underline">{link.label}</AppLink></li>)}
          </ul>
        </nav>
      </div>
    </header>
  );
}
