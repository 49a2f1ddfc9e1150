import { describe, expect, test } from 'vitest';
import { becauseWords, gradeHeading, reasonAt } from '#app/domain/run-words.ts';
import type { Grade } from '#app/physics/model/tests.ts';

const words: readonly Grade['word'][] = ['consistent', 'not refuted', 'inconsistent because', 'cannot tell because'];

describe('the engine’s grade on screen', () => {
  test.each(words)('"%s" states no cause, no likelihood and no safety', (word) => {
    const shown = `${gradeHeading({ word, because: [] })} ${becauseWords({ word, because: [] })}`;
    expect(shown).not.toMatch(/caused|probable|likely|proved|safe|%|score/iu);
    expect(shown.toLowerCase()).toContain(word.replace(/ because$/u, ''));
  });

  test('words that could pass for a finding say that they are none', () => {
    expect(becauseWords({ word: 'consistent', because: [] })).toContain('does not mean that it happened');
    expect(becauseWords({ word: 'not refuted', because: [] })).toContain('does not mean that it happened');
  });
});

describe('what stands before the sun', () => {
  const skyline = { sigmaDeg: 1, points: [{ azimuthDeg: 355, elevationDeg: 9, name: 'Grain House' }, { azimuthDeg: 180, elevationDeg: 4, name: 'Customs shed' }] };

  test('is named by the nearest named point, also across north', () => {
    expect(reasonAt('below-skyline', 4, skyline)).toBe('behind Grain House');
    expect(reasonAt('below-skyline', 190, skyline)).toBe('behind Customs shed');
  });

  test('is the skyline where no named point is near', () => {
    expect(reasonAt('below-skyline', 90, skyline)).toBe('behind the skyline');
    expect(reasonAt('beam-misses', 4, skyline)).toBe('beam misses the mark');
  });
});
