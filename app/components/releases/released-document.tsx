import type { ReleaseDocument } from '#app/domain/release-document.ts';
import type { ReleaseFrame } from '#app/domain/release-view.ts';
import { SectionLevel } from './document-section.tsx';
import { EvidenceSection } from './evidence-section.tsx';
import { ManifestSection, PhotosSection } from './files-sections.tsx';
import type { FileHref } from './files-sections.tsx';
import { ActionsSection, FindingSection, HypothesesSection } from './reasoning-sections.tsx';
import { RedactedWords } from './redacted-words.tsx';
import { ChronologySection, MeasurementsSection, SummarySection } from './summary-sections.tsx';
import { ReleasedCard, SunSection } from './sun-section.tsx';
import { Watermark } from './watermark.tsx';

export const documentParts = [
  { id: 'summary', label: 'Summary' },
  { id: 'chronology', label: 'Chronology' },
  { id: 'evidence', label: 'Evidence and custody' },
  { id: 'measurements', label: 'Measurements' },
  { id: 'sun', label: 'Sun and weather' },
  { id: 'hypotheses', label: 'Hypotheses and tests' },
  { id: 'finding', label: 'Finding, signed' },
  { id: 'actions', label: 'Actions' },
  { id: 'photos', label: 'Photos' },
  { id: 'manifest', label: 'Manifest' },
] as const;

export interface ReleasedDocumentProps {
  readonly view: ReleaseDocument;
  readonly frame: ReleaseFrame;
  readonly zone: string;
  readonly fileHref: FileHref;
  /** Said across the page and at its foot. */
  readonly watermark: string;
  /** Level of the document's own heading: 1 on a page of its own, 2 inside a case. */
  readonly level: 1 | 2;
}

/** A release as its reader sees it: one page to read from top to bottom. */
export function ReleasedDocument({ view, frame, zone, fileHref, watermark, level }: ReleasedDocumentProps) {
  const Heading = level === 1 ? 'h1' : 'h2';
  return (
    <SectionLevel value={level === 1 ? 2 : 3}>
      <article className="relative border-hair bg-sheet px-4 py-5 tablet:border tablet:px-8 desk:px-12 desk:py-8">
        <Watermark line={watermark} />
        <p className="text-small text-second">Case {view.caseNumber}, release {frame.number}, frozen {frame.frozenWords}. Redacted for {frame.audienceWords}.</p>
        <Heading className="pt-1 pb-4 font-serif text-title"><RedactedWords text={view.title} />{view.siteName ? `, ${view.siteName}` : ''}</Heading>
        {view.sun?.card ? <ReleasedCard card={view.sun.card} caseNumber={view.caseNumber} /> : null}
        <SummarySection view={view} number={1} />
        <ChronologySection view={view} number={2} />
        <EvidenceSection items={view.evidence} number={3} />
        <MeasurementsSection view={view} number={4} />
        <SunSection sun={view.sun} weather={view.weather} zone={zone} number={5} />
        <HypothesesSection hypotheses={view.hypotheses} number={6} />
        <FindingSection finding={view.finding} number={7} />
        <ActionsSection actions={view.actions} number={8} />
        <PhotosSection photos={view.photos} fileHref={fileHref} number={9} />
        <ManifestSection frame={frame} fileHref={fileHref} number={10} />
        <p className="mt-8 border-t border-hair pt-2 text-axis text-second">{watermark}</p>
      </article>
    </SectionLevel>
  );
}
