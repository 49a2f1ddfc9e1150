import type { Page } from 'playwright-core';
import { expect } from 'vitest';
import { send } from './cast.ts';
import type { Cast } from './cast.ts';
import { choose, demoPhotoPath } from './report-form.ts';

/** What people find and measure in one invented case, in the words of the pages; what the sun did is for the engine to say. */
export interface Story {
  readonly name: string;
  readonly site: string;
  readonly spot: string;
  readonly words: string;
  readonly photo: string;
  /** Local clock time of the place, `2026-02-08T09:00`. */
  readonly sound: string;
  readonly found: string;
  readonly optic: string;
  readonly material: string;
  /** Measured numbers by the label of their row. */
  readonly numbers: Readonly<Record<string, string>>;
  /** Those of them that are bearings, all from true north. */
  readonly bearings: readonly string[];
  readonly choices?: Readonly<Record<string, string>>;
  readonly skyline?: string;
}

export interface Idea {
  readonly kind: string;
  readonly statement: string;
  readonly result: 'Ruled out' | 'Possible' | 'Probable';
}

export interface Conclusion {
  readonly ideas: readonly Idea[];
  readonly selected: string;
  readonly certainty: 'Possible' | 'Probable';
  readonly opinion: string;
  readonly limits: string;
}

/** The investigator takes the report, the first look, the measurements and the run. @returns The page of the attached run. */
export async function workToRun(as: Cast, story: Story): Promise<{ readonly base: string; readonly run: Page }> {
  const base = `/cases/${await report(as, story)}`;
  await triage(as, story, base);
  await measure(as, story, base);
  return { base, run: await reconstruct(as, base) };
}

async function report(as: Cast, story: Story): Promise<number> {
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

async function triage(as: Cast, story: Story, base: string): Promise<void> {
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

async function measure(as: Cast, story: Story, base: string): Promise<void> {
  const page = await as('maren', `${base}/measurements`);
  await page.getByText('Other sizes and directions').evaluate((element) => element.closest('details')?.setAttribute('open', ''));
  await page.getByLabel('Kind', { exact: true }).selectOption({ label: story.optic });
  await page.locator('[name="target.material"]').selectOption({ label: story.material });
  for (const [name, value] of Object.entries(story.numbers)) {
    await page.getByLabel(`${name}, value`, { exact: true }).fill(value);
    await page.getByLabel(`${name}, method`, { exact: true }).selectOption({ label: 'Measured' });
  }
  for (const [name, option] of Object.entries(story.choices ?? {})) await page.locator(`[name="${name}"]`).selectOption(option);
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

async function reconstruct(as: Cast, base: string): Promise<Page> {
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

/** Hypotheses and an opinion by the investigator; inputs read, opinion shown and signed by the reviewer. */
export async function conclude(as: Cast, base: string, { ideas, selected, certainty, opinion, limits }: Conclusion): Promise<void> {
  for (const { kind, statement, result } of ideas) {
    const page = await as('maren', `${base}/hypotheses?edit=new`);
    await choose(page, 'Kind of cause', kind);
    await page.getByLabel('What would have happened').fill(statement);
    await page.getByLabel(result === 'Ruled out' ? 'Against' : 'For', { exact: true }).fill('Seen on the spot.');
    for (const test of ['geometry', 'weather', 'energy', 'mark']) await page.getByLabel(`Why, for ${test}`).fill('See the reconstruction.');
    // Elimination alone shows nothing: the form asks for a test that speaks for it.
    if (result === 'Probable') await choose(page, 'Geometry', 'Supports');
    await choose(page, 'Result, as a person states it', result);
    await send(page, page.getByRole('button', { name: 'Save the hypothesis' }));
    expect(await page.getByRole('alert').allTextContents(), `${kind} is saved`).toEqual([]);
  }
  const author = await as('maren', `${base}/findings`);
  await author.getByLabel('The opinion').fill(opinion);
  await choose(author, 'Selected hypothesis', selected);
  await choose(author, 'Certainty', certainty);
  await author.getByLabel('Limits of this opinion').fill(limits);
  await send(author, author.getByRole('button', { name: 'Send the finding to review' }));
  await author.getByRole('button', { name: 'Send the finding to review' }).waitFor({ state: 'detached' });
  expect(await author.getByRole('button', { name: 'Sign this version' }).count(), 'the author cannot sign').toBe(0);
  const reviewer = await as('odile', `${base}/findings`);
  await send(reviewer, reviewer.getByRole('button', { name: /Show the opinion/u }));
  for (const box of await reviewer.getByRole('checkbox', { name: /^read:/u }).all()) await box.check();
  await send(reviewer, reviewer.getByRole('button', { name: 'Sign this version' }));
  const manager = await as('joss', base);
  await expect.poll(() => manager.getByText('Corrective action', { exact: true }).count()).toBeGreaterThan(0);
}
