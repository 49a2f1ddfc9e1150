import { foldWord } from './folded-text.ts';

/** Patterns over folded text under which the names that a case holds may stand. Null where there is nothing to look for. */
export interface NamePatterns {
  /** Whole names, found however they are written and joined. */
  readonly whole: RegExp | null;
  /** Single words of names, found however they are written. */
  readonly parts: RegExp | null;
  /** Parts of names that are also ordinary words, or very short: found where the original begins with a capital. */
  readonly capitalised: RegExp | null;
}

/**
 * Words of everyday English, and of this work, that are also given or family names. In lower case they are taken for the
 * word; the person who prepares a release reads the lines, and is told which names this concerns.
 */
const ordinaryWords = new Set(
  ('mark marks rose will may grace hope faith joy summer autumn dawn june april august art bill bob brand brook brown black white green gray grey ' +
    'carpenter chip church clay cliff cook cross day dean drew field fields fisher flint forest fox frank gene glass gold grant guy hall heath hill ' +
    'hunter ivy jack jet king lance lane law lily long major marsh mason may miles mill miller moss neal noble olive page park parks penny pearl pat ' +
    'pierce pool porter potter price rich rob robin ruby sage sandy saw sky smith stone storm street summers sunny swan taylor terry turner ' +
    'victor violet walker wall ward warden water waters west wood woods young sun lens ray rays bright burns cole coles ash bush bird').split(' '),
);

export const particles = new Set('van von der den de del della di da dos das du la le el al bin ibn abu ter ten zu zum zur af av und and mac mc st san'.split(' '));
export const titles = new Set('mr mrs ms miss mx dr prof sir dame lord lady rev herr frau mme'.split(' '));
const withoutWordSpaces = /[\p{Script=Han}\p{Script=Hiragana}\p{Script=Katakana}\p{Script=Thai}\p{Script=Hangul}]/u;

const escapeSigns = (text: string): string => text.replace(/[.*+?^${}()|[\]\\/]/gu, '\\$&');
const before = '(?<![\\p{L}\\p{N}])';
const after = '(?![\\p{L}\\p{N}])';
const ending = "(?:'s|s'|s|es)?";

