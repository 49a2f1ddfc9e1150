import { eq } from 'drizzle-orm';
import sharp from 'sharp';
import { createAction, createActor, createCase, createFinding, createHouse, createHypothesis, createInjury, createInvolvement, createNote, createOrganisation, createPhoto, createReconstruction, createScene, createSunReturn } from '#tests/support/factories.ts';
import type { House } from '#tests/support/factories.ts';
import { linesToDecide, photoKey } from '#app/domain/lines-to-decide.ts';
import type { Decisions } from '#app/domain/redaction.ts';
import type { Audience } from '#app/domain/release-policy.ts';
import type { Actor } from '#app/domain/roles.ts';
import type { ReconstructionInput } from '#app/physics/model/input.ts';
import type { ReconstructionResult } from '#app/physics/model/result.ts';
import { releaseCaseFile } from '#app/services/releases/approve-release.server.ts';
import { prepareRelease } from '#app/services/releases/prepare-release.server.ts';
import { pdfText } from '#app/storage/pdf-text.server.ts';
import { getObject, putObject } from '#app/storage/objects.server.ts';
import { sha256Hex } from '#app/storage/sha256.server.ts';
import { db } from '#db/client.server.ts';
import { readCaseBeforeRedaction } from '#db/queries/case-before-redaction.server.ts';
import { releases, sites, weatherRecords } from '#db/schema/all.ts';
import type { organisations } from '#db/schema/all.ts';

/** Where the phone says that the photo was taken. [°] */
export const photoPlace = { latitudeDeg: 53.512345, longitudeDeg: -1.612345 };
export const mask = { leftShare: 0.25, topShare: 0.25, widthShare: 0.25, heightShare: 0.5, class: 'personal' as const };

/** A photo as a phone makes it: stripes of loud colour, with camera, time and place in the file. */
export async function phonePhoto(): Promise<Buffer> {
  const [width, height] = [640, 480];
  const pixels = Buffer.alloc(width * height * 3);
  for (let at = 0; at < width * height; at += 1) pixels.set(Math.floor((at % width) / 8) % 2 === 0 ? [255, 40, 200] : [20, 255, 60], at * 3);
  return sharp(pixels, { raw: { width, height, channels: 3 } })
    .jpeg({ quality: 95 })
    .withExif({
      IFD0: { Make: 'INVENTED-MAKER', Model: 'INVENTED-CAMERA', ImageDescription: 'Ottilie Vantongeren in the kitchen', Artist: 'Hollis Branwen' },
      IFD2: { DateTimeOriginal: '2026:05:09 15:05:12' },
      IFD3: { GPSLatitudeRef: 'N', GPSLatitude: '53/1 30/1 4444/100', GPSLongitudeRef: 'W', GPSLongitude: '1/1 36/1 4444/100' },
    })
    .toBuffer();
}

/** A record that names a person of the case; the third value lies beyond the window. */
const weatherValues = [
  { startUtc: '2026-05-09T12:00:00.000Z', endUtc: '2026-05-09T12:10:00.000Z', directWm2: 812.5, temperatureC: 11.5 },
  { startUtc: '2026-05-09T12:10:00.000Z', endUtc: '2026-05-09T12:20:00.000Z', directWm2: 96, temperatureC: 11.6 },
  { startUtc: '2026-05-09T15:00:00.000Z', endUtc: '2026-05-09T15:10:00.000Z', directWm2: 640, temperatureC: 12 },
];

