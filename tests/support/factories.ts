import { randomUUID } from 'node:crypto';
import { db } from '#db/client.server.ts';
import { getActor } from '#db/queries/actors.server.ts';
import {
  caseNotes, cases, correctiveActions, findings, grants, hypotheses, injuries, involvements, organisations, photos, reconstructions, releases, reviewComments, scenes, sites, sunReturns, users,
} from '#db/schema/all.ts';
import type { CaseState } from '#app/domain/case-state.ts';
import { noTests } from '#app/domain/hypothesis.ts';
import type { Actor, Role } from '#app/domain/roles.ts';
import { sceneSchema } from '#app/domain/scene.ts';

/**
 * Rows for tests, inserted straight into the tables, past every service. Each function fills in what the tables demand
 * and takes the columns that the test is about.
 */
type Organisation = typeof organisations.$inferSelect;
type Site = typeof sites.$inferSelect;
type User = typeof users.$inferSelect;
type Case = typeof cases.$inferSelect;

let serial = 0;
const next = () => ++serial;

function only<Row>(rows: readonly Row[]): Row {
  const [row] = rows;
  if (row === undefined) throw new Error('The insert gave no row back.');
  return row;
}

export async function createOrganisation(values: Partial<typeof organisations.$inferInsert> = {}): Promise<Organisation> {
  return only(await db.insert(organisations).values({ name: `Organisation ${next()}`, kind: 'operator', ...values }).returning());
}

type SiteValues = Partial<typeof sites.$inferInsert> & { readonly organisationId: string };

/** A site in England unless told otherwise. */
export async function createSite(values: SiteValues): Promise<Site> {
  const n = next();
  return only(
    await db
      .insert(sites)
      .values({ code: `S${n}`, name: `Site ${n}`, latitudeDeg: 53.5, longitudeDeg: -1.6, zone: 'Europe/London', ...values })
      .returning(),
  );
}

/** A grant as tests write it: a role for every site, or for one. */
export type GrantLike = Role | { readonly role: Role; readonly siteId: string | null };
type UserValues = Partial<typeof users.$inferInsert> & { readonly organisationId: string; readonly grants?: readonly GrantLike[] };

export async function createUser({ grants: wanted = [], ...values }: UserValues): Promise<User> {
  const n = next();
  const user = only(await db.insert(users).values({ email: `person-${n}@example.test`, displayName: `Person ${n}`, ...values }).returning());
  for (const grant of wanted) {
    const row = typeof grant === 'string' ? { role: grant, siteId: null } : grant;
    await db.insert(grants).values({ userId: user.id, ...row });
  }
  return user;
}

/** The person as services and queries see them. */
export async function actorOf(user: Pick<User, 'id'>): Promise<Actor> {
  const actor = await getActor(db, user.id);
  if (!actor) throw new Error(`No enabled account has the id ${user.id}.`);
  return actor;
}

/** A new person with these grants, as an actor. */
export async function createActor(organisationId: string, ...wanted: readonly GrantLike[]): Promise<Actor> {
  return actorOf(await createUser({ organisationId, grants: wanted }));
}

export interface House {
  readonly organisation: Organisation;
  readonly site: Site;
  readonly reporter: Actor;
  readonly investigator: Actor;
  readonly reviewer: Actor;
  readonly manager: Actor;
  readonly privacyLead: Actor;
  readonly administrator: Actor;
}

/** An operator with one site and one person a role, each granted for every site. */
export async function createHouse(): Promise<House> {
  const organisation = await createOrganisation();
  const site = await createSite({ organisationId: organisation.id });
  const person = (role: Role) => createActor(organisation.id, role);
  return {
    organisation,
    site,
    reporter: await person('reporter'),
    investigator: await person('investigator'),
    reviewer: await person('reviewer'),
    manager: await person('manager'),
    privacyLead: await person('privacy-lead'),
    administrator: await person('administrator'),
  };
}

