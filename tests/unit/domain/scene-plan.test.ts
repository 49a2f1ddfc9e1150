import { describe, expect, test } from 'vitest';
import { sceneSchema } from '#app/domain/scene.ts';
import { readWallLines, wallText } from '#app/domain/scene-lines.ts';
import { moveMark, moveOpening, moveWallEnd } from '#app/domain/scene-moves.ts';
import { openingCorners, sceneOccluders } from '#app/domain/scene-occluders.ts';
import { nearestMoment, sceneMoment, scenePlan } from '#app/domain/scene-plan.ts';
import { readShadow } from '#app/domain/shadow-reading.ts';
import { stampMeasures } from '#app/domain/scene-form-fields.ts';

const m = (value: number, plusMinus?: number) => ({ value, method: 'measured', ...(plusMinus === undefined ? {} : { plusMinus }) });
const copenhagen = { latitudeDeg: 55.7, longitudeDeg: 12.4, elevationM: 10 };

describe('the plan of a ball', () => {
  // A ball sends the middle of its beam straight on: the mark lies opposite the sun.
  const scene = sceneSchema.parse({ optic: { kind: 'glass-ball', diameterMm: m(120), material: 'acrylic' }, mark: { bearingDeg: m(336.6), elevationDeg: m(-15.2), distanceMm: m(91) } });
  const plan = scenePlan(scene, null);

  test('finds the mark lit when the sun stands opposite: 3 February 2026 about 10:50 in Copenhagen, 15.2° up at 157° (the almanac figures of the demonstration case)', () => {
    const nearest = nearestMoment(plan, copenhagen, Date.parse('2026-02-03T07:40:00Z'), Date.parse('2026-02-03T10:30:00Z'));
    expect(Math.abs((nearest?.utcMs ?? 0) - Date.parse('2026-02-03T09:50:00Z'))).toBeLessThan(5 * 60_000);
    expect(nearest?.missM).toBeLessThan(0.002);
  });
  test('has no beam at night', () => {
    expect(sceneMoment(plan, copenhagen, Date.parse('2026-02-03T22:00:00Z')).beam).toBeNull();
    expect(nearestMoment(plan, copenhagen, Date.parse('2026-02-03T20:00:00Z'), Date.parse('2026-02-03T22:00:00Z'))).toBeNull();
  });
  test('moves the beam by a quarter of a degree a minute, so that ten minutes miss the mark by about 4 mm at 91 mm', () => {
    // 0.2506° a minute along the sun's path, times cos 16.5° of declination, over 91 mm.
    const at = (utc: string) => sceneMoment(plan, copenhagen, Date.parse(utc)).missM ?? Number.NaN;
    const nearest = nearestMoment(plan, copenhagen, Date.parse('2026-02-03T09:30:00Z'), Date.parse('2026-02-03T10:10:00Z'));
    const later = at(new Date((nearest?.utcMs ?? 0) + 600_000).toISOString());
    expect(Math.sqrt(Math.max(0, later ** 2 - (nearest?.missM ?? 0) ** 2)) * 1000).toBeCloseTo(91 * Math.tan((2.506 * Math.cos((16.5 * Math.PI) / 180) * Math.PI) / 180), 0);
  });
});

test('an optic whose measures contradict each other is said so, not drawn', () => {
  const plan = scenePlan(sceneSchema.parse({ optic: { kind: 'metal-trim', widthMm: m(5000), heightMm: m(1000), radiusOfCurvatureM: m(1), faceAzimuthDeg: m(180), faceTiltDeg: m(0) } }), null);
  expect(plan.model).toBeNull();
  expect(plan.problem).not.toBeNull();
});

