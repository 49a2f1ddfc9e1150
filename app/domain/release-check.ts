import type { CaseBeforeRedaction } from './case-before-redaction.ts';
import { foldText } from './folded-text.ts';
import { wholeNamePattern } from './held-names.ts';
import type { Audience } from './release-policy.ts';
import { heldWords } from './redaction.ts';
import type { HeldWords, Hit, Searcher } from './redact-text.ts';
import { findHits, searcherFor } from './redact-text.ts';

/** One search of what leaves. A failed one keeps the release in the house. */
export interface ReleaseCheck {
  readonly id: string;
  readonly label: string;
  readonly passed: boolean;
  /** How much was looked at; where it failed, in which part. Never the words that were found. */
  readonly note: string;
}

/** One file of the release as text, read back from the bytes that are stored. */
export interface ReleasedText {
  readonly fileName: string;
  readonly text: string;
}

interface Piece {
  readonly where: string;
  readonly text: string;
}

/** What the searches run over: the parsed data file, and every text file as it is. */
interface Material {
  /** Strings of the released case that somebody typed. */
  readonly typed: readonly Piece[];
  /** Every string of it, each once. */
  readonly strings: readonly Piece[];
  readonly numbers: readonly { readonly where: string; readonly value: number }[];
  readonly keys: readonly string[];
  readonly files: readonly Piece[];
}

/**
 * Searches the bytes of a release for what the case holds now, which may be more than when it was prepared.
 *
 * @param data The parsed data file.
 * @param files Text files and the names of all files.
 */
export function checkReleasedText(params: { readonly source: CaseBeforeRedaction; readonly audience: Audience; readonly data: unknown; readonly texts: readonly ReleasedText[]; readonly fileNames: readonly string[]; readonly changeNote: string }): readonly ReleaseCheck[] {
  const { source, audience, data, texts, fileNames, changeNote } = params;
  const held = heldWords(source, audience);
  const searcher = searcherFor(held);
  const material = gather(data, texts, [{ where: 'change note', text: changeNote }]);
  const typedHits = hitsIn(material.typed, searcher);
  const heldHits = hitsIn(material.strings, searcher);
  const found = (hits: ReturnType<typeof hitsIn>, ...kinds: readonly string[]) => [...new Set(hits.filter((hit) => hit.of.some((kind) => kinds.includes(kind))).map((hit) => hit.where))];
  const wholeNames = wholeNamePattern(held.names);
  const inFiles = material.files.filter(({ text }) => wholeNames !== null && foldText(text).folded.search(wholeNames) >= 0).map(({ where }) => where);
  const lines = `${material.typed.length} pieces of text, ${material.files.length} files`;
  return [
    verdict('names', 'No name that the case holds', [...found(typedHits, 'name'), ...inFiles], `${held.names.length} names, ${lines}`),
    verdict('contacts', 'No address or number that the case holds', found(heldHits, 'contact'), `${held.emails.length + held.phones.length} held`),
    verdict('forms', 'Nothing in the form of an address, number, link or plate', found(typedHits, 'email', 'telephone', 'link', 'plate'), `${material.typed.length} pieces of text`),
    verdict('place', 'No coordinates, postcode or address of the place', [...found(heldHits, 'held-coordinates'), ...found(typedHits, 'coordinates', 'postcode', 'address', 'place'), ...coordinateFields(material, held)], `${held.coordinates.length} positions, ${material.numbers.length} numbers`),
    verdict('health-and-children', 'No health matter and no child in the text', found(typedHits, 'health', 'child'), `${material.typed.length} pieces of text`),
    verdict('legal', 'No legal advice and no marked part', [...found(typedHits, 'legal'), ...privilegedParts(material, source)], `${material.typed.length} pieces of text`),
    verdict('file-names', 'File names say nothing', fileNames.filter((name) => !/^(?:photo-\d{2,}\.jpg|data\.json|report\.pdf|runs\.csv|measurements\.csv|weather\.csv)$/u.test(name)), `${fileNames.length} names`),
  ];
}

function verdict(id: string, label: string, places: readonly string[], looked: string): ReleaseCheck {
  const where = [...new Set(places)];
  return { id, label, passed: where.length === 0, note: where.length === 0 ? looked : `found in ${where.slice(0, 4).join('; ')}${where.length > 4 ? ` and ${where.length - 4} more` : ''}` };
}

function hitsIn(pieces: readonly Piece[], searcher: Searcher): (Hit & { where: string })[] {
  return pieces.flatMap(({ where, text }) => findHits(text, searcher).map((hit) => ({ ...hit, where })));
}

/** Instants, days and hashes, of which a long reconstruction has thousands. */
const oursByForm = /^(?:\d{4}-\d{2}-\d{2}(?:T[\d:.]+Z)?|[0-9a-f]{64})$/u;

/** Pieces of running text, the words beside the files, and the name of a weather station in the basis of a flux. */
const isTyped = (where: string): boolean => (where.endsWith(' text') && !where.startsWith('reconstruction')) || where.endsWith(' basis') || where === 'change note';

function gather(data: unknown, texts: readonly ReleasedText[], notes: readonly Piece[]): Material {
  const strings: Piece[] = [];
  const numbers: { where: string; value: number }[] = [];
  const keys = new Set<string>();
  const seen = new Set<string>();
  const walk = (value: unknown, path: readonly string[]): void => {
    if (typeof value === 'string') {
      const where = whereOf(path);
      const key = `${isTyped(where)} ${value}`;
      if (!oursByForm.test(value) && !seen.has(key)) strings.push({ where, text: value });
      seen.add(key);
    } else if (typeof value === 'number') numbers.push({ where: whereOf(path), value });
    else if (typeof value === 'object' && value !== null) {
      for (const [key, part] of Object.entries(value)) {
        if (!Array.isArray(value)) keys.add(key);
        walk(part, [...path, key]);
      }
    }
  };
  walk(data, []);
  const all = [...strings, ...notes];
  return { strings: all, typed: all.filter(({ where }) => isTyped(where)), numbers, keys: [...keys], files: texts.map(({ fileName, text }) => ({ where: fileName, text })) };
}

/** `hypotheses 2 statement 1 text` */
const whereOf = (path: readonly string[]): string => path.map((part) => (/^\d+$/u.test(part) ? String(Number(part) + 1) : part)).join(' ');

/** Fields called after a coordinate, and numbers that are one of the held ones to four decimals or more. */
function coordinateFields(material: Material, held: HeldWords): string[] {
  const exact = held.coordinates.flatMap(({ latitudeDeg, longitudeDeg }) => [latitudeDeg, longitudeDeg]).filter((value) => Math.abs(value * 1_000 - Math.round(value * 1_000)) > 1e-6);
  return [
    ...material.keys.filter((key) => /^(?:lat|lon|lng)|latitude|longitude/iu.test(key)).map((key) => `field ${key}`),
    ...material.numbers.filter(({ value }) => exact.some((one) => Math.abs(Math.abs(value) - Math.abs(one)) < 1e-7)).map(({ where }) => where),
  ];
}

/** Sentences of the marked part, as far as they are long enough to be told from chance. */
function privilegedParts(material: Material, source: CaseBeforeRedaction): string[] {
  const plain = (text: string) => foldText(text).folded.replace(/\s+/gu, ' ').trim();
  const sentences = [source.privilegedNote ?? '', source.legalHoldReason ?? ''].flatMap((text) => plain(text).split(/(?<=[.!?])\s/u)).filter((sentence) => sentence.length >= 16);
  return material.typed.filter(({ text }) => sentences.some((sentence) => plain(text).includes(sentence))).map(({ where }) => where);
}
