import type { Place } from './coordinate-text.ts';
import { readCoordinate, readPlace } from './coordinate-text.ts';
import { lineOnGround } from './ground.ts';
import { readNumber } from './report-optic.ts';
import type { SceneOnMap } from './scene.ts';
import { mostWallLines } from './scene.ts';

type Typed = Readonly<Record<string, string>>;

/** Names of the boxes of one wall line, from 1. */
export const wallFields = (index: number) => ({ from: `wall-${index}-from`, to: `wall-${index}-to` });
export const wallIndexes: readonly number[] = Array.from({ length: mostWallLines }, (_, index) => index + 1);
export const placeFieldNames: readonly string[] = ['latitudeDeg', 'longitudeDeg', 'accuracyM', 'opticPlace', ...wallIndexes.flatMap((index) => Object.values(wallFields(index)))];

export interface ReportPlaces {
  readonly position: { readonly latitudeDeg: number; readonly longitudeDeg: number; readonly accuracyM: number | null } | null;
  readonly onMap: SceneOnMap | null;
}

/** Longest wall that is taken as one straight line. [m] */
const longestWallM = 2_000;

/** Position of the mark, pin of the optic and wall lines, as typed: decimal degrees, or degrees, minutes and seconds. */
export function readReportPlaces(typed: Typed): { places: ReportPlaces; errors: Record<string, string[]> } {
  const errors: Record<string, string[]> = {};
  const position = readPosition(typed, errors);
  const optic = readPin(typed, 'opticPlace', errors);
  const walls = wallIndexes.flatMap((index) => readWall(typed, index, errors));
  const mark = position && optic ? { mark: { latitudeDeg: position.latitudeDeg, longitudeDeg: position.longitudeDeg } } : {};
  const onMap = optic || walls.length > 0 ? { ...(optic ? { optic } : {}), ...mark, walls } : null;
  return { places: { position, onMap }, errors };
}

const text = (typed: Typed, name: string) => (typed[name] ?? '').trim();

function readPosition(typed: Typed, errors: Record<string, string[]>): ReportPlaces['position'] {
  const boxes = { latitude: text(typed, 'latitudeDeg'), longitude: text(typed, 'longitudeDeg') };
  if (boxes.latitude === '' && boxes.longitude === '') return null;
  const latitude = readCoordinate(boxes.latitude, 'latitude');
  const longitude = readCoordinate(boxes.longitude, 'longitude');
  if (!latitude.ok) errors['latitudeDeg'] = [`${latitude.sentence} Or leave both empty.`];
  if (!longitude.ok) errors['longitudeDeg'] = [`${longitude.sentence} Or leave both empty.`];
  if (!latitude.ok || !longitude.ok) return null;
  const accuracyM = readNumber(text(typed, 'accuracyM'));
  return { latitudeDeg: latitude.valueDeg, longitudeDeg: longitude.valueDeg, accuracyM: accuracyM !== null && accuracyM > 0 && accuracyM <= 100_000 ? accuracyM : null };
}

function readPin(typed: Typed, name: string, errors: Record<string, string[]>): Place | null {
  const typedText = text(typed, name);
  if (typedText === '') return null;
  const reading = readPlace(typedText);
  if (reading.ok) return reading.place;
  errors[name] = [`${reading.sentence} Or leave it empty.`];
  return null;
}

function readWall(typed: Typed, index: number, errors: Record<string, string[]>): { from: Place; to: Place }[] {
  const names = wallFields(index);
  if (text(typed, names.from) === '' && text(typed, names.to) === '') return [];
  const from = readPin(typed, names.from, errors);
  const to = readPin(typed, names.to, errors);
  const lone = text(typed, names.from) === '' ? names.from : text(typed, names.to) === '' ? names.to : null;
  if (lone) errors[lone] = ['A line needs both ends. Give this one too, or empty the other.'];
  if (!from || !to) return [];
  const { lengthM } = lineOnGround(from, to);
  if (lengthM >= 0.5 && lengthM <= longestWallM) return [{ from, to }];
  errors[names.to] = [lengthM < 0.5 ? 'Both ends lie on one spot. Move one of them along the wall.' : `This wall would be ${Math.round(lengthM / 1000)} km long. Check both ends.`];
  return [];
}

/** "24.6 m, running 28.4° and 208.4° true." The direction of a line has no sense of its own, so both are said. */
export function wallWords(wall: SceneOnMap['walls'][number]): string {
  const { lengthM, bearingDeg } = lineOnGround(wall.from, wall.to);
  return `${lengthM.toFixed(1)} m, running ${bearingDeg.toFixed(1)}° and ${((bearingDeg + 180) % 360).toFixed(1)}° true`;
}

/** The same for a label on the map. */
export function wallLabel(wall: SceneOnMap['walls'][number]): string {
  const { lengthM, bearingDeg } = lineOnGround(wall.from, wall.to);
  return `${lengthM.toFixed(1)} m, ${bearingDeg.toFixed(1)}°`;
}
