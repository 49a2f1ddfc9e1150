import { MarginRuler } from '#app/components/charts/margin-ruler.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import { TestMark } from '#app/components/ui/test-mark.tsx';
import { testLabels } from '#app/domain/hypothesis.ts';
import type { TestSummary } from '#app/physics/model/tests.ts';

/** Each test alone: result, why, and its margin in its own unit. There is no total. */
export function FourTests({ tests }: { readonly tests: readonly TestSummary[] }) {
  return (
    <section aria-labelledby="four-tests">
      <SectionHeading id="four-tests" note="Each stands alone. There is no total.">Four tests</SectionHeading>
      <div role="table" aria-label="Four tests">
        <div role="rowgroup" className="max-tablet:sr-only">
          <div role="row" className="grid grid-cols-[7rem_8.5rem_minmax(0,1fr)_minmax(10rem,15rem)] gap-x-4 border-b-[1.5px] border-ink pb-1.5 text-axis font-semibold text-second">
            <span role="columnheader">Test</span>
            <span role="columnheader">Result</span>
            <span role="columnheader">Why</span>
            <span role="columnheader">Margin. Diamond: value and range; pale: what would agree</span>
          </div>
        </div>
        <div role="rowgroup">
          {tests.map((test) => (
            <div key={test.test} role="row" className="avoid-break grid items-start gap-x-4 gap-y-2 border-b border-hair py-3 max-tablet:grid-cols-2 tablet:grid-cols-[7rem_8.5rem_minmax(0,1fr)_minmax(10rem,15rem)]">
              <span role="rowheader" className="font-semibold">{testLabels[test.test]}</span>
              <span role="cell" className="max-tablet:justify-self-end"><TestMark result={test.result} /></span>
              <span role="cell" className="max-tablet:col-span-2">{test.sentence}</span>
              <span role="cell" className="max-tablet:col-span-2">
                {test.margin ? <Margin test={test} margin={test.margin} /> : <span className="text-small text-second">no margin in numbers</span>}
              </span>
            </div>
          ))}
        </div>
      </div>
    </section>
  );
}

/** The ruler carries the unit alone; what it measures stands under it. */
function Margin({ test, margin }: { readonly test: TestSummary; readonly margin: NonNullable<TestSummary['margin']> }) {
  const [unit = margin.unit, ...rest] = margin.unit.split(' ');
  return (
    <>
      <MarginRuler {...margin} unit={unit} log={test.test === 'energy'} label={`${testLabels[test.test]}, ${rest.join(' ')}`} />
      {rest.length > 0 ? <span className="block text-axis text-second">{unit} {rest.join(' ')}</span> : null}
    </>
  );
}
