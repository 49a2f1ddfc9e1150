import type { CaseBeforeRedaction } from './case-before-redaction.ts';
import type { FourTests } from './hypothesis.ts';
import type { HeldWords, Searcher } from './redact-text.ts';
import { redactSentences, redactText, searcherFor } from './redact-text.ts';
import { lineKey, linesToDecide, photoKey, sentencesOf } from './lines-to-decide.ts';
import { fieldPolicies } from './release-policy.ts';
import type { Audience, PolicyField, Treatment } from './release-policy.ts';
import { releasedCaseSchema, withheldClasses } from './released-case.ts';
import type { RedactedText, ReleasedCase, WithheldClass, WithheldCounts } from './released-case.ts';
import { releasedDrawing } from './released-drawing.ts';
import { releasedMeasurements } from './released-measurements.ts';
import { authorNames, chronologyOf, correctedFound, injuryWords, releasedEvent, releasedEvidence, releasedResult } from './released-parts.ts';
import { releasedWeather } from './released-weather.ts';
import { reliedSource } from './relied-weather.ts';
import { runDrawing } from './run-drawing.ts';

/** Lines of free text, and photos, that the preparer decides one by one; what is undecided is held back. */
export type LineDecision = 'share' | 'hold-back';
export type Decisions = Readonly<Record<string, LineDecision>>;

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
  /** Text that is shared or held back as a whole. */
  readonly line: (group: string, text: string, field?: PolicyField) => RedactedText;
  /** Text that is decided sentence by sentence. */
  readonly testimony: (group: string, text: string, field?: PolicyField) => RedactedText;
}

const heldBack: RedactedText = [{ withheld: 'free-text' }];

function deskFor(source: CaseBeforeRedaction, audience: Audience, decisions: Decisions): Desk {
  const searcher = searcherFor(heldWords(source, audience));
  const treatment = (field: PolicyField): Treatment => fieldPolicies[field][audience];
  const shared = new Set(linesToDecide(source, audience).filter((line) => decisions[line.key] === 'share').map((line) => line.group));
  return {
    source,
    searcher,
    decisions,
    treatment,
    line: (group, text, field = 'freeText') => {
      if (text.trim() === '') return [];
      return treatment(field) === 'removed' || !shared.has(group) ? heldBack : redactText(text, searcher);
    },
    testimony: (group, text, field = 'freeText') => {
      if (text.trim() === '') return [];
      if (treatment(field) === 'removed') return heldBack;
      return redactSentences(text, searcher, sentencesOf(text), (sentence) => decisions[lineKey(group, sentence)] === 'share');
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
  const shared = source.photos.filter((photo) => photo.releasable === 'yes' && decisions[photoKey(photo)] === 'share');
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
  return { released, withheld: countWithheld(desk, released, shared), photos };
}

/** Numbers and words from our own lists. */
function plainPart({ source, searcher, treatment, line }: Desk) {
  const run = source.reconstruction;
  const station = source.weather ? line('weather', reliedSource(source.weather), 'weather') : [];
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
      ? { number: run.number, engineVersion: run.engineVersion, inputHash: place === 'shown' ? run.inputHash : null, resultHash: run.resultHash, result: releasedResult(run.result, searcher, place, source.weather ? station : null), drawing: releasedDrawing(runDrawing(run.input, run.result), place) }
      : null,
    weather: releasedWeather(source.weather, treatment('weather'), station),
    returnDays: source.returnDays,
    evidence: releasedEvidence(source, treatment('custody')),
    chronology: chronologyOf(source),
  };
}

/** What people typed. */
function textPart(desk: Desk) {
  const { source, treatment, line, testimony } = desk;
  const authors = authorNames(source);
  const { finding } = source;
  const inBrief = treatment('signedFinding') === 'reduced';
  const brief = (text: string): RedactedText => (inBrief && text.trim() !== '' ? heldBack : line('finding', text, 'signedFinding'));
  return {
    title: line('title', source.title),
    placeDetail: line('placeDetail', source.placeDetail, 'placeDetail'),
    account: testimony('account', source.account),
    interimControl: line('interimControl', source.interimControl),
    notes: source.notes.map((note, index) => ({ at: note.at, by: authors[index], text: testimony(`note:${note.id}`, note.text, 'reporterNotes') })),
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
function countWithheld({ source, treatment }: Desk, released: ReleasedCase, shared: CaseBeforeRedaction['photos']): WithheldCounts {
  const counts: Record<WithheldClass, number> = { personal: 0, health: 0, child: 0, legal: 0, 'exact-place': 0, commercial: 0, 'free-text': 0, photo: 0 };
  countBlocks(released, counts);
  const add = (withheld: WithheldClass, howMany: number) => {
    counts[withheld] += howMany;
  };
  const stated = (values: readonly (string | null)[]) => values.filter((value) => value !== null && value.trim() !== '').length;
  for (const person of source.people) {
    add('personal', stated([person.name, person.email, person.phone]));
    add('child', (person.isChild ? 1 : 0) + stated([person.guardianContact]));
  }
  // One holder a record, named in the house.
  add('personal', source.items.reduce((total, item) => total + item.custody.length, 0));
  add('exact-place', (source.position ? 1 : 0) + stated([source.site.address]) + (treatment('siteName') === 'removed' ? 1 : 0));
  add('exact-place', source.reconstruction && treatment('reconstruction') === 'reduced' ? 1 : 0);
  // The bearing of the station, and the station itself where it is not named.
  add('exact-place', source.weather ? (source.weather.bearingDeg === null ? 0 : 1) : 0);
  add('exact-place', shared.filter((photo) => photo.exifPlace !== null).length);
  for (const mask of shared.flatMap((photo) => photo.masks)) add(mask.class, 1);
  add('photo', source.photos.length - shared.length);
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
