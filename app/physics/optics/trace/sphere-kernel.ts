/* eslint-disable @typescript-eslint/no-non-null-assertion -- every index is bounded by its loop; a fallback in the hot loops would hide a wrong one as 0 */
import type { SphereOptic } from '#app/physics/optics/optic.ts';
import type { RayBundle } from './bundle.ts';
import type { Launch, Samples } from './kernel.ts';
import type { Channel } from './spectral.ts';

/**
 * Smooth full sphere, first pass. Every ray stays in one plane through the centre, so that the s and p products are
 * exact and the exit follows from the angles at entry alone.
 *
 * Rays start on the disc through the centre across the mean direction to the sun, which is local z. Power reflected
 * inside is summed to its exit as a geometric series: `stray`.
 */
export function traceSphere(optic: SphereOptic, channels: readonly Channel[], samples: Samples, launch: Launch, bundle: RayBundle): void {
  const R = optic.diameterM / 2;
  const { u, sunX, sunY, sunZ, sunWeight, count } = samples;
  const [u0, u1, , , u4] = u;
  if (!u0 || !u1) return;
  const { px, py, pz, dx, dy, dz, weight } = bundle;
  const pick = channelPicker(channels);
  const { rayWeight, blocked } = launch;
  let k = bundle.count;
  let incident = 0;
  let blockedSum = 0;
  let out = 0;
  let back = 0;
  let lost = 0;
  let stray = 0;
  let worst = 0;
  for (let i = 0; i < count; i++) {
    const radius = R * Math.sqrt(u0[i]!);
    const turn = 2 * Math.PI * u1[i]!;
    const ax = radius * Math.cos(turn);
    const ay = radius * Math.sin(turn);
    const sx = sunX[i]!;
    const sy = sunY[i]!;
    const sz = sunZ[i]!;
    const w = rayWeight * sunWeight[i]!;
    if (blocked?.(ax, ay, 0, sx, sy, sz)) {
      blockedSum += w;
      continue;
    }
    const along = ax * sx + ay * sy;
    const bx = ax - along * sx;
    const by = ay - along * sy;
    const bz = -along * sz;
    const b2 = bx * bx + by * by + bz * bz;
    const b = Math.sqrt(b2);
    const channel = u4 ? pick(u4[i]!) : channels[0]!;
    const n = channel.refractiveIndex;
    const si = b / R;
    const sr = si / n;
    const ci = Math.sqrt(1 - si * si);
    const cr = Math.sqrt(1 - sr * sr);
    const rs = (ci - n * cr) / (ci + n * cr);
    const rp = (n * ci - cr) / (n * ci + cr);
    const Rs = rs * rs;
    const Rp = rp * rp;
    const a = channel.transmittance(2 * R * cr);
    const firstS = (1 - Rs) * (1 - Rs) * a;
    const firstP = (1 - Rp) * (1 - Rp) * a;
    const seriesS = 1 / (1 - Rs * a);
    const seriesP = 1 / (1 - Rp * a);
    const t = (firstS + firstP) / 2;
    const r = (Rs + Rp) / 2;
    const absorbed = ((1 - Rs) * seriesS + (1 - Rp) * seriesP) * (1 - a) * 0.5;
    const rest = (firstS * seriesS * Rs + firstP * seriesP * Rp) * a * 0.5;
    worst = Math.max(worst, Math.abs(1 - t - r - absorbed - rest));
    incident += w;
    out += w * t;
    back += w * r;
    lost += w * absorbed;
    stray += w * rest;
    // Unit vector towards the centre; any direction serves for a ray through it.
    const f = b > 0 ? -1 / b : 0;
    const ex = bx * f;
    const ey = by * f;
    const ez = bz * f;
    const c1 = ci * cr + si * sr;
    const s1 = si * cr - ci * sr;
    const c2 = c1 * c1 - s1 * s1;
    const s2 = 2 * s1 * c1;
    const chord = 2 * R * cr;
    const goIn = R * ci - chord * c1;
    const goSide = chord * s1;
    px[k] = bx + goIn * sx + goSide * ex;
    py[k] = by + goIn * sy + goSide * ey;
    pz[k] = bz + goIn * sz + goSide * ez;
    dx[k] = s2 * ex - c2 * sx;
    dy[k] = s2 * ey - c2 * sy;
    dz[k] = s2 * ez - c2 * sz;
    weight[k] = w * t;
    k++;
  }
  bundle.count = k;
  const ledger = bundle.ledger;
  ledger.incident += incident;
  ledger.blocked += blockedSum;
  ledger.transmitted += out;
  ledger.reflected += back;
  ledger.absorbed += lost;
  ledger.stray += stray;
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