const input: ReconstructionInput = {
  place: { latitudeDeg: 53.5, longitudeDeg: -1.6, elevationM: 60, heightAboveGroundM: 10, zone: 'Europe/London' },
  window: { startUtc: '2026-05-09T09:00:00.000Z', endUtc: '2026-05-09T14:10:00.000Z', clockSigmaS: 0 },
  sky: {
    climateClass: 'temperate-rural',
    dniSeries: { basis: 'measured', source: 'Rooftop instrument of Hollis Branwen, Tarn Head; measured direct irradiance, 10-minute means', stationDistanceKm: 14.26, values: weatherValues.map(({ startUtc, endUtc, directWm2 }) => ({ startUtc, endUtc, dniWm2: directWm2 })) },
  },
  seed: 3,
};
const result: ReconstructionResult = {
  engineVersion: 'test',
  seed: 3,
  window: { startUtc: '2026-05-09T09:00:00.000Z', endUtc: '2026-05-09T14:10:00.000Z', minutes: 310 },
  daylight: [{ on: '2026-05-09', sunriseUtc: '2026-05-09T04:12:31.000Z', sunsetUtc: '2026-05-09T19:47:12.000Z', polar: null }],
  minutes: [],
  runs: [
    { fromUtc: '2026-05-09T09:00:00.000Z', toUtc: '2026-05-09T12:00:00.000Z', minutes: 180, verdict: 'not-sunlit', reason: 'beam-misses' },
    { fromUtc: '2026-05-09T12:00:00.000Z', toUtc: '2026-05-09T14:10:00.000Z', minutes: 130, verdict: 'sunlit', reason: 'sun-on-mark' },
  ],
  totals: { sunlit: 130, notSunlit: 180, cannotTell: 0 },
  best: null,
  focus: null,
  heating: null,
  recurrence: [],
  requiredSun: null,
  checks: [],
  tests: [],
  grade: { word: 'not refuted', because: [] },
  sampling: null,
  assumptions: [],
  warnings: [],
};

export interface ReleaseStage {
  readonly house: House;
  readonly insurer: typeof organisations.$inferSelect;
  readonly reader: Actor;
  readonly caseId: string;
  readonly caseNumber: number;
  readonly photoId: string;
}

/** A closed case with people, an injury, a photo with a masked part, a reconstruction, hypotheses, a signed finding and an action. */
export async function releaseStage(): Promise<ReleaseStage> {
  const house = await createHouse();
  const insurer = await createOrganisation({ kind: 'insurer', name: `Insurer of ${house.organisation.name}` });
  const reader = await createActor(insurer.id, 'insurer');
  await db.update(sites).set({ address: '14 Quarrel Rise, SK9 9ZZ' }).where(eq(sites.id, house.site.id));
  const row = await createCase('closed', {
    site: house.site,
    latitudeDeg: 53.512345,
    longitudeDeg: -1.612345,
    narrative: 'The neighbour, Hollis Branwen, let us in. The curtain had a brown line. Ring 07700 900412.',
    eventType: 'fire',
    interimControl: 'Mirror covered with a towel',
    lossEstimate: 1_850,
    lossCurrency: 'GBP',
    reporterId: house.reporter.userId,
  });
  const caseId = row.id;
  await createInvolvement({ caseId, role: 'witness', name: 'Hollis Branwen', phone: '+44 7700 900412', email: 'hb@flats.example' });
  const hurt = await createInvolvement({ caseId, role: 'injured', name: 'Ottilie Vantongeren' });
  await createInjury({ caseId, involvementId: hurt.id, part: 'right hand', kind: 'superficial-burn', treatment: 'first-aid' });
  await createScene({ caseId, scene: { optic: { kind: 'curved-mirror', diameterMm: { value: 150, plusMinus: 1, method: 'measured' } } } });
  const run = await createReconstruction({ caseId, number: 1, input, state: 'done', result, attachedAt: new Date('2026-05-12T11:00:00Z'), attachedById: house.investigator.userId });
  await db.insert(weatherRecords).values({ caseId, number: 1, kind: 'file', nature: 'station', sourceName: 'Rooftop instrument of Hollis Branwen', station: 'Tarn Head', stationDistanceKm: 14.26, stationBearingDeg: 213.4, intervalMin: 10, licenceNote: 'By letter of Ottilie Vantongeren', values: weatherValues, valuesSha256: sha256Hex(JSON.stringify(weatherValues)), createdById: house.investigator.userId });
  await createSunReturn({ caseId, reconstructionId: run.id, onDay: '2027-08-03' });
  await createHypothesis({ caseId, statement: 'The mirror focused the sun.', evidenceFor: 'Ottilie Vantongeren saw the patch.', result: 'probable' });
  await createFinding({ caseId, authorId: house.investigator.userId, reviewerId: house.reviewer.userId, state: 'signed', opinion: 'Focused sunlight is probable.' });
  await createAction({ caseId, number: 1, ownerId: house.manager.userId, verifierId: house.investigator.userId, title: 'Take the mirror away', cost: 95, costCurrency: 'GBP' });
  await createNote({ caseId, authorId: house.reporter.userId, authorName: house.reporter.displayName, body: 'The sill is new.' });
  const bytes = await phonePhoto();
  // Of its own: tests that run beside this one put other bytes in its place.
  const originalKey = `originals/${caseId}/${sha256Hex(bytes)}`;
  await putObject(originalKey, bytes, 'image/jpeg');
  const photo = await createPhoto({
    caseId,
    label: 1,
    originalKey,
    sha256: sha256Hex(bytes),
    bytes: bytes.byteLength,
    state: 'ready',
    fileName: 'Ottilie-kitchen.jpg',
    caption: 'Ottilie Vantongeren beside the sill',
    masks: [mask],
    releasable: 'yes',
    exif: { takenAtLocal: null, utcOffset: null, ...photoPlace, directionDeg: null, directionReference: null, camera: 'INVENTED-CAMERA' },
  });
  return { house, insurer, reader, caseId, caseNumber: row.number, photoId: photo.id };
}

