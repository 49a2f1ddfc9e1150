import { z } from 'zod';
import { plainText } from './incident.ts';

/** Parts in which people who saw something stand to a case. */
export const witnessRoles = ['witness', 'finder', 'occupant', 'neighbour', 'contractor', 'owner'] as const;
export type WitnessRole = (typeof witnessRoles)[number];
export const witnessRoleLabels: Record<WitnessRole, string> = {
  witness: 'Witness',
  finder: 'Finder of the mark',
  occupant: 'Occupant',
  neighbour: 'Neighbour',
  contractor: 'Contractor',
  owner: 'Owner',
};

export const witnessAges = ['adult', '16-17', 'under-16', 'unknown'] as const;
export const witnessAgeLabels: Record<(typeof witnessAges)[number], string> = { adult: 'Adult', '16-17': '16 or 17 years', 'under-16': 'Under 16', unknown: 'Not known' };

const words = (max: number, sentence: string) => plainText(max).pipe(z.string().min(2, sentence));

/** An account as typed. Clock times are read beside it, in the zone of the place. */
export const takeAccountSchema = z
  .object({
    clientId: z.uuid('The form is damaged. Open the page anew; what you typed can be copied from here.'),
    /** Empty for a person who is not on the list yet. */
    involvementId: z.union([z.literal('').transform(() => null), z.uuid('Choose the person from the list, or name a new one.')]).default(null),
    personName: plainText(120).default(''),
    personRole: z.enum(witnessRoles, 'Choose in what part they saw it.').default('witness'),
    ageBand: z.enum(witnessAges, 'Choose the age band.').default('unknown'),
    language: words(80, 'Say in which language the account was given.'),
    words: words(20_000, 'Write down what was said, in the words of the person.'),
    readBack: z.enum(['yes', 'no'], 'Say whether the account was read back to the person.').transform((answer) => answer === 'yes'),
    signedAttachmentId: z.union([z.literal('').transform(() => null), z.uuid('Choose the signed copy from the list.')]).default(null),
  })
  .refine((account) => account.involvementId !== null || account.ageBand === 'under-16' || account.ageBand === '16-17' || account.personName.length >= 2, { path: ['personName'], message: 'Name the person, or choose one from the list.' })
  .refine((account) => !(account.ageBand === 'under-16' || account.ageBand === '16-17') || account.personName === '', { path: ['personName'], message: 'No name is kept of a child. Empty this field; the account stays with “a child”.' });
export type TakeAccount = z.infer<typeof takeAccountSchema>;

export const signedCopySchema = z.object({
  accountId: z.uuid('Choose an account of this case.'),
  signedAttachmentId: z.uuid('Choose the signed copy from the list. Add it under Documents first.'),
});

/**
 * `Witness A`, `Witness B`: one letter a person, in the order in which their first accounts were taken.
 *
 * @param involvementIds the person of each account, in the order of the accounts.
 */
export function witnessNames(involvementIds: readonly string[]): readonly string[] {
  const order = [...new Set(involvementIds)];
  return involvementIds.map((id) => `Witness ${letterOf(order.indexOf(id))}`);
}

function letterOf(index: number): string {
  const last = String.fromCharCode(65 + (index % 26));
  return index < 26 ? last : `${letterOf(Math.floor(index / 26) - 1)}${last}`;
}

/** The finding of the page, weakest fact first. */
export function witnessesHeading(accounts: readonly { readonly label: number; readonly readBack: boolean; readonly signedAttachmentId: string | null }[]): string {
  if (accounts.length === 0) return 'No account of a witness has been taken';
  const list = (some: typeof accounts) => some.map((account) => account.label).join(', ');
  const unread = accounts.filter((account) => !account.readBack);
  if (unread.length > 0) return `Account ${list(unread)} was not read back`;
  const unsigned = accounts.filter((account) => account.signedAttachmentId === null);
  if (unsigned.length > 0) return `Account ${list(unsigned)} has no signed copy`;
  return accounts.length === 1 ? 'One account, read back and signed' : `${accounts.length} accounts, read back and signed`;
}
