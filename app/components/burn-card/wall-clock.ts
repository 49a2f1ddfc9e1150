const formats = new Map<string, Intl.DateTimeFormat>();

function partsFormat(zone: string): Intl.DateTimeFormat {
  const known = formats.get(zone);
  if (known) return known;
  const made = new Intl.DateTimeFormat('en-GB', {
    timeZone: zone, hourCycle: 'h23', year: 'numeric', month: '2-digit', day: '2-digit', hour: '2-digit', minute: '2-digit', second: '2-digit',
  });
  formats.set(zone, made);
  return made;
}

export interface WallTime {
  readonly year: number;
  readonly month: number;
  readonly day: number;
  readonly hour: number;
  readonly minute: number;
}

/** Reading of the wall clock of a zone at an instant. */
export function wallTime(utcMs: number, zone: string): WallTime {
  const found = new Map(partsFormat(zone).formatToParts(utcMs).map((part): [string, number] => [part.type, Number(part.value)]));
  const get = (name: string) => found.get(name) ?? 0;
  return { year: get('year'), month: get('month'), day: get('day'), hour: get('hour'), minute: get('minute') };
}

/** Offset of the zone's clock from UTC at an instant, east positive. [min] */
export function zoneOffsetMin(utcMs: number, zone: string): number {
  const wall = wallTime(utcMs, zone);
  const asUtc = Date.UTC(wall.year, wall.month - 1, wall.day, wall.hour, wall.minute);
  return Math.round((asUtc - Math.floor(utcMs / 60_000) * 60_000) / 60_000);
}

/**
 * Instant at which the wall clock of a zone shows the given local date and minutes after midnight. In a gap the later
 * reading is taken, in a repeated hour the first.
 *
 * @param date `YYYY-MM-DD` @param minutes 0…1440 and beyond.
 */
export function wallToUtcMs(date: string, minutes: number, zone: string): number {
  const guess = Date.parse(`${date}T00:00:00Z`) + minutes * 60_000;
  const before = guess - zoneOffsetMin(guess - 43_200_000, zone) * 60_000;
  if (zoneOffsetMin(before, zone) === zoneOffsetMin(guess - 43_200_000, zone)) return before;
  return guess - zoneOffsetMin(before, zone) * 60_000;
}

const two = (value: number) => String(value).padStart(2, '0');

/** "08:40" on the wall clock. */
export function clockWords(utc: string | number, zone: string): string {
  const wall = wallTime(typeof utc === 'number' ? utc : Date.parse(utc), zone);
  return `${two(wall.hour)}:${two(wall.minute)}`;
}

/** `YYYY-MM-DD` on the wall calendar. */
export function localDate(utc: string | number, zone: string): string {
  const wall = wallTime(typeof utc === 'number' ? utc : Date.parse(utc), zone);
  return `${wall.year}-${two(wall.month)}-${two(wall.day)}`;
}

const weekdays = ['Sun', 'Mon', 'Tue', 'Wed', 'Thu', 'Fri', 'Sat'];
export const monthNames = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'];

/** "Tue 3 Feb 2026", or without the year. */
export function dateWords(date: string, withYear = true): string {
  const day = new Date(`${date}T00:00:00Z`);
  const year = withYear ? ` ${day.getUTCFullYear()}` : '';
  return `${weekdays[day.getUTCDay()]} ${day.getUTCDate()} ${monthNames[day.getUTCMonth()]}${year}`;
}

/** "UTC+1", "UTC+5:30", "UTC". */
export function offsetWords(utc: string | number, zone: string): string {
  const offset = zoneOffsetMin(typeof utc === 'number' ? utc : Date.parse(utc), zone);
  if (offset === 0) return 'UTC';
  const hours = Math.floor(Math.abs(offset) / 60);
  const rest = Math.abs(offset) % 60;
  return `UTC${offset < 0 ? '-' : '+'}${hours}${rest === 0 ? '' : `:${two(rest)}`}`;
}

/** Span of one local day between two clock hours, such as 04 to 22 for a register row. */
export function daySpan(date: string, zone: string, fromHour = 4, toHour = 22): { fromUtc: string; toUtc: string } {
  return {
    fromUtc: new Date(wallToUtcMs(date, fromHour * 60, zone)).toISOString(),
    toUtc: new Date(wallToUtcMs(date, toHour * 60, zone)).toISOString(),
  };
}
