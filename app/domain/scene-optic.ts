import type { Optic, RefractiveMaterialName } from '#app/physics/optics/optic.ts';
import {
  classCentreBowM, classFresnelTransmittance, classLensFocalRatio, classMirrorRadiusM, classReflectance, classTelescopeTransmittance, opticSigma,
} from './optic-class-values.ts';
import type { ClassValue } from './optic-class-values.ts';
import { measureMethodLabels } from './scene.ts';
import type { Measured, SceneOptic } from './scene.ts';

/** Where a value of the engine's input came from. */
export interface InputOrigin {
  readonly field: string;
  readonly value: string;
  readonly origin: 'reported' | 'measured' | 'file' | 'assumed';
  readonly note: string;
  /** False for values from memory. */
  readonly verified: boolean;
}

export interface OpticReading {
  readonly optic: Optic | null;
  readonly sigmaRel: number;
  readonly origins: readonly InputOrigin[];
  /** What to measure before the optic can be reckoned with, as sentences. */
  readonly missing: readonly string[];
}

const mm = 0.001;

/** Collects values with their origin while an optic is put together. */
class Reader {
  readonly origins: InputOrigin[] = [];
  readonly missing: string[] = [];
  sigmaRel: number = opticSigma.measured;

  length(field: string, measured: Measured | undefined, unitM: number, unit: string, askFor: string): number | null {
    if (!measured) {
      this.missing.push(askFor);
      return null;
    }
    this.note(field, measured, unit);
    return measured.value * unitM;
  }

  optional(field: string, measured: Measured | undefined, unitM: number, unit: string, classValue: ClassValue): number {
    if (measured) {
      this.note(field, measured, unit);
      return measured.value * unitM;
    }
    this.origins.push({ field, value: `${Number((classValue.value / unitM).toPrecision(3))} ${unit}`.trim(), origin: 'assumed', note: classValue.source, verified: classValue.verified });
    return classValue.value;
  }

  note(field: string, measured: Measured, unit: string): void {
    const origin = measured.method === 'assumed' ? 'assumed' : measured.method === 'reported' || measured.method === 'estimated' ? 'reported' : 'measured';
    this.origins.push({ field, value: `${measured.value}${measured.plusMinus === undefined ? '' : ` ±${measured.plusMinus}`}${unit.startsWith('°') ? '' : ' '}${unit}`.trim(), origin, note: measureMethodLabels[measured.method].toLowerCase(), verified: true });
  }

  assume(field: string, value: string, note: string): void {
    this.origins.push({ field, value, origin: 'assumed', note, verified: true });
  }

  spread(measured: Measured | undefined): void {
    if (!measured) this.sigmaRel = opticSigma.classValue;
    else if (measured.plusMinus !== undefined && measured.plusMinus > 0) this.sigmaRel = Math.max(0.002, Math.min(0.5, measured.plusMinus / measured.value));
    else if (measured.method === 'estimated' || measured.method === 'photo') this.sigmaRel = opticSigma.estimated;
  }
}

const materialOf = (reader: Reader, scene: SceneOptic, fallback: RefractiveMaterialName): RefractiveMaterialName => {
  if (scene.material && scene.material !== 'unknown') return scene.material;
  reader.assume('Material', fallback, 'not stated; ordinary greenish glass passes far less, so ask for it');
  return fallback;
};

/** How the optic stood; null, with a sentence, when it is not known. */
function poseOf(reader: Reader, scene: SceneOptic, what: string): { axisAzimuthDeg: number; axisElevationDeg: number } | null {
  if (!scene.faceAzimuthDeg || !scene.faceTiltDeg) {
    reader.missing.push(`Measure which way ${what} faced: bearing and tilt.`);
    return null;
  }
  reader.note('Faces', scene.faceAzimuthDeg, '° true');
  reader.note('Tilt', scene.faceTiltDeg, '°');
  return { axisAzimuthDeg: scene.faceAzimuthDeg.value % 360, axisElevationDeg: scene.faceTiltDeg.value };
}

type Build = (reader: Reader, scene: SceneOptic) => Optic | null;

const mirror: Build = (reader, scene) => {
  const pose = poseOf(reader, scene, 'the mirror');
  const diameterM = reader.length('Diameter', scene.diameterMm, mm, 'mm', 'Measure the diameter of the mirror.');
  const radiusM = radiusOf(reader, scene, classMirrorRadiusM);
  const reflectance = reader.optional('Reflectance', scene.reflectance, 1, '', classReflectance['curved-mirror']);
  return pose && diameterM ? { kind: 'concave-mirror', figure: 'spherical', diameterM, radiusM, reflectance, ...pose } : null;
};

