import { describe, expect, it } from 'vitest';
import { beamFigure } from '#app/domain/figures/beam-figure.ts';
import type { FigureMark, FigurePoint, ReportFigure } from '#app/domain/report-document.ts';
import type { BeamView } from '#app/domain/run-beam.ts';
import { drawn, faultsOf, size, textsOf } from './figure-faults.ts';

const atUtc = '2026-03-20T12:00:00.000Z';
/**
 * A lens at the origin, the sun due south and 45° up, the mark 1 m to the north and 1 m down: the spot stands on it, with
 * 20 mm between them to the right. Directions by hand.
 */
const half = Math.SQRT1_2;
const beam: BeamView = {
  focusKind: 'point',
  reflects: false,
  outline: { ball: { centre: [0, 0, 0], radiusM: 0.1 }, body: [], lines: [], entersAt: [0, 0, 0], halfApertureM: 0.1, leavesAtM: 0.1 },
  startsAt: [0, 0, 0],
  generator: null,
  lineHalfLengthM: 0,
  mark: { position: [0, 1, -1], lengthMm: 40, widthMm: 10, headingDeg: null, sigmaRightMm: 1, sigmaUpMm: 1 },
  facing: { normal: [0, 0, 1], right: [1, 0, 0], up: [0, 1, 0], rightWords: 'east', upWords: 'north', recorded: true },
  sectionAlong: [0, 1, 0],
  sectionBearingDeg: 0,
  shares: [0.1, 0.8, 1],
  reachM: 1.8,
  profiles: [{ focusM: 1.41, widthsMm: [180, 12, 60] }],
  minutes: [{ atUtc, towardsSun: [0, -half, half], direction: [0, half, -half], profile: 0, across: null, spotMm: { rightMm: 20, upMm: 0 } }],
};
const figure = (over: Partial<BeamView> = {}): ReportFigure => drawn(beamFigure({ beam: { ...beam, ...over }, bestUtc: atUtc, minutes: [{ atUtc, verdict: 'sunlit' }] }, { ...size, zone: 'UTC' }));

const dots = ({ marks }: ReportFigure) => marks.filter((mark): mark is Extract<FigureMark, { mark: 'dot' }> => mark.mark === 'dot');
const lines = ({ marks }: ReportFigure) => marks.filter((mark): mark is Extract<FigureMark, { mark: 'line' }> => mark.mark === 'line');
const lengthOf = ([a, b]: readonly FigurePoint[]) => Math.hypot((b?.[0] ?? 0) - (a?.[0] ?? 0), (b?.[1] ?? 0) - (a?.[1] ?? 0));

describe('section and plan', () => {
  it('stay inside the figure, in letters of 8 pt at least', () => expect(faultsOf(figure())).toEqual([]));

  it('say in words what they show', () => {
    expect(figure().alt).toBe('Section and plan at 12:00: sun 45.0° up, 180.0°. The beam runs towards 0.0°, 45.0° down; its middle lands 20 mm from the mark.');
    expect(figure().title).toContain('12:00');
  });

  it('are to scale: from the ball to the spot it is 1 m along and 1 m down in the section, 1 m up the sheet in the plan', () => {
    const [balls, spots] = (['hair', 'clear'] as const).map((fill) => dots(figure()).filter((dot) => dot.fill === fill));
    const [section, plan] = [0, 1].map((index) => [balls?.[index], spots?.[index]]).map(([ball, spot]) => ({ across: (spot?.x ?? 0) - (ball?.x ?? 0), down: (spot?.y ?? 0) - (ball?.y ?? 0), ptPerM: (ball?.radiusPt ?? 0) / 0.1 }));
    expect((section?.across ?? 0) / (section?.ptPerM ?? 1)).toBeCloseTo(1, 2);
    expect((section?.down ?? 0) / (section?.ptPerM ?? 1)).toBeCloseTo(1, 2);
    // North is up, and the spot lies 20 mm to the east.
    expect((plan?.across ?? 0) / (plan?.ptPerM ?? 1)).toBeCloseTo(0.02, 2);
    expect((plan?.down ?? 0) / (plan?.ptPerM ?? 1)).toBeCloseTo(-1, 2);
  });

  it('have a scale bar as long as its words say', () => {
    const bar = textsOf(figure()).indexOf('500 mm');
    expect(bar).toBeGreaterThan(0);
    const { marks } = figure();
    const at = marks.findIndex((mark) => mark.mark === 'text' && mark.text === '500 mm');
    const line = marks.slice(0, at).findLast((mark) => mark.mark === 'line' && lengthOf(mark.points) > 20);
    const [ball] = dots(figure());
    expect(line?.mark === 'line' ? lengthOf(line.points) / ((ball?.radiusPt ?? 0) / 0.1) : 0).toBeCloseTo(0.5, 2);
  });

  it('let the light come in from the sun: rays run up to the south, which is left in this section', () => {
    const rays = lines(figure()).filter((line) => line.ink === 'clear' && !line.dash && line.points.length === 2 && line.points.every(([x]) => x < 242));
    const steep = rays.filter(({ points: [a, b] }) => a && b && Math.abs(Math.abs(b[1] - a[1]) - Math.abs(b[0] - a[0])) < 0.1 && (b[0] - a[0]) * (b[1] - a[1]) > 0);
    expect(steep.length).toBeGreaterThanOrEqual(5);
  });

  it('draw no target that was not surveyed, and nothing at all without an optic or light on it', () => {
    expect(textsOf(figure({ mark: null, facing: null, minutes: beam.minutes.map((minute) => ({ ...minute, spotMm: null })) }))).not.toContain('mark');
    expect(beamFigure({ beam: null, bestUtc: null, minutes: [] }, { ...size, zone: 'UTC' })).toBeNull();
    expect(beamFigure({ beam: { ...beam, minutes: [] }, bestUtc: null, minutes: [] }, { ...size, zone: 'UTC' })).toBeNull();
  });
});
