import { azimuthOf, elevationOf, lengthOf } from '#app/physics/vector.ts';
import type { Vector } from '#app/physics/vector.ts';
import { readWallLines, wallText } from './scene-lines.ts';

type Values = Readonly<Record<string, string>>;
const to = (value: number, digits: number): string => String(Number(value.toFixed(digits)) + 0);

/** A number that was set in the drawing: its method says so, and its bearing is from true north. */
const drawn = (name: string, value: string, bearing = false): Record<string, string> => ({ [name]: value, [`${name}.method`]: 'drawing', ...(bearing ? { [`${name}.north`]: 'true' } : {}) });

/** Bearing, elevation and slant distance of a mark at a place. [m] from the centre of the optic */
export function moveMark(place: Vector): Record<string, string> {
  const distanceM = Math.max(0.001, lengthOf(place));
  return {
    ...drawn('mark.bearingDeg', to(azimuthOf(place), 1), true),
    ...drawn('mark.elevationDeg', to(elevationOf(place), 1)),
    ...drawn('mark.distanceMm', to(distanceM * 1000, distanceM < 1 ? 1 : 0)),
  };
}

/** The optic turned to face a bearing; its tilt stays. */
export const turnOptic = (towards: Vector): Record<string, string> => drawn('optic.faceAzimuthDeg', to(azimuthOf(towards), 1), true);

/** The opening moved in plan: where it looks outward, and how far it is. */
export function moveOpening(towards: Vector): Record<string, string> {
  const distanceM = Math.hypot(towards[0], towards[1]);
  return { ...drawn('opening.azimuthDeg', to(azimuthOf(towards), 1), true), ...drawn('opening.distanceMm', to(Math.max(1, distanceM * 1000), 0)) };
}

export const moveSill = (upM: number): Record<string, string> => drawn('opening.sillMm', to(upM * 1000, 0));

/** One end of a wall moved in plan; its top and the other end stay. */
export function moveWallEnd(values: Values, index: number, end: 'first' | 'second', place: Vector): Record<string, string> {
  const reading = readWallLines(values['walls'] ?? '');
  if (!reading.ok) return {};
  const [deg, metres] = [Number(azimuthOf(place).toFixed(1)), Number(Math.max(0.001, Math.hypot(place[0], place[1])).toFixed(3))];
  const walls = reading.values.map((wall, at) => (at !== index ? wall : end === 'first' ? { ...wall, fromDeg: deg, fromM: metres } : { ...wall, toDeg: deg, toM: metres }));
  return { walls: wallText(walls) };
}