/** Spellings of one word of a name: accents dropped, and written out as they are in German and the Nordic languages. */
function spellings(word: string): string[] {
  const written = word.toLowerCase().replace(/[äöüåø]/gu, (letter) => ({ ä: 'ae', ö: 'oe', ü: 'ue', å: 'aa', ø: 'oe' })[letter] ?? letter);
  const all = new Set([foldWord(word), foldWord(written), foldWord(word).replace(/['-]/gu, '')]);
  const short = foldWord(word).replace(/([aou])e/gu, '$1');
  if (short.length >= 4) all.add(short);
  return [...all].filter(Boolean);
}

const wordsOf = (name: string): string[] => name.trim().split(/[\s,;()]+/u).map((word) => word.replace(/^[.'’-]+|[.'’-]+$/gu, '')).filter(Boolean);
const oneOf = (options: readonly string[]): string => `(?:${options.map(escapeSigns).join('|')})`;

interface Forms {
  readonly whole: Set<string>;
  readonly parts: Set<string>;
  readonly capitalised: Set<string>;
}

/** The name whole, in either order, with anything but letters between its words, also inside a longer word such as a file name. */
function addWhole(words: readonly string[], forms: Forms): void {
  const named = words.filter((word) => !titles.has(foldWord(word)));
  if (named.length === 0) return;
  if (named.length === 1) {
    const only = named[0] ?? '';
    if (withoutWordSpaces.test(only)) for (const spelling of spellings(only)) forms.whole.add(escapeSigns(spelling));
    return;
  }
  const between = '[^\\p{L}\\p{N}]{0,3}';
  for (const order of [named, [...named.slice(-1), ...named.slice(0, -1)]]) {
    const letters = order.join('').length;
    const pattern = order.map((word) => oneOf(spellings(word))).join(between);
    forms.whole.add(letters >= 8 ? `${pattern}${ending}` : `${before}${pattern}${ending}${after}`);
  }
  const dotted = named.map((word) => `${escapeSigns(foldWord(word).slice(0, 1))}\\.`).join('\\s?');
  forms.whole.add(`${before}${dotted}${after}`);
}

/** Each word of the name alone, and the parts of a double name. */
function addParts(words: readonly string[], forms: Forms): void {
  for (const word of words.flatMap((one) => [one, ...one.split(/[-'’]/u)])) {
    const folded = foldWord(word);
    if (folded.length < 2 || titles.has(folded) || particles.has(folded)) continue;
    const rare = folded.length >= 3 && !ordinaryWords.has(folded);
    for (const spelling of spellings(word)) {
      if (withoutWordSpaces.test(word)) forms.parts.add(escapeSigns(spelling));
      else if (rare) forms.parts.add(`${before}${escapeSigns(spelling)}${ending}${after}`);
      else forms.capitalised.add(`${before}${escapeSigns(spelling)}${ending}${after}`);
    }
  }
}

const joined = (forms: ReadonlySet<string>): RegExp | null =>
  forms.size === 0 ? null : new RegExp([...forms].sort((a, b) => b.length - a.length || (a < b ? -1 : 1)).join('|'), 'gu');

/** Patterns for every name in the list, whole and in parts. Names of one letter cannot be looked for. */
export function namePatterns(names: readonly string[]): NamePatterns {
  const forms: Forms = { whole: new Set(), parts: new Set(), capitalised: new Set() };
  for (const name of names) {
    const words = wordsOf(name);
    addWhole(words, forms);
    addParts(words, forms);
  }
  return { whole: joined(forms.whole), parts: joined(forms.parts), capitalised: joined(forms.capitalised) };
}

/** Whole names only, for searching bytes in which our own words stand as well. */
export function wholeNamePattern(names: readonly string[]): RegExp | null {
  const forms: Forms = { whole: new Set(), parts: new Set(), capitalised: new Set() };
  for (const name of names) addWhole(wordsOf(name), forms);
  return joined(forms.whole);
}

/** Parts of the names that are also ordinary words: found only with a capital, so somebody has to read for them. */
export function namesLikeWords(names: readonly string[]): readonly string[] {
  const found = names.flatMap((name) => wordsOf(name).filter((word) => ordinaryWords.has(foldWord(word))));
  return [...new Set(found)].sort();
}

export const genericPlaceWords = new Set(
  ('house block court plot hotel bay ridge centre center offices office depot shop museum training lodge reserve building tower park road street lane quay ' +
    'square flat flats floor observatory publishing school hospital mill farm hall works site unit north south east west new old the of and at upper lower ' +
    'great little gap hill station estate estates garden gardens terrace yard wing college university library market house').split(' '),
);

/** Patterns for the names of sites and organisations: whole, two words of one together, and words that no other place has. */
export function placePatterns(names: readonly string[]): readonly RegExp[] {
  const forms: Forms = { whole: new Set(), parts: new Set(), capitalised: new Set() };
  for (const name of names) {
    const words = wordsOf(name).map(foldWord).filter(Boolean);
    for (const [index, word] of words.entries()) {
      const next = words[index + 1];
      if (next !== undefined) forms.parts.add(`${before}${escapeSigns(word)}[\\s,.-]{1,3}${escapeSigns(next)}${ending}${after}`);
      if (word.length >= 4 && !genericPlaceWords.has(word) && !/^\d+$/u.test(word)) forms.parts.add(`${before}${escapeSigns(word)}${ending}${after}`);
    }
    if (words.length > 0 && words.join('').length >= 4) forms.whole.add(words.map(escapeSigns).join('[^\\p{L}\\p{N}]{0,3}'));
  }
  return [joined(forms.whole), joined(forms.parts)].filter((pattern) => pattern !== null);
}

/** A postal address as written, its lines on their own, and house number with street. */
export function addressPattern(addresses: readonly string[]): RegExp | null {
  const forms = new Set<string>();
  for (const address of addresses) {
    for (const line of [address, ...address.split(/[,;\n]/u)]) {
      const words = wordsOf(line).map(foldWord).filter(Boolean);
      // A line without a number is the name of a street or town, which the site's own name often holds.
      if (words.length < 2 || !words.some((word) => /\d/u.test(word))) continue;
      const numbers = words.filter((word) => /\d/u.test(word));
      const street = words.filter((word) => !/\d/u.test(word));
      const gap = '[^\\p{L}\\p{N}]{1,3}';
      forms.add(`${before}${words.map(escapeSigns).join(gap)}${after}`);
      if (street.length > 0 && numbers.length === 1) {
        const [number, name] = [escapeSigns(numbers[0] ?? ''), street.map(escapeSigns).join(gap)];
        forms.add(`${before}${number}${gap}${name}${after}`);
        forms.add(`${before}${name}${gap}${number}${after}`);
      }
    }
  }
  return joined(forms);
}
