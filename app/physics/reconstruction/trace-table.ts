import type { TraceTableResult } from '#app/physics/model/sampling.ts';
import type { Beam } from '#app/physics/optics/closed-form/beam.ts';
import type { Optic } from '#app/physics/optics/optic.ts';
import { hasAxis, scaledOptic } from '#app/physics/optics/scaled-optic.ts';
import { emptyHits, raysWithin } from '#app/physics/optics/trace/bundle.ts';
import { fillDiscMap, mapShape, readDiscMap, type MapShape } from '#app/physics/optics/trace/disc-map.ts';
import { batchCount } from '#app/physics/optics/trace/kernel.ts';
import { traceBundle, type TracedOptic } from '#app/physics/optics/trace/trace-bundle.ts';
import type { TraceRequest } from '#app/physics/optics/trace/trace-model.ts';
import { halfAngleRad } from '#app/physics/sun/sun-disc.ts';
import type { PlaceInBeam } from '#app/physics/uncertainty.ts';
import { clamp, roundSignificant } from '#app/physics/units.ts';
import { add, cross, dot, scale, subtract, unit, type Vector } from '#app/physics/vector.ts';
import { markDiscM, type JudgedMinute } from './window.ts';

/**
 * Concentration on the mark's disc by traces made once and read by every sample.
 *
 * Axes: the sun along the track (for an optic with an axis this is the incidence), focal length or radius, distance, and
 * place in the target's plane. Between nodes values are linear, distances being taken in focal lengths.
 */
export interface TraceTable {
  readonly concentrationAt: (place: PlaceInBeam) => number;
  readonly summary: TraceTableResult;
}

/** What the table is made about. */
export interface TableQuestion {
  /** Request of the trace at the best minute, with the optic as it is. */
  readonly request: TraceRequest;
  readonly nominal: TracedOptic;
  readonly optic: Optic;
  readonly startsAt: Vector;
  readonly markNormal: Vector;
  /** Directions across the line of sight in which samples are displaced. */
  readonly level: Vector;
  readonly upright: Vector;
  readonly track: readonly JudgedMinute[];
  readonly bestIndex: number;
  readonly best: Beam;
  readonly alongM: number;
  readonly nearRel: number;
  readonly farRel: number;
  readonly widestM: number;
  readonly sigmaOpticRel: number;
}

const distances = 20;
/** Rays looked at for every node; as many traces are made as the optic asks for, so each is kept small. */
const nodeRays = 16_384;
/** Nodes of focal length, in sigmas of its logarithm. */
const scaleSigmas = [-2, 0, 2] as const;
const steepestCosine = 0.05;

/** One trace: the chief ray of its minute and the factor on its focal length. */
interface Node {
  readonly traced: TracedOptic;
  readonly chief: Vector;
  readonly factor: number;
}

function nodeAt(question: TableQuestion, minute: JudgedMinute, factor: number): Node | null {
  const { beam, sun } = minute;
  if (beam === null || -dot(beam.direction, question.markNormal) < steepestCosine) return null;
  if (factor === 1 && beam === question.best) return { traced: question.nominal, chief: beam.direction, factor };
  const traced = traceBundle({
    ...question.request, optic: scaledOptic(question.optic, factor), sunDirection: sun.towardsSun, sunHalfAngleRad: halfAngleRad(sun.distanceAu),
    rays: Math.min(nodeRays, question.request.rays ?? nodeRays),
  });
  return { traced, chief: beam.direction, factor };
}

/** Places in the track at which the light is traced: the best minute, and its ends where the incidence matters. */
function trackNodes({ optic, track, bestIndex }: TableQuestion): number[] {
  const ends = hasAxis(optic) ? [0, bestIndex, track.length - 1] : [bestIndex];
  return [...new Set(ends)].sort((a, b) => a - b);
}

const scaleFactors = (sigma: number): number[] => (sigma > 0 ? scaleSigmas.map((k) => Math.exp(k * sigma)) : [1]);

/** Maps of one node at every distance. */
function mapsOf(node: Node, question: TableQuestion, shape: MapShape, across: Vector, distanceRel: readonly number[]): Float32Array {
  const { startsAt, markNormal, alongM } = question;
  const perBatch = Math.ceil(nodeRays / batchCount);
  const { bundle } = node.traced;
  const looked = raysWithin(bundle, perBatch);
  const hits = emptyHits(Math.max(1, looked));
  const size = shape.side * shape.side;
  const out = new Float32Array(size * distanceRel.length);
  for (const [k, rel] of distanceRel.entries()) {
    const origin = add(startsAt, scale(node.chief, rel * alongM * node.factor));
    fillDiscMap(node.traced, { origin, normal: markNormal }, across, shape, hits, perBatch, bundle.count / Math.max(1, looked), out.subarray(k * size, (k + 1) * size));
  }
  return out;
}

