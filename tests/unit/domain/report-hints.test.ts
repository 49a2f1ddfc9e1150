import { describe, expect, test } from 'vitest';
import { storyHints } from '#app/domain/report-hints.ts';

describe('a hint beside the story', () => {
  test.each([
    ['She burned her left hand on it.', ['health']],
    ['He was hurt and went to the hospital', ['health']],
    ['A boy saw the patch first', ['child']],
    ['Ring 0113 496 0000 for the key', ['personal']],
    ['ask caretaker@tarrow.example', ['personal']],
  ] as const)('%j hints at %j', (story, hints) => {
    expect(storyHints(story)).toEqual(hints);
  });

  test.each(['', 'Brown band along the membrane, about 2 metres, under the curved steel edge', 'The back of the chair is scorched 40 mm from the left hand side', 'Found at 15:10, band 610 x 30 mm, ran to the north-east'])('%j hints at nothing', (story) => {
    expect(storyHints(story)).toEqual([]);
  });
});
