import { z } from 'zod';
import { plainText } from './incident.ts';
import { formatClock, formatDay } from './local-time.ts';

/** Sources of what happened when. Every reading is kept as the clock showed it, with the error of that clock beside it. */
export const timelineSources = ['alarm-panel', 'camera', 'access-log', 'building-system', 'phone', 'person', 'other'] as const;
export type TimelineSource = (typeof timelineSources)[number];
export const timelineSourceLabels: Record<TimelineSource, string> = {
  'alarm-panel': 'Alarm panel',
  camera: 'Camera recording',
  'access-log': 'Access log',
  'building-system': 'Building system',
  phone: 'Phone or message',
  person: 'A person’s watch',
  other: 'Other record',
};

const clockError = z
  .string()
  .default('')
  .transform((text) => (text.trim() === '' ? 0 : Number(text.trim().replace(',', '.').replace('−', '-'))))
  .pipe(z.number('Write the clock error in minutes, such as 6 or −1.5.').min(-527_040, 'A clock error is at most a year.').max(527_040, 'A clock error is at most a year.'))
  .transform((minutes) => Math.round(minutes * 60));

/** An event as typed from a log or a recording; its clock time is read beside it. */
export const timelineEventSchema = z.object({
  clientId: z.uuid('The form is damaged. Open the page anew; what you typed can be copied from here.'),
  source: z.enum(timelineSources, 'Choose what the time was read from.'),
  sourceName: plainText(120).pipe(z.string().min(2, 'Name the source: which panel, which camera.')),
  /** Reading minus true time. */
  clockErrorMin: clockError,
  clockErrorBasis: plainText(300).pipe(z.string().min(2, 'Say how the clock error is known, such as “compared with a phone, 3 Feb”, or “not checked”.')),
  what: plainText(500).pipe(z.string().min(3, 'Say what happened then; no names of people.')),
  attachmentId: z.union([z.literal('').transform(() => null), z.uuid('Choose the document from the list.')]).default(null),
});
export type TimelineEventForm = z.infer<typeof timelineEventSchema>;

/** One happening, before it is put into words. Instants in UTC; the reading is null where nobody read a clock. */
export interface Happening {
  readonly key: string;
  readonly at: Date;
  /** `2026-02-03` only: the hour is not known. */
  readonly dayOnly?: boolean;
  readonly source: string;
  readonly what: string;
  readonly reading: Date | null;
  readonly clockErrorS: number;
  readonly basis: string;
  /** Path within the case, such as `/photos#photo-…`. */
  readonly path: string | null;
  readonly withdrawn?: string | null;
  /** Set for an event entered by hand. */
  readonly eventId?: string;
}

export interface TimelineRow {
  readonly key: string;
  readonly day: string;
  readonly trueTime: string;
  readonly reading: string;
  readonly correction: string;
  readonly source: string;
  readonly what: string;
  readonly basis: string;
  readonly path: string | null;
  readonly withdrawn: string | null;
  readonly eventId: string | null;
}

/** True time is the reading less the error of the clock that it was read from. */
export const trueTime = (reading: Date, clockErrorS: number): Date => new Date(reading.getTime() - clockErrorS * 1_000);

/** `less 6 min`, `plus 42 s`; `none known` where the clock is taken to be right. */
export function correctionWords(clockErrorS: number): string {
  if (clockErrorS === 0) return 'none';
  const size = Math.abs(clockErrorS);
  const span = size < 120 || size % 60 !== 0 ? (size < 120 ? `${size} s` : `${Math.floor(size / 60)} min ${size % 60} s`) : `${size / 60} min`;
  return `${clockErrorS > 0 ? 'less' : 'plus'} ${span}`;
}

/** Stands for the reading of an event whose time was not read from a clock. */
export const noReading = 'no clock read';

/** Happenings in the order of true time, in words. Equal times keep the order in which they came. */
export function timelineRows(happenings: readonly Happening[], zone: string): TimelineRow[] {
  const ordered = happenings.map((happening, index) => ({ happening, index })).sort((a, b) => a.happening.at.getTime() - b.happening.at.getTime() || a.index - b.index);
  return ordered.map(({ happening }) => ({
    key: happening.key,
    day: formatDay(happening.at, zone),
    trueTime: happening.dayOnly ? 'hour not known' : clockTo(happening.at, zone),
    reading: happening.reading ? clockTo(happening.reading, zone) : noReading,
    correction: happening.reading ? correctionWords(happening.clockErrorS) : '',
    source: happening.source,
    what: happening.what,
    basis: happening.basis,
    path: happening.path,
    withdrawn: happening.withdrawn ?? null,
    eventId: happening.eventId ?? null,
  }));
}

/** Seconds are shown where the source gave them. */
function clockTo(instant: Date, zone: string): string {
  const seconds = instant.getUTCSeconds();
  return seconds === 0 ? formatClock(instant, zone) : `${formatClock(instant, zone)}:${String(seconds).padStart(2, '0')}`;
}

/** The finding of the page: how many clocks were read, and whether any was corrected. */
export function timelineHeading(happenings: readonly Happening[]): string {
  const read = happenings.filter((one) => one.reading !== null && !one.withdrawn);
  const corrected = read.filter((one) => one.clockErrorS !== 0);
  if (read.length === 0) return 'No clock reading is on record yet';
  if (corrected.length === 0) return `${read.length} clock ${read.length === 1 ? 'reading' : 'readings'}, none of them corrected`;
  return `${corrected.length} of ${read.length} clock readings ${corrected.length === 1 ? 'is' : 'are'} corrected`;
}

export const withdrawEventSchema = z.object({
  eventId: z.uuid('Choose an event of this case.'),
  reason: plainText(300).pipe(z.string().min(3, 'Say why it is withdrawn.')),
});
