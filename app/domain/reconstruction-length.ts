import type { ReconstructionInput } from '#app/physics/model/input.ts';

/** A request that would keep its sender waiting longer than this is queued instead. [s] */
const longestWaitS = 5;

const minutesBetween = (from: string, to: string): number => Math.max(0, (Date.parse(to) - Date.parse(from)) / 60_000);

/**
 * Rough time that a reconstruction takes on one core, from the parts that grow with the input. [s] The rates are those of
 * the benchmark, rounded up; they only decide between answering at once and queueing.
 */
export function expectedSeconds(input: ReconstructionInput): number {
  const windowMinutes = minutesBetween(input.window.startUtc, input.window.endUtc);
  const years = input.recurrenceFromUtc && input.recurrenceToUtc ? minutesBetween(input.recurrenceFromUtc, input.recurrenceToUtc) / 525_600 : 1;
  const traced = input.optic ? (input.rays ?? 100_000) / 100_000 + (input.samples ?? 4096) / 20_000 : 0;
  const masked = input.occluders?.length ? windowMinutes / 150 : 0;
  return traced + masked + windowMinutes / 10_000 + 0.1 * years;
}

export const isLong = (input: ReconstructionInput): boolean => expectedSeconds(input) > longestWaitS;
