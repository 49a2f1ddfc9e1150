import { randomUUID } from 'node:crypto';
import { eq } from 'drizzle-orm';
import { RouterContextProvider } from 'react-router';
import { actorContext } from '#app/auth/actor-context.ts';
import type { Report, ReportHolder, ReportSite } from '#app/domain/report.ts';
import { readReport } from '#app/domain/report.ts';
import type { Actor } from '#app/domain/roles.ts';
import { db } from '#db/client.server.ts';
import { cases, sites } from '#db/schema/all.ts';
import { createHouse } from '#tests/support/factories.ts';
import type { House } from '#tests/support/factories.ts';

export const now = new Date('2026-05-09T14:12:00Z');

/** A report with the four answers and whatever the test adds. */
export function reportAt(site: ReportSite, typed: Readonly<Record<string, string>> = {}): Report {
  const reading = readReport({ siteId: site.id, foundWhen: 'just-now', sighting: 'mark', anyoneHurt: 'no', placeDetail: 'roof, south edge by hatch 2', ...typed }, { site, now });
  if (!reading.ok) throw new Error(`The report of the test cannot be read: ${JSON.stringify(reading.fieldErrors)}`);
  return reading.report;
}

export const person = (actor: Actor): ReportHolder => ({ kind: 'person', actor });

/** How a report reaches the server, and from whom. */
export interface Sending {
  readonly actor?: Actor | null;
  /** Code of the account-free link. */
  readonly at?: string;
  readonly clientId?: string;
}

/** A form with the four answers at a site, and whatever the test adds or changes. */
export function answersForm(siteId: string, typed: Readonly<Record<string, string>> = {}): FormData {
  const form = new FormData();
  for (const [name, value] of Object.entries({ siteId, foundWhen: 'just-now', sighting: 'mark', anyoneHurt: 'no', ...typed })) form.append(name, value);
  return form;
}

/** A house of its own for a test file, with an account-free link. */
export async function houseWithLink(): Promise<{ house: House; guestCode: string }> {
  const house = await createHouse();
  return { house, guestCode: await openGuestLink(house.site.id) };
}

/** Opens the account-free link of a site and gives its code. */
export async function openGuestLink(siteId: string): Promise<string> {
  const guestCode = `door-${randomUUID()}`;
  await db.update(sites).set({ guestCode }).where(eq(sites.id, siteId));
  return guestCode;
}

export const caseOf = async (clientId: string) => (await db.select().from(cases).where(eq(cases.clientId, clientId)))[0];

/** The context that the session middleware leaves for a loader or action. */
export function contextFor(actor: Actor | null): RouterContextProvider {
  const context = new RouterContextProvider();
  context.set(actorContext, actor);
  return context;
}
