import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { distanceAndBearing } from '#app/domain/great-circle.ts';
import { chooseWeather } from '#app/domain/weather-choice.ts';
import { fileFormatOf, readEpw, readSurfrad } from '#app/domain/weather-file.ts';
import { readHandValues } from '#app/domain/weather-form.ts';
import { guessTable, readTableMapping, readWeatherTable } from '#app/domain/weather-table.ts';
import { distanceCaution, intervalOf, meansWords } from '#app/domain/weather.ts';
import type { WeatherSeries } from '#app/domain/weather.ts';
import { erbsSplit } from '#app/physics/sky/erbs.ts';
import { solarPosition } from '#app/physics/sun/solar-position.ts';

const file = (name: string) => readFileSync(new URL(`../../../fixtures/weather/${name}`, import.meta.url), 'utf8');
const air = { pressureHpa: 1013, temperatureC: 10 };

describe('a daily file of the surface radiation network', () => {
  const text = file('surfrad-alamosa-2016-01-01-17h.dat');
  const { values, problems, station } = readSurfrad(text);

  test('is known by its head, and every minute of it is read', () => {
    expect(fileFormatOf(text)).toBe('surfrad');
    expect([values.length, problems.length, intervalOf(values)]).toEqual([60, 0, 1]);
    expect(values[0]).toMatchObject({ startUtc: '2016-01-01T17:00:00.000Z', directWm2: 1024.9, globalWm2: 427.5, temperatureC: -10.7, pressureHpa: 779.1 });
  });

  test('is read at the right time and place: the zenith angles that the station prints are those of the sun there and then', () => {
    if (!station) throw new Error('no station');
    const printed = text.split('\n').slice(2).filter(Boolean).map((line) => Number(line.trim().split(/\s+/u)[7]));
    for (const [index, value] of values.entries()) {
      const sun = solarPosition(Date.parse(value.startUtc), { ...station, elevationM: 2317, ...air, pressureHpa: 779 });
      // Two decimals are printed; a minute of time or a west longitude taken for east would be far more.
      expect(Math.abs(90 - sun.airlessElevationDeg - (printed[index] ?? 0))).toBeLessThan(0.06);
    }
  });
});

describe('an EnergyPlus weather file', () => {
  const text = file('pvgis-45n-8e-june-1-2.epw');
  const { values, station, cautions } = readEpw(text);

  test('has hours that end at their stamp in local standard time', () => {
    expect(fileFormatOf(text)).toBe('epw');
    expect(values).toHaveLength(48);
    // First row: 1 June, hour 1, one hour east of Greenwich; 14.24 °C and 99820 Pa are printed in it.
    expect(values[0]).toMatchObject({ startUtc: '2006-05-31T23:00:00.000Z', endUtc: '2006-06-01T00:00:00.000Z', temperatureC: 14.24, pressureHpa: 998.2, globalWm2: 0 });
  });
  test('is dark while the sun is down there for the whole hour and the one before, and light at noon', () => {
    const height = (utcMs: number) => solarPosition(utcMs, { latitudeDeg: station?.latitudeDeg ?? 0, longitudeDeg: station?.longitudeDeg ?? 0, elevationM: 250, ...air }).airlessElevationDeg;
    for (const value of values) {
      const [from, to] = [Date.parse(value.startUtc), Date.parse(value.endUtc)];
      // The file says that its irradiance is that of an instant inside the hour.
      if (Math.max(height(from), height(to)) < -1) expect(value.globalWm2).toBe(0);
      if (Math.min(height(from), height(to)) > 40) expect(value.globalWm2).toBeGreaterThan(50);
    }
  });
  test('says that its irradiance is that of an instant, 49 minutes before the stamp, as its comment has it', () => {
    expect(cautions.join(' ')).toContain('49 minutes before the stamp');
  });
  test('without position and time zone is refused', () => {
    expect(readEpw('LOCATION,here\n').problems[0]?.sentence).toContain('time zone');
  });
});

