import { z } from 'zod';

/**
 * The scene as people measured it: optic, opening, mark, target, skyline and air. Lengths in mm or m as the field says,
 * each with a one-sigma uncertainty and a method. Everything may be missing: an unknown stays unknown, and
 * `reconstruction-input.ts` states what it assumed instead.
 */
export const measureMethods = ['measured', 'maker', 'drawing', 'photo', 'estimated', 'assumed', 'reported'] as const;
export type MeasureMethod = (typeof measureMethods)[number];
export const measureMethodLabels: Record<MeasureMethod, string> = {
  measured: 'Measured',
  maker: 'From the maker',
  drawing: 'From a drawing or map',
  photo: 'From a photo',
  estimated: 'Estimated',
  assumed: 'Assumed',
  reported: 'As reported',
};

/** A bearing as the instrument gave it, before it was turned to true north. */
const readingSchema = z.object({
  north: z.enum(['magnetic', 'grid', 'shadow']),
  valueDeg: z.number().min(0).max(360),
  /** What was added, east positive. */
  turnDeg: z.number().min(-180).max(180),
  source: z.string().max(160),
});

/** A measured number with its ±, how it was got, by whom and on which day. */
export const measured = (min: number, max: number) =>
  z.object({
    value: z.number().min(min).max(max),
    plusMinus: z.number().min(0).max(max - min).optional(),
    method: z.enum(measureMethods).default('reported'),
    by: z.string().max(120).optional(),
    on: z.iso.date().optional(),
    reading: readingSchema.optional(),
  });
export type Measured = z.infer<ReturnType<typeof measured>>;

export const sceneOpticKinds = [
  'curved-mirror',
  'glass-ball',
  'bowl-or-vase',
  'bottle',
  'window-pane',
  'curved-building-face',
  'metal-trim',
  'dish',
  'magnifier',
  'flat-plastic-lens',
  'telescope',
  'water-on-dome',
  'dont-know',
] as const;
export type SceneOpticKind = (typeof sceneOpticKinds)[number];
export const sceneOpticLabels: Record<SceneOpticKind, string> = {
  'curved-mirror': 'Curved mirror',
  'glass-ball': 'Glass or plastic ball',
  'bowl-or-vase': 'Bowl or vase',
  bottle: 'Bottle or jar',
  'window-pane': 'Window pane',
  'curved-building-face': 'Curved building face',
  'metal-trim': 'Metal trim or parapet',
  dish: 'Dish or cooker',
  magnifier: 'Magnifier or lens',
  'flat-plastic-lens': 'Flat plastic lens',
  telescope: 'Telescope or binoculars',
  'water-on-dome': 'Water on a dome or rooflight',
  'dont-know': "Don't know",
};

export const opticMaterials = ['crown-glass', 'soda-lime-clear', 'soda-lime-low-iron', 'acrylic', 'polycarbonate', 'water', 'unknown'] as const;

export const opticSchema = z.object({
  kind: z.enum(sceneOpticKinds),
  diameterMm: measured(1, 10_000).optional(),
  widthMm: measured(1, 100_000).optional(),
  heightMm: measured(1, 100_000).optional(),
  thicknessMm: measured(0.1, 1_000).optional(),
  radiusOfCurvatureM: measured(0.001, 500).optional(),
  focalLengthMm: measured(1, 500_000).optional(),
  sagittaMm: measured(0.01, 5_000).optional(),
  sagittaOverMm: measured(1, 100_000).optional(),
  centreBowMm: measured(0.1, 200).optional(),
  bowAirTemperatureC: measured(-60, 60).optional(),
  bowAirPressureHpa: measured(300, 1_100).optional(),
  paneWidthMm: measured(1, 20_000).optional(),
  liquidDepthMm: measured(1, 5_000).optional(),
  material: z.enum(opticMaterials).optional(),
  reflectance: measured(0, 1).optional(),
  faceAzimuthDeg: measured(0, 360).optional(),
  faceTiltDeg: measured(-90, 90).optional(),
  generators: z.enum(['vertical', 'horizontal']).optional(),
  coatingSurface: z.union([z.literal(1), z.literal(2), z.literal(3), z.literal(4)]).optional(),
  faceToSun: z.enum(['curved', 'flat']).optional(),
  heightAboveGroundM: measured(-50, 1_000).optional(),
  movedSince: z.enum(['yes', 'no', 'dont-know']).default('dont-know'),
  /** Cracks, coating, dirt, in the words of who looked. */
  condition: z.string().max(200).optional(),
  /** What is printed on it, such as a magnification: a clue, never a measurement. */
  printed: z.string().max(80).optional(),
  /** Sizes that the reporter says can be read off a photo, by their names. */
  shownInPhotos: z.array(z.string().max(40)).max(20).optional(),
});
export type SceneOptic = z.infer<typeof opticSchema>;

