/**
 * iCalendar text after RFC 5545 (IETF, 2009): CRLF line ends, lines folded at 75 octets (3.1), escaped text (3.3.11),
 * stable UIDs (3.8.4.7) so that a calendar replaces an entry in place of adding it again.
 */
interface CalendarEntry {
  /** The same for ever for the same thing, unique in the world: `action-<uuid>@host`. */
  readonly uid: string;
  readonly summary: string;
  readonly description: string;
  readonly url: string;
  /** Raised with every change. */
  readonly sequence: number;
}

export interface CalendarTask extends CalendarEntry {
  /** ISO day. */
  readonly dueOn: string;
  readonly status: 'NEEDS-ACTION' | 'IN-PROCESS' | 'COMPLETED' | 'CANCELLED';
}

export interface CalendarEvent extends CalendarEntry {
  readonly startUtc: Date;
  readonly endUtc: Date;
}

/** An event of one whole day, where no clock time is known. */
export interface CalendarDay extends CalendarEntry {
  readonly onDay: string;
  readonly nextDay: string;
}

export interface Calendar {
  readonly name: string;
  readonly stampUtc: Date;
  readonly tasks: readonly CalendarTask[];
  readonly events: readonly CalendarEvent[];
  readonly days: readonly CalendarDay[];
}

const dateValue = (isoDay: string) => isoDay.replaceAll('-', '');
const timeValue = (instant: Date) => `${instant.toISOString().slice(0, 19).replaceAll('-', '').replaceAll(':', '')}Z`;

export function escapeCalendarText(text: string): string {
  return text.replaceAll('\\', '\\\\').replaceAll(';', '\\;').replaceAll(',', '\\,').replace(/\r\n|\r|\n/gu, '\\n');
}

/** One content line, folded so that no physical line is longer than 75 octets and no character is split. */
export function foldLine(line: string): string {
  const encoder = new TextEncoder();
  const pieces: string[] = [];
  let piece = '';
  let octets = 0;
  for (const character of line) {
    const size = encoder.encode(character).length;
    // Every line after the first begins with the space that marks the fold.
    if (octets + size > 75) {
      pieces.push(piece);
      piece = ' ';
      octets = 1;
    }
    piece += character;
    octets += size;
  }
  return [...pieces, piece].join('\r\n');
}

function entryLines(entry: CalendarEntry, stampUtc: Date): string[] {
  return [
    `UID:${entry.uid}`,
    `DTSTAMP:${timeValue(stampUtc)}`,
    `SEQUENCE:${entry.sequence}`,
    `SUMMARY:${escapeCalendarText(entry.summary)}`,
    `DESCRIPTION:${escapeCalendarText(entry.description)}`,
    `URL:${entry.url}`,
  ];
}

/** The whole calendar as one text. */
export function calendarText(calendar: Calendar): string {
  const stamp = calendar.stampUtc;
  const lines = [
    'BEGIN:VCALENDAR',
    'VERSION:2.0',
    'PRODID:-//Scorchline//Corrective actions//EN',
    'CALSCALE:GREGORIAN',
    `NAME:${escapeCalendarText(calendar.name)}`,
    `X-WR-CALNAME:${escapeCalendarText(calendar.name)}`,
    ...calendar.tasks.flatMap((task) => ['BEGIN:VTODO', ...entryLines(task, stamp), `DUE;VALUE=DATE:${dateValue(task.dueOn)}`, `STATUS:${task.status}`, 'END:VTODO']),
    ...calendar.events.flatMap((event) => ['BEGIN:VEVENT', ...entryLines(event, stamp), `DTSTART:${timeValue(event.startUtc)}`, `DTEND:${timeValue(event.endUtc)}`, 'END:VEVENT']),
    ...calendar.days.flatMap((day) => ['BEGIN:VEVENT', ...entryLines(day, stamp), `DTSTART;VALUE=DATE:${dateValue(day.onDay)}`, `DTEND;VALUE=DATE:${dateValue(day.nextDay)}`, 'END:VEVENT']),
    'END:VCALENDAR',
  ];
  return `${lines.map(foldLine).join('\r\n')}\r\n`;
}
