import { eq } from 'drizzle-orm';
import { getDocument } from 'pdfjs-dist/legacy/build/pdf.mjs';
import { beforeAll, describe, expect, it } from 'vitest';
import { thingCases } from '#fixtures/demo/cases-things.ts';
import { demoEmail, demoPeople } from '#fixtures/demo/people.ts';
import { db, inTransaction } from '#db/client.server.ts';
import { getActor } from '#db/queries/actors.server.ts';
import { readCaseBeforeRedaction } from '#db/queries/case-before-redaction.server.ts';
import { listRecipientOrganisations } from '#db/queries/releases.server.ts';
import { cases, releases, sites, users } from '#db/schema/all.ts';
import { seedCase } from '#db/seed/cases.ts';
import { seedPeopleAndSites } from '#db/seed/people-and-sites.ts';
import { linesToDecide } from '#app/domain/lines-to-decide.ts';
import type { ReportFigure } from '#app/domain/report-document.ts';
import type { Actor } from '#app/domain/roles.ts';
import { readReport, readReportPdf } from '#app/services/finding-reports/read-report.server.ts';
import { inspectRelease } from '#app/services/releases/check-release.server.ts';
import { prepareRelease } from '#app/services/releases/prepare-release.server.ts';
import { getObject } from '#app/storage/objects.server.ts';
import { pdfText } from '#app/storage/pdf-text.server.ts';

/** The demonstration case with a weather record, at a position to six decimals that nobody outside may read. */
const demo = thingCases.find((one) => one.number === 129);
const place = { latitudeDeg: -26.103452, longitudeDeg: 32.904871 };
const titles = (figures: readonly ReportFigure[]) => figures.map((figure) => figure.title.split(/[ ;,]/u).slice(0, 2).join(' '));
const flat = (text: string) => text.replace(/\s+/gu, ' ');

let actor: Actor;
let document: Awaited<ReturnType<typeof readReport>>['document'];
beforeAll(async () => {
  if (!demo) throw new Error('The demonstration has no case 129.');
  await inTransaction(async (tx) => {
    const places = await seedPeopleAndSites(tx);
    const site = places.sites.get(demo.siteCode);
    if (!site) throw new Error('The site is missing.');
    await tx.update(sites).set(place).where(eq(sites.id, site.id));
    await seedCase(tx, demo, { ...places, sites: new Map([...places.sites, [demo.siteCode, { ...site, ...place }]]) }, new Map(), new Date('2026-12-01T12:00:00Z'));
  });
  await db.update(cases).set(place).where(eq(cases.number, 129));
  const person = demoPeople.find((one) => one.key === 'maren');
  const [row] = await db.select().from(users).where(eq(users.email, person ? demoEmail(person) : ''));
  const found = await getActor(db, row?.id ?? '');
  if (!found) throw new Error('The investigator is missing.');
  actor = found;
  document = (await readReport({ actor, caseNumber: 129, version: null })).document;
}, 120_000);

const figures = () => document.blocks.filter((block): block is ReportFigure => block.kind === 'figure');

