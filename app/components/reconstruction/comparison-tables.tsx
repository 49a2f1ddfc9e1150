import { MarginRuler } from '#app/components/charts/margin-ruler.tsx';
import { clockWords, dateWords, localDate } from '#app/components/burn-card/wall-clock.ts';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import { TestMark } from '#app/components/ui/test-mark.tsx';
import type { ChangedStretch, RunComparisonView, TestComparison, TestSide, Verdict } from '#app/domain/run-comparison.ts';
import { StackTable } from './stack-table.tsx';

export const changeWords: Record<Verdict, string> = { sunlit: 'sunlit', 'not-sunlit': 'not sunlit', 'cannot-tell': "can't tell", 'not-examined': 'not examined' };
const nameOf = (number: number): string => `Run ${number}`;
const withUnit = (value: string, unit: string): string => {
  if (unit === '' || value === 'not given' || value === 'none') return value;
  return `${value}${unit === '°' ? '' : ' '}${unit === 'days' && /^[+−]?1$/u.test(value) ? 'day' : unit}`;
};

/** Minutes with another answer, old and new with their reasons. */
export function StretchTable({ view }: { readonly view: RunComparisonView }) {
  const { stretches, zone } = view;
  if (stretches.length === 0) return <p>Every minute has the same answer in both.</p>;
  const days = new Set(stretches.map((one) => localDate(one.fromUtc, zone)));
  const moment = (utc: string) => `${days.size > 1 ? `${dateWords(localDate(utc, zone), false)} ` : ''}${clockWords(utc, zone)}`;
  const told = ({ verdict, reasonWords }: ChangedStretch['before']) => <>{changeWords[verdict]}{verdict === 'sunlit' ? null : <span className="block text-axis font-normal text-second">{reasonWords}</span>}</>;
  return (
    <StackTable
      caption="Minutes that changed their answer"
      heads={['From, to', 'Minutes', nameOf(view.a.number), nameOf(view.b.number)]}
      columns="tablet:grid-cols-[10rem_5rem_minmax(0,1fr)_minmax(0,1fr)]"
      rows={stretches.map((one) => ({ key: one.fromUtc, cells: [`${moment(one.fromUtc)} to ${moment(one.toUtc)}`, String(one.minutes), told(one.before), <b key="after" className="font-semibold">{told(one.after)}</b>] }))}
    />
  );
}

/** Fields of the input that differ; what is the same is a count. */
export function InputTable({ view }: { readonly view: RunComparisonView }) {
  const { changed, same } = view.inputs;
  const engine = view.engineChanged ? [{ key: 'engine', cells: ['Engine', view.a.engineVersion, <b key="b" className="font-semibold">{view.b.engineVersion}</b>, ''] }] : [];
  const scene = view.a.sceneVersion === view.b.sceneVersion ? [] : [{ key: 'scene', cells: ['Version of the measurements', String(view.a.sceneVersion ?? 'none'), <b key="b" className="font-semibold">{view.b.sceneVersion ?? 'none'}</b>, ''] }];
  const rows = [
    ...changed.map((one) => ({
      key: `${one.group} ${one.field}`,
      cells: [<>{one.group}<span className="block text-axis font-normal text-second">{one.field}</span></>, withUnit(one.before, one.unit), <b key="after" className="font-semibold">{withUnit(one.after, one.unit)}</b>, one.difference ? withUnit(one.difference, one.unit) : ''],
    })),
    ...scene,
    ...engine,
  ];
  return (
    <section aria-labelledby="inputs-differ">
      <SectionHeading id="inputs-differ" note={`${same} more ${same === 1 ? 'value is' : 'values are'} the same in both`}>Inputs and engine that differ</SectionHeading>
      {rows.length === 0 ? <p>Every input is the same, and so is the engine.</p> : <StackTable caption="Inputs that differ" heads={['Field', nameOf(view.a.number), nameOf(view.b.number), 'Difference']} columns="tablet:grid-cols-[minmax(0,1.4fr)_minmax(0,1fr)_minmax(0,1fr)_7rem]" rows={rows} />}
    </section>
  );
}

/** Results side by side; those that changed are bold and come first. */
export function ResultTable({ view }: { readonly view: RunComparisonView }) {
  const rows = view.results.toSorted((x, y) => Number(y.changed) - Number(x.changed));
  return (
    <section aria-labelledby="results-differ">
      <SectionHeading id="results-differ" note={view.sameBytes ? 'both results are the same to the byte' : 'changed ones first'}>Results side by side</SectionHeading>
      <StackTable
        caption="Results of both runs"
        heads={['Result', nameOf(view.a.number), nameOf(view.b.number), 'Difference']}
        columns="tablet:grid-cols-[minmax(0,1.4fr)_minmax(0,1fr)_minmax(0,1fr)_7rem]"
        rows={rows.map((one) => ({
          key: one.term,
          cells: [one.term, withUnit(one.before, one.unit), one.changed ? <b key="after" className="font-semibold">{withUnit(one.after, one.unit)}</b> : <span key="after">{withUnit(one.after, one.unit)} <span className="text-axis text-second">same</span></span>, one.difference ? withUnit(one.difference, one.unit) : ''],
        }))}
      />
    </section>
  );
}

/** Each test in both runs, with its margin in its own unit. */
export function TestTable({ view }: { readonly view: RunComparisonView }) {
  const same = view.tests.filter((one) => !one.changed);
  const changed = view.tests.filter((one) => one.changed);
  return (
    <section aria-labelledby="tests-differ">
      <SectionHeading id="tests-differ" note={same.length > 0 ? `the same in both: ${same.map((one) => one.label.toLowerCase()).join(', ')}` : undefined}>Tests that differ</SectionHeading>
      {changed.length === 0 ? <p>None of the four tests changed.</p> : (
        <StackTable
          caption="Tests that differ"
          heads={['Test', nameOf(view.a.number), nameOf(view.b.number)]}
          columns="tablet:grid-cols-[7rem_minmax(0,1fr)_minmax(0,1fr)]"
          rows={changed.map((one) => ({ key: one.test, cells: [one.label, <Side key="a" side={one.before} test={one} />, <Side key="b" side={one.after} test={one} />] }))}
        />
      )}
    </section>
  );
}

function Side({ side, test }: { readonly side: TestSide; readonly test: TestComparison }) {
  const [unit = '', ...rest] = (side.margin?.unit ?? '').split(' ');
  return (
    <div className="space-y-1">
      <TestMark result={side.result} />
      <p>{side.sentence}</p>
      {side.margin ? <><MarginRuler {...side.margin} unit={unit} log={test.test === 'energy'} label={`${test.label}, ${rest.join(' ')}`} />{rest.length > 0 ? <span className="block text-axis text-second">{unit} {rest.join(' ')}</span> : null}</> : null}
    </div>
  );
}