function radiusOf(reader: Reader, scene: SceneOptic, classValue: ClassValue): number {
  if (scene.radiusOfCurvatureM) {
    reader.note('Radius of curvature', scene.radiusOfCurvatureM, 'm');
    reader.spread(scene.radiusOfCurvatureM);
    return scene.radiusOfCurvatureM.value;
  }
  if (scene.focalLengthMm) {
    reader.note('Focal length', scene.focalLengthMm, 'mm');
    reader.spread(scene.focalLengthMm);
    return 2 * scene.focalLengthMm.value * mm;
  }
  reader.spread(undefined);
  return reader.optional('Radius of curvature', undefined, 1, 'm', classValue);
}

const sphere: Build = (reader, scene) => {
  const diameterM = reader.length('Diameter', scene.diameterMm, mm, 'mm', 'Measure the diameter of the ball.');
  if (!diameterM) return null;
  reader.spread(scene.diameterMm);
  return { kind: 'sphere', diameterM, material: { name: materialOf(reader, scene, 'crown-glass') } };
};

const bowl: Build = (reader, scene) => {
  const diameterM = reader.length('Diameter', scene.diameterMm, mm, 'mm', 'Measure the diameter of the bowl.');
  const depthM = reader.length('Liquid depth', scene.liquidDepthMm, mm, 'mm', 'Measure how deep the liquid stood: the fill level moves the focus threefold.');
  if (!diameterM || !depthM) return null;
  reader.spread(scene.diameterMm);
  const material = { name: materialOf(reader, scene, 'water') } as const;
  if (depthM >= diameterM * 0.98) return { kind: 'sphere', diameterM, material };
  return { kind: 'bowl', radiusM: diameterM / 2, liquidDepthM: depthM, material };
};

const bottle: Build = (reader, scene) => {
  const diameterM = reader.length('Diameter', scene.diameterMm, mm, 'mm', 'Measure the diameter of the bottle.');
  const pose = scene.faceAzimuthDeg && scene.faceTiltDeg ? poseOf(reader, scene, 'the bottle') : { axisAzimuthDeg: 0, axisElevationDeg: 90 };
  if (!scene.faceTiltDeg) reader.assume('Bottle stood', 'upright', 'not stated');
  if (!diameterM || !pose) return null;
  reader.spread(scene.diameterMm);
  const lengthM = reader.optional('Length', scene.heightMm, mm, 'mm', { value: 0.2, source: 'length of a half-litre bottle, from memory', verified: false });
  return { kind: 'cylinder', diameterM, lengthM, material: { name: materialOf(reader, scene, 'water') }, ...pose };
};

const pane: Build = (reader, scene) => {
  const pose = poseOf(reader, scene, 'the pane');
  const widthM = reader.length('Width', scene.widthMm, mm, 'mm', 'Measure the width of the pane.');
  const heightM = reader.length('Height', scene.heightMm, mm, 'mm', 'Measure the height of the pane.');
  const centreBowM = reader.optional('Bow at the centre', scene.centreBowMm, mm, 'mm', classCentreBowM);
  reader.spread(scene.centreBowMm);
  const reflectance = reader.optional('Reflectance', scene.reflectance, 1, '', classReflectance['window-pane']);
  if (!pose || !widthM || !heightM) return null;
  return { kind: 'bowed-pane', widthM, heightM, centreBowM, reflectance, ...(scene.coatingSurface ? { coatingSurface: scene.coatingSurface } : {}), ...pose };
};

const curved = (kind: 'facade' | 'curved-metal', reflectanceClass: ClassValue): Build => (reader, scene) => {
  const pose = poseOf(reader, scene, kind === 'facade' ? 'the building face' : 'the metal');
  const radiusM = reader.length('Radius of curvature', scene.radiusOfCurvatureM, 1, 'm', 'Measure the radius of curvature, by straightedge and gap or from a drawing.');
  const chordM = reader.length('Chord across the curve', scene.widthMm, mm, 'mm', 'Measure the chord across the curve.');
  const lengthM = reader.length('Length along the straight edge', scene.heightMm, mm, 'mm', 'Measure the length along the straight edge.');
  const reflectance = reader.optional('Reflectance', scene.reflectance, 1, '', reflectanceClass);
  if (!pose || !radiusM || !chordM || !lengthM) return null;
  reader.spread(scene.radiusOfCurvatureM);
  const generators = scene.generators ?? (kind === 'facade' ? 'vertical' : 'horizontal');
  if (scene.paneWidthMm) reader.note('Width of one pane', scene.paneWidthMm, 'mm');
  return { kind, radiusM, chordM, lengthM, generators, reflectance, ...(scene.paneWidthMm ? { paneWidthM: scene.paneWidthMm.value * mm } : {}), ...pose };
};

