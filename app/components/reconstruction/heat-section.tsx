import { TemperatureCurveFigure } from '#app/components/charts/temperature-curve.tsx';
import { plainNumber } from '#app/domain/plain-number.ts';
import { outcomeLabels } from '#app/domain/run-words.ts';
import { materialWords, secondsWords, temperatureNote } from '#app/domain/temperature-curve.ts';
import type { HeatingResult, TargetOutcome } from '#app/physics/model/heating.ts';
import { StackTable } from './stack-table.tsx';

export function HeatFigure({ heating }: { readonly heating: HeatingResult }) {
  return (
    <TemperatureCurveFigure
      figure="Fig. 8"
      title={`Surface of ${materialWords(heating.materialId)} under steady sun, °C`}
      points={heating.surfaceTemperatureC}
      outcomes={heating.outcomes.map((outcome) => ({ label: outcomeLabels[outcome.id], answer: outcome.answer, timeS: outcome.timeS }))}
      note={temperatureNote}
    />
  );
}

/** Each way to respond, with its own basis and sample size; none stands for another. */
export function OutcomeTable({ heating }: { readonly heating: HeatingResult }) {
  if (heating.outcomes.length === 0) return <p className="text-second">Nothing is on file for this material.</p>;
  return (
    <StackTable
      caption="Outcomes for the target"
      heads={['Outcome', 'Answer', 'Steady sun needed', 'Why', 'Basis and source']}
      columns="tablet:grid-cols-[6rem_5.5rem_7rem_minmax(0,1fr)_minmax(0,1fr)]"
      rows={heating.outcomes.map((outcome) => ({
        key: outcome.id,
        cells: [
          outcomeLabels[outcome.id],
          outcome.answer === 'cannot tell' ? "can't tell" : outcome.answer,
          <Seconds key="time" outcome={outcome} />,
          outcome.sentence,
          <Basis key="basis" outcome={outcome} />,
        ],
      }))}
    />
  );
}

function Seconds({ outcome }: { readonly outcome: TargetOutcome }) {
  if (!outcome.timeS) return 'no figure';
  return <>{secondsWords(outcome.timeS.mid)}<span className="block text-axis text-second">{secondsWords(outcome.timeS.low)} to {secondsWords(outcome.timeS.high)}</span></>;
}

function Basis({ outcome }: { readonly outcome: TargetOutcome }) {
  return <>{outcome.basis}{outcome.sampleSizeMm === null ? '' : `; samples of ${plainNumber(outcome.sampleSizeMm)} mm`}<span className="block text-axis text-second">{outcome.source.text}{outcome.source.verified ? '' : '; unverified'}</span></>;
}
