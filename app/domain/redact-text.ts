import { foldText } from './folded-text.ts';
import type { FoldedText } from './folded-text.ts';
import { addressPattern, namePatterns, placePatterns } from './held-names.ts';
import type { NamePatterns } from './held-names.ts';
import type { RedactedText, WithheldClass } from './released-case.ts';
import { tellingPatterns } from './telling-patterns.ts';

/** Words that a case holds and that must not stand in what leaves. */
export interface HeldWords {
  readonly names: readonly string[];
  readonly emails: readonly string[];
  readonly phones: readonly string[];
  readonly coordinates: readonly { readonly latitudeDeg: number; readonly longitudeDeg: number }[];
  readonly addresses: readonly string[];
  /** Names of the site and the organisation, where the reader may not know them. */
  readonly places: readonly string[];
}

export const nothingHeld: HeldWords = { names: [], emails: [], phones: [], coordinates: [], addresses: [], places: [] };

/** Where something that may not leave stands in a text; `of` says what was recognised there, one thing or several. */
export interface Hit {
  readonly start: number;
  readonly end: number;
  readonly withheld: WithheldClass;
  readonly of: readonly string[];
}

/** The searches for the words of one case, built once and used on each of its lines. */
export interface Searcher {
  readonly names: NamePatterns;
  readonly held: HeldWords;
  readonly contacts: RegExp | null;
  readonly addresses: RegExp | null;
  readonly places: readonly RegExp[];
}

export function searcherFor(held: HeldWords): Searcher {
  const contacts = [...held.emails.filter((email) => email.trim().length >= 5).map(emailForm), ...held.phones.map(phoneForm)].filter(Boolean);
  return {
    held,
    names: namePatterns(held.names),
    contacts: contacts.length > 0 ? new RegExp(contacts.join('|'), 'gu') : null,
    addresses: addressPattern(held.addresses),
    places: placePatterns(held.places),
  };
}

const emailForm = (email: string): string => foldText(email.trim()).folded.replace(/[.*+?^${}()|[\]\\/]/gu, '\\$&');

/** The number without its country or trunk prefix, with any signs between the figures; empty when it is too short to tell. */
function phoneForm(phone: string): string {
  const digits = phone.replace(/\D/gu, '');
  if (digits.length < 5) return '';
  const known = digits.slice(-Math.min(8, digits.length));
  return `(?:\\+?\\d[\\s().\\/-]*){0,7}${[...known].join('[\\s().\\/-]*')}(?!\\d)`;
}

/** Everything in the text that may not leave, in order of place, overlaps joined. */
export function findHits(text: string, searcher: Searcher): readonly Hit[] {
  const folded = foldText(text);
  const hits = [
    ...telling(folded),
    ...collect(folded, searcher.contacts, 'personal', 'contact'),
    ...namesIn(folded, searcher.names),
    ...collect(folded, searcher.addresses, 'exact-place', 'address'),
    ...searcher.places.flatMap((pattern) => collect(folded, pattern, 'exact-place', 'place')),
    ...nearHeldCoordinates(folded, searcher.held.coordinates),
  ];
  return joinOverlaps(text, hits);
}

/** Names with the initials before them. */
function namesIn(folded: FoldedText, { whole, parts, capitalised }: NamePatterns): Hit[] {
  const text = folded.original;
  const inCapitals = collect(folded, capitalised, 'personal', 'name').filter((hit) => /^\p{Lu}/u.test(text.slice(hit.start)));
  return [...collect(folded, whole, 'personal', 'name'), ...collect(folded, parts, 'personal', 'name'), ...inCapitals].map((hit) => {
    const initials = /(?<![\p{L}\p{N}])(?:\p{Lu}\.\s?){1,3}$/u.exec(text.slice(0, hit.start))?.[0] ?? '';
    return { ...hit, start: hit.start - initials.length };
  });
}

function telling(folded: FoldedText): Hit[] {
  return tellingPatterns.flatMap(({ id, withheld, pattern, accepts, wholeSentence }) =>
    [...folded.folded.matchAll(pattern)].flatMap((match) => {
      const end = match.index + match[0].length;
      const hit = hitAt(folded, match.index, end, withheld, id);
      if (accepts && !accepts(match[0], folded.original.slice(hit.start, hit.end), folded.folded.slice(end))) return [];
      return [wholeSentence ? { ...hit, ...sentenceAround(folded.original, hit) } : hit];
    }),
  );
}

function collect(folded: FoldedText, pattern: RegExp | null, withheld: WithheldClass, of: string): Hit[] {
  if (!pattern) return [];
  return [...folded.folded.matchAll(pattern)].filter((match) => match[0] !== '').map((match) => hitAt(folded, match.index, match.index + match[0].length, withheld, of));
}

function hitAt({ folded, from, original }: FoldedText, start: number, end: number, withheld: WithheldClass, of: string): Hit {
  // A pattern may have taken blanks at its ends; they stay with the text.
  let first = start;
  let last = end;
  while (first < last && /\s/u.test(folded[first] ?? '')) first += 1;
  while (last > first && /\s/u.test(folded[last - 1] ?? '')) last -= 1;
  return { start: from[first] ?? 0, end: from[last] ?? original.length, withheld, of: [of] };
}

