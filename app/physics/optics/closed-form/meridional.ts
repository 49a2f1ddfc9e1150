/**
 * Fans of real rays in one plane through the optic.
 *
 * Each ray is a straight line beyond the optic: landing coordinate x0 + slope · z at the distance z from the optic's
 * origin along the chief ray, with its share of the light that falls on the aperture. Turned round the axis such a fan
 * gives a round spot, moved along the generators a line.
 */
export interface Fan {
  readonly x0: Float64Array;
  readonly slope: Float64Array;
  readonly weight: Float64Array;
  /** Size of the sun's image that the ray carries, over that of a ray near the axis: longer paths, inclined arrival. */
  readonly imageScale: Float64Array;
}

export const fanRays = 160;

/** One ray as the shape functions give it; null where it does not get through. */
export interface FanRay {
  readonly x0: number;
  readonly slope: number;
  readonly transmittance: number;
  /** Left out: 1. */
  readonly imageScale?: number;
}

/** Heights evenly spaced: from the axis out for a round aperture, where a ring weighs with its radius, or over both halves of a slot. */
export function buildFan(round: boolean, halfApertureM: number, trace: (heightM: number) => FanRay | null): Fan {
  const x0 = new Float64Array(fanRays);
  const slope = new Float64Array(fanRays);
  const weight = new Float64Array(fanRays);
  const imageScale = new Float64Array(fanRays).fill(1);
  for (let k = 0; k < fanRays; k++) {
    const share = (k + 0.5) / fanRays;
    const ray = trace(round ? halfApertureM * share : halfApertureM * (2 * share - 1));
    if (ray === null) continue;
    x0[k] = ray.x0;
    slope[k] = ray.slope;
    weight[k] = (ray.transmittance * (round ? 2 * share : 1)) / fanRays;
    imageScale[k] = ray.imageScale ?? 1;
  }
  return { x0, slope, weight, imageScale };
}

/** Area common to two circles. [m²] */
export function circleOverlapM2(radiusA: number, radiusB: number, distance: number): number {
  if (distance >= radiusA + radiusB) return 0;
  const small = Math.min(radiusA, radiusB);
  if (distance <= Math.abs(radiusA - radiusB)) return Math.PI * small * small;
  const a2 = radiusA * radiusA;
  const b2 = radiusB * radiusB;
  const toChord = (distance * distance + a2 - b2) / (2 * distance);
  const halfA = Math.acos(Math.max(-1, Math.min(1, toChord / radiusA)));
  const halfB = Math.acos(Math.max(-1, Math.min(1, (distance - toChord) / radiusB)));
  return a2 * (halfA - Math.sin(2 * halfA) / 2) + b2 * (halfB - Math.sin(2 * halfB) / 2);
}

/** Half the gap to the neighbouring ray at a distance; without it the rays of a wide cone would leave dark rings. */
function halfGapM(fan: Fan, k: number, zM: number): number {
  const neighbour = k === 0 ? 1 : k - 1;
  const x = (fan.x0[k] ?? 0) + (fan.slope[k] ?? 0) * zM;
  const y = (fan.x0[neighbour] ?? 0) + (fan.slope[neighbour] ?? 0) * zM;
  return (fan.weight[neighbour] ?? 0) === 0 ? 0 : Math.abs(x - y) / 2;
}

const ringSteps = 12;

/**
 * Share of the aperture's light that a disc catches from a round fan.
 *
 * Every ray carries a round image of the sun of `blurM` radius, evenly bright, and is spread on its ring.
 *
 * @param zM Distance along the chief ray. @param offsetM Distance of the disc's centre from the chief ray.
 */
export function roundShare(fan: Fan, zM: number, offsetM: number, discRadiusM: number, blurM: number): number {
  let share = 0;
  for (let k = 0; k < fanRays; k++) {
    const weight = fan.weight[k] ?? 0;
    if (weight === 0) continue;
    const ring = Math.abs((fan.x0[k] ?? 0) + (fan.slope[k] ?? 0) * zM);
    const blur = Math.max(blurM * (fan.imageScale[k] ?? 1), halfGapM(fan, k, zM));
    const image = Math.PI * blur * blur;
    const reach = discRadiusM + blur;
    if (Math.abs(ring - offsetM) >= reach) continue;
    if (offsetM === 0 || ring === 0) {
      share += (weight * circleOverlapM2(blur, discRadiusM, ring + offsetM)) / image;
      continue;
    }
    let sum = 0;
    for (let step = 0; step < ringSteps; step++) {
      const cosine = Math.cos((Math.PI * (step + 0.5)) / ringSteps);
      const distance = Math.sqrt(ring * ring + offsetM * offsetM - 2 * ring * offsetM * cosine);
      sum += circleOverlapM2(blur, discRadiusM, distance);
    }
    share += (weight * sum) / (ringSteps * image);
  }
  return share;
}

/** Area of a disc left of a line at x from its centre, from the centre outwards. [m²] */
function discAreaTo(x: number, radius: number): number {
  const held = Math.max(-radius, Math.min(radius, x));
  return held * Math.sqrt(radius * radius - held * held) + radius * radius * Math.asin(held / radius);
}

/**
 * Mean over a disc of the linear density of light from a slot fan, per metre across. [1/m]
 *
 * @param offsetM Signed distance of the disc's centre across the line.
 */
export function slotDensityPerM(fan: Fan, zM: number, offsetM: number, discRadiusM: number, blurM: number): number {
  let sum = 0;
  for (let k = 0; k < fanRays; k++) {
    const centre = (fan.x0[k] ?? 0) + (fan.slope[k] ?? 0) * zM - offsetM;
    const blur = Math.max(blurM * (fan.imageScale[k] ?? 1), halfGapM(fan, k, zM));
    if (Math.abs(centre) >= discRadiusM + blur) continue;
    const covered = discAreaTo(centre + blur, discRadiusM) - discAreaTo(centre - blur, discRadiusM);
    sum += ((fan.weight[k] ?? 0) * covered) / (2 * blur);
  }
  return sum / (Math.PI * discRadiusM * discRadiusM);
}

/** Distance from the chief ray inside which a share of the fan's light falls, blur included. [m] */
export function radiusHolding(fan: Fan, zM: number, share: number, blurM: number): number {
  const order = Array.from(fan.weight, (weight, k) => ({ weight, x: Math.abs((fan.x0[k] ?? 0) + (fan.slope[k] ?? 0) * zM) }));
  order.sort((a, b) => a.x - b.x);
  const total = order.reduce((sum, ray) => sum + ray.weight, 0);
  let sum = 0;
  for (const ray of order) {
    sum += ray.weight;
    if (sum >= share * total) return Math.hypot(ray.x, blurM);
  }
  return blurM;
}
