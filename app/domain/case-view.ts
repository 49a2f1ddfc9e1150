import type { FirstLookView } from './first-look.ts';
import type { CardView } from './case-card.ts';
import type { CaseState } from './case-state.ts';
import type { UndoOffer } from './move-undo.ts';
import type { SceneOpticKind } from './scene.ts';

/** What screens of a case are given: explicit views, never rows of a table. Words are ready to be shown. */

export interface ReturnView {
  readonly atUtc: string;
  /** "3 Aug 2026, 13:30" in the clock of the place. */
  readonly words: string;
  /** "in 19 days", "today". */
  readonly inWords: string;
}

export const registerGroups = ['before-fix', 'new', 'settled'] as const;
export type RegisterGroup = (typeof registerGroups)[number];
export const registerGroupLabels: Record<RegisterGroup, string> = {
  'before-fix': 'Sun returns before the fix is proven',
  new: 'New',
  settled: 'Settled, or no fixed return',
};

export interface RegisterRowView {
  readonly number: number;
  readonly group: RegisterGroup;
  readonly opticKind: SceneOpticKind;
  readonly title: string;
  readonly place: string;
  /** "9 May 2026" and "05:30 to 15:10, 4 days". */
  readonly windowDay: string;
  readonly windowHours: string;
  readonly card: CardView;
  readonly state: CaseState;
  /** Certainty of the signed finding, kind of event before that, "reopened". */
  readonly stateNote: string;
  readonly nextReturn: ReturnView | null;
  /** In place of a return: "not known yet", "see 123". */
  readonly returnWords: string;
  readonly waitsFor: string;
  /** Clock of the first look, while nobody has looked. */
  readonly firstLook: FirstLookView | null;
  readonly position: { readonly latitudeDeg: number; readonly longitudeDeg: number };
  /** Where the sun stood in the middle of the longest sunlit stretch, from true north clockwise; null without a run. */
  readonly sunAzimuthDeg: number | null;
}

export interface RegisterView {
  readonly heading: string;
  readonly rows: readonly RegisterRowView[];
  readonly total: number;
  readonly groupCounts: Readonly<Record<RegisterGroup, number>>;
  readonly counts: { readonly all: number; readonly open: number; readonly 'first-look': number; readonly late: number | null; readonly injury: number | null; readonly mine: number };
  readonly span: { readonly fromHour: number; readonly toHour: number };
}

export interface CaseTab {
  readonly key: string;
  readonly label: string;
  /** After `/cases/118`; empty for the account. */
  readonly path: string;
  readonly count: string | null;
}

export interface CaseHeaderView {
  readonly number: number;
  readonly title: string;
  readonly subtitle: string;
  readonly siteName: string;
  readonly siteCode: string;
  readonly zone: string;
  readonly state: CaseState;
  readonly stateNote: string;
  readonly duplicateOf: number | null;
  readonly legalHold: boolean;
  /** Optimistic lock: forms that change the case send it back. */
  readonly version: number;
  readonly nextReturn: ReturnView | null;
  readonly returnWords: string;
  readonly card: CardView;
  /** Which run the card shows, or that it shows daylight only. */
  readonly cardNote: string;
  readonly reconstructionNumber: number | null;
  readonly tabs: readonly CaseTab[];
  /** The reader's own last move, while it may be taken back. */
  readonly undo: UndoOffer | null;
}

/** One line of what a move needs. */
export interface NeedView {
  readonly done: boolean;
  readonly label: string;
}

export interface MoveView {
  readonly id: string;
  readonly label: string;
  readonly ready: boolean;
  readonly needs: readonly NeedView[];
}

export interface ClosedMoveView {
  readonly id: string;
  readonly label: string;
  /** "Open to the site manager." */
  readonly whoCan: string;
}

export interface LogLineView {
  readonly sequence: number;
  readonly atWords: string;
  readonly actorName: string;
  readonly summary: string;
  readonly reason: string;
}

const numberWords = ['No', 'One', 'Two', 'Three', 'Four', 'Five', 'Six', 'Seven', 'Eight', 'Nine', 'Ten', 'Eleven', 'Twelve'] as const;
/** "Five", and figures beyond twelve. */
export const countInWords = (count: number): string => numberWords[count] ?? String(count);

/** "today", "tomorrow", "in 19 days". */
export function inDaysWords(days: number): string {
  if (days <= 0) return 'today';
  return days === 1 ? 'tomorrow' : `in ${days} days`;
}

/** Heading of the register: what it found, not what it is. */
export function registerHeading(beforeFix: number, total: number, ownReportsOnly: boolean, open: number): string {
  if (ownReportsOnly) {
    if (total === 0) return 'You have not reported anything yet';
    return open === 0 ? 'All your reports are settled' : `${countInWords(open)} of your reports ${open === 1 ? 'is' : 'are'} still open`;
  }
  if (total === 0) return 'No case matches';
  if (beforeFix === 0) return 'No known return of the sun before a fix is proven';
  return `${countInWords(beforeFix)} ${beforeFix === 1 ? 'case will be lit again before its' : 'cases will be lit again before their'} fix is proven`;
}

