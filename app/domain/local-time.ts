import { Temporal } from 'temporal-polyfill';

/** Clock times of a place: instants are UTC, people read and type the wall clock of the place's IANA zone. */

const zoned = (instant: Date, zone: string) => Temporal.Instant.fromEpochMilliseconds(instant.getTime()).toZonedDateTimeISO(zone);
const months = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'] as const;
const weekdays = ['Mon', 'Tue', 'Wed', 'Thu', 'Fri', 'Sat', 'Sun'] as const;
const two = (value: number) => String(value).padStart(2, '0');

/** `9 May 2026` */
export function formatDay(instant: Date, zone: string): string {
  const at = zoned(instant, zone);
  return `${at.day} ${months[at.month - 1]} ${at.year}`;
}

/** `Sat 9 May 2026` */
export function formatWeekday(instant: Date, zone: string): string {
  return `${weekdays[zoned(instant, zone).dayOfWeek - 1]} ${formatDay(instant, zone)}`;
}

/** `15:10` */
export function formatClock(instant: Date, zone: string): string {
  const at = zoned(instant, zone);
  return `${two(at.hour)}:${two(at.minute)}`;
}

/** `9 May 2026, 15:10` */
export const formatDayClock = (instant: Date, zone: string): string => `${formatDay(instant, zone)}, ${formatClock(instant, zone)}`;

/** `2026-05-09`, the local day. */
export const localDay = (instant: Date, zone: string): string => zoned(instant, zone).toPlainDate().toString();

/** `9 May 2026` from an ISO date. */
export function formatIsoDay(isoDay: string): string {
  const day = Temporal.PlainDate.from(isoDay);
  return `${day.day} ${months[day.month - 1]} ${day.year}`;
}

/** `UTC+1`, `UTC+5:30`, `UTC` */
export function formatOffset(instant: Date, zone: string): string {
  const minutes = zoned(instant, zone).offsetNanoseconds / 60_000_000_000;
  if (minutes === 0) return 'UTC';
  const hours = Math.trunc(Math.abs(minutes) / 60);
  const rest = Math.abs(minutes) % 60;
  return `UTC${minutes > 0 ? '+' : '-'}${hours}${rest === 0 ? '' : `:${two(rest)}`}`;
}

/** Value for a `datetime-local` field. */
export function toLocalInput(instant: Date, zone: string): string {
  return zoned(instant, zone).toPlainDateTime().round({ smallestUnit: 'minute', roundingMode: 'trunc' }).toString({ smallestUnit: 'minute' });
}

export type LocalReading =
  | { readonly kind: 'instant'; readonly instant: Date }
  /** The clock jumped over this time; `after` is the instant that as many minutes past the jump would be. */
  | { readonly kind: 'gap'; readonly after: Date }
  /** The clock showed this time twice; both instants are given, earlier first. */
  | { readonly kind: 'fold'; readonly first: Date; readonly second: Date }
  | { readonly kind: 'unreadable' };

/**
 * The instant that a wall-clock reading stands for.
 *
 * @param local `YYYY-MM-DDTHH:MM` as typed.
 * @param which for a repeated hour, the first or second pass, when the person has said.
 */
export function fromLocalInput(local: string, zone: string, which?: 'first' | 'second'): LocalReading {
  let plain: Temporal.PlainDateTime;
  try {
    plain = Temporal.PlainDateTime.from(local);
  } catch {
    // Whatever could not be read as a date and time is reported beside the field.
    return { kind: 'unreadable' };
  }
  const earlier = plain.toZonedDateTime(zone, { disambiguation: 'earlier' });
  const later = plain.toZonedDateTime(zone, { disambiguation: 'later' });
  const first = new Date(earlier.epochMilliseconds);
  const second = new Date(later.epochMilliseconds);
  if (first.getTime() === second.getTime()) return { kind: 'instant', instant: first };
  // In a gap both readings land on another wall time than the one typed.
  if (!earlier.toPlainDateTime().equals(plain)) return { kind: 'gap', after: second };
  if (which) return { kind: 'instant', instant: which === 'first' ? first : second };
  return { kind: 'fold', first, second };
}

/** Whole days from one instant's local day to another's. */
export function daysBetween(from: Date, to: Date, zone: string): number {
  return zoned(from, zone).toPlainDate().until(zoned(to, zone).toPlainDate()).days;
}

/** Whether the name is an IANA zone; a fixed offset such as `+01:00` is none, since it knows no summer time. */
export function isZone(name: string): boolean {
  if (!/^[A-Za-z]/u.test(name)) return false;
  try {
    Temporal.Instant.fromEpochMilliseconds(0).toZonedDateTimeISO(name);
    return true;
  } catch {
    // Temporal throws for names that it does not know; that is the answer.
    return false;
  }
}
