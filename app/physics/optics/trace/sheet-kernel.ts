/* eslint-disable @typescript-eslint/no-non-null-assertion -- every index is bounded by its loop; a fallback in the hot loops would hide a wrong one as 0 */
import { paneTiltMrad } from '#app/physics/optics/optic-defaults.data.ts';
import type { CurvedReflectorOptic, PaneOptic } from '#app/physics/optics/optic.ts';
import { fresnelReflectance } from '#app/physics/optics/refraction.ts';
import type { Vector } from '#app/physics/vector.ts';
import { fromAzimuthElevation } from '#app/physics/vector.ts';
import { cutOff, mostInteractions } from './body-path.ts';
import type { OcclusionTestOf } from './body-spec.ts';
import type { RayBundle } from './bundle.ts';
import { newCrossing, tiltNormal } from './convex-body.ts';
import type { Frame } from './frame.ts';
import { frameAbout, toLocal } from './frame.ts';
import { gaussPair } from './gauss.ts';
import type { Kernel, Launch, Samples } from './kernel.ts';
import { paneIndex, paneReflectance } from './pane-reflectance.ts';
import { centreRadiusCoefficients } from './plate.ts';
import type { SheetSurface } from './sheet-surface.ts';
import { bowedPane, panedArc, smoothArc } from './sheet-surface.ts';
import { sheetBackTrace } from './sheet-back-trace.ts';
import { slopeError } from './slope-error.ts';
import type { SunDisc } from './sun-sampling.ts';
import type { TraceAssumption, TraceRequest } from './trace-model.ts';

/** One reflecting surface of the sheet. */
export interface Branch {
  readonly surface: SheetSurface;
  reflectance(cosIncidence: number): number;
}

/** Forward trace. Dimensions: place 0–1, sun 2–3, slope 4–5. Every branch is met by the same light. */
function sheetTracer(branches: readonly Branch[], sigma: number): (samples: Samples, launch: Launch, bundle: RayBundle) => void {
  const place = new Float64Array(7);
  const gaussians = new Float64Array(2);
  return (samples, launch, bundle) => {
    const { u, sunX, sunY, sunZ, sunWeight } = samples;
    const { ledger } = bundle;
    for (let i = 0; i < samples.count; i++) {
      if (sigma > 0) gaussPair(u[4]![i]!, u[5]![i]!, gaussians, 0);
      const sx = sunX[i]!;
      const sy = sunY[i]!;
      const sz = sunZ[i]!;
      for (let b = 0; b < branches.length; b++) {
        const { surface } = branches[b]!;
        surface.at(u[0]![i]!, u[1]![i]!, place);
        const facing = place[3]! * sx + place[4]! * sy + place[5]! * sz;
        if (facing <= 0) continue;
        const w = launch.rayWeight * sunWeight[i]! * place[6]! * facing;
        const own = b === 0 ? w : 0;
        if (surface.next(place, sx, sy, sz, uv) < Infinity) continue;
        if (launch.blocked?.(place[0]!, place[1]!, place[2]!, sx, sy, sz)) {
          ledger.blocked += own;
          continue;
        }
        const power = followSheet(branches[b]!, place, -sx, -sy, -sz, w, sigma, gaussians, bundle);
        ledger.incident += own;
        ledger.transmitted += w * power;
        ledger.absorbed += own - w * power;
      }
    }
  };
}

const uv = new Float64Array(2);
const tilted = newCrossing();

/** Reflects until the ray leaves the sheet, storing each leg; returns the share of the power that leaves. */
function followSheet(
  branch: Branch, place: Float64Array, dx: number, dy: number, dz: number, weight: number, sigma: number,
  gaussians: Float64Array, bundle: RayBundle,
): number {
  let power = 1;
  for (let bounce = 0; bounce < mostInteractions; bounce++) {
    tilted.nx = place[3]!;
    tilted.ny = place[4]!;
    tilted.nz = place[5]!;
    if (sigma > 0) tiltNormal(tilted, sigma * gaussians[0]!, sigma * gaussians[1]! * (bounce & 1 ? -1 : 1));
    const c = -(dx * tilted.nx + dy * tilted.ny + dz * tilted.nz);
    if (c <= 0) return 0;
    power *= branch.reflectance(c);
    dx += 2 * c * tilted.nx;
    dy += 2 * c * tilted.ny;
    dz += 2 * c * tilted.nz;
    const t = branch.surface.next(place, dx, dy, dz, uv);
    bundle.pushLeg(place[0]!, place[1]!, place[2]!, dx, dy, dz, weight * power, t);
    if (t === Infinity) return power;
    if (power < cutOff) return 0;
    branch.surface.at(uv[0]!, uv[1]!, place);
  }
  return 0;
}

interface SheetSpec {
  readonly frame: Frame;
  readonly branches: readonly Branch[];
  readonly sigma: number;
  readonly focalDistanceM: number;
  readonly line: boolean;
  readonly highest: number;
  readonly assumptions: readonly TraceAssumption[];
  readonly warnings: readonly string[];
}

