import type { CustodyLine } from './figures/custody-figure.ts';
import type { FluxMapSource } from './flux-discs.ts';
import type { ReleasedResult } from './released-result.ts';
import type { RunDrawing } from './run-drawing.ts';
import type { WeatherPart } from './weather-part.ts';

type Frozen<Value> = Value extends readonly (infer One)[] ? readonly Frozen<One>[] : Value extends object ? { readonly [Key in keyof Value]: Frozen<Value[Key]> } : Value;
type Shown = Pick<ReleasedResult, 'window' | 'daylight' | 'minutes' | 'runs' | 'totals' | 'best' | 'heating' | 'recurrence' | 'requiredSun' | 'checks' | 'tests' | 'grade' | 'assumptions' | 'warnings'>;

/** A result of the engine as far as a report shows it; what leaves the house has the same shape. */
export type ReportedResult = Frozen<Shown & { focus: (Omit<NonNullable<ReleasedResult['focus']>, 'traced'> & Pick<NonNullable<FluxMapSource['focus']>, 'traced'>) | null }>;

/**
 * All that a report is made of, in words that may stand in it. The reader decides what is put in: for a reader outside,
 * every text has been redacted before it comes here.
 */
export interface ReportSource {
  readonly caseNumber: number;
  readonly title: string;
  readonly subtitle: string;
  readonly zone: string;
  /** ISO 8601: when what is reported was fixed. */
  readonly dateUtc: string;
  readonly running: string;
  readonly foot: string;
  /** Said at the head: a draft, or what was withheld; null for a signed report in the house. */
  readonly standing: string | null;
  readonly scope: readonly ReportTerm[];
  readonly people: readonly ReportTerm[];
  readonly documents: readonly { readonly code: string; readonly title: string; readonly kind: string; readonly sha256: string }[];
  readonly scene: readonly ReportTerm[];
  readonly account: string;
  readonly notes: readonly { readonly by: string; readonly text: string }[];
  readonly chronology: readonly { readonly day: string; readonly trueTime: string; readonly reading: string; readonly correction: string; readonly what: string; readonly source: string }[];
  readonly accounts: readonly { readonly heading: string; readonly meta: string; readonly words: string }[];
  readonly evidence: readonly ReportedItem[];
  readonly custodyLines: readonly CustodyLine[];
  readonly measurements: readonly { readonly group: string; readonly label: string; readonly value: string; readonly plusMinus: string; readonly unit: string; readonly method: string }[];
  readonly run: ReportedRun | null;
  readonly returns: readonly { readonly on: string; readonly bestAt: string; readonly minutes: number }[];
  readonly hypotheses: readonly ReportedHypothesis[];
  /** Null while it is not this reader's to see. */
  readonly finding: ReportedFinding | null;
  readonly actions: readonly { readonly number: number; readonly title: string; readonly level: string; readonly due: string; readonly state: string }[];
  readonly photos: readonly { readonly label: string; readonly view: string; readonly caption: string; readonly taken: string; readonly sha256: string }[];
}

export interface ReportTerm {
  readonly term: string;
  readonly value: string;
  readonly note?: string;
}
export interface ReportedItem {
  readonly code: string;
  readonly description: string;
  /** For a reader outside: times and parts only, none of the typed words. */
  readonly inBrief: boolean;
  readonly kind: string;
  readonly seal: string;
  readonly fromWhere: string;
  readonly custody: readonly { readonly from: string; readonly to: string; readonly holder: string; readonly purpose: string; readonly condition: string }[];
  readonly exams: readonly { readonly when: string; readonly kind: string; readonly method: string; readonly result: string; readonly notice: string }[];
  /** Examinations that may alter it and have not been made, with what each lacks. */
  readonly planned: readonly { readonly when: string; readonly method: string; readonly lacks: string }[];
  readonly notices: readonly { readonly told: string; readonly sent: string; readonly way: string; readonly about: string; readonly answer: string }[];
}
export interface ReportedRun {
  readonly number: number;
  readonly engineVersion: string;
  readonly zoneRules: string;
  readonly inputHash: string | null;
  readonly resultHash: string;
  readonly result: ReportedResult;
  readonly drawing: RunDrawing;
  /** Null where the run goes by the clear sky alone. */
  readonly weather: WeatherPart | null;
}
export interface ReportedHypothesis {
  readonly heading: string;
  /** Null while it is not this reader's to see. */
  readonly result: string | null;
  readonly statement: string;
  readonly predicts: string;
  readonly evidenceFor: string;
  readonly evidenceAgainst: string;
  readonly tests: readonly { readonly label: string; readonly result: string | null; readonly why: string }[];
}
export interface ReportedFinding {
  readonly version: number;
  readonly by: string;
  readonly opinion: string;
  readonly certainty: string;
  readonly classification: string;
  readonly causes: readonly ReportTerm[];
  readonly limits: string;
  readonly frozenHash: string | null;
}
