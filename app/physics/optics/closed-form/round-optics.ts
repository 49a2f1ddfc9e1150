import { degree, safeAcos } from '#app/physics/units.ts';
import { dot, fromAzimuthElevation, mirrored, scale, type Vector } from '#app/physics/vector.ts';
import type {
  FresnelOptic, LensOptic, MirrorOptic, Optic, SphereOptic, TelescopeOptic,
} from '#app/physics/optics/optic.ts';
import { fresnelColourSpread, slopeErrors } from '#app/physics/optics/optic-defaults.data.ts';
import { ballFocalLengthM, mediumOf, obliqueMirrorFociM } from '#app/physics/optics/refraction.ts';
import { sharpestDistanceM, surveyOrigin, type Beam, type FocusModel } from './beam.ts';
import { radiusHolding, roundShare, type Fan } from './meridional.ts';
import { ballFan, idealFan, lensFan, mirrorFan } from './shapes.ts';

/** Image blur at the focus that a tilt adds, and where the focus then lies. */
interface TiltEffect {
  readonly blurM: number;
  readonly focusM: number;
}

/** What tells one round optic from another. */
interface RoundShape {
  readonly fan: Fan;
  readonly focalLengthM: number;
  readonly apertureM2: number;
  readonly halfWidthM: number;
  readonly throughput: number;
  /** Blur radius per metre of distance from the slope error. [rad] */
  readonly slopeBlurRad: number;
  /** Null for optics without an axis. */
  readonly axis: Vector | null;
  readonly reflects: boolean;
  readonly moves: boolean;
  readonly tiltEffect: (tilt: number, sharpestM: number) => TiltEffect;
}

/** Half-angle of the sun at its mean distance. [rad] */
const meanSunHalfAngle = 0.00465;

/** Radius of the even disc that has the spread of a Gaussian of this sigma on each axis. */
const evenDisc = 2;

function slopeErrorRad(optic: Optic): number {
  return (optic.slopeErrorMrad ?? slopeErrors[optic.kind].slopeErrorMrad) / 1000;
}

/** A mirror turns light by twice its slope error, a pair of refracting faces by √2 (n − 1) times. */
function slopeBlur(optic: Optic, refractiveIndex: number | null): number {
  const turn = refractiveIndex === null ? 2 : Math.SQRT2 * (refractiveIndex - 1);
  return evenDisc * turn * slopeErrorRad(optic);
}

function roundModel(shape: RoundShape): FocusModel {
  const blurAt = (z: number, halfAngle: number): number => z * Math.hypot(Math.tan(halfAngle), shape.slopeBlurRad);
  const sharpestM = sharpestDistanceM(
    (z) => roundShare(shape.fan, z, 0, shape.focalLengthM * meanSunHalfAngle, blurAt(z, meanSunHalfAngle)),
    shape.focalLengthM, 0.55, 1.04,
  );
  const beamFor = (towardsSun: Vector, sunHalfAngle: number): Beam | null => {
    const cosTilt = shape.axis === null ? 1 : dot(towardsSun, shape.axis);
    if (cosTilt <= 0) return null;
    const tilt = safeAcos(cosTilt);
    const direction =
      shape.reflects && shape.axis !== null ? mirrored(towardsSun, shape.axis) : scale(towardsSun, -1);
    const { blurM, focusM } = shape.tiltEffect(tilt, sharpestM);
    // The fan is that of light along the axis; its planes are stretched to where the tilted focus lies.
    const stretch = sharpestM / focusM;
    const blur = (z: number): number => Math.hypot(blurAt(z, sunHalfAngle), blurM);
    const lightM2 = shape.apertureM2 * cosTilt;
    return {
      direction, focusM, tilt, across: null,
      concentration: (z, offset, disc) => {
        if (z <= 0) return 0;
        return (lightM2 * roundShare(shape.fan, z * stretch, Math.abs(offset), disc / 2, blur(z))) / ((Math.PI * disc * disc) / 4);
      },
      spotDiameterM: (z) => 2 * radiusHolding(shape.fan, z * stretch, 0.5, blur(z)),
    };
  };
  const requiredSun = (towardsMark: Vector): Vector | null => {
    const sun = shape.reflects && shape.axis !== null ? mirrored(towardsMark, shape.axis) : scale(towardsMark, -1);
    return shape.axis !== null && dot(sun, shape.axis) <= 0 ? null : sun;
  };
  return {
    focusKind: 'point', focalLengthM: shape.focalLengthM, generator: null, startsAt: surveyOrigin, lineHalfLengthM: 0, halfWidthM: shape.halfWidthM,
    moves: shape.moves, reflects: shape.reflects, throughput: shape.throughput, beamFor, requiredSun,
  };
}

