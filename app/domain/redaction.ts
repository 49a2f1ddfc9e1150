import type { CaseBeforeRedaction } from './case-before-redaction.ts';
import type { FourTests } from './hypothesis.ts';
import type { HeldWords, Searcher } from './redact-text.ts';
import { redactText, searcherFor } from './redact-text.ts';
import { releasedCaseSchema, withheldClasses } from './released-case.ts';
import type { RedactedText, ReleasedCase, WithheldClass, WithheldCounts } from './released-case.ts';
import { releasedMeasurements } from './released-measurements.ts';
import { authorNames, chronologyOf, correctedFound, injuryWords, releasedEvent, releasedResult } from './released-parts.ts';

/**
 * What leaves the house, by field and reader. Anything that has no line here does not leave: `redactCase` builds the
 * released case field by field, asks this table for each, and drops whatever the released shape does not name.
 */
export const audiences = ['insurer', 'other-party'] as const;
export type Audience = (typeof audiences)[number];
export const audienceLabels: Record<Audience, string> = { insurer: 'Insurer', 'other-party': 'Other party' };
export const audienceMeanings: Record<Audience, string> = {
  insurer: 'Site by name, roles not names, reasoning and signed finding in full, loss but no cost of actions.',
  'other-party': 'No site or organisation by name, no directions of the sun, no hypotheses, the opinion without causes and limits, no loss.',
};

export type Treatment = 'shown' | 'reduced' | 'removed';
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
  photos: { class: 'photo', insurer: 'reduced', 'other-party': 'reduced' },
  measurements: { class: null, insurer: 'shown', 'other-party': 'shown' },
  reconstruction: { class: 'exact-place', insurer: 'shown', 'other-party': 'reduced' },
  hypotheses: { class: 'free-text', insurer: 'shown', 'other-party': 'removed' },
  draftFinding: { class: 'legal', insurer: 'removed', 'other-party': 'removed' },
  signedFinding: { class: 'free-text', insurer: 'shown', 'other-party': 'reduced' },
  privileged: { class: 'legal', insurer: 'removed', 'other-party': 'removed' },
  loss: { class: 'commercial', insurer: 'shown', 'other-party': 'removed' },
  actions: { class: 'free-text', insurer: 'shown', 'other-party': 'reduced' },
  actionCost: { class: 'commercial', insurer: 'removed', 'other-party': 'removed' },
  reporterNotes: { class: 'free-text', insurer: 'reduced', 'other-party': 'removed' },
} as const satisfies Record<string, Policy>;
export type PolicyField = keyof typeof fieldPolicies;

/** Lines of free text, and photos, that the preparer decides one by one; what is undecided is held back. */
export type LineDecision = 'share' | 'hold-back';
export type Decisions = Readonly<Record<string, LineDecision>>;

export type { CaseBeforeRedaction } from './case-before-redaction.ts';

export interface LineToDecide {
  readonly key: string;
  readonly label: string;
  readonly text: string;
}

export const photoKey = (photoId: string): string => `photo:${photoId}`;

const lines = (...texts: readonly string[]): string => texts.filter((text) => text.trim() !== '').join('\n');

/** The free-text lines that this reader could get, in reading order, for the preparer to decide on. */
export function linesToDecide(source: CaseBeforeRedaction, audience: Audience): readonly LineToDecide[] {
  const open = (field: PolicyField) => fieldPolicies[field][audience] !== 'removed';
  const finding = source.finding;
  const brief = fieldPolicies.signedFinding[audience] === 'reduced';
  const all: LineToDecide[] = [
    { key: 'title', label: 'Title', text: source.title },
    ...(open('placeDetail') ? [{ key: 'placeDetail', label: 'Place in the building', text: source.placeDetail }] : []),
    { key: 'account', label: 'Account', text: source.account },
    { key: 'interimControl', label: 'Interim control', text: source.interimControl },
    ...(open('reporterNotes') ? source.notes.map((note, index) => ({ key: `note:${note.id}`, label: `Note ${index + 1}`, text: note.text })) : []),
    ...(open('hypotheses')
      ? source.hypotheses.map((one, index) => ({
          key: `hypothesis:${one.id}`,
          label: `Hypothesis ${index + 1}`,
          text: lines(one.statement, one.predicts, one.evidenceFor, one.evidenceAgainst, ...Object.values(one.tests).map((test) => test.why)),
        }))
      : []),
    ...(finding ? [{ key: 'finding', label: `Finding, version ${finding.version}`, text: brief ? finding.opinion : lines(finding.opinion, finding.causes, finding.limits) }] : []),
    ...source.actions.map((action) => ({ key: `action:${action.number}`, label: `Action ${action.number}`, text: fieldPolicies.actions[audience] === 'reduced' ? action.title : lines(action.title, action.effect) })),
    ...source.photos.filter((photo) => photo.releasable === 'yes').map((photo) => ({ key: `caption:${photo.photoId}`, label: `Words of photo ${photo.label}`, text: lines(photo.caption, photo.altText) })),
  ];
  return all.filter((line) => line.text.trim() !== '');
}

