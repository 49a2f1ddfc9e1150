import type { MarkInput, OpeningInput, ReconstructionInput, SkyInput, SkylineInput, TargetInput } from '#app/physics/model/input.ts';
import { openingTransmittance } from './optic-class-values.ts';
import { formatDayClock } from './local-time.ts';
import { measureMethodLabels, targetMaterialLabels } from './scene.ts';
import type { Measured, Scene, SceneSkyline } from './scene.ts';
import { withRadius } from './sagitta.ts';
import { sceneOccluders } from './scene-occluders.ts';
import { readOptic } from './scene-optic.ts';
import type { InputOrigin } from './scene-optic.ts';
import { chooseWeather } from './weather-choice.ts';
import type { WeatherSeries } from './weather.ts';

export interface SceneSite {
  readonly latitudeDeg: number;
  readonly longitudeDeg: number;
  readonly elevationM: number;
  readonly zone: string;
  readonly skyline: SceneSkyline | null;
}

/** Times of the case as the clocks read, with the clock error of the reading that found it. */
export interface SceneTimes {
  readonly onsetEarliestAt: Date | null;
  readonly onsetLatestAt: Date | null;
  readonly foundAt: Date | null;
  readonly foundClockErrorS: number;
  readonly foundPrecision: string;
}

export interface ReconstructionRequest {
  readonly input: ReconstructionInput;
  readonly origins: readonly InputOrigin[];
  readonly missing: readonly string[];
}

const hourMs = 3_600_000;
/** How far back onset is looked for when nobody saw the place sound: smouldering can hide for hours. */
const backwardSearchMs = 8 * hourMs;
export const longestWindowDays = 14;

/** One sigma of the clock by how well the time is known. [s] */
const clockSigmaS: Record<string, number> = { exact: 60, 'within-15-min': 450, 'within-1-h': 1800, 'date-only': 3600, unknown: 3600 };

function windowOf(times: SceneTimes, zone: string, origins: InputOrigin[], missing: string[]): ReconstructionInput['window'] | null {
  // The reading that found the mark is corrected by the known error of its clock; typed onset times are true times.
  const correctedFoundAt = times.foundAt ? new Date(times.foundAt.getTime() - times.foundClockErrorS * 1000) : null;
  const end = times.onsetLatestAt ?? correctedFoundAt;
  if (!end) {
    missing.push('Give the time at which the mark was found, or the latest possible onset.');
    return null;
  }
  let start = times.onsetEarliestAt;
  if (start) origins.push({ field: 'Window', value: `${formatDayClock(start, zone)} to ${formatDayClock(end, zone)}`, origin: 'reported', note: 'last seen sound to latest onset', verified: true });
  else {
    start = new Date(end.getTime() - backwardSearchMs);
    origins.push({ field: 'Start of the window', value: '8 hours back', origin: 'assumed', note: 'nobody is recorded as having seen the place sound; smouldering can hide for hours', verified: true });
  }
  if (end.getTime() - start.getTime() > longestWindowDays * 24 * hourMs) {
    start = new Date(end.getTime() - longestWindowDays * 24 * hourMs);
    origins.push({ field: 'Window, cut', value: `last ${longestWindowDays} days`, origin: 'assumed', note: 'longer windows are cut; narrow it if you can', verified: true });
  }
  if (end.getTime() - start.getTime() < 60_000) {
    missing.push('Mend the times: the earliest onset must lie before the latest onset, and before the mark was found.');
    return null;
  }
  return { startUtc: wholeMinute(start), endUtc: wholeMinute(end), clockSigmaS: clockSigmaS[times.foundPrecision] ?? 3600 };
}

/** The window of a run by these times; null while they name none. */
export const reconstructionWindow = (times: SceneTimes, zone: string) => windowOf(times, zone, [], []);

export interface InputSource {
  readonly scene: Scene;
  readonly site: SceneSite;
  readonly times: SceneTimes;
  /** Weather records that stand; left out where none are kept. */
  readonly weather?: readonly WeatherSeries[] | undefined;
  readonly seed: number;
  readonly recurrenceToUtc: string;
}

const movedWords = { yes: 'yes', no: 'no', 'dont-know': 'not known' } as const;
const movedNotes = { yes: 'the pose is that of the day it was measured', no: '', 'dont-know': 'taken as not moved' } as const;

const wholeMinute = (at: Date): string => new Date(Math.floor(at.getTime() / 60_000) * 60_000).toISOString();

function note(origins: InputOrigin[], field: string, measured: Measured, unit: string): void {
  const origin = measured.method === 'assumed' ? 'assumed' : measured.method === 'reported' || measured.method === 'estimated' ? 'reported' : 'measured';
  origins.push({ field, value: `${measured.value}${measured.plusMinus === undefined ? '' : ` ±${measured.plusMinus}`}${unit.startsWith('°') ? '' : ' '}${unit}`, origin, note: measureMethodLabels[measured.method].toLowerCase(), verified: true });
}

