import { sql } from 'drizzle-orm';
import type { AnyPgColumn } from 'drizzle-orm/pg-core';
import { bigint, boolean, check, doublePrecision, index, integer, jsonb, pgSequence, pgTable, text, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import { caseStates } from '#app/domain/case-state.ts';
import { consequences, eventTypes, extents, foundMeans, foundPrecisions, likelihoods, onsetBases, risks, sightings, triageCloseReasons, weatherSeen, yesNoUnknown } from '#app/domain/incident.ts';
import type { Scene } from '#app/domain/scene.ts';
import { createdAt, id, instant, updatedAt } from './_columns.ts';
import { organisations, users } from './people.ts';
import { sites } from './sites.ts';

export const caseNumbers = pgSequence('case_numbers', { startWith: 1 });

export const cases = pgTable(
  'cases',
  {
    id: id(),
    /** Short human number; part of every URL: `/cases/118`. */
    number: integer().notNull().unique().default(sql`nextval('case_numbers')`),
    /** Made on the device that reports; a retry with the same id finds the first case. */
    clientId: uuid().notNull().unique(),
    receipt: text().notNull().unique(),
    organisationId: uuid().notNull().references(() => organisations.id, { onDelete: 'restrict' }),
    siteId: uuid().notNull().references(() => sites.id, { onDelete: 'restrict' }),
    state: text({ enum: caseStates }).notNull().default('reported'),
    title: text().notNull(),
    /** As the reporter wrote it; notes are added, the text is not changed. */
    narrative: text().notNull().default(''),
    placeDetail: text().notNull().default(''),
    latitudeDeg: doublePrecision(),
    longitudeDeg: doublePrecision(),
    accuracyM: doublePrecision(),
    /** Zone of the place at the time of the report. */
    zone: text().notNull(),
    sighting: text({ enum: sightings }).notNull(),
    eventType: text({ enum: eventTypes }),
    anyoneHurt: text({ enum: yesNoUnknown }).notNull(),
    hazardStillPresent: text({ enum: yesNoUnknown }).notNull().default('dont-know'),
    /** Null when the reporter does not know. */
    foundAt: instant(),
    foundPrecision: text({ enum: foundPrecisions }).notNull().default('exact'),
    foundByMeans: text({ enum: foundMeans }),
    /** Clock error of the source of `foundAt`: reading minus true time. [s] */
    foundClockErrorS: integer().notNull().default(0),
    onsetEarliestAt: instant(),
    onsetLatestAt: instant(),
    onsetBasis: text({ enum: onsetBases }),
    extent: text({ enum: extents }),
    weatherSeen: text({ enum: weatherSeen }),
    interimControl: text(),
    interimControlAt: instant(),
    interimControlEnds: text(),
    fireServiceAttended: boolean(),
    lossEstimate: bigint({ mode: 'number' }),
    lossCurrency: text(),
    potentialConsequence: text({ enum: consequences }),
    likelihood: text({ enum: likelihoods }),
    riskBasis: text(),
    risk: text({ enum: risks }),
    privilegedNote: text(),
    legalHold: boolean().notNull().default(false),
    legalHoldReason: text(),
    reporterId: uuid().references(() => users.id, { onDelete: 'restrict' }),
    guestReport: boolean().notNull().default(false),
    assignedToId: uuid().references(() => users.id, { onDelete: 'restrict' }),
    duplicateOfId: uuid().references((): AnyPgColumn => cases.id, { onDelete: 'restrict' }),
    reopenCount: integer().notNull().default(0),
    closeReason: text({ enum: triageCloseReasons }),
    question: text(),
    answer: text(),
    answerDueAt: instant(),
    reconstructionWaiver: text(),
    evidenceWaiver: text(),
    effectivenessWaiver: text(),
    /** Said by the reviewer with the signature: nothing is to be done, and why. */
    noActionReason: text(),
    lesson: text(),
    externalReports: text(),
    /** Optimistic lock: raised by every write. */
    version: integer().notNull().default(1),
    reportedAt: instant().notNull().defaultNow(),
    closedAt: instant(),
    createdAt: createdAt(),
    updatedAt: updatedAt(),
  },
  (table) => [
    index('cases_organisation_id_state_idx').on(table.organisationId, table.state),
    index('cases_site_id_idx').on(table.siteId),
    index('cases_reporter_id_idx').on(table.reporterId),
    index('cases_assigned_to_id_idx').on(table.assignedToId),
    index('cases_duplicate_of_id_idx').on(table.duplicateOfId),
    check('cases_onset_order', sql`${table.onsetEarliestAt} is null or ${table.onsetLatestAt} is null or ${table.onsetEarliestAt} <= ${table.onsetLatestAt}`),
    check('cases_duplicate_points', sql`(${table.state} = 'duplicate') = (${table.duplicateOfId} is not null)`),
    check('cases_not_own_duplicate', sql`${table.duplicateOfId} is null or ${table.duplicateOfId} <> ${table.id}`),
    check('cases_closed_at', sql`(${table.state} = 'closed') = (${table.closedAt} is not null)`),
    check('cases_investigation_needs', sql`${table.state} not in ('investigation', 'findings') or (${table.eventType} is not null and ${table.assignedToId} is not null and ${table.risk} is not null)`),
    check('cases_hold_reason', sql`not ${table.legalHold} or ${table.legalHoldReason} is not null`),
  ],
);

/** The measured scene; each change is a new version, so that a reconstruction can name the one it used. */
export const scenes = pgTable(
  'scenes',
  {
    id: id(),
    caseId: uuid().notNull().references(() => cases.id, { onDelete: 'restrict' }),
    version: integer().notNull(),
    scene: jsonb().$type<Scene>().notNull(),
    note: text().notNull().default(''),
    authorId: uuid().references(() => users.id, { onDelete: 'restrict' }),
    createdAt: createdAt(),
  },
  (table) => [uniqueIndex('scenes_case_id_version_key').on(table.caseId, table.version), index('scenes_author_id_idx').on(table.authorId)],
);

/** Notes added to the account after it was sent. */
export const caseNotes = pgTable(
  'case_notes',
  {
    id: id(),
    caseId: uuid().notNull().references(() => cases.id, { onDelete: 'restrict' }),
    authorId: uuid().references(() => users.id, { onDelete: 'restrict' }),
    authorName: text().notNull(),
    body: text().notNull(),
    createdAt: createdAt(),
  },
  (table) => [index('case_notes_case_id_idx').on(table.caseId), index('case_notes_author_id_idx').on(table.authorId)],
);
