import { z } from 'zod';
import { inviteSchema } from './account.ts';
import { roles } from './roles.ts';

export const peopleFormSchema = z.discriminatedUnion('intent', [
  inviteSchema,
  z.object({ intent: z.literal('add-role'), userId: z.uuid(), role: z.enum(roles, 'Choose a role.'), siteId: z.union([z.uuid(), z.literal('')]).default('') }),
  z.object({ intent: z.literal('remove-role'), grantId: z.uuid() }),
  z.object({ intent: z.literal('switch-off'), userId: z.uuid(), reason: z.string().trim().min(3, 'Say why.').max(300, 'Use at most 300 characters.') }),
  z.object({ intent: z.literal('switch-on'), userId: z.uuid() }),
  z.object({ intent: z.literal('invite-again'), userId: z.uuid() }),
]);
