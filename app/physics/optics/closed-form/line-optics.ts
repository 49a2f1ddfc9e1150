import { degree } from '#app/physics/units.ts';
import { cross, dot, fromAzimuthElevation, mirrored, scale, subtract, unit, type Vector } from '#app/physics/vector.ts';
import type { CurvedReflectorOptic, CylinderOptic } from '#app/physics/optics/optic.ts';
import { paneTiltMrad, slopeErrors } from '#app/physics/optics/optic-defaults.data.ts';
import { ballFocalLengthM, bravaisIndex, mediumOf } from '#app/physics/optics/refraction.ts';
import { sharpestDistanceM, surveyOrigin, type Beam, type FocusModel } from './beam.ts';
import { radiusHolding, slotDensityPerM, type Fan } from './meridional.ts';
import { ballFan, slotMirrorFan } from './shapes.ts';

/** Light in the section at right angles to the generators. */
interface Section {
  readonly fan: Fan;
  /** Paraxial focus along the chief ray inside the section. [m] */
  readonly focusM: number;
  /** Width of the aperture that meets the light. [m] */
  readonly lightWidthM: number;
  /** Half-width that flat panes add. [m] */
  readonly paneHalfM: number;
  readonly slopeBlurRad: number;
  /** Nearest distance that lies outside the optic. [m] */
  readonly nearestM: number;
}

/** Sharpest distances inside the section, kept by steps of some one and a half degrees of incidence. */
type FocusCache = Map<string, number>;

/** A beam whose fan lives in the section while the chief ray runs obliquely to it by `sinAxial`. */
function lineBeam(
  direction: Vector, generator: Vector, tilt: number, sinAxial: number, halfAngle: number, kept: FocusCache, section: () => Section,
): Beam {
  const cosAxial = Math.sqrt(1 - sinAxial * sinAxial);
  const across = unit(cross(generator, direction));
  let known: Section | null = null;
  const made = (): Section => (known ??= section());
  const blur = (distanceM: number): number => {
    const { slopeBlurRad, paneHalfM } = made();
    return Math.hypot(distanceM * Math.tan(halfAngle), distanceM * slopeBlurRad, paneHalfM);
  };
  const concentration = (distanceM: number, offsetM: number, discM: number): number => {
    const { fan, lightWidthM, nearestM } = made();
    if (distanceM * cosAxial < nearestM || distanceM <= 0) return 0;
    return lightWidthM * slotDensityPerM(fan, distanceM * cosAxial, offsetM, discM / 2, blur(distanceM));
  };
  return {
    direction, tilt, across, concentration,
    get focusM() {
      const key = `${Math.round(sinAxial * 40)}/${Math.round(tilt * 40)}`;
      let inSectionM = kept.get(key);
      if (inSectionM === undefined) {
        const paraxialM = made().focusM / cosAxial;
        inSectionM = sharpestDistanceM((z) => concentration(z, 0, 2 * blur(z)), paraxialM, 0.55, 1.05) * cosAxial;
        kept.set(key, inSectionM);
      }
      return inSectionM / cosAxial;
    },
    spotDiameterM: (distanceM) => 2 * radiusHolding(made().fan, distanceM * cosAxial, 0.8, blur(distanceM)),
  };
}