/** Uncertainty where none was written down: what the method is worth. */
function sigma(measured: Measured, byMethod: { measured: number; rough: number }): number {
  if (measured.plusMinus !== undefined) return Math.max(measured.plusMinus, 1e-4);
  return measured.method === 'measured' || measured.method === 'drawing' ? byMethod.measured : byMethod.rough;
}

function markOf(scene: Scene, origins: InputOrigin[], missing: string[]): MarkInput | undefined {
  const { mark } = scene;
  if (!mark.bearingDeg || !mark.elevationDeg || !mark.distanceMm) {
    missing.push('Measure the mark from the optic: bearing, elevation and distance.');
    return undefined;
  }
  note(origins, 'Mark, bearing', mark.bearingDeg, '° true');
  note(origins, 'Mark, elevation', mark.elevationDeg, '°');
  note(origins, 'Mark, distance', mark.distanceMm, 'mm');
  if (mark.lengthMm) note(origins, 'Mark, length', mark.lengthMm, 'mm');
  if (mark.widthMm) note(origins, 'Mark, width', mark.widthMm, 'mm');
  if (mark.trailHeadingDeg) note(origins, 'Trail runs to', mark.trailHeadingDeg, '° true');
  if (mark.surfaceAzimuthDeg) note(origins, 'Surface of the target faces', mark.surfaceAzimuthDeg, '° true');
  if (mark.surfaceElevationDeg) note(origins, 'Surface of the target, above level', mark.surfaceElevationDeg, '°');
  return {
    bearingDeg: mark.bearingDeg.value % 360,
    bearingSigmaDeg: sigma(mark.bearingDeg, { measured: 1, rough: 8 }),
    elevationDeg: mark.elevationDeg.value,
    elevationSigmaDeg: sigma(mark.elevationDeg, { measured: 1, rough: 5 }),
    distanceM: mark.distanceMm.value / 1000,
    distanceSigmaM: sigma(mark.distanceMm, { measured: mark.distanceMm.value * 0.01, rough: mark.distanceMm.value * 0.1 }) / 1000,
    ...(mark.lengthMm ? { lengthMm: mark.lengthMm.value } : {}),
    ...(mark.widthMm ? { widthMm: mark.widthMm.value } : {}),
    ...(mark.trailHeadingDeg ? { trailHeadingDeg: mark.trailHeadingDeg.value % 360 } : {}),
    ...(mark.surfaceAzimuthDeg ? { normalAzimuthDeg: mark.surfaceAzimuthDeg.value % 360 } : {}),
    ...(mark.surfaceElevationDeg ? { normalElevationDeg: mark.surfaceElevationDeg.value } : {}),
  };
}

function openingOf(scene: Scene, origins: InputOrigin[]): OpeningInput | undefined {
  const opening = scene.opening;
  if (!opening) return undefined;
  const glass = openingTransmittance[opening.glass];
  note(origins, 'Opening faces', opening.azimuthDeg, '° true');
  origins.push({ field: 'Glass in the path', value: String(glass.value), origin: opening.glass === 'unknown' ? 'assumed' : 'reported', note: glass.source, verified: glass.verified });
  return {
    azimuthDeg: opening.azimuthDeg.value % 360,
    azimuthSigmaDeg: sigma(opening.azimuthDeg, { measured: 1, rough: 8 }),
    halfWidthDeg: opening.halfWidthDeg,
    transmittance: glass.value,
    transmittanceSource: glass.source,
    ...(opening.lowestElevationDeg === undefined ? {} : { lowestElevationDeg: opening.lowestElevationDeg }),
    ...(opening.highestElevationDeg === undefined ? {} : { highestElevationDeg: opening.highestElevationDeg }),
  };
}

function occludersOf(scene: Scene, origins: InputOrigin[]): ReturnType<typeof sceneOccluders> {
  const occluders = sceneOccluders(scene);
  for (const one of occluders) origins.push({ field: one.kind === 'opening' ? 'Outline of the opening' : `Wall, ${one.name ?? ''}`, value: `${one.corners.length} corners`, origin: 'measured', note: 'light is tested against it ray by ray', verified: true });
  return occluders;
}

function skylineOf(scene: Scene, site: SceneSite, origins: InputOrigin[], missing: string[]): SkylineInput | undefined {
  const skyline = scene.skyline ?? site.skyline;
  if (!skyline || skyline.points.length === 0) {
    missing.push('Measure the skyline: without it nothing is said about what stands in front of the sun.');
    return undefined;
  }
  origins.push({ field: 'Skyline', value: `${skyline.points.length} points ±${skyline.plusMinusDeg}°`, origin: 'measured', note: skyline.source, verified: true });
  return {
    sigmaDeg: skyline.plusMinusDeg,
    points: skyline.points.map((point) => ({ azimuthDeg: point.azimuthDeg, elevationDeg: point.elevationDeg, ...(point.name ? { name: point.name } : {}) })),
  };
}

type DniSeries = NonNullable<SkyInput['dniSeries']>;
const dniRank: Record<DniSeries['basis'], number> = { measured: 1, derived: 2, 'hourly-archive': 3 };

