import { describe, expect, test } from 'vitest';
import { z } from 'zod';
import { solarTemperatureK, stefanBoltzmann } from '#app/physics/constants.ts';
import { angularDiameterDeg, concentrationLimit, halfAngleRad, meanOverCentre, powerFractionInside } from '#app/physics/sun/sun-disc.ts';
import { degree } from '#app/physics/units.ts';
import { checkRow, numbers, worstRelative } from './check-row.ts';

describe('size and brightness of the disc', () => {
  for (const [id, allowed] of [['angsize-01', 1e-4], ['angsize-02', 3e-4], ['angsize-03', 3e-4]] as const) {
    const row = checkRow(id, z.object({ distance_au: z.number() }), z.object({ angular_diameter_deg: z.number() }));
    test(row.name, () => {
      expect(Math.abs(angularDiameterDeg(row.inputs.distance_au) - row.expected.angular_diameter_deg)).toBeLessThan(allowed);
    });
  }

  const image = checkRow('angsize-04', z.object({ focal_length_m: numbers, distance_au: z.number() }), z.object({ image_diameter_mm: numbers }));
  test(image.name, () => {
    const got = image.inputs.focal_length_m.map((focal) => 1000 * focal * angularDiameterDeg(image.inputs.distance_au) * degree);
    expect(worstRelative(got, image.expected.image_diameter_mm)).toBeLessThan(0.002);
  });

  const half = checkRow('trade-05', z.object({ f_mm: z.number() }), z.object({ image_diameter_mm: z.number() }));
  test(half.name, () => {
    expect(worstRelative([half.inputs.f_mm * angularDiameterDeg(1) * degree], [half.expected.image_diameter_mm])).toBeLessThan(0.005);
  });

  const limb = checkRow('limb-01', z.object({ u: z.number() }), z.object({ mean_over_centre: z.number(), centre_over_mean: z.number(), power_fraction_inside_half_radius: z.number() }));
  test(limb.name, () => {
    const { u } = limb.inputs;
    expect(Math.abs(meanOverCentre(u) - limb.expected.mean_over_centre)).toBeLessThan(1e-3);
    expect(Math.abs(1 / meanOverCentre(u) - limb.expected.centre_over_mean)).toBeLessThan(1e-3);
    expect(Math.abs(powerFractionInside(0.5, u) - limb.expected.power_fraction_inside_half_radius)).toBeLessThan(1e-3);
  });
});

describe('limits of concentration', () => {
  const mean = checkRow('conc-01', z.object({ angular_diameter_deg: z.number() }), z.object({ Cmax_air: z.number() }));
  test(mean.name, () => {
    expect(worstRelative([concentrationLimit(halfAngleRad(1))], [mean.expected.Cmax_air])).toBeLessThan(0.002);
    expect(worstRelative([concentrationLimit((mean.inputs.angular_diameter_deg / 2) * degree)], [mean.expected.Cmax_air])).toBeLessThan(0.002);
  });

  const ends = checkRow('conc-02', z.object({ angular_diameter_deg: numbers, n: z.number() }), z.object({ Cmax_air_perihelion: z.number(), Cmax_air_aphelion: z.number(), Cmax_n1p5_mean: z.number() }));
  test(ends.name, () => {
    const got = ends.inputs.angular_diameter_deg.map((diameter) => concentrationLimit((diameter / 2) * degree));
    expect(worstRelative(got, [ends.expected.Cmax_air_perihelion, ends.expected.Cmax_air_aphelion])).toBeLessThan(0.002);
    expect(worstRelative([concentrationLimit(halfAngleRad(1), ends.inputs.n)], [ends.expected.Cmax_n1p5_mean])).toBeLessThan(0.002);
  });

  const ideal = checkRow('conc-03', z.object({ D_mm: z.number(), f_mm: z.number(), angular_diameter_rad: z.number() }), z.object({ C_geometric: z.number() }));
  test(ideal.name, () => {
    const { D_mm, f_mm, angular_diameter_rad } = ideal.inputs;
    expect(worstRelative([(D_mm / (f_mm * angular_diameter_rad)) ** 2], [ideal.expected.C_geometric])).toBeLessThan(0.005);
  });

  const black = checkRow('conc-04', z.object({ flux_W_m2: numbers }), z.object({ T_blackbody_K: numbers }));
  test(black.name, () => {
    expect(worstRelative(black.inputs.flux_W_m2.map((flux) => (flux / stefanBoltzmann) ** 0.25), black.expected.T_blackbody_K)).toBeLessThan(0.001);
  });

  const paper = checkRow('trade-03', z.object({}), z.object({ temperature_K_at_least: z.number(), blackbody_flux_W_m2: z.number() }));
  test(paper.name, () => {
    expect(worstRelative([stefanBoltzmann * paper.expected.temperature_K_at_least ** 4], [paper.expected.blackbody_flux_W_m2])).toBeLessThan(0.001);
  });

  const effective = checkRow('conc-05', z.object({ C: z.number(), Cmax: z.number(), T_sun_K: z.number(), atmospheric_transmission: numbers }), z.object({ T_eff_K: numbers }));
  test(effective.name, () => {
    const { C, Cmax, T_sun_K, atmospheric_transmission } = effective.inputs;
    expect(solarTemperatureK).toBe(T_sun_K);
    const got = atmospheric_transmission.map((share) => solarTemperatureK * ((share * C) / Cmax) ** 0.25);
    expect(worstRelative(got, effective.expected.T_eff_K)).toBeLessThan(0.002);
  });

  const large = checkRow('trade-04', z.object({}), z.object({ T_over_K: z.number(), C_needed_lossless: z.number() }));
  test(large.name, () => {
    const needed = concentrationLimit(halfAngleRad(1)) * (large.expected.T_over_K / solarTemperatureK) ** 4;
    expect(worstRelative([needed], [large.expected.C_needed_lossless])).toBeLessThan(0.01);
  });
});
