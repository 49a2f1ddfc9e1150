import { describe, expect, test } from 'vitest';
import type { LensOptic } from '#app/physics/optics/optic.ts';
import { obliqueMirrorFociM } from '#app/physics/optics/refraction.ts';
import { cutPlane, emptyHits } from '#app/physics/optics/trace/bundle.ts';
import { aluminiumSolarReflectance } from '#app/physics/optics/trace/spectral.ts';
import { traceBundle } from '#app/physics/optics/trace/trace-bundle.ts';
import { Check, outside } from './trace-rows.ts';

describe('closed forms beside the tracer', () => {
  const oblique = new Check('cod-01');
  test(oblique.name, () => {
    const tangential = oblique.numbers('f_tangential_m');
    const sagittal = oblique.numbers('f_sagittal_m');
    const misses = [0, 30, 50].flatMap((degrees, i) => {
      const actual = obliqueMirrorFociM(13.2, (degrees * Math.PI) / 180);
      const [t, s] = [tangential[i] ?? NaN, sagittal[i] ?? NaN];
      return [outside(actual.tangentialM, t, oblique.tolerance(t)), outside(actual.sagittalM, s, oblique.tolerance(s))];
    });
    expect(misses).toEqual(Array.from({ length: 6 }, () => null));
  });

  const metal = new Check('refl-01');
  test(metal.name, () => {
    expect(outside(aluminiumSolarReflectance(), metal.number('solar_reflectance'), metal.tolerance(1))).toBeNull();
  });
});

/** Smallest circle that holds all rays of a point-like sun behind a lens of f 100 mm at f/5 with a sharp edge. */
function leastConfusionMm(faceToSun: 'curved' | 'flat'): number {
  const radius = 0.1 * 0.5168;
  const optic: LensOptic = {
    kind: 'lens',
    shape: 'plano-convex',
    faceToSun,
    diameterM: 0.02,
    focalLengthM: 0.1,
    centreThicknessM: radius - Math.sqrt(radius * radius - 1e-4),
    slopeErrorMrad: 0,
    axisAzimuthDeg: 0,
    axisElevationDeg: 90,
    material: { name: 'explicit', refractiveIndex: 1.5168, absorptionPerM: 0 },
  };
  const traced = traceBundle({ optic, sunDirection: [0, 0, 1], sunHalfAngleRad: 1e-8, seed: 5, rays: 20000, receiver: { kind: 'best plane' } });
  const hits = emptyHits(traced.bundle.capacity);
  let smallest = Infinity;
  for (let z = 0.095; z < 0.101; z += 0.00001) {
    cutPlane(traced.bundle, { origin: [0, 0, -z], normal: [0, 0, 1] }, hits);
    let widest = 0;
    for (let i = 0; i < hits.count; i++) widest = Math.max(widest, Math.hypot(hits.x[i] ?? 0, hits.y[i] ?? 0));
    smallest = Math.min(smallest, widest);
  }
  return 2000 * smallest;
}

describe('least confusion of a plano-convex lens', () => {
  const check = new Check('blur-01');
  test(check.name, () => {
    const curved = check.number('least_confusion_blur_mm_curved_to_sun');
    const flat = check.number('least_confusion_blur_mm_flat_to_sun');
    expect(outside(leastConfusionMm('curved'), curved, check.tolerance(curved))).toBeNull();
    expect(outside(leastConfusionMm('flat'), flat, check.tolerance(flat))).toBeNull();
  });
});
