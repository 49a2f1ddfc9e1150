import { Form, href } from 'react-router';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { FactList } from '#app/components/ui/fact-list.tsx';
import { QrCode } from '#app/components/ui/qr-code.tsx';
import type { QrPath } from '#app/components/ui/qr-code.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import { TickLine } from '#app/components/ui/tick-line.tsx';
import type { SiteUse } from '#app/domain/site-form.ts';
import { siteUseLabels } from '#app/domain/site-form.ts';
import type { SiteCase } from './site-cases.tsx';
import type { SitePerson } from './site-people.tsx';

export interface SiteSideProps {
  readonly site: {
    readonly code: string;
    readonly address: string;
    readonly isExact: boolean;
    readonly latitudeDeg: number;
    readonly longitudeDeg: number;
    readonly elevationM: number;
    readonly zone: string;
    readonly use: SiteUse;
    readonly skylinePoints: number;
    readonly mayManage: boolean;
    /** Which cases the reader sees here. */
    readonly sees: 'all' | 'own' | 'none';
    readonly guest: { readonly code: string; readonly link: string; readonly qr: QrPath } | null;
    /** Drawings that lie on the map, and those still to be placed. */
    readonly plans: { readonly placed: number; readonly waiting: number };
    readonly people: readonly SitePerson[];
    readonly cases: readonly (SiteCase & { readonly nextReturnMs: number | null })[];
  };
}

/** No more digits than were given: trailing noughts would read as accuracy. */
const compass = (deg: number, positive: string, negative: string) => `${Math.abs(Number(deg.toFixed(5)))}° ${deg < 0 ? negative : positive}`;

/** The side of a site's page: when the sun is back, the place, what is still missing, and the link for guests. */
export function SiteSide({ site }: SiteSideProps) {
  return (
    <div className="space-y-8">
      {site.sees === 'none' ? null : <NextSun cases={site.cases} />}
      <section aria-labelledby="place-heading">
        <SectionHeading id="place-heading">The place</SectionHeading>
        <FactList
          facts={[
            { term: 'Code', value: site.code },
            { term: 'Use', value: siteUseLabels[site.use] },
            ...(site.isExact ? [{ term: 'Address', value: site.address || 'not recorded' }] : []),
            { term: 'Position', value: `${compass(site.latitudeDeg, 'N', 'S')}, ${compass(site.longitudeDeg, 'E', 'W')}`, ...(site.isExact ? {} : { note: 'rounded' }) },
            { term: 'Height above sea level', value: `${site.elevationM} m` },
            { term: 'Time zone', value: site.zone },
            { term: 'Skyline', value: <AppLink href={href('/sites/:siteCode/skyline', { siteCode: site.code })}>{site.skylinePoints > 0 ? `${site.skylinePoints} points` : 'not measured'}</AppLink> },
          ]}
        />
      </section>
      <Plans site={site} />
      {site.mayManage ? <StillLacking site={site} /> : null}
      {site.mayManage ? <GuestLink guest={site.guest} code={site.code} /> : null}
    </div>
  );
}

/** Open marks that are lit again, soonest first. */
function NextSun({ cases }: Pick<SiteSideProps['site'], 'cases'>) {
  const returning = cases.filter((row) => row.nextReturnMs !== null && row.state !== 'closed' && row.state !== 'duplicate').sort((a, b) => (a.nextReturnMs ?? 0) - (b.nextReturnMs ?? 0));
  return (
    <section aria-labelledby="next-sun-heading">
      <SectionHeading id="next-sun-heading" note="local time">Next sun on this site</SectionHeading>
      {returning.length === 0 ? <p>No open case here has a return on file.</p> : null}
      <ul>
        {returning.map((row) => (
          <li key={row.number} className="border-b border-hair py-2">
            <span className="block font-semibold">{row.nextReturn}</span>
            <span className="text-small">
              <AppLink href={href('/cases/:caseNumber', { caseNumber: String(row.number) })}>{row.number}</AppLink>, {row.title}
            </span>
          </li>
        ))}
      </ul>
    </section>
  );
}

function Plans({ site: { code, plans, mayManage } }: SiteSideProps) {
  const counts = [plans.placed > 0 ? `${plans.placed} on the map` : '', plans.waiting > 0 ? `${plans.waiting} to be placed` : ''].filter(Boolean).join(', ');
  return (
    <section aria-labelledby="plans-heading">
      <SectionHeading id="plans-heading">Drawings</SectionHeading>
      <p>{counts === '' ? 'None. A drawing of the roof or of a floor shows reporters where they are.' : `${counts.charAt(0).toUpperCase()}${counts.slice(1)}.`}</p>
      {mayManage || counts !== '' ? <p><AppLink href={href('/sites/:siteCode/plans', { siteCode: code })} className="inline-flex min-h-11 items-center">{mayManage ? 'Add or place drawings' : 'Look at the drawings'}</AppLink></p> : null}
    </section>
  );
}

function StillLacking({ site }: SiteSideProps) {
  const hasManager = site.people.some((person) => person.role === 'manager');
  return (
    <section aria-labelledby="lacking-heading">
      <SectionHeading id="lacking-heading">What this site still lacks</SectionHeading>
      <TickLine done>Position and time zone</TickLine>
      <TickLine done={site.address !== ''}>Address</TickLine>
      <TickLine done={site.skylinePoints > 0} note={site.skylinePoints > 0 ? undefined : 'measured case by case until then'}>Skyline of the site</TickLine>
      <TickLine done={site.plans.placed > 0}>A drawing on the map</TickLine>
      <TickLine done={hasManager}>A site manager</TickLine>
      <TickLine done={site.guest !== null}>Report link for people without an account</TickLine>
    </section>
  );
}

function GuestLink({ guest, code }: Pick<SiteSideProps['site'], 'guest' | 'code'>) {
  return (
    <section aria-labelledby="guest-heading">
      <SectionHeading id="guest-heading">Report link without an account</SectionHeading>
      {guest ? (
        <>
          <p>Anyone with the link or the code can report a mark here, and sees nothing else.</p>
          <QrCode code={guest.qr} label="Code that opens the report page of this site" className="mt-3 h-40 w-40" />
          <p><AppLink href={href('/sites/:siteCode/door-card', { siteCode: code })} className="inline-flex min-h-11 items-center">Card for the door, to print</AppLink></p>
          <dl className="pt-2">
            <dt className="text-small text-second">Link</dt>
            <dd className="font-mono text-small break-all">{guest.link}</dd>
            <dt className="pt-2 text-small text-second">Code, to be typed on the first page</dt>
            <dd className="font-mono text-small break-all">{guest.code}</dd>
          </dl>
        </>
      ) : (
        <p>Closed. Once opened, anyone with the link can report a mark here, and sees nothing else.</p>
      )}
      <Form method="post" className="pt-3">
        <input type="hidden" name="intent" value={guest ? 'close-guest-link' : 'open-guest-link'} />
        <Button look="outlined">{guest ? 'Close the link' : 'Open a link'}</Button>
      </Form>
      {guest ? <p className="pt-2 text-small text-second">A closed link never works again; a new one gets a new code.</p> : null}
    </section>
  );
}
