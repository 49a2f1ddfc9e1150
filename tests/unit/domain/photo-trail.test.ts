import { describe, expect, test } from 'vitest';
import { photoTrail } from '#app/domain/photo-trail.ts';
import type { PhotoClicks } from '#app/domain/photo-measure.ts';
import { facingOf } from '#app/domain/run-beam.ts';
import type { BeamView } from '#app/domain/run-beam.ts';
import { fromAzimuthElevation } from '#app/physics/vector.ts';

/** A wall that looks south: right is east. The spot stands 10 mm east and 5 mm above the mark. */
const beam: BeamView = {
  focusKind: 'point', reflects: false, outline: { ball: null, body: [], lines: [], entersAt: [0, 0, 0], halfApertureM: 0.05, leavesAtM: 0 }, startsAt: [0, 0, 0], generator: null, lineHalfLengthM: 0,
  mark: { position: [0, 1, 0], lengthMm: 20, widthMm: null, headingDeg: null, sigmaRightMm: 1, sigmaUpMm: 1 },
  facing: facingOf(fromAzimuthElevation(180, 0), true), sectionAlong: [0, 1, 0], sectionBearingDeg: 0, shares: [1], reachM: 1, profiles: [{ focusM: 1, widthsMm: [1] }],
  minutes: [{ atUtc: '2026-06-01T10:00:00.000Z', towardsSun: [0, -1, 0], direction: [0, 1, 0], profile: 0, across: null, spotMm: { rightMm: 10, upMm: 5 } }],
};
const common = { lengthEnds: [{ x: 90, y: 200 }, { x: 110, y: 200 }] as const, widthEnds: null, clickPx: 2, edgeBearingDeg: null, edgePlusMinusDeg: 2 };
const spot = (clicks: PhotoClicks) => photoTrail(beam, clicks)?.spots[0]?.at;

describe('the spot on a photo of known scale', () => {
  test('one millimetre a pixel, held upright: right is right and up is up', () => {
    const at = spot({ ...common, scale: { kind: 'scale', from: { x: 0, y: 300 }, to: { x: 50, y: 300 }, lengthMm: 50, sizePlusMinusMm: 0.5 } });
    expect(at?.x).toBeCloseTo(110, 6);
    expect(at?.y).toBeCloseTo(195, 6);
  });

  test('a scale that lies askew in an upright photo does not turn it', () => {
    const at = spot({ ...common, scale: { kind: 'scale', from: { x: 0, y: 300 }, to: { x: 30, y: 340 }, lengthMm: 50, sizePlusMinusMm: 0.5 } });
    expect(at?.x).toBeCloseTo(110, 6);
    expect(at?.y).toBeCloseTo(195, 6);
  });

  test('two pixels a millimetre by a rectangle twice as large', () => {
    const at = spot({ ...common, scale: { kind: 'rectangle', corners: [{ x: 0, y: 0 }, { x: 200, y: 0 }, { x: 200, y: 100 }, { x: 0, y: 100 }], widthMm: 100, heightMm: 50, sizePlusMinusMm: 0.5 } });
    expect(at?.x).toBeCloseTo(120, 6);
    expect(at?.y).toBeCloseTo(190, 6);
  });

  test('an edge that runs west turns the photo upside down', () => {
    // The edge from left to right of the photo points west, so east is left and up is down.
    const at = spot({ ...common, edgeBearingDeg: 270, scale: { kind: 'scale', from: { x: 0, y: 300 }, to: { x: 50, y: 300 }, lengthMm: 50, sizePlusMinusMm: 0.5 } });
    expect(at?.x).toBeCloseTo(90, 6);
    expect(at?.y).toBeCloseTo(205, 6);
  });

  test('without a plane there is none', () => {
    expect(photoTrail(beam, { ...common, scale: { kind: 'scale', from: { x: 0, y: 0 }, to: { x: 1, y: 0 }, lengthMm: 50, sizePlusMinusMm: 0.5 } })).toBeNull();
    expect(photoTrail({ ...beam, facing: null }, { ...common, scale: { kind: 'scale', from: { x: 0, y: 0 }, to: { x: 50, y: 0 }, lengthMm: 50, sizePlusMinusMm: 0.5 } })).toBeNull();
  });
});
