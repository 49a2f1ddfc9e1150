import type { Page } from 'playwright-core';
import { describe, expect, it } from 'vitest';
import { conclude, workToRun } from './support/case-work.ts';
import type { Conclusion, Story } from './support/case-work.ts';
import { castOnStage } from './support/cast.ts';

/**
 * Two marks that the sun can have made, worked from the raw report to the signed finding: a shaving mirror on a sill, and
 * the bowed pane of a house opposite. What is measured is that of the invented cases; each check stands beside its
 * arithmetic, done by hand.
 */
interface Worked extends Story {
  readonly check: (run: Page) => Promise<void>;
  readonly conclusion: Conclusion;
}

const figure = async (run: Page, term: string): Promise<number> => {
  const value = run.locator('dt', { hasText: term }).first().locator('xpath=following-sibling::dd[1]');
  return Number.parseFloat(((await value.textContent()) ?? '').replaceAll(',', ''));
};

const stories: readonly Worked[] = [
  {
    name: 'a shaving mirror on a sill',
    site: 'Tarrow Quay House (TARROW)',
    spot: 'flat 12, bathroom window',
    words: 'The curtain by the window had a brown line with holes in it, already out. A round mirror stood on the sill.',
    photo: '01-1',
    sound: '2025-12-14T10:50',
    found: '2025-12-14T12:31',
    optic: 'Curved mirror',
    material: 'Curtain fabric',
    numbers: { Diameter: '150', 'Focal length': '300', Faces: '196', Tilt: '9', 'Looks outward to': '182', 'Bearing, optic to mark': '210.5', 'Elevation, optic to mark': '2', 'Slant distance': '310', 'Length of the mark': '41', 'Width of the mark': '8', 'The trail runs to': '90' },
    bearings: ['Faces', 'Looks outward to', 'Bearing, optic to mark', 'The trail runs to'],
    choices: { 'opening.glass': 'double-clear', 'mark.shape': 'single-trail', 'mark.damage': 'burn-through' },
    check: async (run) => {
      // On 14 December the sun's declination is -23.2°: it moves 15.04°/h × cos 23.2° = 13.8°/h, and the reflected ray
      // with it; at 310 mm that is 310 mm × 0.241 rad = 75 mm/h.
      expect(await figure(run, 'Spot moves')).toBeGreaterThan(72);
      expect(await figure(run, 'Spot moves')).toBeLessThan(77);
      // The sun's disc is 32.5′ wide in December; at the focal length of 300 mm its picture is 300 mm × 0.00946 = 2.8 mm.
      expect(await run.getByText(/sun's image, 2\.8\d? mm/u).count()).toBeGreaterThan(0);
    },
    conclusion: {
      ideas: [
        { kind: 'Focused sunlight', statement: 'The mirror on the sill focused the sun on the curtain.', result: 'Probable' },
        { kind: 'Electrical', statement: 'The shaver socket failed.', result: 'Ruled out' },
        { kind: 'Open flame', statement: 'A candle stood on the sill.', result: 'Ruled out' },
      ],
      selected: 'Focused sunlight',
      certainty: 'Probable',
      opinion: 'Sunlight focused by the shaving mirror is the probable ignition source of the curtain.',
      limits: 'The mirror stood as it was found after the alarm.',
    },
  },
  {
    name: 'a bowed pane of the house opposite',
    site: 'Aldermoss Ridge plot 41 (ALDERMOSS)',
    spot: 'north wall, facing the neighbor',
    words: 'Second time in fourteen months: a melted diagonal line on the siding of a wall that the sun never reaches.',
    photo: '04-1',
    sound: '2026-01-22T11:20',
    found: '2026-01-22T12:45',
    optic: 'Window pane',
    material: 'Vinyl siding',
    numbers: { Width: '610', Height: '910', 'Bow at the centre of the pane': '3', Faces: '184', Tilt: '0', 'Bearing, optic to mark': '189.6', 'Elevation, optic to mark': '-27.6', 'Slant distance': '6880', 'Length of the mark': '1100', 'Width of the mark': '180', 'Marked surface faces': '4', 'Marked surface looks up by': '0' },
    bearings: ['Faces', 'Bearing, optic to mark', 'Marked surface faces'],
    choices: { 'mark.shape': 'single-trail', 'mark.damage': 'soften-or-warp' },
    check: async (run) => {
      // A pane that faces 184° sends a ray to 189.6° when the sun stands at 184° - 5.6° = 178.4°, as high as the ray falls:
      // 27.6°. That is noon of the place: 78.6° W is 3.6° past the meridian of the zone, 14 min, and the equation of time
      // in late January is 12 min more; 1.6° before the meridian takes off 6 min. About 12:20.
      expect(await run.getByText(/^At 12:(?:1[5-9]|2[0-5]), the best minute/u).count()).toBe(1);
      expect(await run.locator('main').textContent()).toMatch(/mark needs 178\.[3-5]° ±[\d.]+, 27\.[5-7]°/u);
      // Half the radius at the centre of a plate held at its edges: 0.105 (2:1) to 0.110 (square) × 0.61² m² ÷ 0.003 m,
      // the published coefficients of the check value plate-02: 6.5 to 6.8 m.
      expect(await figure(run, 'Focal length')).toBeGreaterThan(6.5);
      expect(await figure(run, 'Focal length')).toBeLessThan(6.83);
    },
    conclusion: {
      ideas: [
        { kind: 'Focused sunlight', statement: 'A bowed pane of the house opposite throws the sun on the wall.', result: 'Probable' },
        { kind: 'Other radiant heat', statement: 'A grill stood against the wall.', result: 'Ruled out' },
        { kind: 'Material fault', statement: 'The siding was faulty.', result: 'Ruled out' },
      ],
      selected: 'Focused sunlight',
      certainty: 'Probable',
      opinion: 'Sunlight thrown by a bowed pane of the house opposite is the probable cause.',
      limits: 'The bow differs from day to day; reflectance by class.',
    },
  },
];

const as = castOnStage();

describe.each(stories)('$name', (story) => {
  it('is worked from the report to a signed finding that holds the sun probable', async () => {
    const { base, run } = await workToRun(as, story);
    await run.getByRole('heading', { name: /Focused sunlight on the mark is not refuted/u }).waitFor();
    await story.check(run);
    await conclude(as, base, story.conclusion);
  });
});
