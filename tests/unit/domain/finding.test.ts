import { describe, expect, test } from 'vitest';
import { certaintyFacts, findingFormSchema, reviewCommentSchema, selectionObstacles } from '#app/domain/finding-form.ts';
import type { HypothesisFacts } from '#app/domain/finding-form.ts';
import { certainties, certaintyObstacles, classifications, reviewFields } from '#app/domain/finding.ts';
import type { FourTests } from '#app/domain/hypothesis.ts';
import { reviewInputs } from '#app/domain/review-inputs.ts';
import type { ReviewSource } from '#app/domain/review-inputs.ts';
import { maySettleComment, withAuthorship } from '#app/domain/review-rights.ts';
import type { Actor } from '#app/domain/roles.ts';
import { sceneSchema } from '#app/domain/scene.ts';

const complete: FourTests = {
  geometry: { result: 'supports', why: '' },
  weather: { result: 'inconclusive', why: '' },
  energy: { result: 'supports', why: '' },
  mark: { result: 'not-tested', why: 'A line focus.' },
};
const against: FourTests = { ...complete, geometry: { result: 'contradicts', why: '' }, energy: { result: 'contradicts', why: '' } };
const hypothesis = (values: Partial<HypothesisFacts>): HypothesisFacts => ({ id: 'a', kind: 'electrical', result: 'ruled-out', evidenceFor: '', evidenceAgainst: 'No cable.', tests: against, ...values });
const sunlight = hypothesis({ id: 's', kind: 'focused-sunlight', result: 'probable', tests: complete });

describe('what speaks for a certainty', () => {
  test('two examined alternatives, no open test anywhere, and the supporting tests of the selected hypothesis', () => {
    const list = [sunlight, hypothesis({ id: 'b' }), hypothesis({ id: 'c', kind: 'lightning' })];
    expect(certaintyFacts(list, 's')).toEqual({ alternativesExamined: 2, untestedWithoutWhy: 0, supportingTests: 2 });
    expect(certaintyObstacles('probable', certaintyFacts(list, 's'))).toEqual([]);
  });

  test('sunlight’s supporting tests do not lend themselves to another hypothesis', () => {
    const list = [sunlight, hypothesis({ id: 'b' }), hypothesis({ id: 'c', kind: 'lightning' })];
    expect(certaintyFacts(list, 'b').supportingTests).toBe(0);
    expect(certaintyObstacles('probable', certaintyFacts(list, 'b'))).toEqual([expect.stringContaining('Elimination alone')]);
  });

  test('an open test of an alternative counts as well', () => {
    const open = hypothesis({ id: 'b', tests: { ...against, weather: { result: 'not-tested', why: '' } } });
    expect(certaintyFacts([sunlight, open], 's').untestedWithoutWhy).toBe(1);
  });

  test('"possible" and "undetermined" need none of it', () => {
    const nothing = { alternativesExamined: 0, untestedWithoutWhy: 4, supportingTests: 0 };
    expect(certaintyObstacles('possible', nothing)).toEqual([]);
    expect(certaintyObstacles('undetermined', nothing)).toEqual([]);
    expect(certaintyObstacles('probable', nothing)).toHaveLength(3);
  });
});

describe('the selected hypothesis', () => {
  test.each([
    ['probable', null, 'Say which hypothesis is probable.'],
    ['possible', null, 'Say which hypothesis is possible.'],
    ['possible', hypothesis({}), 'recorded as ruled out'],
    ['probable', hypothesis({ result: 'possible' }), 'not recorded as probable'],
    ['undetermined', sunlight, 'selects no hypothesis'],
  ] as const)('%s with %o is refused', (certainty, selected, sentence) => {
    expect(selectionObstacles(certainty, selected)).toEqual([expect.stringContaining(sentence)]);
  });

  test.each([['probable', sunlight], ['possible', hypothesis({ result: 'possible' })], ['possible', sunlight], ['undetermined', null]] as const)('%s is taken', (certainty, selected) => {
    expect(selectionObstacles(certainty, selected)).toEqual([]);
  });
});

describe('the forms', () => {
  const fields = { opinion: ' Words. ', selectedHypothesisId: '', certainty: 'undetermined', classification: 'not-classified', limits: '' };

  test('a draft may be kept with almost nothing in it', () => {
    expect(findingFormSchema.parse(fields)).toMatchObject({ opinion: 'Words.', selectedHypothesisId: null, rootCauses: '' });
  });

  test('no other certainty and no other class than the agreed words', () => {
    expect(certainties).toEqual(['probable', 'possible', 'undetermined']);
    expect(classifications).toEqual(['accidental', 'natural', 'incendiary', 'undetermined', 'not-classified']);
    expect(findingFormSchema.safeParse({ ...fields, certainty: 'certain' }).success).toBe(false);
    expect(findingFormSchema.safeParse({ ...fields, classification: 'suspicious' }).success).toBe(false);
  });

  test('a comment names one field and says something', () => {
    expect(reviewCommentSchema.safeParse({ field: 'optic', body: 'How was it measured?' }).success).toBe(true);
    expect(reviewCommentSchema.safeParse({ field: 'everything', body: 'No.' }).error?.issues[0]?.path).toEqual(['field']);
    expect(reviewCommentSchema.safeParse({ field: 'optic', body: '  ' }).error?.issues[0]?.path).toEqual(['body']);
  });
});

