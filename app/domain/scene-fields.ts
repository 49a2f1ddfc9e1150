import type { SceneOpticKind } from './scene.ts';

/** The measured numbers of a scene, each as one row of the measurements form: value, ±, unit, method. */
export interface SceneField {
  /** Part of the scene and its key there. */
  readonly part: 'optic' | 'opening' | 'mark' | 'target';
  readonly key: string;
  readonly label: string;
  /** Unit of the stored number; empty for a ratio. */
  readonly unit: 'mm' | 'm' | '°' | '°C' | 'hPa' | '';
  readonly min: number;
  readonly max: number;
  /** A direction along the ground: which north it was taken from has to be said. */
  readonly bearing?: true;
  readonly help?: string;
}

export const fieldName = (field: SceneField): string => `${field.part}.${field.key}`;

const optic = (key: string, label: string, unit: SceneField['unit'], min: number, max: number, more: Partial<SceneField> = {}): SceneField => ({ part: 'optic', key, label, unit, min, max, ...more });
const mark = (key: string, label: string, unit: SceneField['unit'], min: number, max: number, more: Partial<SceneField> = {}): SceneField => ({ part: 'mark', key, label, unit, min, max, ...more });

/** Ranges are those of `scene.ts`, which checks them again. */
export const opticFields: readonly SceneField[] = [
  optic('diameterMm', 'Diameter', 'mm', 1, 10_000),
  optic('widthMm', 'Width', 'mm', 1, 100_000, { help: 'Chord of a curved edge or face.' }),
  optic('heightMm', 'Height', 'mm', 1, 100_000),
  optic('thicknessMm', 'Thickness', 'mm', 0.1, 1_000),
  optic('sagittaOverMm', 'Straightedge across the curve, end to end', 'mm', 1, 100_000),
  optic('sagittaMm', 'Gap under the straightedge, at its middle', 'mm', 0.01, 5_000, { help: 'With the length above it gives the radius: w² ÷ 8s + s ÷ 2.' }),
  optic('radiusOfCurvatureM', 'Radius of curvature', 'm', 0.001, 500, { help: 'Left empty, it is worked out from the straightedge.' }),
  optic('focalLengthMm', 'Focal length', 'mm', 1, 500_000, { help: 'Half the radius for a mirror. Never found by burning.' }),
  optic('centreBowMm', 'Bow at the centre of the pane', 'mm', 0.1, 200, { help: 'Straightedge across the face; note the air temperature and pressure then.' }),
  optic('bowAirTemperatureC', 'Air temperature then', '°C', -60, 60, { help: 'The bow of a pane changes with temperature, pressure and height.' }),
  optic('bowAirPressureHpa', 'Air pressure then', 'hPa', 300, 1_100),
  optic('paneWidthMm', 'Width of one pane', 'mm', 1, 20_000),
  optic('liquidDepthMm', 'Depth of the liquid', 'mm', 1, 5_000),
  optic('reflectance', 'Reflectance', '', 0, 1, { help: 'As a share, 0 to 1.' }),
  optic('faceAzimuthDeg', 'Faces', '°', 0, 360, { bearing: true, help: 'A wall line from a map, or a timed shadow, beats a compass near steel.' }),
  optic('faceTiltDeg', 'Tilt', '°', -90, 90, { help: '0 faces the horizon, 90 the zenith.' }),
  optic('heightAboveGroundM', 'Height above the ground', 'm', -50, 1_000),
];

export const openingFields: readonly SceneField[] = [
  { part: 'opening', key: 'azimuthDeg', label: 'Looks outward to', unit: '°', min: 0, max: 360, bearing: true, help: 'Leave empty when the light meets no window.' },
  { part: 'opening', key: 'distanceMm', label: 'Optic to the glass', unit: 'mm', min: 1, max: 100_000, help: 'Level, square to the glass.' },
  { part: 'opening', key: 'offsetMm', label: 'Middle of the opening, to the right', unit: 'mm', min: -100_000, max: 100_000, help: 'Of the optic, looking out; to the left is negative.' },
  { part: 'opening', key: 'widthMm', label: 'Width of the opening', unit: 'mm', min: 1, max: 100_000 },
  { part: 'opening', key: 'heightMm', label: 'Height of the opening', unit: 'mm', min: 1, max: 100_000 },
  { part: 'opening', key: 'sillMm', label: 'Lower edge above the optic', unit: 'mm', min: -100_000, max: 100_000, help: 'Below the centre of the optic is negative.' },
  { part: 'opening', key: 'revealMm', label: 'Depth of the reveal', unit: 'mm', min: 0, max: 5_000 },
];