const dish: Build = (reader, scene) => {
  const pose = poseOf(reader, scene, 'the dish');
  const diameterM = reader.length('Diameter', scene.diameterMm, mm, 'mm', 'Measure the diameter of the dish.');
  const focalLengthM = reader.length('Focal length', scene.focalLengthMm, mm, 'mm', 'Measure the depth of the dish: focal length is diameter squared over sixteen times the depth.');
  const reflectance = reader.optional('Reflectance', scene.reflectance, 1, '', classReflectance.dish);
  if (!pose || !diameterM || !focalLengthM) return null;
  reader.spread(scene.focalLengthMm);
  return { kind: 'dish', figure: 'parabolic', diameterM, radiusM: 2 * focalLengthM, reflectance, ...pose };
};

const lens: Build = (reader, scene) => {
  const pose = poseOf(reader, scene, 'the lens');
  const diameterM = reader.length('Diameter', scene.diameterMm, mm, 'mm', 'Measure the diameter of the lens.');
  if (!pose || !diameterM) return null;
  const focalLengthM = reader.optional('Focal length', scene.focalLengthMm, mm, 'mm', { ...classLensFocalRatio, value: classLensFocalRatio.value * diameterM });
  reader.spread(scene.focalLengthMm);
  const faceToSun = scene.faceToSun ?? 'curved';
  if (!scene.faceToSun) reader.assume('Face to the sun', 'curved', 'not stated; the flat face halves the flux');
  return { kind: 'lens', shape: 'plano-convex', diameterM, focalLengthM, faceToSun, material: { name: materialOf(reader, scene, 'acrylic') }, ...pose };
};

const fresnel: Build = (reader, scene) => {
  const pose = poseOf(reader, scene, 'the sheet');
  const widthM = reader.length('Width', scene.widthMm, mm, 'mm', 'Measure the width of the sheet.');
  const heightM = reader.length('Height', scene.heightMm, mm, 'mm', 'Measure the height of the sheet.');
  const focalLengthM = reader.length('Focal length', scene.focalLengthMm, mm, 'mm', 'Find the focal length with a distant lamp, never with the sun.');
  if (!pose || !widthM || !heightM || !focalLengthM) return null;
  reader.spread(scene.focalLengthMm);
  reader.origins.push({ field: 'Transmittance', value: String(classFresnelTransmittance.value), origin: 'assumed', note: classFresnelTransmittance.source, verified: false });
  return { kind: 'fresnel', widthM, heightM, focalLengthM, transmittance: classFresnelTransmittance.value, ...pose };
};

const telescope: Build = (reader, scene) => {
  const pose = poseOf(reader, scene, 'the telescope');
  const diameterM = reader.length('Aperture', scene.diameterMm, mm, 'mm', 'Read the aperture off the tube.');
  const focalLengthM = reader.length('Focal length', scene.focalLengthMm, mm, 'mm', 'Read the focal length off the tube.');
  if (!pose || !diameterM || !focalLengthM) return null;
  reader.spread(scene.focalLengthMm);
  reader.origins.push({ field: 'Transmittance', value: String(classTelescopeTransmittance.value), origin: 'assumed', note: classTelescopeTransmittance.source, verified: false });
  return { kind: 'telescope', diameterM, focalLengthM, transmittance: classTelescopeTransmittance.value, ...pose };
};

const dome: Build = (reader, scene) => {
  const radiusM = reader.length('Radius of curvature', scene.radiusOfCurvatureM, 1, 'm', 'Measure the radius of the dome.');
  const pondDiameterM = reader.length('Width of the water', scene.diameterMm, mm, 'mm', 'Measure how wide the water stood.');
  if (!radiusM || !pondDiameterM) return null;
  reader.spread(scene.radiusOfCurvatureM);
  return { kind: 'ponded-dome', radiusM, pondDiameterM };
};

const builders: Record<Exclude<SceneOptic['kind'], 'dont-know'>, Build> = {
  'curved-mirror': mirror,
  'glass-ball': sphere,
  'bowl-or-vase': bowl,
  bottle,
  'window-pane': pane,
  'curved-building-face': curved('facade', classReflectance['curved-building-face']),
  'metal-trim': curved('curved-metal', classReflectance['metal-trim']),
  dish,
  magnifier: lens,
  'flat-plastic-lens': fresnel,
  telescope,
  'water-on-dome': dome,
};

/** The engine's optic from the measured scene, with the origin of each value; nothing is made up in silence. */
export function readOptic(scene: SceneOptic): OpticReading {
  const reader = new Reader();
  if (scene.kind === 'dont-know') return { optic: null, sigmaRel: opticSigma.classValue, origins: [], missing: ['Say what kind of optic it was.'] };
  const optic = builders[scene.kind](reader, scene);
  if (reader.sigmaRel === opticSigma.classValue) {
    reader.origins.push({ field: 'Spread of the optic', value: `±${opticSigma.classValue * 100} %`, origin: 'assumed', note: 'focal length or radius is a class value; from memory', verified: false });
  }
  return { optic, sigmaRel: reader.sigmaRel, origins: reader.origins, missing: reader.missing };
}
