import type { CaseState } from './case-state.ts';
import type { ActionState, ControlLevel } from './corrective-action.ts';
import type { EvidenceKind, ExamKind, HolderRole } from './evidence.ts';
import type { Certainty, Classification } from './finding.ts';
import type { FourTests, HypothesisKind, HypothesisResult } from './hypothesis.ts';
import type { EventType, Extent, FoundPrecision, OnsetBasis, PhotoView, siteUses, WeatherSeen, YesNoUnknown } from './incident.ts';
import type { PhotoMask } from './photo.ts';
import type { ReliedWeather } from './relied-weather.ts';
import type { Scene } from './scene.ts';
import type { ReconstructionInput } from '#app/physics/model/input.ts';
import type { ReconstructionResult } from '#app/physics/model/result.ts';

/** Everything the redactor is given; it never leaves the server. Instants are ISO 8601 in UTC. */
export interface CaseBeforeRedaction {
  readonly caseNumber: number;
  readonly zone: string;
  readonly site: { readonly name: string; readonly code: string; readonly address: string; readonly use: (typeof siteUses)[number]; readonly latitudeDeg: number; readonly longitudeDeg: number };
  readonly organisationName: string;
  /** The pin of the report, where it has one. */
  readonly position: { readonly latitudeDeg: number; readonly longitudeDeg: number } | null;
  readonly title: string;
  readonly placeDetail: string;
  readonly account: string;
  readonly interimControl: string;
  readonly interimControlAt: string | null;
  readonly eventType: EventType | null;
  readonly anyoneHurt: YesNoUnknown;
  /** As the clock read that it was taken from. */
  readonly foundAt: string | null;
  readonly foundPrecision: FoundPrecision;
  readonly foundClockErrorS: number;
  readonly onsetEarliestAt: string | null;
  readonly onsetLatestAt: string | null;
  readonly onsetBasis: OnsetBasis | null;
  readonly reportedAt: string;
  readonly extent: Extent | null;
  readonly weatherSeen: WeatherSeen | null;
  readonly loss: { readonly amount: number; readonly currency: string } | null;
  readonly privilegedNote: string | null;
  readonly legalHoldReason: string | null;
  readonly hasDraftFinding: boolean;
  readonly reporterId: string | null;
  readonly notes: readonly { readonly id: string; readonly at: string; readonly authorId: string | null; readonly text: string }[];
  readonly photos: readonly PhotoBeforeRedaction[];
  readonly scene: Scene | null;
  readonly reconstruction: { readonly number: number; readonly engineVersion: string; readonly inputHash: string; readonly resultHash: string; readonly input: ReconstructionInput; readonly result: ReconstructionResult } | null;
  /** What the attached run went by, with the record that it came from. */
  readonly weather: ReliedWeather | null;
  readonly hypotheses: readonly HypothesisBeforeRedaction[];
  /** The newest signed version. */
  readonly finding: FindingBeforeRedaction | null;
  readonly actions: readonly ActionBeforeRedaction[];
  readonly returnDays: readonly { readonly on: string; readonly bestAt: string; readonly minutes: number }[];
  /** States that the case reached, with the time, oldest first. */
  readonly moves: readonly { readonly at: string; readonly state: CaseState }[];
  readonly people: readonly { readonly name: string | null; readonly email: string | null; readonly phone: string | null; readonly isChild: boolean; readonly guardianContact: string | null }[];
  /** Accounts of the organisation and whoever else the case names, whose names may stand in free text. */
  readonly staff: readonly { readonly name: string; readonly email: string | null }[];
  readonly injuries: readonly { readonly treatment: string }[];
  readonly items: readonly ItemBeforeRedaction[];
}

/** An item of evidence: who held it by part in the matter; no name and no typed word of it is read here at all. */
export interface ItemBeforeRedaction {
  readonly label: number;
  readonly kind: EvidenceKind;
  readonly custody: readonly { readonly role: HolderRole; readonly from: string; readonly to: string | null }[];
  readonly exams: readonly { readonly kind: ExamKind; readonly at: string; readonly noticeGiven: boolean }[];
}

export interface PhotoBeforeRedaction {
  readonly photoId: string;
  readonly label: number;
  readonly view: PhotoView | null;
  readonly caption: string;
  readonly altText: string;
  readonly masks: readonly PhotoMask[];
  readonly releasable: 'undecided' | 'yes' | 'no';
  /** Where the file itself says that it was taken. */
  readonly exifPlace: { readonly latitudeDeg: number; readonly longitudeDeg: number } | null;
  readonly originalKey: string;
  readonly sha256: string;
}

export interface HypothesisBeforeRedaction {
  readonly id: string;
  readonly kind: HypothesisKind;
  readonly statement: string;
  readonly predicts: string;
  readonly evidenceFor: string;
  readonly evidenceAgainst: string;
  readonly tests: FourTests;
  readonly result: HypothesisResult;
}

export interface FindingBeforeRedaction {
  readonly version: number;
  readonly signedAt: string;
  readonly opinion: string;
  readonly certainty: Certainty;
  readonly classification: Classification;
  readonly causes: string;
  readonly limits: string;
  readonly frozenHash: string;
}

export interface ActionBeforeRedaction {
  readonly number: number;
  readonly title: string;
  readonly controlLevel: ControlLevel;
  readonly interim: boolean;
  readonly dueOn: string;
  readonly state: ActionState;
  readonly effect: string;
  readonly doneAt: string | null;
  readonly verifiedAt: string | null;
  readonly effectAt: string | null;
  readonly hasCost: boolean;
}
