import type { RedactedText, ReleasedCase, WithheldCounts } from './released-case.ts';
import type { FourTests } from './hypothesis.ts';

/**
 * What leaves the house, by field and reader. Anything that has no line here does not leave: `redactCase` builds the
 * released case field by field and asks this table for each.
 */
export const audiences = ['insurer', 'other-party'] as const;
export type Audience = (typeof audiences)[number];

export const withheldClasses = ['personal', 'health', 'child', 'legal', 'exact-place', 'commercial', 'free-text'] as const;
export type WithheldClass = (typeof withheldClasses)[number];
export const withheldLabels: Record<WithheldClass, string> = {
  personal: 'personal',
  health: 'health',
  child: 'child',
  legal: 'legal',
  'exact-place': 'exact place',
  commercial: 'commercial',
  'free-text': 'not reviewed',
};

type Treatment = 'shown' | 'reduced' | 'removed';
interface Policy {
  readonly class: WithheldClass | null;
  readonly insurer: Treatment;
  readonly 'other-party': Treatment;
}

/** Field × reader. `class` is what the count of withheld things says when the field is reduced or removed. */
export const fieldPolicies = {
  identity: { class: null, insurer: 'shown', 'other-party': 'shown' },
  siteName: { class: 'exact-place', insurer: 'shown', 'other-party': 'removed' },
  placeDetail: { class: 'free-text', insurer: 'reduced', 'other-party': 'removed' },
  position: { class: 'exact-place', insurer: 'removed', 'other-party': 'removed' },
  siteAddress: { class: 'exact-place', insurer: 'removed', 'other-party': 'removed' },
  dates: { class: null, insurer: 'shown', 'other-party': 'shown' },
  people: { class: 'personal', insurer: 'removed', 'other-party': 'removed' },
  contacts: { class: 'personal', insurer: 'removed', 'other-party': 'removed' },
  injury: { class: 'health', insurer: 'reduced', 'other-party': 'removed' },
  child: { class: 'child', insurer: 'removed', 'other-party': 'removed' },
  freeText: { class: 'free-text', insurer: 'reduced', 'other-party': 'reduced' },
  photos: { class: 'personal', insurer: 'reduced', 'other-party': 'reduced' },
  measurements: { class: null, insurer: 'shown', 'other-party': 'shown' },
  reconstruction: { class: null, insurer: 'shown', 'other-party': 'shown' },
  hypotheses: { class: null, insurer: 'shown', 'other-party': 'removed' },
  draftFinding: { class: 'legal', insurer: 'removed', 'other-party': 'removed' },
  signedFinding: { class: null, insurer: 'shown', 'other-party': 'reduced' },
  privileged: { class: 'legal', insurer: 'removed', 'other-party': 'removed' },
  loss: { class: 'commercial', insurer: 'shown', 'other-party': 'removed' },
  actions: { class: null, insurer: 'shown', 'other-party': 'reduced' },
  actionCost: { class: 'commercial', insurer: 'removed', 'other-party': 'removed' },
  reporterNotes: { class: 'free-text', insurer: 'reduced', 'other-party': 'removed' },
} as const satisfies Record<string, Policy>;
export type PolicyField = keyof typeof fieldPolicies;

/** Lines of free text that the preparer decides one by one; what is undecided is held back. */
export type LineDecision = 'share' | 'hold-back';

