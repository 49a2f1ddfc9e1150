import { randomUUID } from 'node:crypto';
import { readFile } from 'node:fs/promises';
import { eq } from 'drizzle-orm';
import sharp from 'sharp';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { env } from '#app/env.server.ts';
import { stopQueue } from '#app/jobs/queue.server.ts';
import type { PhotoOutcome } from '#app/services/photos/store-photo.server.ts';
import { storeReportPhoto } from '#app/services/photos/store-photo.server.ts';
import { noDetails } from '#app/domain/photo-details.ts';
import { describeDraftPhoto } from '#app/services/photos/describe-draft-photo.server.ts';
import { submitReport } from '#app/services/reports/submit-report.server.ts';
import { getObject } from '#app/storage/objects.server.ts';
import { sha256Hex } from '#app/storage/sha256.server.ts';
import { db } from '#db/client.server.ts';
import { photos } from '#db/schema/all.ts';
import { caseOf, person, reportAt } from '#tests/db/reports/stage.ts';
import type { House } from '#tests/support/factories.ts';
import { createHouse } from '#tests/support/factories.ts';
import { cameraJpeg, pixelBomb, plainJpeg } from './picture-files.ts';

let house: House;
beforeAll(async () => {
  house = await createHouse();
});
afterAll(stopQueue);

const store = (name: string, bytes: Uint8Array, clientId = randomUUID()): Promise<PhotoOutcome> => storeReportPhoto({ holder: person(house.reporter), clientId, file: { name, bytes } });
const rowsOf = (clientId: string) => db.select().from(photos).where(eq(photos.reportClientId, clientId));

describe('a bad file gets a sentence that names it', () => {
  test.each<[string, string, () => Promise<Uint8Array> | Uint8Array, RegExp]>([
    ['an empty file', 'leer.jpg', () => new Uint8Array(), /“leer\.jpg” is empty/u],
    ['text with a picture name', 'notes.jpg', () => Buffer.from('<!doctype html><script>alert(1)</script>'), /“notes\.jpg” is not a JPEG, PNG, WebP or HEIC/u],
    ['a drawing with code in it', 'mark.svg', () => Buffer.from('<svg xmlns="http://www.w3.org/2000/svg"><script/></svg>'), /is not a JPEG, PNG, WebP or HEIC/u],
    ['a picture that was cut off', 'cut.jpg', async () => (await plainJpeg()).subarray(0, 9_000), /“cut\.jpg” is damaged or cut off/u],
    ['a picture with only its first bytes', 'head.png', () => Buffer.from([0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a, 0]), /is damaged or cut off/u],
    ['a small file with too many pixels', 'huge.png', () => pixelBomb(30_000), /more than 60 million pixels/u],
    ['a file that is too big', 'big.jpg', () => Buffer.concat([Buffer.from([0xff, 0xd8, 0xff]), Buffer.alloc(env.PHOTO_MAX_BYTES)]), /“big\.jpg” is larger than 26 MB/u],
    ['a HEIC photo of which only the head came', 'IMG_1.HEIC', () => Buffer.from('\0\0\0\x18ftypheic\0\0\0\0mif1heic', 'latin1'), /“IMG_1\.HEIC” is damaged or cut off/u],
    ['a HEIC photo that was cut off', 'IMG_2.HEIC', async () => (await heicPhoto()).subarray(0, 900), /“IMG_2\.HEIC” is damaged or cut off/u],
    ['an AVIF photo', 'a.avif', () => Buffer.from('\0\0\0\x1cftypmif1\0\0\0\0mif1avifmiaf', 'latin1'), /AVIF format.*JPEG/u],
    ['a film', 'clip.mp4', () => Buffer.from('\0\0\0\x18ftypmp42\0\0\0\0', 'latin1'), /is a film/u],
  ])('%s', async (_what, name, bytes, sentence) => {
    const clientId = randomUUID();
    const outcome = await store(name, await bytes(), clientId);
    expect(outcome.ok).toBe(false);
    expect(outcome.ok ? '' : outcome.sentence).toMatch(sentence);
    expect(await rowsOf(clientId)).toEqual([]);
  });
});

const heicPhoto = () => readFile(new URL('../../../fixtures/photos/with-gps-exif.heic', import.meta.url));

