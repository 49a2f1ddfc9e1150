import { SectionHeading } from '#app/components/ui/page-title.tsx';
import { testLabels } from '#app/domain/hypothesis.ts';
import { plainNumber } from '#app/domain/plain-number.ts';
import { checkAnswer, checkLabel } from '#app/domain/run-words.ts';
import type { Check } from '#app/physics/model/tests.ts';
import { StackTable } from './stack-table.tsx';

const withUnit = (value: number, unit: string): string => `${plainNumber(value)}${unit === '°' ? '' : ' '}${unit}`;
const marginWords = (check: Check): string => (check.margin === null ? 'no figure' : withUnit(check.margin, check.unit));

/** What speaks against the hypothesis, what could still, and by how much each value would have to be wrong. */
export function RuleOut({ checks }: { readonly checks: readonly Check[] }) {
  const against = checks.filter((check) => check.passed === false);
  const open = checks.filter((check) => check.passed === null);
  const passed = checks.filter((check) => check.passed === true && check.margin !== null);
  return (
    <section aria-labelledby="rule-out">
      <SectionHeading id="rule-out">What would rule this out?</SectionHeading>
      {against.length > 0 ? <SentenceList heading="Speaks against it now" lines={against.map((check) => ({ key: check.id, words: check.sentence, note: check.margin === null ? checkLabel(check) : `${checkLabel(check)}, short by ${withUnit(Math.abs(check.margin), check.unit)}` }))} /> : null}
      {open.length > 0 ? <SentenceList heading="Could still, once it is known" lines={open.map((check) => ({ key: check.id, words: check.sentence, note: checkLabel(check) }))} /> : null}
      {passed.length > 0 ? <SentenceList heading="Would, if a value is wrong by more than its margin" lines={passed.map((check) => ({ key: check.id, words: `${checkLabel(check)}: more than ${marginWords(check)}`, note: check.sentence }))} /> : null}
    </section>
  );
}

function SentenceList({ heading, lines }: { readonly heading: string; readonly lines: readonly { readonly key: string; readonly words: string; readonly note: string }[] }) {
  return (
    <div className="pb-4">
      <h3 className="font-serif text-group">{heading}</h3>
      <ul>
        {lines.map((line) => (
          <li key={line.key} className="border-b border-hair py-1.5">{line.words} <span className="block text-axis text-second">{line.note}</span></li>
        ))}
      </ul>
    </div>
  );
}

/** Every contradiction check with its margin. */
export function CheckTable({ checks }: { readonly checks: readonly Check[] }) {
  return (
    <section aria-labelledby="checks">
      <SectionHeading id="checks" note="a check refutes only with the most favourable values">Contradiction checks</SectionHeading>
      <StackTable
        caption="Checks with their margins"
        heads={['Check', 'Answer', 'Margin', 'In words']}
        columns="tablet:grid-cols-[14rem_9rem_7rem_minmax(0,1fr)]"
        rows={checks.map((check) => ({
          key: check.id,
          strong: check.passed === false,
          cells: [<Named key="name" check={check} />, checkAnswer(check.passed), marginWords(check), check.sentence],
        }))}
      />
    </section>
  );
}

function Named({ check }: { readonly check: Check }) {
  return <>{checkLabel(check)}<span className="block text-axis font-normal text-second">{testLabels[check.test]}</span></>;
}
