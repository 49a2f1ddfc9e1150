import { formatClock, formatDay, fromLocalInput, localDay } from './local-time.ts';

/**
 * The clock of the first look, our own default: four working hours, and one hour on any day while the hazard is still
 * there or somebody was hurt. Working hours are 09:00 to 17:00, Monday to Friday, by the clock of the place; public
 * holidays are not known to it.
 */
export const firstLookHours = { working: 4, urgent: 1, from: '09:00', to: '17:00' } as const;

const hourMs = 3_600_000;
const longestSearchDays = 10;

const isWeekday = (day: string): boolean => ![0, 6].includes(new Date(`${day}T00:00:00Z`).getUTCDay());
const dayAfter = (day: string): string => new Date(Date.parse(`${day}T00:00:00Z`) + 24 * hourMs).toISOString().slice(0, 10);

function atClock(day: string, clock: string, zone: string): number {
  const reading = fromLocalInput(`${day}T${clock}`, zone, 'first');
  return reading.kind === 'instant' ? reading.instant.getTime() : reading.kind === 'gap' ? reading.after.getTime() : Number.NaN;
}

/** By when somebody is to have looked at a report. @param urgent The hazard is still there, or somebody was hurt. */
export function firstLookDue(reportedAt: Date, zone: string, urgent: boolean): Date {
  if (urgent) return new Date(reportedAt.getTime() + firstLookHours.urgent * hourMs);
  let leftMs = firstLookHours.working * hourMs;
  let day = localDay(reportedAt, zone);
  for (let count = 0; count < longestSearchDays; count++) {
    if (isWeekday(day)) {
      const startMs = Math.max(reportedAt.getTime(), atClock(day, firstLookHours.from, zone));
      const roomMs = Math.max(0, atClock(day, firstLookHours.to, zone) - startMs);
      if (roomMs >= leftMs) return new Date(startMs + leftMs);
      leftMs -= roomMs;
    }
    day = dayAfter(day);
  }
  return new Date(reportedAt.getTime() + longestSearchDays * 24 * hourMs);
}

export interface FirstLookView {
  readonly dueUtc: string;
  readonly reportedUtc: string;
  readonly late: boolean;
  /** "28 min left", "due today 14:42", "2 h late". */
  readonly words: string;
}

/** Length in one unit: "48 min", "3 h", "2 days". */
function lengthWords(ms: number): string {
  const minutes = Math.max(1, Math.round(ms / 60_000));
  if (minutes < 90) return `${minutes} min`;
  return minutes < 2_880 ? `${Math.round(minutes / 60)} h` : `${Math.round(minutes / 1_440)} days`;
}

/** The clock as it stands now. */
export function firstLookView(report: { readonly reportedAt: Date; readonly zone: string; readonly urgent: boolean }, now: Date): FirstLookView {
  const due = firstLookDue(report.reportedAt, report.zone, report.urgent);
  const leftMs = due.getTime() - now.getTime();
  const late = leftMs < 0;
  const sameDay = localDay(due, report.zone) === localDay(now, report.zone);
  const ahead = leftMs < 90 * 60_000 ? `${lengthWords(leftMs)} left` : `due ${sameDay ? 'today' : formatDay(due, report.zone)} ${formatClock(due, report.zone)}`;
  return { dueUtc: due.toISOString(), reportedUtc: report.reportedAt.toISOString(), late, words: late ? `${lengthWords(-leftMs)} late` : ahead };
}
