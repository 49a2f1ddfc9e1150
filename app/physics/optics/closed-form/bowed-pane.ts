import { cross, dot, fromAzimuthElevation, mirrored, scale, subtract, unit, type Vector } from '#app/physics/vector.ts';
import type { PaneOptic } from '#app/physics/optics/optic.ts';
import { slopeErrors } from '#app/physics/optics/optic-defaults.data.ts';
import { sharpestDistanceM, surveyOrigin, type Beam, type FocusModel } from './beam.ts';
import { circleOverlapM2 } from './meridional.ts';

/** Cells along each side of the pane. */
const cells = 22;
const order = [1, 3, 5, 7] as const;

/** Slopes of the pane's surface at the middle of each cell, in a frame across, along and out of the pane. */
interface PaneCells {
  readonly x: Float64Array;
  readonly y: Float64Array;
  readonly slopeX: Float64Array;
  readonly slopeY: Float64Array;
  /** Curvature radii at the centre across and along the pane. [m] */
  readonly radiusXM: number;
  readonly radiusYM: number;
}

/** Series of a simply supported plate under even load, scaled to the measured bow (Navier). */
function paneCells(optic: PaneOptic): PaneCells {
  const { widthM: a, heightM: b } = optic;
  const coefficient = (m: number, n: number): number => 1 / (m * n * ((m / a) ** 2 + (n / b) ** 2) ** 2);
  const signs = (k: number): number => (k % 4 === 1 ? 1 : -1);
  let centre = 0;
  let curveX = 0;
  let curveY = 0;
  for (const m of order) {
    for (const n of order) {
      const term = coefficient(m, n) * signs(m) * signs(n);
      centre += term;
      curveX += term * ((m * Math.PI) / a) ** 2;
      curveY += term * ((n * Math.PI) / b) ** 2;
    }
  }
  const factor = optic.centreBowM / centre;
  const count = cells * cells;
  const out: PaneCells = {
    x: new Float64Array(count), y: new Float64Array(count), slopeX: new Float64Array(count), slopeY: new Float64Array(count),
    radiusXM: 1 / (factor * curveX), radiusYM: 1 / (factor * curveY),
  };
  for (let i = 0; i < cells; i++) {
    for (let j = 0; j < cells; j++) {
      const x = ((i + 0.5) / cells - 0.5) * a;
      const y = ((j + 0.5) / cells - 0.5) * b;
      let slopeX = 0;
      let slopeY = 0;
      for (const m of order) {
        for (const n of order) {
          const term = factor * coefficient(m, n) * signs(m) * signs(n);
          // The bow is inward: the surface rises from the centre to the edge like 1 − cos cos.
          slopeX += term * ((m * Math.PI) / a) * Math.sin((m * Math.PI * x) / a) * Math.cos((n * Math.PI * y) / b);
          slopeY += term * ((n * Math.PI) / b) * Math.cos((m * Math.PI * x) / a) * Math.sin((n * Math.PI * y) / b);
        }
      }
      const k = i * cells + j;
      out.x[k] = x;
      out.y[k] = y;
      out.slopeX[k] = slopeX;
      out.slopeY[k] = slopeY;
    }
  }
  return out;
}

/** Landing coordinates of every cell's chief ray: (u0 + u1 z, v0 + v1 z) across the reflected chief ray. */
interface Landings {
  readonly u0: Float64Array;
  readonly u1: Float64Array;
  readonly v0: Float64Array;
  readonly v1: Float64Array;
}

function landingsFor(pane: PaneCells, normal: Vector, right: Vector, top: Vector, towardsSun: Vector, direction: Vector): Landings {
  const u = unit(Math.abs(direction[2]) < 0.99 ? cross([0, 0, 1], direction) : cross([1, 0, 0], direction));
  const v = cross(direction, u);
  const count = cells * cells;
  const out: Landings = {
    u0: new Float64Array(count), u1: new Float64Array(count), v0: new Float64Array(count), v1: new Float64Array(count),
  };
  for (let k = 0; k < count; k++) {
    const facet = unit(subtract(subtract(normal, scale(right, pane.slopeX[k] ?? 0)), scale(top, pane.slopeY[k] ?? 0)));
    const ray = mirrored(towardsSun, facet);
    const along = dot(ray, direction);
    const x = pane.x[k] ?? 0;
    const y = pane.y[k] ?? 0;
    const point: Vector = [right[0] * x + top[0] * y, right[1] * x + top[1] * y, right[2] * x + top[2] * y];
    const depth = dot(point, direction);
    const slopeU = dot(ray, u) / along;
    const slopeV = dot(ray, v) / along;
    out.u0[k] = dot(point, u) - slopeU * depth;
    out.v0[k] = dot(point, v) - slopeV * depth;
    out.u1[k] = slopeU;
    out.v1[k] = slopeV;
  }
  return out;
}

/** A pane made ready: its cells, its axes and what blurs its light. */
interface ReadyPane {
  readonly optic: PaneOptic;
  readonly cells: PaneCells;
  readonly normal: Vector;
  readonly right: Vector;
  readonly top: Vector;
  readonly meanFocalM: number;
  readonly slopeBlurRad: number;
}

