import { describe, expect, test } from 'vitest';
import { z } from 'zod';
import { focusModelOf } from '#app/physics/optics/closed-form/focus-model.ts';
import type { Optic } from '#app/physics/optics/optic.ts';
import { ballFocalLengthM, lensmakerFocalLengthM } from '#app/physics/optics/refraction.ts';
import { zoneAlong } from '#app/physics/reach.ts';
import { degree } from '#app/physics/units.ts';
import { fromAzimuthElevation } from '#app/physics/vector.ts';
import { checkRow, numbers, worstRelative } from './check-row.ts';

const halfAngle = 0.2665 * degree;

describe('focal lengths', () => {
  for (const [id, allowedMm] of [['ball-01', 0.002], ['ball-02', 0.01], ['ball-03', 0.01]] as const) {
    const row = checkRow(id, z.object({ D_mm: z.number(), n: z.number() }), z.object({ EFL_mm: z.number(), BFL_mm: z.number() }));
    test(row.name, () => {
      const radius = row.inputs.D_mm / 2;
      const focal = ballFocalLengthM(radius, row.inputs.n);
      expect(Math.abs(focal - row.expected.EFL_mm)).toBeLessThan(allowedMm);
      expect(Math.abs(focal - radius - row.expected.BFL_mm)).toBeLessThan(allowedMm);
    });
  }

  const lens = checkRow('lens-03', z.object({ R1_mm: z.number(), R2_mm: z.number(), t_mm: z.number(), n: z.number() }), z.object({ EFL_mm: z.number() }));
  test(lens.name, () => {
    const { R1_mm, R2_mm, t_mm, n } = lens.inputs;
    expect(Math.abs(lensmakerFocalLengthM(n, R1_mm, R2_mm, t_mm) - lens.expected.EFL_mm)).toBeLessThan(0.01);
  });

  const facade = checkRow('facade-01', z.object({ radius_m: numbers }), z.object({ paraxial_line_focus_m: numbers }));
  test(facade.name, () => {
    const got = facade.inputs.radius_m.map((radiusM) => focusModelOf({
      kind: 'facade', radiusM, chordM: 30, lengthM: 60, generators: 'vertical', reflectance: 0.3, axisAzimuthDeg: 180, axisElevationDeg: 0,
    }).focalLengthM);
    // The row prints one decimal.
    expect(worstRelative(got, facade.expected.paraxial_line_focus_m)).toBeLessThan(0.05 / 45);
  });
});

/** Concentration on the sharpest disc of the sun's image for a lossless surface slope. */
function onImage(optic: Optic, tiltDeg: number, imageM: number): number {
  const beam = focusModelOf(optic).beamFor(fromAzimuthElevation(180, 30 + tiltDeg), halfAngle);
  return beam === null ? Number.NaN : beam.concentration(beam.focusM, 0, imageM);
}