const receiptLetters = 'ABCDEFGHJKLMNPQRSTUVWXYZ23456789';
function receipt(n: number): string {
  const letters = Array.from({ length: 8 }, (_, place) => receiptLetters[Math.floor(n / 32 ** place) % 32]).join('');
  return `${letters.slice(0, 2)}-${letters.slice(2, 6)}-${letters.slice(6)}`;
}

type CaseValues = Partial<Omit<typeof cases.$inferInsert, 'state' | 'siteId' | 'organisationId'>> & {
  readonly site: Pick<Site, 'id' | 'organisationId' | 'zone'>;
};

/**
 * A case in `state`, with what the table's own checks demand of that state: investigator, event type and risk for work,
 * closing time for a closed case, a main case for a duplicate.
 */
export async function createCase(state: CaseState, { site, ...values }: CaseValues): Promise<Case> {
  const place = { siteId: site.id, organisationId: site.organisationId, zone: site.zone };
  return only(
    await db
      .insert(cases)
      .values({
        clientId: randomUUID(),
        receipt: receipt(next()),
        title: 'Brown band on roof membrane',
        narrative: 'A brown band about two metres long beside the parapet.',
        sighting: 'mark',
        anyoneHurt: 'no',
        hazardStillPresent: 'no',
        foundAt: new Date('2026-05-09T14:10:00Z'),
        onsetEarliestAt: new Date('2026-05-09T09:00:00Z'),
        onsetLatestAt: new Date('2026-05-09T14:10:00Z'),
        ...place,
        ...(await demandedBy(state, { site, ...values })),
        ...values,
        state,
      })
      .returning(),
  );
}

async function demandedBy(state: CaseState, { site, ...values }: CaseValues): Promise<Partial<typeof cases.$inferInsert>> {
  if (state === 'closed') return { closedAt: new Date('2026-06-01T10:00:00Z') };
  if (state === 'duplicate' && !values.duplicateOfId) return { duplicateOfId: (await createCase('triage', { site })).id };
  if (state !== 'investigation' && state !== 'findings' && state !== 'corrective-action') return {};
  const assignedToId = values.assignedToId ?? (await createUser({ organisationId: site.organisationId, grants: ['investigator'] })).id;
  return { eventType: 'heat-damage', risk: 'medium', assignedToId };
}

/** A version of the measured scene; fields that are not given stay unknown. */
export async function createScene(values: { readonly caseId: string; readonly version?: number; readonly scene?: unknown; readonly authorId?: string }) {
  const scene = sceneSchema.parse(values.scene ?? {});
  return only(await db.insert(scenes).values({ caseId: values.caseId, version: values.version ?? 1, scene, authorId: values.authorId }).returning());
}

export async function createNote(values: Partial<typeof caseNotes.$inferInsert> & { readonly caseId: string }) {
  return only(await db.insert(caseNotes).values({ authorName: 'A person', body: 'The parapet was polished in March.', ...values }).returning());
}

export async function createInvolvement(values: Partial<typeof involvements.$inferInsert> & { readonly caseId: string }) {
  return only(await db.insert(involvements).values({ role: 'witness', ...values }).returning());
}

export async function createInjury(values: Partial<typeof injuries.$inferInsert> & { readonly caseId: string }) {
  return only(await db.insert(injuries).values(values).returning());
}

export async function createHypothesis(values: Partial<typeof hypotheses.$inferInsert> & { readonly caseId: string }) {
  return only(await db.insert(hypotheses).values({ kind: 'focused-sunlight', statement: 'The curved parapet focused sunlight on the roof.', tests: noTests, ...values }).returning());
}

type FindingValues = Partial<typeof findings.$inferInsert> & { readonly caseId: string; readonly authorId: string };