function readyPane(optic: PaneOptic): ReadyPane {
  const normal = fromAzimuthElevation(optic.axisAzimuthDeg, optic.axisElevationDeg);
  const right = fromAzimuthElevation(optic.axisAzimuthDeg + 90, 0);
  const pane = paneCells(optic);
  return {
    optic, normal, right, cells: pane,
    top: cross(right, normal),
    meanFocalM: Math.sqrt(Math.abs(pane.radiusXM * pane.radiusYM)) / 2,
    slopeBlurRad: (4 * (optic.slopeErrorMrad ?? slopeErrors['bowed-pane'].slopeErrorMrad)) / 1000,
  };
}

/** Radius of the spot that one cell throws. A cell's own footprint shrinks towards the focus; without it the far field would fall apart into dots. [m] */
function cellBlurM({ optic, meanFocalM, slopeBlurRad }: ReadyPane, halfAngle: number, z: number): number {
  const footprint = (0.9 * Math.max(optic.widthM, optic.heightM) * (1 - z / meanFocalM)) / cells;
  return Math.hypot(z * Math.tan(halfAngle), z * slopeBlurRad, footprint);
}

/** Share of the cells' light on a disc, over its area. [1/m²] */
function densityOnDisc({ u0, u1, v0, v1 }: Landings, z: number, offset: number, disc: number, blurM: number): number {
  let share = 0;
  for (let k = 0; k < u0.length; k++) {
    const distance = Math.hypot((u0[k] ?? 0) + (u1[k] ?? 0) * z - offset, (v0[k] ?? 0) + (v1[k] ?? 0) * z);
    share += circleOverlapM2(blurM, disc / 2, distance);
  }
  return share / (u0.length * Math.PI * blurM * blurM) / ((Math.PI * disc * disc) / 4);
}

/** Diameter round the chief ray that holds half of the cells' light. [m] */
function halfLightDiameterM({ u0, u1, v0, v1 }: Landings, z: number, imageRad: number): number {
  const distances = Array.from(u0, (value, k) => Math.hypot(value + (u1[k] ?? 0) * z, (v0[k] ?? 0) + (v1[k] ?? 0) * z));
  distances.sort((p, q) => p - q);
  return 2 * Math.hypot(distances[Math.floor(distances.length / 2)] ?? 0, z * imageRad);
}

/** Light of one sun. @param focusByIncidence Sharpest distances kept from sun to sun, by steps of some two degrees. */
function paneBeam(pane: ReadyPane, towardsSun: Vector, halfAngle: number, focusByIncidence: Map<string, number>): Beam | null {
  const { optic, normal, right, top } = pane;
  const cosIncidence = dot(towardsSun, normal);
  if (cosIncidence <= 0.02) return null;
  const direction = mirrored(towardsSun, normal);
  let known: Landings | null = null;
  const landings = (): Landings => (known ??= landingsFor(pane.cells, normal, right, top, towardsSun, direction));
  const lightM2 = optic.widthM * optic.heightM * cosIncidence * optic.reflectance;
  const concentration = (z: number, offset: number, disc: number): number =>
    z <= 0 ? 0 : lightM2 * densityOnDisc(landings(), z, offset, disc, cellBlurM(pane, halfAngle, z));
  return {
    direction, tilt: Math.acos(Math.min(1, cosIncidence)), across: null, concentration,
    get focusM() {
      const key = `${Math.round(dot(towardsSun, right) * 25)}/${Math.round(dot(towardsSun, top) * 25)}`;
      let focusM = focusByIncidence.get(key);
      if (focusM === undefined) {
        const shortFocalM = Math.min(Math.abs(pane.cells.radiusXM), Math.abs(pane.cells.radiusYM)) / 2;
        focusM = sharpestDistanceM((z) => concentration(z, 0, 2 * z * Math.tan(halfAngle)), shortFocalM, 0.5, 2.2);
        focusByIncidence.set(key, focusM);
      }
      return focusM;
    },
    spotDiameterM: (z) => halfLightDiameterM(landings(), z, Math.hypot(Math.tan(halfAngle), pane.slopeBlurRad)),
  };
}

/** Insulating glass pane that bows inward: a cell-by-cell mirror with the plate's own shape. */
export function bowedPaneModel(optic: PaneOptic): FocusModel {
  const pane = readyPane(optic);
  const focusing = optic.centreBowM > 0 && (optic.coatingSurface === undefined || optic.coatingSurface <= 2);
  const shortFocalM = Math.min(Math.abs(pane.cells.radiusXM), Math.abs(pane.cells.radiusYM)) / 2;
  const focusByIncidence = new Map<string, number>();
  return {
    focusKind: 'point',
    focalLengthM: focusing ? shortFocalM : -shortFocalM,
    generator: null,
    startsAt: surveyOrigin,
    lineHalfLengthM: 0,
    halfWidthM: Math.hypot(optic.widthM, optic.heightM) / 2,
    moves: false,
    reflects: true,
    throughput: optic.reflectance,
    beamFor: (towardsSun, halfAngle) => paneBeam(pane, towardsSun, halfAngle, focusByIncidence),
    requiredSun: (towardsMark) => {
      const sun = mirrored(towardsMark, pane.normal);
      return dot(sun, pane.normal) > 0 ? sun : null;
    },
  };
}
