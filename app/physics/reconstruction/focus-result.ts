import type { FluxDisc, FocusResult } from '#app/physics/model/focus.ts';
import type { Band } from '#app/physics/model/stated.ts';
import { roundBand } from '#app/physics/heating/outcomes.ts';
import { contourDiscM, contourHalfWidthM, zoneAlong } from '#app/physics/reach.ts';
import type { Beam } from '#app/physics/optics/closed-form/beam.ts';
import type { DirectBeam } from '#app/physics/sky/direct-beam.ts';
import { beamLimbDarkening, solarTemperatureK, stefanBoltzmann } from '#app/physics/constants.ts';
import { PhysicsGuardError } from '#app/physics/optics/trace/guards.ts';
import { angularDiameterDeg, meanOverCentre } from '#app/physics/sun/sun-disc.ts';
import { trailMinutesAtLeast, type SpotMotion } from '#app/physics/trail.ts';
import { percentiles, type Sampling } from '#app/physics/uncertainty.ts';
import { degree, roundSignificant, roundTo, safeAcos } from '#app/physics/units.ts';
import { dot } from '#app/physics/vector.ts';
import type { Setting } from './setting.ts';
import { cutShares, tracedResult, type TracedFocus } from './traced-focus.ts';
import { markDiscM, type JudgedMinute } from './window.ts';

/** Direct irradiance at the optic: low, likely and with the cleanest air. [W/m²] */
export interface LightBand extends Band {
  /** Bound before any glass in the path. [W/m²] */
  readonly beside: number;
}

/** Fluxes at which the dwell is quoted. [kW/m²] */
const dwellThresholds = [1.5, 5, 10, 12.5, 20, 25, 50] as const;

/** Flux that marks most dark surfaces within the passage of a spot; lower end of piloted ignition of large samples. [kW/m²] */
export const scorchContourKwm2 = 10;

/** P95 of a normal spread in sigmas. */
const p95 = 1.645;

/** Beam together with where the target's plane stands. */
interface Plane {
  readonly beam: Beam;
  readonly distanceM: number;
  readonly offsetM: number;
  readonly cosine: number;
  readonly marked: boolean;
}

function planeOf(minute: JudgedMinute, beam: Beam, setting: Setting): Plane {
  const { mark } = setting;
  const { miss } = minute;
  if (mark === null || miss === null) return { beam, distanceM: beam.focusM, offsetM: 0, cosine: 1, marked: false };
  return { beam, distanceM: miss.alongM, offsetM: miss.offsetM, cosine: Math.max(0, -dot(beam.direction, mark.normal)), marked: true };
}

function planeWords(plane: Plane): string {
  const place = plane.distanceM < 1 ? `${roundSignificant(plane.distanceM * 1000, 3)} mm` : `${roundSignificant(plane.distanceM, 3)} m`;
  if (!plane.marked) return `across the chief ray at the sharpest distance, ${place} from the optic’s origin`;
  const inclined = safeAcos(plane.cosine) / degree;
  const stance = inclined < 0.5 ? 'facing the chief ray' : `inclined ${Math.round(inclined)}° to the chief ray`;
  return `on the target at the mark, ${place} from the optic’s origin, ${stance}`;
}

/**
 * Concentration at the likely distance and at the ends of the optic's tolerance, in order.
 *
 * @param traced Likely value of the trace; the closed form then only gives the shares of the ends.
 */
function concentrationBand(plane: Plane, offsetM: number, discM: number, opticSigmaRel: number, traced: number | null): Band {
  const at = (scale: number): number => plane.cosine * plane.beam.concentration(plane.distanceM / scale, offsetM, discM);
  const closed = at(1);
  const mid = traced ?? closed;
  const factor = closed > 0 ? mid / closed : 1;
  const ends = [at(1 + p95 * opticSigmaRel) * factor, at(1 - Math.min(0.9, p95 * opticSigmaRel)) * factor, mid];
  return { low: Math.min(...ends), mid, high: Math.max(...ends) };
}

