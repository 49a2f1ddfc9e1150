/** Conversions and rounding. Angles are radians inside the engine and degrees at its edge. */

export const degree = Math.PI / 180;

/** Angle in [0, 360). [°] */
export function wrap360(angleDeg: number): number {
  const wrapped = angleDeg % 360;
  return wrapped < 0 ? wrapped + 360 : wrapped;
}

/** Angle in [−180, 180). [°] */
export function wrap180(angleDeg: number): number {
  return wrap360(angleDeg + 180) - 180;
}

export function clamp(value: number, low: number, high: number): number {
  return value < low ? low : value > high ? high : value;
}

/** Arc sine that forgives a rounding error outside [−1, 1]. [rad] */
export function safeAsin(sine: number): number {
  return Math.asin(clamp(sine, -1, 1));
}

/** Arc cosine that forgives a rounding error outside [−1, 1]. [rad] */
export function safeAcos(cosine: number): number {
  return Math.acos(clamp(cosine, -1, 1));
}

/** Rounded to a number of digits after the point; −0 becomes 0. */
export function roundTo(value: number, decimals: number): number {
  const factor = 10 ** decimals;
  return Math.round(value * factor) / factor + 0;
}

/** Rounded to significant digits, so that a result carries no more than it knows. */
export function roundSignificant(value: number, digits: number): number {
  return Number.isFinite(value) ? Number(value.toPrecision(digits)) : value;
}

/** ISO 8601 instant in UTC with milliseconds. */
export function toIsoUtc(utcMs: number): string {
  return new Date(utcMs).toISOString();
}

/**
 * Milliseconds since 1970 of an ISO 8601 instant that states its offset.
 *
 * @throws RangeError if the text is no instant or has no offset: a bare local time is ambiguous.
 */
export function parseUtc(text: string, field: string): number {
  const utcMs = /(Z|[+-]\d{2}:?\d{2})$/.test(text) ? Date.parse(text) : Number.NaN;
  if (!Number.isFinite(utcMs)) {
    throw new RangeError(`${field} is "${text}"; it must be an ISO 8601 instant with Z or an offset, such as 2026-02-03T09:50:00Z.`);
  }
  return utcMs;
}

/** Passes a finite number inside its interval and refuses any other, naming the field, the value and the interval. */
export function inRange(field: string, value: number, low: number, high: number, unit = ''): number {
  if (!Number.isFinite(value) || value < low || value > high) {
    const suffix = unit === '' ? '' : ` ${unit}`;
    throw new RangeError(`${field} is ${value}; it must lie in ${low}…${high}${suffix}.`);
  }
  return value;
}
