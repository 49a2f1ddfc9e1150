import { describe, expect, test } from 'vitest';
import { directionOn, fitPanorama } from '#app/domain/panorama.ts';

const size = { width: 3600, height: 800 };
const at = (x: number, azimuthDeg: number, elevationDeg: number | null = null, y = 400) => ({ x, y, azimuthDeg, elevationDeg });
const tan = (deg: number) => Math.tan((deg * Math.PI) / 180);

describe('a swept panorama of ten pixels a degree', () => {
  const fit = fitPanorama('swept', size, [at(1000, 100), at(2600, 260)]);
  const one = 3600 / (2 * Math.PI);

  test('tells the bearing of any place across it', () => {
    expect(fit && directionOn(fit, { x: 1800, y: 400 }).azimuthDeg).toBeCloseTo(180, 6);
    expect(fit && directionOn(fit, { x: 100, y: 400 }).azimuthDeg).toBeCloseTo(10, 6);
  });
  test('tells heights by their tangent above the level line, which is taken at half height when nothing else is known', () => {
    expect(fit?.levelAssumed).toBe(true);
    expect(fit && directionOn(fit, { x: 1800, y: 400 - one * tan(16) }).elevationDeg).toBeCloseTo(16, 6);
  });
  test('takes the level line from a known elevation', () => {
    const tilted = fitPanorama('swept', size, [at(1000, 100, 10, 500 - one * tan(10)), at(2600, 260)]);
    expect(tilted?.levelAssumed).toBe(false);
    expect(tilted?.levelY).toBeCloseTo(500, 6);
  });
  test('runs across north', () => {
    const north = fitPanorama('swept', size, [at(0, 340), at(400, 20)]);
    expect(north && directionOn(north, { x: 300, y: 400 }).azimuthDeg).toBeCloseTo(10, 6);
  });
  test('says what a third bearing leaves over: one degree off the line of two others is shared among them', () => {
    const three = fitPanorama('swept', size, [at(1000, 100), at(1800, 181), at(2600, 260)]);
    // Least squares of a line through three evenly spaced points: residuals -1/3, 2/3, -1/3 of a degree, one degree of freedom.
    expect(three?.leftOverDeg).toBeCloseTo(Math.sqrt(6) / 3, 4);
  });
});

describe('one photo of an ordinary lens', () => {
  // 45° off the middle lie one focal length out.
  const fit = fitPanorama('single', { width: 2000, height: 1000 }, [at(0, 135), at(2000, 225)]);
  test('has its focal length from two bearings', () => {
    expect(fit?.pxPerRad).toBeCloseTo(1000, 4);
    expect(fit && directionOn(fit, { x: 1000 + 1000 * tan(20), y: 500 }).azimuthDeg).toBeCloseTo(200, 6);
  });
  test('shows the same height lower toward its edge, as straight eaves do', () => {
    expect(fit && directionOn(fit, { x: 1000, y: 500 - 1000 * tan(30) }).elevationDeg).toBeCloseTo(30, 6);
    expect(fit && directionOn(fit, { x: 2000, y: 500 - 1000 * Math.SQRT2 * tan(30) }).elevationDeg).toBeCloseTo(30, 6);
  });
});

test.each([
  ['one bearing', [at(10, 100)]],
  ['two at one place', [at(10, 100), at(11, 120)]],
  ['bearings that run backwards', [at(10, 200), at(900, 100)]],
] as const)('%s give no fit', (_what, known) => {
  expect(fitPanorama('swept', size, known)).toBeNull();
});
