import type { Certainty, Classification } from './finding.ts';
import type { WithheldClass } from './redaction.ts';
import type { HypothesisKind, HypothesisResult, FourTests } from './hypothesis.ts';
import type { ReconstructionResult } from '#app/physics/model.ts';

/** Running text in which some words were taken out. A withheld piece says its class and nothing of its length. */
export type RedactedText = readonly ({ readonly text: string } | { readonly withheld: WithheldClass })[];

export type WithheldCounts = Readonly<Record<WithheldClass, number>>;

/**
 * A case as it leaves the house. This shape, and only this shape, is stored in a release: a field that is not here
 * cannot leak. Built by `redactCase`.
 */
export interface ReleasedCase {
  readonly caseNumber: number;
  readonly title: RedactedText;
  readonly eventType: string;
  readonly siteName: string | null;
  readonly siteUse: string;
  readonly placeDetail: RedactedText;
  readonly zone: string;
  readonly foundAt: string | null;
  readonly foundPrecision: string;
  readonly onsetEarliestAt: string | null;
  readonly onsetLatestAt: string | null;
  readonly onsetBasis: string | null;
  readonly reportedAt: string;
  readonly account: RedactedText;
  readonly notes: readonly { readonly at: string; readonly by: string; readonly text: RedactedText }[];
  readonly injury: string;
  readonly extent: string | null;
  readonly weatherSeen: string | null;
  readonly interimControl: RedactedText;
  readonly loss: { readonly amount: number; readonly currency: string } | null;
  readonly measurements: readonly { readonly label: string; readonly value: string }[];
  readonly photos: readonly { readonly photoId: string; readonly fileName: string; readonly view: string | null; readonly caption: RedactedText; readonly altText: string; readonly maskCount: number }[];
  readonly reconstruction: { readonly number: number; readonly engineVersion: string; readonly inputHash: string; readonly resultHash: string; readonly result: ReconstructionResult } | null;
  readonly hypotheses: readonly { readonly kind: HypothesisKind; readonly statement: RedactedText; readonly predicts: RedactedText; readonly evidenceFor: RedactedText; readonly evidenceAgainst: RedactedText; readonly tests: FourTests; readonly result: HypothesisResult }[];
  readonly finding: {
    readonly version: number;
    readonly signedAt: string;
    readonly opinion: RedactedText;
    readonly certainty: Certainty;
    readonly classification: Classification;
    readonly causes: RedactedText;
    readonly limits: RedactedText;
    readonly frozenHash: string;
  } | null;
  readonly actions: readonly { readonly number: number; readonly title: RedactedText; readonly controlLevel: string; readonly dueOn: string; readonly state: string; readonly effect: RedactedText }[];
  readonly returnDays: readonly { readonly on: string; readonly bestAt: string; readonly minutes: number }[];
  readonly chronology: readonly { readonly at: string; readonly what: string }[];
}
