/** Local days and clock times of an IANA zone. The only use of the platform's zone data in the engine. */

const formatters = new Map<string, Intl.DateTimeFormat>();

function formatterFor(zone: string): Intl.DateTimeFormat {
  const known = formatters.get(zone);
  if (known !== undefined) return known;
  let made: Intl.DateTimeFormat;
  try {
    made = new Intl.DateTimeFormat('en-GB', {
      timeZone: zone, hourCycle: 'h23', year: 'numeric', month: '2-digit', day: '2-digit',
      hour: '2-digit', minute: '2-digit', second: '2-digit',
    });
  } catch {
    throw new RangeError(`place.zone is "${zone}"; it must be a zone of the IANA list, such as Europe/London.`);
  }
  formatters.set(zone, made);
  return made;
}

/** Offset of the zone's clocks from UTC at an instant, east positive. [ms] */
export function zoneOffsetMs(utcMs: number, zone: string): number {
  const wholeSecond = Math.floor(utcMs / 1000) * 1000;
  const part: Record<string, number> = {};
  for (const { type, value } of formatterFor(zone).formatToParts(wholeSecond)) part[type] = Number(value);
  const local = Date.UTC(
    part['year'] ?? 0, (part['month'] ?? 1) - 1, part['day'] ?? 1, part['hour'] ?? 0, part['minute'] ?? 0, part['second'] ?? 0,
  );
  return local - wholeSecond;
}

/** Local calendar day of an instant, YYYY-MM-DD. */
export function localDay(utcMs: number, zone: string): string {
  return new Date(utcMs + zoneOffsetMs(utcMs, zone)).toISOString().slice(0, 10);
}

/** First instant of a local day; where clocks skip midnight, the first instant that exists. [ms] */
export function startOfLocalDay(day: string, zone: string): number {
  const nominal = Date.parse(`${day}T00:00:00Z`);
  let start = nominal - zoneOffsetMs(nominal, zone);
  start = nominal - zoneOffsetMs(start, zone);
  // A clock change at midnight can leave the guess on the day before; step to the change itself.
  while (localDay(start, zone) < day) start += 900_000;
  return start;
}

/** The day after, YYYY-MM-DD. */
export function nextDay(day: string): string {
  return new Date(Date.parse(`${day}T00:00:00Z`) + 86_400_000).toISOString().slice(0, 10);
}
