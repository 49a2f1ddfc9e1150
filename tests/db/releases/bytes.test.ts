import { randomUUID } from 'node:crypto';
import exifr from 'exifr';
import sharp from 'sharp';
import { getDocument } from 'pdfjs-dist/legacy/build/pdf.mjs';
import { beforeAll, describe, expect, it } from 'vitest';
import { inTransaction } from '#db/client.server.ts';
import { insertCaseNote } from '#db/queries/case-notes.server.ts';
import { foreignJpegSegments } from '#app/domain/jpeg-segments.ts';
import { collectItem } from '#app/services/evidence/collect-item.server.ts';
import { masksAreSolid } from '#app/services/releases/release-photo.server.ts';
import { pdfText } from '#app/storage/pdf-text.server.ts';
import { sha256Hex } from '#app/storage/sha256.server.ts';
import { bytesOf, mask, phonePhoto, photoPlace, prepareAll, releaseStage } from './stage.ts';
import type { ReleaseStage } from './stage.ts';

let stage: ReleaseStage;
let bytes: Awaited<ReturnType<typeof bytesOf>>;
beforeAll(async () => {
  stage = await releaseStage();
  await collectItem({
    actor: stage.house.investigator,
    caseNumber: stage.caseNumber,
    item: { clientId: randomUUID(), kind: 'optic', description: 'Mirror of Ottilie Vantongeren', fromWhere: 'kitchen sill', collectedBy: 'Branwen Hollis', sealNumber: 'Q-77', condition: 'whole', holderRole: 'investigator', holderName: 'Tarn laboratory, Edda Rosmarin', place: '' },
    collectedAt: new Date('2026-05-10T09:00:00Z'),
    now: new Date(),
  });
  await inTransaction((tx) => insertCaseNote(tx, { caseId: stage.caseId, authorId: stage.house.investigator.userId, authorName: stage.house.investigator.displayName, body: 'Edda Rosmarin looked at the frame with a loupe.' }));
  bytes = await bytesOf(stage, await prepareAll(stage));
});

describe('every byte of a release', () => {
  it('is listed in the manifest with its size and hash', () => {
    expect([...bytes.files.keys()].sort()).toEqual(['data.json', 'measurements.csv', 'photo-01.jpg', 'report.pdf', 'runs.csv', 'weather.csv']);
    for (const file of bytes.row.files) {
      expect(sha256Hex(bytes.files.get(file.name) ?? '')).toBe(file.sha256);
      expect(bytes.files.get(file.name)?.byteLength).toBe(file.bytes);
    }
    expect(bytes.row.files.find((file) => file.name === 'data.json')?.sha256).toBe(bytes.row.releasedHash);
  });

  it.each(['Hollis', 'Branwen', 'Ottilie', 'Vantongeren', '900412', 'flats.example', 'Quarrel', 'SK9', '53.5123', '1.6123', 'right hand', 'INVENTED', 'kitchen', 'Rosmarin'])('holds nothing of "%s"', (secret) => {
    expect(bytes.text.toLowerCase()).not.toContain(secret.toLowerCase());
  });

  it('holds no name of a person of the house', () => {
    for (const { displayName } of [stage.house.reporter, stage.house.investigator, stage.house.reviewer, stage.house.manager]) expect(bytes.text).not.toMatch(new RegExp(`${displayName}(?!\\d)`, 'u'));
  });

  it('tells who held an item by part and time, and none of its typed words', () => {
    expect(bytes.row.released.evidence).toEqual([{ code: `${stage.caseNumber}-A`, kind: 'optic', custody: [{ role: 'investigator', from: '2026-05-10T09:00:00.000Z', to: null }], exams: [] }]);
    for (const typed of ['Mirror of', 'Q-77', 'kitchen']) expect(bytes.text).not.toContain(typed);
  });

  it('tells the weather that the run went by, without the person in its name, the bearing of the station or its exact distance', () => {
    expect(bytes.row.released.weather).toMatchObject({ number: 1, nature: 'station', distanceKm: 14, basis: 'measured', intervalMin: 10, setAside: false });
    expect(bytes.row.released.weather?.source).toEqual([{ text: 'Rooftop instrument of ' }, { withheld: 'personal' }, { text: ', Tarn Head' }]);
    expect(bytes.row.released.weather?.values.map((value) => [value.usedWm2, value.temperatureC])).toEqual([[812.5, 11.5], [96, 11.6], [640, 12]]);
    const csv = (bytes.files.get('weather.csv') ?? Buffer.alloc(0)).toString('utf8');
    expect(csv.split('\r\n')[1]).toBe('2026-05-09T12:00:00.000Z,2026-05-09T12:10:00.000Z,"9 May 2026, 13:00","9 May 2026, 13:10",10-minute means,812.5,812.5,,,,11.5,,');
    for (const kept of ['213', '14.26', 'letter of']) expect(bytes.text).not.toContain(kept);
  });

  it('holds what was shared', () => {
    expect(bytes.text).toContain('looked at the frame with a loupe');
    expect(bytes.text).toContain('The curtain had a brown line.');
    expect(bytes.text).toContain('Focused sunlight is probable.');
    expect(bytes.row.released).toMatchObject({ siteName: stage.house.site.name, injury: 'yes, first aid', loss: { amount: 1850, currency: 'GBP' } });
  });
});

