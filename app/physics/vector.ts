import { degree, safeAcos, safeAsin, wrap360 } from './units.ts';

/** Right-handed vector [east, north, up]; metres for points, unit length for directions. */
export type Vector = readonly [east: number, north: number, up: number];

export function add(a: Vector, b: Vector): Vector {
  return [a[0] + b[0], a[1] + b[1], a[2] + b[2]];
}

export function subtract(a: Vector, b: Vector): Vector {
  return [a[0] - b[0], a[1] - b[1], a[2] - b[2]];
}

export function scale(a: Vector, factor: number): Vector {
  return [a[0] * factor, a[1] * factor, a[2] * factor];
}

export function dot(a: Vector, b: Vector): number {
  return a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
}

export function cross(a: Vector, b: Vector): Vector {
  return [a[1] * b[2] - a[2] * b[1], a[2] * b[0] - a[0] * b[2], a[0] * b[1] - a[1] * b[0]];
}

export function lengthOf(a: Vector): number {
  return Math.hypot(a[0], a[1], a[2]);
}

export function unit(a: Vector): Vector {
  return scale(a, 1 / lengthOf(a));
}

/** Angle between two unit vectors, exact for small angles too. [rad] 0…π */
export function angleBetween(a: Vector, b: Vector): number {
  const chord = lengthOf(subtract(a, b));
  return chord < 1 ? 2 * safeAsin(chord / 2) : safeAcos(dot(a, b));
}

/** Unit vector towards a bearing and an elevation. [°] */
export function fromAzimuthElevation(azimuthDeg: number, elevationDeg: number): Vector {
  const azimuth = azimuthDeg * degree;
  const elevation = elevationDeg * degree;
  const level = Math.cos(elevation);
  return [level * Math.sin(azimuth), level * Math.cos(azimuth), Math.sin(elevation)];
}

/** Bearing clockwise from true north, 0…360. [°] */
export function azimuthOf(a: Vector): number {
  return wrap360(Math.atan2(a[0], a[1]) / degree);
}

/** Elevation above the horizontal, −90…90. [°] */
export function elevationOf(a: Vector): number {
  return Math.atan2(a[2], Math.hypot(a[0], a[1])) / degree;
}

/** Direction towards the light after a flat mirror: both vectors point away from the surface. */
export function mirrored(towardsLight: Vector, normal: Vector): Vector {
  return subtract(scale(normal, 2 * dot(towardsLight, normal)), towardsLight);
}
