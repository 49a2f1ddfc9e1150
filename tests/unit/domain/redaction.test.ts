import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { exampleInput } from '#app/cli/example-input.ts';
import { sha256Hex } from '#app/storage/sha256.server.ts';
import { canonicalJson } from '#app/domain/canonical-json.ts';
import { csvCell } from '#app/domain/csv.ts';
import { lineKey, linesToDecide, photoKey } from '#app/domain/lines-to-decide.ts';
import { redactCase } from '#app/domain/redaction.ts';
import { checkReleasedText } from '#app/domain/release-check.ts';
import { releasedResultSchema, resultKeysKept } from '#app/domain/released-result.ts';
import { measurementsCsv, runsCsv } from '#app/domain/released-tables.ts';
import { weatherCsv } from '#app/domain/released-weather.ts';
import { sceneSchema } from '#app/domain/scene.ts';
import { reconstruct } from '#app/physics/reconstruct.ts';
import type { ReconstructionInput } from '#app/physics/model/input.ts';
import type { ReconstructionResult } from '#app/physics/model/result.ts';
import { allShared, hypothesis, sourceOf } from './release-source.ts';

const engineInput: ReconstructionInput = { ...exampleInput, window: { ...exampleInput.window, startUtc: '2025-03-12T13:30:00Z', endUtc: '2025-03-12T14:30:00Z' }, recurrenceToUtc: '2025-06-01T00:00:00Z', samples: 64, rays: 2_000 };
const engineResult: ReconstructionResult = reconstruct(engineInput);
const run = { number: 1, engineVersion: 'test', inputHash: 'a'.repeat(64), resultHash: 'b'.repeat(64), input: engineInput, result: engineResult };
const photo = { photoId: '00000000-0000-4000-8000-000000000001', label: 3, view: 'close' as const, caption: 'Mark', altText: '', masks: [], releasable: 'yes' as const, exifPlace: null, originalKey: 'originals/x', sha256: 'c'.repeat(64) };

const withheldIn = (pieces: readonly object[]) => pieces.flatMap((piece) => ('withheld' in piece ? [piece.withheld] : []));

describe('what nobody decided', () => {
  it('is held back, line by line and photo by photo', () => {
    const source = sourceOf({ notes: [{ id: 'n1', at: '2025-12-15T09:00:00.000Z', authorId: null, text: 'The parapet is new.' }], hypotheses: [hypothesis()], photos: [photo] });
    const { released, withheld } = redactCase(source, 'insurer', {});
    expect(released.title).toEqual([{ withheld: 'free-text' }]);
    expect(released.account).toEqual([{ withheld: 'free-text' }]);
    expect(released.notes.map((note) => note.text)).toEqual([[{ withheld: 'free-text' }]]);
    expect(released.hypotheses[0]?.statement).toEqual([{ withheld: 'free-text' }]);
    expect(released.photos).toEqual([]);
    expect(withheld.photo).toBe(1);
    expect(withheld['free-text']).toBe(5);
  });

  it('is not shared by a decision about other words in the same place', () => {
    const before = sourceOf({ account: 'The curtain had a brown line.' });
    const decisions = allShared(before, 'insurer');
    const after = sourceOf({ account: 'The curtain had a brown line. A second sentence came later.' });
    const { released } = redactCase(after, 'insurer', decisions);
    expect(released.account).toEqual([{ text: 'The curtain had a brown line. ' }, { withheld: 'free-text' }]);
  });

  it('a photo that the photo sheet keeps in the house stays there in spite of a decision', () => {
    const kept = { ...photo, photoId: '00000000-0000-4000-8000-000000000002', label: 4, releasable: 'no' as const };
    const source = sourceOf({ photos: [{ ...photo, releasable: 'undecided' }, kept] });
    expect(redactCase(source, 'insurer', { [photoKey(photo)]: 'share', [photoKey(kept)]: 'share' }).photos).toEqual([]);
  });

  it('a photo is not shared by a decision about other boxes on it', () => {
    const mask = { leftShare: 0.1, topShare: 0.1, widthShare: 0.2, heightShare: 0.2, class: 'personal' as const };
    const decisions = { [photoKey({ ...photo, masks: [mask] })]: 'share' } as const;
    expect(redactCase(sourceOf({ photos: [{ ...photo, masks: [mask] }] }), 'insurer', decisions).photos).toHaveLength(1);
    expect(redactCase(sourceOf({ photos: [photo] }), 'insurer', decisions).photos).toEqual([]);
  });
});

