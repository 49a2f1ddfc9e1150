import type { ReconstructionInput } from '#app/physics/model/input.ts';
import { climateClasses } from '#app/physics/model/input.ts';
import { settleSite } from '#app/physics/site.ts';
import { climateAir } from '#app/physics/sky/climate-classes.data.ts';
import { clearSkyAt } from '#app/physics/sky/clear-sky.ts';
import { extraterrestrialWm2 } from '#app/physics/sky/extraterrestrial.ts';
import { clearDay, clearDayWm2 } from './clear-day.data.ts';
import { clearSkyCurve } from './run-day.ts';
import type { IrradianceSample } from './run-day.ts';

/** Figures of the page on method, computed by the engine when the page is asked for. */
export interface MethodFigures {
  readonly zone: string;
  readonly fromUtc: string;
  readonly toUtc: string;
  readonly bound: readonly IrradianceSample[];
  readonly likely: readonly IrradianceSample[];
  readonly measured: readonly { readonly startUtc: string; readonly endUtc: string; readonly wm2: number }[];
  readonly source: string;
  /** Greatest share of the bound that the shown minutes reach with the sun over 15°, in percent, and the least. */
  readonly greatestPercent: number;
  readonly leastPercent: number;
  readonly models: readonly { readonly elevationDeg: number; readonly birdWm2: number; readonly ineichenWm2: number; readonly boundWm2: number }[];
  readonly air: readonly { readonly name: string; readonly aod500: number; readonly waterCm: number }[];
}

const tenMinutesMs = 600_000;
const elevationsDeg = [4, 6, 10, 15, 20, 30, 45, 60, 90] as const;

const clearDayInput: ReconstructionInput = {
  place: clearDay.place,
  window: { startUtc: `${clearDay.on}T14:20:00.000Z`, endUtc: `${clearDay.on}T23:59:00.000Z`, clockSigmaS: 0 },
  sky: { climateClass: 'clean-dry-mountain', pressureHpa: clearDay.pressureHpa, temperatureC: clearDay.temperatureC },
  seed: 0,
};

/** Both models at several heights of the sun, temperate rural air at sea level and mean distance. */
function modelRows(): MethodFigures['models'] {
  const { air } = settleSite({ place: { latitudeDeg: 0, longitudeDeg: 0, elevationM: 0, heightAboveGroundM: 0, zone: 'UTC' }, sky: { climateClass: 'temperate-rural' } });
  return elevationsDeg.flatMap((elevationDeg) => {
    const clear = clearSkyAt(elevationDeg, extraterrestrialWm2(1, air.solarConstantWm2), 0, air);
    return clear ? [{ elevationDeg, birdWm2: Math.round(clear.birdWm2), ineichenWm2: Math.round(clear.ineichenWm2), boundWm2: Math.round(clear.boundWm2) }] : [];
  });
}

export function methodFigures(): MethodFigures {
  const { startUtc, endUtc } = clearDayInput.window;
  const measured = clearDayWm2.map(([clock, wm2]) => {
    const start = Date.parse(`${clearDay.on}T${clock}:00.000Z`);
    return { startUtc: new Date(start).toISOString(), endUtc: new Date(start + tenMinutesMs).toISOString(), wm2 };
  });
  const { bound, likely } = clearSkyCurve(clearDayInput, startUtc, endUtc);
  const boundAt = (utc: string): number | null => bound.reduce<IrradianceSample | null>((best, one) => (best && Math.abs(Date.parse(best.atUtc) - Date.parse(utc)) <= Math.abs(Date.parse(one.atUtc) - Date.parse(utc)) ? best : one), null)?.wm2 ?? null;
  // From 9 to 15 o'clock of the place the sun stands over 15° on this day.
  const shares = measured.filter((one) => one.startUtc.slice(11, 13) >= '16' && one.startUtc.slice(11, 13) < '22').flatMap((one) => {
    const most = boundAt(one.startUtc);
    return most ? [(100 * one.wm2) / most] : [];
  });
  return {
    zone: clearDay.place.zone,
    fromUtc: startUtc,
    toUtc: endUtc,
    bound,
    likely,
    measured,
    source: clearDay.source,
    greatestPercent: Math.round(Math.max(...shares)),
    leastPercent: Math.round(Math.min(...shares)),
    models: modelRows(),
    air: climateClasses.map((name) => climateAir[name]),
  };
}
