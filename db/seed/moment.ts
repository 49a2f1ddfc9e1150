import { fromLocalInput } from '#app/domain/local-time.ts';

/** The instant of a wall-clock time in the demonstration data; such data never falls in a clock change. */
export function moment(local: string, zone: string): Date {
  const reading = fromLocalInput(local, zone);
  if (reading.kind !== 'instant') throw new Error(`The demonstration time ${local} in ${zone} is ${reading.kind}.`);
  return reading.instant;
}
