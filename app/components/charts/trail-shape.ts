import type { RunMinute } from '#app/domain/beam-words.ts';
import type { BeamView } from '#app/domain/run-beam.ts';
import type { Flat } from '#app/domain/scale-drawing.ts';
import { dot, fromAzimuthElevation } from '#app/physics/vector.ts';

/** Stretch of the spot's way with one result; points in mm from the middle of the mark, right and up. */
export interface TrailStretch {
  readonly verdict: RunMinute['verdict'];
  readonly points: readonly Flat[];
}
export interface TrailShape {
  readonly stretches: readonly TrailStretch[];
  /** Outline of the mark as measured; its long side along the trail's heading, level where that was not recorded. */
  readonly mark: readonly Flat[];
  readonly ticks: readonly { readonly at: Flat; readonly atUtc: string }[];
  readonly spotAt: ReadonlyMap<string, Flat>;
}

/** Direction of the long side of the mark in the target's plane. */
function markAlong(beam: BeamView): Flat {
  const heading = beam.mark?.headingDeg;
  if (heading === null || heading === undefined || !beam.facing) return [1, 0];
  const level = fromAzimuthElevation(heading, 0);
  const seen: Flat = [dot(level, beam.facing.right), dot(level, beam.facing.up)];
  const size = Math.hypot(seen[0], seen[1]);
  return size < 0.2 ? [1, 0] : [seen[0] / size, seen[1] / size];
}

function markOutline(beam: BeamView): Flat[] {
  const { lengthMm, widthMm } = beam.mark ?? { lengthMm: null, widthMm: null };
  if (!lengthMm && !widthMm) return [];
  const [ax, ay] = markAlong(beam);
  const [half, side] = [(lengthMm ?? widthMm ?? 0) / 2, (widthMm ?? lengthMm ?? 0) / 2];
  return ([[-1, -1], [1, -1], [1, 1], [-1, 1]] as const).map(([x, y]): Flat => [x * half * ax - y * side * ay, x * half * ay + y * side * ax]);
}

/** Beyond this many minutes without light on the target's face the way is broken. */
const gapMs = 90_000;

export function trailShape(beam: BeamView, minutes: readonly RunMinute[]): TrailShape {
  const verdicts = new Map(minutes.map((minute) => [minute.atUtc, minute.verdict]));
  const stretches: { verdict: RunMinute['verdict']; points: Flat[] }[] = [];
  const ticks: { at: Flat; atUtc: string }[] = [];
  const spotAt = new Map<string, Flat>();
  let lastMs = Number.NEGATIVE_INFINITY;
  for (const { atUtc, spotMm } of beam.minutes) {
    if (!spotMm) continue;
    const at: Flat = [spotMm.rightMm, spotMm.upMm];
    const ms = Date.parse(atUtc);
    const verdict = verdicts.get(atUtc) ?? 'cannot-tell';
    const last = stretches.at(-1);
    const joined = ms - lastMs <= gapMs;
    if (last && joined) last.points.push(at);
    if (!last || !joined || last.verdict !== verdict) stretches.push({ verdict, points: [at] });
    if (new Date(ms).getUTCMinutes() % 10 === 0) ticks.push({ at, atUtc });
    spotAt.set(atUtc, at);
    lastMs = ms;
  }
  return { stretches, mark: markOutline(beam), ticks, spotAt };
}

/** What the picture must hold: the mark with its ±, and the way while the sun was, or may have been, on it. */
export function trailExtent(shape: TrailShape, beam: BeamView, bestUtc: string | null): Flat[] {
  const sigma: Flat = [Math.max(beam.mark?.sigmaRightMm ?? 0, 1), Math.max(beam.mark?.sigmaUpMm ?? 0, 1)];
  const told = shape.stretches.filter((one) => one.verdict !== 'not-sunlit').flatMap((one) => one.points);
  const best = bestUtc ? shape.spotAt.get(bestUtc) : undefined;
  return [...shape.mark, [-sigma[0], -sigma[1]], [sigma[0], sigma[1]], ...told, ...(told.length === 0 && best ? [best] : [])];
}