/** Direction of a bottle's own axis; both of its ends are alike. */
export function cylinderModel(optic: CylinderOptic): FocusModel {
  const medium = mediumOf(optic.material);
  const radiusM = optic.diameterM / 2;
  const generator = fromAzimuthElevation(optic.axisAzimuthDeg, optic.axisElevationDeg);
  const slopeBlurRad =
    (2 * Math.SQRT2 * (medium.refractiveIndex - 1) * (optic.slopeErrorMrad ?? slopeErrors.cylinder.slopeErrorMrad)) / 1000;
  const kept: FocusCache = new Map();
  return {
    focusKind: 'line',
    focalLengthM: ballFocalLengthM(radiusM, medium.refractiveIndex),
    generator,
    startsAt: surveyOrigin,
    lineHalfLengthM: optic.lengthM / 2,
    halfWidthM: radiusM,
    moves: false,
    reflects: false,
    throughput: medium.internalTransmittance(optic.diameterM),
    beamFor: (towardsSun, halfAngle) => {
      const sinAxial = dot(towardsSun, generator);
      if (Math.abs(sinAxial) > Math.sin(80 * degree)) return null;
      return lineBeam(scale(towardsSun, -1), generator, Math.asin(Math.abs(sinAxial)), sinAxial, halfAngle, kept, () => {
        const index = bravaisIndex(medium.refractiveIndex, sinAxial);
        const lengthening = 1 / Math.sqrt(1 - (sinAxial / medium.refractiveIndex) ** 2);
        return {
          fan: ballFan(false, radiusM, {
            refractiveIndex: index,
            internalTransmittance: (pathM) => medium.internalTransmittance(pathM * lengthening),
          }),
          focusM: Math.max(ballFocalLengthM(radiusM, index), radiusM),
          lightWidthM: optic.diameterM,
          paneHalfM: 0,
          slopeBlurRad,
          nearestM: radiusM,
        };
      });
    },
    requiredSun: (towardsMark) => scale(towardsMark, -1),
  };
}

/** Generators of a curved reflector: level, or in the vertical plane of its normal. */
function reflectorGenerator(optic: CurvedReflectorOptic, normal: Vector): Vector {
  const level = fromAzimuthElevation(optic.axisAzimuthDeg + 90, 0);
  return optic.generators === 'horizontal' ? level : unit(cross(level, normal));
}

export function curvedReflectorModel(optic: CurvedReflectorOptic): FocusModel {
  if (optic.chordM > 2 * optic.radiusM) {
    throw new RangeError(`optic.chordM ${optic.chordM} and optic.radiusM ${optic.radiusM} disagree: a chord is at most two radii.`);
  }
  const normal = fromAzimuthElevation(optic.axisAzimuthDeg, optic.axisElevationDeg);
  const generator = reflectorGenerator(optic, normal);
  const slopeMrad = optic.slopeErrorMrad ?? slopeErrors[optic.kind].slopeErrorMrad;
  // Flat panes stand a little off the ideal curve, each in its own way.
  const slopeBlurRad = (4 * Math.hypot(slopeMrad, optic.paneWidthM === undefined ? 0 : optic.paneTiltMrad ?? paneTiltMrad)) / 1000;
  const kept: FocusCache = new Map();
  return {
    focusKind: 'line',
    focalLengthM: optic.radiusM / 2,
    generator,
    startsAt: surveyOrigin,
    lineHalfLengthM: optic.lengthM / 2,
    halfWidthM: optic.chordM / 2,
    moves: false,
    reflects: true,
    throughput: optic.reflectance,
    beamFor: (towardsSun, halfAngle) => {
      const cosNormal = dot(towardsSun, normal);
      if (cosNormal <= 0.02) return null;
      const sinAxial = dot(towardsSun, generator);
      const inSection = unit(subtract(towardsSun, scale(generator, sinAxial)));
      const cosIncidence = Math.min(1, dot(inSection, normal));
      const incidence = Math.acos(cosIncidence);
      return lineBeam(mirrored(towardsSun, normal), generator, Math.acos(Math.min(1, cosNormal)), sinAxial, halfAngle, kept, () => ({
        fan: slotMirrorFan(optic.radiusM, optic.chordM / 2, incidence, optic.reflectance),
        focusM: (optic.radiusM / 2) * cosIncidence,
        lightWidthM: optic.chordM * cosIncidence,
        paneHalfM: ((optic.paneWidthM ?? 0) / 2) * cosIncidence,
        slopeBlurRad,
        nearestM: 0,
      }));
    },
    requiredSun: (towardsMark) => {
      const sun = mirrored(towardsMark, normal);
      return dot(sun, normal) > 0 ? sun : null;
    },
  };
}
