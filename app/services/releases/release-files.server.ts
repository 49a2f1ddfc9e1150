import { buildReport } from '#app/domain/build-report.ts';
import type { CaseBeforeRedaction, PhotoBeforeRedaction } from '#app/domain/case-before-redaction.ts';
import { canonicalJson } from '#app/domain/canonical-json.ts';
import { DomainError } from '#app/domain/errors.ts';
import type { Redaction } from '#app/domain/redaction.ts';
import type { Audience } from '#app/domain/release-policy.ts';
import { releasedReport } from '#app/domain/released-report.ts';
import { measurementsCsv, runsCsv } from '#app/domain/released-tables.ts';
import { weatherCsv } from '#app/domain/released-weather.ts';
import { renderPdf } from '#app/services/finding-reports/render-pdf.server.ts';
import { getObject } from '#app/storage/objects.server.ts';
import { sha256Hex } from '#app/storage/sha256.server.ts';
import { renderReleasePhoto } from './release-photo.server.ts';

export const dataFileName = 'data.json';
export const reportFileName = 'report.pdf';

/** A file of a release before it is stored. */
export interface MadeFile {
  readonly name: string;
  readonly change: string;
  readonly mime: string;
  readonly bytes: Uint8Array;
}

const encoder = new TextEncoder();

/** The files of a release: the released case as data, its tables, and the photos, each made from redacted material. */
export async function makeReleaseFiles({ released, withheld, photos }: Redaction, source: CaseBeforeRedaction, audience: Audience): Promise<MadeFile[]> {
  const runs = runsCsv(released);
  const measurements = measurementsCsv(released);
  const weather = weatherCsv(released);
  const data = encoder.encode(canonicalJson(released));
  const report = await renderPdf(buildReport(releasedReport({ released, withheld, audience, releasedHash: sha256Hex(data) })));
  const files: MadeFile[] = [
    { name: dataFileName, change: 'the released case, whole', mime: 'application/json', bytes: data },
    { name: reportFileName, change: 'made from the released case alone', mime: 'application/pdf', bytes: report },
    ...(runs === null ? [] : [{ name: 'runs.csv', change: 'from the reconstruction, no names in it', mime: 'text/csv; charset=utf-8', bytes: encoder.encode(runs) }]),
    ...(measurements === null ? [] : [{ name: 'measurements.csv', change: 'numbers and method, typed words left out', mime: 'text/csv; charset=utf-8', bytes: encoder.encode(measurements) }]),
    ...(weather === null ? [] : [{ name: 'weather.csv', change: 'values that the run went by; bearing of the station left out', mime: 'text/csv; charset=utf-8', bytes: encoder.encode(weather) }]),
  ];
  for (const shared of photos) {
    const photo = source.photos.find((one) => one.photoId === shared.photoId);
    if (!photo) throw new Error(`Photo ${shared.fileName} is not one of the case.`);
    files.push({ name: shared.fileName, change: changeWords(photo), mime: 'image/jpeg', bytes: await renderReleasePhoto(await originalOf(photo), photo.masks) });
  }
  return files;
}

async function originalOf(photo: PhotoBeforeRedaction): Promise<Uint8Array> {
  const bytes = await getObject(photo.originalKey);
  if (!bytes || sha256Hex(bytes) !== photo.sha256) {
    throw new DomainError('conflict', `The stored original of photo ${photo.label} is ${bytes ? 'not what came in' : 'missing'}. Hold this photo back, and tell an administrator.`);
  }
  return bytes;
}

function changeWords(photo: PhotoBeforeRedaction): string {
  const boxes = photo.masks.length === 0 ? '' : `${photo.masks.length} ${photo.masks.length === 1 ? 'part' : 'parts'} masked, `;
  return `${boxes}camera data removed, new copy and name`;
}
