import { z } from 'zod';
import { plainText } from './incident.ts';
import { fromLocalInput, localDay } from './local-time.ts';
import { audiences } from './release-policy.ts';
import type { Decisions, LineDecision } from './redaction.ts';

const dayMs = 86_400_000;
/** Our own default and bound: long enough for a claim to be read, short enough to be looked at again. */
export const defaultExpiryDays = 90;
export const longestExpiryDays = 730;

export const prepareSchema = z.object({
  audience: z.enum(audiences, 'Choose who will read it.'),
  recipientOrganisationId: z.uuid('Choose the organisation that it is for.'),
  expiresOn: z.iso.date('Write the day as year, month, day, such as 2027-03-01.'),
  changeNote: plainText(300).pipe(z.string().min(3, 'Say in a few words what is new in this release, such as "first release".')),
  /** Stands for everything that was shown when the decisions were made. */
  basis: z.string().regex(/^[0-9a-f]{64}$/u),
});
export type PrepareForm = z.infer<typeof prepareSchema>;

export const withdrawSchema = z.object({ reason: plainText(500).pipe(z.string().min(5, 'Say why it is withdrawn, in a sentence.')) });

const prefix = 'decision.';
export const decisionField = (key: string): string => `${prefix}${key}`;

/** Decisions as the form sends them; anything but the two words counts as undecided. */
export function readDecisions(entries: Iterable<readonly [string, unknown]>): Decisions {
  const decisions: Record<string, LineDecision> = {};
  for (const [name, value] of entries) {
    if (name.startsWith(prefix) && (value === 'share' || value === 'hold-back')) decisions[name.slice(prefix.length)] = value;
  }
  return decisions;
}

/** First and last day that may be chosen, and the one proposed, on the calendar of the place. */
export function expiryDays(now: Date, zone: string): { readonly first: string; readonly proposed: string; readonly last: string } {
  const after = (days: number) => localDay(new Date(now.getTime() + days * dayMs), zone);
  return { first: after(1), proposed: after(defaultExpiryDays), last: after(longestExpiryDays) };
}

export type ExpiryReading = { readonly ok: true; readonly expiresAt: Date } | { readonly ok: false; readonly sentence: string };

/** The last minute of the chosen day on the clock of the place. */
export function readExpiry(expiresOn: string, now: Date, zone: string): ExpiryReading {
  const { first, last } = expiryDays(now, zone);
  if (expiresOn < first) return { ok: false, sentence: `Choose a day from ${first} on; readers need time to open it.` };
  if (expiresOn > last) return { ok: false, sentence: `A release stays open for two years at most: choose a day up to ${last}, and make a new release then.` };
  const reading = fromLocalInput(`${expiresOn}T23:59`, zone, 'second');
  if (reading.kind === 'instant') return { ok: true, expiresAt: reading.instant };
  return reading.kind === 'gap' ? { ok: true, expiresAt: reading.after } : { ok: false, sentence: 'This is not a day of the calendar.' };
}
