import type { TargetOutcome } from '#app/physics/model/heating.ts';
import type { SkylineInput } from '#app/physics/model/input.ts';
import type { MinuteReason, MinuteVerdict } from '#app/physics/model/minutes.ts';
import type { Check, Grade } from '#app/physics/model/tests.ts';
import type { OpticKind, RefractiveMaterialName } from '#app/physics/optics/optic.ts';

/** Words of the screen for what the engine answers with ids. The engine's own sentences are shown as they are. */

export const minuteReasonWords: Record<MinuteReason, string> = {
  'sun-on-mark': 'the beam lands on the mark',
  night: 'sun below the horizon',
  'near-horizon': 'sun too near the horizon',
  'below-skyline': 'behind the skyline',
  'outside-opening': 'outside the opening',
  blocked: 'every ray stopped by frame or bars',
  'wrong-side': 'sun on the other side',
  'beam-misses': 'beam misses the mark',
  'uncertainty-straddles': 'uncertainty straddles',
  'skyline-unknown': 'skyline not known',
  'optic-unknown': 'optic not known',
  'mark-unknown': 'mark not known',
};

export const minuteVerdictWords: Record<MinuteVerdict, string> = { sunlit: 'sunlit', 'not-sunlit': 'not sunlit', 'cannot-tell': "can't tell" };

export const outcomeLabels: Record<TargetOutcome['id'], string> = {
  softening: 'Softens',
  scorch: 'Scorches',
  smoulder: 'Smoulders',
  flaming: 'Flames',
  'skin-burn': 'Skin burns',
};

export const opticKindLabels: Record<OpticKind, string> = {
  lens: 'Lens',
  sphere: 'Ball',
  cylinder: 'Round bottle or jar',
  bowl: 'Bowl, partly filled',
  'concave-mirror': 'Concave mirror',
  'polished-bowl': 'Polished bowl',
  dish: 'Dish',
  facade: 'Curved building face',
  'curved-metal': 'Curved metal',
  trough: 'Trough',
  'bowed-pane': 'Bowed pane',
  fresnel: 'Flat grooved lens',
  'ponded-dome': 'Water on a dome',
  telescope: 'Telescope',
};

export const refractiveMaterialLabels: Record<RefractiveMaterialName, string> = {
  'crown-glass': 'crown glass',
  'soda-lime-clear': 'ordinary clear glass',
  'soda-lime-low-iron': 'low-iron glass',
  acrylic: 'acrylic',
  polycarbonate: 'polycarbonate',
  water: 'water',
};

/** Names of the contradiction checks, in the order in which the light meets them. */
const checkLabels: Readonly<Record<string, string>> = {
  'sun-above-horizon': 'Sun above the horizon',
  'clears-skyline': 'Sun above the skyline',
  'through-opening': 'Sun in front of the opening',
  'clears-frame': 'Light past frame and bars',
  'working-side': 'Sun on the working side of the optic',
  'required-declination': 'Direction that the year offers',
  'focus-beside-mark': 'Focus beside the mark',
  'mark-within-depth': 'Mark within the depth of focus',
  'sun-shone': 'Sun shone',
  'flux-in-clean-air': 'Flux in the cleanest air',
  'dwell-long-enough': 'Time on one point',
  'trail-heading': 'Direction of the trail',
  'trail-time': 'Time that the trail needs',
};
export const checkLabel = (check: Pick<Check, 'id'>): string => checkLabels[check.id] ?? check.id.replaceAll('-', ' ');

export const checkAnswer = (passed: boolean | null): string => (passed === null ? 'could not be made' : passed ? 'not contradicted' : 'contradicted');

/** The grade as the heading of a run: the engine's word and nothing beyond it. */
export function gradeHeading(grade: Grade): string {
  const words: Record<Grade['word'], string> = {
    consistent: 'Consistent with focused sunlight on the mark',
    'not refuted': 'Focused sunlight on the mark is not refuted',
    'inconsistent because': 'Inconsistent with focused sunlight on the mark',
    'cannot tell because': 'Cannot tell whether focused sunlight reached the mark',
  };
  return words[grade.word];
}

/** What stands before the reasons of a grade. */
export function becauseWords(grade: Grade): string {
  if (grade.word === 'consistent') return 'All four tests support it. Consistent does not mean that it happened.';
  return grade.word === 'not refuted' ? 'Not refuted does not mean that it happened. Still open:' : 'Because:';
}

export const minutesWords = (minutes: number): string => `${minutes} ${minutes === 1 ? 'minute' : 'minutes'}`;

/** "23 minutes sunlit, 90 not, 23 can't tell". */
export function totalsWords(totals: { readonly sunlit: number; readonly notSunlit: number; readonly cannotTell: number }): string {
  return `${minutesWords(totals.sunlit)} sunlit, ${totals.notSunlit} not, ${totals.cannotTell} can't tell`;
}

const nearDeg = 15;

/** Reason of a minute, with the name of what stands in front of the sun where the skyline has one near its bearing. */
export function reasonAt(reason: MinuteReason, azimuthDeg: number | null, skyline: SkylineInput | undefined): string {
  if (reason !== 'below-skyline' || azimuthDeg === null || !skyline) return minuteReasonWords[reason];
  let nearest: { name: string; offDeg: number } | null = null;
  for (const point of skyline.points) {
    if (!point.name) continue;
    const offDeg = Math.abs(((point.azimuthDeg - azimuthDeg + 540) % 360) - 180);
    if (offDeg <= nearDeg && (nearest === null || offDeg < nearest.offDeg)) nearest = { name: point.name, offDeg };
  }
  return nearest ? `behind ${nearest.name}` : minuteReasonWords[reason];
}

/** Dotted field names of the engine's assumptions, in words. */
const assumptionFields: Readonly<Record<string, string>> = {
  'sky.pressureHpa': 'Air pressure',
  'sky.temperatureC': 'Air temperature',
  'sky.ozoneCm': 'Ozone column',
  'sky.waterCm': 'Water in the air',
  'sky.aod500': 'Haze at 500 nm',
  'sky.aod380': 'Haze at 380 nm',
  'sky.solarConstantWm2': 'Sunlight above the air',
  skyline: 'Skyline',
  occluders: 'Frame, bars and reveal',
  occluderSigmaM: 'Spread of their corners',
  'optic.slopeErrorMrad': 'Surface error',
  'optic.material': 'Material of the optic',
  'optic.centreBowM': 'Bow at the centre',
  'optic.sealedUnit': 'Sealed unit',
  opticSigmaRel: 'Spread of the optic',
  throughputSigmaRel: 'Spread of what the optic passes',
  glassSigmaRel: 'Spread of the glass in the path',
  ignitionTimeSigmaRel: 'Spread of times to ignition',
  'target.solarAbsorptance': 'Share of light absorbed',
};
export const assumptionLabel = (field: string): string => assumptionFields[field] ?? field;