/** From the end of the sentence before to the end of this one. A full stop counts when a blank or the end follows. */
function sentenceAround(text: string, { start, end }: { start: number; end: number }): { start: number; end: number } {
  const ends = [...text.matchAll(/[.!?](?=\s|$)|\n/gu)].map((match) => match.index + 1);
  const from = ends.filter((at) => at <= start).at(-1) ?? 0;
  const to = ends.find((at) => at >= end) ?? text.length;
  const blanks = /^\s*/u.exec(text.slice(from))?.[0].length ?? 0;
  return { start: from + blanks, end: to };
}

/** Decimal numbers that lie on a held coordinate: one with three decimals or more, or two side by side with one or more. */
function nearHeldCoordinates(folded: FoldedText, held: HeldWords['coordinates']): Hit[] {
  if (held.length === 0) return [];
  const numbers = [...folded.folded.matchAll(/(?<![\d.])-?\d{1,3}\.\d+/gu)].map((match) => {
    const decimals = match[0].split('.')[1]?.length ?? 0;
    return { start: match.index, end: match.index + match[0].length, size: Math.abs(Number(match[0])), decimals };
  });
  const isNear = (size: number, value: number, decimals: number) => Math.abs(size - Math.abs(value)) <= Math.max(0.005, 0.5 * 10 ** -decimals + 1e-9);
  return numbers.flatMap((number, index) => {
    const next = numbers[index + 1];
    return held.flatMap(({ latitudeDeg, longitudeDeg }) => {
      const alone = number.decimals >= 3 && (isNear(number.size, latitudeDeg, number.decimals) || isNear(number.size, longitudeDeg, number.decimals));
      if (alone) return [hitAt(folded, number.start, number.end, 'exact-place', 'held-coordinates')];
      const close = next !== undefined && /^[\s,;/|°nsew()-]*(?:and\s*)?$/u.test(folded.folded.slice(number.end, next.start));
      const pair =
        close &&
        ((isNear(number.size, latitudeDeg, number.decimals) && isNear(next.size, longitudeDeg, next.decimals)) ||
          (isNear(number.size, longitudeDeg, number.decimals) && isNear(next.size, latitudeDeg, next.decimals)));
      return pair ? [hitAt(folded, number.start, next.end, 'exact-place', 'held-coordinates')] : [];
    });
  });
}

/** Hits that overlap, or that stand side by side in one class, become one: a reader sees blocks, not how many words each had. */
function joinOverlaps(text: string, hits: readonly Hit[]): readonly Hit[] {
  const joined: Hit[] = [];
  for (const hit of [...hits].sort((a, b) => a.start - b.start || b.end - a.end)) {
    const last = joined.at(-1);
    const beside = last !== undefined && (hit.start < last.end || (hit.withheld === last.withheld && /^[\s.'’-]*$/u.test(text.slice(last.end, hit.start))));
    if (last && beside) joined[joined.length - 1] = { ...last, end: Math.max(last.end, hit.end), of: [...new Set([...last.of, ...hit.of])] };
    else joined.push(hit);
  }
  return joined;
}

/**
 * The text with everything withheld taken out: words that the case holds, and whatever has the form of a contact, a
 * place, a health matter, a child or legal advice.
 */
export function redactText(text: string, searcher: Searcher): RedactedText {
  return cut(text, findHits(text, searcher), 0, text.length);
}

/** The part of a text from `start` to `end`, with blocks where it is hit. */
function cut(text: string, hits: readonly Hit[], start: number, end: number): RedactedText {
  const pieces: RedactedText = [];
  let at = start;
  for (const hit of hits) {
    if (hit.end <= start || hit.start >= end) continue;
    if (hit.start > at) pieces.push({ text: text.slice(at, hit.start) });
    pieces.push({ withheld: hit.withheld });
    at = Math.min(end, hit.end);
  }
  if (at < end) pieces.push({ text: text.slice(at, end) });
  return pieces;
}

/**
 * The same where only some sentences are shared. The text is searched as a whole, so that nothing is missed at the seam
 * of two sentences; sentences held back in a row are one block.
 */
export function redactSentences(text: string, searcher: Searcher, sentences: readonly { readonly start: number; readonly end: number }[], isShared: (sentence: string) => boolean): RedactedText {
  const hits = findHits(text, searcher);
  const pieces: RedactedText = [];
  let heldBefore = false;
  for (const { start, end } of sentences) {
    if (text.slice(start, end).trim() === '') continue;
    const shared = isShared(text.slice(start, end));
    if (shared) pieces.push(...(heldBefore ? [{ text: ' ' }] : []), ...cut(text, hits, start, end));
    else if (!heldBefore) pieces.push({ withheld: 'free-text' });
    heldBefore = !shared;
  }
  return pieces;
}

/** A text in parts: what would be taken out names its class, and the words stay for those who may read them. */
export interface MarkedPiece {
  readonly text: string;
  readonly withheld: WithheldClass | null;
}

/** The text as written with what would be taken out of it marked, for the page on which a release is prepared. */
export function markText(text: string, searcher: Searcher): readonly MarkedPiece[] {
  const pieces: MarkedPiece[] = [];
  let at = 0;
  for (const hit of findHits(text, searcher)) {
    if (hit.start > at) pieces.push({ text: text.slice(at, hit.start), withheld: null });
    pieces.push({ text: text.slice(hit.start, hit.end), withheld: hit.withheld });
    at = hit.end;
  }
  if (at < text.length) pieces.push({ text: text.slice(at), withheld: null });
  return pieces;
}

/** The same as plain words, for attributes and files that hold no blocks. */
export const redactedWords = (text: RedactedText): string => text.map((piece) => ('text' in piece ? piece.text : '(withheld)')).join('');
