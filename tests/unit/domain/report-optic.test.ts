import { describe, expect, test } from 'vitest';
import { firstUnit, readReportedOptic } from '#app/domain/report-optic.ts';
import { dimensionsOf, sizeQuestions } from '#app/domain/report-optic-sizes.ts';
import { sceneOpticKinds } from '#app/domain/scene.ts';
import { readOptic } from '#app/domain/scene-optic.ts';
import { withRadius } from '#app/domain/sagitta.ts';

const size = (kind: string, name: string, value: string, unit: string, method = 'measured') => ({ [`optic-${kind}-${name}`]: value, [`optic-${kind}-${name}-unit`]: unit, [`optic-${kind}-${name}-method`]: method });

describe('sizes in the units of the person', () => {
  test('degrees Fahrenheit and inches of mercury become °C and hPa', () => {
    const { optic, errors } = readReportedOptic({ opticKind: 'window-pane', ...size('window-pane', 'bowAirTemperatureC', '23', '°F'), ...size('window-pane', 'bowAirPressureHpa', '29.92', 'inHg') });
    expect(errors).toEqual({});
    // 23 °F is −5 °C exactly; 29.92 inHg is the standard atmosphere, 1013.25 hPa (ISO 2533:1975), to its four digits.
    expect(optic.bowAirTemperatureC?.value).toBeCloseTo(-5, 9);
    expect(Math.abs((optic.bowAirPressureHpa?.value ?? 0) - 1013.25)).toBeLessThan(0.1);
  });

  test('boxes start with inches and feet for those who read US units', () => {
    expect([firstUnit('diameterMm', 'us'), firstUnit('radiusOfCurvatureM', 'us'), firstUnit('bowAirTemperatureC', 'us'), firstUnit('diameterMm', 'metric')]).toEqual(['in', 'ft', '°F', 'mm']);
  });

  test('limits are said in the unit of the box', () => {
    expect(readReportedOptic({ opticKind: 'glass-ball', ...size('glass-ball', 'diameterMm', '900', 'ft') }).errors['optic-glass-ball-diameterMm']).toEqual([expect.stringContaining('32.8 ft')]);
  });
});

describe('what follows from a straight edge', () => {
  test('the radius of a mirror: 610 mm across, 3 mm deep', () => {
    const { optic } = readReportedOptic({ opticKind: 'curved-mirror', ...size('curved-mirror', 'diameterMm', '610', 'mm'), ...size('curved-mirror', 'sagittaMm', '3', 'mm') });
    // R = w² ÷ 8s + s ÷ 2 by Pythagoras: 15 504.2 mm + 1.5 mm.
    expect(withRadius(optic).radiusOfCurvatureM?.value).toBeCloseTo(15.51, 2);
  });

  test('the focal length of a dish: D² ÷ 16 depth', () => {
    const { optic } = readReportedOptic({ opticKind: 'dish', ...size('dish', 'diameterMm', '1.2', 'm'), ...size('dish', 'sagittaMm', '150', 'mm') });
    // The parabola y = x² ÷ 4f through x = 600, y = 150 has f = 600.
    expect(optic.focalLengthMm).toEqual({ value: 600, method: 'measured' });
  });
});

describe('a photo in place of a number', () => {
  test('is noted by the name of the size, and leaves the size unknown', () => {
    const { optic, errors } = readReportedOptic({ opticKind: 'glass-ball', ...size('glass-ball', 'diameterMm', '', 'mm', 'photo') });
    expect({ errors, shown: optic.shownInPhotos, diameter: optic.diameterMm }).toEqual({ errors: {}, shown: ['diameterMm'], diameter: undefined });
  });
});

describe('which way it faces', () => {
  const wall = { from: { latitudeDeg: 53.5, longitudeDeg: -1.6 }, to: { latitudeDeg: 53.5, longitudeDeg: -1.599 } };

  test('is from a drawing when it stands square to a wall line, else a guess', () => {
    const facing = (deg: string) => readReportedOptic({ opticKind: 'window-pane', opticFacesDeg: deg, opticTilt: 'upright' }, [wall]).optic.faceAzimuthDeg;
    expect(facing('180')).toMatchObject({ value: 180, method: 'drawing' });
    expect(facing('150')).toMatchObject({ value: 150, method: 'estimated' });
  });

  test.each(['361', '-1', 'south'])('%j is refused beside the box', (deg) => {
    expect(Object.keys(readReportedOptic({ opticKind: 'window-pane', opticFacesDeg: deg }).errors)).toEqual(['opticFacesDeg']);
  });
});

describe('each kind', () => {
  /** A typical answer to each size, within the ranges. */
  const answers: Record<string, string> = { diameterMm: '300', widthMm: '900', heightMm: '600', sagittaMm: '20', radiusOfCurvatureM: '30', focalLengthMm: '200', centreBowMm: '3', bowAirTemperatureC: '5', bowAirPressureHpa: '1013', paneWidthMm: '1000', liquidDepthMm: '100' };

  test.each(sceneOpticKinds.filter((kind) => kind !== 'dont-know'))('%s asks only for what the model uses: with all of it and a facing, nothing is missing but nothing is left over', (kind) => {
    const sizes = Object.assign({}, ...dimensionsOf(kind).map((name) => size(kind, name, answers[name] ?? '', name === 'radiusOfCurvatureM' ? 'm' : name === 'bowAirTemperatureC' ? '°C' : name === 'bowAirPressureHpa' ? 'hPa' : 'mm'))) as Record<string, string>;
    const { optic, errors } = readReportedOptic({ opticKind: kind, opticFacesDeg: '180', opticTilt: 'upright', opticLies: 'upright', ...sizes });
    expect(errors).toEqual({});
    expect(readOptic(withRadius(optic)).missing).toEqual([]);
  });

  test('has a question and a way to measure for each of its sizes', () => {
    for (const kind of sceneOpticKinds) for (const { question, help } of sizeQuestions[kind]) expect([question.length > 5, help.endsWith('.')]).toEqual([true, true]);
  });
});
