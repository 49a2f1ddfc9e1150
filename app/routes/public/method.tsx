import type { Route } from './+types/method';
import { IrradianceDayFigure } from '#app/components/charts/irradiance-day.tsx';
import { cautions } from '#app/components/layout/cautions.ts';
import { Page } from '#app/components/layout/page.tsx';
import { MethodPartSection } from '#app/components/reconstruction/method-part.tsx';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { Caution } from '#app/components/ui/caution.tsx';
import { Cell, DataTable, HeadCell, Row, TableHead } from '#app/components/ui/data-table.tsx';
import { PageTitle } from '#app/components/ui/page-title.tsx';
import { methodParts } from '#app/domain/method-models.ts';
import { methodFigures } from '#app/domain/method-page.ts';
import type { MethodFigures } from '#app/domain/method-page.ts';
import { engineVersion } from '#app/physics/model/engine-version.ts';

export function loader() {
  return { figures: methodFigures(), engineVersion };
}

export const meta: Route.MetaFunction = () => [
  { title: 'How we compute · Scorchline' },
  { name: 'description', content: 'Each model of the engine: where it holds, how it was tested, its sources and its limits.' },
];

export default function Method({ loaderData }: Route.ComponentProps) {
  const { figures } = loaderData;
  return (
    <Page>
      <PageTitle below={`Engine ${loaderData.engineVersion}. Every figure on this page is computed when you open it.`}>Each number comes from a stated model, tested against the outside</PageTitle>
      <div className="gap-x-12 desk:grid desk:grid-cols-[14rem_minmax(0,1fr)]">
        <nav aria-label="On this page" className="pb-4 desk:sticky desk:top-4 desk:self-start">
          <ul className="border-t-[1.5px] border-ink">
            {methodParts.map((part) => <li key={part.id} className="border-b border-hair"><AppLink href={`#${part.id}`} className="flex min-h-11 items-center desk:min-h-9">{part.title}</AppLink></li>)}
            <li className="border-b border-hair"><AppLink href="#cautions" className="flex min-h-11 items-center desk:min-h-9">Cautions</AppLink></li>
          </ul>
        </nav>
        <div className="min-w-0 space-y-10">
          {methodParts.map((part) => (
            <MethodPartSection key={part.id} part={part}>{part.id === 'sky' ? <SkyFigures figures={figures} /> : null}</MethodPartSection>
          ))}
          <section id="cautions" aria-labelledby="cautions-heading" className="space-y-3">
            <h2 id="cautions-heading" className="font-serif text-title">Cautions</h2>
            <Caution>
              <div className="max-w-[80ch] space-y-1.5">
                <p>{cautions.estimates}</p>
                <p>{cautions.defer}</p>
                <p>{cautions.noReenactment}</p>
                <p>{cautions.eyes}</p>
              </div>
            </Caution>
          </section>
        </div>
      </div>
    </Page>
  );
}

function SkyFigures({ figures }: { readonly figures: MethodFigures }) {
  return (
    <div className="grid gap-x-8 gap-y-6 [&>*]:min-w-0 tablet:grid-cols-2">
      <IrradianceDayFigure
        title="A cloudless day as measured, with the models, W/m²"
        zone={figures.zone}
        fromUtc={figures.fromUtc}
        toUtc={figures.toUtc}
        bound={figures.bound}
        likely={figures.likely}
        measured={figures.measured}
        measuredName="measured"
        note={`${figures.source}; one minute in ten is drawn. Dashed: clean-air bound. Thin: likely value, clean dry mountain air. From 9 to 15 o’clock the measured values reach ${figures.leastPercent} to ${figures.greatestPercent} % of the bound.`}
      />
      <div className="space-y-6">
        <section>
          <h3 className="pb-1 text-body font-semibold">Two models and the bound by height of the sun</h3>
          <DataTable caption="Direct irradiance in temperate rural air at sea level, mean distance of the sun" captionShown>
            <TableHead>
              <HeadCell>Altitude, °</HeadCell>
              <HeadCell numeric>Bird, W/m²</HeadCell>
              <HeadCell numeric>Ineichen and Perez, W/m²</HeadCell>
              <HeadCell numeric>Bound, W/m²</HeadCell>
            </TableHead>
            <tbody>{figures.models.map((row) => <Row key={row.elevationDeg} tight><Cell heading className="!font-normal">{row.elevationDeg}</Cell><Cell numeric>{row.birdWm2}</Cell><Cell numeric>{row.ineichenWm2}</Cell><Cell numeric>{row.boundWm2}</Cell></Row>)}</tbody>
          </DataTable>
        </section>
        <section>
          <h3 className="pb-1 text-body font-semibold">Air of the climate classes</h3>
          <DataTable caption="Medians as stated, unverified" captionShown>
            <TableHead>
              <HeadCell>Class</HeadCell>
              <HeadCell numeric>Haze at 500 nm</HeadCell>
              <HeadCell numeric>Water, cm</HeadCell>
            </TableHead>
            <tbody>{figures.air.map((row) => <Row key={row.name} tight><Cell heading className="!font-normal">{row.name}</Cell><Cell numeric>{row.aod500}</Cell><Cell numeric>{row.waterCm}</Cell></Row>)}</tbody>
          </DataTable>
        </section>
      </div>
    </div>
  );
}
