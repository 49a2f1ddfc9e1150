import { describe, expect, it } from 'vitest';
import { fluxMapFigure } from '#app/domain/figures/flux-map-figure.ts';
import { irradianceFigure } from '#app/domain/figures/irradiance-figure.ts';
import { spotDistanceFigure } from '#app/domain/figures/spot-distance-figure.ts';
import { temperatureFigure } from '#app/domain/figures/temperature-figure.ts';
import type { FluxDiscsData } from '#app/domain/flux-discs.ts';
import { ringsOf } from '#app/domain/flux-discs.ts';
import type { FigureMark, ReportFigure } from '#app/domain/report-document.ts';
import { drawn, faultsOf, size, textsOf } from './figure-faults.ts';

type Kind<Name extends FigureMark['mark']> = Extract<FigureMark, { mark: Name }>;
const all = <Name extends FigureMark['mark']>({ marks }: ReportFigure, name: Name) => marks.filter((mark): mark is Kind<Name> => mark.mark === name);
const textAt = (figure: ReportFigure, text: string) => drawn(all(figure, 'text').find((mark) => mark.text === text));
const band = (mid: number) => ({ low: mid * 0.7, mid, high: mid * 1.4 });

describe('the spot against distance', () => {
  const points = [{ distanceM: 0, diameterMm: 60, fluxKwm2: 1 }, { distanceM: 0.5, diameterMm: 10, fluxKwm2: 40 }, { distanceM: 1, diameterMm: 80, fluxKwm2: 1 }];
  const figure = drawn(spotDistanceFigure({ points, markDistanceM: 0.5, dangerZone: { thresholdKwm2: 10, nearM: 0.4, farM: 0.6 }, focusKind: 'point' }, size));

  it('stays inside, and says where the spot is narrowest', () => {
    expect(faultsOf(figure)).toEqual([]);
    expect(figure.alt).toBe('Narrowest 10 mm at 0.5 m from the optic. At or above 10 kW/m² from 0.4 to 0.6 m. The mark lies at 0.5 m.');
  });

  it('puts the mark half way between 0 and 1000 mm, and the edge of an 80 mm spot on the line of 40 mm', () => {
    const mark = all(figure, 'line').find((line) => line.ink === 'burn' && line.widthPt > 2);
    expect(mark?.points[0]?.[0]).toBeCloseTo((textAt(figure, '400').x + textAt(figure, '600').x) / 2, 1);
    const outline = drawn(all(figure, 'area')[0]);
    const [twenty] = all(figure, 'text').filter((text) => text.text === '20');
    const middleY = drawn(all(figure, 'text').find((text) => text.text === '0' && text.anchor === 'end')).y;
    // Half of the 80 mm spot lies twice as far from the middle as 20 mm on the axis.
    const [edge] = outline.points.filter(([x]) => x > figure.widthPt - 10);
    expect(Math.abs((edge?.[1] ?? 0) - (middleY - 8 * 0.35)) / Math.abs((twenty?.y ?? 0) - middleY)).toBeCloseTo(2, 1);
  });

  it('is left out where no beam was computed', () => expect(spotDistanceFigure({ points: [], focusKind: 'point' }, size)).toBeNull());
});