describe('closed forms against traced rows; the traced sun is limb-darkened, the closed one even', () => {
  const pose = { axisAzimuthDeg: 180, axisElevationDeg: 30, slopeErrorMrad: 0 } as const;

  test('trace-01: a glass sphere of 100 mm holds 2215 suns on its image disc, two independent codes; within 5 %', () => {
    const optic: Optic = { kind: 'sphere', diameterM: 0.1, slopeErrorMrad: 0, material: { name: 'explicit', refractiveIndex: 1.5168, absorptionPerM: 2 } };
    expect(worstRelative([onImage(optic, 0, 0.000683)], [2215])).toBeLessThan(0.05);
  });

  test('trace-04 and trace-05: a singlet of f/2.7 holds 1249 suns with its curved face to the sun, 673 with the flat; within 5 %', () => {
    const lens = (faceToSun: 'curved' | 'flat'): Optic => ({
      kind: 'lens', ...pose, diameterM: 0.0829, focalLengthM: 0.226, shape: 'plano-convex', faceToSun, centreThicknessM: 0.01,
      material: { name: 'explicit', refractiveIndex: 1.49, absorptionPerM: 0 },
    });
    expect(worstRelative([onImage(lens('curved'), 0, 0.0021), onImage(lens('flat'), 0, 0.0021)], [1249, 673])).toBeLessThan(0.05);
  });

  test('trace-07: a spherical mirror holds 877 suns on axis and 461 at 15°; within 5 % and 25 %', () => {
    const mirror: Optic = { kind: 'concave-mirror', ...pose, figure: 'spherical', diameterM: 0.15, radiusM: 1, reflectance: 0.85 };
    expect(worstRelative([onImage(mirror, 0, 0.00465)], [877])).toBeLessThan(0.05);
    expect(worstRelative([onImage(mirror, 15, 0.00465)], [461])).toBeLessThan(0.25);
  });

  test('trace-08: a dish 5° off the sun still holds 5690 suns; within 10 %', () => {
    const dish: Optic = { kind: 'dish', ...pose, figure: 'parabolic', diameterM: 0.6, radiusM: 0.5, reflectance: 0.85 };
    expect(worstRelative([onImage(dish, 5, 0.00233)], [5690])).toBeLessThan(0.1);
  });

  test('trace-13: water 100 mm deep in a bowl of R 140 mm puts 224 suns on 5 mm under a sun 28.6° off the zenith; within 10 %', () => {
    const bowl: Optic = { kind: 'bowl', radiusM: 0.14, liquidDepthM: 0.1, slopeErrorMrad: 5, material: { name: 'explicit', refractiveIndex: 1.333, absorptionPerM: 3 } };
    const beam = focusModelOf(bowl).beamFor(fromAzimuthElevation(0, 90 - 28.6), halfAngle);
    const planeM = (0.14 + 0.356) / -(beam?.direction[2] ?? -1);
    // The deck is level, the row's disc lies in it.
    expect(worstRelative([(beam?.concentration(planeM, 0, 0.005) ?? 0) * -(beam?.direction[2] ?? 0)], [224])).toBeLessThan(0.1);
  });

  test('trace-11: a square pane bowed 3 mm gives 0.73, 2.2, 10.7, 16.1 and 4.9 suns at 2 to 10 m; within 15 %', () => {
    const pane: Optic = { kind: 'bowed-pane', slopeErrorMrad: 0, axisAzimuthDeg: 180, axisElevationDeg: 0, widthM: 0.6, heightM: 0.6, centreBowM: 0.003, reflectance: 0.35 };
    const beam = focusModelOf(pane).beamFor(fromAzimuthElevation(180, 0), halfAngle);
    const got = [2, 4, 6, 8, 10].map((z) => beam?.concentration(z, 0, 0.02) ?? 0);
    expect(worstRelative(got, [0.73, 2.2, 10.7, 16.1, 4.9])).toBeLessThan(0.15);
  });
});

describe('along the beam', () => {
  const depth = checkRow('depth-01', z.object({ transmittance: z.number(), dni_W_m2: z.number(), threshold_kW_m2: numbers }), z.object({ half_depth_over_f: numbers }));
  test(depth.name, () => {
    const { transmittance, dni_W_m2, threshold_kW_m2 } = depth.inputs;
    const focalLengthM = 1;
    const beam = focusModelOf({
      kind: 'telescope', slopeErrorMrad: 0, diameterM: 0.25, focalLengthM, transmittance, axisAzimuthDeg: 180, axisElevationDeg: 30,
    }).beamFor(fromAzimuthElevation(180, 30), 1e-5);
    const got = threshold_kW_m2.map((threshold) => {
      const zone = beam === null ? null : zoneAlong(beam, (threshold * 1000) / dni_W_m2, 0.005);
      return zone === null ? Number.NaN : (zone.farM - zone.nearM) / 2 / focalLengthM;
    });
    // The row neglects the sun's image; a sun of 2e-5 rad and the 5 mm disc leave half a percent.
    expect(worstRelative(got, depth.expected.half_depth_over_f)).toBeLessThan(0.01);
  });

  const burning = checkRow('trade-02', z.object({ clear_area_cm2: z.number(), concentration: z.number() }), z.object({ implied_image_diameter_mm: z.number(), implied_focal_length_mm: z.number() }));
  test(burning.name, () => {
    const { clear_area_cm2, concentration } = burning.inputs;
    const imageMm = Math.sqrt((4 * clear_area_cm2 * 100) / concentration / Math.PI);
    expect(worstRelative([imageMm, imageMm / 0.0093], [burning.expected.implied_image_diameter_mm, burning.expected.implied_focal_length_mm])).toBeLessThan(0.01);
  });
});
