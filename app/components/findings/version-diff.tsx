import { diffWordsWithSpace } from 'diff';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import type { FindingWords } from '#app/domain/finding-view.ts';

export interface VersionDiffProps {
  readonly earlier: FindingWords;
  readonly later: FindingWords;
}

const fields: readonly (readonly [Exclude<keyof FindingWords, 'version'>, string])[] = [
  ['opinion', 'Opinion'],
  ['hypothesis', 'Hypothesis'],
  ['certainty', 'Certainty'],
  ['classification', 'Classification'],
  ['immediateCauses', 'Immediate causes'],
  ['underlyingCauses', 'Underlying causes'],
  ['rootCauses', 'Root causes'],
  ['limits', 'Limits'],
];

/** What changed from one version to the next, field by field: words taken out are struck, words put in are bold. */
export function VersionDiff({ earlier, later }: VersionDiffProps) {
  const changed = fields.filter(([name]) => earlier[name] !== later[name]);
  return (
    <section aria-labelledby="changes" className="mt-10">
      <SectionHeading id="changes" note="struck: taken out; bold: put in">What changed from version {earlier.version} to {later.version}</SectionHeading>
      {changed.length === 0 ? <p className="text-second">No field of the finding changed.</p> : null}
      <dl className="max-w-[64ch]">
        {changed.map(([name, label]) => (
          <div key={name} className="border-b border-hair py-2">
            <dt className="text-small font-semibold">{label}</dt>
            <dd className="font-serif whitespace-pre-line"><Words earlier={earlier[name]} later={later[name]} /></dd>
          </div>
        ))}
      </dl>
      {changed.length > 0 && changed.length < fields.length ? <p className="pt-2 text-small text-second">Same in both: {fields.filter(([name]) => earlier[name] === later[name]).map(([, label]) => label.toLowerCase()).join(', ')}.</p> : null}
    </section>
  );
}

function Words({ earlier, later }: { readonly earlier: string; readonly later: string }) {
  return diffWordsWithSpace(earlier, later).map((part, index) => {
    if (part.added) return <ins key={index} className="font-semibold no-underline"><span className="sr-only"> put in: </span>{part.value}<span className="sr-only"> end of what was put in. </span></ins>;
    if (part.removed) return <del key={index} className="text-second"><span className="sr-only"> taken out: </span>{part.value}<span className="sr-only"> end of what was taken out. </span></del>;
    return <span key={index}>{part.value}</span>;
  });
}