describe('the report in the house', () => {
  it('has every figure that the run has data for, numbered in order', () => {
    expect(titles(figures())).toEqual(['The onset', 'Path of', 'Direct irradiance', 'Section and', 'Flux at', 'Width of', 'Surface of', 'When this']);
    expect(figures().map((figure) => figure.number)).toEqual([1, 2, 3, 4, 5, 6, 7, 8]);
  });

  it('says which record the run went by, how far off and in which means, and gives its rows', () => {
    const words = JSON.stringify(document.blocks);
    expect(words).toContain('The run goes by weather record 1: Harbour weather station, invented record, Marulane harbour, 6 km off at 205°.');
    expect(words).toContain('24 values, 10-minute means of measured direct irradiance');
    const table = document.blocks.find((block) => block.kind === 'table' && block.head.includes('Direct as used, 10-minute means, W/m²'));
    // The record begins at 07:30 of the place, the window at 08:00: three values lie before it.
    expect(table?.kind === 'table' ? [table.rows.length, table.rows[0]] : null).toEqual([21, ['08:00', '08:10', '655']]);
  });

  it('is printed with each figure tagged and in words', async () => {
    const file = await getDocument({ data: new Uint8Array((await readReportPdf({ actor, caseNumber: 129, version: null })).bytes), verbosity: 0 }).promise;
    const found: string[] = [];
    const walk = (node: unknown): void => {
      if (typeof node !== 'object' || node === null) return;
      if ('role' in node && node.role === 'Figure') found.push('alt' in node && typeof node.alt === 'string' ? node.alt : '');
      if ('children' in node && Array.isArray(node.children)) node.children.forEach(walk);
    };
    for (let number = 1; number <= file.numPages; number += 1) walk(await (await file.getPage(number)).getStructTree());
    expect(found).toHaveLength(8);
    for (const words of found) expect(words.length).toBeGreaterThan(40);
    await file.destroy();
  });
});

describe('a release of it', () => {
  let text: string;
  let pdf: string;
  let row: typeof releases.$inferSelect;
  beforeAll(async () => {
    const read = await readCaseBeforeRedaction(db, { actor, caseNumber: 129 });
    const [insurer] = read ? await listRecipientOrganisations(db, { organisationId: read.organisationId, audience: 'insurer' }) : [];
    if (!read || !insurer) throw new Error('Nobody may read a release.');
    const decisions = Object.fromEntries(linesToDecide(read.source, 'insurer').map((line) => [line.key, 'share' as const]));
    await prepareRelease({ actor, caseNumber: 129, audience: 'insurer', recipientOrganisationId: insurer.id, changeNote: 'First release', expires: { at: new Date(Date.now() + 86_400_000) }, decisions, basis: null });
    const [made] = await db.select().from(releases);
    if (!made) throw new Error('No release was made.');
    row = made;
    const parts: string[] = [];
    for (const file of row.files) {
      const bytes = await getObject(file.objectKey);
      if (!bytes) throw new Error(`${file.name} is missing.`);
      const words = file.name.endsWith('.pdf') ? await pdfText(bytes) : Buffer.from(bytes).toString('utf8');
      if (file.name.endsWith('.pdf')) pdf = flat(words);
      parts.push(words);
    }
    text = parts.join('\n');
  }, 120_000);

  it('holds the same figures, made from what the reader gets as data', () => {
    expect([...pdf.matchAll(/Fig\. (\d)/gu)].map((match) => match[1])).toEqual(['1', '2', '3', '4', '5', '6', '7', '8']);
    for (const title of ['Section and plan with the beam', 'Flux at', 'Direct irradiance, square to the sun', 'When this mark can be lit again']) expect(pdf).toContain(title);
  });

  it('tells the station by name and in whole kilometres, with its values in words, table and file', () => {
    expect(pdf).toContain('The run goes by weather record 1: Harbour weather station, invented record, Marulane harbour, 6 km off.');
    expect(row.files.map((file) => file.name).sort()).toEqual(['data.json', 'measurements.csv', 'report.pdf', 'runs.csv', 'weather.csv']);
    expect(row.released.weather?.values).toHaveLength(24);
    expect(text).not.toContain('at 205°');
  });

  it('holds no name of a person, no address and no position in any byte', () => {
    for (const { name } of demoPeople) expect(text.includes(name), name).toBe(false);
    for (const secret of ['26.1034', '32.9048', '26.103', '32.905', 'Marulane Bay Road']) expect(text.includes(secret), secret).toBe(false);
  });

  it('passes the search of its own bytes, and the same decisions give the same release again', async () => {
    const inspection = await inspectRelease(db, { actor, caseNumber: 129, release: row });
    expect(inspection.checks.filter((check) => !check.passed)).toEqual([]);
    expect(inspection.caseUnchanged).toBe(true);
  });
});
