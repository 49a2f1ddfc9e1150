import { z } from 'zod';
import type { Place } from './coordinate-text.ts';
import type { FoundMeans, Sighting, WeatherSeen, YesNoUnknown } from './incident.ts';
import { foundMeans, plainText, sightings, weatherSeen, yesNoUnknown } from './incident.ts';
import { injuryKinds, treatments } from './injury.ts';
import type { PersonRelation } from './person-relation.ts';
import { personRelations } from './person-relation.ts';
import type { RepeatedHours } from './report-fields.ts';
import { readReportedOptic } from './report-optic.ts';
import { sizeFieldNames } from './report-optic-sizes.ts';
import { placeFieldNames, readReportPlaces } from './report-place.ts';
import type { ReportPlaces } from './report-place.ts';
import type { ReportTimes } from './report-times.ts';
import { readReportTimes } from './report-times.ts';
import type { Actor } from './roles.ts';
import type { Scene } from './scene.ts';
import { sceneSchema, targetMaterials } from './scene.ts';

/** Made on the device when the form is first opened; whoever knows it holds the report under way. */
export const clientIdSchema = z.uuid();

/** A site as the report needs it. */
export interface ReportSite {
  readonly id: string;
  readonly organisationId: string;
  readonly name: string;
  readonly code: string;
  readonly zone: string;
}

/** Who reports: a signed-in person, or a guest who came by the link of one site and can report for that site only. */
export type ReportHolder =
  | { readonly kind: 'person'; readonly actor: Actor }
  | { readonly kind: 'guest'; readonly site: ReportSite };

export interface ReportContact {
  readonly name: string | null;
  readonly email: string | null;
  readonly phone: string | null;
}

/** Class personal and child, and with `injury` class health: stored apart from the account. */
export interface HurtPerson {
  readonly ageBand: 'adult' | '16-17' | 'under-16' | 'unknown';
  readonly relation: PersonRelation | null;
  readonly injury: { readonly kind: (typeof injuryKinds)[number] | null; readonly part: string | null; readonly treatment: (typeof treatments)[number] } | null;
}

/** A report that can be stored as it is. */
export interface Report {
  readonly site: ReportSite;
  readonly placeDetail: string;
  readonly position: ReportPlaces['position'];
  readonly times: ReportTimes;
  readonly sighting: Sighting;
  readonly narrative: string;
  readonly anyoneHurt: YesNoUnknown;
  /** Who was hurt, without a name; null when nobody was, or nothing was said of them. */
  readonly hurt: HurtPerson | null;
  /** How somebody who saw it belongs to the place; null when nobody did. */
  readonly witness: { readonly relation: PersonRelation | null } | null;
  readonly hazardStillPresent: YesNoUnknown;
  readonly interimControl: string | null;
  readonly foundByMeans: FoundMeans | null;
  readonly weatherSeen: WeatherSeen | null;
  readonly scene: Scene;
  readonly contact: ReportContact | null;
}

export interface ReportProblem {
  readonly ok: false;
  readonly fieldErrors: Record<string, string[]>;
  readonly repeated: RepeatedHours;
  readonly longWindowDays: number | null;
}
export type ReportReading = { readonly ok: true; readonly report: Report } | ReportProblem;

/** An unanswered choice is not an error. */
const choice = <Value extends string>(values: readonly Value[]) => z.string().transform((text) => values.find((value) => value === text) ?? null);

const answersSchema = z.object({
  siteId: z.string(),
  placeDetail: plainText(300),
  sighting: z.enum(sightings, "Say what you see, or choose Don't know."),
  narrative: plainText(4_000),
  anyoneHurt: z.enum(yesNoUnknown, "Say if anyone was hurt, or choose Don't know."),
  hurtAgeBand: choice(['adult', '16-17', 'under-16', 'unknown']),
  hurtRelation: choice(personRelations),
  injuryKind: choice(injuryKinds),
  injuryPart: plainText(80),
  injuryTreatment: choice(treatments),
  seenByOthers: choice(yesNoUnknown),
  witnessRelation: choice(personRelations),
  hazardStillPresent: choice(yesNoUnknown),
  interimControl: plainText(500),
  foundByMeans: choice(foundMeans),
  weatherSeen: choice(weatherSeen),
  targetMaterial: choice(targetMaterials),
  contactName: plainText(120),
  contactEmail: z.union([z.literal(''), z.email('Write an e-mail address such as name@example.org, or leave it empty.')]),
  contactPhone: plainText(60).pipe(z.string().regex(/^$|^[+()\d][\d\s()./-]{4,}$/u, 'Write the number with digits, or leave it empty.')),
});

