import { z } from 'zod';

/** Enumerations of the case, each declared once and used by table, form and screen. */
export const eventTypes = ['fire', 'heat-damage', 'burn-injury', 'eye-injury', 'near-miss', 'undesired-circumstance'] as const;
export type EventType = (typeof eventTypes)[number];
export const eventTypeLabels: Record<EventType, string> = {
  fire: 'Fire',
  'heat-damage': 'Heat damage: scorch, melt or distortion',
  'burn-injury': 'Burn injury',
  'eye-injury': 'Eye injury',
  'near-miss': 'Near miss',
  'undesired-circumstance': 'Undesired circumstance',
};

const isOneOf = <Value extends string>(values: readonly Value[]) => (value: string | null | undefined): value is Value => values.some((known) => known === value);
export const isEventType = isOneOf(eventTypes);

/** What the reporter sees, in the reporter's words; it suggests an event type and never fixes it. */
export const sightings = ['mark', 'melted', 'bright-patch', 'smoke-or-fire', 'dont-know'] as const;
export type Sighting = (typeof sightings)[number];
export const sightingLabels: Record<Sighting, string> = {
  mark: 'Mark or scorch',
  melted: 'Melted or bent',
  'bright-patch': 'Bright patch, no mark',
  'smoke-or-fire': 'Smoke or fire, now out',
  'dont-know': "Don't know",
};
export const sightingSuggests: Record<Sighting, EventType> = {
  mark: 'heat-damage',
  melted: 'heat-damage',
  'bright-patch': 'near-miss',
  'smoke-or-fire': 'fire',
  'dont-know': 'undesired-circumstance',
};

export const yesNoUnknown = ['yes', 'no', 'dont-know'] as const;
export type YesNoUnknown = (typeof yesNoUnknown)[number];
export const yesNoUnknownLabels: Record<YesNoUnknown, string> = { yes: 'Yes', no: 'No', 'dont-know': "Don't know" };

export const foundPrecisions = ['exact', 'within-15-min', 'within-1-h', 'date-only', 'unknown'] as const;
export type FoundPrecision = (typeof foundPrecisions)[number];
export const foundPrecisionLabels: Record<FoundPrecision, string> = {
  exact: 'To the minute',
  'within-15-min': 'Within 15 minutes',
  'within-1-h': 'Within an hour',
  'date-only': 'The day only',
  unknown: "Don't know",
};

export const onsetBases = ['last-seen-sound', 'alarm', 'cctv', 'witness', 'inferred'] as const;
export type OnsetBasis = (typeof onsetBases)[number];
export const onsetBasisLabels: Record<OnsetBasis, string> = {
  'last-seen-sound': 'Last seen sound',
  alarm: 'Alarm log',
  cctv: 'Camera recording',
  witness: 'Witness',
  inferred: 'Inferred',
};

export const foundMeans = ['smell', 'smoke-seen', 'smoke-alarm', 'heat-felt', 'inspection', 'bright-spot', 'person-hurt', 'cctv', 'other'] as const;
export type FoundMeans = (typeof foundMeans)[number];
export const foundMeansLabels: Record<FoundMeans, string> = {
  smell: 'Smell',
  'smoke-seen': 'Smoke seen',
  'smoke-alarm': 'Smoke alarm',
  'heat-felt': 'Heat felt',
  inspection: 'Mark found on inspection',
  'bright-spot': 'Bright spot seen',
  'person-hurt': 'A person was hurt',
  cctv: 'Camera',
  other: 'Other',
};

export const extents = ['none', 'surface-mark', 'smouldering', 'flaming-self-out', 'flaming-put-out', 'beyond-item', 'beyond-room', 'beyond-building'] as const;
export type Extent = (typeof extents)[number];
export const extentLabels: Record<Extent, string> = {
  none: 'None',
  'surface-mark': 'Surface mark only',
  smouldering: 'Smouldering',
  'flaming-self-out': 'Flaming, went out by itself',
  'flaming-put-out': 'Flaming, put out by hand',
  'beyond-item': 'Spread beyond the item',
  'beyond-room': 'Spread beyond the room',
  'beyond-building': 'Spread beyond the building',
};

export const weatherSeen = ['clear', 'hazy', 'part-cloud', 'overcast', 'dont-know'] as const;
export type WeatherSeen = (typeof weatherSeen)[number];
export const weatherSeenLabels: Record<WeatherSeen, string> = {
  clear: 'Clear',
  hazy: 'Hazy',
  'part-cloud': 'Part cloud',
  overcast: 'Overcast',
  'dont-know': "Don't know",
};

export const risks = ['low', 'medium', 'high', 'severe'] as const;
export type Risk = (typeof risks)[number];
export const riskLabels: Record<Risk, string> = { low: 'Low', medium: 'Medium', high: 'High', severe: 'Severe' };
export const isRisk = isOneOf(risks);
/** Days within which an action falls due, by risk: our own default, editable per action. */
export const riskDueDays: Record<Risk, number> = { severe: 1, high: 7, medium: 30, low: 90 };

export const consequences = ['negligible', 'minor', 'moderate', 'major', 'severe'] as const;
export type Consequence = (typeof consequences)[number];
export const likelihoods = ['rare', 'unlikely', 'possible', 'likely', 'almost-certain'] as const;
export type Likelihood = (typeof likelihoods)[number];

export const triageCloseReasons = ['not-heat-event', 'outside-scope', 'referred', 'recorded-only'] as const;
export const triageCloseReasonLabels: Record<(typeof triageCloseReasons)[number], string> = {
  'not-heat-event': 'Not a heat event',
  'outside-scope': 'Outside scope',
  referred: 'Referred to another body',
  'recorded-only': 'Recorded only',
};

export const siteUses = ['office', 'dwelling', 'school', 'health-care', 'hotel', 'retail', 'warehouse', 'industrial', 'public-open-space', 'vehicle', 'other'] as const;

export const photoViews = ['overview', 'middle', 'close', 'square-on', 'panorama', 'skyline'] as const;
export type PhotoView = (typeof photoViews)[number];
export const photoViewLabels: Record<PhotoView, string> = {
  overview: 'Overview',
  middle: 'Middle distance',
  close: 'Close, with scale',
  'square-on': 'Square-on',
  panorama: 'Panorama',
  skyline: 'Skyline',
};

/** Letters and digits that are hard to mistake for one another, for receipts read out over a radio. */
export const receiptPattern = /^[A-HJ-NP-Z2-9]{2}-[A-HJ-NP-Z2-9]{4}-[A-HJ-NP-Z2-9]{2}$/;

/** Text as people type it: trimmed, control characters (except line breaks) and direction overrides removed. */
export const plainText = (max: number) =>
  z
    .string()
    .transform((text) => text.replace(/[\u0000-\u0008\u000B\u000C\u000E-\u001F\u007F\u202A-\u202E\u2066-\u2069]/gu, '').trim())
    .pipe(z.string().max(max, `Keep this under ${max.toLocaleString('en-GB')} characters; the rest fits in a note.`));
