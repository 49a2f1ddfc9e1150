import type { WithheldClass } from './released-case.ts';

/**
 * What gives a person or a place away by its form, whether or not the case holds it. All patterns run over folded text:
 * lower case, one kind of apostrophe, quote, dash and space.
 */
export interface TellingPattern {
  readonly id: 'coordinates' | 'postcode' | 'link' | 'email' | 'telephone' | 'plate' | 'health' | 'child' | 'legal';
  readonly withheld: WithheldClass;
  readonly pattern: RegExp;
  /** Looks closer at a match; left out: every match counts. */
  readonly accepts?: (match: string, original: string, after: string) => boolean;
  /** The sentence around the match goes with it. */
  readonly wholeSentence?: boolean;
}

const side = '[nsew]';
const decimals = '-?\\d{1,3}\\.\\d{3,}';
const gap = '\\s*[,;/ ]?\\s*';
const coordinateForms = [
  // 53.50000, -1.60000
  `${decimals}\\s*°?\\s*${side}?${gap}${decimals}(?:\\s*°?\\s*${side}(?![\\p{L}]))?`,
  // 51.40 n 2.90 w; n 51.40 w 2.90
  `\\d{1,3}(?:\\.\\d+)?\\s*°?\\s*[ns]${gap}\\d{1,3}(?:\\.\\d+)?\\s*°?\\s*[ew](?![\\p{L}\\p{N}])`,
  `(?<![\\p{L}\\p{N}])[ns]\\s*\\d{1,3}(?:\\.\\d+)?\\s*°?${gap}[ew]\\s*\\d{1,3}(?:\\.\\d+)?\\s*°?`,
  // One value alone, to a hundred metres or closer, with its side
  `\\d{1,3}\\.\\d{3,}\\s*°?\\s*${side}(?![\\p{L}\\p{N}])`,
  // Degrees, minutes and seconds; without seconds only with a side, since bearings are written so too
  `(?:${side}\\s*)?\\d{1,3}\\s*°\\s*\\d{1,2}\\s*'\\s*\\d{1,2}(?:\\.\\d+)?\\s*(?:"|'')(?:\\s*${side}(?![\\p{L}]))?`,
  `\\d{1,3}\\s*°\\s*\\d{1,2}(?:\\.\\d+)?\\s*'\\s*${side}(?![\\p{L}])`,
  `(?<![\\p{L}])${side}\\s*\\d{1,3}\\s*°\\s*\\d{1,2}(?:\\.\\d+)?\\s*'`,
  // Named
  `(?<![\\p{L}])(?:lat|latitude|lon|lng|longitude)(?![\\p{L}])\\.?\\s*[:=]?\\s*-?\\d{1,3}(?:\\.\\d+)?\\s*°?\\s*(?:${side}(?![\\p{L}]))?`,
  // Open grid codes: letters and a plus, and three words after three strokes
  '(?<![\\p{L}\\p{N}])[23456789cfghjmpqrvwx]{4,8}\\+[23456789cfghjmpqrvwx]{2,3}(?![\\p{L}\\p{N}])',
  '\\/{3}\\p{L}+\\.\\p{L}+\\.\\p{L}+',
];

/** Looked for where the letters are capitals, or all small ones that are no unit. */
const postcodeForms = [
  // United Kingdom, Canada, United States after the letters of a state, and grid letters with six to ten figures
  '(?<![\\p{L}\\p{N}])[a-z]{1,2}\\d[a-z\\d]?\\s+\\d[a-z]{2}(?![\\p{L}\\p{N}])',
  '(?<![\\p{L}\\p{N}])[a-z]\\d[a-z]\\s\\d[a-z]\\d(?![\\p{L}\\p{N}])',
  '(?<![\\p{L}\\p{N}])[a-z]{2},?\\s\\d{5}(?:-\\d{4})?(?![\\p{L}\\p{N}])',
  '(?<![\\p{L}\\p{N}])[a-hj-z]{2}\\s?\\d{3,5}\\s\\d{3,5}(?![\\p{L}\\p{N}])',
];

const limbs = 'hands?|fingers?|thumbs?|palms?|wrists?|arms?|elbows?|shoulders?|eyes?|eyelids?|ears?|cheeks?|legs?|knees?|feet|foot|ankles?';
const bodyParts = `${limbs}|necks?|faces?|foreheads?|scalps?|hair|heads?|backs?|chests?|skin|retinas?|eyesight|sight|vision`;
const hurtParts = `${limbs}|face|hair|skin|scalp|forehead`;
const healthForms = [
  `(?<![\\p{L}])(?:her|his|their|my|your|our|whose)\\s+(?:own\\s+)?(?:left\\s+|right\\s+)?(?:${bodyParts})(?![\\p{L}])`,
  `(?<![\\p{L}])(?:left|right|both)\\s+(?:${limbs})(?![\\p{L}]|[\\s-]side)`,
  `(?<![\\p{L}])(?:${hurtParts})\\s+(?:was\\s+|were\\s+|got\\s+|is\\s+|are\\s+)?(?:badly\\s+|slightly\\s+)?(?:burn\\w*|blister\\w*|scald\\w*|hurt\\w*|injur\\w*|swollen|sore)(?![\\p{L}])`,
  `(?<![\\p{L}])(?:burn(?:ed|t|s)?|blister\\w*|scald\\w*|injur\\w*|hurt)\\s+(?:(?:to|on|of|in)\\s+)?(?:the\\s+|a\\s+|one\\s+)?(?:left\\s+|right\\s+)?(?:${hurtParts})(?![\\p{L}])`,
  '(?<![\\p{L}])(?:blistered|hospital\\w*|ambulance\\w*|paramedic\\w*|surger(?:y|ies)|surgeon|diagnos\\w*|medicat\\w*|pregnan\\w*|asthma\\w*|diabet\\w*|epilep\\w*|scar(?:s|red|ring)?|wounds|wounded|a wound|bandag\\w*|skin graft\\w*|(?:first|second|third)[- ]degree|sick leave|off sick|days off work)(?![\\p{L}])',
];

