import { northFromShadow } from '#app/physics/sun/shadow-north.ts';
import { fromLocalInput } from './local-time.ts';
import { readNumber } from './scene-lines.ts';

export interface ShadowPlace {
  readonly latitudeDeg: number;
  readonly longitudeDeg: number;
  readonly elevationM: number;
  readonly zone: string;
}

/** What a timed shadow says about an instrument. */
export type ShadowReading =
  | { readonly ok: true; readonly correctionDeg: number; readonly sentences: readonly string[] }
  | { readonly ok: false; readonly sentence: string };

/** Standard atmosphere at sea level, ISO 2533:1975; refraction does not change a bearing. */
const standardAir = { pressureHpa: 1_013.25, temperatureC: 15 } as const;
/** A compass that differs more than this from the magnetic model stands near steel. Common practice. [°] */
const disturbedDeg = 3;
const signed = (degrees: number) => `${degrees >= 0 ? '+' : '-'}${Math.abs(degrees).toFixed(1)}°`;

/**
 * True north from the shadow of an upright edge.
 *
 * @param at Clock time at the place when the shadow was read, `YYYY-MM-DDTHH:MM:SS`.
 * @param read Bearing of the shadow, away from the edge, as the instrument gives it. [°]
 * @param declinationDeg What the magnetic model gives there, to compare a compass with; null where it gives nothing.
 */
export function readShadow(at: string, read: string, place: ShadowPlace, declinationDeg: number | null): ShadowReading {
  const readDeg = readNumber(read.replace(/\s*°$/u, ''));
  if (!(readDeg >= 0 && readDeg <= 360)) return { ok: false, sentence: 'Write the bearing of the shadow as the instrument gives it, from 0 to 360°.' };
  const moment = fromLocalInput(at, place.zone);
  if (moment.kind === 'unreadable') return { ok: false, sentence: 'Give day and clock time of the reading, to the second if you can.' };
  if (moment.kind !== 'instant') return { ok: false, sentence: 'The clock was changed in that hour. Take another shadow at a clear time.' };
  try {
    const shadow = northFromShadow(moment.instant.getTime(), { ...place, ...standardAir }, readDeg);
    const turn = Math.abs(shadow.degPerSecond) * 60;
    const difference = declinationDeg === null ? null : Math.round((shadow.correctionDeg - declinationDeg) * 10) / 10;
    return {
      ok: true,
      correctionDeg: Math.round(shadow.correctionDeg * 10) / 10,
      sentences: [
        `The shadow pointed to ${shadow.shadowAzimuthDeg.toFixed(1)}° true. Add ${signed(shadow.correctionDeg)} to what this instrument reads.`,
        `A minute of error in the time is ${turn.toFixed(2)}° of bearing.`,
        ...(difference === null ? [] : [Math.abs(difference) > disturbedDeg ? `If it is a compass, it is ${Math.abs(difference).toFixed(1)}° off the magnetic model: steel or cladding is near, so use this correction and not the model, and take each bearing from this very spot.` : `A compass fits the magnetic model within ${Math.abs(difference).toFixed(1)}°.`]),
      ],
    };
  } catch (error) {
    // Out of range is the answer: the engine says how high the sun stood.
    if (error instanceof RangeError) return { ok: false, sentence: error.message };
    throw error;
  }
}
