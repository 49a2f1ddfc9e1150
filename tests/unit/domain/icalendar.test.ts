import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { actionCalendar } from '#app/domain/action-calendar.ts';
import { calendarText, escapeCalendarText, foldLine } from '#app/domain/icalendar.ts';

const octets = (text: string) => new TextEncoder().encode(text).length;
/** RFC 5545, 3.1: a folded line is unfolded by taking away each CRLF that a space follows. */
const unfold = (text: string) => text.replaceAll('\r\n ', '');

describe('folding, RFC 5545 section 3.1', () => {
  test('no physical line is longer than 75 octets, and unfolding gives the line back', () => {
    fc.assert(
      fc.property(fc.string({ unit: 'grapheme', maxLength: 400 }).filter((text) => !/[\r\n]/u.test(text)), (text) => {
        const folded = foldLine(text);
        expect(folded.split('\r\n').every((line) => octets(line) <= 75)).toBe(true);
        expect(unfold(folded)).toBe(text);
      }),
    );
  });

  test('a line of 75 octets stands as it is, one of 76 is folded after 75', () => {
    expect(foldLine('x'.repeat(75))).toBe('x'.repeat(75));
    expect(foldLine('x'.repeat(76))).toBe(`${'x'.repeat(75)}\r\n x`);
  });

  test('a letter of two octets at the fold is not split', () => {
    expect(foldLine(`${'x'.repeat(74)}é`)).toBe(`${'x'.repeat(74)}\r\n é`);
  });
});

test('text is escaped as section 3.3.11 asks', () => {
  expect(escapeCalendarText('a\\b;c,d\r\ne\nf')).toBe('a\\\\b\\;c\\,d\\ne\\nf');
  // A colon needs no backslash in a text value.
  expect(escapeCalendarText('3: coating')).toBe('3: coating');
});

const action = { id: 'a1', caseNumber: 122, number: 2, title: 'Matt coating; parapet', state: 'open' as const, dueOn: '2026-07-24', effectCheckOn: null, version: 1, checkWindow: null };
const context = { publicUrl: 'https://register.example', stampUtc: new Date('2026-07-15T08:42:00.500Z') };
const text = (...actions: Parameters<typeof actionCalendar>[0]) => calendarText(actionCalendar(actions, context));

describe('the calendar of actions', () => {
  test('has CRLF line ends only, and stands between BEGIN and END', () => {
    const whole = text(action);
    expect(whole.replaceAll('\r\n', '')).not.toMatch(/[\r\n]/u);
    expect(whole.startsWith('BEGIN:VCALENDAR\r\nVERSION:2.0\r\n')).toBe(true);
    expect(whole.endsWith('END:VCALENDAR\r\n')).toBe(true);
  });

  test('a due day is a task on a date, with stamp in UTC', () => {
    const lines = unfold(text(action)).split('\r\n');
    expect(lines).toEqual(expect.arrayContaining(['BEGIN:VTODO', 'UID:action-a1@register.example', 'DTSTAMP:20260715T084200Z', 'DUE;VALUE=DATE:20260724', 'STATUS:NEEDS-ACTION', 'SUMMARY:122: Matt coating\\; parapet', 'END:VTODO']));
  });

  test('keeps its UID through every change, and raises the sequence', () => {
    const uidOf = (whole: string) => /UID:(.*)\r/u.exec(whole)?.[1];
    const later = text({ ...action, dueOn: '2026-08-28', state: 'in-progress', version: 7 });
    expect(uidOf(later)).toBe(uidOf(text(action)));
    expect(later).toContain('SEQUENCE:7');
  });

  test('a check inside a return is an event of its minutes, any other one of the whole day', () => {
    const verified = { ...action, state: 'verified' as const, effectCheckOn: '2026-08-03' };
    const timed = text({ ...verified, checkWindow: { fromAt: new Date('2026-08-03T12:05:00Z'), toAt: new Date('2026-08-03T12:55:00Z') } });
    expect(timed).toContain('DTSTART:20260803T120500Z\r\nDTEND:20260803T125500Z');
    const whole = text(verified);
    expect(whole).toContain('DTSTART;VALUE=DATE:20260803\r\nDTEND;VALUE=DATE:20260804');
    expect(text({ ...verified, state: 'effective' })).not.toContain('VEVENT');
  });
});