/** Every field that a report may carry, besides photos: what is kept when a form has to be mended. */
export const reportFieldNames: readonly string[] = [
  ...Object.keys(answersSchema.shape),
  'clientId', 'foundWhen', 'foundNowAt', 'foundLocal', 'foundFromLocal', 'foundToLocal', 'lastSoundLocal', 'foundLocalPass', 'foundFromLocalPass',
  'foundToLocalPass', 'lastSoundLocalPass', 'foundPrecision', 'longWindowConfirmed', ...placeFieldNames,
  'opticKind', 'opticMaterial', 'opticPrinted', 'opticFace', 'opticCoating', 'opticFacesDeg', 'opticTilt', 'opticLies', 'opticMoved',
  ...sizeFieldNames,
];

/** Where a report is read. */
export interface ReportSetting {
  /** The chosen site; null when none or an unknown one was chosen. */
  readonly site: ReportSite | null;
  readonly now: Date;
  /** Zone of a position, for times that are typed before a site is chosen. */
  readonly zoneAt?: (place: Place) => string;
}

/**
 * Reads a report as typed.
 *
 * @param form text fields by name; missing ones count as empty.
 */
export function readReport(form: Readonly<Record<string, string>>, { site, now, zoneAt }: ReportSetting): ReportReading {
  const typed = form['sighting'] === 'bright-patch' ? withoutMarkAnswers(form) : form;
  const fieldErrors: Record<string, string[]> = {};
  const whole = Object.fromEntries(Object.keys(answersSchema.shape).map((name) => [name, (typed[name] ?? '').trim()]));
  const answers = answersSchema.safeParse(whole);
  if (!answers.success) Object.assign(fieldErrors, z.flattenError(answers.error).fieldErrors);
  if (!site) fieldErrors['siteId'] = ['Choose the site. If it is not in the list, choose the nearest one and describe the spot.'];
  const where = readReportPlaces(typed);
  const { position, onMap } = where.places;
  // Without site and position the clock of the place is unknown; UTC still finds what is missing or unreadable.
  const zone = site?.zone ?? (position && zoneAt ? zoneAt(position) : null);
  const when = readReportTimes(typed, { zone: zone ?? 'UTC', now });
  const optic = readReportedOptic(typed, onMap?.walls);
  Object.assign(fieldErrors, zone ? when.errors : withoutSiteErrors(when.errors), where.errors, optic.errors);
  if (!answers.success || !site || Object.keys(fieldErrors).length > 0) {
    return { ok: false, fieldErrors, repeated: zone ? when.repeated : {}, longWindowDays: when.longWindowDays };
  }
  const { contactName, contactEmail, contactPhone, interimControl, targetMaterial, hazardStillPresent, seenByOthers, witnessRelation, placeDetail, sighting, narrative, anyoneHurt, foundByMeans, weatherSeen: sky } = answers.data;
  const hasContact = contactName !== '' || contactEmail !== '' || contactPhone !== '';
  return {
    ok: true,
    report: {
      placeDetail,
      sighting,
      narrative,
      anyoneHurt,
      foundByMeans,
      weatherSeen: sky,
      site,
      position,
      times: when.times,
      hurt: hurtPerson(answers.data),
      witness: seenByOthers === 'yes' ? { relation: witnessRelation } : null,
      hazardStillPresent: hazardStillPresent ?? 'dont-know',
      interimControl: interimControl || null,
      scene: sceneSchema.parse({ optic: optic.optic, ...(targetMaterial ? { target: { material: targetMaterial } } : {}), ...(onMap ? { onMap } : {}) }),
      contact: hasContact ? { name: contactName || null, email: contactEmail.toLowerCase() || null, phone: contactPhone || null } : null,
    },
  };
}

/** A near miss left no mark: what was answered about marks before the sighting was chosen is not sent on. */
function withoutMarkAnswers(form: Readonly<Record<string, string>>): Record<string, string> {
  const dropped = ['lastSoundLocal', 'targetMaterial', 'foundByMeans', 'seenByOthers', 'witnessRelation', ...sizeFieldNames];
  return { ...form, ...Object.fromEntries(dropped.map((name) => [name, ''])) };
}

/** What was said of the hurt person, when somebody was hurt; answers left over from another answer are dropped. */
function hurtPerson(answers: z.infer<typeof answersSchema>): HurtPerson | null {
  const { anyoneHurt, hurtAgeBand, hurtRelation, injuryKind, injuryPart, injuryTreatment } = answers;
  const injury = injuryKind || injuryPart !== '' || injuryTreatment ? { kind: injuryKind, part: injuryPart || null, treatment: injuryTreatment ?? ('unknown' as const) } : null;
  if (anyoneHurt !== 'yes' || !(hurtAgeBand || hurtRelation || injury)) return null;
  return { ageBand: hurtAgeBand ?? 'unknown', relation: hurtRelation, injury };
}

/** Only the answer itself can be judged while the zone is unknown. */
function withoutSiteErrors(errors: Record<string, string[]>): Record<string, string[]> {
  return errors['foundWhen'] ? { foundWhen: errors['foundWhen'] } : {};
}