describe('what stands in the way', () => {
  const opening = { azimuthDeg: m(180), distanceMm: m(2000), offsetMm: m(500), widthMm: m(1000), heightMm: m(1200), sillMm: m(-300), revealMm: m(150) };

  test('an opening to the south lies south of the optic, its right hand to the west', () => {
    const corners = openingCorners(sceneSchema.parse({ opening }).opening ?? { azimuthDeg: m(0), halfWidthDeg: 85, glass: 'none' } as never);
    const rounded = corners?.map((corner) => corner.map((value) => Math.round(value * 1000) / 1000 + 0));
    expect(rounded).toEqual([[0, -2, -0.3], [-1, -2, -0.3], [-1, -2, 0.9], [0, -2, 0.9]]);
  });
  test('is left to the angles of the form while one of its sizes is missing', () => {
    const { offsetMm: _left, ...rest } = opening;
    expect(sceneOccluders(sceneSchema.parse({ opening: rest }))).toEqual([]);
  });
  test('a wall becomes a block from its foot to its top; one below the optic hides nothing', () => {
    const walls = [{ fromDeg: 90, fromM: 3, toDeg: 180, toM: 4, topM: 2, name: 'Garden wall' }, { fromDeg: 0, fromM: 1, toDeg: 10, toM: 1, topM: -1 }];
    const blocks = sceneOccluders(sceneSchema.parse({ walls }));
    expect(blocks.map(({ kind, name }) => [kind, name])).toEqual([['block', 'Garden wall']]);
    expect(blocks[0]?.corners.map(({ eastM, northM, upM }) => [Math.round(eastM), Math.round(northM) + 0, upM])).toEqual([[3, 0, -60], [0, -4, -60], [0, -4, 2], [3, 0, 2]]);
  });
  test('walls are written one a line, and each bad line is named', () => {
    const reading = readWallLines('140 4.2 186 3,8 2.5 Garden wall\n');
    expect(reading).toEqual({ ok: true, values: [{ fromDeg: 140, fromM: 4.2, toDeg: 186, toM: 3.8, topM: 2.5, name: 'Garden wall' }] });
    expect(reading.ok && wallText(reading.values)).toBe('140 4.2 186 3.8 2.5 Garden wall');
    for (const [line, word] of [['140 4.2 186', 'five numbers'], ['400 1 2 3 4', 'bearing'], ['1 0 2 3 4', '1 mm'], ['1 1 2 3 900', 'top']] as const) {
      const bad = readWallLines(line);
      expect(!bad.ok && bad.sentence).toContain(word);
    }
  });
});

describe('dragging', () => {
  test('a mark to a place writes its bearing, elevation and slant distance, by the drawing', () => {
    // 3 m east, 4 m north, 5 m down: bearing atan(3/4), slant 5 times the root of 2, 45° down.
    expect(moveMark([3, 4, -5])).toMatchObject({ 'mark.bearingDeg': '36.9', 'mark.elevationDeg': '-45', 'mark.distanceMm': '7071', 'mark.bearingDeg.method': 'drawing', 'mark.bearingDeg.north': 'true' });
  });
  test('an opening writes where it looks and how far it is', () => {
    expect(moveOpening([0, -2, 0])).toMatchObject({ 'opening.azimuthDeg': '180', 'opening.distanceMm': '2000' });
  });
  test('one end of a wall leaves the other and the top', () => {
    expect(moveWallEnd({ walls: '140 4.2 186 3.8 2.5 Garden wall' }, 0, 'second', [0, -4, 0])).toEqual({ walls: '140 4.2 180 4 2.5 Garden wall' });
  });
});

describe('who and when', () => {
  const before = sceneSchema.parse({ optic: { kind: 'dish', diameterMm: { ...m(1400), by: 'Ann', on: '2026-01-02' } } });
  test('stay with a number that stayed, and are new for one that changed', () => {
    const after = sceneSchema.parse({ optic: { kind: 'dish', diameterMm: m(1400), focalLengthMm: m(650) } });
    const stamped = stampMeasures(before, after, { by: 'Ben', on: '2026-02-03' });
    expect(stamped.optic.diameterMm).toMatchObject({ by: 'Ann', on: '2026-01-02' });
    expect(stamped.optic.focalLengthMm).toMatchObject({ by: 'Ben', on: '2026-02-03' });
    expect(stampMeasures(before, sceneSchema.parse({ optic: { kind: 'dish', diameterMm: m(1401) } }), { by: 'Ben', on: '2026-02-03' }).optic.diameterMm).toMatchObject({ by: 'Ben' });
  });
});

describe('a timed shadow', () => {
  const place = { ...copenhagen, zone: 'Europe/Copenhagen' };
  test('read 5° low by a compass asks for 5° to be added, and compares it with the magnetic model', () => {
    // At 10:50 the sun stands at 156.6° (almanac figure of the demonstration case), so the shadow points to 336.6°.
    const reading = readShadow('2026-02-03T10:50:00', '331.6', place, 4.9);
    expect(reading.ok && reading.correctionDeg).toBeCloseTo(5, 0);
    expect(reading.ok && reading.sentences.join(' ')).toContain('fits the magnetic model');
    const steel = readShadow('2026-02-03T10:50:00', '320', place, 4.9);
    expect(steel.ok && steel.sentences.join(' ')).toContain('steel or cladding is near');
  });
  test.each([['2026-02-03T20:00:00', '10', 'shadow can be read'], ['', '10', 'day and clock time'], ['2026-02-03T10:50:00', '400', '0 to 360'], ['2026-10-25T02:30:00', '10', 'clock was changed']])('at %s reading %s is refused', (at, read, word) => {
    const reading = readShadow(at, read, place, null);
    expect(!reading.ok && reading.sentence).toContain(word);
  });
});
