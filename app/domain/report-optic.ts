import type { UnitSystem } from './lengths.ts';
import { lengthUnits, unitMm } from './lengths.ts';
import type { DimensionQuantity, ReportDimension } from './report-optic-sizes.ts';
import { dimensionFields, dimensionsOf, dimensionTexts, kindsByFacing, kindsThatLie, kindsWithCoating, kindsWithFaces, kindsWithMaterial, kindsWithPrint } from './report-optic-sizes.ts';
import { lineOnGround } from './ground.ts';
import { plainText } from './incident.ts';
import type { Measured, SceneOnMap, SceneOptic, SceneOpticKind } from './scene.ts';
import { opticMaterials, opticSchema, sceneOpticKinds } from './scene.ts';

/** Digits with one decimal sign, point or comma; null when it is something else, or could be a thousands sign. */
export function readNumber(text: string): number | null {
  const plain = text.trim().replace('−', '-');
  if (!/^-?\d+(?:[.,]\d+)?$/u.test(plain) || /^-?\d{1,3},\d{3}$/u.test(plain)) return null;
  return Number(plain.replace(',', '.'));
}

/** Units that a value may be typed in, and how each becomes the stored one: value × times + plus. */
interface Conversion {
  readonly times: number;
  readonly plus: number;
}
const lengthConversions: Record<string, Conversion> = Object.fromEntries(lengthUnits.map((unit) => [unit, { times: unitMm[unit], plus: 0 }]));
const conversions = {
  length: lengthConversions,
  temperature: { '°C': { times: 1, plus: 0 }, '°F': { times: 5 / 9, plus: -160 / 9 } },
  // Conventional inch of mercury, 3 386.389 Pa (NIST Special Publication 811, 2008, appendix B.8).
  pressure: { hPa: { times: 1, plus: 0 }, inHg: { times: 33.863_89, plus: 0 } },
} as const satisfies Record<DimensionQuantity, Record<string, Conversion>>;

export const unitsOf = (quantity: DimensionQuantity): readonly string[] => Object.keys(conversions[quantity]);

const usUnit: Record<string, string> = { mm: 'in', cm: 'in', m: 'ft', '°C': '°F', hPa: 'inHg' };
/** The unit that a box starts with. */
export const firstUnit = (dimension: ReportDimension, units: UnitSystem): string => {
  const { unit } = dimensionTexts[dimension];
  return units === 'us' ? (usUnit[unit] ?? unit) : unit;
};

type Errors = Record<string, string[]>;
type Typed = Readonly<Record<string, string>>;

const shown = (value: number) => String(Number(value.toPrecision(3)));

function readDimension(kind: SceneOpticKind, dimension: ReportDimension, typed: Typed, errors: Errors): Measured | undefined {
  const names = dimensionFields(kind, dimension);
  const text = dimensionTexts[dimension];
  const method = typed[names.method] ?? '';
  const value = (typed[names.value] ?? '').trim();
  if (method === 'dont-know' || value === '') return undefined;
  const known: Record<string, Conversion> = conversions[text.quantity];
  const unit = typed[names.unit] ?? '';
  const conversion = known[unit] ?? known[text.unit] ?? { times: 1, plus: 0 };
  const unitShown = known[unit] ? unit : text.unit;
  const number = readNumber(value);
  if (number === null) {
    errors[names.value] = ['Write one number, such as 150 or 12.5, without a sign for thousands, or choose Don\'t know.'];
    return undefined;
  }
  const stored = number * conversion.times + conversion.plus;
  if (stored < text.min || stored > text.max) {
    const inUnit = (limit: number) => shown((limit - conversion.plus) / conversion.times);
    errors[names.value] = [`This must lie between ${inUnit(text.min)} and ${inUnit(text.max)} ${unitShown}. Check the unit.`];
    return undefined;
  }
  const plusMinusText = (typed[names.plusMinus] ?? '').trim();
  const plusMinus = plusMinusText === '' ? null : readNumber(plusMinusText);
  if (plusMinusText !== '' && (plusMinus === null || plusMinus < 0 || plusMinus * conversion.times > text.max)) {
    errors[names.plusMinus] = ['Write how far off it may be as one number in the same unit, such as 5, or leave it empty.'];
    return undefined;
  }
  const inScene = dimension === 'radiusOfCurvatureM' ? 1000 : 1;
  const tidy = (quantity: number) => Number((quantity / inScene).toPrecision(10));
  return {
    value: tidy(stored),
    ...(plusMinus === null ? {} : { plusMinus: tidy(plusMinus * conversion.times) }),
    method: method === 'measured' || method === 'estimated' || method === 'photo' ? method : 'reported',
  };
}

