/**
 * Text made comparable: lower case, without accents and invisible characters, with one kind of apostrophe, quote, dash
 * and space. `from` leads back: the folded character at `i` came from the original at `from[i]`; the entry past the end
 * is the length of the original.
 */
export interface FoldedText {
  readonly original: string;
  readonly folded: string;
  readonly from: readonly number[];
}

/** Letters that Unicode does not take apart into a base and an accent, and signs that people type for one another. */
const alike: Readonly<Record<string, string>> = {
  ß: 'ss', æ: 'ae', œ: 'oe', ø: 'o', đ: 'd', ð: 'd', ł: 'l', þ: 'th', ı: 'i', ħ: 'h', ŧ: 't',
  '’': "'", '‘': "'", ʼ: "'", '`': "'", '´': "'", '′': "'", '＇': "'",
  '“': '"', '”': '"', '″': '"', '„': '"',
  '‐': '-', '‑': '-', '‒': '-', '–': '-', '—': '-', '−': '-',
  º: '°', '˚': '°',
};

export function foldText(original: string): FoldedText {
  let folded = '';
  const from: number[] = [];
  let at = 0;
  for (const character of original) {
    const plain = foldCharacter(character);
    for (let unit = 0; unit < plain.length; unit += 1) from.push(at);
    folded += plain;
    at += character.length;
  }
  from.push(original.length);
  return { original, folded, from };
}

/** The same for a word on its own, where nobody needs the way back. */
export const foldWord = (word: string): string => foldText(word).folded;

function foldCharacter(character: string): string {
  const lower = character.toLowerCase();
  const replaced = alike[lower];
  if (replaced !== undefined) return replaced;
  return lower.normalize('NFKD').replace(/[\p{M}\p{Cf}]/gu, '').toLowerCase();
}
