import { describe, expect, test } from 'vitest';
import { skylineSchema } from '#app/domain/scene.ts';
import { readSkylineLines, skylineText } from '#app/domain/scene-lines.ts';
import { readSkylineForm, rowName, skylineColumns, skylineRows } from '#app/domain/skyline-form.ts';

const skyline = skylineSchema.parse({
  points: [{ azimuthDeg: 121.5, elevationDeg: 12.5, plusMinusDeg: 0.5, source: 'clinometer', name: 'Grain House' }, { azimuthDeg: 170, elevationDeg: 8.5, plusMinusDeg: 2, source: 'panorama', leaf: 'bare' }],
  plusMinusDeg: 2,
  source: 'clinometer',
});
const typedOf = (rows: ReturnType<typeof skylineRows>) => Object.fromEntries(rows.flatMap((row, index) => skylineColumns.map((column) => [rowName(index, column), row[column]])));

describe('a skyline as a table', () => {
  test('sent back unchanged is the same skyline', () => {
    expect(readSkylineForm(typedOf(skylineRows(skyline)))).toEqual({ ok: true, skyline });
  });
  test('a row left empty is taken away, and an empty table takes the skyline away', () => {
    const typed = { ...typedOf(skylineRows(skyline)), paste: '200,4' , 'row.1.azimuthDeg': '', 'row.1.elevationDeg': '' };
    const reading = readSkylineForm(typed);
    expect(reading.ok && reading.skyline?.points.map((point) => point.azimuthDeg)).toEqual([121.5, 200]);
    expect(readSkylineForm({})).toEqual({ ok: true, skyline: null });
  });
  test('a run goes by the largest ± of its points', () => {
    const reading = readSkylineForm({ paste: '10,4,0.5\n20,5,3\n30,6,1' });
    expect(reading.ok && reading.skyline?.plusMinusDeg).toBe(3);
  });
  test.each([
    ['Bearing;Elevation;Plus minus;Source;Tree;What\n100;9,5;0,5;panorama;in leaf;Oak, old', { azimuthDeg: 100, elevationDeg: 9.5, plusMinusDeg: 0.5, source: 'panorama', leaf: 'in-leaf', name: 'Oak, old' }],
    ['100\t9.5\t\t\t\tWall', { azimuthDeg: 100, elevationDeg: 9.5, plusMinusDeg: 1, source: 'clinometer', name: 'Wall' }],
    ['100, 9.5, 0.5, clinometer, , "Barn, north"', { azimuthDeg: 100, elevationDeg: 9.5, plusMinusDeg: 0.5, source: 'clinometer', name: 'Barn, north' }],
  ])('takes %j as pasted from a table', (line, point) => {
    const reading = readSkylineForm({ paste: `${line}\n${line.split('\n').at(-1)?.replace('100', '200')}` });
    expect(reading.ok && reading.skyline?.points[0]).toEqual(point);
  });
  test('says which cell and which pasted line cannot be read', () => {
    const reading = readSkylineForm({ 'row.0.azimuthDeg': '361', 'row.0.elevationDeg': '4', 'row.1.azimuthDeg': '10', 'row.1.elevationDeg': 'high', paste: '50,5\n60,95' });
    expect(!reading.ok && Object.keys(reading.fieldErrors)).toEqual(['row.0.azimuthDeg', 'row.1.elevationDeg', 'paste']);
    expect(!reading.ok && reading.fieldErrors['paste']?.[0]).toContain('Line 2');
  });
  test('one point is no skyline', () => {
    expect(readSkylineForm({ paste: '50,5' }).ok).toBe(false);
  });
});

test('the lines of the measurements form keep what stands in the table', () => {
  expect(readSkylineLines(skylineText(skyline))).toEqual({ ok: true, values: skyline.points });
  expect(readSkylineLines('100 5 [roof] x\n120 5').ok).toBe(false);
  expect(readSkylineLines('100 5 ±99\n120 5').ok).toBe(false);
});
