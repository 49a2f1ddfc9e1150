import { randomUUID } from 'node:crypto';
import { readFile } from 'node:fs/promises';
import { eq } from 'drizzle-orm';
import exifr from 'exifr';
import sharp from 'sharp';
import { afterAll, beforeAll, describe, expect, test, vi } from 'vitest';
import { preparePhoto } from '#app/jobs/handlers/prepare-photo.server.ts';
import { stopQueue } from '#app/jobs/queue.server.ts';
import { log } from '#app/log.server.ts';
import { purgeAbandonedPhotos } from '#app/services/photos/purge-abandoned-photos.server.ts';
import { storeReportPhoto } from '#app/services/photos/store-photo.server.ts';
import { deleteObject, getObject, putObject } from '#app/storage/objects.server.ts';
import { db } from '#db/client.server.ts';
import { photos } from '#db/schema/all.ts';
import { person } from '#tests/db/reports/stage.ts';
import type { House } from '#tests/support/factories.ts';
import { createCase, createHouse, createPhoto } from '#tests/support/factories.ts';
import { cameraJpeg, plainJpeg } from './picture-files.ts';

let house: House;
beforeAll(async () => {
  house = await createHouse();
});
afterAll(stopQueue);

async function stored(bytes: Uint8Array): Promise<string> {
  const outcome = await storeReportPhoto({ holder: person(house.reporter), clientId: randomUUID(), file: { name: 'roof.jpg', bytes } });
  if (!outcome.ok) throw new Error(outcome.sentence);
  return outcome.photoId;
}
const rowOf = async (photoId: string) => (await db.select().from(photos).where(eq(photos.id, photoId)))[0];
async function objectOf(key: string | null | undefined): Promise<Buffer> {
  const bytes = key ? await getObject(key) : null;
  if (!bytes) throw new Error('The object is missing.');
  return Buffer.from(bytes);
}

describe('copies for pages', () => {
  test('are made of a HEIC photo too, upright and in its colours; the original stays as it came', async () => {
    const bytes = await readFile(new URL('../../../fixtures/photos/with-gps-exif.heic', import.meta.url));
    const photoId = await stored(bytes);
    await preparePhoto({ photoId });
    const row = await rowOf(photoId);
    expect(row).toMatchObject({ state: 'ready', mime: 'image/heic' });
    expect((await objectOf(row?.originalKey)).equals(bytes)).toBe(true);
    const { data, info } = await sharp(await objectOf(row?.viewKey)).raw().toBuffer({ resolveWithObject: true });
    expect([info.width, info.height]).toEqual([160, 120]);
    const at = (x: number, y: number) => [...data.subarray((y * info.width + x) * info.channels, (y * info.width + x) * info.channels + 3)];
    // The card that the file was made from: #241c14 in the upper left, #b8b4a8 at the right; coding moves them a little.
    for (const [found, drawn] of [[at(10, 10), [0x24, 0x1c, 0x14]], [at(140, 60), [0xb8, 0xb4, 0xa8]]] as const) {
      for (const [index, value] of drawn.entries()) expect(Math.abs((found[index] ?? 0) - value)).toBeLessThan(8);
    }
  });

  test('of a HEIC photo that cannot be decoded fail, and the original is kept', async () => {
    const bytes = Buffer.from(await readFile(new URL('../../../fixtures/photos/with-gps-exif.heic', import.meta.url)));
    // The coded picture, between the box of media data and the camera data behind it.
    bytes.fill(0, 0x1a8, 0x2e0);
    const photoId = await stored(bytes);
    const quiet = vi.spyOn(log, 'error').mockImplementation(() => undefined);
    await preparePhoto({ photoId });
    quiet.mockRestore();
    const row = await rowOf(photoId);
    expect(row?.state).toBe('failed');
    expect((await objectOf(row?.originalKey)).equals(bytes)).toBe(true);
  });

  test('carry no camera data, no time and no place; the original keeps them', async () => {
    const bytes = await cameraJpeg();
    const photoId = await stored(bytes);
    await preparePhoto({ photoId });
    const row = await rowOf(photoId);
    expect(row?.state).toBe('ready');
    for (const key of [row?.viewKey, row?.thumbnailKey]) {
      const copy = await objectOf(key);
      expect(await exifr.parse(copy, true)).toSatisfy((tags: Record<string, unknown> | undefined) => !tags || !Object.keys(tags).some((name) => /gps|latitude|longitude|date|make|model/iu.test(name)));
      expect(copy.includes('Exif')).toBe(false);
      expect(copy.includes('Box 1')).toBe(false);
    }
    expect(await exifr.gps(await objectOf(row?.originalKey))).toEqual({ latitude: 53.5, longitude: -1.6 });
  });

  test('stand upright, within 1600 and 360 pixels', async () => {
    const photoId = await stored(await sharp(await plainJpeg(2400, 1600)).withMetadata({ orientation: 6 }).jpeg().toBuffer());
    await preparePhoto({ photoId });
    const row = await rowOf(photoId);
    const size = async (key: string | null | undefined) => {
      const { width, height, format } = await sharp(await objectOf(key)).metadata();
      return { width, height, format };
    };
    expect(await size(row?.viewKey)).toEqual({ width: 1067, height: 1600, format: 'jpeg' });
    expect(await size(row?.thumbnailKey)).toEqual({ width: 240, height: 360, format: 'jpeg' });
  });

  test('of a small photo are not enlarged', async () => {
    const photoId = await stored(await plainJpeg(200, 100));
    await preparePhoto({ photoId });
    expect((await sharp(await objectOf((await rowOf(photoId))?.viewKey)).metadata()).width).toBe(200);
  });
});

