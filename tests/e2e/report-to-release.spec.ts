import type { Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { castOf, send } from './support/cast.ts';
import { choose, demoPhotoPath, fillRooftopReport, openReport } from './support/report-form.ts';
import { signedIn } from './support/sign-in.ts';
import { openStage } from './support/stage.ts';
import type { Stage } from './support/stage.ts';

/** The rooftop scorch from a phone report to a closed case and a redacted file, by role and label. */
const words = 'Brown band along the membrane under the curved steel edge, about two metres. Tomas Weir saw it first.';

let stage: Stage;
let caseNumber = 0;
let receipt = '';
const as = castOf(() => stage);
const casePath = (tab = '') => `/cases/${caseNumber}${tab}`;

beforeAll(async () => {
  stage = await openStage();
});
afterAll(async () => {
  await stage.close();
});

describe('a rooftop scorch', () => {
  it('is reported from a phone with two photos, after the make-safe card', async () => {
    const page = await signedIn(stage, 'tomas', 'phone');
    await page.goto('/report');
    expect(await page.getByRole('heading', { name: 'Smoking or burning?' }).isVisible()).toBe(true);
    await openReport(page);
    await page.getByLabel('Photo files').setInputFiles([demoPhotoPath('03-1'), demoPhotoPath('03-2')]);
    await fillRooftopReport(page, words);
    await expect.poll(() => page.getByText(/^\d+, with the team$/u).count()).toBe(2);
    await page.getByRole('button', { name: 'Send', exact: true }).last().click();
    await page.getByRole('heading', { name: 'Received. Thank you' }).waitFor();
    receipt = new URL(page.url()).pathname.split('/').at(-1) ?? '';
    expect(receipt).toMatch(/^[A-Z0-9]{2}-[A-Z0-9]{4}-[A-Z0-9]{2}$/u);
    await page.getByRole('link', { name: /Open it in the register/u }).click();
    await page.waitForURL(/\/cases\/\d+/u);
    caseNumber = Number(/\/cases\/(\d+)/u.exec(page.url())?.[1]);
    expect(caseNumber).toBeGreaterThan(200);
    await expect.poll(() => stage.mail.messages.some((message) => message.to.some((address) => address.startsWith('tomas@'))), { timeout: 20_000 }).toBe(true);
  });

  it('gets a first look, its facts and an investigator', async () => {
    const page = await as('maren', casePath('/triage'));
    await send(page, page.getByRole('button', { name: 'Take a first look' }));
    await page.getByRole('heading', { name: 'Facts' }).waitFor();
    await page.getByLabel('Kind of event').selectOption({ label: 'Heat damage: scorch, melt or distortion' });
    await choose(page, 'Is the hazard still there?', 'No');
    const yesterday = new Date(Date.now() - 86_400_000).toISOString().slice(0, 10);
    await page.getByLabel('Last seen sound').fill(`${yesterday}T09:00`);
    await page.getByLabel('Latest possible onset').fill(`${yesterday}T15:00`);
    await page.getByLabel('Basis of the window').selectOption({ label: 'Last seen sound' });
    await choose(page, 'Risk, as you judge it', 'High');
    await send(page, page.getByRole('button', { name: 'Save the facts' }));
    await page.goto(casePath('/triage'));
    await page.getByLabel('Investigator').selectOption({ label: 'Maren Kvist' });
    await send(page, page.getByRole('button', { name: 'Name the investigator' }));
    await page.goto(casePath('/triage'));
    await page.locator('#move-accept').evaluate((element) => element.setAttribute('open', ''));
    await send(page, page.locator('#move-accept').getByRole('button', { name: 'Open the investigation' }));
    await expect.poll(() => page.getByText('Investigation', { exact: true }).count()).toBeGreaterThan(0);
  });

  it('is measured, reconstructed, and the run is attached', async () => {
    const page = await as('maren', casePath('/measurements'));
    await page.getByLabel('Kind', { exact: true }).selectOption({ label: 'Metal trim or parapet' });
    await page.getByLabel('What was measured or changed, and by whom').fill('Measured on the roof with tape and inclinometer.');
    await send(page, page.getByRole('button', { name: /Save/u }));
    await page.goto(casePath('/reconstructions'));
    await send(page, page.getByRole('button', { name: 'Run', exact: true }));
    await expect
      .poll(async () => {
        await page.goto(casePath('/reconstructions/1'));
        return page.getByRole('button', { name: 'Attach to the case' }).count();
      }, { timeout: 60_000, interval: 1_000 })
      .toBe(1);
    await send(page, page.getByRole('button', { name: 'Attach to the case' }));
    await page.goto(casePath());
    await expect.poll(() => page.getByText(/Reconstruction 1, attached/u).count()).toBe(1);
  });

  it('is not sent to review before two alternatives are examined', async () => {
    const page = await as('maren', casePath('/findings'));
    await page.getByLabel('The opinion').fill('Sunlight gathered by the curved steel edge is possible; the edge could be measured only in part.');
    await send(page, page.getByRole('button', { name: 'Send the finding to review' }));
    await expect.poll(() => page.getByText(/at least two alternatives/u).count()).toBeGreaterThan(0);
    expect(await page.getByLabel('The opinion').inputValue()).toContain('Sunlight gathered');
  });

  it('gets hypotheses with alternatives, and a finding that is sent to review', async () => {
    const hypotheses: readonly (readonly [kind: string, statement: string, supports: boolean])[] = [
      ['Focused sunlight', 'The curved steel edge gathered the sun in a line on the membrane.', true],
      ['Hot work', 'Torch work on the roof marked the membrane.', false],
      ['Material fault', 'The membrane aged along a roll edge.', false],
    ];
    for (const [kind, statement, supports] of hypotheses) {
      const page = await as('maren', casePath('/hypotheses?edit=new'));
      await choose(page, 'Kind of cause', kind);
      await page.getByLabel('What would have happened').fill(statement);
      await page.getByLabel('For', { exact: true }).fill(supports ? 'The band runs along the edge.' : '');
      await page.getByLabel('Against', { exact: true }).fill(supports ? '' : 'No permit, and rolls run across the band.');
      for (const test of ['geometry', 'weather', 'energy', 'mark']) await page.getByLabel(`Why, for ${test}`).fill('Not measured on the day.');
      await choose(page, 'Result, as a person states it', supports ? 'Possible' : 'Ruled out');
      await send(page, page.getByRole('button', { name: 'Save the hypothesis' }));
      await expect.poll(() => page.getByText(statement).count()).toBeGreaterThan(0);
    }
    const page = await as('maren', casePath('/findings'));
    await page.getByLabel('The opinion').fill('Sunlight gathered by the curved steel edge is a possible cause of the band.');
    await choose(page, 'Selected hypothesis', 'Focused sunlight');
    await choose(page, 'Certainty', 'Possible');
    await page.getByLabel('Limits of this opinion').fill('The edge was measured in part only.');
    await send(page, page.getByRole('button', { name: 'Send the finding to review' }));
    await expect.poll(() => page.getByText('Findings', { exact: true }).count()).toBeGreaterThan(0);
    expect(await page.getByRole('button', { name: 'Sign this version' }).count()).toBe(0);
  });

  it('is reviewed by another person, who reads the inputs before the opinion, and signs', async () => {
    const page = await as('odile', casePath('/findings'));
    expect(await page.getByText('Sunlight gathered by the curved steel edge is a possible cause').count()).toBe(0);
    await send(page, page.getByRole('button', { name: /Show the opinion/u }));
    await page.getByText('Sunlight gathered by the curved steel edge is a possible cause').waitFor();
    for (const box of await page.getByRole('checkbox', { name: /^read:/u }).all()) await box.check();
    await send(page, page.getByRole('button', { name: 'Sign this version' }));
    await expect.poll(() => page.getByText('Corrective action', { exact: true }).count()).toBeGreaterThan(0);
  });

  it('gets a corrective action, done with proof and verified by another person', async () => {
    const manager = await as('joss', casePath('/actions?add=1'));
    await manager.getByLabel('What is to be done').fill('Matt coating on the steel edge');
    await choose(manager, 'Level of control', 'Engineering control');
    await manager.getByLabel('Owner').first().selectOption({ label: 'Dara Whitlock' });
    await manager.getByLabel('Verifier').first().selectOption({ label: 'Joss Penhallow' });
    await choose(manager, 'Risk if nothing is done', 'High');
    await send(manager, manager.getByRole('button', { name: 'Give the action' }));
    await manager.getByRole('heading', { name: /Matt coating on the steel edge/u }).or(manager.getByText('Matt coating on the steel edge')).first().waitFor();

    const owner = await as('dara', casePath('/actions'));
    await openFold(owner, 'Mark done');
    await owner.getByLabel('What was done').fill('Two coats, matt grey.');
    await owner.getByLabel('Photo or document').first().setInputFiles(demoPhotoPath('03-3'));
    await send(owner, owner.getByRole('button', { name: 'Mark done' }));
    await expect.poll(() => owner.getByText(/done, not verified/iu).count()).toBeGreaterThan(0);

    const verifier = await as('joss', casePath('/actions'));
    await openFold(verifier, 'Verify');
    await verifier.getByLabel('What you checked, and how').fill('Looked at the edge from the hatch.');
    await send(verifier, verifier.getByRole('button', { name: 'Verify', exact: true }));
    await expect.poll(() => verifier.getByText(/effect not shown/iu).count()).toBeGreaterThan(0);
  });

  it('has its action shown effective, by a person who looked when the sun was back', async () => {
    const verifier = await as('joss', casePath('/actions'));
    await openFold(verifier, 'Record it');
    await choose(verifier, 'Does it work?', 'It works');
    await verifier.getByLabel('What you saw, and when').fill('At noon in full sun: no bright strip on the membrane.');
    await send(verifier, verifier.getByRole('button', { name: 'Record it' }));
    await expect.poll(() => verifier.getByText(/shown effective/iu).count()).toBeGreaterThan(0);
  });

  it('is closed by the site manager, with a lesson and the outside reports checked', async () => {
    const manager = await as('joss', casePath());
    const closing = manager.locator('#move-close');
    await closing.evaluate((element) => element.setAttribute('open', ''));
    await closing.getByLabel('Lesson for other sites').fill('Bright curved edges beside dark membranes want a matt finish.');
    await closing.getByLabel('Reports to outside bodies').selectOption({ label: 'Checked: not needed' });
    await closing.getByLabel('A word for the log, if needed').fill('Fix shown to work.');
    await send(manager, closing.getByRole('button', { name: 'Close the case' }));
    await expect.poll(() => manager.getByText('Closed', { exact: true }).count()).toBeGreaterThan(0);
  });

  it('leaves as a numbered release that one person prepares and another approves', async () => {
    const preparer = await as('maren', casePath('/releases'));
    await preparer.getByLabel('For', { exact: true }).selectOption({ label: 'Harrowmere Mutual, 1 reader' });
    for (const share of await preparer.getByRole('radio', { name: 'Share', exact: true }).all()) await share.check();
    await preparer.getByLabel('What is new in it').fill('First release.');
    await send(preparer, preparer.getByRole('button', { name: 'Prepare the release' }));
    await preparer.goto(casePath('/releases/1'));
    expect(await preparer.getByRole('button', { name: /Approve and release/u }).count()).toBe(0);

    const approver = await as('joss', casePath('/releases/1'));
    await send(approver, approver.getByRole('button', { name: /Approve and release/u }));
    await expect.poll(() => approver.getByText(/released/iu).count()).toBeGreaterThan(0);
  });

  it('is read by the insurer without a name, a position or the rest of the register', async () => {
    const reader = await as('lena', '/case-files');
    await reader.getByRole('link', { name: new RegExp(String(caseNumber), 'u') }).first().click();
    await reader.waitForURL(/case-files\/[0-9a-f-]+/u);
    await reader.getByText('possible cause of the band').first().waitFor();
    const text = (await reader.locator('body').textContent()) ?? '';
    expect(text).toContain('possible cause of the band');
    expect(text).not.toMatch(/Weir|Kvist|Farrant|Penhallow|Whitlock/u);
    expect(text).not.toMatch(/53\.5|-1\.6\d*°/u);
    expect(text).toMatch(/personal/u);
    const register = await reader.goto('/cases');
    expect(register?.status()).toBe(403);
  });

  it('is followed by its reporter with the receipt, in plain words and without names', async () => {
    const page = await stage.visit({ size: 'phone' });
    await page.goto(`/progress?code=${receipt}`);
    const text = (await page.locator('main').textContent()) ?? '';
    // While actions are open the heading goes on: "It is being put right".
    expect(await page.getByRole('heading', { level: 1 }).textContent()).toBe('Focused sunlight: a possible cause');
    expect(text).not.toMatch(/Kvist|Farrant|Penhallow|Weir/u);
  });
});

async function openFold(page: Page, button: string): Promise<void> {
  const fold = page.locator('details').filter({ has: page.locator(`button:has-text("${button}")`) }).first();
  if ((await fold.count()) > 0) await fold.evaluate((element) => element.setAttribute('open', ''));
}
