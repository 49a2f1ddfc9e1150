import type { Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { signedIn } from './support/sign-in.ts';
import { openStage } from './support/stage.ts';
import type { Stage } from './support/stage.ts';

/** The investigator at a finished run: moving the time, taking numbers away, running again, comparing; then the register. */
let stage: Stage;
let maren: Page;

beforeAll(async () => {
  stage = await openStage();
  maren = await signedIn(stage, 'maren');
});
afterAll(async () => {
  await stage.close();
});

async function open(path: string): Promise<void> {
  await maren.goto(path);
  // A key pressed before the page has taken over its own markup is lost.
  await maren.waitForLoadState('networkidle');
}

describe('the workbench', () => {
  it('moves sun, beam and spot with the keys of the card, and says why a minute is not sunlit', async () => {
    await open('/cases/118/reconstructions/1');
    const slider = maren.getByLabel('Minute of the window').first();
    await slider.focus();
    await maren.keyboard.press('Home');
    expect(await slider.getAttribute('aria-valuetext')).toMatch(/^08:40, not sunlit, behind Grain House; sun \d/u);
    expect(await maren.getByRole('img', { name: /^Section at 08:40/u }).count()).toBeGreaterThan(0);
    await maren.keyboard.press('PageUp');
    expect(await slider.getAttribute('aria-valuetext')).toMatch(/, can't tell, the ±.* straddles; /u);
    const before = await maren.getByRole('img', { name: /^Plan at/u }).first().getAttribute('aria-label');
    await maren.keyboard.press('Shift+ArrowRight');
    expect(await maren.getByRole('img', { name: /^Plan at/u }).first().getAttribute('aria-label')).not.toBe(before);
  });

  it('gives the numbers of a figure as a table by keyboard, and as a file', async () => {
    const figure = maren.getByRole('figure', { name: /Section along/u });
    await figure.getByLabel('Show the numbers').focus();
    await maren.keyboard.press('Space');
    expect(await figure.getByRole('columnheader', { name: 'Beam towards, ° true' }).isVisible()).toBe(true);
    const href = await figure.getByRole('link', { name: 'CSV' }).getAttribute('href');
    const file = await maren.request.get(href ?? '');
    expect(file.headers()['content-disposition']).toContain('case-118-run-1-beam.csv');
    expect((await file.text()).split('\r\n')[0]).toContain('at_utc,clock,sun_azimuth_deg');
  });

  it('runs the same input again, and the comparison finds nothing changed', async () => {
    await maren.getByRole('button', { name: /^Run 1 again on engine/u }).click();
    await maren.waitForURL(/\/reconstructions\/2$/u);
    await maren.getByRole('link', { name: 'Compare with another run' }).waitFor({ timeout: 25_000 });
    await maren.getByRole('link', { name: 'Compare with another run' }).click();
    await maren.getByRole('heading', { name: 'Nothing that went in changed; no minute changed its answer' }).waitFor();
    expect(await maren.getByText('both results are the same to the byte').isVisible()).toBe(true);
  });
});

describe('the register', () => {
  it('lists what waits for a first look, and keeps, renames and deletes a view of it', async () => {
    await open('/cases?view=first-look');
    expect(await maren.getByRole('link', { name: 'Scorched cable cover, hatch 2' }).isVisible()).toBe(true);
    await maren.getByText('Keep this view').click();
    await maren.getByLabel('Name of this view').fill('Waiting');
    await maren.getByRole('button', { name: 'Keep it' }).click();
    await maren.getByRole('link', { name: 'Waiting', exact: true }).waitFor();
    await maren.getByText('Change "Waiting"').click();
    await maren.getByLabel('Name of this view').fill('To look at');
    await maren.getByRole('button', { name: 'Rename it' }).click();
    await maren.getByRole('link', { name: 'To look at', exact: true }).waitFor();
    await maren.getByRole('button', { name: 'Delete this view; the cases stay' }).click();
    await maren.getByRole('link', { name: 'To look at', exact: true }).waitFor({ state: 'detached' });
  });
});

describe('the first look', () => {
  it('shows account, place and what is alike on one page, and takes the report on', async () => {
    await open('/cases/127/triage');
    expect(await maren.getByRole('img', { name: /^Case 127 at the centre/u }).isVisible()).toBe(true);
    expect(await maren.getByRole('heading', { name: 'Is the sun on it now?' }).isVisible()).toBe(true);
    await maren.getByRole('button', { name: 'Take a first look' }).click();
    await maren.getByRole('button', { name: 'Open the investigation' }).waitFor();
    expect(await maren.getByText('Risk if nothing is done').first().isVisible()).toBe(true);
  });
});