describe('the files of fixtures/photos', () => {
  const stored = async (name: string) => {
    const clientId = randomUUID();
    const outcome = await store(name, await readFile(new URL(`../../../fixtures/photos/${name}`, import.meta.url)), clientId);
    return { outcome, row: (await rowsOf(clientId))[0] };
  };

  test.each(['zero-byte.jpg', 'text-renamed.jpg', 'html-renamed.jpg', 'truncated.jpg', 'huge-dimensions.png'])('%s is refused by name', async (name) => {
    const { outcome, row } = await stored(name);
    expect(outcome.ok ? '' : outcome.sentence).toContain(`“${name}”`);
    expect(row).toBeUndefined();
  });

  test.each([
    ['with-gps-exif.jpg', 'image/jpeg'],
    ['rotated-exif6.jpg', 'image/jpeg'],
    ['no-exif.png', 'image/png'],
    ['webp.webp', 'image/webp'],
    ['with-gps-exif.heic', 'image/heic'],
  ])('%s is taken as %s', async (name, mime) => {
    const { outcome, row } = await stored(name);
    expect([outcome.ok, row?.mime]).toEqual([true, mime]);
  });

  test('HEIC is measured, and offers the same as the JPEG that it was made from', async () => {
    const [heic, jpeg] = [(await stored('with-gps-exif.heic')).row, (await stored('with-gps-exif.jpg')).row];
    expect([heic?.widthPx, heic?.heightPx]).toEqual([160, 120]);
    expect(heic?.exif).toEqual(jpeg?.exif);
    expect(heic?.exif).toMatchObject({ takenAtLocal: '2026-05-09T15:10:30', utcOffset: '+01:00', latitudeDeg: 53.5, longitudeDeg: -1.6, accuracyM: 6 });
  });

  test('the one with a place offers it, the one without offers nothing', async () => {
    expect((await stored('with-gps-exif.jpg')).row?.exif).toMatchObject({ takenAtLocal: expect.any(String), latitudeDeg: expect.any(Number), longitudeDeg: expect.any(Number) });
    expect((await stored('no-exif.png')).row?.exif).toMatchObject({ takenAtLocal: null, latitudeDeg: null, longitudeDeg: null, camera: null });
  });
});

describe('a photo that is taken', () => {
  test('is stored byte for byte under the hash of those bytes', async () => {
    const bytes = await cameraJpeg();
    const clientId = randomUUID();
    expect(await store('roof.jpg', bytes, clientId)).toMatchObject({ ok: true, fileName: 'roof.jpg', bytes: bytes.byteLength });
    const [row] = await rowsOf(clientId);
    expect(row?.sha256).toBe(sha256Hex(bytes));
    expect(row?.originalKey.startsWith(`originals/${row.sha256}/`)).toBe(true);
    const stored = await getObject(row?.originalKey ?? '');
    expect(stored && Buffer.from(stored).equals(bytes)).toBe(true);
  });

  test('counts by its content, whatever its name says', async () => {
    const clientId = randomUUID();
    await store('photo.jpg', await sharp(await plainJpeg()).png().toBuffer(), clientId);
    await store('photo.txt', await sharp(await plainJpeg()).webp().toBuffer(), clientId);
    expect((await rowsOf(clientId)).map(({ mime, originalKey }) => [mime, originalKey.split('.').at(-1)]).sort()).toEqual([['image/png', 'png'], ['image/webp', 'webp']]);
  });

  test.each([
    ['../../etc/passwd', 'passwd'],
    ['C:\\fakepath\\roof.jpg', 'roof.jpg'],
    ['mark\u202Egpj.exe', 'markgpj.exe'],
    ['a\u0000b\r\nContent-Type: text/html.jpg', 'html.jpg'],
    ['.....', 'photo without a name'],
    ['"><script>.jpg', '"><script>.jpg'],
  ])('with the name %j is shown as %j', async (name, shown) => {
    expect(await store(name, await plainJpeg())).toMatchObject({ ok: true, fileName: shown });
  });

  test('is measured as it is shown, after the turn that the camera asks for', async () => {
    const clientId = randomUUID();
    await store('turned.jpg', await cameraJpeg({ orientation: 6 }), clientId);
    expect((await rowsOf(clientId))[0]).toMatchObject({ widthPx: 800, heightPx: 1200 });
  });

  test('keeps what the camera wrote, as an offer and nothing more', async () => {
    const clientId = randomUUID();
    await store('roof.jpg', await cameraJpeg(), clientId);
    expect((await rowsOf(clientId))[0]).toMatchObject({
      exif: { takenAtLocal: '2026-05-09T15:05:12', utcOffset: '+01:00', latitudeDeg: 53.5, longitudeDeg: -1.6, directionDeg: 187, directionReference: 'true', camera: 'None Box 1' },
      exifAnswer: { time: null, place: null },
      takenAt: null,
    });
  });

  test.each([
    ['a day that does not exist', { takenAt: '2026:02:30 10:00:00' }, { takenAtLocal: null, utcOffset: null }],
    ['zeros for an unset clock', { takenAt: '0000:00:00 00:00:00' }, { takenAtLocal: null, utcOffset: null }],
    ['an offset out of range', { offset: '+25:00' }, { takenAtLocal: '2026-05-09T15:05:12', utcOffset: null }],
  ])('drops %s', async (_what, data, exif) => {
    const clientId = randomUUID();
    await store('roof.jpg', await cameraJpeg(data), clientId);
    expect((await rowsOf(clientId))[0]?.exif).toMatchObject(exif);
  });
});