describe('a table with columns', () => {
  const text = file('nsrdb-2023-01-01-noon.csv');
  const { names, guess } = guessTable(text);
  const mappingOf = (more: Record<string, string>) => {
    const read = readTableMapping({ ...guess, stamp: 'start', ...more });
    if (!read.ok) throw new Error(JSON.stringify(read.fieldErrors));
    return read.mapping;
  };

  test('is guessed by the names of its columns', () => {
    expect(names[Number(guess['directWm2'])]).toBe('DNI');
    expect(names[Number(guess['globalWm2'])]).toBe('GHI');
    expect(names[Number(guess['windMs'])]).toBe('Wind Speed');
  });
  test('takes the offset that is written with the time', () => {
    const { values, problems } = readWeatherTable(text, mappingOf({ dateColumn: '0', clock: 'written' }), 'UTC');
    expect([values.length, problems.length, intervalOf(values)]).toEqual([7, 0, 5]);
    expect(values[0]).toMatchObject({ startUtc: '2023-01-01T19:00:00.000Z', endUtc: '2023-01-01T19:05:00.000Z', directWm2: 4, globalWm2: 161, pressureHpa: 768 });
  });

  const small = (rows: string) => `Datum;Zeit;Direkt\n${rows}`;
  const columns = { delimiter: ';', headLine: '1', dateColumn: '0', clockColumn: '1', directWm2: '2', clock: 'place', stamp: 'end', intervalMin: '10', dateOrder: 'dmy' };
  test('turns the clock of the place into UTC, and a stamp at the end into the interval before it', () => {
    const { values } = readWeatherTable(small('14.07.2026;10:30;640,5\n'), mappingOf(columns), 'Europe/Berlin');
    expect(values).toEqual([{ startUtc: '2026-07-14T08:20:00.000Z', endUtc: '2026-07-14T08:30:00.000Z', directWm2: 640.5 }]);
  });
  test('names the lines that it leaves out, with what is wrong', () => {
    const { values, problems } = readWeatherTable(small('14.07.2026;10:30;640\n31.02.2026;10:40;1\n14.07.2026;10:50;bright\n\n14.07.2026;11:00;9000\n14.07.2026;11:10;-999\n25.10.2026;02:30;1\n'), mappingOf(columns), 'Europe/Berlin');
    expect(values).toHaveLength(1);
    expect(problems.map(({ line }) => line)).toEqual([3, 4, 6, 7, 8]);
    expect(problems.map(({ sentence }) => sentence).join(' ')).toMatch(/no day of the calendar.*no number.*lies between 0 and 1400.*none of the chosen columns.*twice that night/u);
  });
  test.each([['kn', '10', 5.144], ['kmh', '36', 10]])('turns wind in %s into m/s', (unit, value, ms) => {
    const { values } = readWeatherTable(`t,w\n2026-07-14 10:00,${value}\n`, mappingOf({ delimiter: ',', headLine: '1', dateColumn: '0', clock: 'utc', directWm2: '', globalWm2: '', temperatureC: '', pressureHpa: '', cloudOktas: '', windMs: '1', 'windMs.unit': unit }), 'UTC');
    expect(values[0]?.windMs).toBeCloseTo(ms, 3);
  });
  test('is not read before clock and stamp are said and a quantity is chosen', () => {
    const read = readTableMapping({ dateColumn: '0' });
    expect(!read.ok && Object.keys(read.fieldErrors).sort()).toEqual(['clock', 'stamp']);
    expect(readTableMapping({ dateColumn: '0', clock: 'utc', stamp: 'end' })).toMatchObject({ ok: false, fieldErrors: { directWm2: [expect.stringContaining('one quantity')] } });
  });
});

describe('the split of global irradiance after Erbs, Klein and Duffie 1982', () => {
  // Values of pvlib-python, test_irradiance.py, test_erbs: global, zenith, clearness, then direct and diffuse.
  test.each([[50, 85, 0.405723511, 96.7192672, 41.5703604], [1000, 10, 0.718132729, 794.205651, 217.860117], [1000, 10, 0.768214312, 842.001578, 170.790318]])('gives what pvlib-python gives for %d W/m² at zenith %d°, clearness %d', (ghi, zenith, clearness, dni, diffuse) => {
    const outside = ghi / (clearness * Math.cos((zenith * Math.PI) / 180));
    const split = erbsSplit(ghi, 90 - zenith, outside);
    expect(split?.dniWm2).toBeCloseTo(dni, 3);
    expect(split?.diffuseWm2).toBeCloseTo(diffuse, 3);
  });
  test('says nothing of a sun below 5°', () => {
    expect(erbsSplit(20, 4.9, 1361)).toBeNull();
  });
});

