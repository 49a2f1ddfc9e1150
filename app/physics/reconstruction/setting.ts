import type { OpeningInput, ReconstructionInput } from '#app/physics/model/input.ts';
import type { Assumption } from '#app/physics/model/stated.ts';
import { markFromCoordinates, readMark, requiredSunFor, type Mark, type RequiredSun } from '#app/physics/alignment.ts';
import { lowestHarmfulFluxKwm2 } from '#app/physics/heating/outcomes.ts';
import type { TargetMaterial } from '#app/physics/heating/target-material.ts';
import { targetMaterials } from '#app/physics/heating/target-materials.data.ts';
import { spannedDeg, surveySigmaM, type Scene } from '#app/physics/lit.ts';
import type { Optic } from '#app/physics/optics/optic.ts';
import { surveyOrigin, type FocusModel } from '#app/physics/optics/closed-form/beam.ts';
import { focusModelOf } from '#app/physics/optics/closed-form/focus-model.ts';
import { measuredOpticSigmaRel, slopeErrors } from '#app/physics/optics/optic-defaults.data.ts';
import { refractiveMaterials } from '#app/physics/optics/refractive-materials.data.ts';
import { focusesForward, reachOf, type Reach } from '#app/physics/reach.ts';
import { samplingSigmas } from '#app/physics/sampling-sigmas.data.ts';
import { settleSite, type Site } from '#app/physics/site.ts';
import { openingTransmittance, readDniSeries, type DniSeries } from '#app/physics/sky/direct-beam.ts';
import { clearSkyAt } from '#app/physics/sky/clear-sky.ts';
import { extraterrestrialWm2 } from '#app/physics/sky/extraterrestrial.ts';
import { readSkyline } from '#app/physics/skyline.ts';
import { minutesIn, sunTrack, type SunMinute } from '#app/physics/sun-track.ts';
import { halfAngleRad } from '#app/physics/sun/sun-disc.ts';
import { defaultOccluderSigmaM, readOccluders } from '#app/physics/occluders.ts';
import type { Occluder } from '#app/physics/optics/trace/trace-model.ts';
import { inRange, parseUtc } from '#app/physics/units.ts';
import { checkInput } from './checked-input.ts';
import { maskOf } from './mask.ts';
import { readyOptic } from './pane-bow.ts';

/** An input with its mark by bearing and the shape of its optic settled. */
export interface SettledInput extends Omit<ReconstructionInput, 'optic' | 'markCoordinates'> {
  readonly optic?: Optic;
}

/** A reconstruction with its input read, checked and completed. */
export interface Setting {
  readonly input: SettledInput;
  readonly site: Site;
  readonly startMs: number;
  readonly endMs: number;
  readonly track: readonly SunMinute[];
  readonly series: DniSeries | null;
  readonly opening: OpeningInput | undefined;
  readonly occluders: readonly Occluder[];
  readonly model: FocusModel | null;
  readonly mark: Mark | null;
  readonly required: RequiredSun | null;
  readonly reach: Reach | null;
  readonly scene: Scene;
  readonly material: TargetMaterial | null;
  readonly opticSigmaRel: number;
  readonly assumptions: readonly Assumption[];
}

const longestWindowDays = 62;

function readWindow(input: ReconstructionInput): { readonly startMs: number; readonly endMs: number } {
  const startMs = parseUtc(input.window.startUtc, 'window.startUtc');
  const endMs = parseUtc(input.window.endUtc, 'window.endUtc');
  if (endMs < startMs) throw new RangeError('window.startUtc and window.endUtc disagree: the window ends before it starts.');
  inRange('length of the window', (endMs - startMs) / 86_400_000, 0, longestWindowDays, 'days');
  inRange('year of window.startUtc', new Date(startMs).getUTCFullYear(), 1900, 2100);
  return { startMs, endMs };
}

/** Class values that the closed forms take for what the input left open. */
function opticAssumptions(input: SettledInput): Assumption[] {
  const { optic } = input;
  if (optic === undefined) return [];
  const list: Assumption[] = [];
  if (optic.slopeErrorMrad === undefined) {
    const row = slopeErrors[optic.kind];
    list.push({ field: 'optic.slopeErrorMrad', value: `${row.slopeErrorMrad} mrad`, source: row.source });
  }
  if ('material' in optic && optic.material.name !== 'explicit') {
    const row = refractiveMaterials[optic.material.name];
    list.push({ field: 'optic.material', value: `${row.name}, index ${row.refractiveIndex}`, source: row.source });
  }
  if (input.opticSigmaRel === undefined) {
    list.push({ field: 'opticSigmaRel', value: `${measuredOpticSigmaRel}`, source: { text: 'taken as measured on site, common practice', verified: true } });
  }
  return list;
}

/** What stands, or is taken to stand, between the sun and the optic. */
function obstacleAssumptions({ skyline, occluders, occluderSigmaM }: SettledInput): Assumption[] {
  const list: Assumption[] = [];
  if (skyline === undefined) list.push({ field: 'skyline', value: 'level horizon', source: { text: 'no skyline recorded', verified: true } });
  if (occluders === undefined || occluders.length === 0) {
    list.push({ field: 'occluders', value: 'none', source: { text: 'no frame, bar or reveal recorded by its corners', verified: true } });
  } else if (occluderSigmaM === undefined) {
    list.push({ field: 'occluderSigmaM', value: `${defaultOccluderSigmaM} m`, source: { text: 'tape measure, common practice', verified: true } });
  }
  return list;
}