describe('the same bytes again', () => {
  test('give the same photo, also when both arrive at once', async () => {
    const bytes = await plainJpeg();
    const clientId = randomUUID();
    const outcomes = await Promise.all([store('a.jpg', bytes, clientId), store('b.jpg', bytes, clientId), store('c.jpg', bytes, clientId)]);
    expect(new Set(outcomes.map((outcome) => outcome.ok && outcome.photoId)).size).toBe(1);
    expect(await rowsOf(clientId)).toHaveLength(1);
  });

  test('are another photo in another report', async () => {
    const bytes = await plainJpeg();
    const [one, two] = [await store('a.jpg', bytes), await store('a.jpg', bytes)];
    expect(one.ok && two.ok && one.photoId !== two.photoId).toBe(true);
  });
});

describe('what the person says of a photo', () => {
  const details = { ...noDetails, position: 1, view: 'close' as const, caption: 'ruler 300 mm', clockErrorS: 360, timeAnswer: 'accepted' as const, madeSmaller: true };
  const row = async (clientId: string) => (await rowsOf(clientId))[0];

  test('is stored with it, and the accepted time of the file becomes its time when the report is sent', async () => {
    const clientId = randomUUID();
    await storeReportPhoto({ holder: person(house.reporter), clientId, file: { name: 'a.jpg', bytes: await cameraJpeg() }, details });
    expect(await row(clientId)).toMatchObject({ view: 'close', caption: 'ruler 300 mm', clockErrorS: 360, madeSmaller: true, takenAt: null, exifAnswer: { time: 'accepted', place: null } });
    await submitReport({ holder: person(house.reporter), clientId, report: reportAt(house.site) });
    // 15:05:12 at +01:00, as the file says; the clock error stands beside it and is never worked in.
    expect((await row(clientId))?.takenAt?.toISOString()).toBe('2026-05-09T14:05:12.000Z');
  });

  test('can be changed until the report is sent, and not by others', async () => {
    const clientId = randomUUID();
    const outcome = await store('a.jpg', await plainJpeg(), clientId);
    const photoId = outcome.ok ? outcome.photoId : '';
    expect(await describeDraftPhoto({ holder: person(house.investigator), clientId, photoId, details })).toBe(false);
    expect(await describeDraftPhoto({ holder: person(house.reporter), clientId, photoId, details })).toBe(true);
    await submitReport({ holder: person(house.reporter), clientId, report: reportAt(house.site) });
    expect(await describeDraftPhoto({ holder: person(house.reporter), clientId, photoId, details: { ...details, caption: 'later' } })).toBe(false);
    expect((await row(clientId))?.caption).toBe('ruler 300 mm');
  });

  test('gives the labels their order', async () => {
    const clientId = randomUUID();
    for (const [caption, position] of [['third', 2], ['first', 0], ['second', 1]] as const) {
      await storeReportPhoto({ holder: person(house.reporter), clientId, file: { name: 'a.jpg', bytes: await plainJpeg() }, details: { ...noDetails, caption, position } });
    }
    await submitReport({ holder: person(house.reporter), clientId, report: reportAt(house.site) });
    expect((await rowsOf(clientId)).sort((a, b) => (a.label ?? 0) - (b.label ?? 0)).map(({ caption }) => caption)).toEqual(['first', 'second', 'third']);
  });
});

describe('a photo that arrives after its report was sent', () => {
  test('joins the case with the next label', async () => {
    const clientId = randomUUID();
    await store('a.jpg', await plainJpeg(), clientId);
    await submitReport({ holder: person(house.reporter), clientId, report: reportAt(house.site) });
    await store('b.jpg', await plainJpeg(), clientId);
    const row = await caseOf(clientId);
    expect((await rowsOf(clientId)).map(({ caseId, label }) => ({ caseId, label })).sort((a, b) => (a.label ?? 0) - (b.label ?? 0))).toEqual([{ caseId: row?.id, label: 1 }, { caseId: row?.id, label: 2 }]);
  });

  test('is never lost between the two, whichever is first', async () => {
    const clientId = randomUUID();
    const files = await Promise.all(Array.from({ length: 5 }, () => plainJpeg()));
    await Promise.all([submitReport({ holder: person(house.reporter), clientId, report: reportAt(house.site) }), ...files.map((bytes, index) => store(`${index}.jpg`, bytes, clientId))]);
    const labels = (await rowsOf(clientId)).map(({ label }) => label).sort();
    expect(labels).toEqual([1, 2, 3, 4, 5]);
  });

  test('is refused when somebody else sent it', async () => {
    const clientId = randomUUID();
    await submitReport({ holder: person(house.investigator), clientId, report: reportAt(house.site) });
    await expect(store('a.jpg', await plainJpeg(), clientId)).rejects.toMatchObject({ code: 'forbidden' });
  });
});