function discsOf(plane: Plane, light: LightBand, sampling: Sampling | null, traced: TracedFocus | null, imageM: number, opticSigmaRel: number): readonly FluxDisc[] {
  const sizes = [['sun-image', imageM], ['1 mm', 0.001], ['5 mm', markDiscM]] as const;
  const centres = plane.marked ? (['hot spot', 'mark'] as const) : (['hot spot'] as const);
  return centres.flatMap((centre) =>
    sizes.map(([disc, discM]) => {
      const concentration = concentrationBand(
        plane, centre === 'mark' ? plane.offsetM : 0, discM, opticSigmaRel, traced?.concentration(disc, centre) ?? null,
      );
      const sampled = centre === 'mark' && disc === '5 mm' && sampling !== null;
      const fluxKwm2 = sampled
        ? { low: sampling.fluxKwm2.low, mid: (concentration.mid * light.mid) / 1000, high: Math.max(sampling.fluxKwm2.high, (concentration.mid * light.mid) / 1000) }
        : { low: (concentration.low * light.low) / 1000, mid: (concentration.mid * light.mid) / 1000, high: (concentration.high * light.high) / 1000 };
      return {
        disc, centre,
        diameterMm: roundSignificant(discM * 1000, 3),
        concentration: roundBand(concentration),
        fluxKwm2: roundBand({ ...fluxKwm2, low: Math.min(fluxKwm2.low, fluxKwm2.mid) }),
      };
    }),
  );
}

/** Full width of the contour above a flux at the plane; 0 where the flux is nowhere reached. [m] */
export function contourWidthM(plane: Pick<Plane, 'beam' | 'distanceM' | 'cosine'>, thresholdKwm2: number, lightWm2: number): number {
  if (lightWm2 <= 0 || plane.cosine <= 0) return 0;
  const level = (thresholdKwm2 * 1000) / (lightWm2 * plane.cosine);
  return 2 * contourHalfWidthM(plane.beam, plane.distanceM, level, contourDiscM(plane.distanceM));
}

/** Time for which one point of the trail stays above a flux: width of the contour along the trail over the speed. */
function dwellBand(plane: Plane, thresholdKwm2: number, light: LightBand, traced: TracedFocus | null, motion: SpotMotion): Band {
  const seconds = (lightWm2: number): number =>
    traced === null
      ? contourWidthM(plane, thresholdKwm2, lightWm2) / motion.acrossMPerS
      : (lightWm2 <= 0 ? 0 : traced.contourWidthM((thresholdKwm2 * 1000) / lightWm2)) / motion.speedMPerS;
  return { low: seconds(light.low), mid: seconds(light.mid), high: seconds(light.high) };
}

function dwellOf(plane: Plane, light: LightBand, traced: TracedFocus | null, motion: SpotMotion | null): FocusResult['dwellS'] {
  if (motion === null || motion.acrossMPerS <= 0) return [];
  return dwellThresholds.map((thresholdKwm2) => ({ thresholdKwm2, seconds: roundBand(dwellBand(plane, thresholdKwm2, light, traced, motion)) }));
}

function spotAtDistance(beam: Beam, lightWm2: number, traced: TracedFocus | null): FocusResult['spotAtDistance'] {
  return cutShares.map((share, index) => {
    const distanceM = share * beam.focusM;
    return {
      distanceM: roundSignificant(distanceM, 4),
      diameterMm: roundSignificant(beam.spotDiameterM(distanceM) * 1000, 3),
      fluxKwm2: roundSignificant(((traced?.along[index]?.concentration ?? beam.concentration(distanceM, 0, markDiscM)) * lightWm2) / 1000, 3),
    };
  });
}

/** @throws PhysicsGuardError if a flux would make a black body hotter than the middle of the sun's disc. */
function guardTemperature(fluxWm2: number): void {
  const limitWm2 = (stefanBoltzmann * solarTemperatureK ** 4) / meanOverCentre(beamLimbDarkening);
  if (fluxWm2 > limitWm2) throw new PhysicsGuardError(`a flux of ${fluxWm2.toPrecision(4)} W/m² exceeds that of the sun's surface`);
}

export interface FocusOutcome {
  readonly result: FocusResult;
  /** Flux on the 5 mm disc round the hot spot, for the energy test: low, likely, cleanest air. [kW/m²] */
  readonly hotSpotKwm2: Band;
  /** Direct sun that may lie on the target beside the focused light: the bound for a reflecting optic, else none. [kW/m²] */
  readonly besideKwm2: number;
  /** Radius of the round spot, at half of the greatest flux, that loses as much heat sideways. [m] */
  readonly spotRadiusM: number;
  /** Time above the lowest harmful flux at one point; null without a mark. [s] */
  readonly harmfulDwellS: Band | null;
}

