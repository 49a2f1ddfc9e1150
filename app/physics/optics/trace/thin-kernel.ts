/* eslint-disable @typescript-eslint/no-non-null-assertion -- every index is bounded by its loop; a fallback in the hot loops would hide a wrong one as 0 */
import type { FresnelOptic, TelescopeOptic } from '#app/physics/optics/optic.ts';
import { fromAzimuthElevation } from '#app/physics/vector.ts';
import type { RayBundle } from './bundle.ts';
import type { OcclusionTestOf } from './body-spec.ts';
import { newCrossing, tiltNormal } from './convex-body.ts';
import { frameAbout, toLocal } from './frame.ts';
import { gaussPair } from './gauss.ts';
import type { Kernel, Launch, Samples } from './kernel.ts';
import { slopeError } from './slope-error.ts';
import { channelPicker } from './sphere-kernel.ts';
import type { Channel } from './spectral.ts';
import { channelsOf, indexForFocus } from './spectral.ts';
import type { SunDisc } from './sun-sampling.ts';
import { objectiveBackTrace, sheetLensBackTrace } from './thin-back-trace.ts';

const acrylic = { name: 'acrylic' } as const;
const facet = newCrossing();
const gaussians = new Float64Array(2);

/**
 * Grooved sheet, flat face to the sun. Each groove's facet has the slope that sends light of the design colour along
 * the axis to the focus: tan γ = sin θ/(n − cos θ) with tan θ = r/f. Losses at steps and tips are in `transmittance`.
 *
 * @returns False if the facet reflects the ray totally.
 */
function refractByGroove(x: number, y: number, f: number, design: number, n: number, dx: number, dy: number, sigma: number, out: Float64Array): boolean {
  const r = Math.sqrt(x * x + y * y);
  const theta = Math.atan2(r, f);
  const slope = Math.sin(theta) / (design - Math.cos(theta));
  const inverse = 1 / Math.sqrt(1 + slope * slope);
  const across = r > 0 ? (slope * inverse) / r : 0;
  facet.nx = across * x;
  facet.ny = across * y;
  facet.nz = -inverse;
  if (sigma > 0) tiltNormal(facet, sigma * gaussians[0]!, sigma * gaussians[1]!);
  const ix = dx / n;
  const iy = dy / n;
  const iz = -Math.sqrt(1 - ix * ix - iy * iy);
  const c = ix * facet.nx + iy * facet.ny + iz * facet.nz;
  const k = 1 - n * n * (1 - c * c);
  if (k <= 0 || c <= 0) return false;
  const a = Math.sqrt(k) - n * c;
  out[0] = n * ix + a * facet.nx;
  out[1] = n * iy + a * facet.ny;
  out[2] = n * iz + a * facet.nz;
  return out[2] < 0;
}

function fresnelTracer(optic: FresnelOptic, channels: readonly Channel[], sigma: number): (samples: Samples, launch: Launch, bundle: RayBundle) => void {
  const pick = channelPicker(channels);
  const design = indexForFocus(acrylic);
  const out = new Float64Array(3);
  return (samples, launch, bundle) => {
    const { u, sunX, sunY, sunZ, sunWeight } = samples;
    const { ledger } = bundle;
    for (let i = 0; i < samples.count; i++) {
      const x = optic.widthM * (u[0]![i]! - 0.5);
      const y = optic.heightM * (u[1]![i]! - 0.5);
      const w = launch.rayWeight * sunWeight[i]!;
      if (launch.blocked?.(x, y, 0, sunX[i]!, sunY[i]!, sunZ[i]!)) {
        ledger.blocked += w;
        continue;
      }
      if (sigma > 0) gaussPair(u[5]![i]!, u[6]![i]!, gaussians, 0);
      const passed = sunZ[i]! > 0 && refractByGroove(x, y, optic.focalLengthM, design, pick(u[4]![i]!).refractiveIndex, -sunX[i]!, -sunY[i]!, sigma, out);
      const power = passed ? optic.transmittance : 0;
      ledger.incident += w;
      ledger.transmitted += w * power;
      ledger.absorbed += w * (1 - power);
      if (passed) bundle.push(x, y, 0, out[0]!, out[1]!, out[2]!, w * power);
    }
  };
}

