import { useRef, useState } from 'react';
import { ScrubBars } from '#app/components/burn-card/scrub-bar.tsx';
import { usePlayback } from '#app/components/burn-card/use-playback.ts';
import { clockWords } from '#app/components/burn-card/wall-clock.ts';
import { PlanFigure, SectionFigure } from '#app/components/charts/beam-figures.tsx';
import { PhotoTrailFigure } from '#app/components/charts/photo-trail.tsx';
import { TrailFigure } from '#app/components/charts/trail.tsx';
import { cautions } from '#app/components/layout/cautions.ts';
import { Columns } from '#app/components/layout/page.tsx';
import { Caution } from '#app/components/ui/caution.tsx';
import { FigureFilesContext } from '#app/components/ui/figure-files.ts';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import type { RunPageView } from '#app/domain/run-page.ts';
import type { RunView } from '#app/domain/run-view.ts';
import { BeamFigure, FocusSection } from './focus-section.tsx';
import { FourTests } from './four-tests.tsx';
import { HeatFigure, OutcomeTable } from './heat-section.tsx';
import { InputsColumn } from './inputs-column.tsx';
import { LightIntervals } from './light-intervals.tsx';
import { ReturnsSection } from './returns-section.tsx';
import { CheckTable, RuleOut } from './rule-out.tsx';
import { RunCard, runCardModel } from './run-card.tsx';
import { IrradianceSection, SunSection } from './sky-section.tsx';

export interface RunBodyProps {
  readonly page: RunPageView;
  readonly view: RunView;
  readonly label: string;
  readonly words: { readonly start: readonly string[]; readonly end: readonly string[] } | null;
  /** Address of the run; its figures lie under it as files. */
  readonly href: string;
}

/** Card on top, then inputs beside figures, tests, irradiance and heat, returns, and what would rule it out. */
export function RunBody({ page, view, label, words, href }: RunBodyProps) {
  const card = useRef<HTMLDivElement>(null);
  const bestUtc = view.result.best?.atUtc ?? null;
  const [cursorUtc, setCursorUtc] = useState(bestUtc ?? view.minutes[0]?.atUtc ?? null);
  const playback = usePlayback(view.minutes.length, view.minutes.findIndex((minute) => minute.atUtc === cursorUtc), (index) => setCursorUtc(view.minutes[index]?.atUtc ?? cursorUtc));
  const scrub = {
    playing: playback.playing,
    onPlay: playback.toggle,
    // A hand on the line stops it.
    onMinute: (atUtc: string) => {
      playback.pause();
      setCursorUtc(atUtc);
    },
  };
  const { result } = view;
  const beam = view.beam ? { beam: view.beam, minutes: view.minutes, cursorUtc, bestUtc, zone: page.zone } : null;
  const clock = result.best ? clockWords(result.best.atUtc, page.zone) : null;
  return (
    <FigureFilesContext value={`${href}/figures`}>
    <div className={`space-y-6 ${view.scrubs ? 'max-tablet:pb-20' : ''}`}>
      <div ref={card}><RunCard view={view} label={label} words={words} cursorUtc={cursorUtc} {...scrub} /></div>
      {view.scrubs && cursorUtc ? <ScrubBars card={card} model={runCardModel(view)} minutes={view.minutes} atUtc={cursorUtc} {...scrub} /> : null}
      {result.warnings.length > 0 ? <Caution title="Read this first"><ul className="list-disc pl-5">{result.warnings.map((warning) => <li key={warning}>{warning}</li>)}</ul></Caution> : null}
      <Columns
        sideFirst
        sideLabel="Inputs of this run"
        side={
          // A frame that scrolls must take the keyboard, or its lower part is out of reach without a mouse.
          // eslint-disable-next-line jsx-a11y/no-noninteractive-tabindex
          <div role="region" aria-label="Inputs and assumptions" tabIndex={0} className="desk:sticky desk:top-[98px] desk:max-h-[calc(100vh-110px)] desk:overflow-y-auto desk:pr-2">
            <InputsColumn view={view} sceneVersion={page.line.sceneVersion} changes={page.changes} />
          </div>
        }
      >
        <div className="space-y-8">
          <div className="grid gap-x-8 gap-y-6 [&>*]:min-w-0 tablet:grid-cols-2 print:grid-cols-1">
            <SunSection view={view} zone={page.zone} cursorUtc={cursorUtc} />
            {beam ? <SectionFigure figure="Fig. 2" {...beam} /> : null}
            {beam ? <PlanFigure figure="Fig. 3" {...beam} /> : null}
            {beam?.beam.mark ? <TrailFigure figure="Fig. 4" {...beam} spotMm={result.focus?.spotDiameterMm.mid ?? null} /> : null}
            {beam?.beam.mark && page.photo ? <PhotoTrailFigure figure="Fig. 4b" {...beam} photo={page.photo} /> : null}
            {beam?.beam.mark && !page.photo ? <p className="text-small text-second" data-print="no">The way of the spot cannot be laid over a photo yet: measure the mark on a square-on photo, by a scale or a rectangle of known size in it.</p> : null}
          </div>
          <FourTests tests={result.tests} />
          {result.light ? <LightIntervals light={result.light} zone={page.zone} /> : null}
          {result.focus && clock ? <FocusSection focus={result.focus} rings={view.rings} clock={clock} beam={view.beam} bestUtc={bestUtc} /> : null}
          <div className="grid gap-x-8 gap-y-6 [&>*]:min-w-0 tablet:grid-cols-2 print:grid-cols-1">
            {result.focus ? <BeamFigure focus={result.focus} markDistanceM={view.markDistanceM} /> : null}
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
    </FigureFilesContext>
  );
}
