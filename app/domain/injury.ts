import { z } from 'zod';
import { plainText } from './incident.ts';

export const injuryKinds = ['superficial-burn', 'partial-thickness-burn', 'full-thickness-burn', 'eye-symptoms', 'smoke-inhalation', 'fall', 'other'] as const;
export const injuryKindLabels: Record<(typeof injuryKinds)[number], string> = {
  'superficial-burn': 'Superficial burn',
  'partial-thickness-burn': 'Partial-thickness burn',
  'full-thickness-burn': 'Full-thickness burn',
  'eye-symptoms': 'Eye symptoms',
  'smoke-inhalation': 'Smoke inhalation',
  fall: 'Fall',
  other: 'Other',
};

export const treatments = ['none', 'first-aid', 'medical-treatment', 'emergency-department', 'in-patient', 'unknown'] as const;
export const treatmentLabels: Record<(typeof treatments)[number], string> = {
  none: 'None',
  'first-aid': 'First aid',
  'medical-treatment': 'Medical treatment',
  'emergency-department': 'Emergency department',
  'in-patient': 'In-patient',
  unknown: "Don't know",
};

const days = z
  .string()
  .default('')
  .transform((text, context) => {
    const typed = text.trim();
    if (typed === '') return null;
    const count = Number(typed);
    if (/^\d+$/u.test(typed) && count <= 3_650) return count;
    context.addIssue({ code: 'custom', message: 'Write whole days, such as 2; at most 3650.' });
    return z.NEVER;
  });

export const injuryForm = z.object({
  injuryId: z.union([z.literal(''), z.uuid()]).default(''),
  part: plainText(80).transform((text) => text || null),
  kind: z.enum(['', ...injuryKinds]).transform((value) => (value === '' ? null : value)),
  treatment: z.enum(treatments, 'Say what treatment was given, or "Don\'t know".'),
  daysAway: days,
  restrictedDays: days,
  description: plainText(1_000),
});
export type InjuryForm = z.infer<typeof injuryForm>;
