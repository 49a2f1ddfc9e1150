import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, test } from 'vitest';
import type { KeptPhoto } from '#app/components/report/device-store.ts';
import { photoDifference } from '#app/components/report/photo-difference.ts';
import { PhotoFileSays } from '#app/components/report/photo-file-says.tsx';
import { noDetails } from '#app/domain/photo-details.ts';
import { noExif } from '#app/domain/photo-exif.ts';

// 15:05:12 at +01:00 is 14:05:12 UTC.
const exif = { ...noExif, takenAtLocal: '2026-05-09T15:05:12', utcOffset: '+01:00', latitudeDeg: 53.5, longitudeDeg: -1.6, accuracyM: 6 };
const photo = (patch: Partial<KeptPhoto> = {}): KeptPhoto => ({ key: 'a', clientId: 'c', fileName: 'a.jpg', bytes: 1, blob: null, state: 'waiting', sentence: '', photoId: null, exif, details: noDetails, changed: false, removedAt: null, ...patch });
const finding = (foundAt: string | null, zone: string | null = 'Europe/London') => ({ zone, foundAt: foundAt ? new Date(foundAt) : null });
const text = (one: KeptPhoto, stated = finding(null)) => renderToStaticMarkup(<PhotoFileSays photo={one} finding={stated} onUse={() => undefined} onSay={() => undefined} />).replace(/<[^>]+>/gu, ' ').replace(/\s+/gu, ' ');

describe('what a file says is put to the person, field by field', () => {
  test('time and place, each with a yes and a no of its own', () => {
    const words = text(photo());
    expect(words).toContain('The file says 9 May 2026, 15:05 +01:00.');
    expect(words).toContain('53.5° N, 1.6° W');
    expect(words.match(/That is right/gu)).toHaveLength(2);
    expect(words.match(/That is wrong/gu)).toHaveLength(2);
    expect(words).toContain('Use 15:05 as the time found');
    expect(words).toContain('Use it as the position of the mark');
  });

  test('the reading stays as it is beside its correction', () => {
    const words = text(photo({ details: { ...noDetails, clockErrorS: 360 } }));
    expect(words).toContain('15:05 +01:00');
    // Six minutes fast: 15:05:12 less 0:06:00.
    expect(words).toContain('Use 14:59, corrected, as the time found');
  });

  test('the clock of the place is not guessed before a site is chosen', () => {
    expect(text(photo(), finding(null, null))).not.toContain('as the time found');
  });

  test('a file that says nothing offers nothing', () => {
    expect(text(photo({ exif: noExif }))).toContain('says nothing of when and where');
  });
});

describe('photo and finding that do not go together', () => {
  test.each([
    ['29 minutes apart', '2026-05-09T14:34:12Z', false],
    ['31 minutes apart', '2026-05-09T14:36:13Z', true],
    ['the photo is earlier than the finding by days', '2026-05-12T10:00:00Z', true],
  ])('%s', (_what, foundAt, said) => {
    expect(photoDifference(photo(), finding(foundAt)) !== null).toBe(said);
  });

  test('the clock error is taken off first', () => {
    const slow = photo({ details: { ...noDetails, clockErrorS: -3_600 } });
    expect(photoDifference(slow, finding('2026-05-09T15:05:12Z'))).toBeNull();
    expect(photoDifference(photo(), finding('2026-05-09T15:05:12Z'))).toContain('before the stated finding');
  });

  test('a time that was called wrong is not held against anybody', () => {
    expect(photoDifference(photo({ details: { ...noDetails, timeAnswer: 'declined' } }), finding('2026-05-12T10:00:00Z'))).toBeNull();
  });
});
