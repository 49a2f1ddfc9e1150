import type { Vector } from '#app/physics/vector.ts';
import { dot } from '#app/physics/vector.ts';
import { backEstimate } from './back-estimate.ts';
import { bestDistances, lineHint, naturalPlane } from './best-plane.ts';
import type { LocalPlane, PlaneHits } from './bundle.ts';
import { cutPlane } from './bundle.ts';
import { batchMean, discPowers } from './disc-power.ts';
import { enclosingRadii, gridOf, profileAlong, widthAbove } from './flux-map.ts';
import { addScaled, toGlobal, toLocal, unitOf } from './frame.ts';
import { guardRadiance, radianceBound } from './guards.ts';
import type { SpotFinder } from './hot-spot.ts';
import { batchCount } from './kernel.ts';
import type { TracedOptic } from './trace-bundle.ts';
import { traceBundle } from './trace-bundle.ts';
import type { BestPlane, ContourWidth, DiscName, FluxGrid, TraceDisc, TraceRequest, TraceResult } from './trace-model.ts';
import { discNames } from './trace-model.ts';
import { newWorkspace } from './workspace.ts';

/** Paths traced back for one disc: fewer where fewer rays were asked for. */
const backPaths = (rays: number): number => Math.max(2048, Math.min(32768, rays / 4));

/** Rays that a hot spot should rest on. */
export const fewestRays = 200;

/** Place in a plane's axes. [m] */
interface Place {
  readonly x: number;
  readonly y: number;
}

/** One receiver plane with everything measured in it. */
interface Cut {
  readonly plane: LocalPlane;
  readonly hits: PlaneHits;
}

/** Rounds for output. */
export const digits = (value: number, count = 6): number => (Number.isFinite(value) ? Number(value.toPrecision(count)) : value);
const rounded = (v: Vector): Vector => [digits(v[0], 9), digits(v[1], 9), digits(v[2], 9)];

function pointOf(cut: Cut, x: number, y: number): Vector {
  return addScaled(addScaled(cut.plane.origin, cut.hits.columnDirection, x), cut.hits.rowDirection, y);
}

/** Measures discs in planes of one traced optic. */
class Focus {
  readonly request: TraceRequest;
  readonly traced: TracedOptic;
  readonly #finder: SpotFinder;
  readonly #mark: Vector | null;
  readonly #bound: number;

  constructor(request: TraceRequest, traced: TracedOptic, finder: SpotFinder) {
    this.request = request;
    this.traced = traced;
    this.#finder = finder;
    this.#mark = request.mark ? toLocal(traced.kernel.frame, request.mark) : null;
    this.#bound = radianceBound(traced.kernel.transmittanceBound, traced.sun.halfAngleRad, traced.sun.limbU);
  }

  cut(plane: LocalPlane, hits: PlaneHits): Cut {
    const trail = this.request.trailDirection;
    return { plane, hits: cutPlane(this.traced.bundle, plane, hits, Infinity, trail ? toLocal(this.traced.kernel.frame, trail) : undefined) };
  }

