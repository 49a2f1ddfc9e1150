import type { FoundPrecision, OnsetBasis } from './incident.ts';
import { foundPrecisions } from './incident.ts';
import type { MomentField, RepeatedHours } from './report-fields.ts';
import { foundAnswers, passField } from './report-fields.ts';
import { formatClock, formatDay, formatDayClock, formatOffset, fromLocalInput } from './local-time.ts';

export interface ReportTimes {
  readonly foundAt: Date | null;
  readonly foundPrecision: FoundPrecision;
  readonly onsetEarliestAt: Date | null;
  readonly onsetLatestAt: Date | null;
  readonly onsetBasis: OnsetBasis | null;
}

export interface ReportTimesReading {
  readonly times: ReportTimes;
  readonly errors: Record<string, string[]>;
  readonly repeated: RepeatedHours;
  /** Days of the onset window when it is long enough to ask about; null otherwise. */
  readonly longWindowDays: number | null;
}

interface Place {
  readonly zone: string;
  readonly now: Date;
}

const dayMs = 86_400_000;
/** Clocks of phones and servers differ; a moment this far ahead still counts as now. [ms] */
const clockSlackMs = 2 * 60_000;
/** An onset window longer than this is asked about. [days] */
export const longWindowAfterDays = 14;
const earliest = Date.UTC(1970, 0, 1);

type Typed = Readonly<Record<string, string>>;

class Reader {
  readonly errors: Record<string, string[]> = {};
  readonly repeated: RepeatedHours = {};
  readonly typed: Typed;
  readonly place: Place;

  constructor(typed: Typed, place: Place) {
    this.typed = typed;
    this.place = place;
  }

  refuse(field: string, sentence: string): null {
    this.errors[field] = [...(this.errors[field] ?? []), sentence];
    return null;
  }

  text(field: string): string {
    return (this.typed[field] ?? '').trim();
  }

  /** The instant typed in a field; null with a sentence when it cannot be one. */
  moment(field: MomentField): Date | null {
    const { zone } = this.place;
    const local = this.text(field).replace(' ', 'T');
    if (!/^\d{4,6}-\d{2}-\d{2}T\d{2}:\d{2}/u.test(local)) return this.refuse(field, 'Give a day and a time, such as 2026-05-09 15:10.');
    const pass = this.text(passField(field));
    const reading = fromLocalInput(local, zone, pass === 'first' || pass === 'second' ? pass : undefined);
    if (reading.kind === 'unreadable') return this.refuse(field, 'There is no such day or time. Check it against a calendar.');
    if (reading.kind === 'gap') {
      return this.refuse(field, `The clock at the place skipped this time: it was put forward that night. Give the time on the changed clock, such as ${formatClock(reading.after, zone)}.`);
    }
    if (reading.kind === 'fold') {
      this.repeated[field] = { first: passWords('The first time', reading.first, zone), second: passWords('The second time', reading.second, zone) };
      return this.refuse(field, 'The clock at the place showed this time twice that night, because it was put back. Say which one you mean.');
    }
    return this.inRange(field, reading.instant);
  }

  inRange(field: string, instant: Date): Date | null {
    const { zone, now } = this.place;
    if (instant.getTime() < earliest) return this.refuse(field, 'Give a year from 1970 on.');
    if (instant.getTime() > now.getTime() + clockSlackMs) {
      return this.refuse(field, `This is still to come: the clock at the place shows ${formatDayClock(now, zone)}. Check the day and the time.`);
    }
    return instant.getTime() > now.getTime() ? now : instant;
  }

  /** When "just now" was pressed, as the device noted it; the present when it noted nothing. */
  justNow(): Date | null {
    const noted = this.text('foundNowAt');
    const instant = noted === '' ? this.place.now : new Date(noted);
    if (Number.isNaN(instant.getTime())) return this.place.now;
    if (instant.getTime() > this.place.now.getTime() + clockSlackMs) {
      return this.refuse('foundWhen', 'The clock of this device is ahead. Choose “Today at…” and give the time from another clock.');
    }
    return this.inRange('foundWhen', instant);
  }
}

const passWords = (name: string, instant: Date, zone: string) => `${name}, ${formatClock(instant, zone)} at ${formatOffset(instant, zone)}`;

interface Found {
  readonly foundAt: Date | null;
  readonly precision: FoundPrecision;
  readonly from: Date | null;
}

function readFound(reader: Reader): Found {
  switch (foundAnswers.find((known) => known === reader.text('foundWhen'))) {
    case 'just-now':
      return { foundAt: reader.justNow(), precision: 'exact', from: null };
    case 'at': {
      const precision = foundPrecisions.find((known) => known === reader.text('foundPrecision')) ?? 'exact';
      return { foundAt: reader.moment('foundLocal'), precision, from: null };
    }
    case 'range': {
      const from = reader.moment('foundFromLocal');
      const to = reader.moment('foundToLocal');
      if (from && to && from > to) reader.refuse('foundFromLocal', `This is after the other time, ${formatDayClock(to, reader.place.zone)}. Put the earlier one first.`);
      return { foundAt: to, precision: 'exact', from };
    }
    case 'dont-know':
      return { foundAt: null, precision: 'unknown', from: null };
    case undefined:
      reader.refuse('foundWhen', 'Say when it was found, or choose Don\'t know.');
      return { foundAt: null, precision: 'unknown', from: null };
  }
}

/**
 * Times of a report as typed, in the clock of the place. Refuses the future, years before 1970, skipped hours and a
 * wrong order (last seen sound ≤ found); asks about repeated hours and about windows over 14 days.
 */
export function readReportTimes(typed: Typed, place: Place): ReportTimesReading {
  const reader = new Reader(typed, place);
  const found = readFound(reader);
  const separate = reader.text('foundWhen') !== 'range' && reader.text('lastSoundLocal') !== '';
  const lastSound = separate ? reader.moment('lastSoundLocal') : found.from;
  if (separate && lastSound && found.foundAt && lastSound > found.foundAt) {
    reader.refuse('lastSoundLocal', `It was seen sound after it was found, ${formatDayClock(found.foundAt, place.zone)}? Correct one of the two.`);
  }
  const onsetLatestAt = lastSound ? found.foundAt : null;
  const windowMs = lastSound ? (onsetLatestAt ?? place.now).getTime() - lastSound.getTime() : 0;
  const longWindowDays = windowMs > longWindowAfterDays * dayMs ? Math.floor(windowMs / dayMs) : null;
  if (longWindowDays !== null && lastSound && reader.text('longWindowConfirmed') !== 'yes') {
    const field = separate ? 'lastSoundLocal' : 'foundFromLocal';
    reader.refuse(field, `That is ${longWindowDays} days, since ${formatDay(lastSound, place.zone)}. Correct it, or tick that it is right.`);
  }
  return {
    times: {
      foundAt: found.foundAt,
      foundPrecision: found.precision,
      onsetEarliestAt: lastSound,
      onsetLatestAt,
      onsetBasis: lastSound ? 'last-seen-sound' : null,
    },
    errors: reader.errors,
    repeated: reader.repeated,
    longWindowDays,
  };
}
