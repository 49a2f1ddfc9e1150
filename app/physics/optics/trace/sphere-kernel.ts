/* eslint-disable @typescript-eslint/no-non-null-assertion -- every index is bounded by its loop; a fallback in the hot loops would hide a wrong one as 0 */
import type { SphereOptic } from '#app/physics/optics/optic.ts';
import type { RayBundle } from './bundle.ts';
import type { Launch, Samples } from './kernel.ts';
import type { Channel } from './spectral.ts';
import { turnCosines, turnSines, turnSteps } from './turn-table.ts';

/**
 * Smooth full sphere, first pass. Every ray stays in one plane through the centre, so that the s and p products are
 * exact and the exit follows from the angles at entry alone.
 *
 * Rays start on the disc through the centre across the mean direction to the sun, which is local z. Power reflected
 * inside is summed to its exit as a geometric series: `stray`.
 */
export function traceSphere(optic: SphereOptic, channels: readonly Channel[], samples: Samples, launch: Launch, bundle: RayBundle): void {
  const R = optic.diameterM / 2;
  const inverseR = 1 / R;
  const inverseR2 = inverseR * inverseR;
  const { u, sunX, sunY, sunZ, sunWeight, count } = samples;
  const [u0, u1, , , u4] = u;
  if (!u0 || !u1) return;
  const { px, py, pz, dx, dy, dz, weight } = bundle;
  const pick = channelPicker(channels);
  const { rayWeight, blocked } = launch;
  const sums = new Float64Array(5);
  let channel = channels[0]!;
  let k = bundle.count;
  let worst = 0;
  for (let i = 0; i < count; i++) {
    const radius = R * Math.sqrt(u0[i]!);
    const turn = u1[i]! * turnSteps;
    const step = turn | 0;
    const part = turn - step;
    const ax = radius * (turnCosines[step]! + (turnCosines[step + 1]! - turnCosines[step]!) * part);
    const ay = radius * (turnSines[step]! + (turnSines[step + 1]! - turnSines[step]!) * part);
    const sx = sunX[i]!;
    const sy = sunY[i]!;
    const sz = sunZ[i]!;
    const w = rayWeight * sunWeight[i]!;
    if (blocked?.(ax, ay, 0, sx, sy, sz)) {
      sums[4] = sums[4]! + w;
      continue;
    }
    const along = ax * sx + ay * sy;
    const bx = ax - along * sx;
    const by = ay - along * sy;
    const bz = -along * sz;
    // Squared sine of incidence. The sine itself cancels from every vector below, so that a ray through the centre needs no case of its own.
    const si2 = (bx * bx + by * by + bz * bz) * inverseR2;
    if (u4) channel = pick(u4[i]!);
    const n = channel.refractiveIndex;
    const inverseN = 1 / n;
    const ci = Math.sqrt(1 - si2);
    const cr = Math.sqrt(1 - si2 * inverseN * inverseN);
    const sDown = ci + n * cr;
    const pDown = n * ci + cr;
    const split = 1 / (sDown * pDown);
    const rs = (ci - n * cr) * pDown * split;
    const rp = (n * ci - cr) * sDown * split;
    const Rs = rs * rs;
    const Rp = rp * rp;
    const chord = 2 * R * cr;
    const a = channel.transmittance(chord);
    const sRest = 1 - Rs * a;
    const pRest = 1 - Rp * a;
    const halfSeries = 0.5 / (sRest * pRest);
    const seriesS = pRest * halfSeries;
    const seriesP = sRest * halfSeries;
    const firstS = (1 - Rs) * (1 - Rs) * a;
    const firstP = (1 - Rp) * (1 - Rp) * a;
    const t = (firstS + firstP) * 0.5;
    const r = (Rs + Rp) * 0.5;
    const absorbed = ((1 - Rs) * seriesS + (1 - Rp) * seriesP) * (1 - a);
    const rest = (firstS * seriesS * Rs + firstP * seriesP * Rp) * a;
    const imbalance = Math.abs(1 - t - r - absorbed - rest);
    if (imbalance > worst) worst = imbalance;
    sums[0] = sums[0]! + w;
    sums[1] = sums[1]! + w * t;
    sums[2] = sums[2]! + w * r;
    sums[3] = sums[3]! + w * absorbed;
    // Angle of the first bend: cosine, and sine over |b|.
    const c1 = ci * cr + si2 * inverseN;
    const k1 = (cr - ci * inverseN) * inverseR;
    const toCentre = chord * k1;
    const goIn = R * ci - chord * c1;
    const keep = 1 - toCentre;
    px[k] = bx * keep + goIn * sx;
    py[k] = by * keep + goIn * sy;
    pz[k] = bz * keep + goIn * sz;
    const c2 = 2 * c1 * c1 - 1;
    const s2 = -2 * k1 * c1;
    dx[k] = s2 * bx - c2 * sx;
    dy[k] = s2 * by - c2 * sy;
    dz[k] = s2 * bz - c2 * sz;
    weight[k] = w * t;
    k++;
  }
  bundle.count = k;
  const { ledger } = bundle;
  const [incident = 0, out = 0, back = 0, lost = 0, stopped = 0] = sums;
  ledger.incident += incident;
  ledger.transmitted += out;
  ledger.reflected += back;
  ledger.absorbed += lost;
  ledger.stray += incident - out - back - lost;
  ledger.blocked += stopped;
  ledger.worstImbalance = Math.max(ledger.worstImbalance, worst);
}

/** Chooses a colour by its share of the power. */
export function channelPicker(channels: readonly Channel[]): (u: number) => Channel {
  const only = channels[0];
  if (!only) throw new RangeError('channels = []; at least one is needed');
  if (channels.length === 1) return () => only;
  const upTo = new Float64Array(channels.length);
  let sum = 0;
  channels.forEach((c, i) => {
    sum += c.weight;
    upTo[i] = sum;
  });
  return (u) => {
    let i = 0;
    while (i < channels.length - 1 && u >= upTo[i]!) i++;
    return channels[i]!;
  };
}
