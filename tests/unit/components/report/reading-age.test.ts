import { createElement } from 'react';
import type { ReactElement } from 'react';
import { renderToStaticMarkup } from 'react-dom/server';
import { createMemoryRouter, RouterProvider } from 'react-router';
import { describe, expect, test } from 'vitest';
import { MakeSafeLines } from '#app/components/layout/make-safe-card.tsx';
import { HurtQuestions } from '#app/components/report/hurt-questions.tsx';
import { MoreQuestions } from '#app/components/report/more-questions.tsx';
import { WhereQuestion } from '#app/components/report/where-question.tsx';
import { DoorCard } from '#app/components/sites/door-card.tsx';
import { progressHeading } from '#app/domain/report-progress.ts';
import { caseStates } from '#app/domain/case-state.ts';

/**
 * Grade of the Flesch–Kincaid formula: 0.39 × words per sentence + 11.8 × syllables per word − 15.59 (J. P. Kincaid et
 * al., Derivation of new readability formulas for Navy enlisted personnel, Research Branch Report 8-75, 1975). A reading
 * age of about eleven is grade 6 in the schools that it was made for. Syllables are counted as groups of vowels without a
 * silent e at the end, as is usual for it.
 */
function grade(sentences: readonly string[]): number {
  const words = sentences.flatMap((sentence) => sentence.match(/[\p{L}']+/gu) ?? []);
  const syllables = words.reduce((sum, word) => sum + syllablesIn(word.toLowerCase()), 0);
  return 0.39 * (words.length / sentences.length) + 11.8 * (syllables / words.length) - 15.59;
}

function syllablesIn(word: string): number {
  const spoken = word.replace(/(?:[^laeiouy]es|[^aeiouytd]ed|[^laeiouy]e)$/u, (end) => end.slice(0, 1));
  return Math.max(1, spoken.match(/[aeiouy]+/gu)?.length ?? 1);
}

/** Sentences of a page: each paragraph, label and legend by itself, cut at full stops. Drawings and hidden words count too. */
function sentencesOf(element: ReactElement): string[] {
  const markup = renderToStaticMarkup(createElement(RouterProvider, { router: createMemoryRouter([{ path: '/', element }]) }));
  return markup
    .replace(/<(?:option|svg|select)[\s\S]*?<\/(?:option|svg|select)>/gu, ' ')
    .replace(/<\/?(?:p|label|legend|h[1-6]|li|div|button|fieldset|summary)[^>]*>/gu, '\n')
    .replace(/<[^>]+>/gu, '')
    .replaceAll('&#x27;', "'")
    .replace(/&[^;]+;/gu, ' ')
    .split(/\n|(?<=[.?!:;])\s/u)
    .map((sentence) => sentence.trim())
    .filter((sentence) => (sentence.match(/\p{L}+/gu)?.length ?? 0) >= 3);
}

const field = (name: string) => ({ name, id: name });
const card = { name: 'Tarrow Quay House', guestCode: 'tarrow-1', link: '', host: 'scorchline.example', emergencyNumber: '112', qr: { size: 1, path: '' } };

describe('texts for reporters stay at a reading age of about eleven', () => {
  test.each([
    ['the make-safe lines', createElement(MakeSafeLines)],
    ['where', createElement(WhereQuestion, { field, sites: [], chosen: undefined, fixed: false, values: {} })],
    ['who was hurt', createElement(HurtQuestions, { field })],
    ['the further questions', createElement(MoreQuestions, { field, guest: true, units: 'metric', values: {} })],
    ['the card for the door', createElement(DoorCard, { card })],
  ])('%s', (_what, element) => {
    const sentences = sentencesOf(element);
    expect(sentences.length).toBeGreaterThan(3);
    expect(grade(sentences)).toBeLessThanOrEqual(6.9);
  });

  test('the headings of the page of progress', () => {
    expect(grade(caseStates.map((state) => progressHeading({ state, closeReason: null, result: null })))).toBeLessThanOrEqual(6.9);
  });

  test('the formula itself: a sentence of ten one-syllable words has grade 0.11', () => {
    expect(grade(['The cat sat on the mat and saw a dog.'])).toBeCloseTo(0.39 * 10 + 11.8 - 15.59, 6);
  });
});