/** The optic as reported. Sizes that do not belong to the chosen kind are ignored, even when they were filled in before. */
export function readReportedOptic(typed: Typed, walls: SceneOnMap['walls'] = []): { optic: SceneOptic; errors: Errors } {
  const errors: Errors = {};
  const kind = sceneOpticKinds.find((known) => known === typed['opticKind']) ?? 'dont-know';
  const dimensions = dimensionsOf(kind);
  const sizes: Partial<Record<ReportDimension, Measured | undefined>> = Object.fromEntries(dimensions.map((dimension) => [dimension, readDimension(kind, dimension, typed, errors)]));
  const shownInPhotos = dimensions.filter((dimension) => typed[dimensionFields(kind, dimension).method] === 'photo');
  const movedSince = typed['opticMoved'] === 'yes' || typed['opticMoved'] === 'no' ? typed['opticMoved'] : 'dont-know';
  const optic = opticSchema.parse({
    kind,
    ...sizes,
    ...workedOut(kind, sizes),
    ...readFacing(kind, typed, walls, errors),
    ...readLook(kind, typed, errors),
    ...(shownInPhotos.length > 0 ? { shownInPhotos } : {}),
    movedSince,
  });
  return { optic, errors };
}

/** Material, coating, face to the sun and print, each only for kinds whose model uses it. */
function readLook(kind: SceneOpticKind, typed: Typed, errors: Errors): Partial<SceneOptic> {
  const material = kindsWithMaterial.includes(kind) ? opticMaterials.find((known) => known === typed['opticMaterial']) : undefined;
  const coating = kindsWithCoating.includes(kind) ? ([1, 2, 3, 4] as const).find((known) => String(known) === typed['opticCoating']) : undefined;
  const face = kindsWithFaces.includes(kind) ? (['curved', 'flat'] as const).find((known) => known === typed['opticFace']) : undefined;
  const printed = kindsWithPrint.includes(kind) ? plainText(80).safeParse(typed['opticPrinted'] ?? '') : null;
  if (printed && !printed.success) errors['opticPrinted'] = ['Keep this under 80 characters.'];
  return {
    ...(material ? { material } : {}),
    ...(coating ? { coatingSurface: coating } : {}),
    ...(face ? { faceToSun: face } : {}),
    ...(printed?.success && printed.data !== '' ? { printed: printed.data } : {}),
  };
}

/**
 * A straight edge laid rim to rim goes across the whole optic, so its length is the width that was asked for; a pond's
 * depth is the gap under its surface. A dish is a paraboloid: focal length = diameter² ÷ (16 × depth), by the geometry
 * of the parabola.
 */
function workedOut(kind: SceneOpticKind, sizes: Partial<Record<ReportDimension, Measured | undefined>>): Partial<SceneOptic> {
  const { sagittaMm, diameterMm, widthMm } = sizes;
  const over = kind === 'metal-trim' || kind === 'curved-building-face' ? widthMm : diameterMm;
  if (!sagittaMm || !over) return {};
  const straightedge = { sagittaOverMm: over };
  if (kind !== 'dish' || sizes.focalLengthMm) return straightedge;
  const focalMm = Number((over.value ** 2 / (16 * sagittaMm.value)).toPrecision(4));
  const rough = sagittaMm.method === 'measured' && over.method === 'measured' ? 'measured' : 'estimated';
  return focalMm >= 1 && focalMm <= 500_000 ? { ...straightedge, focalLengthMm: { value: focalMm, method: rough } } : straightedge;
}

/** Directions that a wall may face: square to its line, on either side. [°] */
export const facingsOfWall = (wall: SceneOnMap['walls'][number]): readonly [number, number] => {
  const { bearingDeg } = lineOnGround(wall.from, wall.to);
  const one = Math.round((bearingDeg + 90) % 360) % 360;
  return [one, (one + 180) % 360];
};

/** How far a bearing by a wall line is trusted, and one by eye. [°, one sigma] Our own bounds, common practice in surveying by map. */
const byLineDeg = 3;
const byEyeDeg = 20;

function readFacing(kind: SceneOpticKind, typed: Typed, walls: SceneOnMap['walls'], errors: Errors): Partial<SceneOptic> {
  const text = (typed['opticFacesDeg'] ?? '').trim();
  const tilts: Record<string, Measured> = { upright: { value: 0, plusMinus: 5, method: 'estimated' }, 'facing-up': { value: 90, plusMinus: 10, method: 'estimated' } };
  const lies: Record<string, Measured> = { upright: { value: 90, plusMinus: 5, method: 'estimated' }, lying: { value: 0, plusMinus: 5, method: 'estimated' } };
  const tilt = kindsByFacing.includes(kind) ? tilts[typed['opticTilt'] ?? ''] : kindsThatLie.includes(kind) ? lies[typed['opticLies'] ?? ''] : undefined;
  const tilted = tilt ? { faceTiltDeg: tilt } : {};
  if (!kindsByFacing.includes(kind) || text === '') return tilted;
  const valueDeg = readNumber(text);
  if (valueDeg === null || valueDeg < 0 || valueDeg > 360) {
    errors['opticFacesDeg'] = ['Write the direction in degrees from 0 to 360: north is 0, east 90, south 180, west 270. Or leave it empty.'];
    return tilted;
  }
  const byLine = walls.some((wall) => facingsOfWall(wall).some((facing) => Math.abs(facing - (valueDeg % 360)) <= 1));
  return { ...tilted, faceAzimuthDeg: byLine ? { value: valueDeg % 360, plusMinus: byLineDeg, method: 'drawing' } : { value: valueDeg % 360, plusMinus: byEyeDeg, method: 'estimated' } };
}
