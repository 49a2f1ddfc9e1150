import { http, HttpResponse } from 'msw';
import { setupServer } from 'msw/node';
import { afterAll, afterEach, beforeAll, describe, expect, test } from 'vitest';
import { ArchiveError, askArchive } from '#app/services/weather/archive-client.server.ts';

/** A stand-in for the archive: nothing outside is asked. */
const url = 'http://archive.test/v1/archive';
const server = setupServer();
beforeAll(() => server.listen({ onUnhandledRequest: 'error' }));
afterEach(() => server.resetHandlers());
afterAll(() => server.close());

let day = 1;
/** A fresh day a test, since answers are kept. */
const question = () => ({ latitudeDeg: 53.50412, longitudeDeg: -1.60388, firstOn: `2026-05-${String((day += 1)).padStart(2, '0')}`, lastOn: `2026-05-${String(day).padStart(2, '0')}` });
const at = Date.parse('2026-05-09T13:00:00Z') / 1_000;
const answer = { hourly: { time: [at, at + 3_600], direct_normal_irradiance: [512.4, null], shortwave_radiation: [640, null], sunshine_duration: [1_800, null], cloud_cover: [50, null], temperature_2m: [14.2, null], surface_pressure: [1_004.1, null], wind_speed_10m: [3.2, null] } };
const quick = { url, pausesMs: [1, 1], timeoutMs: 200 };

function answering(...responses: (() => Response | Promise<Response>)[]): { asked: URL[] } {
  const asked: URL[] = [];
  server.use(http.get(url, ({ request }) => {
    const respond = responses[Math.min(asked.length, responses.length - 1)];
    asked.push(new URL(request.url));
    return respond ? respond() : HttpResponse.error();
  }));
  return { asked };
}

describe('the archive', () => {
  test('is asked for hours with the place rounded to 0.01°, and its stamps at the end become intervals', async () => {
    const { asked } = answering(() => HttpResponse.json(answer));
    const { values } = await askArchive(question(), quick);
    expect(values).toEqual([{ startUtc: '2026-05-09T12:00:00.000Z', endUtc: '2026-05-09T13:00:00.000Z', directWm2: 512.4, globalWm2: 640, sunshineMin: 30, cloudOktas: 4, temperatureC: 14.2, pressureHpa: 1004.1, windMs: 3.2 }]);
    expect(Object.fromEntries(asked[0]?.searchParams ?? [])).toMatchObject({ latitude: '53.50', longitude: '-1.60', timeformat: 'unixtime', timezone: 'GMT' });
  });

  test('is asked once for the same days', async () => {
    const { asked } = answering(() => HttpResponse.json(answer));
    const same = question();
    await askArchive(same, quick);
    await askArchive(same, quick);
    expect(asked).toHaveLength(1);
  });

  test('is asked again when it is busy or broken, three times at most', async () => {
    const { asked } = answering(() => new HttpResponse(null, { status: 503 }), () => new HttpResponse(null, { status: 429 }), () => HttpResponse.json(answer));
    expect((await askArchive(question(), quick)).values).toHaveLength(1);
    expect(asked).toHaveLength(3);
    const down = answering(() => new HttpResponse(null, { status: 500 }));
    await expect(askArchive(question(), quick)).rejects.toThrow(/did not answer/u);
    expect(down.asked).toHaveLength(3);
  });

  test('that does not answer in time is given up with a sentence', async () => {
    answering(() => new Promise<Response>((resolve) => { setTimeout(() => resolve(HttpResponse.json(answer)), 2_000); }));
    await expect(askArchive(question(), { ...quick, timeoutMs: 30 })).rejects.toBeInstanceOf(ArchiveError);
  });

  test('that refuses the question is not asked again', async () => {
    const { asked } = answering(() => HttpResponse.json({ error: true, reason: 'no' }, { status: 400 }));
    await expect(askArchive(question(), quick)).rejects.toThrow(/refused the question \(400\)/u);
    expect(asked).toHaveLength(1);
  });

  test.each([['no JSON', () => new HttpResponse('<html>')], ['another shape', () => HttpResponse.json({ hourly: { time: ['2026-05-09'] } })], ['a redirect', () => HttpResponse.redirect('http://elsewhere.test/')]] as const)('that gives %s is not believed', async (_what, respond) => {
    answering(respond);
    await expect(askArchive(question(), quick)).rejects.toBeInstanceOf(ArchiveError);
  });

  test('that holds nothing for the days gives no values, and is asked again next time', async () => {
    const { asked } = answering(() => HttpResponse.json({ hourly: { time: [at], direct_normal_irradiance: [null] } }));
    const same = question();
    expect((await askArchive(same, quick)).values).toEqual([]);
    await askArchive(same, quick);
    expect(asked).toHaveLength(2);
  });
});