describe('the inputs before the conclusions', () => {
  const source: ReviewSource = {
    zone: 'Europe/Copenhagen',
    foundAt: new Date('2026-02-03T10:02:00Z'),
    foundPrecision: 'exact',
    foundClockErrorS: 360,
    onsetEarliestAt: new Date('2026-02-03T07:40:00Z'),
    onsetLatestAt: new Date('2026-02-03T09:56:00Z'),
    onsetBasis: 'alarm',
    scene: sceneSchema.parse({ optic: { kind: 'curved-mirror', radiusOfCurvatureM: { value: 0.6, plusMinus: 0.01, method: 'measured' }, focalLengthMm: { value: 300, method: 'maker' } } }),
    sceneVersion: 3,
    run: { number: 4, engineVersion: 'test', sceneVersion: 2, inputHash: 'ab'.repeat(32) },
    photos: [],
  };
  const rowOf = (field: string, label: string, values: Partial<ReviewSource> = {}) => reviewInputs({ ...source, ...values }).find((group) => group.field === field)?.rows.find((row) => row.label === label);

  test('a panel six minutes fast that read 11:02 means 10:56', () => {
    expect(rowOf('onset-window', 'Found or alarm')).toMatchObject({ value: '3 Feb 2026, 11:02', check: '6 min fast, so 3 Feb 2026, 10:56' });
  });

  test('a latest onset after the corrected time of finding is pointed out', () => {
    expect(rowOf('onset-window', 'Onset latest')?.check).toBe('');
    expect(rowOf('onset-window', 'Onset latest', { onsetLatestAt: new Date('2026-02-03T09:57:00Z') })?.check).toBe('later than it was found');
  });

  test('focal length is half the radius; where it is not, that is said', () => {
    expect(rowOf('optic', 'Radius of curvature')?.check).toBe('half of it is 300 mm, agrees with the focal length');
    const off = sceneSchema.parse({ optic: { kind: 'curved-mirror', radiusOfCurvatureM: { value: 0.6 }, focalLengthMm: { value: 450 } } });
    expect(rowOf('optic', 'Radius of curvature', { scene: off })?.check).toContain('not the focal length given');
  });

  test('a value without ± and a run on older measurements are pointed out', () => {
    expect(rowOf('optic', 'Focal length')?.check).toBe('no ± given');
    expect(rowOf('reconstruction', 'Measurements it used')?.check).toBe('the measurements are now at version 3');
  });

  test('every group is there even where nothing was recorded, and each can be commented on', () => {
    const groups = reviewInputs({ ...source, scene: null, run: null });
    expect(groups.map((group) => group.rows.length > 0)).toEqual(Array.from({ length: 6 }, () => true));
    for (const group of groups) expect(reviewFields).toContain(group.field);
  });
});

describe('rights in review', () => {
  const actor = (role: 'reviewer' | 'manager', userId = 'u'): Actor => ({ userId, organisationId: 'o', displayName: 'A person', email: 'a@example.test', units: 'metric', grants: [{ role, siteId: null }] });
  const subject = { organisationId: 'o', siteId: 's', state: 'findings' as const, relations: [] };

  test('who wrote any version counts as author', () => {
    expect(withAuthorship(subject, [{ authorId: 'x' }, { authorId: 'u' }], 'u').relations).toContain('author-of-finding');
    expect(withAuthorship(subject, [{ authorId: 'x' }], 'u').relations).toEqual([]);
  });

  test('author and reviewer settle, in work and in review; nobody once it is signed', () => {
    expect(maySettleComment(actor('manager'), subject, 'u')).toBe(true);
    expect(maySettleComment(actor('manager'), subject, 'x')).toBe(false);
    expect(maySettleComment(actor('reviewer'), { ...subject, state: 'investigation' }, 'x')).toBe(true);
    expect(maySettleComment(actor('reviewer'), { ...subject, state: 'corrective-action' }, 'x')).toBe(false);
    expect(maySettleComment(actor('reviewer'), { ...subject, organisationId: 'other' }, 'x')).toBe(false);
  });
});
