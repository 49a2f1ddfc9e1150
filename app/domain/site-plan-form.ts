import { z } from 'zod';
import { readPlace } from './coordinate-text.ts';
import { plainText } from './incident.ts';
import { readNumber } from './report-optic.ts';
import type { KnownPoint, PlanPicture } from './site-plan.ts';
import { knownPointCount, placePlan } from './site-plan.ts';

export const planNameSchema = plainText(60).pipe(z.string().min(1, 'Say what it shows, such as Roof or Floor 4.'));

/** Names of the boxes of one known point, from 1. */
export const pointFields = (index: number) => ({ name: `point-${index}-name`, x: `point-${index}-x`, y: `point-${index}-y`, place: `point-${index}-place` });
export const pointIndexes: readonly number[] = Array.from({ length: knownPointCount.most }, (_, index) => index + 1);

export type KnownPointsReading = { readonly ok: true; readonly points: readonly KnownPoint[] } | { readonly ok: false; readonly formErrors: readonly string[]; readonly fieldErrors: Record<string, string[]> };

/** A drawing this much finer or coarser than any site plan is a slip of a point. [m per px] */
const scaleLimits = { least: 0.001, most: 20 } as const;

/** Reads the known points of a drawing as typed. Empty rows are left out. */
export function readKnownPoints(typed: Readonly<Record<string, string>>, picture: PlanPicture): KnownPointsReading {
  const fieldErrors: Record<string, string[]> = {};
  const points = pointIndexes.flatMap((index) => readPoint(typed, index, picture, fieldErrors));
  if (Object.keys(fieldErrors).length > 0) return { ok: false, formErrors: [], fieldErrors };
  if (points.length < knownPointCount.least) return { ok: false, formErrors: ['Give two points or more that you know on the drawing and on the ground, such as two corners of the building far from each other.'], fieldErrors };
  const placement = placePlan(picture, points);
  if (!placement) return { ok: false, formErrors: ['The points lie on one another. Choose two that are far apart.'], fieldErrors };
  if (placement.metresPerPx < scaleLimits.least || placement.metresPerPx > scaleLimits.most) {
    return { ok: false, formErrors: [`With these points one pixel of the drawing would be ${Number(placement.metresPerPx.toPrecision(3))} m. Check the positions.`], fieldErrors };
  }
  return { ok: true, points };
}

function readPoint(typed: Readonly<Record<string, string>>, index: number, picture: PlanPicture, errors: Record<string, string[]>): KnownPoint[] {
  const names = pointFields(index);
  const text = (name: string) => (typed[name] ?? '').trim();
  if ([names.x, names.y, names.place].every((name) => text(name) === '')) return [];
  const pixel = (name: string, size: number, which: string): number | null => {
    const value = readNumber(text(name));
    if (value !== null && value >= 0 && value <= size) return value;
    errors[name] = [`Choose the point on the drawing, or write its ${which}, from 0 to ${size}.`];
    return null;
  };
  const xPx = pixel(names.x, picture.widthPx, 'column');
  const yPx = pixel(names.y, picture.heightPx, 'row');
  const place = readPlace(text(names.place));
  if (!place.ok) errors[names.place] = [place.sentence];
  const name = plainText(60).safeParse(text(names.name));
  if (!name.success) errors[names.name] = ['Keep the name under 60 characters.'];
  return xPx !== null && yPx !== null && place.ok && name.success ? [{ name: name.data, xPx, yPx, ...place.place }] : [];
}