describe('fields that the released shape does not name', () => {
  it('are dropped wherever they stand in what goes in', () => {
    const leak = 'LEAKED-VALUE';
    const result = { ...engineResult, secret: leak, best: engineResult.best && { ...engineResult.best, latitudeDeg: leak }, runs: engineResult.runs.map((one) => ({ ...one, by: leak })) };
    const source = { ...sourceOf({ reconstruction: { ...run, result }, hypotheses: [{ ...hypothesis(), testedBy: leak } as ReturnType<typeof hypothesis>], photos: [{ ...photo, fileName: leak } as typeof photo] }), policyRef: leak };
    for (const audience of ['insurer', 'other-party'] as const) {
      expect(JSON.stringify(redactCase(source, audience, allShared(source, audience)).released)).not.toContain(leak);
    }
  });

  it('of the engine are all known: each key of its result is released or kept on purpose', () => {
    const released = releasedResultSchema.parse(engineResult);
    const unknown = keysOf(engineResult).filter((key) => !keysOf(released).includes(key) && !resultKeysKept.some((kept) => key === kept));
    expect(unknown).toEqual([]);
  });
});

function keysOf(value: unknown, path = ''): string[] {
  if (typeof value !== 'object' || value === null) return [];
  if (Array.isArray(value)) return [...new Set(value.flatMap((part) => keysOf(part, `${path}[]`)))];
  return Object.entries(value).flatMap(([key, part]) => [`${path}${key}`, ...keysOf(part, `${path}${key}.`)]);
}