  /** Hot spot of a disc in a plane, sought in some of the hits; the place of the central ray if no light reaches it. */
  hotSpot(cut: Cut, diameterM: number, from = 0, to = cut.hits.count): Place {
    const line = lineHint(this.traced, cut.plane, cut.hits, this.#mark);
    return this.#finder.find(cut.hits, diameterM / 2, line, fewestRays, 'exact', from, to) ?? { x: 0, y: 0 };
  }

  /**
   * Hot spot with its power, batch by batch. Each half of the batches is measured at the place that the other half
   * found: the best of many noisy places would otherwise always look better than it is.
   */
  crossValidated(cut: Cut, diameterM: number): { readonly at: Place; readonly powers: number[] } {
    const { hits } = cut;
    const half = batchCount / 2;
    const middle = hits.batchEnd[half - 1] ?? 0;
    const a = this.hotSpot(cut, diameterM, 0, middle);
    const b = this.hotSpot(cut, diameterM, middle, hits.count);
    const atA = discPowers(hits, a.x, a.y, diameterM / 2);
    const atB = discPowers(hits, b.x, b.y, diameterM / 2);
    const sum = (p: readonly number[]): number => p.reduce((x, y) => x + y, 0);
    const near = Math.hypot(a.x - b.x, a.y - b.y) < diameterM / 2;
    const at = near ? { x: (a.x + b.x) / 2, y: (a.y + b.y) / 2 } : sum(atA) > sum(atB) ? a : b;
    return { at, powers: [...atB.slice(0, half), ...atA.slice(half)] };
  }

  /** Foot of the mark in the plane's axes. */
  markIn(cut: Cut): Place | null {
    if (!this.#mark) return null;
    const offset = addScaled(this.#mark, cut.plane.origin, -1);
    return { x: dot(offset, cut.hits.columnDirection), y: dot(offset, cut.hits.rowDirection) };
  }

  /** Disc on its own hot spot in a plane. */
  hotDisc(name: DiscName, diameterM: number, cut: Cut): TraceDisc {
    const { at, powers } = this.crossValidated(cut, diameterM);
    return this.#disc(name, diameterM, cut, 'hot spot', at, powers);
  }

  /** Disc on the foot of the mark; none without a mark. */
  markDisc(name: DiscName, diameterM: number, cut: Cut): TraceDisc[] {
    const at = this.markIn(cut);
    return at ? [this.#disc(name, diameterM, cut, 'mark', at, discPowers(cut.hits, at.x, at.y, diameterM / 2))] : [];
  }

  /** Concentration from forward rays, or traced back where too few of them fall on the disc. */
  #disc(name: DiscName, diameterM: number, cut: Cut, centre: 'hot spot' | 'mark', at: Place, powers: readonly number[]): TraceDisc {
    const { kernel, sun } = this.traced;
    const area = (Math.PI / 4) * diameterM * diameterM;
    const forward = batchMean(powers);
    let estimate = { concentration: forward.mean / area, stdError: forward.stdError / area };
    let estimator: TraceDisc['estimator'] = 'forward';
    const position = pointOf(cut, at.x, at.y);
    if (kernel.backTrace && !(forward.stdError < 0.03 * forward.mean)) {
      const back = backEstimate(kernel.backTrace, position, cut.plane, diameterM, backPaths(this.traced.rays), this.request.seed);
      if (forward.mean === 0 || (back.concentration > 0 && back.stdError < estimate.stdError)) {
        estimate = back;
        estimator = 'back-traced';
      }
    }
    guardRadiance(estimate.concentration, estimate.stdError, this.#bound * (1 + sun.circumsolarRatio));
    const mark = this.markIn(cut);
    return {
      disc: name,
      diameterM: digits(diameterM),
      centre,
      concentration: digits(estimate.concentration),
      stdError: digits(estimate.stdError, 3),
      estimator,
      positionM: rounded(toGlobal(kernel.frame, position)),
      offsetFromMarkM: centre === 'mark' ? 0 : mark ? digits(Math.hypot(at.x - mark.x, at.y - mark.y)) : null,
      planeDistanceM: digits(dot(position, kernel.planeNormal) / dot(kernel.focalAxis, kernel.planeNormal)),
    };
  }

  /** Second answer on the 5 mm disc at the mark, or at the hot spot. */
  backTraced(cut: Cut, hot: Place): TraceResult['backTraced'] {
    const { backTrace } = this.traced.kernel;
    if (!backTrace) return null;
    const mark = this.markIn(cut);
    const at = mark ?? hot;
    const { concentration, stdError } = backEstimate(backTrace, pointOf(cut, at.x, at.y), cut.plane, 0.005, backPaths(this.traced.rays), this.request.seed);
    return { centre: mark ? 'mark' : 'hot spot', diameterM: 0.005, concentration: digits(concentration), stdError: digits(stdError, 3) };
  }

  grid(cut: Cut, at: Place, r50: number, imageM: number): FluxGrid | null {
    const cells = this.request.gridCells ?? 48;
    if (cells === 0) return null;
    const { frame } = this.traced.kernel;
    const size = Math.max(3 * imageM, Math.min(2.4 * r50, 12 * imageM));
    return {
      cells,
      sizeM: digits(size),
      centreM: rounded(toGlobal(frame, pointOf(cut, at.x, at.y))),
      columnDirection: rounded(toGlobal(frame, cut.hits.columnDirection)),
      rowDirection: rounded(toGlobal(frame, cut.hits.rowDirection)),
      concentration: gridOf(cut.hits, at.x, at.y, cells, size),
    };
  }

  contours(cut: Cut, at: Place, imageM: number, r80: number): ContourWidth[] {
    const thresholds = this.request.thresholdsSuns ?? [];
    if (thresholds.length === 0) return [];
    const { trailDirection } = this.request;
    const trail = trailDirection ? toLocal(this.traced.kernel.frame, trailDirection) : cut.hits.columnDirection;
    let ux = dot(trail, cut.hits.columnDirection);
    let uy = dot(trail, cut.hits.rowDirection);
    const size = Math.hypot(ux, uy);
    if (size < 1e-6) throw new RangeError('trailDirection runs along the normal of the receiver');
    ux /= size;
    uy /= size;
    const disc = Math.max(5e-4, Math.min(imageM, 0.005));
    const profile = profileAlong(cut.hits, at.x, at.y, ux, uy, disc, Math.max(3 * r80, 3 * imageM));
    return thresholds.map((thresholdSuns) => ({ thresholdSuns, widthM: digits(widthAbove(profile, thresholdSuns), 4) }));
  }
}

function discDiameters(traced: TracedOptic): Record<DiscName, number> {
  const image = 2 * traced.kernel.imageFocalM * Math.tan(traced.sun.halfAngleRad);
  return { 'sun-image': image, '1 mm': 0.001, '5 mm': 0.005 };
}

function requestedPlane(request: TraceRequest, traced: TracedOptic): LocalPlane | null {
  if (request.receiver.kind === 'best plane') return null;
  const { frame } = traced.kernel;
  return { origin: toLocal(frame, request.receiver.origin), normal: toLocal(frame, unitOf(request.receiver.normal, 'receiver.normal')) };
}

/**
 * Traces an optic and measures its focus.
 *
 * Concentrations are power through a disc over disc area times the direct irradiance at the optic; losses in the optic
 * and the receiver's cosine are in it, the target's absorptance is not. The same request gives the same answer.
 *
 * @throws RangeError for input outside its range or fields that disagree.
 * @throws PhysicsGuardError if energy is not conserved or radiance would rise.
 */
export function traceFocus(request: TraceRequest): TraceResult {
  return measureFocus(request, traceBundle(request));
}

/** As `traceFocus`, with the rays at hand; several receivers can share them. */
export function measureFocus(request: TraceRequest, traced: TracedOptic, workspace = newWorkspace(traced.bundle.capacity)): TraceResult {
  const { kernel } = traced;
  const { finder, hits } = workspace;
  const focus = new Focus(request, traced, finder);
  const diameters = discDiameters(traced);
  const imageM = diameters['sun-image'];
  const distances = bestDistances(traced, discNames.map((n) => diameters[n] / 2), finder, hits);
  const asked = requestedPlane(request, traced);
  const discs: TraceDisc[] = [];
  const bestPlanes: BestPlane[] = discNames.map((name, i) => {
    const distanceM = distances[i] ?? kernel.focalDistanceM;
    const cut = focus.cut(naturalPlane(traced, distanceM), hits);
    const best = focus.hotDisc(name, diameters[name], cut);
    if (!asked) discs.push(best, ...focus.markDisc(name, diameters[name], cut));
    return { disc: name, diameterM: best.diameterM, distanceM: digits(distanceM), concentration: best.concentration };
  });
  const cut = focus.cut(asked ?? naturalPlane(traced, distances[0] ?? kernel.focalDistanceM), hits);
  if (asked) for (const name of discNames) discs.push(focus.hotDisc(name, diameters[name], cut), ...focus.markDisc(name, diameters[name], cut));
  const hot = focus.hotSpot(cut, Math.min(imageM, 0.005));
  const [r50 = 0, r80 = 0] = enclosingRadii(cut.hits, hot.x, hot.y, [0.5, 0.8]);
  return {
    ...shares(traced),
    focusKind: kernel.focusKind,
    focalDistanceM: digits(kernel.focalDistanceM),
    focalAxis: rounded(toGlobal(kernel.frame, kernel.focalAxis)),
    receiver: { origin: rounded(toGlobal(kernel.frame, cut.plane.origin)), normal: rounded(toGlobal(kernel.frame, cut.plane.normal)) },
    discs,
    bestPlanes,
    hotSpotM: rounded(toGlobal(kernel.frame, pointOf(cut, hot.x, hot.y))),
    r50M: digits(r50, 4),
    r80M: digits(r80, 4),
    fluxGrid: focus.grid(cut, hot, r50, imageM),
    contourWidths: focus.contours(cut, hot, imageM, r80),
    backTraced: focus.backTraced(cut, hot),
    assumptions: kernel.assumptions,
    warnings: kernel.warnings,
  };
}

/** Where the power went, as shares of what met the optic. */
function shares(traced: TracedOptic): Pick<TraceResult, 'rays' | 'batches' | 'apertureM2' | 'transmittedFraction' | 'reflectedFraction' | 'absorbedFraction' | 'strayFraction' | 'blockedFraction' | 'worstImbalance'> {
  const { ledger } = traced.bundle;
  const met = ledger.incident;
  const of = (part: number): number => (met > 0 ? digits(part / met) : 0);
  return {
    rays: traced.rays,
    batches: batchCount,
    apertureM2: digits(met + ledger.blocked),
    transmittedFraction: of(ledger.transmitted),
    reflectedFraction: of(ledger.reflected),
    absorbedFraction: of(ledger.absorbed),
    strayFraction: of(ledger.stray),
    blockedFraction: met + ledger.blocked > 0 ? digits(ledger.blocked / (met + ledger.blocked)) : 0,
    worstImbalance: ledger.worstImbalance,
  };
}
