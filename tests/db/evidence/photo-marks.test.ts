import { eq } from 'drizzle-orm';
import { beforeEach, describe, expect, test } from 'vitest';
import { evidenceStage } from './stage.ts';
import type { EvidenceStage } from './stage.ts';
import { createPhoto } from '#tests/support/factories.ts';
import { db } from '#db/client.server.ts';
import { logEntries, photos } from '#db/schema/all.ts';
import { marksPerPhoto, markWords } from '#app/domain/photo-marks.ts';
import type { PhotoMark } from '#app/domain/photo-marks.ts';
import type { Actor } from '#app/domain/roles.ts';
import { addMark, removeMark } from '#app/services/photos/mark-photo.server.ts';
import { readPhoto } from '#app/services/photos/read-photo.server.ts';
import { putObject } from '#app/storage/objects.server.ts';
import { sha256Hex } from '#app/storage/sha256.server.ts';

const bytes = new TextEncoder().encode('stands for the bytes of a photo');
const arrow: PhotoMark = { kind: 'arrow', fromX: 0.1, fromY: 0.1, toX: 0.5, toY: 0.5, words: 'west end' };

let stage: EvidenceStage;
let photoId: string;
beforeEach(async () => {
  stage = await evidenceStage();
  const sha256 = sha256Hex(bytes);
  await putObject(`originals/${sha256}`, bytes, 'image/jpeg');
  photoId = (await createPhoto({ caseId: stage.caseId, label: 1, sha256, originalKey: `originals/${sha256}`, bytes: bytes.byteLength, state: 'ready' })).id;
});

const add = (mark: PhotoMark, actor: Actor = stage.house.investigator) => addMark({ actor, caseNumber: stage.caseNumber, photoId, mark });
const stored = async () => (await db.select().from(photos).where(eq(photos.id, photoId)))[0];

describe('marks over a photo', () => {
  test('lie on a layer of their own: the original still has the hash of its intake', async () => {
    await add(arrow);
    await add(arrow);
    expect((await stored())?.marks).toEqual([arrow]);
    const original = await readPhoto({ actor: stage.house.reviewer, photoId, rendition: 'original', draftOf: null });
    expect(original && sha256Hex(original.bytes)).toBe(sha256Hex(bytes));
    expect(await stored()).toMatchObject({ hashCheck: 'same' });
    const events = (await db.select().from(logEntries).where(eq(logEntries.caseId, stage.caseId))).map((line) => line.event);
    expect(events).toEqual(['photo.mark-added', 'photo.original-read']);
  });

  test('an original that is no longer what came in is refused at its download', async () => {
    const row = await stored();
    await putObject(row?.originalKey ?? '', new TextEncoder().encode('other bytes'), 'image/jpeg');
    await expect(readPhoto({ actor: stage.house.reviewer, photoId, rendition: 'original', draftOf: null })).rejects.toMatchObject({ code: 'conflict' });
    expect(await stored()).toMatchObject({ hashCheck: 'differs' });
  });

  test('are drawn and removed by an investigator, and never by place alone', async () => {
    const { reviewer, manager, reporter } = stage.house;
    for (const actor of [reviewer, manager, reporter]) await expect(add(arrow, actor)).rejects.toMatchObject({ code: 'forbidden' });
    await add(arrow);
    const remove = (words: string) => removeMark({ actor: stage.house.investigator, caseNumber: stage.caseNumber, photoId, position: 0, words });
    await expect(remove('Text at 1, 1 %')).rejects.toMatchObject({ code: 'conflict' });
    await remove(markWords(arrow));
    expect((await stored())?.marks).toEqual([]);
  });

  test('are not without number', async () => {
    await db.update(photos).set({ marks: Array.from({ length: marksPerPhoto }, (_unused, index): PhotoMark => ({ kind: 'text', x: index / 100, y: 0.5, words: 'x' })) }).where(eq(photos.id, photoId));
    await expect(add(arrow)).rejects.toMatchObject({ code: 'invalid-state' });
  });
});