describe('what each reader gets', () => {
  const source = sourceOf({
    reconstruction: run,
    hypotheses: [hypothesis()],
    finding: { version: 1, signedAt: '2026-01-12T10:40:00.000Z', opinion: 'The mirror is probable.', certainty: 'probable', classification: 'accidental', causes: 'It stood on the sill.', limits: 'Bearing as found.', frozenHash: 'd'.repeat(64) },
    actions: [{ number: 1, title: 'Take it away', controlLevel: 'elimination', interim: false, dueOn: '2025-12-16', state: 'effective', effect: 'No patch seen.', doneAt: null, verifiedAt: null, effectAt: null, hasCost: true }],
    injuries: [{ treatment: 'first-aid' }],
    anyoneHurt: 'yes',
    eventType: 'burn-injury',
  });
  const insurer = redactCase(source, 'insurer', allShared(source, 'insurer'));
  const other = redactCase(source, 'other-party', allShared(source, 'other-party'));

  it('an insurer: site by name, loss, reasoning, the level of treatment, no cost of actions', () => {
    expect(insurer.released).toMatchObject({ siteName: 'Tarrow Quay House', loss: { amount: 1850 }, injury: 'yes, first aid', eventType: 'injury' });
    expect(insurer.released.hypotheses).toHaveLength(1);
    expect(insurer.released.finding?.causes).toEqual([{ text: 'It stood on the sill.' }]);
    expect(insurer.withheld).toMatchObject({ commercial: 1, health: 1 });
  });

  it('another party: no site, no loss, no hypotheses, the opinion without causes, nothing of an injury', () => {
    expect(other.released).toMatchObject({ siteName: null, loss: null, injury: 'withheld', hypotheses: [] });
    expect(other.released.finding?.opinion).toEqual([{ text: 'The mirror is probable.' }]);
    expect(withheldIn(other.released.finding?.causes ?? [])).toEqual(['free-text']);
    expect(other.released.actions[0]?.effect).toEqual([]);
    expect(other.withheld).toMatchObject({ commercial: 2, health: 1 });
  });

  it('another party: whether somebody was hurt cannot be told from what is not there', () => {
    const unhurt = sourceOf({ anyoneHurt: 'no' });
    expect(redactCase(unhurt, 'other-party', {}).released.injury).toBe(other.released.injury);
  });

  it('nobody gets a coordinate; another party no direction of the sun and no hash of the place either', () => {
    for (const { released } of [insurer, other]) expect(keysOf(released).filter((key) => /latitude|longitude/iu.test(key))).toEqual([]);
    const { result, inputHash } = other.released.reconstruction ?? {};
    expect(inputHash).toBeNull();
    expect(keysOf(result).filter((key) => /azimuth|elevation|declination/iu.test(key))).toEqual([]);
    expect(result?.daylight.every((day) => day.sunriseUtc === null || day.sunriseUtc.endsWith(':00.000Z'))).toBe(true);
  });

  it('the name of a weather station is searched like any typed text', () => {
    const named = sourceOf({ reconstruction: run, staff: [{ name: 'Invented Station', email: null }] });
    expect(engineResult.best?.dni.basis).toContain('invented station');
    expect(redactCase(named, 'insurer', {}).released.reconstruction?.result.best?.dni.basis).not.toMatch(/invented|station/iu);
  });

  describe('of the weather', () => {
    const weather = { number: 2, nature: 'station' as const, sourceName: 'Rooftop of Ottilie Vantongeren', station: 'Quay', distanceKm: 0.4, bearingDeg: 77, basis: 'measured' as const, intervalMin: 60, setAside: false, values: [{ startUtc: '2025-03-12T14:00:00.000Z', endUtc: '2025-03-12T15:00:00.000Z', usedWm2: 742, directWm2: 742 }] };
    const withWeather = sourceOf({ reconstruction: run, weather, people: [{ name: 'Ottilie Vantongeren', email: null, phone: null, isChild: false, guardianContact: null }] });
    const basisIn = (released: ReturnType<typeof redactCase>['released']) => released.reconstruction?.result.best?.dni.basis;

    it('an insurer: values, station as decided on without names, whole kilometres, no bearing', () => {
      const { released, withheld } = redactCase(withWeather, 'insurer', allShared(withWeather, 'insurer'));
      expect(released.weather).toEqual({ number: 2, nature: 'station', source: [{ text: 'Rooftop of ' }, { withheld: 'personal' }, { text: ', Quay' }], distanceKm: 1, basis: 'measured', intervalMin: 60, setAside: false, values: weather.values });
      expect(withheld['exact-place']).toBe(redactCase({ ...withWeather, weather: { ...weather, bearingDeg: null } }, 'insurer', {}).withheld['exact-place'] + 1);
      expect(weatherCsv(released)).toContain('hour means,742,742');
    });

    it('an insurer, where nobody decided: the station is held back, in the basis of the irradiance too', () => {
      const { released } = redactCase(withWeather, 'insurer', {});
      expect(released.weather?.source).toEqual([{ withheld: 'free-text' }]);
      expect(basisIn(released)).toBe('measured');
      expect(basisIn(redactCase(withWeather, 'insurer', allShared(withWeather, 'insurer')).released)).toContain('invented station');
    });

    it('another party: values, and no station to read the place from', () => {
      const { released } = redactCase(withWeather, 'other-party', allShared(withWeather, 'other-party'));
      expect(released.weather).toMatchObject({ source: [{ withheld: 'exact-place' }], values: weather.values });
      expect(linesToDecide(withWeather, 'other-party').some((line) => line.group === 'weather')).toBe(false);
      expect(released.reconstruction?.drawing).toMatchObject({ beam: null, sky: null, year: null, skyline: [] });
    });

    it('nobody, where the run went by the clear sky', () => {
      const { released } = redactCase(sourceOf({ reconstruction: run }), 'insurer', {});
      expect(released.weather).toBeNull();
      expect(weatherCsv(released)).toBeNull();
    });
  });

  it('authors of notes are told apart by letters, and the reporter is called so', () => {
    const note = (id: string, authorId: string | null) => ({ id, at: '2025-12-15T09:00:00.000Z', authorId, text: id });
    const { released } = redactCase(sourceOf({ reporterId: 'r', notes: [note('a', 'x'), note('b', 'r'), note('c', 'y'), note('d', 'x')] }), 'insurer', {});
    expect(released.notes.map((one) => one.by)).toEqual(['Person A', 'Reporter', 'Person B', 'Person A']);
  });

  it('measurements leave as numbers and listed words: colours, stations and skyline names stay', () => {
    const scene = sceneSchema.parse({
      optic: { kind: 'curved-mirror', diameterMm: { value: 150, plusMinus: 1, method: 'measured' } },
      target: { material: 'curtain-fabric', colour: 'TYPED-COLOUR' },
      skyline: { points: [{ azimuthDeg: 10, elevationDeg: 5, name: 'TYPED-NAME' }] },
      air: { dni: { source: 'TYPED-STATION', basis: 'measured', values: [] } },
    });
    const { released } = redactCase(sourceOf({ scene }), 'insurer', {});
    expect(released.measurements).toContainEqual({ group: 'Optic', label: 'Diameter', value: '150', plusMinus: '1', unit: 'mm', method: 'Measured' });
    expect(JSON.stringify(released)).not.toContain('TYPED');
  });
});

