/* eslint-disable @typescript-eslint/no-non-null-assertion -- every index is bounded by its loop; a fallback in the hot loops would hide a wrong one as 0 */
/**
 * Refraction and reflection of a ray that carries two field vectors.
 *
 * A register holds direction (0–2), first field (3–5) and second field (6–8). The two fields stand for unpolarised
 * light; the ray's power is half the sum of their squared lengths. Separate s and p products would be wrong wherever
 * the plane of incidence turns from surface to surface. Under total reflection the phase step is left out.
 */
export const registerSize = 9;

/** Direction d with two fields across it, together of power 1. */
export function startRay(ray: Float64Array, dx: number, dy: number, dz: number): void {
  ray[0] = dx;
  ray[1] = dy;
  ray[2] = dz;
  const side = Math.abs(dz) < 0.9;
  let ax = side ? -dy : 0;
  let ay = side ? dx : -dz;
  let az = side ? 0 : dy;
  const inverse = 1 / Math.sqrt(ax * ax + ay * ay + az * az);
  ax *= inverse;
  ay *= inverse;
  az *= inverse;
  ray[3] = ax;
  ray[4] = ay;
  ray[5] = az;
  ray[6] = dy * az - dz * ay;
  ray[7] = dz * ax - dx * az;
  ray[8] = dx * ay - dy * ax;
}

/** Power carried by the fields. */
export function powerOf(ray: Float64Array): number {
  const a = ray[3]! * ray[3]! + ray[4]! * ray[4]! + ray[5]! * ray[5]!;
  const b = ray[6]! * ray[6]! + ray[7]! * ray[7]! + ray[8]! * ray[8]!;
  return (a + b) / 2;
}

/** Scales the fields so that the power is multiplied. */
export function attenuate(ray: Float64Array, factor: number): void {
  const f = Math.sqrt(factor);
  for (let i = 3; i < registerSize; i++) ray[i] = ray[i]! * f;
}

/**
 * Splits a ray at an interface: `ray` becomes the reflected part, `through` the refracted one.
 *
 * @param nx Unit normal against the ray (n·d < 0).
 * @param eta Index on the ray's side over index beyond.
 * @returns Power of the refracted part; 0 under total reflection, `through` is then not written.
 */
export function splitRay(ray: Float64Array, through: Float64Array, nx: number, ny: number, nz: number, eta: number): number {
  const dx = ray[0]!;
  const dy = ray[1]!;
  const dz = ray[2]!;
  let c = -(nx * dx + ny * dy + nz * dz);
  if (c < 0) {
    // A rough wall can tilt a grazing normal past the ray.
    c = -c;
    nx = -nx;
    ny = -ny;
    nz = -nz;
  }
  const k = 1 - eta * eta * (1 - c * c);
  const rx = dx + 2 * c * nx;
  const ry = dy + 2 * c * ny;
  const rz = dz + 2 * c * nz;
  // s is any direction across d and n; at normal incidence the first field's own direction serves.
  let sx = dy * nz - dz * ny;
  let sy = dz * nx - dx * nz;
  let sz = dx * ny - dy * nx;
  const size2 = sx * sx + sy * sy + sz * sz;
  if (size2 < 1e-24) {
    const f = 1 / Math.sqrt(ray[3]! * ray[3]! + ray[4]! * ray[4]! + ray[5]! * ray[5]! || 1);
    sx = ray[3]! * f;
    sy = ray[4]! * f;
    sz = ray[5]! * f;
  } else {
    const f = 1 / Math.sqrt(size2);
    sx *= f;
    sy *= f;
    sz *= f;
  }
  const px = dy * sz - dz * sy;
  const py = dz * sx - dx * sz;
  const pz = dx * sy - dy * sx;
  const s1 = ray[3]! * sx + ray[4]! * sy + ray[5]! * sz;
  const p1 = ray[3]! * px + ray[4]! * py + ray[5]! * pz;
  const s2 = ray[6]! * sx + ray[7]! * sy + ray[8]! * sz;
  const p2 = ray[6]! * px + ray[7]! * py + ray[8]! * pz;
  let rs = 1;
  let rp = 1;
  let power = 0;
  if (k > 0) {
    const ct = Math.sqrt(k);
    rs = (eta * c - ct) / (eta * c + ct);
    rp = (c - eta * ct) / (c + eta * ct);
    const a = eta * c - ct;
    const tx = eta * dx + a * nx;
    const ty = eta * dy + a * ny;
    const tz = eta * dz + a * nz;
    const ts = Math.sqrt(1 - rs * rs);
    const tp = Math.sqrt(1 - rp * rp);
    const qx = ty * sz - tz * sy;
    const qy = tz * sx - tx * sz;
    const qz = tx * sy - ty * sx;
    through[0] = tx;
    through[1] = ty;
    through[2] = tz;
    through[3] = ts * s1 * sx + tp * p1 * qx;
    through[4] = ts * s1 * sy + tp * p1 * qy;
    through[5] = ts * s1 * sz + tp * p1 * qz;
    through[6] = ts * s2 * sx + tp * p2 * qx;
    through[7] = ts * s2 * sy + tp * p2 * qy;
    through[8] = ts * s2 * sz + tp * p2 * qz;
    power = ((1 - rs * rs) * (s1 * s1 + s2 * s2) + (1 - rp * rp) * (p1 * p1 + p2 * p2)) / 2;
  }
  const ux = ry * sz - rz * sy;
  const uy = rz * sx - rx * sz;
  const uz = rx * sy - ry * sx;
  ray[0] = rx;
  ray[1] = ry;
  ray[2] = rz;
  ray[3] = rs * s1 * sx + rp * p1 * ux;
  ray[4] = rs * s1 * sy + rp * p1 * uy;
  ray[5] = rs * s1 * sz + rp * p1 * uz;
  ray[6] = rs * s2 * sx + rp * p2 * ux;
  ray[7] = rs * s2 * sy + rp * p2 * uy;
  ray[8] = rs * s2 * sz + rp * p2 * uz;
  return power;
}