/** Fresnel sheet; O is its centre, local z looks to the sun. */
export function fresnelKernel(optic: FresnelOptic, sun: SunDisc, blockedIn: OcclusionTestOf): Kernel {
  const frame = frameAbout(fromAzimuthElevation(optic.axisAzimuthDeg, optic.axisElevationDeg));
  const towards = toLocal(frame, sun.direction);
  const slope = slopeError(optic);
  const channels = channelsOf(acrylic, 0.01);
  const blocked = blockedIn(frame);
  return {
    frame,
    focusKind: 'point',
    apertureM2: optic.widthM * optic.heightM * Math.max(0, towards[2]),
    focalAxis: [0, 0, -1],
    focalDistanceM: optic.focalLengthM,
    planeNormal: [0, 0, 1],
    imageFocalM: optic.focalLengthM,
    clearanceM: 0.02 * optic.focalLengthM,
    lineDirection: null,
    chiefDirection: [-towards[0], -towards[1], -towards[2]],
    dimensions: slope.sigmaRad > 0 ? 7 : 5,
    outputsPerRay: 1,
    transmittanceBound: optic.transmittance,
    backTrace: sheetLensBackTrace(optic, channels, indexForFocus(acrylic), slope.sigmaRad, { ...sun, direction: towards }, (...at) => blocked?.(...at) ?? false),
    assumptions: [...slope.assumptions, { field: 'material', value: 'acrylic, flat face to the sun', source: 'usual make of the sheet, common practice', verified: false }],
    warnings: towards[2] <= 0 ? ['The sun stands behind the sheet.'] : [],
    trace: fresnelTracer(optic, channels, slope.sigmaRad),
  };
}

/** Objective of a telescope as a thin ideal lens: light of one direction meets in one point of the focal plane. */
export function telescopeKernel(optic: TelescopeOptic, sun: SunDisc, blockedIn: OcclusionTestOf): Kernel {
  const frame = frameAbout(fromAzimuthElevation(optic.axisAzimuthDeg, optic.axisElevationDeg));
  const towards = toLocal(frame, sun.direction);
  const half = optic.diameterM / 2;
  const f = optic.focalLengthM;
  const blocked = blockedIn(frame);
  return {
    frame,
    focusKind: 'point',
    apertureM2: Math.PI * half * half * Math.max(0, towards[2]),
    focalAxis: [0, 0, -1],
    focalDistanceM: f,
    planeNormal: [0, 0, 1],
    imageFocalM: f,
    clearanceM: 0.02 * f,
    lineDirection: null,
    chiefDirection: [-towards[0], -towards[1], -towards[2]],
    dimensions: 4,
    outputsPerRay: 1,
    transmittanceBound: optic.transmittance,
    backTrace: objectiveBackTrace(optic, { ...sun, direction: towards }, (...at) => blocked?.(...at) ?? false),
    assumptions: [{ field: 'figure', value: 'thin ideal objective, focus of a mirror folded behind it', source: 'model', verified: true }],
    warnings: towards[2] <= 0 ? ['The sun stands behind the objective.'] : [],
    trace(samples, launch, bundle) {
      const { u, sunX, sunY, sunZ, sunWeight } = samples;
      for (let i = 0; i < samples.count; i++) {
        const r = half * Math.sqrt(u[0]![i]!);
        const x = r * Math.cos(2 * Math.PI * u[1]![i]!);
        const y = r * Math.sin(2 * Math.PI * u[1]![i]!);
        const w = launch.rayWeight * sunWeight[i]!;
        if (launch.blocked?.(x, y, 0, sunX[i]!, sunY[i]!, sunZ[i]!)) {
          bundle.ledger.blocked += w;
          continue;
        }
        if (sunZ[i]! <= 0) continue;
        const dx = (-f * sunX[i]!) / sunZ[i]! - x;
        const dy = (-f * sunY[i]!) / sunZ[i]! - y;
        const inverse = 1 / Math.sqrt(dx * dx + dy * dy + f * f);
        bundle.push(x, y, 0, dx * inverse, dy * inverse, -f * inverse, w * optic.transmittance);
        bundle.ledger.incident += w;
        bundle.ledger.transmitted += w * optic.transmittance;
        bundle.ledger.absorbed += w * (1 - optic.transmittance);
      }
    },
  };
}