describe('counts', () => {
  it('cover people, contacts, children, pins, addresses, marked parts and drafts', () => {
    const source = sourceOf({
      people: [
        { name: 'Ottilie Vantongeren', email: null, phone: '+44 7700 900412', isChild: false, guardianContact: null },
        { name: null, email: null, phone: null, isChild: true, guardianContact: 'Wren Vantongeren' },
      ],
      privilegedNote: 'Prepared for legal advice.',
      hasDraftFinding: true,
      account: 'Ottilie Vantongeren saw it.',
    });
    expect(redactCase(source, 'insurer', allShared(source, 'insurer')).withheld).toMatchObject({ personal: 3, child: 2, 'exact-place': 2, legal: 2 });
  });
});

const rareName = fc.stringMatching(/^[A-Z][a-z]{3,8}$/u).map((name) => `${name}qx`);
const person = fc.record({ first: rareName, last: rareName, phone: fc.stringMatching(/^0[1-9]\d{8}$/u) });

describe('whatever the case holds', () => {
  it('no name, number or address of a person occurs in what leaves', () => {
    fc.assert(
      fc.property(fc.array(person, { minLength: 1, maxLength: 4 }), fc.lorem({ maxCount: 6 }), fc.constantFrom('insurer' as const, 'other-party' as const), (people, filler, audience) => {
        const sentences = people.map(({ first, last, phone }) => `${filler} ${first} ${last.toUpperCase()} (${phone}), ${first.toLowerCase()}.${last.toLowerCase()}@flats.example, and ${last}’s dog.`);
        const text = sentences.join(' ');
        const source = sourceOf({
          account: text,
          title: sentences[0] ?? '',
          notes: [{ id: 'n1', at: '2025-12-15T09:00:00.000Z', authorId: null, text }],
          hypotheses: [hypothesis({ statement: text, evidenceFor: text, tests: { ...hypothesis().tests, mark: { result: 'supports', why: text } } })],
          photos: [{ ...photo, caption: text, altText: text }],
          people: people.map(({ first, last, phone }) => ({ name: `${first} ${last}`, email: `${first}.${last}@flats.example`, phone, isChild: false, guardianContact: null })),
        });
        const bytes = JSON.stringify(redactCase(source, audience, allShared(source, audience)).released).toLowerCase();
        for (const { first, last, phone } of people) {
          expect(bytes).not.toContain(first.toLowerCase());
          expect(bytes).not.toContain(last.toLowerCase());
          expect(bytes).not.toContain(phone);
        }
        expect(bytes).not.toContain('flats.example');
      }),
      { numRuns: 60 },
    );
  });
});

