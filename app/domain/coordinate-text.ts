export type Axis = 'latitude' | 'longitude';

export type CoordinateReading =
  | { readonly ok: true; readonly valueDeg: number }
  | { readonly ok: false; readonly sentence: string };

const LIMIT_DEG: Record<Axis, number> = { latitude: 90, longitude: 180 };
const EXAMPLE: Record<Axis, string> = { latitude: '53.4961 or 53 29 46 N', longitude: '-1.6022 or 1 36 8 W' };

/**
 * Reads a latitude or longitude as people write it: decimal degrees (`53.4961`, `-1.6022`, `1.6022 W`), degrees
 * and minutes (`53 29.77 N`) or degrees, minutes and seconds (`53°29'46"N`). South and west are negative, by sign or
 * by letter but not both. A comma is taken as a decimal sign. Gives degrees, or a sentence saying how to mend it.
 */
export function readCoordinate(text: string, axis: Axis): CoordinateReading {
  const letters = axis === 'latitude' ? 'NS' : 'EW';
  const tidy = text.trim().toUpperCase().replaceAll('−', '-').replaceAll(',', '.');
  const letter = [...tidy].filter((c) => c >= 'A' && c <= 'Z').join('');
  if (letter.length > 1 || (letter !== '' && !letters.includes(letter))) {
    return mend(`Use only ${letters[0]} or ${letters[1]} as a letter here, such as ${EXAMPLE[axis]}.`);
  }
  const bare = tidy.replace(/[A-Z]/g, ' ').trim();
  if (bare.startsWith('-') && letter !== '') return mend('Use a minus sign or a letter, not both.');
  const unsigned = bare.replace(/^[-+]\s*/, '');
  if (!/^[\d.\s°º'’′"”″:]+$/.test(unsigned)) return mend(`Write degrees, such as ${EXAMPLE[axis]}.`);
  const parts = unsigned.split(/[\s°º'’′"”″:]+/).filter((part) => part !== '');
  const sizeDeg = sizeOf(parts);
  if (sizeDeg === null) return mend(`Write degrees, or degrees, minutes and seconds each under 60, such as ${EXAMPLE[axis]}.`);
  if (sizeDeg > LIMIT_DEG[axis]) return mend(`A ${axis} lies between -${LIMIT_DEG[axis]} and ${LIMIT_DEG[axis]} degrees.`);
  const negative = bare.startsWith('-') || letter === letters[1];
  return { ok: true, valueDeg: negative && sizeDeg !== 0 ? -sizeDeg : sizeDeg };
}

/** Degrees from one to three parts; all but the last whole, minutes and seconds under 60. Null for anything else. */
function sizeOf(parts: readonly string[]): number | null {
  if (parts.length < 1 || parts.length > 3) return null;
  const numbers = parts.map(Number);
  if (numbers.some((n) => !Number.isFinite(n))) return null;
  if (parts.slice(0, -1).some((part) => part.includes('.'))) return null;
  if (numbers.slice(1).some((n) => n >= 60)) return null;
  return numbers.reduce((sum, n, i) => sum + n / 60 ** i, 0);
}

function mend(sentence: string): CoordinateReading {
  return { ok: false, sentence };
}

export type PlaceReading =
  | { readonly ok: true; readonly place: Place }
  | { readonly ok: false; readonly sentence: string };

const PAIR_EXAMPLE = '53.4961, -1.6022 or 53 29 46 N, 1 36 8 W';

/**
 * Reads a place typed in one box: latitude, then longitude, parted by a comma and a space, by a semicolon, or by the
 * letter of the latitude (`53 29 46 N 1 36 8 W`). Each half as in `readCoordinate`.
 */
export function readPlace(text: string): PlaceReading {
  const halves = text.trim().split(/\s*;\s*|,\s+|(?<=[NSns])\s+(?=[-\d])/u);
  const [north = '', east = ''] = halves.length === 1 && /^[-+\d.°]+,[-+\d.°]+$/u.test(text.trim()) ? text.trim().split(',') : halves;
  if (north === '' || east === '' || halves.length > 2) return { ok: false, sentence: `Write the latitude, a comma and a space, and the longitude, such as ${PAIR_EXAMPLE}.` };
  const latitude = readCoordinate(north, 'latitude');
  if (!latitude.ok) return latitude;
  const longitude = readCoordinate(east, 'longitude');
  if (!longitude.ok) return longitude;
  return { ok: true, place: { latitudeDeg: latitude.valueDeg, longitudeDeg: longitude.valueDeg } };
}

/** `53.496100, -1.602200`, as `readPlace` reads it. */
export const placeText = (place: Place, decimals = 6): string => `${coordinateText(place.latitudeDeg, decimals)}, ${coordinateText(place.longitudeDeg, decimals)}`;

/** Degrees as text with a fixed number of decimals and a point, never `-0`. */
export function coordinateText(valueDeg: number, decimals = 6): string {
  const text = valueDeg.toFixed(decimals);
  return Number(text) === 0 ? text.replace('-', '') : text;
}

/** `53.50° N`, for labels; decimals as the grid needs. */
export function degreesWithLetter(valueDeg: number, axis: Axis, decimals: number): string {
  const letters = axis === 'latitude' ? 'NS' : 'EW';
  const text = Math.abs(valueDeg).toFixed(decimals);
  return Number(text) === 0 ? `${text}°` : `${text}° ${valueDeg < 0 ? letters[1] : letters[0]}`;
}

/** Length of one degree of a great circle, in metres: mean radius 6 371 008.8 m times π/180. */
const METRES_PER_DEGREE = 111_195.08;

export interface Place {
  readonly latitudeDeg: number;
  readonly longitudeDeg: number;
}

/**
 * The place some metres east and north of another, on a sphere of mean radius 6 371 008.8 m (IUGG mean radius R1 of
 * WGS 84, Moritz, Geodetic Reference System 1980, J. Geodesy 74, 2000). Meant for steps of metres, not of degrees.
 */
export function stepped(place: Place, eastM: number, northM: number): Place {
  const latitudeDeg = Math.min(90, Math.max(-90, place.latitudeDeg + northM / METRES_PER_DEGREE));
  const shrink = Math.max(0.01, Math.cos((place.latitudeDeg * Math.PI) / 180));
  const longitudeDeg = place.longitudeDeg + eastM / METRES_PER_DEGREE / shrink;
  return { latitudeDeg, longitudeDeg: ((longitudeDeg + 540) % 360) - 180 };
}
