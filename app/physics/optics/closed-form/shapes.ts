import { fresnelReflectance, type Medium } from '#app/physics/optics/refraction.ts';
import { buildFan, type Fan, type FanRay } from './meridional.ts';

/** Real rays through the shapes that the engine knows, in the plane that holds the axis and the light. */

/** Full sphere, or the normal section of a full cylinder, from its centre. */
export function ballFan(round: boolean, radiusM: number, medium: Medium): Fan {
  const n = medium.refractiveIndex;
  return buildFan(round, radiusM, (height) => {
    const sinIn = height / radiusM;
    const sinInside = sinIn / n;
    if (Math.abs(sinIn) >= 1) return null;
    const bend = 2 * (Math.asin(sinIn) - Math.asin(sinInside));
    const cosInside = Math.sqrt(1 - sinInside * sinInside);
    const surface = 1 - fresnelReflectance(Math.sqrt(1 - sinIn * sinIn), n);
    // By symmetry the ray leaves with the impact parameter with which it came.
    return {
      x0: height / Math.cos(bend),
      slope: -Math.tan(bend),
      transmittance: surface * surface * medium.internalTransmittance(2 * radiusM * cosInside),
    };
  });
}

/** Light that runs parallel inside a liquid and leaves through a spherical bottom; distances from the sphere's centre. */
export function roundBottomFan(radiusM: number, halfBeamM: number, medium: Medium, pathM: number): Fan {
  const n = medium.refractiveIndex;
  return buildFan(true, halfBeamM, (height) => {
    const sinInside = height / radiusM;
    if (sinInside * n >= 1) return null;
    const bend = Math.asin(sinInside * n) - Math.asin(sinInside);
    const surface = 1 - fresnelReflectance(Math.sqrt(1 - sinInside * sinInside), 1 / n);
    const leavesAt = radiusM * Math.sqrt(1 - sinInside * sinInside);
    return {
      x0: height + Math.tan(bend) * leavesAt,
      slope: -Math.tan(bend),
      transmittance: surface * medium.internalTransmittance(pathM),
    };
  });
}

/** Spherical or parabolic concave mirror, light along its axis, from the vertex. */
export function mirrorFan(figure: 'spherical' | 'parabolic', radiusM: number, halfApertureM: number, reflectance: number): Fan {
  return buildFan(true, halfApertureM, (height) => {
    if (figure === 'parabolic') {
      const focal = radiusM / 2;
      const rise = (height * height) / (4 * focal);
      if (rise >= focal) return null;
      const cosine = (focal - rise) / (focal + rise);
      return {
        x0: (height * focal) / (focal - rise),
        slope: -height / (focal - rise),
        transmittance: reflectance,
        imageScale: (focal + rise) / focal / Math.sqrt(cosine),
      };
    }
    const sine = height / radiusM;
    if (sine >= Math.sin(Math.PI / 3)) return null; // steeper rays meet the bowl a second time
    const incidence = Math.asin(sine);
    const slope = Math.tan(2 * incidence);
    const crossing = radiusM - radiusM / (2 * Math.cos(incidence));
    const path = radiusM / (2 * Math.cos(incidence));
    return {
      x0: slope * crossing,
      slope: -slope,
      transmittance: reflectance,
      imageScale: path / (radiusM / 2) / Math.sqrt(Math.max(Math.cos(2 * incidence), 0.1)),
    };
  });
}

/**
 * Circular cylinder mirror with the light at an angle to its axis in the normal section, about the reflected chief ray.
 *
 * @param incidence Angle of the light from the axis, in the section. [rad]
 */
