import { href } from 'react-router';
import type { Route } from './+types/measurement-sheet';
import { db } from '#db/client.server.ts';
import { getCaseHeader } from '#db/queries/case-header.server.ts';
import { getMeasuredCase } from '#db/queries/measure-pages.server.ts';
import { requireActor } from '#app/auth/middleware.server.ts';
import { PaperSheet } from '#app/components/cases/paper-sheet.tsx';
import { Page } from '#app/components/layout/page.tsx';
import { useHydrated } from '#app/components/report/use-hydrated.ts';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { Tabs } from '#app/components/ui/tabs.tsx';
import { readCaseNumber } from '#app/domain/case-number.ts';
import { notFound } from '#app/domain/errors.ts';
import { formatDayClock } from '#app/domain/local-time.ts';
import { measurementSheet } from '#app/domain/measurement-sheet.ts';
import { declinationWords } from '#app/domain/measurements-view.ts';
import { sunNow } from '#app/domain/sun-now.ts';
import { respond } from '#app/http/to-response.server.ts';
import { labelCode } from '#app/services/evidence/label-code.server.ts';
import { declinationAt } from '#app/services/scenes/declination.server.ts';

/** Height of the sketch on each paper, so that the page fills and does not run over. [mm] */
const papers = { a4: { label: 'A4', gridMm: 145 }, letter: { label: 'Letter', gridMm: 125 } } as const;

export function loader({ request, context, params }: Route.LoaderArgs) {
  return respond(async () => {
    const actor = requireActor(context, request);
    const caseNumber = readCaseNumber(params.caseNumber);
    const { row, place, scene, version } = await getMeasuredCase(db, { actor, caseNumber });
    const now = new Date();
    const head = await getCaseHeader(db, { actor, caseNumber, now });
    if (!head) throw notFound('The case');
    const { declinationDeg, declinationSource } = declinationAt(place, now);
    const paper = new URL(request.url).searchParams.get('paper') === 'letter' ? ('letter' as const) : ('a4' as const);
    const address = href('/cases/:caseNumber/measurements', { caseNumber: String(caseNumber) });
    return {
      paper,
      caseNumber,
      place: [head.siteName, row.placeDetail.split('\n')[0]].filter(Boolean).join(', '),
      version,
      printed: formatDayClock(now, row.zone),
      sunWords: `${head.nextReturn ? `on the mark again ${head.nextReturn.words}.` : 'when it is on the mark is not worked out yet.'} ${sunNow(now, place).words}`,
      declination: declinationWords(declinationDeg, declinationSource),
      groups: measurementSheet(scene),
      code: labelCode(address),
      skyline: (scene.skyline ?? place.skyline)?.points.map((point) => ({ azimuthDeg: point.azimuthDeg, elevationDeg: point.elevationDeg, name: point.name ?? '' })) ?? [],
    };
  });
}

export const meta: Route.MetaFunction = ({ params }) => [{ title: `Measurement sheet, case ${params.caseNumber} · Scorchline` }];

export default function MeasurementSheet({ loaderData: { paper, ...sheet } }: Route.ComponentProps) {
  const hydrated = useHydrated();
  const base = href('/cases/:caseNumber/measurements', { caseNumber: String(sheet.caseNumber) });
  return (
    <Page>
      <div className="flex flex-wrap items-center gap-x-6 gap-y-3 py-4" data-print="no">
        <h1 className="font-serif text-title">Sheet for paper, case {sheet.caseNumber}</h1>
        <Tabs label="Paper" look="filter" items={Object.entries(papers).map(([key, { label }]) => ({ href: `${base}/sheet?paper=${key}`, label, current: key === paper }))} />
        {hydrated ? <Button type="button" look="outlined" onClick={() => window.print()}>Print two pages</Button> : null}
        <AppLink href={base} className="inline-flex min-h-(--target-height) items-center">Back to the measurements</AppLink>
        <p className="w-full max-w-[64ch] text-second">Print without scaling. What is known is filled in; measure it again if you doubt it. Page two has the sketch and the skyline.</p>
      </div>
      <PaperSheet {...sheet} isLetter={paper === 'letter'} gridMm={papers[paper].gridMm} />
    </Page>
  );
}
