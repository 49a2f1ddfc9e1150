import { z } from 'zod';
import type { Axis } from './coordinate-text.ts';
import { readCoordinate } from './coordinate-text.ts';
import { siteUses } from './incident.ts';
import { isZone } from './local-time.ts';

const degrees = (axis: Axis) =>
  z.string().transform((text, context) => {
    const reading = readCoordinate(text, axis);
    if (reading.ok) return reading.valueDeg;
    context.addIssue({ code: 'custom', message: reading.sentence });
    return z.NEVER;
  });

const facts = {
  name: z.string().trim().min(2, 'Write the name of the site.').max(120, 'Use at most 120 characters.'),
  address: z.string().trim().max(300, 'Use at most 300 characters.').default(''),
  latitudeDeg: degrees('latitude'),
  longitudeDeg: degrees('longitude'),
  elevationM: z.string().trim().regex(/^-?\d{1,4}(?:\.\d+)?$/u, 'Write the height above sea level in metres.').transform(Number).pipe(z.number().min(-430, 'No site lies that low.').max(6000, 'No site lies that high.')),
  /** Left empty: taken from the coordinates. */
  zone: z.string().trim().refine((zone) => zone === '' || isZone(zone), 'Write an IANA zone name, like Europe/London, or leave it empty.'),
  use: z.enum(siteUses, 'Choose what the site is used for.'),
  jurisdiction: z.enum(['GB', 'US', 'EU', 'other'], 'Choose a jurisdiction.'),
};

export const siteFormSchema = z.discriminatedUnion('intent', [
  z.object({ intent: z.literal('add-site'), code: z.string().trim().toUpperCase().regex(/^[A-Z0-9-]{2,20}$/u, 'Use 2 to 20 letters, digits or hyphens.'), ...facts }),
  z.object({ intent: z.literal('change-site'), ...facts }),
  z.object({ intent: z.literal('open-guest-link') }),
  z.object({ intent: z.literal('close-guest-link') }),
]);

export type SiteUse = (typeof siteUses)[number];

export const siteUseLabels: Record<SiteUse, string> = {
  office: 'Office',
  dwelling: 'Dwelling',
  school: 'School',
  'health-care': 'Health care',
  hotel: 'Hotel',
  retail: 'Retail',
  warehouse: 'Warehouse',
  industrial: 'Industrial',
  'public-open-space': 'Public open space',
  vehicle: 'Vehicle',
  other: 'Other',
};
