import { z } from 'zod';
import { administratorForAllSites, grantFields, inviteSchema } from './account.ts';

export const peopleFormSchema = z.discriminatedUnion('intent', [
  inviteSchema,
  z.object({ intent: z.literal('add-role'), userId: z.uuid(), ...grantFields }).refine(administratorForAllSites.check, administratorForAllSites.said),
  z.object({ intent: z.literal('remove-role'), grantId: z.uuid() }),
  z.object({ intent: z.literal('switch-off'), userId: z.uuid(), reason: z.string().trim().min(3, 'Say why.').max(300, 'Use at most 300 characters.') }),
  z.object({ intent: z.literal('switch-on'), userId: z.uuid() }),
  z.object({ intent: z.literal('invite-again'), userId: z.uuid() }),
]);