/** The irradiance a run goes by: the best weather record, unless the scene itself holds a series of a better kind. */
function dniOf({ scene, site, weather }: InputSource, window: ReconstructionInput['window'] | null): { readonly series: DniSeries; readonly note: string; readonly origin: 'measured' | 'file' } | null {
  const chosen = window && weather ? chooseWeather(weather, window, site) : null;
  const { dni } = scene.air;
  if (dni && (!chosen || dniRank[dni.basis] < dniRank[chosen.series.basis])) {
    return { series: { basis: dni.basis, source: dni.source, values: dni.values, ...(dni.stationDistanceKm === undefined ? {} : { stationDistanceKm: dni.stationDistanceKm }) }, note: dni.source, origin: 'measured' };
  }
  return chosen ? { series: chosen.series, note: [`weather record ${chosen.number}: ${chosen.series.source}`, chosen.caution].filter(Boolean).join('. '), origin: weather?.find((record) => record.number === chosen.number)?.kind === 'hand' ? 'measured' : 'file' } : null;
}

function skyOf(source: InputSource, window: ReconstructionInput['window'] | null, origins: InputOrigin[]): SkyInput {
  const { air } = source.scene;
  const dni = dniOf(source, window);
  origins.push({ field: 'Air class', value: air.climateClass.replaceAll('-', ' '), origin: 'assumed', note: 'median of a climate class, not of the day', verified: true });
  if (dni) origins.push({ field: 'Direct irradiance', value: `${dni.series.values.length} values`, origin: dni.origin, note: dni.note, verified: true });
  return {
    climateClass: air.climateClass,
    ...(air.pressureHpa === undefined ? {} : { pressureHpa: air.pressureHpa }),
    ...(air.temperatureC === undefined ? {} : { temperatureC: air.temperatureC }),
    ...(dni ? { dniSeries: dni.series } : {}),
  };
}

function targetOf(scene: Scene, origins: InputOrigin[], missing: string[]): TargetInput | undefined {
  if (scene.target.material === 'dont-know') {
    missing.push('Say what the target is made of.');
    return undefined;
  }
  origins.push({ field: 'Target', value: targetMaterialLabels[scene.target.material].toLowerCase(), origin: 'reported', note: scene.target.colour ?? 'colour not stated', verified: true });
  return { materialId: scene.target.material, ...(scene.target.thicknessMm ? { thicknessM: scene.target.thicknessMm.value / 1000 } : {}) };
}

/**
 * The engine's input from what people recorded, with the origin of each value and a list of what is missing.
 *
 * @param recurrenceToUtc end of the recurrence calendar, which begins with the window.
 * @returns An input even without optic or mark: sun, sky and daylight are still computed. `input` is null only when no
 *   time at all is known.
 */
export function reconstructionInput(source: InputSource): ReconstructionRequest | { input: null; origins: readonly InputOrigin[]; missing: readonly string[] } {
  const { scene, site, times } = source;
  const origins: InputOrigin[] = [];
  const missing: string[] = [];
  // Two decimals: enough for the reader, and not a door.
  origins.push({ field: 'Place', value: `${site.latitudeDeg.toFixed(2)}, ${site.longitudeDeg.toFixed(2)}, ${Math.round(site.elevationM)} m above sea`, origin: 'reported', note: `pin of the report, or the site where it has none; clock of ${site.zone.replaceAll('_', ' ')}`, verified: true });
  const window = windowOf(times, site.zone, origins, missing);
  const reading = readOptic(withRadius(scene.optic));
  missing.push(...reading.missing);
  const mark = markOf(scene, origins, missing);
  const opening = openingOf(scene, origins);
  const occluders = occludersOf(scene, origins);
  const skyline = skylineOf(scene, site, origins, missing);
  const target = targetOf(scene, origins, missing);
  const sky = skyOf(source, window, origins);
  const height = scene.optic.heightAboveGroundM;
  if (height) note(origins, 'Height above the ground', height, 'm');
  if (scene.optic.kind !== 'dont-know') origins.push({ field: 'Moved since', value: movedWords[scene.optic.movedSince], origin: 'reported', note: movedNotes[scene.optic.movedSince], verified: true });
  if (!window) return { input: null, origins: [...reading.origins, ...origins], missing };
  return {
    origins: [...reading.origins, ...origins],
    missing,
    input: {
      place: { latitudeDeg: site.latitudeDeg, longitudeDeg: site.longitudeDeg, elevationM: site.elevationM, heightAboveGroundM: Math.max(0, height?.value ?? 0), zone: site.zone },
      window,
      sky,
      seed: source.seed,
      recurrenceFromUtc: window.startUtc,
      recurrenceToUtc: source.recurrenceToUtc,
      ...(opening ? { opening } : {}),
      ...(occluders.length > 0 ? { occluders } : {}),
      ...(skyline ? { skyline } : {}),
      ...(reading.optic ? { optic: reading.optic, opticSigmaRel: reading.sigmaRel } : {}),
      ...(mark ? { mark } : {}),
      ...(target ? { target } : {}),
    },
  };
}
