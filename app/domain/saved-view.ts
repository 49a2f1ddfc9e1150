import { z } from 'zod';
import { plainText } from './incident.ts';
import { readRegisterFilter, registerSearch } from './register-filter.ts';

/** A filter of the register under a person's own name for it. */
export interface SavedView {
  readonly id: string;
  readonly name: string;
  readonly search: string;
}

export const mostSavedViews = 20;

const name = plainText(60).pipe(z.string().min(1, 'Give the view a name, such as: mine, by risk.'));
/** What the address says, read as a filter and written again, so that nothing else is kept. */
const search = z.string().max(2_000).transform((text) => registerSearch(readRegisterFilter(new URLSearchParams(text))));

export const savedViewForm = z.discriminatedUnion('intent', [
  z.object({ intent: z.literal('save-view'), name, search }),
  z.object({ intent: z.literal('rename-view'), id: z.uuid('This view is not known.'), name }),
  z.object({ intent: z.literal('delete-view'), id: z.uuid('This view is not known.') }),
]);
export type SavedViewForm = z.infer<typeof savedViewForm>;
