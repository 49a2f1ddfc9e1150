import { z } from 'zod';
import type { FoundMeans, Sighting, WeatherSeen, YesNoUnknown } from './incident.ts';
import { foundMeans, plainText, receiptPattern, sightings, weatherSeen, yesNoUnknown } from './incident.ts';
import type { RepeatedHours } from './report-fields.ts';
import { dimensionFields, readNumber, readReportedOptic, reportDimensions } from './report-optic.ts';
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

/** A report that can be stored as it is. */
export interface Report {
  readonly site: ReportSite;
  readonly placeDetail: string;
  readonly position: { readonly latitudeDeg: number; readonly longitudeDeg: number; readonly accuracyM: number | null } | null;
  readonly times: ReportTimes;
  readonly sighting: Sighting;
  readonly narrative: string;
  readonly anyoneHurt: YesNoUnknown;
  readonly hurtAgeBand: 'adult' | '16-17' | 'under-16' | 'unknown' | null;
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
  'foundToLocalPass', 'lastSoundLocalPass', 'foundPrecision', 'longWindowConfirmed', 'latitudeDeg', 'longitudeDeg', 'accuracyM', 'opticKind', 'opticMaterial', 'opticMoved',
  ...reportDimensions.flatMap((dimension) => Object.values(dimensionFields(dimension))),
];

/**
 * Reads a report as typed.
 *
 * @param typed text fields by name; missing ones count as empty.
 * @param place the chosen site, null when none or an unknown one was chosen, and the present.
 */
export function readReport(typed: Readonly<Record<string, string>>, place: { readonly site: ReportSite | null; readonly now: Date }): ReportReading {
  const { site, now } = place;
  const fieldErrors: Record<string, string[]> = {};
  const whole = Object.fromEntries(Object.keys(answersSchema.shape).map((name) => [name, (typed[name] ?? '').trim()]));
  const answers = answersSchema.safeParse(whole);
  if (!answers.success) Object.assign(fieldErrors, z.flattenError(answers.error).fieldErrors);
  if (!site) fieldErrors['siteId'] = ['Choose the site. If it is not in the list, choose the nearest one and describe the spot.'];
  // Without a site the clock of the place is unknown; UTC still finds what is missing or unreadable.
  const when = readReportTimes(typed, { zone: site?.zone ?? 'UTC', now });
  const where = readPosition(typed);
  const optic = readReportedOptic(typed);
  Object.assign(fieldErrors, site ? when.errors : withoutSiteErrors(when.errors), where.errors, optic.errors);
  if (!answers.success || !site || Object.keys(fieldErrors).length > 0) {
    return { ok: false, fieldErrors, repeated: site ? when.repeated : {}, longWindowDays: when.longWindowDays };
  }
  const { contactName, contactEmail, contactPhone, interimControl, targetMaterial, hurtAgeBand, hazardStillPresent, siteId: _, ...plain } = answers.data;
  const hasContact = contactName !== '' || contactEmail !== '' || contactPhone !== '';
  return {
    ok: true,
    report: {
      ...plain,
      site,
      position: where.position,
      times: when.times,
      hurtAgeBand: plain.anyoneHurt === 'yes' ? hurtAgeBand : null,
      hazardStillPresent: hazardStillPresent ?? 'dont-know',
      interimControl: interimControl || null,
      scene: sceneSchema.parse({ optic: optic.optic, ...(targetMaterial ? { target: { material: targetMaterial } } : {}) }),
      contact: hasContact ? { name: contactName || null, email: contactEmail.toLowerCase() || null, phone: contactPhone || null } : null,
    },
  };
}

/** Only the answer itself can be judged while the zone is unknown. */
function withoutSiteErrors(errors: Record<string, string[]>): Record<string, string[]> {
  return errors['foundWhen'] ? { foundWhen: errors['foundWhen'] } : {};
}

function readPosition(typed: Readonly<Record<string, string>>): { position: Report['position']; errors: Record<string, string[]> } {
  const latitude = (typed['latitudeDeg'] ?? '').trim();
  const longitude = (typed['longitudeDeg'] ?? '').trim();
  if (latitude === '' && longitude === '') return { position: null, errors: {} };
  const latitudeDeg = readNumber(latitude);
  const longitudeDeg = readNumber(longitude);
  const errors: Record<string, string[]> = {};
  if (latitudeDeg === null || Math.abs(latitudeDeg) > 90) errors['latitudeDeg'] = ['Write the latitude in degrees from -90 to 90, south negative, such as 53.4961, or leave both empty.'];
  if (longitudeDeg === null || Math.abs(longitudeDeg) > 180) errors['longitudeDeg'] = ['Write the longitude in degrees from -180 to 180, west negative, such as -1.6043, or leave both empty.'];
  if (latitudeDeg === null || longitudeDeg === null || Object.keys(errors).length > 0) return { position: null, errors };
  const accuracyM = readNumber(typed['accuracyM'] ?? '');
  return { position: { latitudeDeg, longitudeDeg, accuracyM: accuracyM !== null && accuracyM > 0 && accuracyM <= 100_000 ? accuracyM : null }, errors };
}

const sightingTitles: Record<Sighting, string> = {
  mark: 'Mark or scorch',
  melted: 'Melted or bent',
  'bright-patch': 'Bright patch',
  'smoke-or-fire': 'Smoke or fire, now out',
  'dont-know': 'Something seen',
};
const titleLength = 90;

/**
 * Title of a new case: what was seen and where, in the reporter's words for the place. Falls back to the site's name when
 * those words contain a name that the report knows, or something that looks like an address or a number to call.
 *
 * @param names of people that must not appear in a title.
 */
export function titleOfReport(report: Pick<Report, 'sighting' | 'placeDetail' | 'site'>, names: readonly string[]): string {
  const words = (report.placeDetail.split(/[\n.;]/u)[0] ?? '').trim();
  const folded = words.toLowerCase();
  const parts = names.flatMap((name) => name.toLowerCase().split(/[\s,]+/u)).filter((part) => part.length > 2);
  const personal = parts.some((part) => folded.includes(part)) || /@|\d{5,}|\b(?:mrs?|ms|miss|mx|dr)\b/iu.test(words);
  const where = words === '' || personal ? report.site.name : words;
  const title = `${sightingTitles[report.sighting]}, ${where}`;
  return title.length <= titleLength ? title : `${title.slice(0, titleLength - 1).trimEnd()}…`;
}

const receiptLetters = 'ABCDEFGHJKLMNPQRSTUVWXYZ23456789';

/** A receipt from eight random numbers below 32. Without I, O, 0 and 1 it survives being read out. */
export function receiptFrom(numbers: Uint8Array): string {
  const text = [...numbers.subarray(0, 8)].map((number) => receiptLetters[number % 32] ?? '').join('');
  return `${text.slice(0, 2)}-${text.slice(2, 6)}-${text.slice(6, 8)}`;
}

/** A receipt as somebody may type it: small letters, spaces or missing dashes are mended; null when it cannot be one. */
export function readReceipt(text: string): string | null {
  const bare = text.toUpperCase().replace(/[^A-Z0-9]/gu, '');
  const receipt = `${bare.slice(0, 2)}-${bare.slice(2, 6)}-${bare.slice(6)}`;
  return receiptPattern.test(receipt) ? receipt : null;
}