/** Version 1, a draft with an opinion and limits; a signed one is given its signing time and a hash. */
export async function createFinding(values: FindingValues) {
  const signed = values.state === 'signed' ? { signedAt: new Date('2026-05-20T10:00:00Z'), frozen: {}, frozenHash: '0'.repeat(64) } : {};
  return only(
    await db
      .insert(findings)
      .values({ version: 1, opinion: 'The parapet focused sunlight on the membrane.', limits: 'The skyline was not measured.', ...signed, ...values })
      .returning(),
  );
}

export async function createReviewComment(values: Partial<typeof reviewComments.$inferInsert> & { readonly findingId: string; readonly authorId: string }) {
  return only(await db.insert(reviewComments).values({ field: 'limits', body: 'Say how the bearing was taken.', ...values }).returning());
}

type ActionValues = Partial<typeof correctiveActions.$inferInsert> & { readonly caseId: string; readonly ownerId: string; readonly verifierId: string };

export async function createAction(values: ActionValues) {
  const finished = values.state && ['done', 'verified', 'effective', 'not-effective'].includes(values.state);
  return only(
    await db
      .insert(correctiveActions)
      .values({
        number: next(),
        title: 'Matt coating on the parapet',
        controlLevel: 'engineering',
        dueOn: '2026-06-30',
        ...(finished ? { doneAt: new Date('2026-05-25T10:00:00Z'), proof: 'Photo of the coated parapet.' } : {}),
        ...(values.state === 'withdrawn' ? { withdrawnReason: 'The parapet was taken down.' } : {}),
        ...values,
      })
      .returning(),
  );
}

/** A photo of a case (label given) or of a report under way (neither `caseId` nor `label`). The object itself is not stored. */
export async function createPhoto(values: Partial<typeof photos.$inferInsert>) {
  const n = next();
  const sha256 = n.toString(16).padStart(64, '0');
  return only(
    await db
      .insert(photos)
      .values({
        reportClientId: randomUUID(),
        fileName: `photo-${n}.jpg`,
        mime: 'image/jpeg',
        bytes: 1_000,
        sha256,
        widthPx: 1_280,
        heightPx: 960,
        originalKey: `originals/${sha256}/photo-${n}.jpg`,
        exif: { takenAtLocal: null, utcOffset: null, latitudeDeg: null, longitudeDeg: null, directionDeg: null, directionReference: null, camera: null },
        exifAnswer: { time: null, place: null, answeredAt: null },
        ...(values.caseId ? { label: n } : {}),
        ...values,
      })
      .returning(),
  );
}

type RunValues = Partial<typeof reconstructions.$inferInsert> & { readonly caseId: string; readonly input: typeof reconstructions.$inferInsert.input };

/** A run of the engine in the given state; `done` needs `result` from the test. */
export async function createReconstruction(values: RunValues) {
  const done = values.state === 'done' ? { resultHash: '1'.repeat(64), finishedAt: new Date('2026-05-12T10:00:00Z') } : {};
  return only(await db.insert(reconstructions).values({ number: next(), inputHash: '2'.repeat(64), engineVersion: 'test', ...done, ...values }).returning());
}

/** A day on which the sun comes back, from noon UTC on. */
export async function createSunReturn(values: { readonly caseId: string; readonly reconstructionId: string; readonly onDay: string; readonly minutes?: number }) {
  const minutes = values.minutes ?? 20;
  const fromAt = new Date(`${values.onDay}T12:00:00Z`);
  const toAt = new Date(fromAt.getTime() + minutes * 60_000);
  return only(await db.insert(sunReturns).values({ ...values, minutes, fromAt, toAt, bestAt: fromAt }).returning());
}

type ReleaseValues = Partial<typeof releases.$inferInsert> & {
  readonly caseId: string;
  readonly recipientOrganisationId: string;
  readonly preparedById: string;
  readonly released: typeof releases.$inferInsert.released;
  readonly withheld: typeof releases.$inferInsert.withheld;
};

export async function createRelease(values: ReleaseValues) {
  return only(await db.insert(releases).values({ number: next(), releasedHash: '3'.repeat(64), expiresAt: new Date('2100-01-01T00:00:00Z'), ...values }).returning());
}
