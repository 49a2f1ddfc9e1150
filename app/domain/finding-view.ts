import { countInWords } from './case-view.ts';
import type { Certainty, Classification, FindingState, ReviewField } from './finding.ts';
import { certaintyLabels, classificationLabels, findingStateLabels, reviewFieldLabels } from './finding.ts';
import { formatDay, formatDayClock } from './local-time.ts';

export interface VersionView {
  readonly version: number;
  readonly state: string;
  readonly author: string;
  readonly when: string;
  readonly reviewer: string | null;
  readonly frozenHash: string | null;
}

export interface FindingWords {
  readonly version: number;
  readonly opinion: string;
  readonly hypothesis: string;
  readonly certainty: string;
  readonly classification: string;
  readonly immediateCauses: string;
  readonly underlyingCauses: string;
  readonly rootCauses: string;
  readonly limits: string;
}

export interface CommentPin {
  readonly id: string;
  /** Number that stands on the field and heads the comment. */
  readonly pin: number;
  readonly field: ReviewField;
  readonly label: string;
  /** Null while it is hidden from a reviewer who has not asked for the opinion. */
  readonly body: string | null;
  readonly by: string;
  readonly version: number;
  readonly settled: string | null;
  readonly maySettle: boolean;
}

interface FindingSource {
  readonly version: number;
  readonly state: FindingState;
  readonly opinion: string;
  readonly certainty: Certainty;
  readonly classification: Classification;
  readonly immediateCauses: string;
  readonly underlyingCauses: string;
  readonly rootCauses: string;
  readonly limits: string;
  readonly author: string;
  readonly reviewer: string | null;
  readonly createdAt: Date;
  readonly sentAt: Date | null;
  readonly reviewedAt: Date | null;
  readonly signedAt: Date | null;
  readonly frozenHash: string | null;
}

export function versionView(source: FindingSource, zone: string): VersionView {
  const when = source.signedAt ?? source.reviewedAt ?? source.sentAt ?? source.createdAt;
  return { version: source.version, state: findingStateLabels[source.state], author: source.author, when: formatDayClock(when, zone), reviewer: source.reviewer, frozenHash: source.frozenHash };
}

export function findingWords(source: FindingSource, hypothesis: string | null): FindingWords {
  const { version, opinion, immediateCauses, underlyingCauses, rootCauses, limits } = source;
  return {
    version,
    opinion,
    hypothesis: hypothesis ?? 'none selected',
    certainty: certaintyLabels[source.certainty].toLowerCase(),
    classification: classificationLabels[source.classification].toLowerCase(),
    immediateCauses,
    underlyingCauses,
    rootCauses,
    limits,
  };
}

export const commentLabel = (field: ReviewField): string => reviewFieldLabels[field];

/** The reader's part in the finding: one page, four readings. */
export type FindingMode = 'write' | 'review' | 'wait' | 'read';

export interface HeadingFacts {
  readonly mode: FindingMode;
  readonly latest: FindingSource | null;
  readonly missing: number;
  readonly openComments: number;
  readonly opinionShown: boolean;
  readonly zone: string;
}

/** The finding of the page, in a sentence. */
export function findingHeading({ mode, latest, missing, openComments, opinionShown, zone }: HeadingFacts): string {
  const open = openComments === 0 ? 'no comment is open' : `${countInWords(openComments).toLowerCase()} ${openComments === 1 ? 'comment is' : 'comments are'} still open`;
  if (mode === 'write') {
    if (latest === null || latest.state === 'signed') return 'The opinion is still to be written';
    return missing === 0 ? 'Nothing is missing before it can be sent' : `${countInWords(missing)} ${missing === 1 ? 'thing is' : 'things are'} missing before it can be sent`;
  }
  if (mode === 'review') return opinionShown ? `Inputs and opinion are before you; ${open}` : `The inputs come first; ${open}`;
  if (latest === null) return 'There is no finding yet';
  if (latest.state === 'signed') return `${certaintyLabels[latest.certainty]}, signed ${latest.signedAt ? formatDay(latest.signedAt, zone) : ''}`.trim();
  return latest.state === 'sent' ? `Version ${latest.version} is with the reviewer; ${open}` : `Version ${latest.version} is a draft`;
}