export const markFields: readonly SceneField[] = [
  mark('bearingDeg', 'Bearing, optic to mark', '°', 0, 360, { bearing: true }),
  mark('elevationDeg', 'Elevation, optic to mark', '°', -90, 90, { help: 'Below the optic is negative.' }),
  mark('distanceMm', 'Slant distance', 'mm', 1, 500_000, { help: 'Centre of the optic to centre of the mark.' }),
  mark('lengthMm', 'Length of the mark', 'mm', 0.1, 100_000),
  mark('widthMm', 'Width of the mark', 'mm', 0.1, 100_000),
  mark('depthMm', 'Depth of the mark', 'mm', 0.01, 1_000),
  mark('trailHeadingDeg', 'The trail runs to', '°', 0, 360, { bearing: true }),
  mark('surfaceAzimuthDeg', 'Marked surface faces', '°', 0, 360, { bearing: true }),
  mark('surfaceElevationDeg', 'Marked surface looks up by', '°', -90, 90, { help: '90 for a level roof or table, 0 for a wall.' }),
];

export const targetFields: readonly SceneField[] = [{ part: 'target', key: 'thicknessMm', label: 'Thickness of the target', unit: 'mm', min: 0.01, max: 1_000 }];

export const allSceneFields: readonly SceneField[] = [...opticFields, ...openingFields, ...markFields, ...targetFields];

/** Sizes that decide the focus of each kind; the others stand folded below them. */
const keysOfKind: Record<SceneOpticKind, readonly string[]> = {
  'curved-mirror': ['diameterMm', 'sagittaOverMm', 'sagittaMm', 'radiusOfCurvatureM', 'focalLengthMm', 'faceAzimuthDeg', 'faceTiltDeg'],
  'glass-ball': ['diameterMm'],
  'bowl-or-vase': ['diameterMm', 'heightMm', 'liquidDepthMm'],
  bottle: ['diameterMm', 'heightMm', 'liquidDepthMm', 'faceAzimuthDeg', 'faceTiltDeg'],
  'window-pane': ['widthMm', 'heightMm', 'centreBowMm', 'bowAirTemperatureC', 'bowAirPressureHpa', 'faceAzimuthDeg', 'faceTiltDeg'],
  'curved-building-face': ['widthMm', 'heightMm', 'sagittaOverMm', 'sagittaMm', 'radiusOfCurvatureM', 'paneWidthMm', 'faceAzimuthDeg', 'faceTiltDeg'],
  'metal-trim': ['widthMm', 'heightMm', 'sagittaOverMm', 'sagittaMm', 'radiusOfCurvatureM', 'reflectance', 'faceAzimuthDeg', 'faceTiltDeg'],
  dish: ['diameterMm', 'focalLengthMm', 'faceAzimuthDeg', 'faceTiltDeg'],
  magnifier: ['diameterMm', 'focalLengthMm', 'thicknessMm', 'faceAzimuthDeg', 'faceTiltDeg'],
  'flat-plastic-lens': ['widthMm', 'heightMm', 'focalLengthMm', 'faceAzimuthDeg', 'faceTiltDeg'],
  telescope: ['diameterMm', 'focalLengthMm', 'faceAzimuthDeg', 'faceTiltDeg'],
  'water-on-dome': ['diameterMm', 'radiusOfCurvatureM', 'liquidDepthMm'],
  'dont-know': [],
};

export function opticFieldsFor(kind: SceneOpticKind): { readonly first: readonly SceneField[]; readonly others: readonly SceneField[] } {
  const keys = keysOfKind[kind];
  return { first: opticFields.filter((field) => keys.includes(field.key)), others: opticFields.filter((field) => !keys.includes(field.key)) };
}
