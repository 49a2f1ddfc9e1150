import { eq } from 'drizzle-orm';
import { beforeAll, describe, expect, test } from 'vitest';
import { actionStage, existingAction } from './stage.ts';
import type { ActionStage } from './stage.ts';
import { db } from '#db/client.server.ts';
import { correctiveActions, outbox, users } from '#db/schema/all.ts';
import { addDays } from '#app/domain/action-form.ts';
import { remindersFor, sendDueReminders } from '#app/jobs/handlers/due-reminders.server.ts';
import type { ReminderFacts } from '#app/jobs/handlers/due-reminders.server.ts';

const noonOf = (day: string) => new Date(`${day}T12:00:00Z`);
const due = '2026-07-24';

describe('which reminder is due', () => {
  const on = (today: string, values: Partial<ReminderFacts> = {}) =>
    remindersFor({ state: 'open', dueOn: due, effectCheckOn: null, givenOn: '2026-06-01', returnOn: null, today, ...values }).map((reminder) => reminder.kind);

  test.each<[string, string[]]>([
    ['2026-07-16', []],
    ['2026-07-17', ['due-7']],
    ['2026-07-20', ['due-7']],
    ['2026-07-23', ['due-1']],
    ['2026-07-24', ['due-1']],
    ['2026-07-25', ['late']],
  ])('on %s for an action due 2026-07-24: %j', (today, kinds) => {
    expect(on(today)).toEqual(kinds);
  });

  test('none before the day to somebody who was given it today', () => {
    expect(on('2026-07-20', { givenOn: '2026-07-20' })).toEqual([]);
    expect(on('2026-07-25', { givenOn: '2026-07-25' })).toEqual(['late']);
  });

  test('none once it is done; the check when the sun is back', () => {
    expect(on('2026-08-30', { state: 'done' })).toEqual([]);
    expect(on('2026-08-02', { state: 'verified', effectCheckOn: '2026-08-03' })).toEqual([]);
    expect(on('2026-08-03', { state: 'verified', effectCheckOn: '2026-08-03' })).toEqual(['check-due']);
  });

  test.each<[string, string[]]>([
    ['2026-09-05', []],
    ['2026-09-06', ['sun-14']],
    ['2026-09-17', ['sun-3']],
    ['2026-09-20', ['sun-3']],
    ['2026-09-21', []],
  ])('on %s for a done, unverified fix when the sun is back on 2026-09-20: %j', (today, kinds) => {
    expect(on(today, { state: 'done', returnOn: '2026-09-20' })).toEqual(kinds);
  });

  test('the sun is no reason to remind once the fix is verified', () => {
    expect(on('2026-09-18', { state: 'verified', returnOn: '2026-09-20' })).toEqual([]);
    expect(on('2026-09-18', { state: 'not-effective', returnOn: '2026-09-20' })).toEqual(['sun-3']);
  });
});

describe('the hourly run', () => {
  let stage: ActionStage;
  beforeAll(async () => {
    stage = await actionStage();
    await existingAction(stage, { dueOn: due, createdAt: noonOf('2026-06-01') });
  });

  const subjects = async (email: string) => (await db.select().from(outbox).where(eq(outbox.toAddress, email)).orderBy(outbox.createdAt)).map((mail) => mail.subject);

  test('run twice, and again an hour later, it sends each reminder once', async () => {
    const morning = noonOf('2026-07-17');
    await sendDueReminders(morning);
    await sendDueReminders(morning);
    await sendDueReminders(new Date(morning.getTime() + 3_600_000));
    await sendDueReminders(noonOf('2026-07-19'));
    expect(await subjects(stage.owner.email)).toEqual([expect.stringContaining('due in 7 days')]);
  });

  test('two workers at the same moment send it once', async () => {
    const dayBefore = noonOf('2026-07-23');
    await Promise.all([sendDueReminders(dayBefore), sendDueReminders(dayBefore)]);
    expect(await subjects(stage.owner.email)).toHaveLength(2);
  });

  test('once late, the owner and the managers of the site are told once, not every day', async () => {
    for (const later of [1, 2, 9]) await sendDueReminders(noonOf(addDays(due, later)));
    expect((await subjects(stage.owner.email)).filter((subject) => subject.includes('is late'))).toHaveLength(1);
    expect((await subjects(stage.house.manager.email)).filter((subject) => subject.includes('is late'))).toHaveLength(1);
  });

  test('a new day starts again', async () => {
    await db.update(correctiveActions).set({ dueOn: '2026-08-20' }).where(eq(correctiveActions.caseId, stage.caseId));
    await sendDueReminders(noonOf('2026-08-14'));
    expect((await subjects(stage.owner.email)).at(-1)).toContain('due in 6 days');
  });

  test('a stretch of return days is announced once at fourteen days and once at three', async () => {
    const other = await actionStage(['2026-12-20', '2026-12-21', '2026-12-22']);
    await existingAction(other, { dueOn: '2027-02-01', createdAt: noonOf('2026-06-01') });
    for (const day of ['2026-12-06', '2026-12-07', '2026-12-17', '2026-12-19', '2026-12-21']) await sendDueReminders(noonOf(day));
    expect(await subjects(other.owner.email)).toEqual([expect.stringContaining('back in 14 days'), expect.stringContaining('back in 3 days')]);
  });

  test('nobody is written to whose account is switched off', async () => {
    const other = await actionStage();
    await existingAction(other, { dueOn: '2026-09-20', createdAt: noonOf('2026-06-01') });
    await db.update(users).set({ disabled: true }).where(eq(users.id, other.owner.userId));
    await sendDueReminders(noonOf('2026-09-19'));
    expect(await subjects(other.owner.email)).toEqual([]);
  });
});
