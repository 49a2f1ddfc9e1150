import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { z } from 'zod';
import { declinationAt } from '#app/services/scenes/declination.server.ts';

/** Published test values of the World Magnetic Model 2025, as the rows `wmm-*` of the reference data hold them. */
const row = z.object({ id: z.string(), value: z.number(), conditions: z.string(), source: z.object({ title: z.string(), locator: z.string() }) });
const file: unknown = JSON.parse(readFileSync(new URL('../../fixtures/reference/sky.json', import.meta.url), 'utf8'));

function rowsIn(value: unknown): z.infer<typeof row>[] {
  if (Array.isArray(value)) return value.flatMap(rowsIn);
  if (typeof value !== 'object' || value === null) return [];
  const parsed = row.safeParse(value);
  if (parsed.success && parsed.data.id.startsWith('wmm-')) return [parsed.data];
  return Object.values(value).flatMap(rowsIn);
}

function placeAndDay(conditions: string) {
  const [, year, heightKm, latitude, longitude] = /year ([\d.]+), ([\d.]+) km above WGS84, lat (-?[\d.]+), lon (-?[\d.]+)/u.exec(conditions) ?? [];
  const whole = Math.floor(Number(year));
  const yearMs = Date.UTC(whole + 1, 0, 1) - Date.UTC(whole, 0, 1);
  return { place: { elevationM: Number(heightKm) * 1_000, latitudeDeg: Number(latitude), longitudeDeg: Number(longitude) }, at: new Date(Date.UTC(whole, 0, 1) + (Number(year) - whole) * yearMs) };
}

const rows = rowsIn(file);

describe('magnetic declination', () => {
  test('is compared with every published row', () => expect(rows).toHaveLength(12));

  // The table is rounded to 0.01°, and so is our value.
  test.each(rows.map((one) => [one.id, one] as const))('%s agrees with the published table within 0.02°', (_id, { value, conditions }) => {
    const { place, at } = placeAndDay(conditions);
    const { declinationDeg, declinationSource } = declinationAt(place, at);
    expect(declinationSource).toContain('WMM-2025');
    expect(Math.abs((declinationDeg ?? Number.NaN) - value)).toBeLessThanOrEqual(0.02);
  });

  test('is null on a day that no model of the package covers', () => {
    expect(declinationAt({ latitudeDeg: 50, longitudeDeg: 0, elevationM: 0 }, new Date('2012-06-01T00:00:00Z')).declinationDeg).toBeNull();
    expect(declinationAt({ latitudeDeg: 50, longitudeDeg: 0, elevationM: 0 }, new Date('2040-06-01T00:00:00Z')).declinationDeg).toBeNull();
  });
});
