import { href } from 'react-router';
import type { Route } from './+types/run-comparison';
import { db } from '#db/client.server.ts';
import { getRunComparison } from '#db/queries/run-comparison.server.ts';
import { requireActor } from '#app/auth/middleware.server.ts';
import { headerSpan } from '#app/components/burn-card/model.ts';
import { TwoCards } from '#app/components/burn-card/two-cards.tsx';
import { zoneWords } from '#app/components/burn-card/words.ts';
import { ChooseRuns } from '#app/components/reconstruction/choose-runs.tsx';
import { changeWords, InputTable, ResultTable, StretchTable, TestTable } from '#app/components/reconstruction/comparison-tables.tsx';
import { cautions } from '#app/components/layout/cautions.ts';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { FactList } from '#app/components/ui/fact-list.tsx';
import { Caution } from '#app/components/ui/caution.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import { readCaseNumber } from '#app/domain/case-number.ts';
import { notFound } from '#app/domain/errors.ts';
import type { RunComparisonView } from '#app/domain/run-comparison.ts';
import { respond } from '#app/http/to-response.server.ts';
import { changesAlone } from '#app/services/reconstructions/changes-alone.server.ts';
import type { ChangeAlone } from '#app/services/reconstructions/changes-alone.server.ts';

export function loader({ request, context, params }: Route.LoaderArgs) {
  return respond(async () => {
    const search = new URL(request.url).searchParams;
    const wanted = (name: string) => Number.parseInt(search.get(name) ?? '', 10) || null;
    const who = { actor: requireActor(context, request), caseNumber: readCaseNumber(params.caseNumber) };
    const page = await getRunComparison(db, { ...who, a: wanted('a'), b: wanted('b') });
    if (!page) throw notFound(`Case ${params.caseNumber}`);
    const { a, b, view, mayRun } = page;
    const alone = search.get('alone') === 'yes' && view && mayRun && a !== null && b !== null ? await changesAlone({ ...who, a, b }) : null;
    return { ...page, alone };
  });
}

export const meta: Route.MetaFunction = ({ params }) => [{ title: `${params.caseNumber}, runs compared · Scorchline` }];

export default function RunComparison({ loaderData: { runs, a, b, view, mayRun, alone }, params }: Route.ComponentProps) {
  const { caseNumber } = params;
  const pathOf = (number: number) => href('/cases/:caseNumber/reconstructions/:number', { caseNumber, number: String(number) });
  return (
    <div className="space-y-8">
      <div className="space-y-2">
        <h2 className="font-serif text-title">{view ? view.heading : runs.length < 2 ? 'There is only one finished run, so nothing to compare' : 'Choose two finished runs'}</h2>
        <p data-print="no" className="text-small"><AppLink href={href('/cases/:caseNumber/reconstructions', { caseNumber })} className="inline-flex min-h-(--target-height) items-center">All runs</AppLink></p>
        {runs.length < 2 ? <p className="max-w-[64ch] text-second">Two runs are compared to see what a changed measurement does to the answer. Change a value, or ask for a run under another assumption; both runs stay.</p> : null}
        {runs.length > 1 ? <ChooseRuns runs={runs} a={a} b={b} /> : null}
      </div>
      {view ? <Compared view={view} pathOf={pathOf} alone={alone} aloneHref={mayRun && view.inputs.changed.length > 1 ? `?a=${a}&b=${b}&alone=yes#alone` : null} /> : null}
    </div>
  );
}

interface ComparedProps {
  readonly view: RunComparisonView;
  readonly pathOf: (number: number) => string;
  readonly alone: readonly ChangeAlone[] | null;
  /** Asks for the changes one by one; null where there is only one, or they may not be run. */
  readonly aloneHref: string | null;
}

function Compared({ view, pathOf, alone, aloneHref }: ComparedProps) {
  const window = {
    startUtc: [view.cardA, view.cardB].map((card) => card.window?.startUtc ?? card.fromUtc).toSorted()[0] ?? '',
    endUtc: [view.cardA, view.cardB].map((card) => card.window?.endUtc ?? card.toUtc).toSorted().at(-1) ?? '',
  };
  const span = headerSpan(window);
  const zone = zoneWords({ ...view.cardB, ...span });
  const changed = view.stretches.map((one) => ({ fromUtc: one.fromUtc, toUtc: one.toUtc, minutes: one.minutes, beforeWords: changeWords[one.before.verdict], afterWords: `now ${changeWords[one.after.verdict]}` }));
  return (
    <>
      <section aria-labelledby="both-cards" className="space-y-3">
        <SectionHeading id="both-cards" note="only minutes whose answer changed are bracketed">Both runs on one clock</SectionHeading>
        <TwoCards earlier={{ ...view.cardA, ...span }} later={{ ...view.cardB, ...span }} earlierName={`Run ${view.a.number}`} laterName={`Run ${view.b.number}`} changed={changed} />
        <p className="text-small text-second"><b className="font-semibold text-ink">{zone.date}</b>{zone.rest}</p>
        <div className="grid gap-x-10 gap-y-2 tablet:grid-cols-2">
          <p><AppLink href={pathOf(view.a.number)}>Run {view.a.number}</AppLink>, asked for {view.a.askedWords} by {view.a.askedBy}, engine {view.a.engineVersion}. {view.totalsA} {view.a.note}</p>
          <p><AppLink href={pathOf(view.b.number)}>Run {view.b.number}</AppLink>, asked for {view.b.askedWords} by {view.b.askedBy}, engine {view.b.engineVersion}. {view.totalsB} {view.b.note}</p>
        </div>
        <StretchTable view={view} />
      </section>
      <div className="grid gap-x-10 gap-y-8 [&>*]:min-w-0 desk:grid-cols-2">
        <div className="space-y-6">
          <InputTable view={view} />
          {alone || aloneHref ? <Alone view={view} alone={alone} href={aloneHref} /> : null}
        </div>
        <ResultTable view={view} />
      </div>
      <TestTable view={view} />
      <Caution><p className="max-w-[80ch]">{cautions.estimates}</p></Caution>
    </>
  );
}

/** What each change would have done by itself, beside what both runs found. */
function Alone({ view, alone, href: to }: Pick<ComparedProps, 'view' | 'alone'> & { readonly href: string | null }) {
  return (
    <section aria-labelledby="alone">
      <SectionHeading id="alone" note="worked out just now on the engine of today, not stored">If only one of them had changed</SectionHeading>
      {alone ? (
        <FactList layout="columns" facts={[{ term: `Run ${view.a.number}`, value: view.totalsA.split('. ')[0] ?? '' }, ...alone.map((one) => ({ term: `${one.label} alone`, value: one.words })), { term: `Run ${view.b.number}`, value: view.totalsB.split('. ')[0] ?? '' }]} />
      ) : to ? <p data-print="no"><AppLink href={to} className="inline-flex min-h-11 items-center desk:min-h-8">Work out each change by itself</AppLink></p> : null}
    </section>
  );
}
