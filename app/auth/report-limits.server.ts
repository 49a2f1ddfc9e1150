import type { ReportHolder } from '#app/domain/report.ts';
import { limitRate } from './rate-limit.server.ts';

/** Our own bounds: far above one person's honest use, far below guessing codes or filling a store. */
const limits = {
  look: { hits: 120, windowS: 600 },
  send: { hits: 60, windowS: 3_600 },
  /** Asked while somebody types, after a pause. */
  sun: { hits: 400, windowS: 600 },
  photo: { hits: 240, windowS: 3_600 },
} as const;

/** Counts what guests do by network address, and what people do by account. */
export async function limitReporting(what: keyof typeof limits, holder: ReportHolder | null, address: string): Promise<void> {
  const who = holder?.kind === 'person' ? `person:${holder.actor.userId}` : `address:${address}`;
  await limitRate(`report-${what}:${who}`, limits[what].hits, limits[what].windowS);
}