function sheetKernel(spec: SheetSpec, sun: SunDisc, blockedIn: OcclusionTestOf): Kernel {
  const towards = toLocal(spec.frame, sun.direction);
  const chief: Vector = [-towards[0], -towards[1], towards[2]];
  const blocked = blockedIn(spec.frame);
  // Generators lengthen the way: only the part across them focuses, at (R/2)·cos i in that plane.
  const across2 = Math.max(1e-4, 1 - towards[1] * towards[1]);
  const focal = spec.line ? (spec.focalDistanceM * Math.max(0.05, towards[2])) / across2 : spec.focalDistanceM;
  return {
    frame: spec.frame,
    focusKind: spec.line ? 'line' : 'point',
    apertureM2: 1,
    focalAxis: chief,
    focalDistanceM: focal,
    planeNormal: [-chief[0], -chief[1], -chief[2]],
    imageFocalM: spec.focalDistanceM,
    clearanceM: 0.02 * focal,
    lineDirection: spec.line ? [0, 1, 0] : null,
    chiefDirection: chief,
    dimensions: spec.sigma > 0 ? 6 : 4,
    outputsPerRay: spec.branches.length * 1.3,
    transmittanceBound: spec.highest,
    backTrace: sheetBackTrace(spec.branches, spec.sigma, spec.line, { ...sun, direction: towards }, (...at) => blocked?.(...at) ?? false),
    assumptions: spec.assumptions,
    warnings: towards[2] <= 0 ? [...spec.warnings, 'The sun stands behind the reflecting face.'] : spec.warnings,
    trace: sheetTracer(spec.branches, spec.sigma),
  };
}

type Law = (cosIncidence: number) => number;
const lawOf = (reflectance: number, request: TraceRequest, glass: boolean): Law =>
  (request.angularReflectance ?? (glass ? 'glass' : 'constant')) === 'glass' ? (c) => paneReflectance(reflectance, c) : () => reflectance;

/** Both faces of an uncoated outer pane, absorption in it left out. */
function clearPane(cosIncidence: number): number {
  const r = fresnelReflectance(Math.min(1, cosIncidence), paneIndex);
  return (2 * r) / (1 + r);
}

/**
 * Bowed pane. A coating on the inner pane (surface 3 or 4) bows the other way: its light is traced as a convex branch,
 * and only the bare faces of the outer pane focus.
 */
export function paneKernel(optic: PaneOptic, request: TraceRequest, sun: SunDisc, blocked: OcclusionTestOf): Kernel {
  const frame = frameAbout(fromAzimuthElevation(optic.axisAzimuthDeg, optic.axisElevationDeg));
  const slope = slopeError(optic);
  const law = lawOf(optic.reflectance, request, true);
  const outer = bowedPane(optic.widthM, optic.heightM, optic.centreBowM);
  const inward = (optic.coatingSurface ?? 1) >= 3;
  const branches: Branch[] = inward
    ? [
        { surface: outer, reflectance: (c) => Math.min(law(c), clearPane(c)) },
        { surface: bowedPane(optic.widthM, optic.heightM, -optic.centreBowM), reflectance: (c) => Math.max(0, law(c) - clearPane(c)) },
      ]
    : [{ surface: outer, reflectance: law }];
  const short = Math.min(optic.widthM, optic.heightM);
  const radius = (centreRadiusCoefficients(Math.max(optic.widthM, optic.heightM) / short).short * short * short) / Math.max(1e-5, Math.abs(optic.centreBowM));
  const inner: TraceAssumption = { field: 'coatingSurface', value: `surface ${optic.coatingSurface}: inner pane bows as far as the outer one, the other way`, source: 'symmetric unit, common practice', verified: false };
  return sheetKernel(
    {
      frame,
      branches,
      sigma: slope.sigmaRad,
      focalDistanceM: radius / 2,
      line: false,
      highest: 1,
      assumptions: inward ? [...slope.assumptions, inner] : slope.assumptions,
      warnings: optic.centreBowM <= 0 ? ['The pane bows outward or is flat: it does not focus.'] : [],
    },
    sun,
    blocked,
  );
}

/** Façade of panes, curved sheet metal or trough. */
export function curvedReflectorKernel(optic: CurvedReflectorOptic, request: TraceRequest, sun: SunDisc, blocked: OcclusionTestOf): Kernel {
  if (!(optic.chordM > 0 && optic.chordM <= 2 * optic.radiusM)) {
    throw new RangeError(`chordM = ${optic.chordM} and radiusM = ${optic.radiusM} disagree: a chord is at most twice the radius`);
  }
  const axis = fromAzimuthElevation(optic.axisAzimuthDeg, optic.axisElevationDeg);
  const azimuth = (optic.axisAzimuthDeg * Math.PI) / 180;
  const frame = frameAbout(axis, optic.generators === 'vertical' ? [0, 0, 1] : [Math.cos(azimuth), -Math.sin(azimuth), 0]);
  const slope = slopeError(optic);
  const paned = optic.paneWidthM !== undefined;
  const tiltMrad = optic.paneTiltMrad ?? paneTiltMrad;
  const paneHeight = Math.min(optic.lengthM, 3.5);
  const surface =
    optic.paneWidthM === undefined
      ? smoothArc(optic)
      : panedArc(optic, optic.paneWidthM, paneHeight, optic.paneBowM ?? 0, tiltMrad / 1000, request.seed);
  const setting: TraceAssumption[] =
    paned && optic.paneTiltMrad === undefined
      ? [
          { field: 'paneTiltMrad', value: `${paneTiltMrad} mrad`, source: 'setting-out tolerance of façade panes 2–5 mrad', verified: false },
          { field: 'paneHeightM', value: `${paneHeight} m`, source: 'storey height, common practice', verified: false },
        ]
      : [];
  return sheetKernel(
    {
      frame,
      branches: [{ surface, reflectance: lawOf(optic.reflectance, request, paned) }],
      sigma: slope.sigmaRad,
      focalDistanceM: optic.radiusM / 2,
      line: true,
      highest: 1,
      assumptions: [...slope.assumptions, ...setting],
      warnings: [],
    },
    sun,
    blocked,
  );
}