describe('the report of a release', () => {
  const pdf = () => bytes.files.get('report.pdf') ?? Buffer.alloc(0);

  it('says in print what the data says, and names what was withheld by class', async () => {
    const words = (await pdfText(pdf())).replace(/\s+/gu, ' ');
    for (const part of ['The curtain had a brown line.', 'Focused sunlight is probable.', bytes.row.releasedHash, '[withheld: personal]', 'do not look at the sun']) expect(words).toContain(part);
    for (const part of ['Rooftop instrument of [withheld: personal], Tarn Head, 14 km off', 'Direct as used, 10-minute means', '812.5']) expect(words).toContain(part);
    for (const secret of ['Hollis', 'Vantongeren', 'SK9', '53.5123', stage.house.reporter.displayName]) expect(words).not.toMatch(new RegExp(`${secret}(?!\\d)`, 'u'));
  });

  it('is tagged, in a stated language', async () => {
    const document = await getDocument({ data: new Uint8Array(pdf()), verbosity: 0 }).promise;
    expect(await document.getMarkInfo()).toMatchObject({ Marked: true });
    expect((await document.getMetadata()).info).toMatchObject({ Language: 'en-GB' });
    expect(JSON.stringify(await (await document.getPage(1)).getStructTree())).toContain('"role":"H1"');
    await document.destroy();
  });
});

describe('photos of a release', () => {
  const photo = () => bytes.files.get('photo-01.jpg') ?? Buffer.alloc(0);

  it('hold no camera, time or place, although the original does', async () => {
    const original = await exifr.parse(await phonePhoto(), { gps: true });
    expect(original).toMatchObject({ Make: 'INVENTED-MAKER', latitude: expect.closeTo(photoPlace.latitudeDeg, 4), longitude: expect.closeTo(photoPlace.longitudeDeg, 4) });
    expect(foreignJpegSegments(await phonePhoto())).toContain('APP1');
    expect(await exifr.parse(photo(), true)).toBeUndefined();
    expect(await exifr.gps(photo())).toBeUndefined();
    const { exif, icc, iptc, xmp } = await sharp(photo()).metadata();
    expect({ exif, icc, iptc, xmp }).toEqual({ exif: undefined, icc: undefined, iptc: undefined, xmp: undefined });
    expect(foreignJpegSegments(photo())).toEqual([]);
  });

  it('are one solid colour where they are masked, and the picture elsewhere', async () => {
    const { data, info } = await sharp(photo()).raw().toBuffer({ resolveWithObject: true });
    const at = (x: number, y: number) => [...data.subarray((y * info.width + x) * info.channels, (y * info.width + x) * info.channels + 3)];
    const inside: number[][] = [];
    for (let y = 0.27; y < 0.73; y += 0.01) for (let x = 0.28; x < 0.47; x += 0.01) inside.push(at(Math.round(x * info.width), Math.round(y * info.height)));
    const [red, green, blue] = [0, 1, 2].map((channel) => inside.map((pixel) => pixel[channel] ?? 0));
    for (const values of [red, green, blue]) expect(Math.max(...(values ?? [])) - Math.min(...(values ?? []))).toBeLessThanOrEqual(6);
    // The stripes beside the box are pink and green.
    const outside = [at(40, 40), at(44, 40), at(48, 40), at(52, 40)];
    expect(outside.some(([r = 0, g = 0]) => r - g > 120)).toBe(true);
    expect(outside.some(([r = 0, g = 0]) => g - r > 120)).toBe(true);
  });

  it('whose box was drawn after the copy was made do not pass as masked', async () => {
    expect(await masksAreSolid(photo(), [mask])).toBe(true);
    expect(await masksAreSolid(photo(), [mask, { ...mask, leftShare: 0.6 }])).toBe(false);
    expect(await masksAreSolid(await phonePhoto(), [mask])).toBe(false);
  });
});

it('names of files say nothing of the names that the files came with', () => {
  expect(bytes.row.files.every((file) => /^(?:data\.json|report\.pdf|runs\.csv|measurements\.csv|weather\.csv|photo-\d+\.jpg)$/u.test(file.name))).toBe(true);
});