describe('the flux map', () => {
  const discs = [{ disc: 'sun-image', diameterMm: 0.8, centre: 'hot spot', concentration: band(500), fluxKwm2: band(320) }, { disc: '1 mm', diameterMm: 1, centre: 'hot spot', concentration: band(400), fluxKwm2: band(280) }, { disc: '5 mm', diameterMm: 5, centre: 'hot spot', concentration: band(50), fluxKwm2: band(31) }];
  const data: FluxDiscsData = { discs, rings: [{ fluxKwm2: 30, radiusMm: 1 }, { fluxKwm2: 3, radiusMm: 4 }], focusKind: 'point', track: { points: [[-90, 0], [90, 0]], words: 'dashes: way of the spot' }, edges: { left: '', right: 'east' } };
  const figure = drawn(fluxMapFigure(data, 'Flux', size));

  it('stays inside, also where the way of the spot leaves the picture, and for a line focus turned by 40°', () => {
    expect(faultsOf(figure)).toEqual([]);
    expect(faultsOf(drawn(fluxMapFigure({ ...data, focusKind: 'line', lineTurnDeg: 40 }, 'Flux', size)))).toEqual([]);
  });

  it('names the disc with every flux that it gives', () => {
    const fluxes = textsOf(figure).filter((text) => text.includes('kW/m²'));
    expect(fluxes).toEqual(['31 kW/m², mean over the 5 mm disc', '280 kW/m², mean over the 1 mm disc', "320 kW/m², mean over the sun's image, a 0.8 mm disc"]);
    for (const part of figure.alt.split(/[.;] /u).filter((sentence) => sentence.includes('averaged'))) expect(part).toMatch(/averaged over the (?:sun-image|1 mm|5 mm) disc/u);
    expect(figure.alt).toContain('Rings at 3, 30 kW/m².');
  });

  it('draws rings, discs and scale bar to one scale', () => {
    const dots = all(figure, 'dot');
    const ring = drawn(dots.find((dot) => dot.fill === 'burn'));
    const disc = drawn(dots.filter((dot) => dot.edge === 'ink').toSorted((a, b) => b.radiusPt - a.radiusPt)[0]);
    // The widest ring has a radius of 4 mm, the disc one of 2.5 mm, and the bar is 2 mm long.
    expect(ring.radiusPt / disc.radiusPt).toBeCloseTo(4 / 2.5, 2);
    const bar = drawn(all(figure, 'line').find((line) => line.ink === 'ink' && line.points.every(([, y]) => y === 192) && line.points[0]?.[0] === 8));
    expect(textsOf(figure)).toContain('2 mm');
    expect(((bar.points[1]?.[0] ?? 0) - 8) / ring.radiusPt).toBeCloseTo(2 / 4, 2);
  });

  it('takes the radius of a ring from the area of the map over its flux', () => {
    // 4 of 16 cells of 1 mm² at 40 suns, likely 1000 W/m² at the optic: 40 kW/m² over 4 mm², radius √(4/π) = 1.128 mm.
    const suns = Array.from({ length: 16 }, (_, index) => ([5, 6, 9, 10].includes(index) ? 40 : 0.5));
    const rings = ringsOf({ focus: { focusKind: 'point', traced: { map: { cells: 4, sizeMm: 4, suns } } }, best: { dni: { atOpticLikelyWm2: 1000 } } });
    expect(rings).toEqual([1, 3, 10, 30].map((fluxKwm2) => ({ fluxKwm2, radiusMm: 1.13 })));
    expect(ringsOf({ focus: { focusKind: 'point', traced: null }, best: null })).toEqual([]);
  });

  it('is left out where no focus was computed', () => expect(fluxMapFigure({ discs: [], focusKind: 'point' }, 'Flux', size)).toBeNull());
});