const untilted = (_tilt: number, sharpestM: number): TiltEffect => ({ blurM: 0, focusM: sharpestM });

/**
 * Blur radius that astigmatism adds at the brightest plane. A strongly astigmatic spot is brightest near one of its two
 * line foci, so the blur grows with the root of the circle of least confusion once that exceeds the sun's image.
 * Within a third of traced lenses at 10–30° (rows trace-04 to trace-06) and of a traced mirror at 15° (trace-07).
 */
function astigmaticBlurM(circleRadiusM: number, imageRadiusM: number): number {
  return Math.sqrt(circleRadiusM * Math.min(circleRadiusM, imageRadiusM));
}

/** Astigmatism of a thin lens with the stop at the lens (Coddington), taken at the middle plane. */
function lensTilt(focalLengthM: number, apertureDiameterM: number, refractiveIndex: number) {
  return (tilt: number, sharpestM: number): TiltEffect => {
    const inside = Math.asin(Math.sin(tilt) / refractiveIndex);
    const sagittalM = focalLengthM * ((refractiveIndex - 1) / (refractiveIndex * Math.cos(inside) - Math.cos(tilt)));
    const tangentialM = sagittalM * Math.cos(tilt) ** 2;
    const spread = (sagittalM - tangentialM) / (sagittalM + tangentialM);
    const middleM = (2 * sagittalM * tangentialM) / (sagittalM + tangentialM);
    const blurM = astigmaticBlurM((apertureDiameterM / 2) * spread, focalLengthM * meanSunHalfAngle);
    return { blurM, focusM: sharpestM * (middleM / focalLengthM) };
  };
}

/**
 * Astigmatism of a concave mirror at its middle plane, and the thinning by coma. The coma term was fitted to traced
 * parabolic dishes of f/0.42 at 1–15° (row trace-08): half of the product of image radius and sagittal coma.
 */
function mirrorTilt(radiusM: number, apertureDiameterM: number) {
  return (tilt: number, sharpestM: number): TiltEffect => {
    const focal = radiusM / 2;
    const { tangentialM, sagittalM } = obliqueMirrorFociM(radiusM, tilt);
    const astigmatism = ((apertureDiameterM / 2) * (sagittalM - tangentialM)) / (sagittalM + tangentialM);
    const sagittalComa = (tilt * focal) / (16 * (focal / apertureDiameterM) ** 2);
    const imageRadiusM = focal * meanSunHalfAngle;
    const coma2 = 0.5 * sagittalComa * imageRadiusM;
    return { blurM: Math.hypot(astigmaticBlurM(astigmatism, imageRadiusM), Math.sqrt(coma2)), focusM: sharpestM };
  };
}

function sphereModel(optic: SphereOptic): FocusModel {
  const medium = mediumOf(optic.material);
  const radiusM = optic.diameterM / 2;
  return roundModel({
    fan: ballFan(true, radiusM, medium),
    focalLengthM: ballFocalLengthM(radiusM, medium.refractiveIndex),
    apertureM2: Math.PI * radiusM * radiusM,
    halfWidthM: optic.diameterM / 2,
    throughput: medium.internalTransmittance(optic.diameterM),
    slopeBlurRad: slopeBlur(optic, medium.refractiveIndex),
    axis: null, reflects: false, moves: false, tiltEffect: untilted,
  });
}