/** Everything that must not be read out of what leaves, whoever typed it where. */
export function heldWords(source: CaseBeforeRedaction, audience: Audience): HeldWords {
  const stated = (values: readonly (string | null)[]) => values.filter((value): value is string => value !== null && value.trim() !== '');
  const guardians = stated(source.people.map((person) => person.guardianContact));
  const hidesPlace = fieldPolicies.siteName[audience] === 'removed';
  return {
    names: [...new Set([...source.staff.map((person) => person.name), ...stated(source.people.map((person) => person.name)), ...guardians])],
    emails: [...new Set(stated([...source.staff.map((person) => person.email), ...source.people.map((person) => person.email)]))],
    phones: [...new Set([...stated(source.people.map((person) => person.phone)), ...guardians])],
    coordinates: [source.site, ...(source.position ? [source.position] : []), ...source.photos.flatMap((photo) => (photo.exifPlace ? [photo.exifPlace] : []))].map(({ latitudeDeg, longitudeDeg }) => ({ latitudeDeg, longitudeDeg })),
    addresses: stated([source.site.address]),
    places: hidesPlace ? stated([source.site.name, source.site.code, source.organisationName]) : [],
  };
}

/** A photo of the release: which original it is made from, and under which name it leaves. */
export interface SharedPhoto {
  readonly photoId: string;
  readonly fileName: string;
}

export interface Redaction {
  readonly released: ReleasedCase;
  readonly withheld: WithheldCounts;
  readonly photos: readonly SharedPhoto[];
}

/** One reader's view of one case under way: what the table says, and lines cut as decided. */
interface Desk {
  readonly source: CaseBeforeRedaction;
  readonly searcher: Searcher;
  readonly decisions: Decisions;
  readonly treatment: (field: PolicyField) => Treatment;
  readonly line: (key: string, text: string, field?: PolicyField) => RedactedText;
}

function deskFor(source: CaseBeforeRedaction, audience: Audience, decisions: Decisions): Desk {
  const searcher = searcherFor(heldWords(source, audience));
  const treatment = (field: PolicyField): Treatment => fieldPolicies[field][audience];
  return {
    source,
    searcher,
    decisions,
    treatment,
    line: (key, text, field = 'freeText') => {
      if (text.trim() === '') return [];
      const held = treatment(field) === 'removed' || decisions[key] !== 'share';
      return held ? [{ withheld: 'free-text' }] : redactText(text, searcher);
    },
  };
}

/**
 * The case as `audience` may read it, and how many things were withheld, by class.
 *
 * @param decisions what the preparer decided for each line of `linesToDecide` and each photo; whatever has no decision is
 *   held back, and so is a photo that the photo sheet does not call releasable.
 */
export function redactCase(source: CaseBeforeRedaction, audience: Audience, decisions: Decisions): Redaction {
  const desk = deskFor(source, audience, decisions);
  const shared = source.photos.filter((photo) => photo.releasable === 'yes' && decisions[photoKey(photo.photoId)] === 'share');
  const photos = shared.map((photo) => ({ photoId: photo.photoId, fileName: `photo-${String(photo.label).padStart(2, '0')}.jpg` }));
  // Parsing drops every key that the released shape does not name.
  const released = releasedCaseSchema.parse({
    ...plainPart(desk),
    ...textPart(desk),
    photos: shared.map((photo, index) => ({
      fileName: photos[index]?.fileName,
      view: photo.view,
      caption: desk.line(`caption:${photo.photoId}`, photo.caption),
      altText: desk.line(`caption:${photo.photoId}`, photo.altText),
      maskCount: photo.masks.length,
    })),
  });
  return { released, withheld: countWithheld(desk, released, shared.length), photos };
}

/** Numbers and words from our own lists. */
function plainPart({ source, searcher, treatment }: Desk) {
  const run = source.reconstruction;
  const place = treatment('reconstruction') === 'shown' ? 'shown' : 'reduced';
  return {
    caseNumber: source.caseNumber,
    eventType: releasedEvent(source.eventType),
    siteName: treatment('siteName') === 'removed' ? null : source.site.name,
    siteUse: source.site.use,
    zone: source.zone,
    foundAt: correctedFound(source),
    foundPrecision: source.foundPrecision,
    foundClockErrorS: source.foundClockErrorS,
    onsetEarliestAt: source.onsetEarliestAt,
    onsetLatestAt: source.onsetLatestAt,
    onsetBasis: source.onsetBasis,
    reportedAt: source.reportedAt,
    injury: injuryWords(source, treatment('injury')),
    extent: source.extent,
    weatherSeen: source.weatherSeen,
    loss: treatment('loss') === 'shown' ? source.loss : null,
    measurements: treatment('measurements') === 'removed' ? [] : releasedMeasurements(source.scene),
    reconstruction: run && treatment('reconstruction') !== 'removed'
      ? { number: run.number, engineVersion: run.engineVersion, inputHash: place === 'shown' ? run.inputHash : null, resultHash: run.resultHash, result: releasedResult(run.result, searcher, place) }
      : null,
    returnDays: source.returnDays,
    chronology: chronologyOf(source),
  };
}