export const blindStates = ['open', 'part', 'closed', 'unknown'] as const;

export const openingSchema = z.object({
  azimuthDeg: measured(0, 360),
  /** Level, from the centre of the optic to the glass, square to it. */
  distanceMm: measured(1, 100_000).optional(),
  /** Middle of the opening right of the optic, as one looks out; left is negative. */
  offsetMm: measured(-100_000, 100_000).optional(),
  widthMm: measured(1, 100_000).optional(),
  heightMm: measured(1, 100_000).optional(),
  /** Lower edge above the centre of the optic; below is negative. */
  sillMm: measured(-100_000, 100_000).optional(),
  revealMm: measured(0, 5_000).optional(),
  blind: z.enum(blindStates).optional(),
  insectScreen: z.enum(['yes', 'no', 'dont-know']).optional(),
  halfWidthDeg: z.number().min(1).max(90).default(85),
  lowestElevationDeg: z.number().min(-90).max(90).optional(),
  highestElevationDeg: z.number().min(-90).max(90).optional(),
  glass: z.enum(['none', 'single-clear-3', 'single-clear-6', 'double-clear', 'double-low-e', 'vehicle-glass', 'unknown']).default('unknown'),
});
export type SceneOpening = z.infer<typeof openingSchema>;

export const markShapes = ['spot', 'single-trail', 'several-trails', 'band', 'arc', 'area'] as const;
export const damages = ['discolour', 'soften-or-warp', 'melt', 'char', 'burn-through', 'ignite'] as const;

export const markSchema = z.object({
  bearingDeg: measured(0, 360).optional(),
  elevationDeg: measured(-90, 90).optional(),
  distanceMm: measured(1, 500_000).optional(),
  lengthMm: measured(0.1, 100_000).optional(),
  widthMm: measured(0.1, 100_000).optional(),
  depthMm: measured(0.01, 1_000).optional(),
  shape: z.enum(markShapes).optional(),
  trailHeadingDeg: measured(0, 360).optional(),
  damage: z.enum(damages).optional(),
  surfaceAzimuthDeg: measured(0, 360).optional(),
  surfaceElevationDeg: measured(-90, 90).optional(),
});
export type SceneMark = z.infer<typeof markSchema>;

export const targetMaterials = [
  'curtain-fabric',
  'upholstery-foam',
  'paper-or-board',
  'timber',
  'mulch-or-dry-grass',
  'single-ply-membrane',
  'bitumen-sheet',
  'vinyl-siding',
  'artificial-turf',
  'acrylic',
  'other-plastic',
  'painted-metal',
  'vehicle-trim',
  'wool-felt',
  'tarpaulin',
  'skin',
  'dont-know',
] as const;
export type TargetMaterial = (typeof targetMaterials)[number];
export const targetMaterialLabels: Record<TargetMaterial, string> = {
  'curtain-fabric': 'Curtain fabric',
  'upholstery-foam': 'Upholstery foam',
  'paper-or-board': 'Paper or board',
  timber: 'Timber',
  'mulch-or-dry-grass': 'Mulch or dry grass',
  'single-ply-membrane': 'Single-ply roof membrane',
  'bitumen-sheet': 'Bitumen sheet',
  'vinyl-siding': 'Vinyl siding',
  'artificial-turf': 'Artificial turf',
  acrylic: 'Acrylic',
  'other-plastic': 'Other plastic',
  'painted-metal': 'Painted metal',
  'vehicle-trim': 'Vehicle trim',
  'wool-felt': 'Wool felt',
  tarpaulin: 'Tarpaulin',
  skin: 'Skin',
  'dont-know': "Don't know",
};