/** Low, likely and highest beam at the optic. */
export function lightBand(light: DirectBeam, sampling: Sampling | null): LightBand {
  const likely = (light.likelyWm2 ?? 0) * light.transmittance;
  const bound = light.measuredWm2 === null ? (light.boundWm2 ?? light.likelyWm2 ?? 0) : light.measuredWm2 * 1.05;
  const low = sampling?.beamAtOpticWm2.low ?? likely * 0.8;
  return { low: Math.min(low, likely), mid: likely, high: Math.max(bound * light.transmittance, likely), beside: bound };
}

/** What was computed at the best minute before its numbers are put together. */
export interface FocusParts {
  readonly light: LightBand;
  readonly sampling: Sampling | null;
  readonly traced: TracedFocus | null;
  readonly motion: SpotMotion | null;
}

/** Focus at the best minute, in numbers: from the trace where there is one, else from the closed form. */
export function focusOf(minute: JudgedMinute, beam: Beam, parts: FocusParts, setting: Setting): FocusOutcome | null {
  const { light, sampling, traced, motion } = parts;
  const { model, reach, input } = setting;
  if (model === null) return null;
  const plane = planeOf(minute, beam, setting);
  const imageM = Math.abs(model.focalLengthM) * angularDiameterDeg(minute.sun.distanceAu) * degree;
  const scorchWidthM = traced === null ? contourWidthM(plane, scorchContourKwm2, light.high) : traced.contourWidthM((scorchContourKwm2 * 1000) / Math.max(light.high, 1));
  const small = contourDiscM(plane.distanceM);
  const halfMaxM = 2 * contourHalfWidthM(beam, plane.distanceM, 0.5 * beam.concentration(plane.distanceM, 0, small), small);
  const spread = percentiles(Float64Array.from([imageM, Math.max(halfMaxM, imageM), Math.max(beam.spotDiameterM(plane.distanceM), halfMaxM, imageM)]));
  const thresholdKwm2 = reach?.thresholdKwm2 ?? scorchContourKwm2;
  const zoneSuns = (thresholdKwm2 * 1000) / Math.max(light.mid, 1);
  const zone = traced === null ? zoneAlong(beam, zoneSuns, markDiscM) : traced.dangerZone(zoneSuns);
  const zoneWidthM = traced === null ? contourWidthM(plane, thresholdKwm2, light.mid) : traced.contourWidthM(zoneSuns);
  const trailM = (input.mark?.lengthMm ?? 0) / 1000;
  const minutes = motion === null ? null : trailMinutesAtLeast(model, trailM, scorchWidthM, motion.speedMPerS);
  const hot = concentrationBand(plane, 0, markDiscM, setting.opticSigmaRel, traced?.concentration('5 mm', 'hot spot') ?? null);
  guardTemperature(hot.high * light.high);
  return {
    besideKwm2: model.reflects ? light.beside / 1000 : 0,
    // A line loses heat to two sides only; the round spot of the same area stands for it.
    spotRadiusM: model.focusKind === 'line' ? Math.sqrt((halfMaxM / 2) * model.lineHalfLengthM) : halfMaxM / 2,
    harmfulDwellS: motion === null || motion.acrossMPerS <= 0 ? null : dwellBand(plane, thresholdKwm2, light, traced, motion),
    hotSpotKwm2: { low: (hot.low * light.low) / 1000, mid: (hot.mid * light.mid) / 1000, high: (hot.high * light.high) / 1000 },
    result: {
      method: traced === null ? 'closed-form' : 'ray-trace',
      focusKind: model.focusKind,
      focalLengthM: roundSignificant(model.focalLengthM, 4),
      spotDiameterMm: roundBand({ low: spread.low * 1000, mid: spread.mid * 1000, high: spread.high * 1000 }),
      discs: discsOf(plane, light, sampling, traced, imageM, setting.opticSigmaRel),
      plane: planeWords(plane),
      spotAtDistance: spotAtDistance(beam, light.mid, traced),
      dangerZone: zone === null ? null : { thresholdKwm2: roundSignificant(thresholdKwm2, 3), nearM: roundSignificant(zone.nearM, 3), farM: roundSignificant(zone.farM, 3), widthMm: roundSignificant(zoneWidthM * 1000, 3) },
      trailSpeedMmPerH: motion === null ? null : roundSignificant(motion.speedMPerS * 3_600_000, 3),
      trailHeadingDeg: motion === null ? null : roundTo(motion.headingDeg, 1),
      trailMinutesAtLeast: minutes === null ? null : roundTo(minutes, 1),
      dwellS: dwellOf(plane, light, traced, motion),
      traced: traced === null ? null : tracedResult(traced, plane.cosine * beam.concentration(plane.distanceM, 0, markDiscM)),
    },
  };
}
