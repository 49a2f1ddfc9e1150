import { findMinimum, findRoot } from '#app/physics/root-search.ts';
import { solarPosition, type Observer } from './solar-position.ts';
import { nextDay, startOfLocalDay } from './zone-days.ts';

export interface Daylight {
  readonly on: string;
  readonly sunriseMs: number | null;
  readonly sunsetMs: number | null;
  readonly polar: 'day' | 'night' | null;
}

/** Airless elevation of the centre when the refracted upper limb stands on a level horizon. [°] */
const upperLimbDeg = -0.8333;

const stepMs = 1_800_000;

/**
 * Sunrise and sunset of one local day: upper limb on a level horizon at the optic's ground, refraction 34′.
 *
 * @param day Local day, YYYY-MM-DD.
 * @returns First rise and last set inside the day; null where there is none. `polar` says on which side the sun stayed
 *   when it crossed neither way.
 */
export function daylightOn(day: string, zone: string, observer: Observer): Daylight {
  const startMs = startOfLocalDay(day, zone);
  const endMs = startOfLocalDay(nextDay(day), zone);
  const above = (utcMs: number): number => solarPosition(utcMs, observer).airlessElevationDeg - upperLimbDeg;
  let sunriseMs: number | null = null;
  let sunsetMs: number | null = null;
  const note = (fromMs: number, toMs: number): void => {
    const crossing = findRoot(above, fromMs, toMs, 500);
    if (crossing === null) return;
    if (above(toMs) > above(fromMs)) sunriseMs ??= crossing;
    else sunsetMs = crossing;
  };
  let previous = above(startMs);
  let highest = previous;
  for (let fromMs = startMs; fromMs < endMs; fromMs += stepMs) {
    const toMs = Math.min(endMs, fromMs + stepMs);
    const next = above(toMs);
    if (previous > 0 !== next > 0) {
      note(fromMs, toMs);
    } else if (previous < 0 && previous > -0.5) {
      // Near the start of the polar night the sun may show for less than a step.
      const topMs = findMinimum((utcMs) => -above(utcMs), fromMs, toMs, 1000);
      if (above(topMs) > 0) {
        note(fromMs, topMs);
        note(topMs, toMs);
        highest = Math.max(highest, above(topMs));
      }
    }
    previous = next;
    highest = Math.max(highest, next);
  }
  const crossed = sunriseMs !== null || sunsetMs !== null;
  return { on: day, sunriseMs, sunsetMs, polar: crossed ? null : highest > 0 ? 'day' : 'night' };
}
