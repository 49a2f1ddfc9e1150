import { describe, expect, test } from 'vitest';
import type { PaneOptic } from '#app/physics/optics/optic.ts';
import { backTracedDiscAt, discAt, hotDiscIn } from '#app/physics/optics/trace/measure.ts';
import type { TracedOptic } from '#app/physics/optics/trace/trace-bundle.ts';
import { traceBundle } from '#app/physics/optics/trace/trace-bundle.ts';
import type { Vector } from '#app/physics/vector.ts';
import { Check, outside, rowSun } from './trace-rows.ts';

const optic: PaneOptic = {
  kind: 'bowed-pane',
  widthM: 0.6,
  heightM: 0.6,
  centreBowM: 0.003,
  reflectance: 0.35,
  slopeErrorMrad: 0,
  axisAzimuthDeg: 180,
  axisElevationDeg: 0,
};

/** Pane that looks south, sun at an angle of incidence to the east of it in the horizontal plane. */
function lit(incidenceDeg: number): { traced: TracedOptic; chief: Vector } {
  const i = (incidenceDeg * Math.PI) / 180;
  const traced = traceBundle({ ...rowSun, optic, sunDirection: [Math.sin(i), -Math.cos(i), 0], receiver: { kind: 'best plane' }, angularReflectance: 'constant', rays: 400_000, seed: 9 });
  return { traced, chief: [-Math.sin(i), -Math.cos(i), 0] };
}

const along = (v: Vector, distance: number): Vector => [v[0] * distance, v[1] * distance, v[2] * distance];

describe('traced bowed pane', () => {
  const cases = [
    { id: 'trace-11', incidenceDeg: 0, distancesM: [2, 4, 6, 8, 10, 14] },
    { id: 'trace-12', incidenceDeg: 50, distancesM: [2, 4, 5, 8, 10, 14] },
  ];
  for (const { id, incidenceDeg, distancesM } of cases) test(`${id}: forward trace by one code, back-traced by another, 20 mm disc on the central ray`, () => {
    const check = new Check(id);
    const expected = check.numbers('C_20mm_disc_centred_on_chief_ray');
    const { traced, chief } = lit(incidenceDeg);
    const misses = distancesM.flatMap((distance, k) => {
      const centre = along(chief, distance);
      const plane = { origin: centre, normal: along(chief, -1) };
      const e = expected[k] ?? NaN;
      const forward = discAt(traced, plane, centre, 0.02);
      const back = backTracedDiscAt(traced, plane, centre, 0.02, 2 ** 19, 1);
      return [
        outside(back?.concentration ?? NaN, e, check.tolerance(e)),
        // Few rays fall on so small a disc: the forward answer is held to the row's tolerance plus twice its own noise.
        outside(forward.concentration, e, check.tolerance(e) + 2 * forward.stdError),
      ];
    });
    expect(misses).toEqual(distancesM.flatMap(() => [null, null]));
  });

  const check = new Check('trace-11');
  test('trace-11: forward trace by one code, back-traced by another, 20 mm disc on its hot spot', () => {
    const expected = check.numbers('C_20mm_disc_hot_spot_in_incidence_plane');
    const { traced, chief } = lit(0);
    const misses = [6, 8, 10].map((distance, k) => {
      const e = expected[k + 2] ?? NaN;
      const origin = along(chief, distance);
      const { concentration } = hotDiscIn(traced, { origin, normal: along(chief, -1) }, 0.02);
      return outside(concentration, e, distance === 10 ? 0.08 * e : check.tolerance(e));
    });
    expect(misses).toEqual([null, null, null]);
  });
});
