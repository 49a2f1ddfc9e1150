import { eq } from 'drizzle-orm';
import { RouterContextProvider } from 'react-router';
import { describe, expect, test } from 'vitest';
import { actionStage, existingAction, inDays, jpeg } from './stage.ts';
import type { ActionStage } from './stage.ts';
import { createActor, createHouse, createSite } from '#tests/support/factories.ts';
import { db } from '#db/client.server.ts';
import { actionProofs, logEntries } from '#db/schema/all.ts';
import { actorContext } from '#app/auth/actor-context.ts';
import type { Actor } from '#app/domain/roles.ts';
import { middleware as listMiddleware } from '#app/routes/actions/list.tsx';
import { loader as calendarLoader } from '#app/routes/resources/action-calendar.ts';
import { loader as proofLoader } from '#app/routes/resources/proof.ts';
import { completeAction } from '#app/services/corrective-actions/complete-action.server.ts';
import { proofKind, proofName, storeProofs } from '#app/services/corrective-actions/proof-files.server.ts';
import { putObject } from '#app/storage/objects.server.ts';

function call(actor: Actor | null, path: string) {
  const context = new RouterContextProvider();
  context.set(actorContext, actor);
  const url = new URL(path, 'http://scorchline.test');
  return { request: new Request(url), url, context, pattern: '', unstable_pattern: '', unstable_url: url };
}

const fetchProof = (actor: Actor | null, proofId: string) => proofLoader({ ...call(actor, `/proofs/${proofId}`), params: { proofId } });

async function withProof(): Promise<ActionStage & { proofId: string; objectKey: string }> {
  const stage = await actionStage();
  const { id } = await existingAction(stage);
  await completeAction({ actor: stage.owner, actionId: id, version: 1, note: 'Coated.', files: [jpeg('Parapet, east side.jpg', 'the bytes of the proof')] });
  const [proof] = await db.select().from(actionProofs).where(eq(actionProofs.correctiveActionId, id));
  if (!proof) throw new Error('The proof was not written.');
  return { ...stage, proofId: proof.id, objectKey: proof.objectKey };
}

describe('a proof', () => {
  test('comes back byte for byte to owner, verifier and the site, as a download under a safe name', async () => {
    const stage = await withProof();
    const expected = new Uint8Array(await jpeg('x.jpg', 'the bytes of the proof').arrayBuffer());
    for (const actor of [stage.owner, stage.verifier, stage.house.manager, stage.house.reviewer]) {
      const response = await fetchProof(actor, stage.proofId);
      expect(new Uint8Array(await response.arrayBuffer())).toEqual(expected);
      expect(response.headers.get('Content-Disposition')).toBe("attachment; filename*=UTF-8''Parapet-%20east%20side.jpg");
      expect(response.headers.get('Content-Type')).toBe('image/jpeg');
    }
  });

  test('is not found by another site, another organisation, a person without a part in it, or a wrong id', async () => {
    const stage = await withProof();
    const elsewhere = await createSite({ organisationId: stage.house.organisation.id });
    const others = [await createActor(stage.house.organisation.id, { role: 'manager', siteId: elsewhere.id }), stage.house.reporter, stage.house.administrator, (await createHouse()).manager];
    for (const actor of others) await expect(fetchProof(actor, stage.proofId)).rejects.toMatchObject({ init: { status: 404 } });
    await expect(fetchProof(stage.owner, 'not-an-id')).rejects.toMatchObject({ init: { status: 404 } });
  });

  test('sends a guest to the sign-in page', async () => {
    const { proofId } = await withProof();
    await expect(fetchProof(null, proofId)).rejects.toMatchObject({ status: 302 });
  });

  test('whose stored bytes have changed is refused, and that is logged', async () => {
    const stage = await withProof();
    await putObject(stage.objectKey, new Uint8Array([0xff, 0xd8, 0xff, 1, 2, 3]), 'image/jpeg');
    expect((await fetchProof(stage.owner, stage.proofId)).status).toBe(500);
    expect(await db.select().from(logEntries).where(eq(logEntries.subjectId, stage.proofId))).toMatchObject([{ event: 'proof.hash-differs' }]);
  });
});

