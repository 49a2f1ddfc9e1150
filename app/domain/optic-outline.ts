import type { CurvedReflectorOptic, MirrorOptic, Optic, PaneOptic } from '#app/physics/optics/optic.ts';
import { add, cross, fromAzimuthElevation, scale, unit } from '#app/physics/vector.ts';
import type { Vector } from '#app/physics/vector.ts';

/**
 * The shape of an optic as points in space, [east, north, up] in metres from the point from which the mark was
 * surveyed. Only dimensions of the engine's input are used; nothing is drawn that was not entered.
 */
export interface OpticOutline {
  /** Full ball about a point. */
  readonly ball: { readonly centre: Vector; readonly radiusM: number } | null;
  /** Solid body: its silhouette is the hull of these points. */
  readonly body: readonly Vector[];
  /** Edges and curves of a thin face. */
  readonly lines: readonly (readonly Vector[])[];
  /** Middle of the face by which light comes in. */
  readonly entersAt: Vector;
  /** Half the width of the light that the optic takes in. [m] */
  readonly halfApertureM: number;
  /** Distance along the chief ray at which the light has left the optic. [m] */
  readonly leavesAtM: number;
}

const steps = 24;
const straight: Vector = [0, 0, 0];
const turn = (share: number): number => 2 * Math.PI * share;

/** Two directions square to an axis: level, and the one that completes the frame. */
function squareTo(axis: Vector): readonly [Vector, Vector] {
  const level: Vector = Math.hypot(axis[0], axis[1]) < 1e-6 ? [1, 0, 0] : unit(cross(axis, [0, 0, 1]));
  return [level, unit(cross(level, axis))];
}

function circle(centre: Vector, axis: Vector, radiusM: number): Vector[] {
  const [a, b] = squareTo(axis);
  return Array.from({ length: steps + 1 }, (_unused, index) => add(centre, add(scale(a, radiusM * Math.cos(turn(index / steps))), scale(b, radiusM * Math.sin(turn(index / steps))))));
}

const along = (from: number, to: number): number[] => Array.from({ length: steps + 1 }, (_unused, index) => from + ((to - from) * index) / steps);

/** Depth of a curved face at a distance from its vertex. [m] */
function sagM(radiusM: number, offM: number, parabolic: boolean): number {
  return parabolic ? (offM * offM) / (2 * radiusM) : radiusM - Math.sqrt(Math.max(0, radiusM * radiusM - offM * offM));
}

function mirrorOutline(optic: MirrorOptic): OpticOutline {
  const axis = fromAzimuthElevation(optic.axisAzimuthDeg, optic.axisElevationDeg);
  const half = Math.min(optic.diameterM / 2, optic.figure === 'parabolic' ? Infinity : optic.radiusM);
  const parabolic = optic.figure === 'parabolic';
  const arc = (sideways: Vector) => along(-half, half).map((off) => add(scale(axis, sagM(optic.radiusM, off, parabolic)), scale(sideways, off)));
  const [level, upright] = squareTo(axis);
  return { ball: null, body: [], lines: [arc(level), arc(upright), circle(scale(axis, sagM(optic.radiusM, half, parabolic)), axis, half)], entersAt: straight, halfApertureM: half, leavesAtM: 0 };
}

function curvedOutline(optic: CurvedReflectorOptic): OpticOutline {
  const axis = fromAzimuthElevation(optic.axisAzimuthDeg, optic.axisElevationDeg);
  const level = fromAzimuthElevation(optic.axisAzimuthDeg + 90, 0);
  const upright = unit(cross(level, axis));
  const [generator, sideways] = optic.generators === 'horizontal' ? [level, upright] : [upright, level];
  const half = optic.chordM / 2;
  const arc = (end: number) => along(-half, half).map((off) => add(add(scale(axis, sagM(optic.radiusM, off, false)), scale(sideways, off)), scale(generator, (end * optic.lengthM) / 2)));
  const [first, middle, last] = [arc(-1), arc(0), arc(1)];
  const edge = (index: number): Vector[] => [first[index] ?? straight, last[index] ?? straight];
  return { ball: null, body: [], lines: [first, middle, last, edge(0), edge(steps)], entersAt: straight, halfApertureM: half, leavesAtM: 0 };
}

