import { describe, expect, test } from 'vitest';
import { examObstacles, handOverObstacles, itemCode, readItemLetter } from '#app/domain/evidence.ts';
import { evidenceHeading } from '#app/domain/evidence-heading.ts';
import { custodyFigure } from '#app/domain/figures/custody-figure.ts';
import { foldedScale } from '#app/domain/figures/folded-scale.ts';
import { markWords, photoMarkSchema } from '#app/domain/photo-marks.ts';
import { correctionWords, timelineRows, trueTime } from '#app/domain/timeline.ts';
import { readTypedMoment } from '#app/domain/typed-moment.ts';
import { takeAccountSchema, witnessNames } from '#app/domain/witness.ts';

const at = (utc: string) => new Date(utc);

describe('labels of items', () => {
  test.each([[1, '118-A'], [26, '118-Z'], [27, '118-AA'], [52, '118-AZ'], [53, '118-BA']])('item %i is %s, and back', (label, code) => {
    expect(itemCode(118, label)).toBe(code);
    expect(readItemLetter(code.slice(4))).toBe(label);
  });

  test.each(['', 'a', '1', 'A1', 'ABCD'])('"%s" is no label', (text) => {
    expect(readItemLetter(text)).toBe(0);
  });
});

describe('a hand-over', () => {
  const facts = { openSince: at('2026-02-03T12:00:00Z'), openRole: 'investigator' as const, disposal: 'undecided' as const, legalHold: false };
  const now = at('2026-02-10T12:00:00Z');

  test('comes after the one before it and not in the future', () => {
    expect(handOverObstacles(facts, { role: 'store', at: at('2026-02-03T12:00:00Z') }, now)).toHaveProperty('handedAt');
    expect(handOverObstacles(facts, { role: 'store', at: at('2026-02-10T12:00:01Z') }, now)).toHaveProperty('handedAt');
    expect(handOverObstacles(facts, { role: 'store', at: at('2026-02-04T12:00:00Z') }, now)).toEqual({});
  });

  test('to disposal is refused under a hold, whatever was decided', () => {
    expect(handOverObstacles({ ...facts, disposal: 'destroy', legalHold: true }, { role: 'disposed', at: at('2026-02-04T12:00:00Z') }, now)).toHaveProperty('holderRole');
  });
});

test('an examination that alters nothing needs neither notice nor protocol', () => {
  const exam = { kind: 'non-destructive' as const, performedAt: at('2026-02-05T12:00:00Z'), noticeTo: '', noticeAt: null, protocolAttachmentId: null };
  expect(examObstacles(exam, at('2026-02-03T12:00:00Z'), at('2026-02-10T12:00:00Z'))).toEqual({});
  expect(Object.keys(examObstacles({ ...exam, kind: 'may-alter' }, at('2026-02-03T12:00:00Z'), at('2026-02-10T12:00:00Z'))).sort()).toEqual(['noticeAt', 'noticeTo', 'protocolAttachmentId']);
});

describe('the folded scale', () => {
  const scale = foldedScale([at('2026-02-01T00:00:00Z'), at('2026-02-02T00:00:00Z'), at('2026-06-02T00:00:00Z'), at('2026-06-03T00:00:00Z')], 0, 400);

  test('goes from end to end and never back', () => {
    expect(scale.stops[0]?.x).toBe(0);
    expect(scale.stops.at(-1)?.x).toBeCloseTo(400, 6);
    for (const [index, stop] of scale.stops.entries()) if (index > 0) expect(stop.x).toBeGreaterThan(scale.stops[index - 1]?.x ?? 0);
  });

  test('folds the 120 days from 2 February to 2 June into one stretch, with their number', () => {
    expect(scale.folds).toHaveLength(1);
    expect(scale.folds[0]?.days).toBe(120);
    expect(scale.x(at('2026-04-03T00:00:00Z'))).toBeGreaterThan(scale.folds[0]?.from ?? 0);
  });
});

test('the custody figure names parts and never a person, and says in words what it draws', () => {
  const line = { code: '7-A', description: 'Sphere', seal: 'seal 4', holders: [{ role: 'investigator' as const, from: at('2026-02-01T00:00:00Z'), to: at('2026-02-02T00:00:00Z') }, { role: 'store' as const, from: at('2026-02-02T00:00:00Z'), to: null }], exams: [{ kind: 'may-alter' as const, at: at('2026-02-03T00:00:00Z') }], planned: [] };
  const figure = custodyFigure([line], { number: 1, width: 400, textSize: 12, zone: 'UTC', now: at('2026-07-01T00:00:00Z') });
  expect(figure.alt).toContain('7-A: Investigator from 1 Feb 2026, Store from 2 Feb 2026; may alter the item 3 Feb 2026');
  const thick = figure.marks.filter((mark) => mark.mark === 'line' && mark.widthPt === 4);
  expect(thick).toHaveLength(1);
});

