import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { noDetails, photoFieldNames, readPhotoDetails, readPhotoFields } from '#app/domain/photo-details.ts';

describe('what is said of a photo', () => {
  test('arrives as it was said', () => {
    const said = { position: 2, view: 'square-on', caption: 'ruler 300 mm', clockErrorS: -95, timeAnswer: 'accepted', placeAnswer: 'declined', madeSmaller: true } as const;
    expect(readPhotoDetails(JSON.stringify(said))).toEqual(said);
  });

  test.each([
    ['a view that does not exist', { view: 'sideways' }, noDetails],
    ['a clock error of years', { clockErrorS: 1e9 }, noDetails],
    ['a position out of range', { position: -1 }, noDetails],
    ['a caption with control and direction characters', { caption: 'a\u0000\u202Eb' }, { ...noDetails, caption: 'ab' }],
    ['a caption of 100 kB', { caption: 'a'.repeat(100_000) }, { ...noDetails, caption: 'a'.repeat(300) }],
    ['a caption that is no text', { caption: 7 }, { ...noDetails, caption: '7' }],
  ])('%s spoils nothing else', (_what, said, read) => {
    expect(readPhotoDetails(JSON.stringify(said))).toEqual(read);
  });

  test('whatever comes is read as something, or as nothing said', () => {
    fc.assert(fc.property(fc.oneof(fc.string(), fc.json()), (text) => {
      const { caption, clockErrorS } = readPhotoDetails(text);
      expect(caption.length).toBeLessThanOrEqual(300);
      expect(Number.isInteger(clockErrorS)).toBe(true);
    }));
  });
});

test('a form without a script names each photo, and nothing that is none', () => {
  const photoId = '3f0c4f53-4f0c-4f0e-9d51-0a3c5a1f7b11';
  const names = photoFieldNames(photoId);
  expect(readPhotoFields({ [names.view]: 'close', [names.caption]: 'ruler', 'photoView.nonsense': 'close', narrative: 'x' })).toEqual([{ photoId, view: 'close', caption: 'ruler' }]);
  expect(readPhotoFields({ [names.caption]: '' })).toEqual([{ photoId, view: null, caption: '' }]);
});