describe('the search of the bytes', () => {
  const source = sourceOf({
    account: 'Ottilie Vantongeren saw it at 51.40213, -2.90417 and rang 07700 900412.',
    people: [{ name: 'Ottilie Vantongeren', email: 'ov@flats.example', phone: '07700 900412', isChild: false, guardianContact: null }],
    privilegedNote: 'The owner was told in writing to replace the pane last year.',
    reconstruction: run,
  });
  const { released } = redactCase(source, 'insurer', allShared(source, 'insurer'));
  const check = (data: unknown, changeNote = 'First release', fileNames = ['data.json', 'photo-03.jpg']) => checkReleasedText({ source, audience: 'insurer', data, texts: [{ fileName: 'data.json', text: canonicalJson(data) }], fileNames, changeNote });
  const failed = (checks: ReturnType<typeof check>) => checks.filter((one) => !one.passed).map((one) => one.id);

  it('passes what the redactor made', () => {
    expect(failed(check(released))).toEqual([]);
  });

  it.each([
    ['a name', 'names', 'Vantongeren was there'],
    ['a held number', 'contacts', 'ring 7700-900412'],
    ['an e-mail address', 'forms', 'write to x@y.example'],
    ['coordinates', 'place', 'at 51.4021 and so on'],
    ['a health matter', 'health-and-children', 'burned her right hand'],
    ['a child', 'health-and-children', 'a girl of nine'],
    ['legal advice', 'legal', 'our solicitor says so'],
    ['a marked part', 'legal', 'the owner was told in writing to replace the pane last year.'],
  ])('finds %s in the text', (_what, id, text) => {
    expect(failed(check({ ...released, account: [{ text }] }))).toContain(id);
  });

  it('finds a name in a file that is not the data, in a field that nobody typed, and in the change note', () => {
    const inCsv = checkReleasedText({ source, audience: 'insurer', data: released, texts: [{ fileName: 'runs.csv', text: 'a;ottilie vantongeren' }], fileNames: [], changeNote: '' });
    expect(failed(inCsv)).toEqual(['names']);
    expect(failed(check({ ...released, extent: 'Ottilie-Vantongeren' }))).toEqual(['names']);
    expect(failed(check(released, 'Ottilie asked for it'))).toEqual(['names']);
  });

  it('finds a coordinate as a number, or a field called so', () => {
    expect(failed(check({ ...released, x: 51.40213 }))).toEqual(['place']);
    expect(failed(check({ ...released, latitudeDeg: 0 }))).toEqual(['place']);
  });

  it('finds a file name that says something', () => {
    expect(failed(check(released, '', ['kitchen-of-ottilie.jpg']))).toEqual(['file-names']);
  });

  it('never repeats what it found', () => {
    const notes = check({ ...released, account: [{ text: 'Vantongeren at 51.40213' }] }).map((one) => one.note).join(' ');
    expect(notes).not.toMatch(/vantongeren|51\.4/iu);
    expect(notes).toContain('account 1');
  });
});

describe('tables', () => {
  it('are made of the released case, one row a stretch, times in UTC and on the clock of the place', () => {
    const { released } = redactCase(sourceOf({ reconstruction: run }), 'insurer', {});
    const lines = (runsCsv(released) ?? '').trim().split('\r\n');
    expect(lines).toHaveLength(engineResult.runs.length + 1);
    expect(lines[1]).toContain(engineResult.runs[0]?.fromUtc);
    expect(measurementsCsv(released)).toBeNull();
  });

  it('hold no cell that a spreadsheet takes for a formula', () => {
    fc.assert(
      fc.property(fc.constantFrom('=', '+', '-', '@', '\t', '\r'), fc.string(), (sign, text) => {
        expect(csvCell(`${sign}${text}`)).toMatch(/^"?'/u);
      }),
    );
  });
});

describe('lines to decide', () => {
  it('have keys that name their words, so that equal words share one', () => {
    const keys = linesToDecide(sourceOf({ account: 'It smoked. It smoked. It was dark.' }), 'insurer').filter((line) => line.group === 'account').map((line) => line.text);
    expect(keys).toEqual(['It smoked.', 'It was dark.']);
  });

  it.each([
    ['a', 'e40c292c'],
    ['foobar', 'bf9cf968'],
  ])('are told apart by FNV-1a: "%s" gives the value of its authors\' test vectors', (text, expected) => {
    expect(lineKey('x', text)).toBe(`x#${expected}`);
  });

  it('leave out what this reader never gets', () => {
    const source = sourceOf({ notes: [{ id: 'n', at: '2025-12-15T09:00:00.000Z', authorId: null, text: 'x' }], hypotheses: [hypothesis()] });
    expect(linesToDecide(source, 'other-party').map((line) => line.group)).toEqual(['title', 'account']);
  });
});

it('the released case hashes the same after a round trip through JSON', () => {
  const { released } = redactCase(sourceOf({ reconstruction: run }), 'insurer', {});
  expect(sha256Hex(canonicalJson(JSON.parse(JSON.stringify(released))))).toBe(sha256Hex(canonicalJson(released)));
});
