import { describe, expect, test } from 'vitest';
import { contentOf, exifInstant, minutesFromFinding, showableFileName } from '#app/domain/photo.ts';

const bytes = (text: string) => Uint8Array.from(text, (letter) => letter.charCodeAt(0));

describe('content of a file', () => {
  test.each([
    ['\xff\xd8\xff\xe0', 'image/jpeg'],
    ['\x89PNG\r\n\x1a\n', 'image/png'],
    ['RIFF\0\0\0\0WEBP', 'image/webp'],
    ['RIFF\0\0\0\0WAVE', null],
    ['\0\0\0\x18ftypheic', 'image/heic'],
    ['\0\0\0\x18ftypavif', 'avif'],
    ['\0\0\0\x18ftypqt  ', 'video'],
    ['%PDF-1.7', 'pdf'],
    ['GIF89a', 'gif'],
    ['<html>', null],
    ['', null],
  ])('%j is %j', (start, content) => {
    expect(contentOf(bytes(start))).toBe(content);
  });
});

test('a long file name keeps its ending', () => {
  const shown = showableFileName(`${'a'.repeat(300)}.final.jpg`);
  expect([...shown].length).toBe(80);
  expect(shown.endsWith('.final.jpg')).toBe(true);
});

describe('the time in a file', () => {
  test('with an offset stands for itself', () => {
    expect(exifInstant({ takenAtLocal: '2026-05-09T15:05:12', utcOffset: '+01:00' }, 'Asia/Tokyo')?.toISOString()).toBe('2026-05-09T14:05:12.000Z');
  });

  test('without one is read on the clock of the place', () => {
    expect(exifInstant({ takenAtLocal: '2026-05-09T15:05:12', utcOffset: null }, 'Europe/London')?.toISOString()).toBe('2026-05-09T14:05:12.000Z');
  });

  test('without one, in a repeated or skipped hour, cannot be known', () => {
    // Directive 2000/84/EC: changes at 01:00 UTC on the last Sundays of March and October.
    expect(exifInstant({ takenAtLocal: '2026-10-25T01:30:00', utcOffset: null }, 'Europe/London')).toBeNull();
    expect(exifInstant({ takenAtLocal: '2026-03-29T01:30:00', utcOffset: null }, 'Europe/London')).toBeNull();
  });
});

describe('photo and stated finding', () => {
  const at = (time: string) => new Date(`2026-05-09T${time}Z`);
  const found = { foundAt: at('14:10:00'), foundClockErrorS: 0 };

  test('30 minutes apart are not pointed out; one second more is', () => {
    expect(minutesFromFinding({ takenAt: at('14:40:00'), clockErrorS: 0 }, found)).toBeNull();
    expect(minutesFromFinding({ takenAt: at('14:40:01'), clockErrorS: 0 }, found)).toBe(30);
    expect(minutesFromFinding({ takenAt: at('13:00:00'), clockErrorS: 0 }, found)).toBe(-70);
  });

  test('are compared after their clock errors are taken off', () => {
    expect(minutesFromFinding({ takenAt: at('15:10:00'), clockErrorS: 3600 }, found)).toBeNull();
    expect(minutesFromFinding({ takenAt: at('14:10:00'), clockErrorS: 0 }, { ...found, foundClockErrorS: 3600 })).toBe(60);
  });

  test('are not compared when one is unknown', () => {
    expect(minutesFromFinding({ takenAt: null, clockErrorS: 0 }, found)).toBeNull();
    expect(minutesFromFinding({ takenAt: at('10:00:00'), clockErrorS: 0 }, { foundAt: null, foundClockErrorS: 0 })).toBeNull();
  });
});
