import { wallFields, wallIndexes } from './report-place.ts';

/** Names and words that the report form and its reading share. */

/** How a reporter may answer "When was it found?" */
export const foundAnswers = ['just-now', 'at', 'range', 'dont-know'] as const;
export type FoundAnswer = (typeof foundAnswers)[number];
export const foundAnswerLabels: Record<FoundAnswer, string> = { 'just-now': 'Just now', at: 'Today at…', range: 'A range', 'dont-know': "Don't know" };

/** Fields that hold a wall-clock time of the place. */
export const momentFields = ['foundLocal', 'foundFromLocal', 'foundToLocal', 'lastSoundLocal'] as const;
export type MomentField = (typeof momentFields)[number];
/** Field that says which pass of a repeated hour is meant. */
export const passField = (field: MomentField) => `${field}Pass`;

/** A repeated hour that the person has to decide: what each pass is called. */
export interface RepeatedHour {
  readonly first: string;
  readonly second: string;
}
export type RepeatedHours = Partial<Record<MomentField, RepeatedHour>>;

/** The four answers a report needs, in the order of the page. `foundWhen` and the last two may be "Don't know". */
export const requiredAnswers = [
  { name: 'siteId', missing: 'where it is' },
  { name: 'foundWhen', missing: 'when it was found' },
  { name: 'sighting', missing: 'what you see' },
  { name: 'anyoneHurt', missing: 'if anyone was hurt' },
] as const;

/** Where this device may say how many of the four are answered, and which is missing. */
export function answersIn(value: (name: string) => string): { answered: number; missing: string | null } {
  const open = requiredAnswers.filter(({ name }) => value(name) === '');
  return { answered: requiredAnswers.length - open.length, missing: open[0]?.missing ?? null };
}

/** Fields in the order of the page, for the summary of what has to be mended. */
export const reportFieldLabels: readonly { readonly name: string; readonly label: string }[] = [
  { name: 'photos', label: 'Photos' },
  { name: 'siteId', label: 'Where is it?' },
  { name: 'placeDetail', label: 'The spot, in words' },
  { name: 'latitudeDeg', label: 'Latitude' },
  { name: 'longitudeDeg', label: 'Longitude' },
  { name: 'opticPlace', label: 'Where the thing stands that bent the light' },
  ...wallIndexes.flatMap((index) => [
    { name: wallFields(index).from, label: `Wall ${index}, first end` },
    { name: wallFields(index).to, label: `Wall ${index}, other end` },
  ]),
  { name: 'foundWhen', label: 'When was it found?' },
  { name: 'foundLocal', label: 'Found at' },
  { name: 'foundFromLocal', label: 'Last seen sound' },
  { name: 'foundToLocal', label: 'Found' },
  { name: 'lastSoundLocal', label: 'Last seen sound' },
  { name: 'sighting', label: 'What do you see?' },
  { name: 'narrative', label: 'In your words' },
  { name: 'anyoneHurt', label: 'Was anyone hurt?' },
  { name: 'injuryPart', label: 'Part of the body' },
  { name: 'interimControl', label: 'What covers or shades it' },
  { name: 'opticPrinted', label: 'What is printed on it' },
  { name: 'opticFacesDeg', label: 'Which way it faces' },
  { name: 'contactName', label: 'Name' },
  { name: 'contactEmail', label: 'E-mail' },
  { name: 'contactPhone', label: 'Phone' },
];