/** Everything the redactor is given; it never leaves the server. */
export interface CaseBeforeRedaction {
  readonly released: Omit<ReleasedCase, 'title' | 'placeDetail' | 'account' | 'notes' | 'interimControl' | 'photos' | 'hypotheses' | 'finding' | 'actions' | 'injury' | 'siteName' | 'loss'>;
  readonly siteName: string;
  readonly siteAddress: string;
  readonly hasPosition: boolean;
  readonly privilegedNote: string | null;
  readonly hasDraftFinding: boolean;
  readonly loss: ReleasedCase['loss'];
  readonly title: string;
  readonly placeDetail: string;
  readonly account: string;
  readonly interimControl: string;
  readonly notes: readonly { readonly id: string; readonly at: string; readonly authorId: string | null; readonly text: string }[];
  readonly photos: readonly { readonly photoId: string; readonly label: number; readonly view: string | null; readonly caption: string; readonly altText: string; readonly maskCount: number; readonly releasable: 'undecided' | 'yes' | 'no'; readonly hadPlace: boolean }[];
  readonly hypotheses: readonly { readonly id: string; readonly kind: ReleasedCase['hypotheses'][number]['kind']; readonly statement: string; readonly predicts: string; readonly evidenceFor: string; readonly evidenceAgainst: string; readonly tests: FourTests; readonly result: ReleasedCase['hypotheses'][number]['result'] }[];
  readonly finding: { readonly version: number; readonly signedAt: string; readonly opinion: string; readonly certainty: NonNullable<ReleasedCase['finding']>['certainty']; readonly classification: NonNullable<ReleasedCase['finding']>['classification']; readonly causes: string; readonly limits: string; readonly frozenHash: string } | null;
  readonly actions: readonly { readonly number: number; readonly title: string; readonly controlLevel: string; readonly dueOn: string; readonly state: string; readonly effect: string; readonly hasCost: boolean }[];
  readonly people: readonly { readonly name: string | null; readonly email: string | null; readonly phone: string | null; readonly isChild: boolean; readonly guardianContact: string | null }[];
  /** Staff of the case, whose names may stand in free text. */
  readonly staffNames: readonly string[];
  readonly injuries: readonly { readonly treatment: string }[];
  readonly anyoneHurt: string;
}

