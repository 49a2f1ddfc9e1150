import { plainNumber } from '#app/components/charts/number-table.tsx';
import { TemperatureCurveFigure } from '#app/components/charts/temperature-curve.tsx';
import { Cell, DataTable, HeadCell, Row, TableHead } from '#app/components/ui/data-table.tsx';
import { outcomeLabels } from '#app/domain/run-words.ts';
import { targetMaterialLabels, targetMaterials } from '#app/domain/scene.ts';
import type { HeatingResult } from '#app/physics/model.ts';

/** "curtain fabric", or the engine's own id where the register has no word for it. */
function materialWords(id: string): string {
  const known = targetMaterials.find((material) => material === id);
  return (known ? targetMaterialLabels[known] : id).toLowerCase();
}

export function HeatFigure({ heating }: { readonly heating: HeatingResult }) {
  return (
    <TemperatureCurveFigure
      figure="Fig. 5"
      title={`Surface of ${materialWords(heating.materialId)} under steady sun, °C`}
      points={heating.surfaceTemperatureC}
      outcomes={heating.outcomes.map((outcome) => ({ label: outcomeLabels[outcome.id], answer: outcome.answer, timeS: outcome.timeS }))}
      note="Steady sun on one point, 5 mm disc on the hot spot; band from low to high. Small spots lose heat fast, so the curve is an estimate, not a measurement."
    />
  );
}

const secondsWords = (value: number): string => (value >= 5400 ? `${plainNumber(value / 3600)} h` : value >= 120 ? `${plainNumber(value / 60)} min` : `${plainNumber(value)} s`);

/** Each way to respond, with its own basis and sample size; none stands for another. */
export function OutcomeTable({ heating }: { readonly heating: HeatingResult }) {
  if (heating.outcomes.length === 0) return <p className="text-second">Nothing is on file for this material.</p>;
  return (
    <DataTable caption="What the target may do">
      <TableHead>
        <HeadCell>Outcome</HeadCell>
        <HeadCell>Answer</HeadCell>
        <HeadCell numeric>Steady sun needed</HeadCell>
        <HeadCell>Why</HeadCell>
        <HeadCell>Basis and source</HeadCell>
      </TableHead>
      <tbody>
        {heating.outcomes.map((outcome) => (
          <Row key={outcome.id}>
            <Cell heading>{outcomeLabels[outcome.id]}</Cell>
            <Cell>{outcome.answer === 'cannot tell' ? "can't tell" : outcome.answer}</Cell>
            <Cell numeric note={outcome.timeS ? `${secondsWords(outcome.timeS.low)} to ${secondsWords(outcome.timeS.high)}` : undefined}>{outcome.timeS ? secondsWords(outcome.timeS.mid) : 'none'}</Cell>
            <Cell className="min-w-48">{outcome.sentence}</Cell>
            <Cell className="min-w-48" note={`${outcome.source.text}${outcome.source.verified ? '' : '; unverified'}`}>{outcome.basis}{outcome.sampleSizeMm === null ? '' : `; samples of ${plainNumber(outcome.sampleSizeMm)} mm`}</Cell>
          </Row>
        ))}
      </tbody>
    </DataTable>
  );
}
