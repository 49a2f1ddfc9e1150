import { plainNumber } from './plain-number.ts';
import { targetMaterialLabels, targetMaterials } from './scene.ts';

interface Band {
  readonly low: number;
  readonly mid: number;
  readonly high: number;
}
/** Surface temperature under steady sun, as its figure shows it on screen and in print. */
export interface TemperatureCurveData {
  readonly points: readonly { readonly timeS: number; readonly celsius: Band }[];
  /** Published ranges of the material, hatched; unverified ones say so. */
  readonly published?: readonly { readonly label: string; readonly fromC: number; readonly toC: number; readonly verified: boolean }[];
  /** What the engine says of each way to respond, with seconds of steady sun on one point. */
  readonly outcomes?: readonly { readonly label: string; readonly answer: string; readonly timeS: Band | null }[];
}

/** "curtain fabric", or the engine's own id where the register has no word for it. */
export function materialWords(id: string): string {
  const known = targetMaterials.find((material) => material === id);
  return (known ? targetMaterialLabels[known] : id).toLowerCase();
}

export const temperatureNote = 'Steady sun on one point, 5 mm disc on the hot spot; band from low to high. Small spots lose heat fast, so the curve is an estimate, not a measurement.';

export function secondsWords(value: number): string {
  if (value >= 5400) return `${plainNumber(value / 3600)} h`;
  return value >= 120 ? `${plainNumber(value / 60)} min` : `${plainNumber(value)} s`;
}

export function temperatureSentence({ points }: Pick<TemperatureCurveData, 'points'>): string {
  const last = points.at(-1);
  if (!last) return 'No temperature was computed.';
  return `After ${secondsWords(last.timeS)} of steady sun ${plainNumber(last.celsius.mid)} °C, ${plainNumber(last.celsius.low)} to ${plainNumber(last.celsius.high)}.`;
}

/** At most some sixteen moments of the curve, the last among them: after, middle, 5 to 95. */
export function temperatureRows({ points }: Pick<TemperatureCurveData, 'points'>): string[][] {
  const every = Math.max(1, Math.ceil(points.length / 16));
  return points.filter((_, index) => index % every === 0 || index === points.length - 1).map((point) => [secondsWords(point.timeS), String(Math.round(point.celsius.mid)), `${Math.round(point.celsius.low)} to ${Math.round(point.celsius.high)}`]);
}
