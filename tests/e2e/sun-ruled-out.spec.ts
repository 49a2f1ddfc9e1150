import type { Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { castOf, send } from './support/cast.ts';
import { choose, demoPhotoPath } from './support/report-form.ts';
import { openStage } from './support/stage.ts';
import type { Stage } from './support/stage.ts';

/**
 * Two marks that people blamed on the sun, worked from the raw report to the signed finding: the window never saw it,
 * and the block opposite stood in front of it. Bearings and heights are those of the invented cases; what the sun did
 * that day is for the engine to say.
 */
interface Story {
  readonly name: string;
  readonly site: string;
  readonly spot: string;
  readonly words: string;
  readonly photo: string;
  readonly sound: string;
  readonly found: string;
  readonly optic: string;
  readonly material: string;
  readonly numbers: Readonly<Record<string, string>>;
  readonly bearings: readonly string[];
  readonly skyline?: string;
  /** Why no minute of the window had the sun on the mark. */
  readonly reason: RegExp;
}

const stories: readonly Story[] = [
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

let stage: Stage;
const as = castOf(() => stage);

async function report(story: Story): Promise<number> {
  const page = await as('maren', '/report');
  await page.getByRole('button', { name: 'It is covered, or gone. Go on' }).click();
  await page.getByLabel('Photo files').setInputFiles([demoPhotoPath(story.photo)]);
  await page.getByLabel('Site').selectOption({ label: story.site });
  await page.getByLabel('The spot, in words').fill(story.spot);
  await choose(page, 'When was it found?', 'A range');
  await page.getByLabel('Last seen sound', { exact: true }).fill(story.sound);
  await page.getByLabel('Found', { exact: true }).fill(story.found);
  await choose(page, 'What do you see?', 'Mark or scorch');
  await page.getByLabel('In your words').fill(story.words);
  await choose(page, 'Was anyone hurt?', 'No');
  await page.getByText('with the team').first().waitFor();
  await page.getByRole('button', { name: 'Send', exact: true }).last().click();
  await page.getByRole('link', { name: /Open it in the register/u }).click();
  await page.waitForURL(/\/cases\/\d+/u);
  return Number(/\/cases\/(\d+)/u.exec(page.url())?.[1]);
}

async function triage(story: Story, base: string): Promise<void> {
  const page = await as('maren', `${base}/triage`);
  await send(page, page.getByRole('button', { name: 'Take a first look' }));
  await page.getByLabel('Kind of event').selectOption({ label: 'Heat damage: scorch, melt or distortion' });
  await choose(page, 'Is the hazard still there?', 'No');
  await page.getByLabel('Last seen sound').fill(story.sound);
  await page.getByLabel('Latest possible onset').fill(story.found);
  await page.getByLabel('Basis of the window').selectOption({ label: 'Last seen sound' });
  await choose(page, 'Risk, as you judge it', 'Medium');
  await send(page, page.getByRole('button', { name: 'Save the facts' }));
  await page.goto(`${base}/triage`);
  await page.getByLabel('Investigator').selectOption({ label: 'Maren Kvist' });
  await send(page, page.getByRole('button', { name: 'Name the investigator' }));
  await page.goto(`${base}/triage`);
  await page.locator('#move-accept').evaluate((element) => element.setAttribute('open', ''));
  await send(page, page.locator('#move-accept').getByRole('button', { name: 'Open the investigation' }));
}

async function measure(story: Story, base: string): Promise<void> {
  const page = await as('maren', `${base}/measurements`);
  await page.getByText('Other sizes and directions').evaluate((element) => element.closest('details')?.setAttribute('open', ''));
  await page.getByLabel('Kind', { exact: true }).selectOption({ label: story.optic });
  await page.locator('[name="target.material"]').selectOption({ label: story.material });
  for (const [name, value] of Object.entries(story.numbers)) {
    await page.getByLabel(`${name}, value`, { exact: true }).fill(value);
    await page.getByLabel(`${name}, method`, { exact: true }).selectOption({ label: 'Measured' });
  }
  for (const name of story.bearings) await page.getByLabel(`${name}, which north`, { exact: true }).selectOption('true');
  await page.getByLabel('What was measured or changed, and by whom').fill('Measured in the room; bearings from the drawing.');
  await send(page, page.getByRole('button', { name: /^Save as version/u }));
  if (!story.skyline) return;
  await page.goto(`${base}/skyline`);
  await page.getByText('Paste rows from a table').evaluate((element) => element.closest('details')?.setAttribute('open', ''));
  await page.getByLabel('Rows to add').fill(story.skyline);
  await page.getByLabel('What was measured, and by whom').fill('Clinometer at the sill.');
  await send(page, page.getByRole('button', { name: /^Save as version/u }));
}

async function reconstruct(base: string): Promise<Page> {
  const page = await as('maren', `${base}/reconstructions`);
  await send(page, page.getByRole('button', { name: 'Run', exact: true }));
  await expect
    .poll(async () => {
      await page.goto(`${base}/reconstructions/1`);
      return page.getByRole('button', { name: 'Attach to the case' }).count();
    }, { timeout: 60_000, interval: 1_000 })
    .toBe(1);
  await send(page, page.getByRole('button', { name: 'Attach to the case' }));
  await page.goto(`${base}/reconstructions/1`);
  return page;
}

async function conclude(base: string): Promise<void> {
  const hypotheses = [['Focused sunlight', 'The glass gathered the sun on the mark.', 'Ruled out'], ['Electrical', 'A fitting near the mark failed.', 'Possible'], ['Smoking materials', 'A cigarette was left there.', 'Ruled out']] as const;
  for (const [kind, statement, result] of hypotheses) {
    const page = await as('maren', `${base}/hypotheses?edit=new`);
    await choose(page, 'Kind of cause', kind);
    await page.getByLabel('What would have happened').fill(statement);
    await page.getByLabel(result === 'Possible' ? 'For' : 'Against', { exact: true }).fill('Seen in the room.');
    for (const test of ['geometry', 'weather', 'energy', 'mark']) await page.getByLabel(`Why, for ${test}`).fill('See the reconstruction.');
    await choose(page, 'Result, as a person states it', result);
    await send(page, page.getByRole('button', { name: 'Save the hypothesis' }));
  }
  const author = await as('maren', `${base}/findings`);
  await author.getByLabel('The opinion').fill('Focused sunlight is ruled out. A fitting near the mark is a possible cause.');
  await choose(author, 'Selected hypothesis', 'Electrical');
  await choose(author, 'Certainty', 'Possible');
  await author.getByLabel('Limits of this opinion').fill('The bearing was taken from a drawing.');
  await send(author, author.getByRole('button', { name: 'Send the finding to review' }));
  await author.getByRole('button', { name: 'Send the finding to review' }).waitFor({ state: 'detached' });
  const reviewer = await as('odile', `${base}/findings`);
  await send(reviewer, reviewer.getByRole('button', { name: /Show the opinion/u }));
  for (const box of await reviewer.getByRole('checkbox', { name: /^read:/u }).all()) await box.check();
  await send(reviewer, reviewer.getByRole('button', { name: 'Sign this version' }));
}

beforeAll(async () => {
  stage = await openStage();
});
afterAll(async () => {
  await stage.close();
});

describe.each(stories)('$name', (story) => {
  it('is worked from the report to a signed finding that rules the sun out', async () => {
    const base = `/cases/${await report(story)}`;
    await triage(story, base);
    await measure(story, base);
    const run = await reconstruct(base);
    expect(await run.getByText(/Inconsistent with focused sunlight/iu).count()).toBeGreaterThan(0);
    expect(await run.locator('main').textContent()).toMatch(story.reason);
    await conclude(base);
    const page = await as('joss', base);
    await expect.poll(() => page.getByText('Corrective action', { exact: true }).count()).toBeGreaterThan(0);
  });
});
