import { describe, expect, it } from 'vitest';
import { conclude, workToRun } from './support/case-work.ts';
import type { Story } from './support/case-work.ts';
import { castOnStage } from './support/cast.ts';

/**
 * Two marks that people blamed on the sun, worked from the raw report to the signed finding: the window never saw it,
 * and the block opposite stood in front of it. Bearings and heights are those of the invented cases; what the sun did
 * that day is for the engine to say. `reason`: why no minute of the window had the sun on the mark.
 */
const stories: readonly (Story & { readonly reason: RegExp })[] = [
  {
    name: 'a bowl behind a window to the north',
    site: 'Glen Corvie Lodge (GLENCORVIE)',
    spot: 'dining room, sideboard under the north window',
    words: 'End of the sideboard scorched beside the bowl. Nobody was there.',
    photo: '09-1',
    sound: '2026-02-08T09:00',
    found: '2026-02-08T16:30',
    optic: 'Bowl or vase',
    material: 'Timber',
    numbers: { Diameter: '180', 'Depth of the liquid': '70', 'Looks outward to': '355', 'Bearing, optic to mark': '180', 'Elevation, optic to mark': '-40', 'Slant distance': '240' },
    bearings: ['Looks outward to', 'Bearing, optic to mark'],
    reason: /outside the opening/iu,
  },
  {
    name: 'a page magnifier behind a block of houses',
    site: 'Ostlind Publishing (OSTLIND)',
    spot: '3rd floor, by the window',
    words: 'Paper in the bin burned, put out by hand. A flat lens leaned on the sill.',
    photo: '10-1',
    sound: '2026-02-17T10:15',
    found: '2026-02-17T11:40',
    optic: 'Flat plastic lens',
    material: 'Paper or board',
    numbers: { Width: '210', Height: '297', 'Focal length': '300', Faces: '165', Tilt: '30', 'Looks outward to': '170', 'Bearing, optic to mark': '343', 'Elevation, optic to mark': '-28.5', 'Slant distance': '320' },
    bearings: ['Faces', 'Looks outward to', 'Bearing, optic to mark'],
    skyline: 'bearing,elevation\n90,8\n139.5,9\n140,34\n186,34\n186.5,10\n270,7',
    reason: /behind the skyline/iu,
  },
];

const as = castOnStage();

describe.each(stories)('$name', (story) => {
  it('is worked from the report to a signed finding that rules the sun out', async () => {
    const { base, run } = await workToRun(as, story);
    expect(await run.getByText(/Inconsistent with focused sunlight/iu).count()).toBeGreaterThan(0);
    expect(await run.locator('main').textContent()).toMatch(story.reason);
    await conclude(as, base, {
      ideas: [
        { kind: 'Focused sunlight', statement: 'The glass gathered the sun on the mark.', result: 'Ruled out' },
        { kind: 'Electrical', statement: 'A fitting near the mark failed.', result: 'Possible' },
        { kind: 'Smoking materials', statement: 'A cigarette was left there.', result: 'Ruled out' },
      ],
      selected: 'Electrical',
      certainty: 'Possible',
      opinion: 'Focused sunlight is ruled out. A fitting near the mark is a possible cause.',
      limits: 'The bearing was taken from a drawing.',
    });
  });
});