const childForms = [
  '(?<![\\p{L}])(?:child(?:ren|\'s)?|schoolchild(?:ren)?|toddlers?|bab(?:y|ies)|infants?|boys?|girls?|kids?|pupils?|teenagers?|schoolboys?|schoolgirls?|sons?|daughters?|grandsons?|granddaughters?)(?:\'s)?(?![\\p{L}])',
  '(?<![\\p{L}])(?:aged?|age of)\\s+\\d{1,2}(?![\\d.])(?!\\s*(?:mm|m|cm|min|s|h|%|°))',
  '(?<![\\p{L}\\p{N}])\\d{1,2}[- ]years?[- ]olds?(?![\\p{L}])',
  '(?<![\\p{L}])under[- ]1[0-8](?![\\d.])(?!\\s*(?:mm|m|cm|min|s|h|%|°|minutes|metres))',
];

const legalForms = '(?<![\\p{L}])(?:solicitors?|lawyers?|attorneys?|barristers?|counsel|law firm|legal advice|legally privileged|privileged|litigation|lawsuit|sue[ds]?|suing|liability|without prejudice)(?![\\p{L}])';

const phoneForm = '(?<![\\p{L}\\p{N}.])(?:\\+|\\()?\\d[\\d ()/.\\-]{5,}\\d(?![\\p{L}\\p{N}])';
const dateForm = /^(?:\d{4}[-/.]\d{1,2}[-/.]\d{1,2}|\d{1,2}[-/.]\d{1,2}[-/.]\d{2,4})(?:\s+\d{1,2}(?:\.\d{2})?)?$/u;
const unitAfter = /^\s?(?:mm|cm|km|m|m²|m2|w|kw|°|%|s|min|h|px|kg|g|gbp|eur|usd|hpa)(?![\p{L}])/u;

const inCapitals = (original: string): boolean => original === original.toUpperCase();

function isPostcode(_match: string, original: string): boolean {
  if (inCapitals(original)) return true;
  const letters = original.replace(/[^\p{L}]/gu, '');
  return letters === letters.toLowerCase() && letters.length >= 3 && /\d\s+\d[a-z]{2}$/u.test(original) && !/(?:mm|cm|km|am|pm|kw|mw|kg|hz|in|ft|th|nd|rd|st)$/u.test(original);
}

/** Whether figures in a row are a telephone number rather than a date, a range or a measured value. */
function isTelephone(match: string, _original: string, after: string): boolean {
  const text = match.trim();
  const digits = text.replace(/\D/gu, '').length;
  if (digits < 7 || digits > 17 || dateForm.test(text) || text.split(/\s+/u).every((part) => /^\d+\.\d+$/u.test(part))) return false;
  if (/^(?:\+|\(|0\d)/u.test(text)) return true;
  if (unitAfter.test(after)) return false;
  return digits >= 9 || /^\d{3}[-. ]\d{4}$/u.test(text);
}

const any = (forms: readonly string[]): RegExp => new RegExp(forms.join('|'), 'gu');

export const tellingPatterns: readonly TellingPattern[] = [
  { id: 'link', withheld: 'personal', pattern: any(['(?:https?:\\/\\/|www\\.)[^\\s<>"]+']) },
  { id: 'coordinates', withheld: 'exact-place', pattern: any(coordinateForms) },
  { id: 'postcode', withheld: 'exact-place', pattern: any(postcodeForms), accepts: isPostcode },
  { id: 'email', withheld: 'personal', pattern: any(['[\\p{L}\\p{N}._%+\'-]+\\s*(?:@|\\(at\\)|\\[at\\])\\s*[\\p{L}\\p{N}-]+(?:\\s*(?:\\.|\\(dot\\)|\\[dot\\])\\s*[\\p{L}\\p{N}-]+)+']) },
  { id: 'telephone', withheld: 'personal', pattern: any([phoneForm]), accepts: isTelephone },
  { id: 'plate', withheld: 'personal', pattern: any(['(?<![\\p{L}\\p{N}])[a-z]{2}\\d{2}\\s?[a-z]{3}(?![\\p{L}\\p{N}])']), accepts: (_match, original) => inCapitals(original) },
  { id: 'legal', withheld: 'legal', pattern: any([legalForms]), wholeSentence: true },
  { id: 'child', withheld: 'child', pattern: any(childForms) },
  { id: 'health', withheld: 'health', pattern: any(healthForms) },
];
