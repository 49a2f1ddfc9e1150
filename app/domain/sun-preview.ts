import { readSkyline } from '#app/physics/skyline.ts';
import { scanSun } from '#app/physics/sun/sun-scan.ts';
import { formatClock, formatDayClock } from './local-time.ts';
import type { ReportTimes } from './report-times.ts';
import type { SceneSkyline } from './scene.ts';
import { standardAir } from './sun-now.ts';

/** Facts about the sun at one place and time, for a person who is filling in a report. No cause, no verdict. */
export interface SunPreview {
  readonly zone: string;
  /** Sentences, the one that asks to check something first. */
  readonly sentences: readonly string[];
  /** True where the sun cannot have been on the place in the stated time, so that the times are worth a second look. */
  readonly check: boolean;
}

export interface SunPreviewPlace {
  readonly latitudeDeg: number;
  readonly longitudeDeg: number;
  readonly elevationM: number;
  readonly zone: string;
  /** Skyline of the site; null where none is measured. */
  readonly skyline: SceneSkyline | null;
  /** Direction that the wall or the optic faces, from true north; null when not stated. [°] */
  readonly facesDeg: number | null;
}

/** Airless elevation of the centre when the upper limb stands on a level horizon: 34′ of refraction, 16′ of disc. [°] */
const horizonDeg = -50 / 60;
const minuteMs = 60_000;
/** A step is a minute for windows of a day, and at most ten for longer ones. */
const stepMsFor = (spanMs: number) => Math.min(10, Math.max(1, Math.round(spanMs / (1_440 * minuteMs)))) * minuteMs;
const longestMs = 14 * 1_440 * minuteMs;

interface Counts {
  readonly total: number;
  /** Steps with the sun above the level horizon, above the skyline too, and in front of the face too. */
  readonly day: number;
  readonly clear: number;
  readonly inFront: number;
}

function count(place: SunPreviewPlace, startMs: number, stepMs: number, steps: number): Counts {
  const { latitudeDeg, longitudeDeg, elevationM, facesDeg } = place;
  const skyline = place.skyline && place.skyline.points.length > 0 ? readSkyline({ ...place.skyline, sigmaDeg: place.skyline.plusMinusDeg }) : null;
  const sun = scanSun({ ...standardAir, latitudeDeg, longitudeDeg, elevationM }, startMs, stepMs, steps);
  const rad = Math.PI / 180;
  const counts = { total: steps, day: 0, clear: 0, inFront: 0 };
  for (let i = 0; i < steps; i += 1) {
    const [east, north, up] = [sun.east[i] ?? 0, sun.north[i] ?? 0, sun.up[i] ?? 0];
    const elevationDeg = Math.asin(up) / rad;
    if (elevationDeg < horizonDeg) continue;
    counts.day += 1;
    // A hidden disc is one whose centre stands below the skyline; near it the ± of the skyline decides, so it is allowed for.
    if (skyline && elevationDeg < skyline.elevationDeg(Math.atan2(east, north) / rad) - (place.skyline?.plusMinusDeg ?? 0)) continue;
    counts.clear += 1;
    if (facesDeg === null || east * Math.sin(facesDeg * rad) + north * Math.cos(facesDeg * rad) > 0) counts.inFront += 1;
  }
  return counts;
}

/**
 * What the sun did in the stated window, or at the stated moment.
 *
 * @returns null when no time is stated, or the window has no length.
 */
export function sunPreview(place: SunPreviewPlace, times: Pick<ReportTimes, 'foundAt' | 'onsetEarliestAt' | 'onsetLatestAt'>, now: Date): SunPreview | null {
  const from = times.onsetEarliestAt;
  const to = times.onsetLatestAt ?? (from ? now : times.foundAt);
  if (!to || (from && from >= to)) return null;
  const { zone } = place;
  if (!from) return momentPreview(place, to);
  const cut = to.getTime() - from.getTime() > longestMs;
  const startMs = cut ? to.getTime() - longestMs : from.getTime();
  const stepMs = stepMsFor(to.getTime() - startMs);
  const counts = count(place, startMs, stepMs, Math.max(1, Math.floor((to.getTime() - startMs) / stepMs) + 1));
  const span = `${formatDayClock(new Date(startMs), zone)} to ${formatDayClock(to, zone)}${cut ? ' (its last 14 days)' : ''}`;
  const lasted = (steps: number) => durationWords(steps * (stepMs / minuteMs));
  const doubt = doubtOf(place, counts);
  if (doubt) return { zone, check: true, sentences: [`${doubt} That is ${span}. Check the day, the time and the site. If they are right, send it as it is.`] };
  const front = place.facesDeg === null ? '' : ` The sun stood in front of a face toward ${Math.round(place.facesDeg)}° for about ${lasted(counts.inFront)} of it.`;
  const hidden = counts.clear < counts.day ? ` For about ${lasted(counts.day - counts.clear)} of it the sun stood behind the skyline of the site.` : '';
  return { zone, check: false, sentences: [`In this window: about ${lasted(counts.day)} of daylight.${hidden}${front}`] };
}

function doubtOf(place: SunPreviewPlace, counts: Counts): string | null {
  if (counts.day === 0) return 'No daylight in this window.';
  if (counts.clear === 0) return 'In this window the sun stood behind the measured skyline of the site the whole time.';
  if (place.facesDeg !== null && counts.inFront === 0) return `In this window the sun never stood in front of a face toward ${Math.round(place.facesDeg)}°.`;
  return null;
}

/** A mark may be found at any hour: a moment alone is never doubted, only described. */
function momentPreview(place: SunPreviewPlace, at: Date): SunPreview {
  const { zone } = place;
  const counts = count(place, at.getTime(), minuteMs, 1);
  const clock = formatClock(at, zone);
  if (counts.day === 0) return { zone, check: false, sentences: [`The sun was down at ${clock}. A mark is often found later: say below when the place was last seen sound.`] };
  if (counts.clear === 0) return { zone, check: false, sentences: [`At ${clock} the sun stood behind the measured skyline of the site.`] };
  if (counts.inFront === 0) return { zone, check: false, sentences: [`At ${clock} the sun stood behind a face toward ${Math.round(place.facesDeg ?? 0)}°.`] };
  return { zone, check: false, sentences: [`The sun was up at ${clock}.`] };
}

function durationWords(minutes: number): string {
  if (minutes < 60) return `${Math.max(1, Math.round(minutes))} min`;
  const hours = minutes / 60;
  return hours < 10 ? `${Math.floor(hours)} h ${Math.round(minutes % 60)} min` : `${Math.round(hours)} h`;
}
