import { lineOnGround } from './ground.ts';
import { formatIsoDay } from './local-time.ts';
import { sunOverhead } from './sun-now.ts';

/** What is compared of two cases. */
export interface Likeness {
  readonly siteId: string;
  /** Null unless both the case's own place was recorded; metres from a site's common point. */
  readonly position: { readonly latitudeDeg: number; readonly longitudeDeg: number } | null;
  readonly opticKind: string;
  /** From optic to mark, from true north clockwise. */
  readonly markBearingDeg: number | null;
  /** Day on which the mark was found, or reported, ISO. */
  readonly day: string;
  /** The attached run of this case lists a return of the sun on the day of the other one. */
  readonly listsDay: boolean;
}

const nearM = 250;
/** Bearings to the mark are alike within so many degrees. Our own choosing. */
export const alikeBearingDeg = 15;
const alikeSunDeg = 3;

/** Declination of the sun at noon UTC of a day. [°] */
const declinationOfDay = (day: string): number => sunOverhead(new Date(`${day}T12:00:00Z`)).latitudeDeg;

const apartDeg = (a: number, b: number): number => Math.abs(((a - b + 540) % 360) - 180);

/** Why another case is like this one, strongest first; empty when nothing is shared. */
export function likeness(here: Likeness, other: Likeness): string[] {
  const reasons: string[] = [];
  const distanceM = here.position && other.position ? lineOnGround(here.position, other.position).lengthM : null;
  if (here.siteId === other.siteId) {
    reasons.push(distanceM === null ? 'same site' : distanceM < 1.5 ? 'same spot of the same site' : `same site, ${Math.round(distanceM)} m off`);
  } else if (distanceM !== null && distanceM <= nearM) reasons.push(`${Math.round(distanceM)} m off, another site`);
  if (here.opticKind !== 'dont-know' && here.opticKind === other.opticKind) reasons.push('same kind of optic');
  if (here.markBearingDeg !== null && other.markBearingDeg !== null && apartDeg(here.markBearingDeg, other.markBearingDeg) <= alikeBearingDeg) {
    reasons.push(`bearing to the mark alike, ${Math.round(here.markBearingDeg)}° and ${Math.round(other.markBearingDeg)}°`);
  }
  if (other.listsDay) reasons.push('its list of sun days holds this day');
  else if (Math.abs(declinationOfDay(here.day) - declinationOfDay(other.day)) <= alikeSunDeg) reasons.push(`sun as high as on ${formatIsoDay(other.day)}`);
  return reasons;
}
