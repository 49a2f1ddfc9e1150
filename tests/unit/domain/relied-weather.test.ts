import { describe, expect, it } from 'vitest';
import { reliedWeather } from '#app/domain/relied-weather.ts';
import type { StoredWeather } from '#app/domain/relied-weather.ts';
import { chooseWeather } from '#app/domain/weather-choice.ts';
import { stepWords, weatherSentences, weatherTable } from '#app/domain/weather-part.ts';

const hour = (clock: number, directWm2: number, more: object = {}) => ({ startUtc: `2026-05-09T${String(clock).padStart(2, '0')}:00:00.000Z`, endUtc: `2026-05-09T${String(clock + 1).padStart(2, '0')}:00:00.000Z`, directWm2, ...more });
const record = (over: Partial<StoredWeather> = {}): StoredWeather => ({ number: 1, kind: 'file', nature: 'station', sourceName: 'Moor station', station: 'Tarn Head', stationDistanceKm: 14.2, stationBearingDeg: 213, intervalMin: 60, values: [hour(9, 100), hour(10, 640, { cloudOktas: 3 }), hour(11, 700)], setAsideAt: null, ...over });
const window = { startUtc: '2026-05-09T10:00:00.000Z', endUtc: '2026-05-09T12:00:00.000Z' };
const place = { latitudeDeg: 53.5, longitudeDeg: -1.6, elevationM: 60 };
const seriesOf = (records: readonly StoredWeather[]) => chooseWeather(records, window, place)?.series;

describe('the weather that a run went by', () => {
  it('is the record that the choice took, with the numbers that were used', () => {
    const dull = record({ number: 2, sourceName: 'Harbour', stationDistanceKm: 40, values: [hour(10, 5), hour(11, 5)] });
    const found = reliedWeather(seriesOf([record(), dull]), [record(), dull]);
    expect(found).toMatchObject({ number: 1, sourceName: 'Moor station', distanceKm: 14.2, bearingDeg: 213, basis: 'hourly-archive', intervalMin: 60, setAside: false });
    expect(found?.values.map((value) => value.usedWm2)).toEqual([100, 640, 700]);
  });

  it('stays the same when the record is set aside later, and says so', () => {
    const aside = record({ setAsideAt: new Date('2026-06-01T00:00:00Z') });
    const found = reliedWeather(seriesOf([record()]), [aside, record({ number: 2, values: [hour(10, 1), hour(11, 2)] })]);
    expect(found).toMatchObject({ number: 1, setAside: true });
    expect(found && weatherSentences({ ...found, source: 'Moor station, Tarn Head' })).toContain('The record has been set aside since the run was made.');
  });

  it('is the standing one of two with the same values', () => {
    expect(reliedWeather(seriesOf([record()]), [record({ setAsideAt: new Date(0) }), record({ number: 3 })])).toMatchObject({ number: 3, setAside: false });
  });

  it('may be values kept with the measurements, or nothing', () => {
    const series = { basis: 'measured', source: 'Ridge station', stationDistanceKm: 4, values: [{ startUtc: window.startUtc, endUtc: '2026-05-09T10:30:00.000Z', dniWm2: 64 }] } as const;
    expect(reliedWeather(series, [record()])).toEqual({ number: null, nature: null, sourceName: 'Ridge station', station: '', distanceKm: 4, bearingDeg: null, basis: 'measured', intervalMin: 30, setAside: false, values: [{ startUtc: window.startUtc, endUtc: '2026-05-09T10:30:00.000Z', usedWm2: 64 }] });
    expect(reliedWeather(undefined, [record()])).toBeNull();
  });

  it('holds the measured global irradiance beside direct irradiance derived from it', () => {
    const global = record({ values: [{ startUtc: '2026-05-09T10:00:00.000Z', endUtc: '2026-05-09T11:00:00.000Z', globalWm2: 610 }] });
    const found = reliedWeather(seriesOf([global]), [global]);
    expect(found).toMatchObject({ number: 1, basis: 'derived' });
    expect(found?.values[0]?.globalWm2).toBe(610);
    expect(found?.values[0]?.usedWm2).toBe(seriesOf([global])?.values[0]?.dniWm2);
  });
});

describe('its words', () => {
  const part = () => {
    const found = reliedWeather(seriesOf([record()]), [record()]);
    if (!found) throw new Error('No weather.');
    return { ...found, source: 'Moor station, Tarn Head' };
  };

  it('name record, station, distance and bearing, and call hour means so', () => {
    const words = weatherSentences(part()).join(' ');
    expect(words).toContain('The run goes by weather record 1: Moor station, Tarn Head, 14.2 km off at 213°.');
    expect(words).toContain('3 values, hour means');
    expect(words).toContain('These are hour means, and marked so');
    expect(words).toContain('single clouds differ');
    expect(stepWords(part())).toBe('measured, hour means');
  });

  it('leave out the bearing where it is not known to the reader', () => expect(weatherSentences({ ...part(), bearingDeg: null })[0]).toBe('The run goes by weather record 1: Moor station, Tarn Head, 14.2 km off.'));

  it('give the rows of the window, call the mean in the head, and count the rest', () => {
    const table = weatherTable(part(), window, 'Europe/London');
    expect(table.head).toEqual(['From', 'To', 'Direct as used, hour means, W/m²', 'Cloud, oktas']);
    expect(table.rows).toEqual([['11:00', '12:00', '640', '3'], ['12:00', '13:00', '700', '']]);
    expect(table.caption).toBe('Weather that the run goes by, hour means, 9 May 2026');
    expect(table.further).toBe(1);
  });
});
