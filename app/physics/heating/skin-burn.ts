import type { SourceRef } from '#app/physics/model/stated.ts';

/** Time and flux of a second-degree burn on blackened skin. Rows stoll-1 … stoll-30. */
export const stollTable: readonly (readonly [seconds: number, fluxKwm2: number])[] = [
  [1, 50], [2, 31], [5, 16], [10, 9.8], [20, 6], [30, 4.5],
];

export const stollSource: SourceRef = {
  text: 'A. M. Stoll and M. A. Chianta, Aerospace Medicine 40, 1232, 1969, table as reproduced in ASTM heat-flux test methods', verified: true,
};

/** Flux and time to a second-degree burn of the agency table; rows epa-burn2-1 … epa-burn2-12. */
const agencyTable: readonly (readonly [fluxKwm2: number, seconds: number])[] = [
  [1, 663], [2, 187], [3, 92], [4, 57], [5, 40], [6, 30], [8, 20], [10, 14], [12, 11],
];

function logLog(x: number, x0: number, y0: number, x1: number, y1: number): number {
  return y0 * (x / x0) ** (Math.log(y1 / y0) / Math.log(x1 / x0));
}

/** Flux that burns in a given time, read in log-log. [kW/m²] @param seconds 1…30 */
export function burnFluxKwm2(seconds: number): number {
  let index = 0;
  while (index < stollTable.length - 2 && seconds > (stollTable[index + 1]?.[0] ?? 0)) index++;
  const [t0, q0] = stollTable[index] ?? [1, 50];
  const [t1, q1] = stollTable[index + 1] ?? [2, 31];
  return logLog(seconds, t0, q0, t1, q1);
}

/** Time to a second-degree burn: shortest and longest of the published relations. [s] */
export interface BurnTime {
  readonly lowS: number;
  readonly midS: number;
  readonly highS: number;
  readonly extrapolated: boolean;
}

function agencySeconds(fluxKwm2: number): number {
  let index = 0;
  while (index < agencyTable.length - 2 && fluxKwm2 > (agencyTable[index + 1]?.[0] ?? 0)) index++;
  const [q0, t0] = agencyTable[index] ?? [1, 663];
  const [q1, t1] = agencyTable[index + 1] ?? [2, 187];
  return logLog(fluxKwm2, q0, t0, q1, t1);
}

function stollSeconds(fluxKwm2: number): number {
  let index = 0;
  while (index < stollTable.length - 2 && fluxKwm2 < (stollTable[index + 1]?.[1] ?? 0)) index++;
  const [t0, q0] = stollTable[index] ?? [1, 50];
  const [t1, q1] = stollTable[index + 1] ?? [2, 31];
  return logLog(fluxKwm2, q0, t0, q1, t1);
}

/**
 * Second-degree burn time of bare skin under a wide beam: the Stoll table between the two other published relations.
 *
 * Small spots under 10 mm are tolerated longer, which none of the tables covers.
 */
export function burnTime(fluxKwm2: number): BurnTime {
  const defence = 200 * fluxKwm2 ** -1.46;
  const agency = agencySeconds(fluxKwm2);
  const stoll = stollSeconds(fluxKwm2);
  const sorted = [defence, agency, stoll].sort((a, b) => a - b);
  const [lowS = stoll, , highS = stoll] = sorted;
  return { lowS, midS: stoll, highS, extrapolated: fluxKwm2 > 50 || fluxKwm2 < 4.5 };
}
