import { classCentreBowM, classLensFocalRatio, classMirrorRadiusM } from './optic-class-values.ts';
import type { SceneOpticKind } from './scene.ts';
import { sceneOpticKinds } from './scene.ts';

/**
 * What a reporter can be asked about an optic without tools beyond a tape: only the sizes that the model of its kind
 * uses. The answers become the first version of the measured scene.
 */
export const reportDimensions = [
  'diameterMm', 'widthMm', 'heightMm', 'sagittaMm', 'radiusOfCurvatureM', 'focalLengthMm', 'centreBowMm', 'bowAirTemperatureC', 'bowAirPressureHpa', 'paneWidthMm', 'liquidDepthMm',
] as const;
export type ReportDimension = (typeof reportDimensions)[number];

export type DimensionQuantity = 'length' | 'temperature' | 'pressure';

interface DimensionText {
  readonly quantity: DimensionQuantity;
  /** Unit of the box, unless the person reads US units. */
  readonly unit: string;
  /** Smallest and largest value that the scene takes: lengths in mm, else in the unit above. */
  readonly min: number;
  readonly max: number;
}
const length = (unit: string, min: number, max: number): DimensionText => ({ quantity: 'length', unit, min, max });

export const dimensionTexts: Record<ReportDimension, DimensionText> = {
  diameterMm: length('mm', 1, 10_000),
  widthMm: length('mm', 1, 100_000),
  heightMm: length('mm', 1, 100_000),
  sagittaMm: length('mm', 0.01, 5_000),
  radiusOfCurvatureM: length('m', 1, 500_000),
  focalLengthMm: length('mm', 1, 500_000),
  centreBowMm: length('mm', 0.1, 200),
  bowAirTemperatureC: { quantity: 'temperature', unit: '°C', min: -60, max: 60 },
  bowAirPressureHpa: { quantity: 'pressure', unit: 'hPa', min: 300, max: 1_100 },
  paneWidthMm: length('mm', 1, 20_000),
  liquidDepthMm: length('mm', 1, 5_000),
};

/** Names of the form fields of one size; each kind has its own, so that a change of mind loses nothing. */
export const dimensionFields = (kind: SceneOpticKind, dimension: ReportDimension) => {
  const value = `optic-${kind}-${dimension}`;
  return { value, plusMinus: `${value}-plus-minus`, unit: `${value}-unit`, method: `${value}-method` };
};

export interface SizeQuestion {
  readonly dimension: ReportDimension;
  readonly question: string;
  /** What to measure, and how. */
  readonly help: string;
}
const ask = (dimension: ReportDimension, question: string, help: string): SizeQuestion => ({ dimension, question, help });

const straightEdge = 'Lay a straight edge across the hollow, rim to rim. Measure the gap under it at the middle. Shade it first: cover it or turn your back to the sun.';
const printedFocal = 'Only if it is printed on it or in its papers. Never find it with the sun.';

