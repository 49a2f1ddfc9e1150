import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, expect, test } from 'vitest';
import type { ReportHolder } from '#app/domain/report.ts';
import { stopQueue } from '#app/jobs/queue.server.ts';
import { loader as progress } from '#app/routes/public/progress.tsx';
import { loader as received } from '#app/routes/public/report-received.tsx';
import { loader as reportPage } from '#app/routes/public/report.tsx';
import { submitReport } from '#app/services/reports/submit-report.server.ts';
import { db } from '#db/client.server.ts';
import { getTriage } from '#db/queries/triage.server.ts';
import type { House } from '#tests/support/factories.ts';
import { createHouse, createSite } from '#tests/support/factories.ts';
import { contextFor, openGuestLink, person, reportAt } from './stage.ts';

let house: House;
let guestCode: string;
beforeAll(async () => {
  house = await createHouse();
  guestCode = await openGuestLink(house.site.id);
});
afterAll(stopQueue);

const spot = { latitudeDeg: '53.50001', longitudeDeg: '-1.60001' };

test('two reports of one mark are shown together at the first look, with why, and never to the guest who sent one', async () => {
  const guest: ReportHolder = { kind: 'guest', site: house.site };
  const first = await submitReport({ holder: person(house.reporter), clientId: randomUUID(), report: reportAt(house.site, { ...spot, placeDetail: 'words of the first report' }) });
  const second = await submitReport({ holder: guest, clientId: randomUUID(), report: reportAt(house.site, spot) });
  const elsewhere = await createSite({ organisationId: house.organisation.id, latitudeDeg: 48.2, longitudeDeg: 11.1 });
  const apart = await submitReport({ holder: person(house.reporter), clientId: randomUUID(), report: reportAt(elsewhere) });

  const triage = await getTriage(db, { actor: house.investigator, caseNumber: second.caseNumber, now: new Date() });
  const similar = triage?.view.similar ?? [];
  expect(similar.map(({ row }) => row.number)).toContain(first.caseNumber);
  expect(similar.find(({ row }) => row.number === first.caseNumber)?.reasons.length).toBeGreaterThan(0);
  expect(similar.map(({ row }) => row.number)).not.toContain(apart.caseNumber);

  const seenByGuest = [
    await progress(argsFor(`/progress?code=${second.receipt}`, '/progress')),
    await received({ ...argsFor(`/received/${second.receipt}?at=${guestCode}`, '/received/:receipt'), params: { receipt: second.receipt } }),
    await reportPage(argsFor(`/report?at=${guestCode}&report=${randomUUID()}`, '/report')),
  ];
  for (const page of seenByGuest) expect(JSON.stringify(page)).not.toMatch(new RegExp(`${first.receipt}|words of the first|similar|duplicate`, 'u'));
});

function argsFor<Pattern extends string>(path: string, pattern: Pattern) {
  const url = new URL(path, 'http://scorchline.test');
  return { request: new Request(url), params: {}, context: contextFor(null), url, pattern };
}