test('the heading names the weakest fact first', () => {
  expect(evidenceHeading([], [], { caseNumber: 118, zone: 'UTC', now: at('2026-07-15T00:00:00Z') })).toBe('No item has been collected');
});

describe('clock errors', () => {
  test('a clock that is 6 min fast reads 11:02 at 10:56', () => {
    expect(trueTime(at('2026-02-03T10:02:00Z'), 360).toISOString()).toBe('2026-02-03T09:56:00.000Z');
    expect([correctionWords(360), correctionWords(-42), correctionWords(0), correctionWords(150)]).toEqual(['less 6 min', 'plus 42 s', 'none', 'less 2 min 30 s']);
  });

  test('rows stand by true time, not by reading', () => {
    const row = (key: string, reading: string, clockErrorS: number) => ({ key, at: trueTime(at(reading), clockErrorS), source: 's', what: key, reading: at(reading), clockErrorS, basis: '', path: null });
    expect(timelineRows([row('panel', '2026-02-03T10:02:00Z', 360), row('camera', '2026-02-03T09:58:00Z', 0)], 'Europe/Copenhagen').map((one) => `${one.trueTime} ${one.what}`)).toEqual(['10:56 panel', '10:58 camera']);
  });

  test('in the night on which the clock is put back the form asks which pass is meant', () => {
    // Europe/Copenhagen goes from UTC+2 to UTC+1 on 25 October 2026 at 03:00 (IANA time zone database).
    expect(readTypedMoment({ local: '2026-10-25T02:30', which: '' }, 'Europe/Copenhagen')).toMatchObject({ ok: false, sentence: expect.stringContaining('UTC+2') });
    expect(readTypedMoment({ local: '2026-10-25T02:30', which: 'second' }, 'Europe/Copenhagen')).toEqual({ ok: true, instant: at('2026-10-25T01:30:00Z') });
    expect(readTypedMoment({ local: '2026-03-29T02:30', which: '' }, 'Europe/Copenhagen')).toMatchObject({ ok: false, sentence: expect.stringContaining('skipped') });
  });
});

describe('witnesses', () => {
  test('one letter a person, in the order of first accounts', () => {
    expect(witnessNames(['p', 'q', 'p', 'r'])).toEqual(['Witness A', 'Witness B', 'Witness A', 'Witness C']);
  });

  test('no name of a child is taken', () => {
    const account = { clientId: '6b1f8a52-93c5-4d0e-8a1d-0f3a2f6f1b11', personRole: 'witness', language: 'English', words: 'I saw light.', readBack: 'yes' };
    expect(takeAccountSchema.safeParse({ ...account, ageBand: 'under-16', personName: 'A name' }).success).toBe(false);
    expect(takeAccountSchema.safeParse({ ...account, ageBand: 'under-16', personName: '' }).success).toBe(true);
    expect(takeAccountSchema.safeParse({ ...account, ageBand: 'adult', personName: '' }).success).toBe(false);
  });
});

describe('marks over a photo', () => {
  test('are places in per cent, and read in words', () => {
    const mark = photoMarkSchema.parse({ markKind: 'arrow', x: '10', y: '20,5', toX: '50', toY: '60', words: 'edge' });
    expect(mark).toEqual({ kind: 'arrow', fromX: 0.1, fromY: 0.205, toX: 0.5, toY: 0.6, words: 'edge' });
    expect(markWords(mark)).toBe('Arrow from 10, 20.5 to 50, 60 %, “edge”');
  });

  test.each([
    [{ markKind: 'arrow', x: '', y: '2', toX: '5', toY: '6' }, 'x'],
    [{ markKind: 'arrow', x: '10', y: '20', toX: '10', toY: '20' }, 'toX'],
    [{ markKind: 'circle', x: '101', y: '20', radius: '5' }, 'x'],
    [{ markKind: 'text', x: '1', y: '2', words: ' ' }, 'words'],
  ])('a mark that cannot be drawn is refused beside its field: %o', (typed, field) => {
    const read = photoMarkSchema.safeParse(typed);
    expect(read.error?.issues.map((issue) => issue.path[0])).toContain(field);
  });
});

test('a line of custody never runs backwards: a record later than the day of the report moves its end', () => {
  const line = { code: '7-A', description: 'Sphere', seal: '', holders: [{ role: 'investigator' as const, from: at('2026-05-10T00:00:00Z'), to: null }], exams: [], planned: [] };
  const figure = custodyFigure([line], { number: 1, width: 400, textSize: 12, zone: 'UTC', now: at('2026-03-02T00:00:00Z'), endWords: 'end' });
  const held = figure.marks.find((mark) => mark.mark === 'line' && mark.widthPt === 4);
  expect(held?.mark === 'line' && (held.points[1]?.[0] ?? 0) >= (held.points[0]?.[0] ?? 0)).toBe(true);
});
