import type { DirectBeam } from '#app/physics/sky/direct-beam.ts';
import { lowestClearSkyDeg } from '#app/physics/sky/clear-sky.ts';
import type { Setting } from './setting.ts';
import { lightReaches, type JudgedMinute } from './window.ts';

/** What a reader must know before using the numbers. */
export function warningsOf(
  setting: Setting, judged: readonly JudgedMinute[], best: JudgedMinute | null, light: DirectBeam | null,
): readonly string[] {
  const list: string[] = [];
  const { model, mark, reach, input } = setting;
  if (judged.length > 14 * 1440) list.push('The window is longer than 14 days; narrow it if anything allows.');
  if (best === null) list.push('The sun does not rise in this window.');
  if (best !== null && model !== null && !lightReaches(best)) {
    list.push('Light does not reach the optic in this window: focus and heating are computed for an unobstructed sun.');
  }
  if (best !== null && best.sun.apparentElevationDeg < lowestClearSkyDeg) {
    list.push('Below 3° no clear-sky figure holds: flux is not stated and nothing is refuted on it.');
  }
  if (light !== null && light.measuredWm2 !== null && light.boundWm2 !== null && light.measuredWm2 > light.boundWm2) {
    list.push('The measured irradiance exceeds what the cleanest air can pass: check the record’s time stamps and units.');
  }
  if (model?.focusKind === 'line') {
    list.push('The focus is a line: its length carries no time, and light from other parts of the optic can lie on the mark on days beside those of the calendar, which goes by the middle of the optic.');
  }
  if (model?.moves === true) list.push('The optic is one that people move; no calendar can be given.');
  if (model !== null && model.focalLengthM < 0) list.push('As described the optic spreads sunlight instead of focusing it.');
  if (reach?.belowThreshold === true) list.push('Even in the cleanest air the flux on 5 mm stays under the lowest that can harm the target; the reach along the beam is then where a quarter of the greatest flux falls.');
  if (input.skyline === undefined) list.push('No skyline was recorded: a “sunlit” minute holds only if nothing stood in front of the sun.');
  if (mark !== null && input.mark !== undefined && Math.max(input.mark.bearingSigmaDeg, input.mark.elevationSigmaDeg) > 5) {
    list.push('The survey of the mark is rough: bearing or elevation is known to 5° at best.');
  }
  return list;
}
