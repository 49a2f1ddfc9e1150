import { degree } from '#app/physics/units.ts';
import { geocentricSun } from './ephemeris.ts';
import { observerInEarthRadii, parallaxSine, type Observer } from './solar-position.ts';

/** Airless topocentric unit vectors to the sun, one a step, in three parallel arrays. */
export interface SunScan {
  readonly startMs: number;
  readonly stepMs: number;
  readonly count: number;
  readonly east: Float64Array;
  readonly north: Float64Array;
  readonly up: Float64Array;
}

const nodeMs = 43_200_000;
const siderealDegPerMs = 360.98564736629 / 86_400_000;

/** The sun in the frame of the equator at one node, with its parallax and the equation of the equinoxes. */
interface Node {
  readonly x: number;
  readonly y: number;
  readonly z: number;
  readonly parallax: number;
  readonly siderealDeg: number;
  readonly equinoxesDeg: number;
}

function nodeAt(utcMs: number): Node {
  const sun = geocentricSun(utcMs);
  const declination = sun.declinationDeg * degree;
  const rightAscension = sun.rightAscensionDeg * degree;
  return {
    x: Math.cos(declination) * Math.cos(rightAscension),
    y: Math.cos(declination) * Math.sin(rightAscension),
    z: Math.sin(declination),
    parallax: parallaxSine(sun.distanceAu),
    siderealDeg: sun.siderealTimeDeg,
    equinoxesDeg: sun.equationOfEquinoxesDeg,
  };
}

/** Coefficients by rising powers of s of the cubic through p0…p3 at s = −1, 0, 1, 2. */
function cubicThrough(p0: number, p1: number, p2: number, p3: number): readonly [number, number, number, number] {
  return [
    p1,
    -p0 / 3 - p1 / 2 + p2 - p3 / 6,
    p0 / 2 - p1 + p2 / 2,
    -p0 / 6 + p1 / 2 - p2 / 2 + p3 / 6,
  ];
}

/** Fills one segment between two nodes. Plain arithmetic: the only trigonometry is one sine and cosine a segment. */
function fillSegment(
  scan: SunScan, first: number, last: number, segmentMs: number,
  nodes: readonly [Node, Node, Node, Node], longitudeDeg: number, place: readonly [number, number], latitude: number,
): void {
  const [n0, n1, n2, n3] = nodes;
  const [x0, x1, x2, x3] = cubicThrough(n0.x, n1.x, n2.x, n3.x);
  const [y0, y1, y2, y3] = cubicThrough(n0.y, n1.y, n2.y, n3.y);
  const [z0, z1, z2, z3] = cubicThrough(n0.z, n1.z, n2.z, n3.z);
  const rateDegPerMs = siderealDegPerMs + (n2.equinoxesDeg - n1.equinoxesDeg) / nodeMs;
  const offsetMs = scan.startMs + first * scan.stepMs - segmentMs;
  const begin = (n1.siderealDeg + rateDegPerMs * offsetMs + longitudeDeg) * degree;
  const turn = rateDegPerMs * scan.stepMs * degree;
  const cosTurn = Math.cos(turn);
  const sinTurn = Math.sin(turn);
  const axial = place[0] * n1.parallax;
  const polar = place[1] * n1.parallax;
  const sinLat = Math.sin(latitude);
  const cosLat = Math.cos(latitude);
  const sStep = scan.stepMs / nodeMs;
  let s = offsetMs / nodeMs;
  let c = Math.cos(begin);
  let d = Math.sin(begin);
  const { east, north, up } = scan;
  for (let i = first; i < last; i++) {
    const x = x0 + s * (x1 + s * (x2 + s * x3));
    const y = y0 + s * (y1 + s * (y2 + s * y3));
    const z = z0 + s * (z1 + s * (z2 + s * z3)) - polar;
    const meridian = c * x + d * y - axial;
    const west = d * x - c * y;
    const inverse = 1 / Math.sqrt(meridian * meridian + west * west + z * z);
    east[i] = -west * inverse;
    north[i] = (cosLat * z - sinLat * meridian) * inverse;
    up[i] = (cosLat * meridian + sinLat * z) * inverse;
    s += sStep;
    const turned = c * cosTurn - d * sinTurn;
    d = d * cosTurn + c * sinTurn;
    c = turned;
  }
}

/**
 * Airless directions to the sun at evenly spaced instants: the ephemeris every twelve hours, a cubic between, and the
 * earth's turn by a running rotation. Within 1e-6° of the full chain (tests/unit/physics/sun/sun-scan.test.ts).
 *
 * @param startMs First instant, milliseconds since 1970, UTC.
 * @param stepMs Spacing, at most twelve hours. [ms]
 * @param count Number of instants.
 */
export function scanSun(observer: Observer, startMs: number, stepMs: number, count: number): SunScan {
  const scan: SunScan = {
    startMs, stepMs, count, east: new Float64Array(count), north: new Float64Array(count), up: new Float64Array(count),
  };
  const place = observerInEarthRadii(observer.latitudeDeg, observer.elevationM);
  const latitude = observer.latitudeDeg * degree;
  let segmentMs = Math.floor(startMs / nodeMs) * nodeMs;
  let nodes: [Node, Node, Node, Node] = [
    nodeAt(segmentMs - nodeMs), nodeAt(segmentMs), nodeAt(segmentMs + nodeMs), nodeAt(segmentMs + 2 * nodeMs),
  ];
  let first = 0;
  while (first < count) {
    const last = Math.min(count, Math.ceil((segmentMs + nodeMs - startMs) / stepMs));
    if (last > first) fillSegment(scan, first, last, segmentMs, nodes, observer.longitudeDeg, place, latitude);
    first = Math.max(first, last);
    segmentMs += nodeMs;
    nodes = [nodes[1], nodes[2], nodes[3], nodeAt(segmentMs + 2 * nodeMs)];
  }
  return scan;
}