describe('the record that a run goes by', () => {
  const window = { startUtc: '2026-06-21T10:00:00.000Z', endUtc: '2026-06-21T12:00:00.000Z' };
  const place = { latitudeDeg: 53.5, longitudeDeg: -1.6, elevationM: 60 };
  const hour = (number: number, more: Partial<WeatherSeries> = {}, value: object = { directWm2: 500 }): WeatherSeries => ({
    number, kind: 'file', nature: 'station', sourceName: `Source ${number}`, station: '', stationDistanceKm: 5, intervalMin: 10,
    values: Array.from({ length: 12 }, (_unused, index) => ({ startUtc: new Date(Date.parse(window.startUtc) + index * 600_000).toISOString(), endUtc: new Date(Date.parse(window.startUtc) + (index + 1) * 600_000).toISOString(), ...value })), ...more,
  });
  const archive = hour(1, { nature: 'archive', intervalMin: 60 });
  const global = hour(2, {}, { globalWm2: 700 });
  const direct = hour(3);

  test('is measured direct before derived from global before an archive, in whatever order they came', () => {
    expect(chooseWeather([archive, global, direct], window, place)).toMatchObject({ number: 3, series: { basis: 'measured' } });
    expect(chooseWeather([global, archive], window, place)).toMatchObject({ number: 2, series: { basis: 'derived' } });
    expect(chooseWeather([archive], window, place)).toMatchObject({ number: 1, series: { basis: 'hourly-archive' } });
    expect(chooseWeather([], window, place)).toBeNull();
  });
  test('is never a typical year, nor one without a value in the window', () => {
    expect(chooseWeather([hour(4, { nature: 'typical-year' })], window, place)).toBeNull();
    expect(chooseWeather([direct], { startUtc: '2026-06-21T13:00:00.000Z', endUtc: '2026-06-21T14:00:00.000Z' }, place)).toBeNull();
  });
  test('of hour means is not called measured: a clear gap may hide in them', () => {
    const choice = chooseWeather([hour(5, { intervalMin: 60 })], window, place);
    expect(choice?.series.basis).toBe('hourly-archive');
    expect(choice?.caution).toContain('a clear gap of two minutes');
  });
  test('is the nearer one among equals, and one without a distance comes last', () => {
    expect(chooseWeather([hour(6, { stationDistanceKm: null }), hour(7, { stationDistanceKm: 40 }), hour(8, { stationDistanceKm: 9 })], window, place)?.number).toBe(8);
    expect(chooseWeather([hour(6, { stationDistanceKm: null })], window, place)?.number).toBe(6);
  });
  test('far away cannot prove a clear gap', () => {
    expect(chooseWeather([hour(9, { stationDistanceKm: 31 })], window, place)?.caution).toContain('cannot prove a clear gap');
    expect(distanceCaution(4)).toBe('');
  });
  test('of an archive leaves out the low sun, where such values are unreliable', () => {
    const night = { startUtc: '2026-06-21T20:00:00.000Z', endUtc: '2026-06-21T21:00:00.000Z' };
    const low = hour(1, { nature: 'archive', values: [{ ...night, directWm2: 90 }] });
    expect(chooseWeather([low], night, place)).toBeNull();
  });
});

test('distance and bearing are those of a published example: 968.9 km and 9° 07′ 11″ (C. Veness, Movable Type Scripts, latitude/longitude calculations)', () => {
  const { distanceKm, bearingDeg } = distanceAndBearing({ latitudeDeg: 50 + 3 / 60 + 59 / 3600, longitudeDeg: -(5 + 42 / 60 + 53 / 3600) }, { latitudeDeg: 58 + 38 / 60 + 38 / 3600, longitudeDeg: -(3 + 4 / 60 + 12 / 3600) });
  expect(distanceKm).toBeCloseTo(968.9, 0);
  expect(bearingDeg).toBeCloseTo(9 + 7 / 60 + 11 / 3600, 3);
});

describe('values typed by hand', () => {
  const typed = { handDay: '2026-07-14', 'hand.0.start': '10:30', 'hand.0.end': '10:40', 'hand.0.directWm2': '640' };
  test('are read in the clock of the place; rows left empty are left out', () => {
    expect(readHandValues(typed, 'Europe/Berlin')).toEqual({ ok: true, values: [{ startUtc: '2026-07-14T08:30:00.000Z', endUtc: '2026-07-14T08:40:00.000Z', directWm2: 640 }] });
  });
  test.each([
    [{ handDay: '' }, 'handDay'],
    [{ 'hand.0.end': '10:20' }, 'hand.0.end'],
    [{ 'hand.0.start': 'noon' }, 'hand.0.start'],
    [{ 'hand.0.directWm2': '5000' }, 'hand.0.directWm2'],
    [{ 'hand.0.directWm2': '' }, 'hand.0.directWm2'],
    [{ 'hand.0.cloudOktas': 'half' }, 'hand.0.cloudOktas'],
  ])('with %j are refused beside %s', (more, name) => {
    const reading = readHandValues({ ...typed, ...more }, 'Europe/Berlin');
    expect(!reading.ok && Object.keys(reading.fieldErrors)).toContain(name);
  });
});

test.each([[60, 'hour means'], [1, '1-minute means'], [10, '10-minute means']])('a mean over %d minutes is called %s', (minutes, words) => {
  expect(meansWords(minutes)).toBe(words);
});
