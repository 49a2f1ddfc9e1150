import { useState } from 'react';
import { clockWords } from '#app/components/burn-card/wall-clock.ts';
import { cautions } from '#app/components/layout/cautions.ts';
import { Columns } from '#app/components/layout/page.tsx';
import { Caution } from '#app/components/ui/caution.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import type { RunPageView } from '#app/domain/run-page.ts';
import type { RunView } from '#app/domain/run-view.ts';
import { BeamFigure, FocusSection } from './focus-section.tsx';
import { FourTests } from './four-tests.tsx';
import { HeatFigure, OutcomeTable } from './heat-section.tsx';
import { InputsColumn } from './inputs-column.tsx';
import { ReturnsSection } from './returns-section.tsx';
import { CheckTable, RuleOut } from './rule-out.tsx';
import { RunCard } from './run-card.tsx';
import { IrradianceSection, SunSection } from './sky-section.tsx';

export interface RunBodyProps {
  readonly page: RunPageView;
  readonly view: RunView;
  readonly label: string;
  readonly words: { readonly start: readonly string[]; readonly end: readonly string[] } | null;
}

/** Card on top, then inputs beside figures, tests, irradiance and heat, returns, and what would rule it out. */
export function RunBody({ page, view, label, words }: RunBodyProps) {
  const [cursorUtc, setCursorUtc] = useState<string | null>(view.result.best?.atUtc ?? null);
  const { result } = view;
  const clock = result.best ? clockWords(result.best.atUtc, page.zone) : null;
  return (
    <div className="space-y-6">
      <RunCard view={view} label={label} words={words} onMinute={setCursorUtc} />
      {result.warnings.length > 0 ? <Caution title="Read this first"><ul className="list-disc pl-5">{result.warnings.map((warning) => <li key={warning}>{warning}</li>)}</ul></Caution> : null}
      <Columns
        sideFirst
        sideLabel="Inputs of this run"
        side={
          // A frame that scrolls must take the keyboard, or its lower part is out of reach without a mouse.
          // eslint-disable-next-line jsx-a11y/no-noninteractive-tabindex
          <div role="region" aria-label="Inputs and assumptions" tabIndex={0} className="desk:sticky desk:top-3 desk:max-h-[calc(100vh-1.5rem)] desk:overflow-y-auto desk:pr-2">
            <InputsColumn view={view} sceneVersion={page.line.sceneVersion} changes={page.changes} />
          </div>
        }
      >
        <div className="space-y-8">
          <div className="grid gap-x-8 gap-y-6 [&>*]:min-w-0 tablet:grid-cols-2">
            <SunSection view={view} zone={page.zone} cursorUtc={cursorUtc} />
            {result.focus ? <BeamFigure focus={result.focus} markDistanceM={view.markDistanceM} /> : null}
          </div>
          <FourTests tests={result.tests} />
          {result.focus && clock ? <FocusSection focus={result.focus} rings={view.rings} clock={clock} /> : null}
          <div className="grid gap-x-8 gap-y-6 [&>*]:min-w-0 tablet:grid-cols-2">
            <IrradianceSection view={view} zone={page.zone} clock={clock} />
            {result.heating ? <HeatFigure heating={result.heating} /> : null}
          </div>
          {result.heating ? (
            <section aria-labelledby="outcomes">
              <SectionHeading id="outcomes" note="separate answers, each with its own basis">What the target may do</SectionHeading>
              <OutcomeTable heating={result.heating} />
            </section>
          ) : null}
          <ReturnsSection view={view} zone={page.zone} />
          <RuleOut checks={result.checks} />
          <CheckTable checks={result.checks} />
          <Caution><p className="max-w-[80ch]">{cautions.estimates}</p><p className="max-w-[80ch] pt-1.5">{cautions.defer}</p></Caution>
        </div>
      </Columns>
    </div>
  );
}
