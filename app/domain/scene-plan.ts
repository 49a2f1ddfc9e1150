import { missOf, readMark } from '#app/physics/alignment.ts';
import type { Mark } from '#app/physics/alignment.ts';
import type { FocusModel } from '#app/physics/optics/closed-form/beam.ts';
import { focusModelOf } from '#app/physics/optics/closed-form/focus-model.ts';
import { readSkyline } from '#app/physics/skyline.ts';
import { solarPosition } from '#app/physics/sun/solar-position.ts';
import { halfAngleRad } from '#app/physics/sun/sun-disc.ts';
import { fromAzimuthElevation, scale } from '#app/physics/vector.ts';
import type { Vector } from '#app/physics/vector.ts';
import { opticOutline } from './optic-outline.ts';
import type { OpticOutline } from './optic-outline.ts';
import { withRadius } from './sagitta.ts';
import type { Scene, SceneSkyline } from './scene.ts';
import { openingCorners, wallEnds } from './scene-occluders.ts';
import { readOptic } from './scene-optic.ts';

/** The measured scene in space, [east, north, up] in metres from the centre of the optic; null for what is not measured. */
export interface ScenePlan {
  readonly outline: OpticOutline | null;
  readonly model: FocusModel | null;
  /** Two measures that contradict each other, in the engine's words. */
  readonly problem: string | null;
  readonly faces: Vector | null;
  readonly mark: Mark | null;
  readonly markAt: Vector | null;
  /** Outward normal of the marked surface, where it was measured. */
  readonly surface: Vector | null;
  readonly opening: { readonly outward: Vector; readonly distanceM: number | null; readonly halfWidthM: number | null; readonly corners: readonly Vector[] | null } | null;
  readonly walls: readonly { readonly from: Vector; readonly to: Vector; readonly topM: number; readonly name: string }[];
  readonly skyline: ((azimuthDeg: number) => number) | null;
}

function modelOf(scene: Scene): { readonly outline: OpticOutline | null; readonly model: FocusModel | null; readonly problem: string | null } {
  const { optic } = readOptic(withRadius(scene.optic));
  if (!optic) return { outline: null, model: null, problem: null };
  try {
    return { outline: opticOutline(optic), model: focusModelOf(optic), problem: null };
  } catch (error) {
    // The engine names both measures that disagree.
    if (error instanceof RangeError) return { outline: null, model: null, problem: error.message };
    throw error;
  }
}

export function scenePlan(scene: Scene, siteSkyline: SceneSkyline | null): ScenePlan {
  const { mark, opening, optic } = scene;
  const parts = modelOf(scene);
  const place = mark.bearingDeg && mark.elevationDeg && mark.distanceMm ? { bearingDeg: mark.bearingDeg.value, elevationDeg: mark.elevationDeg.value, distanceM: mark.distanceMm.value / 1000 } : null;
  const markInput = place ? { ...place, bearingSigmaDeg: mark.bearingDeg?.plusMinus ?? 1, elevationSigmaDeg: mark.elevationDeg?.plusMinus ?? 1, distanceSigmaM: (mark.distanceMm?.plusMinus ?? 10) / 1000 } : null;
  const skyline = scene.skyline ?? siteSkyline;
  return {
    ...parts,
    faces: optic.faceAzimuthDeg ? fromAzimuthElevation(optic.faceAzimuthDeg.value, optic.faceTiltDeg?.value ?? 0) : null,
    mark: markInput ? readMark(markInput, parts.model?.startsAt ?? [0, 0, 0]) : null,
    markAt: place ? scale(fromAzimuthElevation(place.bearingDeg, place.elevationDeg), place.distanceM) : null,
    surface: mark.surfaceAzimuthDeg || mark.surfaceElevationDeg ? fromAzimuthElevation(mark.surfaceAzimuthDeg?.value ?? 0, mark.surfaceElevationDeg?.value ?? 0) : null,
    opening: opening ? { outward: fromAzimuthElevation(opening.azimuthDeg.value, 0), distanceM: opening.distanceMm ? opening.distanceMm.value / 1000 : null, halfWidthM: opening.widthMm ? opening.widthMm.value / 2000 : null, corners: openingCorners(opening) } : null,
    walls: (scene.walls ?? []).map((wall, index) => ({ from: wallEnds(wall)[0], to: wallEnds(wall)[1], topM: wall.topM, name: wall.name ?? `wall ${index + 1}` })),
    skyline: skyline && skyline.points.length > 0 ? readSkyline({ sigmaDeg: skyline.plusMinusDeg, points: skyline.points.map(({ azimuthDeg, elevationDeg }) => ({ azimuthDeg, elevationDeg })) }).elevationDeg : null,
  };
}

export interface PlanPlace {
  readonly latitudeDeg: number;
  readonly longitudeDeg: number;
  readonly elevationM: number;
}

/** Where sun and beam stand at one instant, closed form of the engine. */
export interface SceneMoment {
  readonly azimuthDeg: number;
  readonly elevationDeg: number;
  readonly towardsSun: Vector;
  /** Chief ray beyond the optic; null with the sun down or behind the working face, or without an optic. */
  readonly beam: { readonly direction: Vector; readonly focusM: number } | null;
  /** Distance of the mark from the chief ray. [m] */
  readonly missM: number | null;
  /** Height of the skyline in the direction of the sun. [°] */
  readonly skylineDeg: number | null;
}

/** Standard atmosphere at sea level, ISO 2533:1975. */
const standardAir = { pressureHpa: 1_013.25, temperatureC: 15 } as const;

export function sceneMoment(plan: ScenePlan, place: PlanPlace, utcMs: number): SceneMoment {
  const sun = solarPosition(utcMs, { ...place, ...standardAir });
  const beam = plan.model && sun.apparentElevationDeg > 0 ? plan.model.beamFor(sun.towardsSun, halfAngleRad(sun.distanceAu)) : null;
  return {
    azimuthDeg: sun.azimuthDeg,
    elevationDeg: sun.apparentElevationDeg,
    towardsSun: sun.towardsSun,
    beam: beam ? { direction: beam.direction, focusM: beam.focusM } : null,
    missM: beam && plan.model && plan.mark ? missOf(beam, plan.model, plan.mark).lateralM : null,
    skylineDeg: plan.skyline ? plan.skyline(sun.azimuthDeg) : null,
  };
}

/** The minute of a span at which the beam passes nearest to the mark; null when there is no beam in it. */
export function nearestMoment(plan: ScenePlan, place: PlanPlace, fromMs: number, toMs: number): { readonly utcMs: number; readonly missM: number } | null {
  if (!plan.model || !plan.mark) return null;
  const stepMs = Math.max(60_000, Math.ceil((toMs - fromMs) / 600 / 60_000) * 60_000);
  let best: { utcMs: number; missM: number } | null = null;
  for (let utcMs = fromMs; utcMs <= toMs; utcMs += stepMs) {
    const sun = solarPosition(utcMs, { ...place, ...standardAir });
    // The distance of the sharpest spot, which a whole moment holds, costs more than all else and says nothing here.
    const beam = sun.apparentElevationDeg > 0 ? plan.model.beamFor(sun.towardsSun, halfAngleRad(sun.distanceAu)) : null;
    const missM = beam ? missOf(beam, plan.model, plan.mark).lateralM : null;
    if (missM !== null && (best === null || missM < best.missM)) best = { utcMs, missM };
  }
  return best;
}