export interface FactView {
  readonly term: string;
  readonly value: string;
  readonly note: string | null;
}

export interface PhotoStripView {
  readonly id: string;
  readonly label: string;
  readonly caption: string;
  readonly altText: string;
  readonly ready: boolean;
}

export interface PersonView {
  readonly id: string;
  readonly role: string;
  /** Null when this reader may not know: the class is then shown in its place. */
  readonly name: string | null;
  readonly withheld: 'child' | null;
  readonly contact: string;
  readonly note: string;
}

export interface InjuryView {
  readonly id: string;
  readonly part: string;
  readonly kind: string;
  readonly treatment: string;
  readonly daysAway: string;
  readonly restrictedDays: string;
  readonly description: string;
  readonly words: string;
}

/** Where the form of a move stands. */
export type MovePlace = 'here' | 'triage' | 'findings';

export interface CaseMovesView {
  readonly open: readonly (MoveView & { readonly place: MovePlace; readonly asksReason: boolean })[];
  readonly closed: readonly ClosedMoveView[];
}

export interface LackView {
  readonly reader: string;
  readonly items: readonly NeedView[];
}

export interface CaseAccountView {
  readonly narrative: string;
  readonly sentWords: string;
  readonly question: { readonly question: string; readonly answer: string | null; readonly dueWords: string } | null;
  readonly notes: readonly { readonly id: string; readonly meta: string; readonly body: string }[];
  readonly mayAddNote: boolean;
  readonly facts: readonly FactView[];
  readonly warnings: readonly string[];
  readonly photos: readonly PhotoStripView[];
  readonly photoCount: number;
  readonly people: readonly PersonView[] | null;
  readonly injuries: readonly InjuryView[] | null;
  readonly lacks: readonly LackView[] | null;
  readonly moves: CaseMovesView;
  readonly log: readonly LogLineView[] | null;
  readonly logCount: number;
}

export interface SimilarCaseView {
  readonly row: RegisterRowView;
  /** "same site, 60 m off", "same kind of optic", "bearing to the mark alike, 187° and 190°". */
  readonly reasons: readonly string[];
  /** From the place of this case, where both are at one site and were recorded apart. */
  readonly offM: { readonly eastM: number; readonly northM: number } | null;
  readonly consequence: string | null;
  readonly likelihood: string | null;
}

export interface WaitingCaseView {
  readonly number: number;
  readonly title: string;
  readonly place: string;
  readonly state: CaseState;
  readonly clockWords: string;
  /** Null once somebody has looked. */
  readonly firstLook: FirstLookView | null;
  readonly group: 'hazard' | 'first-look' | 'reporter';
}

export interface SunOnItView {
  /** Plain words: on it now, next, or why that is not known. */
  readonly words: string;
  readonly skyWords: string;
  /** Today at the place, with a cursor at now. */
  readonly card: CardView & { readonly cursorUtc: string | null };
  readonly basis: string;
  /** Whether today's minutes can be worked out on request. */
  readonly mayWorkOut: boolean;
}

/** What the small plan of the first look is drawn from. */
export interface WhereView {
  /** Two decimals: enough for the reader, and not a door. */
  readonly placeWords: string;
  readonly accuracyM: number | null;
  readonly sun: { readonly azimuthDeg: number; readonly elevationDeg: number };
  readonly markBearingDeg: number | null;
}

export interface TriageView {
  readonly where: WhereView;
  readonly nowUtc: string;
  readonly version: number;
  readonly state: CaseState;
  readonly hazard: { readonly answer: string; readonly words: string };
  readonly account: Pick<CaseAccountView, 'narrative' | 'sentWords' | 'question'>;
  readonly photos: readonly PhotoStripView[];
  readonly photoCount: number;
  /** Stored values of the facts form, as its fields show them. */
  readonly facts: Readonly<Record<string, string>>;
  readonly mayEdit: boolean;
  readonly investigators: readonly { readonly userId: string; readonly name: string }[] | null;
  readonly investigatorId: string;
  readonly warnings: readonly string[];
  readonly sun: SunOnItView;
  readonly similar: readonly SimilarCaseView[];
  readonly waiting: readonly WaitingCaseView[];
  readonly moves: CaseMovesView;
  readonly proposedAnswerDay: string;
  readonly hurtWords: string | null;
}

/** Heading of the reports that wait for a first look. */
export function firstLookHeading(waiting: number, late: number): string {
  if (waiting === 0) return 'Nothing waits for a first look';
  const reports = `${countInWords(waiting)} ${waiting === 1 ? 'report waits' : 'reports wait'}`;
  return late === 0 ? `${reports}, none late for a first look` : `${reports}, ${late === 1 ? 'one is' : `${countInWords(late).toLowerCase()} are`} late for a first look`;
}
