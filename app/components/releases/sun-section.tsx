import { CaptionedBurnCard } from '#app/components/burn-card/burn-card.tsx';
import { headerSpan } from '#app/components/burn-card/model.ts';
import { SunPathFigure } from '#app/components/charts/sun-path.tsx';
import { Caution } from '#app/components/ui/caution.tsx';
import { Cell, DataTable, HeadCell, Row, TableHead } from '#app/components/ui/data-table.tsx';
import { FactList } from '#app/components/ui/fact-list.tsx';
import { TestMark } from '#app/components/ui/test-mark.tsx';
import type { CardView } from '#app/domain/case-card.ts';
import type { ReleaseDocument, SunPart } from '#app/domain/release-document.ts';
import { noWeatherWords } from '#app/domain/weather-part.ts';
import { DocumentSection, PartHeading } from './document-section.tsx';
import { RedactedWords } from './redacted-words.tsx';

/** The card of the window at the head of the document. */
export function ReleasedCard({ card, caseNumber }: { readonly card: CardView; readonly caseNumber: number }) {
  const span = card.window ? headerSpan(card.window) : { fromUtc: card.fromUtc, toUtc: card.toUtc };
  return <CaptionedBurnCard model={{ ...card, ...span }} size="L" label={`Case ${caseNumber}`} />;
}

export function SunSection({ sun, weather, zone, number }: { readonly sun: SunPart | null; readonly weather: ReleaseDocument['weather']; readonly zone: string; readonly number: number }) {
  if (!sun) {
    return (
      <DocumentSection id="sun" title={`${number}. Sun and weather`}>
        <p className="text-second">No reconstruction is attached to the case.</p>
      </DocumentSection>
    );
  }
  return (
    <DocumentSection id="sun" title={`${number}. Sun and weather`}>
      <p className="font-serif text-account">{sun.heading}: {sun.totals}.</p>
      <p className="pt-1 text-second">{sun.because}</p>
      {sun.reasons.length > 0 ? <ul className="list-disc pl-5">{sun.reasons.map((reason) => <li key={reason}>{reason}</li>)}</ul> : null}
      <PartHeading>Four tests by the engine, each on its own</PartHeading>
      <ul>
        {sun.tests.map((test) => (
          <li key={test.label} className="grid gap-x-4 border-b border-hair py-2 tablet:grid-cols-[9rem_1fr]">
            <TestMark result={test.result} label={test.label} />
            <span>{test.sentence}</span>
          </li>
        ))}
      </ul>
      {sun.minutes.length > 1 ? (
        <div className="pt-6">
          <SunPathFigure title="Path of the sun through the window, apparent altitude" zone={zone} minutes={sun.minutes} note="Every minute of the window that is not night, thinned where the window is long." />
        </div>
      ) : null}
      <Weather weather={weather} />
      {sun.numbers.length > 0 ? (
        <>
          <PartHeading>Numbers</PartHeading>
          <FactList layout="columns" facts={sun.numbers} />
        </>
      ) : null}
      <Returns sun={sun} />
      <Assumed sun={sun} />
      <div className="pt-4">
        <Caution>
          <p>Estimates from the values entered. Not a certificate, design approval, legal cause, or proof that a place is safe.</p>
        </Caution>
      </div>
    </DocumentSection>
  );
}

/** The record that the run went by, and its values in the window; the file holds them all. */
function Weather({ weather }: { readonly weather: ReleaseDocument['weather'] }) {
  if (weather === null) return null;
  return (
    <>
      <PartHeading>Weather</PartHeading>
      {weather === 'clear-sky' ? <p className="max-w-[64ch] text-second">{noWeatherWords}</p> : (
        <>
          <p className="max-w-[64ch] pb-2"><RedactedWords text={weather.lead} /> {weather.limits.join(' ')}</p>
          <DataTable caption={weather.table.caption} captionShown className={weather.table.head.length > 4 ? 'min-w-[38rem]' : ''}>
            <TableHead>{weather.table.head.map((head, index) => <HeadCell key={head} numeric={index > 1}>{head}</HeadCell>)}</TableHead>
            <tbody>
              {weather.table.rows.map((row, index) => (
                <Row key={index} tight>{row.map((cell, place) => <Cell key={place} numeric={place > 1} className={place < 2 ? 'whitespace-nowrap' : ''}>{cell}</Cell>)}</Row>
              ))}
            </tbody>
          </DataTable>
          {weather.table.further > 0 ? <p className="pt-1 text-small text-second">{weather.table.further} further {weather.table.further === 1 ? 'value stands' : 'values stand'} in the file.</p> : null}
        </>
      )}
    </>
  );
}

function Returns({ sun }: { readonly sun: SunPart }) {
  if (sun.returns.length === 0) return null;
  return (
    <>
      <PartHeading>When the same alignment comes back</PartHeading>
      <DataTable caption="Days on which the alignment comes back">
        <TableHead><HeadCell>Days</HeadCell><HeadCell>Closest</HeadCell><HeadCell numeric>Minutes in all</HeadCell></TableHead>
        <tbody>
          {sun.returns.map((one) => (
            <Row key={one.days} tight>
              <Cell>{one.days}</Cell>
              <Cell>{one.best}</Cell>
              <Cell numeric>{one.minutes}</Cell>
            </Row>
          ))}
        </tbody>
      </DataTable>
    </>
  );
}

function Assumed({ sun }: { readonly sun: SunPart }) {
  return (
    <>
      {sun.warnings.length > 0 ? (
        <>
          <PartHeading>To know before using the numbers</PartHeading>
          <ul className="list-disc pl-5">{sun.warnings.map((warning) => <li key={warning}>{warning}</li>)}</ul>
        </>
      ) : null}
      <PartHeading>Assumed by the engine</PartHeading>
      <FactList layout="columns" facts={sun.assumptions} />
      <p className="pt-2 text-small text-second">{sun.engineWords}</p>
      <dl className="text-small">
        {sun.hashes.map((hash) => (
          <div key={hash.label} className="flex flex-wrap gap-x-3">
            <dt className="text-second">{hash.label}, SHA-256</dt>
            <dd className="min-w-0 font-mono text-axis break-all">{hash.sha256}</dd>
          </div>
        ))}
      </dl>
    </>
  );
}