/** Letters of the sketch follow this order: A, B, C and so on. */
export const sizeQuestions: Record<SceneOpticKind, readonly SizeQuestion[]> = {
  'curved-mirror': [
    ask('diameterMm', 'How wide across is the glass?', 'Straight across, rim to rim, without the frame.'),
    ask('sagittaMm', 'How deep is the hollow?', straightEdge),
  ],
  'glass-ball': [ask('diameterMm', 'How wide across is it?', 'Set it between two books and measure the gap.')],
  'bowl-or-vase': [
    ask('diameterMm', 'How wide across is the round part?', 'At its widest.'),
    ask('liquidDepthMm', 'How deep was the water then?', 'From the bottom to the surface, as it was. Do not empty it or top it up: the fill level moves the bright spot a lot.'),
  ],
  bottle: [
    ask('diameterMm', 'How wide across is it?', 'At the round part, where the light went through.'),
    ask('heightMm', 'How long is the part with liquid in it?', 'From the bottom to the surface, as it was.'),
  ],
  'window-pane': [
    ask('widthMm', 'How wide is the pane?', 'The glass you see, from frame to frame.'),
    ask('heightMm', 'How high is the pane?', 'The glass you see, from frame to frame.'),
    ask('centreBowMm', 'How far does the middle bow?', 'Lay a straight edge across the face. Measure the gap at the middle. Only where you can reach it from the ground.'),
    ask('bowAirTemperatureC', 'How warm was the air when you measured the bow?', 'A pane bows more in the cold. A phone weather page for the place will do.'),
    ask('bowAirPressureHpa', 'What was the air pressure then?', 'From a weather page for the place. It moves the bow too.'),
  ],
  'curved-building-face': [
    ask('widthMm', 'How wide is the curved face?', 'In a straight line from one end of the curve to the other. A map will do.'),
    ask('heightMm', 'How high is it?', 'From its lower to its upper edge. Count floors if you must, and say it is a guess.'),
    ask('radiusOfCurvatureM', 'Radius of the curve', 'From a drawing. Leave it to the investigator if you have none.'),
    ask('paneWidthMm', 'How wide is one pane?', 'If the curve is made of flat panes.'),
  ],
  'metal-trim': [
    ask('widthMm', 'How wide is it across the curve?', 'In a straight line, from edge to edge.'),
    ask('heightMm', 'How long is it?', 'Along the straight way.'),
    ask('sagittaMm', 'How deep is the curve?', 'Lay a straight edge across the curve, edge to edge. Measure the gap under it at the middle. Hot metal burns: wait until it is in the shade.'),
  ],
  dish: [
    ask('diameterMm', 'How wide across is it?', 'Rim to rim.'),
    ask('sagittaMm', 'How deep is it?', 'Cover it first. Lay a straight edge rim to rim and measure down to the middle.'),
  ],
  magnifier: [
    ask('diameterMm', 'How wide across is the lens?', 'The clear part, without the frame.'),
    ask('focalLengthMm', 'Focal length', printedFocal),
  ],
  'flat-plastic-lens': [
    ask('widthMm', 'How wide is it?', 'The grooved part, from side to side.'),
    ask('heightMm', 'How high is it?', 'The grooved part, from its lower to its upper edge.'),
    ask('focalLengthMm', 'Focal length', printedFocal),
  ],
  telescope: [
    ask('diameterMm', 'How wide is the front lens or mirror?', 'It is often printed as D, or as the second figure of 8 × 40. Do not look through it.'),
    ask('focalLengthMm', 'Focal length', 'It is often printed as F or f. Never find it with the sun.'),
  ],
  'water-on-dome': [
    ask('diameterMm', 'How wide is the water?', 'Across its middle, from edge to edge. Do not step on a rooflight or lean over it.'),
    ask('sagittaMm', 'How deep is the water at its deepest?', 'With a stick, from a safe place. With the width it gives the curve.'),
  ],
  'dont-know': [],
};

export const dimensionsOf = (kind: SceneOpticKind): readonly ReportDimension[] => sizeQuestions[kind].map(({ dimension }) => dimension);

/** All fields of sizes, of every kind. */
export const sizeFieldNames: readonly string[] = sceneOpticKinds.flatMap((kind) => dimensionsOf(kind).flatMap((dimension) => Object.values(dimensionFields(kind, dimension))));

/** Kinds whose material the reporter can tell apart by looking. */
export const kindsWithMaterial: readonly SceneOpticKind[] = ['glass-ball', 'magnifier'];
export const reportMaterials = [
  { value: 'crown-glass', label: 'Glass' },
  { value: 'acrylic', label: 'Clear plastic' },
  { value: 'unknown', label: "Don't know" },
] as const;
/** Kinds on which something telling is often printed. */
export const kindsWithPrint: readonly SceneOpticKind[] = ['curved-mirror', 'magnifier', 'telescope'];
export const kindsWithFaces: readonly SceneOpticKind[] = ['magnifier'];
export const kindsWithCoating: readonly SceneOpticKind[] = ['window-pane'];
/** Kinds that reflect or gather only what comes from the side that they face. */
export const kindsByFacing: readonly SceneOpticKind[] = ['curved-mirror', 'window-pane', 'curved-building-face', 'metal-trim', 'dish', 'magnifier', 'flat-plastic-lens', 'telescope'];
export const kindsThatLie: readonly SceneOpticKind[] = ['bottle'];

const fromSource = (value: string, source: string) => `If nobody knows, a run takes ${value}: ${source}; unverified.`;
const noRunWithout = (what: string) => `If nobody knows, no run can be made before ${what} is measured.`;

/** What a run does while the sizes of a kind are unknown; the values are those that `scene-optic.ts` falls back on. */
export const ifUnknown: Record<SceneOpticKind, string> = {
  'curved-mirror': fromSource(`a radius of ${classMirrorRadiusM.value} m`, classMirrorRadiusM.source),
  'glass-ball': noRunWithout('the width'),
  'bowl-or-vase': noRunWithout('the width and the depth of the water'),
  bottle: noRunWithout('the width'),
  'window-pane': fromSource(`a bow of ${classCentreBowM.value * 1000} mm`, classCentreBowM.source),
  'curved-building-face': noRunWithout('the radius'),
  'metal-trim': noRunWithout('the curve'),
  dish: noRunWithout('the depth'),
  magnifier: fromSource(`a focal length of ${classLensFocalRatio.value} times the width`, classLensFocalRatio.source),
  'flat-plastic-lens': noRunWithout('the focal length'),
  telescope: noRunWithout('the focal length'),
  'water-on-dome': noRunWithout('the width and depth of the water'),
  'dont-know': '',
};
