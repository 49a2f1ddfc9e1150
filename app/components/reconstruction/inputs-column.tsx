import { TornadoFigure } from '#app/components/charts/tornado.tsx';
import { FactList } from '#app/components/ui/fact-list.tsx';
import { plainNumber } from '#app/domain/plain-number.ts';
import type { RunPageView } from '#app/domain/run-page.ts';
import type { RunView } from '#app/domain/run-view.ts';
import type { SamplingResult } from '#app/physics/model/sampling.ts';

export interface InputsColumnProps {
  readonly view: RunView;
  readonly sceneVersion: number | null;
  readonly changes: RunPageView['changes'];
}

/** What went into the run, what was assumed, and what moves the answer most. */
export function InputsColumn({ view, sceneVersion, changes }: InputsColumnProps) {
  return (
    <div>
      <div className="flex items-baseline justify-between border-t-2 border-ink pt-2 pb-1">
        <h2 className="text-group font-semibold">Inputs</h2>
        <span className="text-small text-second">{sceneVersion === null ? 'no measurements yet' : `measurements, version ${sceneVersion}`}</span>
      </div>
      <div className="gap-x-8 tablet:max-desk:columns-3">
        {view.inputs.map((group) => (
          <section key={group.heading} className="avoid-break pb-3">
            <h3 className="border-b-[1.5px] border-ink pb-0.5 font-serif text-group">{group.heading}</h3>
            <FactList layout="columns" facts={group.facts} />
          </section>
        ))}
        <section className="avoid-break pb-3">
          <h3 className="border-b-[1.5px] border-ink pb-0.5 font-serif text-group">Assumed, not measured</h3>
          {view.assumptions.length === 0 ? <p className="py-2 text-small text-second">Nothing.</p> : null}
          <FactList layout="columns" facts={view.assumptions.map((one) => ({ term: one.label, value: one.value, note: `${one.source}${one.verified ? '' : '; unverified'}` }))} />
        </section>
      </div>
      {changes ? <Changes changes={changes} /> : null}
      {view.result.sampling ? <Sampling sampling={view.result.sampling} baseKwm2={asEntered(view)} /> : null}
    </div>
  );
}

function Changes({ changes }: { readonly changes: NonNullable<RunPageView['changes']> }) {
  const facts = [...changes.inputs, ...(changes.sunlit ? [{ term: 'Sunlit', value: changes.sunlit }] : [])];
  return (
    <section className="pb-3">
      <h3 className="border-b-[1.5px] border-ink pb-0.5 font-serif text-group">Changed since run {changes.since}</h3>
      {facts.length === 0 ? <p className="py-2 text-small text-second">Nothing in the inputs.</p> : <FactList layout="columns" facts={facts} />}
    </section>
  );
}

// Counts, not percentages: a share of samples must not be read as the likelihood of a cause.
const countWords = (share: number, samples: number): string => `${Math.round(share * samples).toLocaleString('en-GB')} of ${samples.toLocaleString('en-GB')}`;

/** Flux on 5 mm at the mark with every input as entered, about which the inputs are moved. */
function asEntered({ result }: RunView): number | null {
  return result.focus?.discs.find((disc) => disc.disc === '5 mm' && disc.centre === 'mark')?.fluxKwm2.mid ?? null;
}

function Sampling({ sampling, baseKwm2 }: { readonly sampling: SamplingResult; readonly baseKwm2: number | null }) {
  const over = sampling.fluxOver.filter((row) => row.share > 0);
  return (
    <div className="space-y-3 pb-3">
      {sampling.tornado.length > 0 ? (
        <TornadoFigure
          title="What moves the answer most"
          rows={sampling.tornado.map((bar) => ({ name: bar.input, low: bar.lowKwm2, high: bar.highKwm2 }))}
          base={baseKwm2 ?? sampling.fluxKwm2.mid}
          unit="kW/m²"
          note="Flux on a 5 mm disc at the mark when one input moves by one sigma and the rest stay."
        />
      ) : null}
      <section>
        <h3 className="border-b-[1.5px] border-ink pb-0.5 font-serif text-group">Uncertainty</h3>
        <FactList
          layout="columns"
          facts={[
            { term: 'Samples whose focus reaches the mark', value: countWords(sampling.alignedShare, sampling.samples), note: 'of the stated uncertainties; not a likelihood of cause' },
            { term: 'Focus beside the mark', value: `${plainNumber(sampling.missLateralMm.mid)} mm`, note: `5 to 95: ${plainNumber(sampling.missLateralMm.low)} to ${plainNumber(sampling.missLateralMm.high)}` },
            { term: 'Flux on 5 mm', value: `${plainNumber(sampling.fluxKwm2.mid)} kW/m²`, note: `5 to 95: ${plainNumber(sampling.fluxKwm2.low)} to ${plainNumber(sampling.fluxKwm2.high)}` },
            ...over.map((row) => ({ term: `Samples over ${plainNumber(row.thresholdKwm2)} kW/m²`, value: countWords(row.share, sampling.samples) })),
            ...(typeof sampling.ignitedWithinDwellShare === 'number'
              ? [{ term: 'Samples in which a 100 mm piece with a spark would ignite while the spot rests', value: countWords(sampling.ignitedWithinDwellShare, sampling.samples), note: 'a small spot without a spark needs more' }]
              : []),
            { term: 'Median still moves by', value: `${plainNumber(sampling.convergenceKwm2)} kW/m²`, note: 'from half of the samples to all of them' },
            ...(sampling.table ? [{ term: 'Read from', value: `${sampling.table.traces} traces`, note: `${sampling.table.raysEach.toLocaleString('en-GB')} rays each, over ${sampling.table.axes.filter((axis) => axis.nodes.length > 1).map((axis) => axis.axis).join('; ')}` }] : []),
          ]}
        />
      </section>
    </div>
  );
}