describe('taking files in', () => {
  const file = (bytes: readonly number[], name: string) => new File([new Uint8Array(bytes)], name);

  test('the type is that of the content, whatever the name says', () => {
    expect(proofKind(new Uint8Array([0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a]))?.mime).toBe('image/png');
    expect(proofKind(new TextEncoder().encode('RIFF....WEBPVP8 '))?.mime).toBe('image/webp');
    expect(proofKind(new TextEncoder().encode('%PDF-1.7'))?.mime).toBe('application/pdf');
    expect(proofKind(new TextEncoder().encode('<svg onload="x">'))).toBeNull();
    expect(proofKind(new TextEncoder().encode('MZ program'))).toBeNull();
  });

  test('each bad file is named with what to do; none of the form is stored', async () => {
    const refused = storeProofs('00000000-0000-0000-0000-000000000000', [jpeg(), file([], 'empty.jpg'), file([0x4d, 0x5a], 'program.jpg')]);
    await expect(refused).rejects.toMatchObject({ fieldErrors: { files: [expect.stringContaining('"empty.jpg" is empty'), expect.stringContaining('"program.jpg" is not a JPEG')] } });
  });

  test('one byte over the limit is refused, and so is a sixth file', async () => {
    const large = new Uint8Array(25 * 1024 * 1024 + 1);
    large.set([0xff, 0xd8, 0xff]);
    await expect(storeProofs('x', [new File([large], 'large.jpg')])).rejects.toMatchObject({ fieldErrors: { files: [expect.stringContaining('larger than 25 MB')] } });
    await expect(storeProofs('x', Array.from({ length: 6 }, (_, index) => jpeg(`${index}.jpg`)))).rejects.toMatchObject({ fieldErrors: { files: [expect.stringContaining('At most 5')] } });
  });

  test.each([
    ['../../etc/passwd', 'passwd.jpg'],
    ['C:\\photos\\east.png', 'east.jpg'],
    ['a\r\nSet-Cookie: x=1.jpg', 'a-Set-Cookie- x-1.jpg'],
    ['…', 'proof.jpg'],
    ['Dach über Süd.jpeg', 'Dach über Süd.jpg'],
  ])('the name %j is kept as %j', (given, kept) => {
    expect(proofName(given, 'jpg')).toBe(kept);
  });
});

describe('the export', () => {
  async function csv(actor: Actor, search = '?format=csv'): Promise<string> {
    const [run] = listMiddleware;
    if (!run) throw new Error('The list has no middleware.');
    const response = await run({ ...call(actor, `/actions${search}`), params: {} }, () => Promise.reject(new Error('The page was asked for.')));
    if (!(response instanceof Response)) throw new Error('The export gave no response.');
    expect(response.headers.get('Content-Type')).toContain('text/csv');
    return new TextDecoder('utf-8', { ignoreBOM: true }).decode(await response.arrayBuffer());
  }

  test('holds what the reader may see, and no cell that a spreadsheet would run', async () => {
    const stage = await actionStage();
    await existingAction(stage, { title: '=HYPERLINK("http://evil.test";"press")', dueOn: inDays(3) });
    const other = await actionStage();
    await existingAction(other, { title: 'Of another house' });
    const text = await csv(stage.owner);
    expect(text).toContain(`"'=HYPERLINK(""http://evil.test"";""press"")"`);
    expect(text).toContain(inDays(3));
    expect(text).not.toContain('Of another house');
    expect(text.trim().split('\r\n')).toHaveLength(2);
  });

  test('is refused to an insurer’s reader, who has no action', async () => {
    const stage = await actionStage();
    await expect(csv(await createActor(stage.house.organisation.id, 'insurer'))).rejects.toMatchObject({ init: { status: 403 } });
  });

  test('follows the filter in the address', async () => {
    const stage = await actionStage();
    await existingAction(stage, { title: 'High one', risk: 'high' });
    await existingAction(stage, { title: 'Low one', risk: 'low' });
    const text = await csv(stage.owner, '?format=csv&risk=high');
    expect(text).toContain('High one');
    expect(text).not.toContain('Low one');
  });
});

test('the calendar holds due days and the minutes of the check, of visible actions only', async () => {
  const stage = await actionStage([inDays(12)]);
  const due = await existingAction(stage, { title: 'Matt coating' });
  const checked = await existingAction(stage, { title: 'Screen', state: 'verified', verifiedAt: new Date(), effectCheckOn: inDays(12) });
  const other = await actionStage();
  await existingAction(other, { title: 'Of another house' });
  const text = await (await calendarLoader({ ...call(stage.owner, '/actions/calendar'), params: {} })).text();
  expect(text).toContain(`UID:action-${due.id}@scorchline.test`);
  expect(text).toContain(`UID:check-${checked.id}@scorchline.test`);
  expect(text).toContain(`DTSTART:${inDays(12).replaceAll('-', '')}T120000Z`);
  expect(text).not.toContain('Of another house');
  expect(text).not.toContain(stage.verifier.displayName);
});