export const moistures = ['dry', 'damp', 'wet', 'dont-know'] as const;

export const targetSchema = z.object({
  material: z.enum(targetMaterials).default('dont-know'),
  colour: z.string().max(80).optional(),
  thicknessMm: measured(0.01, 1_000).optional(),
  layers: z.number().int().min(1).max(50).optional(),
  moisture: z.enum(moistures).optional(),
  sampleKept: z.enum(['yes', 'no', 'dont-know']).default('dont-know'),
});
export type SceneTarget = z.infer<typeof targetSchema>;

export const skylineSources = ['clinometer', 'panorama', 'drawing', 'model'] as const;
/** A tree hides more in leaf than bare; anything else has no leaf. */
export const leafStates = ['bare', 'in-leaf'] as const;

export const skylinePointSchema = z.object({
  azimuthDeg: z.number().min(0).max(360),
  elevationDeg: z.number().min(-5).max(90),
  name: z.string().max(80).optional(),
  plusMinusDeg: z.number().min(0.1).max(20).optional(),
  source: z.enum(skylineSources).optional(),
  leaf: z.enum(leafStates).optional(),
});
export type SkylinePoint = z.infer<typeof skylinePointSchema>;

export const skylineSchema = z.object({
  points: z.array(skylinePointSchema).max(720),
  /** What a run uses: the largest ± of the points, or one for all. */
  plusMinusDeg: z.number().min(0.1).max(20).default(1),
  source: z.enum(skylineSources).default('clinometer'),
});
export type SceneSkyline = z.infer<typeof skylineSchema>;

/** A wall, fence or block in plan: two ends seen from the centre of the optic, and its top above that centre. */
export const wallSchema = z.object({
  fromDeg: z.number().min(0).max(360),
  fromM: z.number().min(0.001).max(2_000),
  toDeg: z.number().min(0).max(360),
  toM: z.number().min(0.001).max(2_000),
  topM: z.number().min(-50).max(500),
  name: z.string().max(80).optional(),
});
export type SceneWall = z.infer<typeof wallSchema>;
export const mostWalls = 24;

export const airSchema = z.object({
  climateClass: z.enum(['clean-dry-mountain', 'temperate-rural', 'urban-maritime', 'humid-tropics', 'dusty-desert']).default('temperate-rural'),
  temperatureC: z.number().min(-60).max(60).optional(),
  pressureHpa: z.number().min(300).max(1100).optional(),
  dni: z
    .object({
      source: z.string().max(200),
      stationDistanceKm: z.number().min(0).max(1000).optional(),
      basis: z.enum(['measured', 'derived', 'hourly-archive']),
      values: z.array(z.object({ startUtc: z.iso.datetime(), endUtc: z.iso.datetime(), dniWm2: z.number().min(0).max(1400) })).max(2_000),
    })
    .optional(),
});
export type SceneAir = z.infer<typeof airSchema>;

const placeSchema = z.object({ latitudeDeg: z.number().min(-90).max(90), longitudeDeg: z.number().min(-180).max(180) });
export const mostWallLines = 3;
/** Pins and wall lines on the map, as the reporter set them. They suggest bearings and lengths; measurements win over them. */
export const onMapSchema = z.object({
  optic: placeSchema.optional(),
  mark: placeSchema.optional(),
  walls: z.array(z.object({ from: placeSchema, to: placeSchema })).max(mostWallLines).default([]),
});
export type SceneOnMap = z.infer<typeof onMapSchema>;

export const sceneSchema = z.object({
  optic: opticSchema.default({ kind: 'dont-know', movedSince: 'dont-know' }),
  opening: openingSchema.optional(),
  mark: markSchema.default({}),
  target: targetSchema.default({ material: 'dont-know', sampleKept: 'dont-know' }),
  skyline: skylineSchema.optional(),
  walls: z.array(wallSchema).max(mostWalls).optional(),
  air: airSchema.default({ climateClass: 'temperate-rural' }),
  onMap: onMapSchema.optional(),
});
export type Scene = z.infer<typeof sceneSchema>;
