import { inTransaction } from '#db/client.server.ts';
import { getPhotoOfCase } from '#db/queries/photos.server.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import { localDay } from '#app/domain/local-time.ts';
import { measurePhoto, readClicks } from '#app/domain/photo-measure.ts';
import type { PhotoClicks, WithError } from '#app/domain/photo-measure.ts';
import type { Actor } from '#app/domain/roles.ts';
import { sceneSchema } from '#app/domain/scene.ts';
import type { Measured, SceneMark } from '#app/domain/scene.ts';
import { lockScene, writeScene } from './write-scene.server.ts';

export interface UsePhotoRequest {
  readonly actor: Actor;
  readonly caseNumber: number;
  readonly photoId: string;
  readonly baseVersion: number;
  readonly typed: Readonly<Record<string, string>>;
  readonly now: Date;
}

/**
 * Works out length, width and direction of the mark from the points on a photo, and stores them as a new version of the
 * measurements with the method "photo". The points go into the log, so that it can be worked out again.
 *
 * @throws DomainError `invalid-input` with a sentence per field; `conflict`, `forbidden`, `not-found`.
 */
export function applyPhotoMeasure({ actor, caseNumber, photoId, baseVersion, typed, now }: UsePhotoRequest): Promise<number> {
  return inTransaction(async (tx) => {
    const locked = await lockScene(tx, actor, caseNumber, baseVersion);
    const photo = await getPhotoOfCase(tx, { caseId: locked.row.id, photoId });
    if (!photo) throw notFound('The photo');
    const reading = readClicks(typed);
    if (!reading.ok) throw new DomainError('invalid-input', 'The photo cannot be measured yet.', { fieldErrors: reading.fieldErrors });
    const measures = measurePhoto(reading.clicks);
    if (!measures || measures.lengthMm.value < 0.1) throw new DomainError('invalid-input', 'The photo cannot be measured yet.', { fieldErrors: { ax: ['The corners cross each other, lie on a line, or the mark has no length. Click the corners in turn, clockwise from the upper left.'] } });
    const stamp = { by: actor.displayName, on: localDay(now, locked.row.zone) };
    const measured = ({ value, plusMinus }: WithError): Measured => ({ value: round(value, plusMinus), plusMinus: round(plusMinus, plusMinus), method: 'photo', ...stamp });
    const scene = locked.scene ?? sceneSchema.parse({});
    const mark: SceneMark = {
      ...scene.mark,
      lengthMm: measured(measures.lengthMm),
      ...(measures.widthMm && measures.widthMm.value >= 0.1 ? { widthMm: measured(measures.widthMm) } : {}),
      ...(measures.headingDeg ? { trailHeadingDeg: measured(measures.headingDeg) } : {}),
    };
    const parsed = sceneSchema.safeParse({ ...scene, mark });
    if (!parsed.success) throw new DomainError('invalid-input', 'The photo gives a mark of more than 100 m, or a ± of the whole circle: a point or the known size is wrong.');
    return writeScene(tx, locked, { actor, scene: parsed.data, note: `Mark measured on photo ${caseNumber}-${photo.label}: ${scaleWords(reading.clicks)}.`, evidence: { photoId, photoSha256: photo.sha256, clicks: reading.clicks } });
  });
}

function scaleWords({ scale, clickPx }: PhotoClicks): string {
  const size = scale.kind === 'rectangle' ? `rectangle ${scale.widthMm} × ${scale.heightMm} mm` : `scale ${scale.lengthMm} mm, photo taken square-on`;
  return `${size} ±${scale.sizePlusMinusMm} mm, clicks ±${clickPx} px`;
}

/** As many digits as the ± supports. */
function round(value: number, plusMinus: number): number {
  const digits = Math.max(0, Math.min(4, 1 - Math.floor(Math.log10(Math.max(plusMinus, 1e-4)))));
  return Number(value.toFixed(digits));
}