function rectangle(axis: Vector, widthM: number, heightM: number, aheadM = 0): Vector[] {
  const [level, upright] = squareTo(axis);
  const corner = (x: number, y: number) => add(scale(axis, aheadM), add(scale(level, (x * widthM) / 2), scale(upright, (y * heightM) / 2)));
  return [corner(-1, -1), corner(1, -1), corner(1, 1), corner(-1, 1), corner(-1, -1)];
}

/** The edge plane stands before the bowed centre by the bow; the survey starts at the centre of the pane. */
function paneOutline(optic: PaneOptic): OpticOutline {
  const axis = fromAzimuthElevation(optic.axisAzimuthDeg, optic.axisElevationDeg);
  const [level, upright] = squareTo(axis);
  const bow = (sideways: Vector, half: number) => along(-half, half).map((off) => add(scale(axis, optic.centreBowM * (off / half) ** 2), scale(sideways, off)));
  return {
    ball: null,
    body: [],
    lines: [rectangle(axis, optic.widthM, optic.heightM, optic.centreBowM), bow(level, optic.widthM / 2), bow(upright, optic.heightM / 2)],
    entersAt: straight,
    halfApertureM: Math.min(optic.widthM, optic.heightM) / 2,
    leavesAtM: 0,
  };
}

/** Liquid below its level top, in a round bottom about `centre`. */
function poolOutline(centre: Vector, radiusM: number, depthM: number): OpticOutline {
  const deepest = Math.acos(Math.min(1, Math.max(-1, (radiusM - depthM) / radiusM)));
  const rings = Array.from({ length: 7 }, (_unused, index) => (deepest * index) / 6);
  const body = rings.flatMap((angle) => circle(add(centre, [0, 0, -radiusM * Math.cos(angle)]), [0, 0, 1], radiusM * Math.sin(angle)));
  const halfWidthM = radiusM * Math.sin(Math.min(deepest, Math.PI / 2));
  return { ball: null, body, lines: [], entersAt: add(centre, [0, 0, depthM - radiusM]), halfApertureM: halfWidthM, leavesAtM: radiusM };
}

/** Outline of an optic as it stood. */
export function opticOutline(optic: Optic): OpticOutline {
  switch (optic.kind) {
    case 'sphere':
      return { ball: { centre: straight, radiusM: optic.diameterM / 2 }, body: [], lines: [], entersAt: straight, halfApertureM: optic.diameterM / 2, leavesAtM: optic.diameterM / 2 };
    case 'cylinder': {
      const axis = fromAzimuthElevation(optic.axisAzimuthDeg, optic.axisElevationDeg);
      const rims = [-1, 1].flatMap((end) => circle(scale(axis, (end * optic.lengthM) / 2), axis, optic.diameterM / 2));
      return { ball: null, body: rims, lines: [], entersAt: straight, halfApertureM: optic.diameterM / 2, leavesAtM: optic.diameterM / 2 };
    }
    case 'concave-mirror':
    case 'polished-bowl':
    case 'dish':
      return mirrorOutline(optic);
    case 'facade':
    case 'curved-metal':
    case 'trough':
      return curvedOutline(optic);
    case 'bowed-pane':
      return paneOutline(optic);
    case 'bowl':
      return poolOutline(straight, optic.radiusM, optic.liquidDepthM);
    case 'ponded-dome': {
      const half = Math.min(optic.radiusM, optic.pondDiameterM / 2);
      return poolOutline([0, 0, optic.radiusM], optic.radiusM, sagM(optic.radiusM, half, false));
    }
    case 'fresnel':
      return { ball: null, body: rectangle(fromAzimuthElevation(optic.axisAzimuthDeg, optic.axisElevationDeg), optic.widthM, optic.heightM), lines: [], entersAt: straight, halfApertureM: Math.min(optic.widthM, optic.heightM) / 2, leavesAtM: 0 };
    case 'lens':
    case 'telescope': {
      const axis = fromAzimuthElevation(optic.axisAzimuthDeg, optic.axisElevationDeg);
      return { ball: null, body: circle(straight, axis, optic.diameterM / 2), lines: [], entersAt: straight, halfApertureM: optic.diameterM / 2, leavesAtM: 0 };
    }
  }
}
