import { describe, expect, test } from 'vitest';
import type { LensOptic, SphereOptic } from '#app/physics/optics/optic.ts';
import { discAt } from '#app/physics/optics/trace/measure.ts';
import { traceBundle } from '#app/physics/optics/trace/trace-bundle.ts';
import { measureFocus } from '#app/physics/optics/trace/trace-focus.ts';
import type { TraceRequest } from '#app/physics/optics/trace/trace-model.ts';
import { Check, outside, rowSun } from './trace-rows.ts';

const low = { ...rowSun, seed: 11, rays: 200_000, receiver: { kind: 'best plane' }, gridCells: 0 } as const;

function sphere(diameterM: number, refractiveIndex: number, absorptionPerM: number): SphereOptic {
  return { kind: 'sphere', diameterM, slopeErrorMrad: 0, material: { name: 'explicit', refractiveIndex, absorptionPerM } };
}

describe('traced spheres', () => {
  const cases = [
    { id: 'trace-01', optic: sphere(0.1, 1.5168, 2), concentration: 'mean_C_in_image_disc_radius_0p3413mm' },
    { id: 'trace-02', optic: sphere(0.1, 1.333, 3), concentration: 'mean_C_in_image_disc_radius_0p4655mm' },
    { id: 'trace-03', optic: sphere(0.28, 1.333, 3), concentration: 'mean_C_in_image_disc_radius_1p3033mm' },
  ];
  for (const { id, optic, concentration } of cases) test(`${id}: two independent ray tracers, image disc in its best plane`, () => {
    const check = new Check(id);
    const request: TraceRequest = { ...low, optic, sunDirection: [0.6, 0, 0.8] };
    const result = measureFocus(request, traceBundle(request));
    const [image] = result.bestPlanes;
    const c = check.number(concentration);
    const plane = check.number('best_plane_from_centre_mm');
    expect(outside(result.transmittedFraction, check.number('transmitted_fraction'), check.tolerance(1, 'T'))).toBeNull();
    expect(outside(image?.concentration ?? NaN, c, check.tolerance(c, 'C'))).toBeNull();
    expect(outside(1000 * (image?.distanceM ?? NaN), plane, check.tolerance(plane, 'plane'))).toBeNull();
  });

  const glass = new Check('trace-01');
  test('trace-01: two independent ray tracers, same disc in the paraxial plane', () => {
    const traced = traceBundle({ ...low, optic: sphere(0.1, 1.5168, 2), sunDirection: [0, 0, 1] });
    const z = traced.kernel.focalDistanceM;
    const c = glass.number('mean_C_same_disc_at_paraxial_plane');
    const { concentration } = discAt(traced, { origin: [0, 0, -z], normal: [0, 0, 1] }, [0, 0, -z], 2 * 0.0003413);
    expect(outside(concentration, c, glass.tolerance(c, 'C'))).toBeNull();
  });

  const water = new Check('trace-02');
  test('trace-02: two independent ray tracers, 5 mm disc in its own best plane', () => {
    const request: TraceRequest = { ...low, optic: sphere(0.1, 1.333, 3), sunDirection: [0, 0, 1] };
    const wide = measureFocus(request, traceBundle(request)).bestPlanes[2];
    const c = water.number('mean_C_5mm_diameter');
    const plane = water.number('best_plane_5mm_spot_mm');
    expect(outside(wide?.concentration ?? NaN, c, water.tolerance(c, 'C'))).toBeNull();
    expect(outside(1000 * (wide?.distanceM ?? NaN), plane, water.tolerance(plane, 'plane'))).toBeNull();
  });
});

describe('traced plano-convex lens', () => {
  const optic: LensOptic = {
    kind: 'lens',
    shape: 'plano-convex',
    faceToSun: 'curved',
    diameterM: 0.0829,
    focalLengthM: 0.11074 / 0.49,
    centreThicknessM: 0.012,
    slopeErrorMrad: 0,
    axisAzimuthDeg: 0,
    axisElevationDeg: 90,
    material: { name: 'explicit', refractiveIndex: 1.49, absorptionPerM: 2 },
  };

  const cases = [
    { id: 'trace-04', faceToSun: 'curved', tiltDeg: 0 },
    { id: 'trace-05', faceToSun: 'flat', tiltDeg: 0 },
    { id: 'trace-06', faceToSun: 'curved', tiltDeg: 20 },
  ] as const;
  for (const { id, faceToSun, tiltDeg } of cases) test(`${id}: two independent ray tracers, ${faceToSun} face to a sun ${tiltDeg}° off the axis`, () => {
    const check = new Check(id);
    const tilt = (tiltDeg * Math.PI) / 180;
    const request: TraceRequest = { ...low, lensOrigin: 'first-vertex', optic: { ...optic, faceToSun }, sunDirection: [Math.sin(tilt), 0, Math.cos(tilt)] };
    const result = measureFocus(request, traceBundle(request));
    const [image] = result.bestPlanes;
    const c = check.number('mean_C_in_disc_radius_1p0512mm_best_plane');
    const plane = check.number('best_plane_mm_from_first_vertex_or_flat');
    expect(outside(result.transmittedFraction, check.number('transmitted_fraction'), check.tolerance(1, 'T'))).toBeNull();
    expect(outside(image?.concentration ?? NaN, c, check.tolerance(c, 'C'))).toBeNull();
    expect(outside(1000 * (image?.distanceM ?? NaN), plane, check.tolerance(plane, 'plane'))).toBeNull();
  });
});
