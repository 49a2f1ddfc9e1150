import { canonicalJson } from './canonical-json.ts';
import type { CaseBeforeRedaction } from './case-before-redaction.ts';
import type { Audience, PolicyField } from './release-policy.ts';
import { fieldPolicies } from './release-policy.ts';
import { reliedSource } from './relied-weather.ts';

/** A piece of free text that the preparer of a release decides on. */
export interface LineToDecide {
  /** Names the piece and its words: a decision about other words never applies to these. */
  readonly key: string;
  /** The piece without its words: `account`, `note:…`, `finding`. */
  readonly group: string;
  readonly label: string;
  readonly text: string;
}

/** Eight hexadecimal digits that tell texts apart: FNV-1a, 32 bits (Fowler, Noll and Vo). Not for secrets. */
function fingerprint(text: string): string {
  let hash = 0x811c9dc5;
  for (const unit of new TextEncoder().encode(text)) hash = Math.imul(hash ^ unit, 0x01000193) >>> 0;
  return hash.toString(16).padStart(8, '0');
}

export const lineKey = (group: string, text: string): string => `${group}#${fingerprint(text.trim())}`;
/** Names a photo and its boxes: a decision about other boxes never applies to these. */
export const photoKey = ({ photoId, masks }: Pick<CaseBeforeRedaction['photos'][number], 'photoId' | 'masks'>): string => `photo:${photoId}#${fingerprint(canonicalJson(masks))}`;

/**
 * Where the sentences of a text begin and end; blanks after a sentence belong to it. A full stop after one or two letters
 * ends nothing, since initials and titles are written so.
 */
export function sentencesOf(text: string): readonly { readonly start: number; readonly end: number }[] {
  const ends = [...text.matchAll(/(?:(?<=[\p{L}\p{N}]{3}[.!?]|[\d)"'”’°%][.!?])\s+|\n\s*)/gu)].map((match) => match.index + match[0].length);
  const bounds = [0, ...ends.filter((at) => at > 0 && at < text.length), text.length];
  return bounds.slice(0, -1).map((start, index) => ({ start, end: bounds[index + 1] ?? text.length }));
}

const joined = (...texts: readonly string[]): string => texts.filter((text) => text.trim() !== '').join('\n');

/** The free-text lines that this reader could get, in reading order. Testimony goes sentence by sentence. */
export function linesToDecide(source: CaseBeforeRedaction, audience: Audience): readonly LineToDecide[] {
  const open = (field: PolicyField) => fieldPolicies[field][audience] !== 'removed';
  const whole = (group: string, label: string, text: string): LineToDecide[] => (text.trim() === '' ? [] : [{ key: lineKey(group, text), group, label, text }]);
  const bySentence = (group: string, label: string, text: string): LineToDecide[] => {
    const sentences = sentencesOf(text).map(({ start, end }) => text.slice(start, end).trim()).filter(Boolean);
    const lines = sentences.map((sentence, index) => ({ key: lineKey(group, sentence), group, label: sentences.length === 1 ? label : `${label}, ${index + 1}`, text: sentence }));
    // The same sentence twice is decided once.
    return lines.filter((line, index) => lines.findIndex((other) => other.key === line.key) === index);
  };
  const { finding } = source;
  const findingText = finding && (fieldPolicies.signedFinding[audience] === 'reduced' ? finding.opinion : joined(finding.opinion, finding.causes, finding.limits));
  return [
    ...whole('title', 'Title', source.title),
    ...(open('placeDetail') ? whole('placeDetail', 'Place in the building', source.placeDetail) : []),
    ...bySentence('account', 'Account', source.account),
    ...whole('interimControl', 'Interim control', source.interimControl),
    ...(open('reporterNotes') ? source.notes.flatMap((note, index) => bySentence(`note:${note.id}`, `Note ${index + 1}`, note.text)) : []),
    ...(source.weather && fieldPolicies.weather[audience] === 'shown' ? whole('weather', 'Weather, source and station', reliedSource(source.weather)) : []),
    ...(open('hypotheses') ? source.hypotheses.flatMap((one, index) => whole(`hypothesis:${one.id}`, `Hypothesis ${index + 1}`, joined(one.statement, one.predicts, one.evidenceFor, one.evidenceAgainst, ...Object.values(one.tests).map((test) => test.why)))) : []),
    ...(finding && findingText ? whole('finding', `Finding, version ${finding.version}`, findingText) : []),
    ...source.actions.flatMap((action) => whole(`action:${action.number}`, `Action ${action.number}`, fieldPolicies.actions[audience] === 'reduced' ? action.title : joined(action.title, action.effect))),
    ...source.photos.filter((photo) => photo.releasable === 'yes').flatMap((photo) => whole(`caption:${photo.photoId}`, `Words of photo ${photo.label}`, joined(photo.caption, photo.altText))),
  ];
}
