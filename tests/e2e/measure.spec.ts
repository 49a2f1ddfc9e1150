import type { Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { demoPhotoPath } from './support/report-form.ts';
import { signedIn } from './support/sign-in.ts';
import { openStage } from './support/stage.ts';
import type { Stage } from './support/stage.ts';

/** The investigator measures the spa windows: values, plan, skyline, weather and a photo, by label and by keyboard. */
let stage: Stage;
let page: Page;
const base = '/cases/129';

async function open(path: string): Promise<void> {
  await page.goto(`${base}${path}`);
  await page.waitForLoadState('networkidle');
}
async function save(name: RegExp | string): Promise<void> {
  const answered = page.waitForResponse((response) => response.request().method() === 'POST');
  await page.getByRole('button', { name }).click();
  await answered;
  await page.waitForLoadState('networkidle');
}
const versions = () => page.getByRole('complementary', { name: 'Versions' }).getByText(/^Version \d+$/u).count();

beforeAll(async () => {
  stage = await openStage();
  page = await signedIn(stage, 'maren');
});
afterAll(async () => {
  await stage.close();
});

describe('the measurements of a case', () => {
  it('keep on this device what was typed and not sent', async () => {
    await open('/measurements');
    await page.getByLabel('Length of the mark, value').fill('180');
    await page.getByText(/Kept on this device/u).waitFor();
    await page.reload();
    await expect.poll(() => page.getByLabel('Length of the mark, value').inputValue()).toBe('180');
  });

  it('say how to mend what cannot be read, keep it, and are saved as a new version', async () => {
    await page.getByLabel('What was measured or changed, and by whom').fill('Tape on the lounger.');
    await save('Save as version 2');
    await page.getByRole('alert').getByRole('link', { name: 'Length of the mark' }).waitFor();
    await page.getByLabel('Length of the mark, method').selectOption({ label: 'Measured' });
    await save('Save as version 2');
    await expect.poll(versions).toBe(2);
    expect(await page.getByText(/Maren Kvist, \d+ \w+ \d{4}/u).count()).toBeGreaterThan(0);
  });

  it('stand in plan and section, where the mark is moved by the arrow keys', async () => {
    await open('/scene');
    const bearing = page.getByLabel('Bearing, optic to mark, value');
    expect(await bearing.inputValue()).toBe('70');
    await page.locator('[data-drawn=wide], [data-drawn=middle], [data-drawn=narrow]').locator('visible=true').first().getByRole('slider', { name: 'Mark', exact: true }).press('Shift+ArrowRight');
    await expect.poll(() => bearing.inputValue()).not.toBe('70');
    await page.getByRole('button', { name: 'Undo, 1 step' }).click();
    expect(await bearing.inputValue()).toBe('70');
    await page.getByLabel('Walls, fences and blocks near by').fill('40 9 100 8 1.5 Spa wall');
    await page.getByLabel('What was measured or changed, and by whom').fill('Wall paced out.');
    await save('Save as version 3');
    await expect.poll(() => page.getByLabel('Walls, fences and blocks near by').inputValue()).toBe('40 9 100 8 1.5 Spa wall');
  });

  it('have a skyline from pasted rows, drawn with the way of the sun', async () => {
    await open('/skyline');
    await page.getByText('Paste rows from a table').click();
    await page.getByLabel('Rows to add').fill('bearing,elevation\n60,4,1,clinometer,,Awning\n120,2.5\n240,3');
    await page.getByLabel('What was measured, and by whom').fill('Clinometer at the pane.');
    await save(/Save as version 4/u);
    await page.getByRole('img', { name: 'Skyline of 3 points, up to 4.0°.' }).first().waitFor();
    expect(await page.getByText('3 points of skyline, measured for this case').count()).toBe(1);
  });

  it('have a sheet for paper with what is known and a code that leads back', async () => {
    await open('/measurements/sheet');
    expect(await page.getByRole('img', { name: `Code that leads to ${stage.baseUrl}${base}/measurements` }).count()).toBe(1);
    expect(await page.getByRole('row', { name: /Length of the mark/u }).getByText('180').count()).toBe(1);
    expect(await page.getByText('Only go up if authorised').count()).toBeGreaterThan(0);
  });
});

describe('the weather of a case', () => {
  it('is tried before it is kept, and a far station says what it cannot prove', async () => {
    await open('/weather');
    await page.getByLabel('Station file').setInputFiles({ name: 'station.csv', mimeType: 'text/csv', buffer: Buffer.from('time;dni\n2026-11-18 08:30;610\n2026-11-18 08:40;bright\n2026-11-18 08:50;655\n') });
    await page.getByRole('button', { name: 'Look at the file' }).click();
    await page.getByLabel('Times are').selectOption({ label: 'Clock of the place, with summer time' });
    await page.getByLabel('A time is the').selectOption({ label: 'end of its interval' });
    await page.getByLabel('Length of an interval, min').fill('10');
    await page.getByRole('button', { name: 'Try it, keep nothing' }).click();
    await page.getByText('Line 3: direct, square to the sun is “bright”, no number.').waitFor();
    const form = page.locator('form', { has: page.getByRole('button', { name: 'Keep 2 values' }) });
    await form.getByLabel('Source').fill('Ridge station, invented');
    await form.getByLabel('Kind of numbers').selectOption({ label: 'Measured by instruments at a station' });
    await form.getByLabel('Distance of the station, km').fill('34');
    await save('Keep 2 values');
    await page.getByText('A station 34 km off cannot prove a clear gap').first().waitFor();
    expect(await page.getByText('a run goes by this one').count()).toBe(1);
  });
});

describe('a photo of known scale', () => {
  it('gives the length of a mark by typed points, and writes it with its ±', async () => {
    await open('/photos');
    await page.getByLabel('Photos for case 129').setInputFiles(demoPhotoPath('03-1'));
    await page.getByRole('button', { name: 'Add them' }).click();
    const link = page.getByRole('link', { name: 'Measure on photo 1' });
    await expect.poll(async () => {
      if ((await link.count()) === 0) await page.reload();
      return link.count();
    }, { timeout: 20_000, interval: 1_000 }).toBe(1);
    await link.click();
    await page.getByLabel('Corner 1 to 2, mm').fill('100');
    await page.getByLabel('Corner 2 to 3, mm').fill('50');
    await page.getByText('Points as numbers').click();
    const points = { 'Corner 1, or one end of the scale': [100, 100], 'Corner 2, or the other end of the scale': [600, 100], 'Corner 3': [600, 350], 'Corner 4': [100, 350], 'Mark, end A': [200, 200], 'Mark, end B': [400, 200] } as const;
    for (const [name, [right, down]] of Object.entries(points)) {
      await page.getByLabel(`${name}, right`).fill(String(right));
      await page.getByLabel(`${name}, down`).fill(String(down));
    }
    // Five pixels are a millimetre here.
    await page.getByText(/^40\.\d+ ±\d+\.\d+ mm$/u).waitFor();
    await save(/Use as measurement/u);
    await page.waitForURL(/\/measurements$/u);
    expect(Number(await page.getByLabel('Length of the mark, value').inputValue())).toBeCloseTo(40, 0);
    expect(await page.getByLabel('Length of the mark, method').inputValue()).toBe('photo');
  });
});