const emailPattern = /[\p{L}\p{N}._%+-]+@[\p{L}\p{N}.-]+\.\p{L}{2,}/gu;
const phonePattern = /(?<![\p{L}\p{N}])\+?\d[\d ()/-]{6,}\d(?![\p{L}\p{N}])/gu;
const datePattern = /^\d{4}-\d{2}-\d{2}$/u;
const coordinatePattern = /-?\d{1,3}\.\d{3,}\s*[°]?\s*[NSEW]?\s*[,; ]\s*-?\d{1,3}\.\d{3,}\s*[°]?\s*[NSEW]?|\d{1,3}°\s*\d{1,2}['′]\s*(?:\d{1,2}(?:\.\d+)?["″])?\s*[NSEW]/gu;
const healthPattern = /\b(?:blister\w*|burn(?:t|ed)? (?:her|his|their|my) \w+|hospital\w*|ambulance|surgery|diagnos\w*|medication|pregnan\w*|asthma\w*|scar(?:s|red|ring)?|wound\w*)\b/giu;

/** Name parts worth searching for: whole names, and each part of three letters or more. */
function namePatterns(names: readonly string[]): RegExp | null {
  const parts = new Set<string>();
  for (const name of names) {
    const clean = name.trim();
    if (clean.length < 2) continue;
    parts.add(clean);
    for (const part of clean.split(/\s+/u)) if (part.length >= 3) parts.add(part);
  }
  if (parts.size === 0) return null;
  const escaped = [...parts].sort((a, b) => b.length - a.length).map((part) => part.replace(/[.*+?^${}()|[\]\\]/gu, '\\$&'));
  return new RegExp(`(?<![\\p{L}\\p{N}])(?:${escaped.join('|')})(?:['’]s)?(?![\\p{L}\\p{N}])`, 'giu');
}

interface Hit {
  readonly start: number;
  readonly end: number;
  readonly class: WithheldClass;
}

/** Takes names, contacts, coordinates and health words out of running text. */
export function redactText(text: string, names: readonly string[], place: readonly string[] = []): RedactedText {
  const hits: Hit[] = [];
  const collect = (pattern: RegExp | null, withheld: WithheldClass, accept: (match: string) => boolean = () => true) => {
    if (!pattern) return;
    for (const match of text.matchAll(pattern)) {
      if (accept(match[0].trim())) hits.push({ start: match.index, end: match.index + match[0].length, class: withheld });
    }
  };
  collect(coordinatePattern, 'exact-place');
  collect(namePatterns(place.filter((part) => part.length >= 4)), 'exact-place', (match) => place.some((part) => part.toLowerCase() === match.toLowerCase()));
  collect(emailPattern, 'personal');
  collect(phonePattern, 'personal', (match) => !datePattern.test(match) && match.replace(/\D/gu, '').length >= 8);
  collect(namePatterns(names), 'personal');
  collect(healthPattern, 'health');
  return cut(text, hits);
}

function cut(text: string, hits: readonly Hit[]): RedactedText {
  const pieces: ({ text: string } | { withheld: WithheldClass })[] = [];
  let at = 0;
  for (const hit of [...hits].sort((a, b) => a.start - b.start || b.end - a.end)) {
    if (hit.end <= at) continue;
    if (hit.start > at) pieces.push({ text: text.slice(at, hit.start) });
    // Overlapping hits become one block of the first class, so that the count is of blocks a reader sees.
    pieces.push({ withheld: hit.class });
    at = hit.end;
  }
  if (at < text.length) pieces.push({ text: text.slice(at) });
  return pieces;
}

export interface Redaction {
  readonly released: ReleasedCase;
  readonly withheld: WithheldCounts;
}

/** Keys of the free-text lines of a case, in reading order, for the preparer to decide on. */
export function linesToDecide(source: CaseBeforeRedaction): readonly { key: string; label: string; text: string }[] {
  return [
    { key: 'title', label: 'Title', text: source.title },
    { key: 'placeDetail', label: 'Place in the building', text: source.placeDetail },
    { key: 'account', label: 'Account', text: source.account },
    { key: 'interimControl', label: 'Interim control', text: source.interimControl },
    ...source.notes.map((note, index) => ({ key: `note:${note.id}`, label: `Note ${index + 1}`, text: note.text })),
    ...source.hypotheses.flatMap((hypothesis, index) => [
      { key: `hypothesis:${hypothesis.id}`, label: `Hypothesis ${index + 1}`, text: [hypothesis.statement, hypothesis.predicts, hypothesis.evidenceFor, hypothesis.evidenceAgainst].filter(Boolean).join('\n') },
    ]),
    ...(source.finding ? [{ key: 'finding', label: `Finding, version ${source.finding.version}`, text: [source.finding.opinion, source.finding.causes, source.finding.limits].filter(Boolean).join('\n') }] : []),
    ...source.actions.map((action) => ({ key: `action:${action.number}`, label: `Action ${action.number}`, text: [action.title, action.effect].filter(Boolean).join('\n') })),
  ].filter((line) => line.text.trim() !== '');
}

/**
 * The case as `audience` may read it, and how many things were withheld, by class.
 *
 * @param decisions what the preparer decided for each line of `linesToDecide`; a line without a decision is held back.
 */
export function redactCase(source: CaseBeforeRedaction, audience: Audience, decisions: Readonly<Record<string, LineDecision>>): Redaction {
  const counts: Record<WithheldClass, number> = { personal: 0, health: 0, child: 0, legal: 0, 'exact-place': 0, commercial: 0, 'free-text': 0 };
  const names = [...source.staffNames, ...source.people.flatMap((person) => (person.name ? [person.name] : []))];
  const hidesSite = fieldPolicies.siteName[audience] === 'removed';
  const place = [source.siteAddress, ...(hidesSite ? [source.siteName] : [])].filter(Boolean);

  const treatment = (field: PolicyField): Treatment => fieldPolicies[field][audience];
  const withhold = (withheld: WithheldClass, howMany = 1) => {
    counts[withheld] += howMany;
  };
  const line = (key: string, text: string, field: PolicyField = 'freeText'): RedactedText => {
    if (text.trim() === '') return [];
    if (treatment(field) === 'removed' || decisions[key] !== 'share') {
      withhold('free-text');
      return [{ withheld: 'free-text' }];
    }
    const redacted = redactText(text, names, place);
    for (const piece of redacted) if ('withheld' in piece) withhold(piece.withheld);
    return redacted;
  };

  if (source.hasPosition) withhold('exact-place');
  if (source.siteAddress) withhold('exact-place');
  if (hidesSite) withhold('exact-place');
  for (const person of source.people) {
    if (person.isChild) withhold('child');
    for (const contact of [person.name, person.email, person.phone]) if (contact) withhold('personal');
    if (person.guardianContact) withhold('child');
  }
  if (source.privilegedNote) withhold('legal');
  if (source.hasDraftFinding) withhold('legal');
  if (source.injuries.length > 0) withhold('health', source.injuries.length);
  if (source.loss && treatment('loss') === 'removed') withhold('commercial');

  const sharedPhotos = source.photos.filter((photo) => photo.releasable === 'yes');
  withhold('personal', source.photos.length - sharedPhotos.length);
  for (const photo of sharedPhotos) {
    withhold('personal', photo.maskCount);
    if (photo.hadPlace) withhold('exact-place');
  }
  withhold('commercial', source.actions.filter((action) => action.hasCost).length);

  const released: ReleasedCase = {
    ...source.released,
    title: line('title', source.title),
    siteName: hidesSite ? null : source.siteName,
    placeDetail: line('placeDetail', source.placeDetail, 'placeDetail'),
    account: line('account', source.account),
    notes: source.notes.map((note, index) => ({ at: note.at, by: `Person ${index + 1}`, text: line(`note:${note.id}`, note.text, 'reporterNotes') })),
    injury: injuryWords(source, treatment('injury')),
    interimControl: line('interimControl', source.interimControl),
    loss: treatment('loss') === 'shown' ? source.loss : null,
    photos: sharedPhotos.map((photo) => ({
      photoId: photo.photoId,
      fileName: `photo-${String(photo.label).padStart(2, '0')}.jpg`,
      view: photo.view,
      caption: redactText(photo.caption, names, place),
      altText: redactText(photo.altText, names, place).map((piece) => ('text' in piece ? piece.text : '(withheld)')).join(''),
      maskCount: photo.maskCount,
    })),
    hypotheses:
      treatment('hypotheses') === 'removed'
        ? []
        : source.hypotheses.map((hypothesis) => {
            const shared = decisions[`hypothesis:${hypothesis.id}`] === 'share';
            if (!shared) withhold('free-text');
            const field = (text: string): RedactedText => {
              if (!shared) return text.trim() ? [{ withheld: 'free-text' }] : [];
              const redacted = redactText(text, names, place);
              for (const piece of redacted) if ('withheld' in piece) withhold(piece.withheld);
              return redacted;
            };
            return {
              kind: hypothesis.kind,
              result: hypothesis.result,
              tests: redactTests(hypothesis.tests, shared, names, place),
              statement: field(hypothesis.statement),
              predicts: field(hypothesis.predicts),
              evidenceFor: field(hypothesis.evidenceFor),
              evidenceAgainst: field(hypothesis.evidenceAgainst),
            };
          }),
    finding: source.finding
      ? {
          version: source.finding.version,
          signedAt: source.finding.signedAt,
          certainty: source.finding.certainty,
          classification: source.finding.classification,
          frozenHash: source.finding.frozenHash,
          opinion: line('finding', source.finding.opinion, 'signedFinding'),
          causes: line('finding', source.finding.causes, 'signedFinding'),
          limits: line('finding', source.finding.limits, 'signedFinding'),
        }
      : null,
    actions: source.actions.map((action) => ({
      number: action.number,
      title: line(`action:${action.number}`, action.title),
      controlLevel: action.controlLevel,
      dueOn: action.dueOn,
      state: action.state,
      effect: treatment('actions') === 'reduced' ? [] : line(`action:${action.number}`, action.effect),
    })),
  };
  return { released, withheld: counts };
}

/** Reasons of tests are free text too; results are not. */
function redactTests(tests: FourTests, shared: boolean, names: readonly string[], place: readonly string[]): FourTests {
  const one = (test: FourTests['geometry']) => ({
    result: test.result,
    why: shared ? redactText(test.why, names, place).map((piece) => ('text' in piece ? piece.text : '(withheld)')).join('') : '',
  });
  return { geometry: one(tests.geometry), weather: one(tests.weather), energy: one(tests.energy), mark: one(tests.mark) };
}

const treatmentWords: Record<string, string> = {
  none: 'no treatment',
  'first-aid': 'first aid',
  'medical-treatment': 'medical treatment',
  'emergency-department': 'emergency department',
  'in-patient': 'in-patient',
  unknown: 'treatment not stated',
};

/** An insurer learns that someone was hurt and the level of treatment, never the part of the body or the person. */
function injuryWords(source: CaseBeforeRedaction, how: Treatment): string {
  if (source.injuries.length === 0) return source.anyoneHurt === 'yes' ? 'yes' : source.anyoneHurt === 'no' ? 'none' : 'not known';
  if (how === 'removed') return 'withheld';
  const words = [...new Set(source.injuries.map((injury) => treatmentWords[injury.treatment] ?? 'treatment not stated'))];
  return `yes, ${words.join(', ')}`;
}
