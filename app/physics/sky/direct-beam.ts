import type { OpeningInput, SkyInput } from '#app/physics/model/input.ts';
import { degree, parseUtc, toIsoUtc, wrap180 } from '#app/physics/units.ts';
import { clearSkyAt, type Air } from './clear-sky.ts';
import { extraterrestrialWm2 } from './extraterrestrial.ts';
import { paneTransmittance } from './pane-transmittance.ts';

/** Measured or archived irradiance as a lookup by instant. */
export interface DniSeries {
  readonly basis: 'measured' | 'derived' | 'hourly-archive';
  readonly source: string;
  readonly at: (utcMs: number) => number | null;
  /** Values whose interval touches the window. */
  readonly within: (fromMs: number, toMs: number) => readonly { readonly fromMs: number; readonly toMs: number; readonly dniWm2: number }[];
}

export function readDniSeries(sky: SkyInput): DniSeries | null {
  const series = sky.dniSeries;
  if (series === undefined || series.values.length === 0) return null;
  const rows = series.values.map((value, index) => ({
    fromMs: parseUtc(value.startUtc, `sky.dniSeries.values[${index}].startUtc`),
    toMs: parseUtc(value.endUtc, `sky.dniSeries.values[${index}].endUtc`),
    dniWm2: value.dniWm2,
  }));
  for (const [index, row] of rows.entries()) {
    if (row.toMs <= row.fromMs) {
      throw new RangeError(`sky.dniSeries.values[${index}].startUtc and endUtc disagree: the interval must end after it starts.`);
    }
  }
  rows.sort((a, b) => a.fromMs - b.fromMs);
  for (const [index, row] of rows.entries()) {
    const before = rows[index - 1];
    if (before !== undefined && row.fromMs < before.toMs) {
      throw new RangeError(`sky.dniSeries.values disagree: the interval from ${toIsoUtc(row.fromMs)} begins before the one from ${toIsoUtc(before.fromMs)} ends.`);
    }
  }
  return {
    basis: series.basis,
    source: series.source,
    at: (utcMs) => rows.find((row) => utcMs >= row.fromMs && utcMs < row.toMs)?.dniWm2 ?? null,
    within: (fromMs, toMs) => rows.filter((row) => row.toMs > fromMs && row.fromMs < toMs),
  };
}

/** Direct beam at one instant, before the optic. [W/m²] */
export interface DirectBeam {
  readonly birdWm2: number | null;
  readonly secondModelWm2: number | null;
  readonly boundWm2: number | null;
  readonly measuredWm2: number | null;
  /** What the run goes by: measured where there is any, else the clear-sky median. */
  readonly likelyWm2: number | null;
  /** Share that the glass in the path passes. */
  readonly transmittance: number;
}

/** Transmittance of the opening's glass for a direction of the sun; the opening is taken as upright. */
export function openingTransmittance(opening: OpeningInput | undefined, azimuthDeg: number, elevationDeg: number): number {
  if (opening === undefined) return 1;
  const cosine = Math.cos(elevationDeg * degree) * Math.cos(wrap180(azimuthDeg - opening.azimuthDeg) * degree);
  return paneTransmittance(opening.transmittance, cosine);
}

/**
 * Direct normal irradiance in the order measured, derived from measured global, hourly archive, clear-sky median.
 *
 * @param distanceAu Distance of the sun. [au]
 */
export function directBeamAt(
  utcMs: number, azimuthDeg: number, apparentElevationDeg: number, distanceAu: number,
  elevationM: number, air: Air, series: DniSeries | null, opening: OpeningInput | undefined,
): DirectBeam {
  const clear = clearSkyAt(apparentElevationDeg, extraterrestrialWm2(distanceAu, air.solarConstantWm2), elevationM, air);
  const measuredWm2 = series?.at(utcMs) ?? null;
  return {
    birdWm2: clear?.birdWm2 ?? null,
    secondModelWm2: clear?.ineichenWm2 ?? null,
    boundWm2: clear?.boundWm2 ?? null,
    measuredWm2,
    likelyWm2: measuredWm2 ?? clear?.likelyWm2 ?? null,
    transmittance: openingTransmittance(opening, azimuthDeg, apparentElevationDeg),
  };
}
