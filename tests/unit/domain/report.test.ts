import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { receiptPattern } from '#app/domain/incident.ts';
import { readNumber, readReportedOptic } from '#app/domain/report-optic.ts';
import { readReport } from '#app/domain/report.ts';
import { readReceipt, receiptFrom, titleOfReport } from '#app/domain/report-receipt.ts';

const site = { id: 'site-1', organisationId: 'organisation-1', name: 'Kestwick Court Block C', code: 'KC-C', zone: 'Europe/London' };
const now = new Date('2026-05-09T14:12:00Z');
const four = { siteId: site.id, foundWhen: 'just-now', sighting: 'mark', anyoneHurt: 'no' };

describe('a report', () => {
  test('needs four answers and nothing else', () => {
    expect(readReport(four, { site, now }).ok).toBe(true);
  });

  test.each(['foundWhen', 'sighting', 'anyoneHurt'])('may answer %s with "Don\'t know"', (name) => {
    expect(readReport({ ...four, [name]: 'dont-know' }, { site, now }).ok).toBe(true);
  });

  test.each(['foundWhen', 'sighting', 'anyoneHurt'])('without %s says so beside that field only', (name) => {
    const reading = readReport({ ...four, [name]: '' }, { site, now });
    expect(reading.ok ? [] : Object.keys(reading.fieldErrors)).toEqual([name]);
  });

  test('without a site names the site, and does not judge clock times whose zone is unknown', () => {
    const reading = readReport({ ...four, foundWhen: 'at', foundLocal: '2026-05-09T15:10' }, { site: null, now });
    expect(reading.ok ? [] : Object.keys(reading.fieldErrors)).toEqual(['siteId']);
  });

  test('keeps no control characters and no direction overrides', () => {
    const reading = readReport({ ...four, narrative: 'Brown\u0000 band\u202E' }, { site, now });
    expect(reading.ok && reading.report.narrative).toBe('Brown band');
  });

  test('asks the age of the hurt person only when somebody was hurt', () => {
    const age = (anyoneHurt: string) => {
      const reading = readReport({ ...four, anyoneHurt, hurtAgeBand: 'under-16' }, { site, now });
      return reading.ok ? (reading.report.hurt?.ageBand ?? null) : 'not read';
    };
    expect([age('no'), age('yes')]).toEqual([null, 'under-16']);
  });

  test.each([
    [{ latitudeDeg: '53.5' }, 'longitudeDeg'],
    [{ latitudeDeg: '91', longitudeDeg: '0' }, 'latitudeDeg'],
    [{ latitudeDeg: '0', longitudeDeg: '-180.5' }, 'longitudeDeg'],
  ])('refuses the position %j beside the field', (typed, field) => {
    const reading = readReport({ ...four, ...typed }, { site, now });
    expect(reading.ok ? [] : Object.keys(reading.fieldErrors)).toEqual([field]);
  });

  test('never throws, whatever is typed', () => {
    const names = ['foundLocal', 'foundNowAt', 'lastSoundLocal', 'narrative', 'latitudeDeg', 'longitudeDeg', 'opticKind', 'optic-bottle-diameterMm', 'opticPlace', 'wall-1-from', 'wall-1-to', 'opticFacesDeg', 'contactEmail', 'sighting', 'foundWhen'];
    const typed = fc.dictionary(fc.constantFrom(...names), fc.string({ unit: 'binary' }));
    fc.assert(fc.property(typed, (values) => typeof readReport({ ...four, opticKind: 'bottle', foundWhen: 'at', ...values }, { site, now }).ok === 'boolean'));
  });
});

describe('the title', () => {
  const title = (placeDetail: string, names: readonly string[] = []) => titleOfReport({ sighting: 'mark', placeDetail, site }, names);

  test('is made of what was seen and where', () => {
    expect(title('roof, south edge by hatch 2')).toBe('Mark or scorch, roof, south edge by hatch 2');
  });

  test.each([
    ["Weir's room", ['Tomas Weir']],
    ['room of MR Smith', []],
    ['ask ana@example.test', []],
    ['call 0123456789', []],
    ['', []],
  ])('falls back to the site for %j', (place, names) => {
    expect(title(place, names)).toBe('Mark or scorch, Kestwick Court Block C');
  });

  test('is one line of at most 90 characters', () => {
    expect(title(`first line\n${'x'.repeat(200)}`)).toBe('Mark or scorch, first line');
    expect(title('x'.repeat(200)).length).toBe(90);
  });
});

describe('a receipt', () => {
  test('always has the agreed form, and is read back as it was', () => {
    fc.assert(
      fc.property(fc.uint8Array({ minLength: 8, maxLength: 8 }), (numbers) => {
        const receipt = receiptFrom(numbers);
        return receiptPattern.test(receipt) && readReceipt(receipt.toLowerCase().replaceAll('-', '')) === receipt;
      }),
    );
  });

  test.each(['', 'KC-7Q4M', 'KC-7Q4M-R2-X', 'K0-7Q4M-R2'])('%j is none', (text) => {
    expect(readReceipt(text)).toBeNull();
  });
});

describe('a reported size', () => {
  const diameter = (typed: Record<string, string>) => {
    const { optic, errors } = readReportedOptic({ opticKind: 'bottle', ...Object.fromEntries(Object.entries(typed).map(([name, value]) => [`optic-bottle-diameterMm${name}`, value])) });
    return { size: optic.diameterMm, errors: Object.keys(errors) };
  };

  test('is turned into millimetres, with its ± and how it was got', () => {
    expect(diameter({ '': '6,6', '-unit': 'cm', '-plus-minus': '0.2', '-method': 'measured' })).toEqual({ size: { value: 66, plusMinus: 2, method: 'measured' }, errors: [] });
    // One inch is 25.4 mm exactly.
    expect(diameter({ '': '2', '-unit': 'in' }).size).toEqual({ value: 50.8, method: 'reported' });
  });

  test('is left out when the answer is "Don\'t know", whatever stands in the box', () => {
    expect(diameter({ '': '66', '-method': 'dont-know' })).toEqual({ size: undefined, errors: [] });
  });

  test.each(['about 6', '1,200', '1.2.3', '-5', '0', '99999999'])('%j is refused beside the box', (value) => {
    expect(diameter({ '': value }).errors).toEqual(['optic-bottle-diameterMm']);
  });

  test('that does not belong to the chosen kind is ignored', () => {
    expect(readReportedOptic({ opticKind: 'metal-trim', 'optic-bottle-diameterMm': 'nonsense' })).toMatchObject({ errors: {}, optic: { kind: 'metal-trim' } });
  });

  test.each([['12.5', 12.5], ['12,5', 12.5], [' 7 ', 7], ['−3', -3], ['1,250', null], ['1 200', null], ['', null]])('number %j is read as %j', (text, value) => {
    expect(readNumber(text)).toBe(value);
  });
});
