import { describe, expect, test } from 'vitest';
import { radiusFromSagitta, withRadius } from '#app/domain/sagitta.ts';
import { opticSchema } from '#app/domain/scene.ts';

describe('a radius from a straightedge', () => {
  test.each([[8, 2, 5], [6, 1, 5], [24, 8, 13]])('chord %d and gap %d belong to a circle of radius %d: right triangles of whole numbers', (over, gap, radius) => {
    expect(radiusFromSagitta({ value: over * 1000 }, { value: gap * 1000 })?.radiusM).toBeCloseTo(radius, 12);
  });

  test('half a circle is the deepest gap; a deeper one has no answer', () => {
    expect(radiusFromSagitta({ value: 2000 }, { value: 1000 })?.radiusM).toBeCloseTo(1, 12);
    expect(radiusFromSagitta({ value: 2000 }, { value: 1001 })).toBeNull();
  });

  test('the ± is what moving each measure by its own ± changes, added as squares', () => {
    const [w, s, dw, ds] = [548, 32, 2, 1];
    const radius = (over: number, gap: number) => (over * over) / (8 * gap) + gap / 2;
    const byHand = Math.hypot((radius(w + dw / 100, s) - radius(w, s)) * 100, (radius(w, s + ds / 100) - radius(w, s)) * 100) / 1000;
    expect(radiusFromSagitta({ value: w, plusMinus: dw }, { value: s, plusMinus: ds })?.plusMinusM).toBeCloseTo(byHand, 4);
  });

  test('is not given a ± when one of the two has none', () => {
    expect(radiusFromSagitta({ value: 548, plusMinus: 2 }, { value: 32 })?.plusMinusM).toBeNull();
  });
});

describe('an optic measured by a straightedge', () => {
  const m = (value: number, method = 'measured') => ({ value, plusMinus: 1, method });
  test('gets its radius, with the rougher of the two methods', () => {
    const optic = opticSchema.parse({ kind: 'metal-trim', sagittaOverMm: m(8000), sagittaMm: m(2000, 'photo') });
    expect(withRadius(optic).radiusOfCurvatureM).toMatchObject({ value: 5, method: 'photo' });
  });
  test('keeps a radius that was measured itself', () => {
    const optic = opticSchema.parse({ kind: 'metal-trim', sagittaOverMm: m(8000), sagittaMm: m(2000), radiusOfCurvatureM: { value: 1.2, method: 'maker' } });
    expect(withRadius(optic).radiusOfCurvatureM?.value).toBe(1.2);
  });
});
