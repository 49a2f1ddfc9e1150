import { plainNumber } from './plain-number.ts';

interface Sample {
  readonly atUtc: string;
  readonly wm2: number;
}
/** Direct irradiance through a stretch of time, as its figure shows it on screen and in print. */
export interface IrradianceDayData {
  readonly zone: string;
  readonly fromUtc: string;
  readonly toUtc: string;
  /** Clear-sky upper bound: no cloud, clean air. */
  readonly bound: readonly Sample[];
  /** Clear sky with the likely air of the place. */
  readonly likely?: readonly Sample[];
  /** Station or archive means, drawn as steps. */
  readonly measured?: readonly { readonly startUtc: string; readonly endUtc: string; readonly wm2: number }[];
  /** "Hulme field station, 14 km, 10-minute means" */
  readonly measuredName?: string;
  readonly sunlit?: readonly { readonly fromUtc: string; readonly toUtc: string }[];
}

/** Direct irradiance that counts as sunshine. [W/m²] WMO, Guide to Instruments and Methods of Observation, WMO-No. 8, sunshine duration. */
export const sunshineThresholdWm2 = 120;

/** Top of the axis before it is rounded. [W/m²] */
export const mostIrradianceWm2 = ({ bound, measured = [] }: Pick<IrradianceDayData, 'bound' | 'measured'>): number => Math.max(200, sunshineThresholdWm2, ...bound.map((one) => one.wm2), ...measured.map((one) => one.wm2));

/** @param clock The wall clock of the place at an instant. */
export function irradianceSentence(data: IrradianceDayData, clock: (utc: string) => string): string {
  const bound = data.bound.length > 0 ? `clear-sky bound up to ${plainNumber(Math.max(0, ...data.bound.map((one) => one.wm2)))} W/m²` : 'no clear-sky bound';
  const measured = data.measured?.length ? ` Measured ${plainNumber(Math.min(...data.measured.map((one) => one.wm2)))} to ${plainNumber(Math.max(...data.measured.map((one) => one.wm2)))} W/m².` : ' No measured series.';
  return `Direct irradiance ${clock(data.fromUtc)} to ${clock(data.toUtc)}: ${bound}.${measured}`;
}

/** Every so many moments of the clear sky with what was measured then, none beyond `mostRows`; or the measured values alone. */
export function irradianceRows(data: IrradianceDayData, clock: (utc: string) => string, mostRows: number): string[][] {
  const whole = (value: number | undefined) => (value === undefined ? 'none' : String(Math.round(value)));
  const measuredAt = (utc: string) => data.measured?.find((one) => one.startUtc <= utc && utc < one.endUtc)?.wm2;
  const likelyAt = new Map((data.likely ?? []).map((one) => [one.atUtc, one.wm2]));
  const every = Math.max(1, Math.ceil(data.bound.length / mostRows));
  return data.bound.filter((_, index) => index % every === 0).map((one) => [clock(one.atUtc), whole(one.wm2), whole(likelyAt.get(one.atUtc)), whole(measuredAt(one.atUtc))]);
}

export const irradianceColumns = ['Clock', 'Upper bound, W/m²', 'Likely, W/m²', 'Measured, W/m²'] as const;
