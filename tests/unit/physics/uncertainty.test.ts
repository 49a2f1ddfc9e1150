import { describe, expect, test } from 'vitest';
import { focusModelOf } from '#app/physics/optics/closed-form/focus-model.ts';
import { samplePlan, stateFor, type SamplingPlan } from '#app/physics/uncertainty.ts';

const beam = focusModelOf({ kind: 'sphere', diameterM: 0.1, material: { name: 'crown-glass' } }).beamFor([0, 0, 1], 0.00465);
if (beam === null) throw new Error('A sphere has a beam for every sun.');

const exact: SamplingPlan = {
  track: [{ levelM: 0, uprightM: 0, alongM: 0.068 }], motionLevel: 1, motionUpright: 0, speedMPerS: 5e-6, lineAcross: null,
  sigmaLevelM: 0, sigmaUprightM: 0, sigmaAxialM: 0, sigmaClockS: 0, sigmaOpticRel: 0, beam: { kind: 'relative', likelyWm2: 800, sigma: 0 },
  transmittance: 1, sigmaTransmittanceRel: 0, sigmaThroughputRel: 0, lnPerSlopeSigma: 0, ignition: null, lateralToleranceM: 0.003, markHalfM: 0, nearM: 0.05, farM: 0.08,
  concentrationAt: ({ alongM, levelM, uprightM, opticScale }) => beam.concentration(alongM / opticScale, Math.hypot(levelM, uprightM), 0.005),
};

describe('sampling', () => {
  test('without any uncertainty gives the closed form itself in every percentile', () => {
    const sampling = samplePlan(exact, 256, 1);
    const flux = (beam.concentration(0.068, 0, 0.005) * 800) / 1000;
    for (const value of Object.values(sampling.fluxKwm2)) expect(Math.abs(value / flux - 1)).toBeLessThan(1e-9);
    expect(sampling.aligned).toBe(1);
  });

  test('a rougher survey aligns less often, as the normal law says', () => {
    const share = (sigma: number): number => samplePlan({ ...exact, sigmaLevelM: sigma, sigmaUprightM: sigma }, 4096, 1).aligned;
    // In two dimensions the share within r is 1 − exp(−r²/2σ²).
    expect(share(0.003)).toBeCloseTo(1 - Math.exp(-0.5), 2);
    expect(share(0.001)).toBeCloseTo(1 - Math.exp(-4.5), 2);
  });

  test('the spread of the beam comes through as the normal law says', () => {
    const { fluxKwm2 } = samplePlan({ ...exact, beam: { kind: 'relative', likelyWm2: 800, sigma: 0.1 } }, 4096, 2);
    expect(fluxKwm2.high / fluxKwm2.mid).toBeCloseTo(1.1645, 2);
    expect(fluxKwm2.low / fluxKwm2.mid).toBeCloseTo(0.8355, 2);
  });

  test('a longer clear stretch along the track leaves only the offset across it', () => {
    const track = Array.from({ length: 61 }, (_unused, k) => ({ levelM: (k - 30) * 0.0003, uprightM: 0, alongM: 0.068 }));
    const state = stateFor({ ...exact, track, sigmaLevelM: 0.002, sigmaUprightM: 0.002 }, (index) => (index <= 1 ? 1 : 0));
    expect(state.lateralM).toBeCloseTo(0.002, 6);
  });

  test('the share that ignites within the dwell is that of the normal law of times', () => {
    // Every sample would take 100 s ± 30 %; a dwell of 130 s is one sigma longer: 84.13 % (printed table of the normal distribution).
    const { ignited } = samplePlan({ ...exact, ignition: { secondsAt: () => 100, dwellS: () => 130 } }, 4096, 4);
    expect(ignited).toBeCloseTo(0.8413, 2);
    expect(samplePlan({ ...exact, ignition: { secondsAt: () => null, dwellS: () => 130 } }, 256, 4).ignited).toBe(0);
    expect(samplePlan(exact, 256, 4).ignited).toBeNull();
  });

  test('the median of half the samples is within 1 % of that of all', () => {
    const { fluxKwm2, halfMedianKwm2 } = samplePlan({ ...exact, sigmaLevelM: 0.002, beam: { kind: 'relative', likelyWm2: 800, sigma: 0.1 } }, 4096, 5);
    expect(Math.abs(halfMedianKwm2 / fluxKwm2.mid - 1)).toBeLessThan(0.01);
  });

  test('the tornado names the input with the greatest effect first', () => {
    const { tornado } = samplePlan({ ...exact, sigmaLevelM: 0.004, beam: { kind: 'relative', likelyWm2: 800, sigma: 0.02 } }, 256, 3);
    expect(tornado[0]?.input).toBe('bearing of the mark');
    expect(tornado[1]?.input).toBe('aerosol or measured beam');
    expect((tornado[1]?.highKwm2 ?? 0) / (tornado[1]?.lowKwm2 ?? 1)).toBeCloseTo(1.02 / 0.98, 3);
  });
});