/** Neighbouring nodes of an axis and the share of the upper one; outside the axis its end holds. */
function between(nodes: readonly number[], value: number): readonly [low: number, high: number, share: number] {
  let high = nodes.findIndex((node) => node >= value);
  if (high <= 0) return high === 0 ? [0, 0, 0] : [nodes.length - 1, nodes.length - 1, 0];
  const low = high - 1;
  const span = (nodes[high] ?? 0) - (nodes[low] ?? 0);
  if (span <= 0) high = low;
  return [low, high, span > 0 ? (value - (nodes[low] ?? 0)) / span : 0];
}

/** In-plane coordinates of a sample's mark, and its distance, from its offset across the line of sight. */
function planeCoordinates(question: TableQuestion, across: Vector) {
  const { best, markNormal, level, upright } = question;
  const u = best.direction;
  const facing = dot(u, markNormal);
  const column = cross(across, markNormal);
  const part = (direction: Vector) => {
    const slide = dot(direction, markNormal) / facing;
    const inPlane = subtract(direction, scale(u, slide));
    return { slide, x: dot(inPlane, column), y: dot(inPlane, across) };
  };
  return { level: part(level), upright: part(upright) };
}

/**
 * Traces the nodes and tabulates them; null where the target stands too steep for a plane of it.
 *
 * @throws PhysicsGuardError if energy is not kept in one of the traces.
 */
export function traceTable(question: TableQuestion): TraceTable | null {
  const { best, markNormal, alongM, track, nearRel, farRel } = question;
  if (-dot(best.direction, markNormal) < steepestCosine) return null;
  const across = unit(subtract(question.upright, scale(markNormal, dot(question.upright, markNormal))));
  const shape = mapShape(question.widestM, markDiscM);
  const distanceRel = Array.from({ length: distances }, (_unused, k) => nearRel + ((farRel - nearRel) * k) / (distances - 1));
  const factors = scaleFactors(question.sigmaOpticRel);
  const rows = trackNodes(question).flatMap((index) => {
    const minute = track[index];
    const nodes = minute === undefined ? [] : factors.map((factor) => nodeAt(question, minute, factor));
    return nodes.every((node) => node !== null) && nodes.length > 0 ? [{ index, maps: nodes.map((node) => mapsOf(node, question, shape, across, distanceRel)) }] : [];
  });
  if (rows.length === 0) return null;
  const indices = rows.map((row) => row.index);
  const logFactors = factors.map(Math.log);
  const frame = planeCoordinates(question, across);
  const size = shape.side * shape.side;
  const inMaps = (maps: Float32Array, rel: number, x: number, y: number): number => {
    const step = clamp(((rel - nearRel) / (farRel - nearRel)) * (distances - 1), 0, distances - 1);
    const k = Math.min(distances - 2, Math.floor(step));
    const share = step - k;
    return (1 - share) * readDiscMap(maps, k * size, shape, x, y) + share * readDiscMap(maps, (k + 1) * size, shape, x, y);
  };
  const concentrationAt = ({ trackIndex, alongM: placeM, levelM, uprightM, opticScale }: PlaceInBeam): number => {
    const x = levelM * frame.level.x + uprightM * frame.upright.x;
    const y = levelM * frame.level.y + uprightM * frame.upright.y;
    const rel = (placeM + levelM * frame.level.slide + uprightM * frame.upright.slide) / (alongM * opticScale);
    const [early, late, lateShare] = between(indices, trackIndex);
    const [short, long, longShare] = between(logFactors, Math.log(opticScale));
    const atMinute = (row: number): number => {
      const maps = rows[row]?.maps ?? [];
      const low = inMaps(maps[short] ?? new Float32Array(0), rel, x, y);
      return longShare === 0 ? low : low + longShare * (inMaps(maps[long] ?? new Float32Array(0), rel, x, y) - low);
    };
    const first = atMinute(early);
    return lateShare === 0 ? first : first + lateShare * (atMinute(late) - first);
  };
  return { concentrationAt, summary: summaryOf(question, { indices, factors, distanceRel, shape }) };
}

function summaryOf(question: TableQuestion, nodes: { readonly indices: readonly number[]; readonly factors: readonly number[]; readonly distanceRel: readonly number[]; readonly shape: MapShape }): TraceTableResult {
  const { indices, factors, distanceRel, shape } = nodes;
  const tilts = indices.map((index) => ((question.track[index]?.beam?.tilt ?? 0) * 180) / Math.PI);
  return {
    traces: indices.length * factors.length,
    raysEach: Math.min(nodeRays, question.request.rays ?? nodeRays),
    axes: [
      { axis: 'incidence along the track', unit: '°', nodes: tilts.map((tilt) => roundSignificant(tilt, 3)) },
      { axis: 'focal length or radius over the nominal', unit: '', nodes: factors.map((factor) => roundSignificant(factor, 4)) },
      { axis: 'distance along the beam', unit: 'm', nodes: distanceRel.map((rel) => roundSignificant(rel * question.alongM, 4)) },
      { axis: 'place in the target’s plane, from the middle of the beam', unit: 'm', nodes: [-shape.halfM, 0, shape.halfM].map((value) => roundSignificant(value, 3)) },
    ],
  };
}