/** Spreads that the samples take and no field of the input states. */
function spreadAssumptions({ optic, opening }: SettledInput, material: TargetMaterial | null): Assumption[] {
  const { throughput, glass, ignitionTime } = samplingSigmas;
  const line = (field: string, { sigmaRel, source }: (typeof samplingSigmas)[keyof typeof samplingSigmas]): Assumption => ({ field, value: `±${Math.round(sigmaRel * 100)} %, one sigma`, source });
  return [
    ...(optic !== undefined && ('reflectance' in optic || 'transmittance' in optic) ? [line('throughputSigmaRel', throughput)] : []),
    ...(opening !== undefined && opening.transmittance < 1 ? [line('glassSigmaRel', glass)] : []),
    ...(optic !== undefined && material !== null && material.ignition.length > 0 ? [line('ignitionTimeSigmaRel', ignitionTime)] : []),
  ];
}

/** Direction of the sun by which the reach is settled: the required one, else the highest that meets the working face. */
function referenceSun(model: FocusModel, required: RequiredSun | null, track: readonly SunMinute[]): SunMinute | null {
  let best: SunMinute | null = null;
  for (const sun of track) {
    if (best !== null && sun.apparentElevationDeg <= best.apparentElevationDeg) continue;
    if (required !== null || model.beamFor(sun.towardsSun, halfAngleRad(sun.distanceAu)) !== null) best = sun;
  }
  return best;
}

/** What the reach depends on besides the optic. */
interface ReachParts {
  readonly input: SettledInput;
  readonly site: Site;
  readonly mark: Mark;
  readonly required: RequiredSun | null;
  readonly material: TargetMaterial | null;
  readonly track: readonly SunMinute[];
}

/** Reach of the beam in the cleanest air; null where no sun of the window meets the working face. */
function settleReach(model: FocusModel, { input, site, mark, required, material, track }: ReachParts): Reach | null {
  const reference = referenceSun(model, required, track);
  if (reference === null) return null;
  const beam = model.beamFor(required?.towards ?? reference.towardsSun, halfAngleRad(reference.distanceAu));
  if (beam === null) return null;
  const elevationDeg = Math.max(required?.apparentElevationDeg ?? reference.apparentElevationDeg, 5);
  const clear = clearSkyAt(elevationDeg, extraterrestrialWm2(reference.distanceAu, site.air.solarConstantWm2), input.place.elevationM, site.air);
  const glass = openingTransmittance(input.opening, required?.azimuthDeg ?? reference.azimuthDeg, elevationDeg);
  return reachOf(beam, mark, (clear?.boundWm2 ?? 1000) * glass, lowestHarmfulFluxKwm2(material, site.air.temperatureC));
}

/** The input with its mark by bearing, however it was surveyed, and its optic as `readyOptic` settled it. */
function settledInput(given: ReconstructionInput, optic: Optic | undefined): SettledInput {
  const { markCoordinates, optic: _asked, ...rest } = given;
  const shaped = optic === undefined ? rest : { ...rest, optic };
  if (markCoordinates === undefined) return shaped;
  if (given.mark !== undefined) throw new RangeError('mark and markCoordinates disagree: give one of the two.');
  return { ...shaped, mark: markFromCoordinates(markCoordinates) };
}

/**
 * Reads and completes an input.
 *
 * @throws RangeError naming the field, its value and the allowed interval, or the two fields that contradict each other.
 */
export function settle(given: ReconstructionInput): Setting {
  checkInput(given);
  const { startMs, endMs } = readWindow(given);
  const site = settleSite(given);
  const ready = given.optic === undefined ? null : readyOptic(given.optic, site.air.pressureHpa);
  const input = settledInput(given, ready?.optic);
  const track = sunTrack(site.observer, startMs, minutesIn(startMs, endMs));
  const model = input.optic === undefined ? null : focusModelOf(input.optic);
  const mark = input.mark === undefined ? null : readMark(input.mark, model?.startsAt ?? surveyOrigin);
  const material = input.target === undefined ? null : targetMaterials.get(input.target.materialId) ?? null;
  if (input.target !== undefined && material === null) {
    throw new RangeError(`target.materialId is "${input.target.materialId}"; it must be one of ${[...targetMaterials.keys()].join(', ')}.`);
  }
  const surveyDeg = mark === null ? 0 : 2 * spannedDeg(surveySigmaM(mark), mark.distanceM);
  const required = model === null || mark === null || model.moves ? null : requiredSunFor(model, mark.towards, site.observer, surveyDeg);
  const reach = model === null || mark === null || !focusesForward(model) ? null : settleReach(model, { input, site, mark, required, material, track });
  const occluders = readOccluders(input.occluders);
  return {
    input, site, startMs, endMs, track, model, mark, required, reach, material,
    series: readDniSeries(input.sky),
    opening: input.opening,
    occluders,
    opticSigmaRel: input.opticSigmaRel ?? measuredOpticSigmaRel,
    scene: {
      dipDeg: site.dipDeg,
      skyline: input.skyline === undefined || input.skyline.points.length === 0 ? null : readSkyline(input.skyline),
      skylineSigmaDeg: input.skyline?.sigmaDeg ?? 0,
      opening: input.opening, mask: maskOf(input, occluders, model), model, mark, reach,
    },
    assumptions: [...site.assumptions, ...(ready?.assumptions ?? []), ...opticAssumptions(input), ...obstacleAssumptions(input), ...spreadAssumptions(input, material)],
  };
}
