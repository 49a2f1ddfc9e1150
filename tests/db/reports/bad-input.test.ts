import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { stopQueue } from '#app/jobs/queue.server.ts';
import { action } from '#app/routes/public/report.tsx';
import type { House } from '#tests/support/factories.ts';
import { createHouse } from '#tests/support/factories.ts';
import { caseOf, contextFor } from './stage.ts';

let house: House;
beforeAll(async () => {
  house = await createHouse();
});
afterAll(stopQueue);

const rest = { placeDetail: 'roof, south edge by hatch 2', interimControl: 'tarpaulin since 15:08', opticKind: 'bottle' };

/** Posts the form as a browser without a script does, and gives what came back. */
async function post(clientId: string, typed: Readonly<Record<string, string>>) {
  const form = new FormData();
  for (const [name, value] of Object.entries({ siteId: house.site.id, foundWhen: 'just-now', sighting: 'mark', anyoneHurt: 'no', narrative: 'Brown band', intent: 'send', ...rest, ...typed })) form.append(name, value);
  const request = new Request(`http://scorchline.test/report?report=${clientId}`, { method: 'POST', body: form });
  const answer: unknown = await action({ request, params: {}, context: contextFor(house.reporter), url: new URL(request.url), pattern: '/report' });
  if (answer instanceof Response) return { status: answer.status, state: null };
  const { data, init } = answer as { data: { state: { typed: Record<string, string>; fieldErrors: Record<string, string[]> } }; init?: ResponseInit };
  return { status: init?.status ?? 200, state: data.state };
}

const tooLong = 'Brown band. '.repeat(8_534);

describe('bad input gets a sentence beside its field, and the rest is kept', () => {
  test.each([
    ['a latitude beyond the pole', { latitudeDeg: '91', longitudeDeg: '0' }, 'latitudeDeg', /between -90 and 90/u],
    ['a longitude beyond the date line', { latitudeDeg: '53.5', longitudeDeg: '180.01' }, 'longitudeDeg', /between -180 and 180/u],
    ['a position that is no number', { latitudeDeg: '1e999', longitudeDeg: 'NaN' }, 'latitudeDeg', /such as 53\.4961/u],
    ['a pin that is no place', { opticPlace: '<script>' }, 'opticPlace', /leave it empty/u],
    ['a time to come', { foundWhen: 'at', foundLocal: '2199-05-09T15:10' }, 'foundLocal', /still to come/u],
    ['a year before 1970', { foundWhen: 'at', foundLocal: '1969-12-31T23:59' }, 'foundLocal', /1970/u],
    ['a day that does not exist', { foundWhen: 'at', foundLocal: '2026-02-30T12:00' }, 'foundLocal', /no such day/u],
    ['a window that runs backwards', { foundWhen: 'range', foundFromLocal: '2026-05-09T15:00', foundToLocal: '2026-05-09T14:00' }, 'foundFromLocal', /earlier one first/u],
    ['100 kB of text', { narrative: tooLong }, 'narrative', /under 4,000 characters/u],
    ['a size with two decimal signs', { 'optic-bottle-diameterMm': '6.6.6' }, 'optic-bottle-diameterMm', /one number/u],
    ['an e-mail that is none', { contactEmail: 'at the desk' }, 'contactEmail', /name@example\.org/u],
  ] as const)('%s', async (_what, typed, field, sentence) => {
    const clientId = randomUUID();
    const { status, state } = await post(clientId, typed);
    expect(status).toBe(400);
    expect(state?.fieldErrors[field]?.join(' ')).toMatch(sentence);
    expect(state?.typed).toMatchObject({ ...rest, narrative: 'Brown band', ...typed });
    expect(await caseOf(clientId)).toBeUndefined();
  });

  test('the same report is stored once it is mended', async () => {
    const clientId = randomUUID();
    expect((await post(clientId, { latitudeDeg: '91', longitudeDeg: '0' })).status).toBe(400);
    expect((await post(clientId, { latitudeDeg: '53 29 46 N', longitudeDeg: '1 36 8 W' })).status).toBe(303);
    const row = await caseOf(clientId);
    // Degrees, minutes and seconds are sixtieths (ISO 80000-3).
    expect(row?.latitudeDeg).toBeCloseTo(53 + 29 / 60 + 46 / 3600, 9);
    expect(row?.longitudeDeg).toBeCloseTo(-(1 + 36 / 60 + 8 / 3600), 9);
  });
});

describe('characters that hide or turn other text', () => {
  // Unicode Standard Annex #9, explicit directional embeddings, overrides and isolates.
  const turning = ['\u202A', '\u202B', '\u202C', '\u202D', '\u202E', '\u2066', '\u2067', '\u2068', '\u2069'];

  test.each(turning)('%j does not reach the record, and the words around it do', async (character) => {
    const clientId = randomUUID();
    await post(clientId, { narrative: `Band ${character}gpj.exe`, placeDetail: `roof${character}` });
    expect(await caseOf(clientId)).toMatchObject({ narrative: 'Band gpj.exe', placeDetail: 'roof' });
  });

  test('control characters go, line breaks and words from right to left stay', async () => {
    const clientId = randomUUID();
    await post(clientId, { narrative: 'One\u0000\u0007\u001B[31m\r\nסימן חריכה על הגג' });
    expect((await caseOf(clientId))?.narrative).toMatch(/^One\[31m\r?\nסימן חריכה על הגג$/u);
  });
});