describe('the job', () => {
  test('run twice, and twice at once, leaves the same copies', async () => {
    const photoId = await stored(await plainJpeg());
    await Promise.all([preparePhoto({ photoId }), preparePhoto({ photoId })]);
    const first = await rowOf(photoId);
    const copy = await objectOf(first?.viewKey);
    await preparePhoto({ photoId });
    expect(await rowOf(photoId)).toEqual(first);
    expect((await objectOf(first?.viewKey)).equals(copy)).toBe(true);
  });

  test('fails, to be tried again, while the original is missing, and then works', async () => {
    const bytes = await plainJpeg();
    const photoId = await stored(bytes);
    const key = (await rowOf(photoId))?.originalKey ?? '';
    await deleteObject(key);
    await expect(preparePhoto({ photoId })).rejects.toThrow('not in the store');
    expect((await rowOf(photoId))?.state).toBe('stored');
    await putObject(key, bytes, 'image/jpeg');
    await preparePhoto({ photoId });
    expect((await rowOf(photoId))?.state).toBe('ready');
  });

  test('marks a picture that cannot be decoded as failed and keeps its original', async () => {
    const photoId = await stored(await plainJpeg());
    const key = (await rowOf(photoId))?.originalKey ?? '';
    await putObject(key, Buffer.from('damaged in the store'), 'image/jpeg');
    await preparePhoto({ photoId });
    expect((await rowOf(photoId))?.state).toBe('failed');
    expect((await objectOf(key)).toString()).toBe('damaged in the store');
  });

  test('does nothing for a photo that was taken off meanwhile', async () => {
    await expect(preparePhoto({ photoId: randomUUID() })).resolves.toBeUndefined();
  });
});

test('photos of a report that was never sent go after 30 days; those of cases and of younger reports stay', async () => {
  const old = { createdAt: new Date('2026-04-01T00:00:00Z') };
  const abandoned = await createPhoto(old);
  const sent = await createPhoto({ ...old, caseId: (await createCase('reported', { site: house.site })).id });
  const young = await createPhoto({ createdAt: new Date('2026-05-01T00:00:00Z') });
  expect(await purgeAbandonedPhotos(new Date('2026-05-09T00:00:00Z'))).toBe(1);
  expect([await rowOf(abandoned.id), await rowOf(sent.id), await rowOf(young.id)].map((row) => row !== undefined)).toEqual([false, true, true]);
});