export function slotMirrorFan(radiusM: number, halfChordM: number, incidence: number, reflectance: number): Fan {
  const sinI = Math.sin(incidence);
  const cosI = Math.cos(incidence);
  return buildFan(false, halfChordM, (height): FanRay | null => {
    const sine = height / radiusM;
    const cosine = Math.sqrt(1 - sine * sine);
    // Section axes: x across, y along the axis. The light travels along (−sin i, −cos i).
    const normalDotLight = sine * sinI - cosine * cosI;
    if (normalDotLight >= 0) return null;
    const rx = -sinI + 2 * normalDotLight * sine;
    const ry = -cosI - 2 * normalDotLight * cosine;
    // Chief ray from the vertex along (−sin i, cos i); across it lies (cos i, sin i).
    const along = -rx * sinI + ry * cosI;
    if (along <= 0) return null;
    const across = rx * cosI + ry * sinI;
    const pointAlong = -height * sinI + radiusM * (1 - cosine) * cosI;
    const pointAcross = height * cosI + radiusM * (1 - cosine) * sinI;
    const slope = across / along;
    const foreshortening = -normalDotLight / (cosI * cosine);
    return { x0: pointAcross - slope * pointAlong, slope, transmittance: reflectance * Math.max(0, foreshortening) };
  });
}

/** One refraction in the plane: ray at height y with direction angle u meets a surface of signed radius at x. */
interface MeridianRay {
  readonly x: number;
  readonly y: number;
  readonly angle: number;
  readonly transmittance: number;
}

function refractAt(ray: MeridianRay, vertexX: number, radiusM: number, indexRatio: number): MeridianRay | null {
  const cosU = Math.cos(ray.angle);
  const sinU = Math.sin(ray.angle);
  let hitX = vertexX;
  let normalAngle = Math.PI;
  let hitY = ray.y + (vertexX - ray.x) * (sinU / cosU);
  if (Number.isFinite(radiusM)) {
    const centreX = vertexX + radiusM;
    const toX = ray.x - centreX;
    const b = toX * cosU + ray.y * sinU;
    const root = b * b - (toX * toX + ray.y * ray.y - radiusM * radiusM);
    if (root < 0) return null;
    const travel = -b - Math.sign(radiusM) * Math.sqrt(root);
    hitX = ray.x + travel * cosU;
    hitY = ray.y + travel * sinU;
    normalAngle = Math.atan2((hitY) / radiusM, (hitX - centreX) / radiusM);
  }
  const incidence = normalAngle - Math.PI - ray.angle;
  const sinRefracted = Math.sin(incidence) / indexRatio;
  if (Math.abs(sinRefracted) >= 1) return null;
  const angle = ray.angle + incidence - Math.asin(sinRefracted);
  const surface = 1 - fresnelReflectance(Math.abs(Math.cos(incidence)), indexRatio);
  return { x: hitX, y: hitY, angle, transmittance: ray.transmittance * surface };
}

/** Two-surface lens with light along its axis; distances from its rear nodal point. */
export function lensFan(
  firstRadiusM: number, secondRadiusM: number, thicknessM: number, halfApertureM: number, medium: Medium, nodalPointM: number,
): Fan {
  const n = medium.refractiveIndex;
  return buildFan(true, halfApertureM, (height) => {
    const start: MeridianRay = { x: -10 * halfApertureM, y: height, angle: 0, transmittance: 1 };
    const inside = refractAt(start, 0, firstRadiusM, n);
    if (inside === null) return null;
    const outside = refractAt(inside, thicknessM, secondRadiusM, 1 / n);
    if (outside === null) return null;
    const path = Math.hypot(outside.x - inside.x, outside.y - inside.y);
    const slope = Math.tan(outside.angle);
    return {
      x0: outside.y + slope * (nodalPointM - outside.x),
      slope,
      transmittance: outside.transmittance * medium.internalTransmittance(path),
    };
  });
}

/** Thin lens or sheet that brings every ray to one point, with a share of the focal length as colour spread. */
export function idealFan(focalLengthM: number, halfApertureM: number, transmittance: number, colourSpread: number): Fan {
  let turn = 0;
  return buildFan(true, halfApertureM, (height) => {
    // Three colours in turn: middle, short and long focus.
    turn = (turn + 1) % 3;
    const focal = focalLengthM * (1 + colourSpread * (turn - 1));
    return { x0: height, slope: -height / focal, transmittance };
  });
}
