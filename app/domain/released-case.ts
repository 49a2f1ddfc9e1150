import { z } from 'zod';
import { actionStates, controlLevels } from './corrective-action.ts';
import { evidenceKinds, examKinds, holderRoles } from './evidence.ts';
import { certainties, classifications } from './finding.ts';
import { hypothesisKinds, hypothesisResults, testResults } from './hypothesis.ts';
import { extents, foundPrecisions, onsetBases, photoViews, siteUses, weatherSeen } from './incident.ts';
import { releasedDrawingSchema } from './released-drawing.ts';
import { releasedResultSchema } from './released-result.ts';
import { weatherNatures } from './weather.ts';

export const withheldClasses = ['personal', 'health', 'child', 'legal', 'exact-place', 'commercial', 'free-text', 'photo'] as const;
export type WithheldClass = (typeof withheldClasses)[number];
export const withheldLabels = {
  personal: 'personal',
  health: 'health',
  child: 'child',
  legal: 'legal',
  'exact-place': 'exact place',
  commercial: 'commercial',
  'free-text': 'text held back',
  photo: 'photos held back',
} as const satisfies Record<WithheldClass, string>;
export type WithheldCounts = Readonly<Record<WithheldClass, number>>;

const redactedText = z.array(z.union([z.object({ text: z.string() }), z.object({ withheld: z.enum(withheldClasses) })]));
/** Running text in which some words were taken out. A withheld piece says its class and nothing of its length. */
export type RedactedText = z.infer<typeof redactedText>;

const instant = z.string();
const quantity = z.number().optional();
const test = z.object({ result: z.enum(testResults), why: redactedText });

/** An injury is one kind for a reader outside: which part of the body it was is a health matter. */
export const releasedEvents = ['fire', 'heat-damage', 'injury', 'near-miss', 'undesired-circumstance', 'not-stated'] as const;
export const releasedEventLabels: Record<(typeof releasedEvents)[number], string> = {
  fire: 'Fire',
  'heat-damage': 'Heat damage: scorch, melt or distortion',
  injury: 'Injury',
  'near-miss': 'Near miss',
  'undesired-circumstance': 'Undesired circumstance',
  'not-stated': 'Not stated',
};

/**
 * A case as it leaves the house. This shape, and only this shape, is stored in a release: whatever is not named here is
 * dropped when the release is made. Built by `redactCase`.
 */
export const releasedCaseSchema = z.object({
  caseNumber: z.number().int(),
  title: redactedText,
  eventType: z.enum(releasedEvents),
  siteName: z.string().nullable(),
  siteUse: z.enum(siteUses),
  placeDetail: redactedText,
  zone: z.string(),
  /** Corrected for the error of the clock that it was read from. */
  foundAt: instant.nullable(),
  foundPrecision: z.enum(foundPrecisions),
  foundClockErrorS: z.number(),
  onsetEarliestAt: instant.nullable(),
  onsetLatestAt: instant.nullable(),
  onsetBasis: z.enum(onsetBases).nullable(),
  reportedAt: instant,
  account: redactedText,
  notes: z.array(z.object({ at: instant, by: z.string(), text: redactedText })),
  injury: z.string(),
  extent: z.enum(extents).nullable(),
  weatherSeen: z.enum(weatherSeen).nullable(),
  interimControl: redactedText,
  loss: z.object({ amount: z.number(), currency: z.string() }).nullable(),
  measurements: z.array(z.object({ group: z.string(), label: z.string(), value: z.string(), plusMinus: z.string(), unit: z.string(), method: z.string() })),
  photos: z.array(z.object({ fileName: z.string(), view: z.enum(photoViews).nullable(), caption: redactedText, altText: redactedText, maskCount: z.number().int() })),
  reconstruction: z
    .object({
      number: z.number().int(),
      engineVersion: z.string(),
      /** Null where the reader may not know the place, which the hash is made from with everything else. */
      inputHash: z.string().nullable(),
      resultHash: z.string(),
      result: releasedResultSchema,
      /** For the figures of the printed report; releases made before they had any hold none. */
      drawing: releasedDrawingSchema.nullish(),
    })
    .nullable(),
  /** The weather that the run went by; releases made before it was part of them hold none. */
  weather: z
    .object({
      number: z.number().int().nullable(),
      nature: z.enum(weatherNatures).nullable(),
      source: redactedText,
      /** Whole kilometres, one at least. */
      distanceKm: z.number().nullable(),
      basis: z.enum(['measured', 'derived', 'hourly-archive']),
      intervalMin: z.number(),
      setAside: z.boolean(),
      values: z.array(
        z.object({ startUtc: instant, endUtc: instant, usedWm2: z.number().nullable(), directWm2: quantity, globalWm2: quantity, sunshineMin: quantity, cloudOktas: quantity, temperatureC: quantity, pressureHpa: quantity, windMs: quantity }),
      ),
    })
    .nullish(),
  hypotheses: z.array(
    z.object({
      kind: z.enum(hypothesisKinds),
      statement: redactedText,
      predicts: redactedText,
      evidenceFor: redactedText,
      evidenceAgainst: redactedText,
      tests: z.object({ geometry: test, weather: test, energy: test, mark: test }),
      result: z.enum(hypothesisResults),
    }),
  ),
  finding: z
    .object({
      version: z.number().int(),
      signedAt: instant,
      opinion: redactedText,
      certainty: z.enum(certainties),
      classification: z.enum(classifications),
      causes: redactedText,
      limits: redactedText,
      frozenHash: z.string(),
    })
    .nullable(),
  actions: z.array(
    z.object({ number: z.number().int(), title: redactedText, controlLevel: z.enum(controlLevels), interim: z.boolean(), dueOn: z.string(), state: z.enum(actionStates), effect: redactedText }),
  ),
  returnDays: z.array(z.object({ on: z.string(), bestAt: instant, minutes: z.number() })),
  /** Items by kind, with who held them by part in the matter. Records are left out where the reader gets less. */
  evidence: z
    .array(
      z.object({
        code: z.string(),
        kind: z.enum(evidenceKinds),
        custody: z.array(z.object({ role: z.enum(holderRoles), from: instant, to: instant.nullable() })),
        exams: z.array(z.object({ kind: z.enum(examKinds), at: instant, noticeGiven: z.boolean() })),
      }),
    )
    .default([]),
  chronology: z.array(z.object({ at: instant, what: z.string() })),
});
export type ReleasedCase = z.infer<typeof releasedCaseSchema>;
