import type { Measured, SceneOptic } from './scene.ts';

/** Radius of a round curve with its one-sigma uncertainty. */
export interface RadiusFromSagitta {
  readonly radiusM: number;
  readonly plusMinusM: number | null;
}

/**
 * Radius of a circle from a straightedge laid across it: R = w² ÷ 8s + s ÷ 2, by the theorem of Pythagoras on half the
 * chord. The two ± are carried through as independent.
 *
 * @param overMm Length w of the chord. [mm] > 0
 * @param sagittaMm Gap s under its middle. [mm] 0 < s ≤ w ÷ 2
 * @returns null where the gap is too deep for a chord of that length.
 */
export function radiusFromSagitta(over: Pick<Measured, 'value' | 'plusMinus'>, sagitta: Pick<Measured, 'value' | 'plusMinus'>): RadiusFromSagitta | null {
  const [w, s] = [over.value, sagitta.value];
  if (!(w > 0 && s > 0 && s <= w / 2)) return null;
  const radiusMm = (w * w) / (8 * s) + s / 2;
  const known = over.plusMinus !== undefined && sagitta.plusMinus !== undefined;
  const plusMinusMm = known ? Math.hypot((w / (4 * s)) * (over.plusMinus ?? 0), (0.5 - (w * w) / (8 * s * s)) * (sagitta.plusMinus ?? 0)) : null;
  return { radiusM: radiusMm / 1000, plusMinusM: plusMinusMm === null ? null : plusMinusMm / 1000 };
}

const rough = ['estimated', 'assumed', 'reported', 'photo'] as const;

/** The optic with its radius worked out from the straightedge, where neither radius nor focal length was measured. */
export function withRadius(optic: SceneOptic): SceneOptic {
  const { sagittaMm, sagittaOverMm } = optic;
  if (optic.radiusOfCurvatureM || optic.focalLengthMm || !sagittaMm || !sagittaOverMm) return optic;
  const worked = radiusFromSagitta(sagittaOverMm, sagittaMm);
  if (!worked) return optic;
  const method = rough.find((one) => one === sagittaMm.method || one === sagittaOverMm.method) ?? sagittaMm.method;
  const value = Number(worked.radiusM.toPrecision(4));
  return { ...optic, radiusOfCurvatureM: { value, method, ...(worked.plusMinusM === null ? {} : { plusMinus: Number(worked.plusMinusM.toPrecision(2)) }) } };
}
