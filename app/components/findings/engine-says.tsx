import { href } from 'react-router';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import { TestMark } from '#app/components/ui/test-mark.tsx';

export interface EngineWords {
  readonly number: number;
  readonly grade: string;
  readonly because: readonly string[];
  readonly tests: readonly { readonly label: string; readonly result: 'supports' | 'contradicts' | 'inconclusive' | 'not tested'; readonly sentence: string }[];
}

export interface EngineSaysProps {
  readonly caseNumber: number;
  /** Null: no run is attached. */
  readonly words: EngineWords | null;
  /** Where the words can be taken over into a form; left out where nothing is being edited. */
  readonly takeOverHref?: string | undefined;
}

/** What the attached run computed, kept apart from what people state. It never fills anything in by itself. */
export function EngineSays({ caseNumber, words, takeOverHref }: EngineSaysProps) {
  const runs = href('/cases/:caseNumber/reconstructions', { caseNumber: String(caseNumber) });
  if (!words) {
    return (
      <section aria-labelledby="engine-says">
        <SectionHeading id="engine-says">The engine says nothing yet</SectionHeading>
        <p className="text-second">No reconstruction is attached to the case. <AppLink href={runs}>Run one, or attach one</AppLink>.</p>
      </section>
    );
  }
  const run = href('/cases/:caseNumber/reconstructions/:number', { caseNumber: String(caseNumber), number: String(words.number) });
  return (
    <section aria-labelledby="engine-says">
      <SectionHeading id="engine-says" note={<AppLink href={run}>run {words.number}</AppLink>}>The engine says: {words.grade}</SectionHeading>
      {words.because.length > 0 ? <ul className="mb-2 list-disc pl-5 text-small">{words.because.map((line) => <li key={line}>{line}</li>)}</ul> : null}
      <ul className="grid gap-x-6 gap-y-2 tablet:grid-cols-2">
        {words.tests.map((test) => <li key={test.label}><TestMark result={test.result} label={test.label} why={test.sentence} /></li>)}
      </ul>
      <p className="mt-2 max-w-[64ch] text-small text-second">Computed from the values entered, about focused sunlight only. It is not a cause: a person states results, and may disagree with reasons.</p>
      {takeOverHref ? <p className="mt-1 text-small"><AppLink href={takeOverHref}>Take over the engine&rsquo;s words</AppLink> <span className="text-second">opens the sunlight hypothesis with its four tests filled in as a suggestion; nothing is kept until you save.</span></p> : null}
    </section>
  );
}
