import { fromLocalInput } from '#app/domain/local-time.ts';

/** What the form says of the finding at the moment. */
export interface StatedFinding {
  /** Clock of the place; null before a site is chosen. */
  readonly zone: string | null;
  readonly foundAt: Date | null;
}

/** The moment of finding as typed so far; of a range, its end. Null where it is not said, or cannot be told. */
export function statedFinding(values: Readonly<Record<string, string>>, zone: string | null): StatedFinding {
  const { foundWhen, foundNowAt, foundLocal, foundToLocal } = values;
  if (foundWhen === 'just-now' && foundNowAt) return { zone, foundAt: new Date(foundNowAt) };
  const local = foundWhen === 'at' ? foundLocal : foundWhen === 'range' ? foundToLocal : '';
  if (!local || !zone) return { zone, foundAt: null };
  const reading = fromLocalInput(local, zone);
  return { zone, foundAt: reading.kind === 'instant' ? reading.instant : null };
}
