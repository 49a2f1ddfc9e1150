import { foldWord } from './folded-text.ts';
import { genericPlaceWords, particles, titles } from './held-names.ts';

/** Words that say what a holder, a receiver or a measurer is, not who. */
const partWords = new Set(
  ('store storage safe shelf room police fire service services brigade insurer insurers insurance mutual assurance claims owner owners occupier site staff courier post department team ' +
    'company firm ltd limited gmbh inc plc laboratory lab labs maker supplier installer contractor expert investigator reviewer manager caretaker guard security night day duty officer').split(' '),
);
const nameWord = /^\p{Lu}[\p{L}'’.-]*$/u;

function looksLikeName(part: string): boolean {
  const words = part.split(/\s+/u).filter((word) => !titles.has(foldWord(word).replace(/\.$/u, '')));
  if (words.length < 2 || words.length > 4) return false;
  return words.every((word) => (nameWord.test(word) || particles.has(foldWord(word))) && !partWords.has(foldWord(word)) && !genericPlaceWords.has(foldWord(word)));
}

/**
 * Names of people in a field that takes "name or part", such as who holds an item or who measured: two to four words that
 * begin with a capital and say no part or place. A single word, or a name typed in small letters, is not recognised.
 *
 * @param text Such as `Laboratory Halm, Edda Rosmer`. @returns Such as `['Edda Rosmer']`.
 */
export function personNamesIn(text: string): string[] {
  return text
    .split(/[,;/()\n]|\s(?:and|with|of|by|for|at|from)\s/u)
    .map((part) => part.trim())
    .filter(looksLikeName);
}