function lensModel(optic: LensOptic): FocusModel {
  const medium = mediumOf(optic.material);
  const n = medium.refractiveIndex;
  const halfM = optic.diameterM / 2;
  const biconvex = optic.shape === 'biconvex';
  const radiusM = (n - 1) * optic.focalLengthM * (biconvex ? 2 : 1);
  if (halfM >= radiusM) {
    throw new RangeError(
      `optic.diameterM ${optic.diameterM} and optic.focalLengthM ${optic.focalLengthM} disagree: a face of radius ${radiusM.toFixed(4)} m cannot be ${optic.diameterM} m wide.`,
    );
  }
  const sag = radiusM - Math.sqrt(radiusM * radiusM - halfM * halfM);
  const thinnestM = (biconvex ? 2 : 1) * sag;
  if (optic.centreThicknessM !== undefined && optic.centreThicknessM < 0.99 * thinnestM) {
    throw new RangeError(`optic.centreThicknessM ${optic.centreThicknessM} and optic.diameterM ${optic.diameterM} disagree: at this focal length the middle is at least ${thinnestM.toPrecision(3)} m thick.`);
  }
  const thicknessM = optic.centreThicknessM ?? thinnestM + 0.001;
  const curvedFirst = biconvex || optic.faceToSun === 'curved';
  const first = curvedFirst ? radiusM : Number.POSITIVE_INFINITY;
  const second = biconvex || !curvedFirst ? -radiusM : Number.POSITIVE_INFINITY;
  const nodalM = curvedFirst ? thicknessM - ((n - 1) * optic.focalLengthM * thicknessM) / (n * radiusM) : thicknessM;
  return roundModel({
    fan: lensFan(first, second, thicknessM, halfM, medium, biconvex ? nodalM : curvedFirst ? thicknessM - thicknessM / n : thicknessM),
    focalLengthM: optic.focalLengthM,
    apertureM2: Math.PI * halfM * halfM,
    halfWidthM: optic.diameterM / 2,
    throughput: medium.internalTransmittance(thicknessM),
    slopeBlurRad: slopeBlur(optic, n),
    axis: fromAzimuthElevation(optic.axisAzimuthDeg, optic.axisElevationDeg),
    reflects: false, moves: false,
    tiltEffect: lensTilt(optic.focalLengthM, optic.diameterM, n),
  });
}

function mirrorModel(optic: MirrorOptic): FocusModel {
  const halfM = optic.diameterM / 2;
  if (optic.figure === 'spherical' && halfM > optic.radiusM) {
    throw new RangeError(`optic.diameterM ${optic.diameterM} and optic.radiusM ${optic.radiusM} disagree: a spherical face is at most two radii wide.`);
  }
  return roundModel({
    fan: mirrorFan(optic.figure, optic.radiusM, halfM, optic.reflectance),
    focalLengthM: optic.radiusM / 2,
    apertureM2: Math.PI * halfM * halfM,
    halfWidthM: optic.diameterM / 2,
    throughput: optic.reflectance,
    slopeBlurRad: slopeBlur(optic, null),
    axis: fromAzimuthElevation(optic.axisAzimuthDeg, optic.axisElevationDeg),
    reflects: true, moves: false,
    tiltEffect: mirrorTilt(optic.radiusM, optic.diameterM),
  });
}

function sheetModel(optic: FresnelOptic | TelescopeOptic): FocusModel {
  const fresnel = optic.kind === 'fresnel';
  const apertureM2 = fresnel ? optic.widthM * optic.heightM : (Math.PI * optic.diameterM ** 2) / 4;
  const diameterM = Math.sqrt((4 * apertureM2) / Math.PI);
  return roundModel({
    fan: idealFan(optic.focalLengthM, diameterM / 2, optic.transmittance, fresnel ? fresnelColourSpread : 0),
    focalLengthM: optic.focalLengthM,
    apertureM2,
    halfWidthM: fresnel ? Math.hypot(optic.widthM, optic.heightM) / 2 : diameterM / 2,
    throughput: optic.transmittance,
    slopeBlurRad: slopeBlur(optic, 1.5),
    axis: fromAzimuthElevation(optic.axisAzimuthDeg, optic.axisElevationDeg),
    reflects: false,
    moves: !fresnel,
    tiltEffect: lensTilt(optic.focalLengthM, diameterM, 1.5),
  });
}

/** Acceptance of a telescope's tube: beyond it the sun does not reach the focus. */
export const telescopeFieldDeg = 5;

/** Closed-form model of every optic with a round or nearly round focus. */
export function roundOpticModel(
  optic: SphereOptic | LensOptic | MirrorOptic | FresnelOptic | TelescopeOptic,
): FocusModel {
  switch (optic.kind) {
    case 'sphere':
      return sphereModel(optic);
    case 'lens':
      return lensModel(optic);
    case 'concave-mirror':
    case 'polished-bowl':
    case 'dish':
      return mirrorModel(optic);
    case 'fresnel':
      return sheetModel(optic);
    case 'telescope': {
      const model = sheetModel(optic);
      const field = Math.sin(telescopeFieldDeg * degree);
      const beamFor: FocusModel['beamFor'] = (sun, halfAngle) => {
        const beam = model.beamFor(sun, halfAngle);
        return beam !== null && Math.sin(beam.tilt) <= field ? beam : null;
      };
      return { ...model, beamFor };
    }
  }
}