describe('irradiance through the window', () => {
  const utc = (clock: string) => `2026-07-01T${clock}:00.000Z`;
  const data = {
    zone: 'UTC', fromUtc: utc('10:00'), toUtc: utc('14:00'), bound: [{ atUtc: utc('10:00'), wm2: 1000 }, { atUtc: utc('14:00'), wm2: 1000 }], likely: [{ atUtc: utc('10:00'), wm2: 800 }, { atUtc: utc('14:00'), wm2: 800 }],
    measured: [{ startUtc: utc('11:00'), endUtc: utc('12:00'), wm2: 600 }, { startUtc: utc('12:00'), endUtc: utc('13:00'), wm2: 400 }, { startUtc: utc('13:30'), endUtc: utc('14:00'), wm2: 0 }],
    measuredName: 'measured, hour means', sunlit: [{ fromUtc: utc('12:00'), toUtc: utc('13:00') }],
  };
  const options = { ...size, zone: 'UTC' };
  const figure = drawn(irradianceFigure(data, options));

  it('stays inside, and says bound and measured range', () => {
    expect(faultsOf(figure)).toEqual([]);
    expect(figure.alt).toBe('Direct irradiance 10:00 to 14:00: clear-sky bound up to 1000 W/m². Measured 0 to 600 W/m².');
  });

  it('draws means as steps at their height and hours, with a gap where the record has one', () => {
    const steps = all(figure, 'line').filter((line) => line.ink === 'ink' && line.widthPt === 1.5);
    expect(steps.map((line) => line.points.length)).toEqual([4, 2]);
    const lineAt = (text: string) => textAt(figure, text).y - 8 * 0.35;
    const xAt = (text: string) => textAt(figure, text).x;
    const [first, second, third, fourth] = drawn(steps[0]).points;
    expect(first).toEqual([expect.closeTo(xAt('11:00'), 1), expect.closeTo(lineAt('600'), 1)]);
    expect(second).toEqual([expect.closeTo(xAt('12:00'), 1), expect.closeTo(lineAt('600'), 1)]);
    expect(third).toEqual([expect.closeTo(xAt('12:00'), 1), expect.closeTo(lineAt('400'), 1)]);
    expect(fourth?.[0]).toBeCloseTo(xAt('13:00'), 1);
  });

  it('marks hour means as such on the line itself', () => expect(textsOf(figure)).toContain('measured, hour means'));

  it('does without the clear sky where the reader may not have it, and is left out without any value', () => {
    const bare = drawn(irradianceFigure({ ...data, bound: [], likely: [] }, options));
    expect(faultsOf(bare)).toEqual([]);
    expect(bare.alt).toContain('no clear-sky bound');
    expect(irradianceFigure({ ...data, bound: [], likely: [], measured: [] }, options)).toBeNull();
  });
});

describe('temperature against time', () => {
  const points = [{ timeS: 0, celsius: band(20) }, { timeS: 50, celsius: band(150) }, { timeS: 100, celsius: band(200) }];
  const outcomes = [{ label: 'Scorches', answer: 'reached', timeS: band(40) }, { label: 'Flames', answer: 'cannot tell', timeS: band(9_000) }, { label: 'Smoulders', answer: 'not reached', timeS: null }];
  const figure = drawn(temperatureFigure({ points, outcomes }, 'Surface', size));

  it('stays inside and says that it is an estimate', () => {
    expect(faultsOf(figure)).toEqual([]);
    expect(figure.alt).toBe('After 100 s of steady sun 200 °C, 140 to 280. An estimate for one steady spot, not a measurement.');
  });

  it('goes through 150 °C at 50 s, read off its own axes', () => {
    const line = drawn(all(figure, 'line').find((one) => one.ink === 'ink' && one.points.length === 3));
    const y = (text: string) => textAt(figure, text).y;
    const heights = [y('100'), y('200')].map((one) => one - 8 * 0.35);
    const ticks = all(figure, 'text').filter((text) => text.anchor === 'middle' && /^\d+$/u.test(text.text));
    const [forty, sixty] = ['40', '60'].map((text) => ticks.find((tick) => tick.text === text)?.x ?? 0);
    expect(line.points[1]?.[0]).toBeCloseTo(((forty ?? 0) + (sixty ?? 0)) / 2, 1);
    expect(line.points[1]?.[1]).toBeCloseTo(((heights[0] ?? 0) + (heights[1] ?? 0)) / 2, 1);
  });

  it('says a time beyond the axis in words, and gives no bar to an outcome without a time', () => {
    expect(textsOf(figure)).toContain('Flames, cannot tell, 2.5 h');
    expect(textsOf(figure).join()).not.toContain('Smoulders');
  });

  it('is left out where no heat was computed', () => expect(temperatureFigure({ points: [] }, 'Surface', size)).toBeNull());
});
