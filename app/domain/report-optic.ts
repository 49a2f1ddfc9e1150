import type { SceneOptic, SceneOpticKind } from './scene.ts';
import { opticMaterials, opticSchema, sceneOpticKinds } from './scene.ts';

/**
 * What a reporter can be asked about an optic without tools beyond a tape: only the sizes that matter for its kind. The
 * answers become the first version of the measured scene.
 */
export const reportDimensions = ['diameterMm', 'widthMm', 'heightMm', 'radiusOfCurvatureM', 'focalLengthMm', 'centreBowMm', 'liquidDepthMm'] as const;
export type ReportDimension = (typeof reportDimensions)[number];

interface DimensionText {
  readonly question: string;
  readonly help: string;
  readonly unit: LengthUnit;
  /** Smallest and largest value that the scene takes, in mm. */
  readonly minMm: number;
  readonly maxMm: number;
}

export const lengthUnits = ['mm', 'cm', 'm', 'in', 'ft'] as const;
export type LengthUnit = (typeof lengthUnits)[number];
/** Exact by definition (international yard and pound agreement, 1959). [mm] */
const unitMm: Record<LengthUnit, number> = { mm: 1, cm: 10, m: 1000, in: 25.4, ft: 304.8 };

export const dimensionTexts: Record<ReportDimension, DimensionText> = {
  diameterMm: { question: 'How wide across is it?', help: 'Straight across the round part.', unit: 'mm', minMm: 1, maxMm: 10_000 },
  widthMm: { question: 'How wide is it?', help: 'From side to side.', unit: 'mm', minMm: 1, maxMm: 100_000 },
  heightMm: { question: 'How high is it?', help: 'From its lower to its upper edge.', unit: 'mm', minMm: 1, maxMm: 100_000 },
  radiusOfCurvatureM: { question: 'Radius of the curve', help: 'From a drawing, or leave it to the investigator.', unit: 'm', minMm: 1, maxMm: 500_000 },
  focalLengthMm: { question: 'Focal length, if it is written on it', help: 'Do not try it out with the sun.', unit: 'mm', minMm: 1, maxMm: 500_000 },
  centreBowMm: { question: 'How far does the middle bow in or out?', help: 'Against a straight edge laid across it.', unit: 'mm', minMm: 0.1, maxMm: 200 },
  liquidDepthMm: { question: 'How deep is the water in it?', help: 'From the bottom to the surface.', unit: 'mm', minMm: 1, maxMm: 5_000 },
};

export const dimensionsOfKind: Record<SceneOpticKind, readonly ReportDimension[]> = {
  'curved-mirror': ['diameterMm', 'focalLengthMm'],
  'glass-ball': ['diameterMm'],
  'bowl-or-vase': ['diameterMm', 'liquidDepthMm'],
  bottle: ['diameterMm', 'liquidDepthMm'],
  'window-pane': ['widthMm', 'heightMm', 'centreBowMm'],
  'curved-building-face': ['widthMm', 'radiusOfCurvatureM'],
  'metal-trim': ['widthMm', 'heightMm', 'radiusOfCurvatureM'],
  dish: ['diameterMm', 'focalLengthMm'],
  magnifier: ['diameterMm', 'focalLengthMm'],
  'flat-plastic-lens': ['widthMm', 'heightMm', 'focalLengthMm'],
  telescope: ['diameterMm', 'focalLengthMm'],
  'water-on-dome': ['diameterMm', 'liquidDepthMm'],
  'dont-know': [],
};

/** Kinds whose material the reporter can tell apart by looking. */
export const kindsWithMaterial: readonly SceneOpticKind[] = ['glass-ball', 'bowl-or-vase', 'magnifier', 'flat-plastic-lens'];
export const reportMaterials = [
  { value: 'crown-glass', label: 'Glass' },
  { value: 'acrylic', label: 'Clear plastic' },
  { value: 'unknown', label: "Don't know" },
] as const;

/** Names of the form fields of one dimension. */
export const dimensionFields = (dimension: ReportDimension) => ({
  value: `optic-${dimension}`,
  plusMinus: `optic-${dimension}-plus-minus`,
  unit: `optic-${dimension}-unit`,
  method: `optic-${dimension}-method`,
});

/** Digits with one decimal sign, point or comma; null when it is something else, or could be a thousands sign. */
export function readNumber(text: string): number | null {
  const plain = text.trim().replace('−', '-');
  if (!/^-?\d+(?:[.,]\d+)?$/u.test(plain) || /^-?\d{1,3},\d{3}$/u.test(plain)) return null;
  return Number(plain.replace(',', '.'));
}

type Errors = Record<string, string[]>;
type Typed = Readonly<Record<string, string>>;

function readDimension(dimension: ReportDimension, typed: Typed, errors: Errors) {
  const names = dimensionFields(dimension);
  const text = dimensionTexts[dimension];
  const method = typed[names.method] ?? '';
  const value = (typed[names.value] ?? '').trim();
  if (method === 'dont-know' || value === '') return undefined;
  const unit = lengthUnits.find((known) => known === typed[names.unit]) ?? text.unit;
  const number = readNumber(value);
  const valueMm = number === null ? null : number * unitMm[unit];
  if (valueMm === null) {
    errors[names.value] = ['Write one number, such as 150 or 12.5, without a sign for thousands, or choose Don\'t know.'];
    return undefined;
  }
  if (valueMm < text.minMm || valueMm > text.maxMm) {
    const perUnit = unitMm[unit];
    errors[names.value] = [`This must lie between ${text.minMm / perUnit} and ${text.maxMm / perUnit} ${unit}. Check the unit.`];
    return undefined;
  }
  const plusMinusText = (typed[names.plusMinus] ?? '').trim();
  const plusMinus = plusMinusText === '' ? null : readNumber(plusMinusText);
  if (plusMinusText !== '' && (plusMinus === null || plusMinus < 0 || plusMinus * unitMm[unit] > text.maxMm)) {
    errors[names.plusMinus] = ['Write how far off it may be as one number in the same unit, such as 5, or leave it empty.'];
    return undefined;
  }
  const inScene = dimension === 'radiusOfCurvatureM' ? 1000 : 1;
  return {
    value: valueMm / inScene,
    ...(plusMinus === null ? {} : { plusMinus: (plusMinus * unitMm[unit]) / inScene }),
    method: method === 'measured' || method === 'estimated' ? method : ('reported' as const),
  };
}

/** The optic as reported. Sizes that do not belong to the chosen kind are ignored, even when they were filled in before. */
export function readReportedOptic(typed: Typed): { optic: SceneOptic; errors: Errors } {
  const errors: Errors = {};
  const kind = sceneOpticKinds.find((known) => known === typed['opticKind']) ?? 'dont-know';
  const sizes = Object.fromEntries(dimensionsOfKind[kind].map((dimension) => [dimension, readDimension(dimension, typed, errors)]));
  const material = kindsWithMaterial.includes(kind) ? opticMaterials.find((known) => known === typed['opticMaterial']) : undefined;
  const movedSince = typed['opticMoved'] === 'yes' || typed['opticMoved'] === 'no' ? typed['opticMoved'] : 'dont-know';
  return { optic: opticSchema.parse({ kind, ...sizes, material, movedSince }), errors };
}
