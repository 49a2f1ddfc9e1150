import { eq } from 'drizzle-orm';
import { beforeAll, describe, expect, test } from 'vitest';
import { actionStage, existingAction } from './stage.ts';
import type { ActionStage } from './stage.ts';
import { db } from '#db/client.server.ts';
import { correctiveActions, outbox, users } from '#db/schema/all.ts';
import { addDays } from '#app/domain/action-form.ts';
import { reminderFor, sendDueReminders } from '#app/jobs/handlers/due-reminders.server.ts';

const noonOf = (day: string) => new Date(`${day}T12:00:00Z`);
const due = '2026-07-24';

describe('which reminder is due', () => {
  const open = (values: Partial<Parameters<typeof reminderFor>[0]> = {}) => ({ state: 'open' as const, dueOn: due, effectCheckOn: null, ...values });
  test.each([
    ['2026-07-16', null],
    ['2026-07-17', 'due-7'],
    ['2026-07-20', 'due-7'],
    ['2026-07-23', 'due-1'],
    ['2026-07-24', 'due-1'],
    ['2026-07-25', 'late'],
  ])('on %s for an action due 2026-07-24: %s', (today, kind) => {
    expect(reminderFor(open(), today, '2026-06-01')).toBe(kind);
  });

  test('none before the day to somebody who was given it today', () => {
    expect(reminderFor(open(), '2026-07-20', '2026-07-20')).toBeNull();
    expect(reminderFor(open(), '2026-07-25', '2026-07-25')).toBe('late');
  });

  test('none once it is done; the check when the sun is back', () => {
    expect(reminderFor(open({ state: 'done' }), '2026-08-30', '2026-06-01')).toBeNull();
    expect(reminderFor(open({ state: 'verified', effectCheckOn: '2026-08-03' }), '2026-08-02', '2026-06-01')).toBeNull();
    expect(reminderFor(open({ state: 'verified', effectCheckOn: '2026-08-03' }), '2026-08-03', '2026-06-01')).toBe('check-due');
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

  test('nobody is written to whose account is switched off', async () => {
    const other = await actionStage();
    await existingAction(other, { dueOn: '2026-09-20', createdAt: noonOf('2026-06-01') });
    await db.update(users).set({ disabled: true }).where(eq(users.id, other.owner.userId));
    await sendDueReminders(noonOf('2026-09-19'));
    expect(await subjects(other.owner.email)).toEqual([]);
  });
});
