import { describe, expect, test } from 'vitest';
import type { CylinderOptic } from '#app/physics/optics/optic.ts';
import { hotDiscIn, stripAt } from '#app/physics/optics/trace/measure.ts';
import type { TracedOptic } from '#app/physics/optics/trace/trace-bundle.ts';
import { traceBundle } from '#app/physics/optics/trace/trace-bundle.ts';
import { Check, outside, rowSun } from './trace-rows.ts';

describe('traced water bottle', () => {
  // Long enough that the ends do not reach the strip; the rows hold per unit of length.
  const optic: CylinderOptic = {
    kind: 'cylinder',
    diameterM: 0.065,
    lengthM: 1,
    slopeErrorMrad: 0,
    axisAzimuthDeg: 90,
    axisElevationDeg: 0,
    material: { name: 'explicit', refractiveIndex: 1.333, absorptionPerM: 3 },
  };

  const lit = (skewDeg: number): TracedOptic => {
    const skew = (skewDeg * Math.PI) / 180;
    return traceBundle({ ...rowSun, optic, sunDirection: [Math.sin(skew), 0, Math.cos(skew)], receiver: { kind: 'best plane' }, rays: 200_000, seed: 7 });
  };
  const transmitted = ({ bundle }: TracedOptic): number => bundle.ledger.transmitted / bundle.ledger.incident;

  /** 1 mm strip, 0.4 m long, round the place where the ray through the middle of the axis comes down. */
  const strip = (traced: TracedOptic, skewDeg: number, planeM: number): number => {
    const centre = [-planeM * Math.tan((skewDeg * Math.PI) / 180), 0, -planeM] as const;
    return stripAt(traced, { origin: [0, 0, -planeM], normal: [0, 0, 1] }, centre, [1, 0, 0], 0.001, 0.4).concentration;
  };

  const straight = new Check('trace-09');
  test(`trace-09, sun across the axis: ${straight.name}`, () => {
    const planeMm = straight.number('best_line_plane_from_axis_mm');
    const expected = straight.number('mean_C_in_1mm_wide_line');
    const traced = lit(0);
    const planes = Array.from({ length: 33 }, (_, i) => 0.053 + 0.0005 * i);
    const found = planes.map((z) => ({ z, concentration: strip(traced, 0, z) }));
    const best = found.reduce((a, b) => (b.concentration > a.concentration ? b : a));
    expect(outside(transmitted(traced), straight.number('transmitted_fraction'), straight.tolerance(1, 'T'))).toBeNull();
    expect(outside(best.concentration, expected, straight.tolerance(expected, 'C'))).toBeNull();
    expect(outside(1000 * best.z, planeMm, straight.tolerance(planeMm, 'plane'))).toBeNull();
  });

  const skew = new Check('trace-10');
  test(`trace-10, sun 60° out of the plane across: ${skew.name}`, () => {
    const expected = skew.number('mean_C_in_1mm_wide_line');
    const traced = lit(60);
    const concentration = strip(traced, 60, skew.number('line_plane_from_axis_mm') / 1000);
    expect(outside(transmitted(traced), skew.number('transmitted_fraction'), skew.tolerance(1, 'T'))).toBeNull();
    expect(outside(concentration, expected, skew.tolerance(expected, 'C'))).toBeNull();
  });
});

describe('traced bowl, part filled', () => {
  const check = new Check('trace-13');
  test(check.name, () => {
    const zenith = (28.6 * Math.PI) / 180;
    const traced = traceBundle({
      ...rowSun,
      optic: { kind: 'bowl', radiusM: 0.14, liquidDepthM: 0.1, slopeErrorMrad: 5, material: { name: 'explicit', refractiveIndex: 1.333, absorptionPerM: 3 } },
      sunDirection: [0, -Math.sin(zenith), Math.cos(zenith)],
      receiver: { kind: 'best plane' },
      rays: 400_000,
      seed: 2,
    });
    const deck = { origin: [0, 0, -0.14 - 0.356], normal: [0, 0, 1] } as const;
    const misses = [2.5, 5, 10].map((radiusMm) => {
      const expected = check.number(`mean_C_radius_${String(radiusMm).replace('.', 'p')}mm`);
      return outside(hotDiscIn(traced, deck, (2 * radiusMm) / 1000).concentration, expected, check.tolerance(expected, 'C'));
    });
    expect(misses).toEqual([null, null, null]);
    const { centre } = hotDiscIn(traced, deck, 0.005);
    const offset = check.number('hot_spot_offset_mm');
    expect(outside(1000 * Math.hypot(centre[0], centre[1]), offset, check.tolerance(offset, 'offset'))).toBeNull();
  });
});
