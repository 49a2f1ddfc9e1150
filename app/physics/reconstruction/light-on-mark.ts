import type { LightInterval, LightOnMark } from '#app/physics/model/minutes.ts';
import { minuteMs } from '#app/physics/sun-track.ts';
import { roundSignificant, toIsoUtc } from '#app/physics/units.ts';
import { dot } from '#app/physics/vector.ts';
import type { Setting } from './setting.ts';
import { tracedSunsOnMark } from './traced-focus.ts';
import { lightReaches, markDiscM, nearTheSpot, type JudgedMinute } from './window.ts';

/** From here a wide pane does more than add its own reflection to the day; our choice, unverified. [suns] */
export const focusedFromSuns = 1.5;

/** Less than this is the glimmer that every curved surface throws about; a clear double pane reflects twice as much. Our choice, unverified. [suns] */
export const litFromSuns = 0.05;

/** Widest spread of light beyond the optic's own shadow: sun, slope errors and pane tilts together. [rad] */
const widestSpreadRad = 0.05;

/** True where openings and bars stop some of the light but not all. */
const isPartly = ({ passing }: JudgedMinute): boolean => passing !== null && passing < 1;

/** Concentration by the closed form, receiver cosine included; 0 where no part of the optic lights the mark. */
function closedFormSuns({ beam, miss }: JudgedMinute, { model, mark }: Setting): number {
  if (beam === null || miss === null || model === null || mark === null) return 0;
  const cosine = -dot(beam.direction, mark.normal);
  const widestM = model.halfWidthM * (1 + miss.alongM / Math.abs(model.focalLengthM)) + widestSpreadRad * miss.alongM + markDiscM;
  if (cosine <= 0 || miss.alongM <= 0 || miss.lateralM > widestM) return 0;
  return cosine * beam.concentration(miss.alongM, miss.offsetM, markDiscM);
}

/**
 * Concentration that any part of the optic throws on the mark, minute by minute; 0 where none of it lands there.
 *
 * The closed forms add up the whole optic, each part with its own image of the sun, so that they end where the light
 * ends; the trace of the best minute sets their height. Where openings and bars stop part of the light, every minute
 * near the spot is traced by itself: a shade fraction of the whole says little about a spot.
 *
 * @param best Minute of the trace. @param calibration Traced over closed-form concentration at a distance.
 */
export function sunsOnMark(judged: readonly JudgedMinute[], best: JudgedMinute | null, calibration: (distanceM: number) => number, setting: Setting): Float64Array {
  return Float64Array.from(judged, (minute) => {
    const closed = lightReaches(minute) ? closedFormSuns(minute, setting) : 0;
    if (closed === 0) return 0;
    const partly = isPartly(minute) || (best !== null && isPartly(best));
    const masked = partly && nearTheSpot(minute, setting) ? tracedSunsOnMark(minute, setting) : null;
    return masked ?? closed * calibration(minute.miss?.alongM ?? 0);
  });
}

/** An interval lasts until the light falls to half of what began it, so that a ripple does not cut it up. */
function intervals(suns: Float64Array, fromSuns: number, judged: readonly JudgedMinute[]): readonly LightInterval[] {
  const list: { fromMs: number; count: number; greatest: number }[] = [];
  let open = false;
  for (const [index, { sun }] of judged.entries()) {
    const value = suns[index] ?? 0;
    const here: boolean = value >= (open ? fromSuns / 2 : fromSuns);
    const last = list.at(-1);
    if (here && open && last !== undefined) {
      last.count++;
      last.greatest = Math.max(last.greatest, value);
    } else if (here) list.push({ fromMs: sun.utcMs, count: 1, greatest: value });
    open = here;
  }
  return list.map(({ fromMs, count, greatest }) => ({
    fromUtc: toIsoUtc(fromMs), toUtc: toIsoUtc(fromMs + count * minuteMs), minutes: count, greatestSuns: roundSignificant(greatest, 3),
  }));
}

/** Lit apart from focused: a wide pane throws a patch that stays on the mark long before and after its focus passes. */
export function lightOnMark(judged: readonly JudgedMinute[], suns: Float64Array, setting: Setting): LightOnMark | null {
  if (setting.model === null || setting.mark === null) return null;
  return {
    lit: intervals(suns, litFromSuns, judged),
    focused: intervals(suns, focusedFromSuns, judged),
    litFromSuns,
    focusedFromSuns,
  };
}
