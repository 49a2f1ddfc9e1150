import { FactList } from '#app/components/ui/fact-list.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import type { FindingWords } from '#app/domain/finding-view.ts';

/** A finding to be read: opinion in serif, certainty and class in words, causes, limits. */
export function FindingText({ words, note }: { readonly words: FindingWords; readonly note: string }) {
  return (
    <div className="grid gap-x-10 gap-y-6 desk:grid-cols-[minmax(0,1.6fr)_minmax(0,1fr)]">
      <section aria-labelledby="opinion">
        <SectionHeading id="opinion" note={note}>Opinion</SectionHeading>
        <div className="max-w-[64ch] space-y-3 font-serif text-account">
          {paragraphs(words.opinion).map((text) => <p key={text}>{text}</p>)}
        </div>
        <div className="mt-4">
          <FactList
            facts={[
              { term: 'Hypothesis', value: words.hypothesis },
              { term: 'Certainty', value: words.certainty },
              { term: 'Classification', value: words.classification },
            ]}
          />
        </div>
      </section>
      <div className="space-y-6">
        <section aria-labelledby="causes">
          <SectionHeading id="causes">Causes</SectionHeading>
          <Cause label="Immediate" text={words.immediateCauses} />
          <Cause label="Underlying" text={words.underlyingCauses} />
          <Cause label="Root" text={words.rootCauses} />
        </section>
        <section aria-labelledby="limits">
          <SectionHeading id="limits">Limits of this opinion</SectionHeading>
          <div className="space-y-2 font-serif">{paragraphs(words.limits).map((text) => <p key={text}>{text}</p>)}</div>
        </section>
      </div>
    </div>
  );
}

const paragraphs = (text: string) => text.split(/\n{2,}/u).filter((part) => part.trim() !== '');

function Cause({ label, text }: { readonly label: string; readonly text: string }) {
  return (
    <div className="pb-2">
      <h3 className="text-small font-semibold">{label}</h3>
      <p className="font-serif">{text.trim() === '' ? <span className="font-sans text-second">not stated</span> : text}</p>
    </div>
  );
}