/** Decisions that share everything that can be shared. */
export async function shareAll(stage: ReleaseStage, audience: Audience = 'insurer'): Promise<Decisions> {
  const found = await readCaseBeforeRedaction(db, { actor: stage.house.investigator, caseNumber: stage.caseNumber });
  if (!found) throw new Error('The case of the stage is missing.');
  const keys = [...linesToDecide(found.source, audience).map((line) => line.key), ...found.source.photos.map((photo) => photoKey(photo))];
  return Object.fromEntries(keys.map((key) => [key, 'share' as const]));
}

export const inADay = () => new Date(Date.now() + 86_400_000);

export async function prepareAll(stage: ReleaseStage, audience: Audience = 'insurer'): Promise<number> {
  return prepareRelease({
    actor: stage.house.investigator,
    caseNumber: stage.caseNumber,
    audience,
    recipientOrganisationId: stage.insurer.id,
    changeNote: 'First release',
    expires: { at: inADay() },
    decisions: await shareAll(stage, audience),
    basis: null,
  });
}

/** A release that is out, and its id. */
export async function releaseAll(stage: ReleaseStage): Promise<{ number: number; releaseId: string }> {
  const number = await prepareAll(stage);
  await releaseCaseFile({ actor: stage.house.manager, caseNumber: stage.caseNumber, number });
  return { number, releaseId: (await rowOf(stage, number)).id };
}

export async function rowOf(stage: ReleaseStage, number: number) {
  const row = (await db.select().from(releases).where(eq(releases.caseId, stage.caseId))).find((one) => one.number === number);
  if (!row) throw new Error(`Release ${number} is missing.`);
  return row;
}

/** Every byte of a release, as one text for searching, with each file by its name. Printed files, which are packed, are read by their words. */
export async function bytesOf(stage: ReleaseStage, number: number) {
  const row = await rowOf(stage, number);
  const files = new Map<string, Buffer>();
  for (const file of row.files) {
    const bytes = await getObject(file.objectKey);
    if (!bytes) throw new Error(`${file.name} is missing from the store.`);
    files.set(file.name, Buffer.from(bytes));
  }
  const words = await Promise.all([...files].map(([name, bytes]) => (name.endsWith('.pdf') ? pdfText(bytes) : bytes.toString('latin1'))));
  const text = [JSON.stringify(row.released), JSON.stringify(row.files.map(({ name, change }) => ({ name, change }))), ...words].join('\n');
  return { row, files, text };
}