/** What people typed. */
function textPart(desk: Desk) {
  const { source, treatment, line } = desk;
  const authors = authorNames(source);
  const { finding } = source;
  const inBrief = treatment('signedFinding') === 'reduced';
  const brief = (text: string): RedactedText => (inBrief && text.trim() !== '' ? [{ withheld: 'free-text' }] : line('finding', text, 'signedFinding'));
  return {
    title: line('title', source.title),
    placeDetail: line('placeDetail', source.placeDetail, 'placeDetail'),
    account: line('account', source.account),
    interimControl: line('interimControl', source.interimControl),
    notes: source.notes.map((note, index) => ({ at: note.at, by: authors[index], text: line(`note:${note.id}`, note.text, 'reporterNotes') })),
    hypotheses: treatment('hypotheses') === 'removed' ? [] : source.hypotheses.map((one) => releasedHypothesis(desk, one)),
    finding: finding && {
      version: finding.version,
      signedAt: finding.signedAt,
      certainty: finding.certainty,
      classification: finding.classification,
      frozenHash: finding.frozenHash,
      opinion: line('finding', finding.opinion, 'signedFinding'),
      causes: brief(finding.causes),
      limits: brief(finding.limits),
    },
    actions: source.actions.map(({ number, title, controlLevel, interim, dueOn, state, effect }) => ({
      number,
      controlLevel,
      interim,
      dueOn,
      state,
      title: line(`action:${number}`, title),
      effect: treatment('actions') === 'shown' ? line(`action:${number}`, effect) : [],
    })),
  };
}

function releasedHypothesis({ line }: Desk, one: CaseBeforeRedaction['hypotheses'][number]) {
  const cut = (text: string) => line(`hypothesis:${one.id}`, text, 'hypotheses');
  // Results of tests come from a list of ours, the reasons are typed.
  const test = ({ result, why }: FourTests['geometry']) => ({ result, why: cut(why) });
  return {
    kind: one.kind,
    result: one.result,
    tests: { geometry: test(one.tests.geometry), weather: test(one.tests.weather), energy: test(one.tests.energy), mark: test(one.tests.mark) },
    statement: cut(one.statement),
    predicts: cut(one.predicts),
    evidenceFor: cut(one.evidenceFor),
    evidenceAgainst: cut(one.evidenceAgainst),
  };
}

/** Blocks that the reader sees, and whole fields that are not there at all. */
function countWithheld({ source, treatment }: Desk, released: ReleasedCase, sharedPhotos: number): WithheldCounts {
  const counts: Record<WithheldClass, number> = { personal: 0, health: 0, child: 0, legal: 0, 'exact-place': 0, commercial: 0, 'free-text': 0, photo: 0 };
  countBlocks(released, counts);
  const add = (withheld: WithheldClass, howMany: number) => {
    counts[withheld] += howMany;
  };
  const shownPhotos = source.photos.filter((photo) => released.photos.some(({ fileName }) => fileName === `photo-${String(photo.label).padStart(2, '0')}.jpg`));
  const stated = (values: readonly (string | null)[]) => values.filter((value) => value !== null && value.trim() !== '').length;
  for (const person of source.people) {
    add('personal', stated([person.name, person.email, person.phone]));
    add('child', (person.isChild ? 1 : 0) + stated([person.guardianContact]));
  }
  add('exact-place', (source.position ? 1 : 0) + stated([source.site.address]) + (treatment('siteName') === 'removed' ? 1 : 0));
  add('exact-place', source.reconstruction && treatment('reconstruction') === 'reduced' ? 1 : 0);
  add('exact-place', shownPhotos.filter((photo) => photo.exifPlace !== null).length);
  for (const mask of shownPhotos.flatMap((photo) => photo.masks)) add(mask.class, 1);
  add('photo', source.photos.length - sharedPhotos);
  add('health', treatment('injury') === 'removed' ? 1 : source.injuries.length);
  add('legal', stated([source.privilegedNote, source.legalHoldReason]) + (source.hasDraftFinding ? 1 : 0));
  add('commercial', (source.loss && treatment('loss') !== 'shown' ? 1 : 0) + source.actions.filter((action) => action.hasCost).length);
  add('free-text', treatment('hypotheses') === 'removed' ? source.hypotheses.length : 0);
  return counts;
}

function countBlocks(value: unknown, counts: Record<WithheldClass, number>): void {
  if (typeof value !== 'object' || value === null) return;
  if ('withheld' in value) {
    const known = withheldClasses.find((one) => one === value.withheld);
    if (known) counts[known] += 1;
    return;
  }
  for (const part of Object.values(value)) countBlocks(part, counts);
}
