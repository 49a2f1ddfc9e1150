/** A rectangle on screen: left, top, width and height in pixels. */
export interface Box {
  readonly x: number;
  readonly y: number;
  readonly w: number;
  readonly h: number;
}

export interface LabelRequest {
  /** Where the pin stands. */
  readonly x: number;
  readonly y: number;
  readonly w: number;
  readonly h: number;
}

const TURNS = 16;
const REACHES_PX = [14, 26, 42, 62, 86, 114];

/**
 * Finds a place for each label near its pin, clear of pins, of other labels and of the frame's edge; null where there
 * is none. Earlier requests go first and are not moved later, so pass them in order of weight. `kept` are places
 * already in use, such as buttons.
 */
export function placeLabels(requests: readonly LabelRequest[], frame: Box, pinRadius: number, kept: readonly Box[] = []): (Box | null)[] {
  const pins = requests.map(({ x, y }): Box => ({ x: x - pinRadius, y: y - pinRadius, w: 2 * pinRadius, h: 2 * pinRadius }));
  const taken: Box[] = [...kept];
  const leaders: Leader[] = [];
  return requests.map((request) => {
    if (!holds(frame, { x: request.x, y: request.y, w: 0, h: 0 })) return null;
    for (const box of candidates(request)) {
      const leader: Leader = [request.x, request.y, ...nearestPoint(box, request.x, request.y)];
      const free = holds(frame, box)
        && !taken.some((other) => meets(box, other, 4))
        && !pins.some((pin) => meets(box, pin, 2))
        && !leaders.some((line) => crosses(line, box))
        && !taken.slice(kept.length).some((other) => crosses(leader, other));
      if (!free) continue;
      taken.push(box);
      leaders.push(leader);
      return box;
    }
    return null;
  });
}

type Leader = readonly [x0: number, y0: number, x1: number, y1: number];

/** Places round a pin, near ones first, and to the right before others. */
function candidates({ x, y, w, h }: LabelRequest): Box[] {
  return REACHES_PX.flatMap((reach) => Array.from({ length: TURNS }, (_, k) => {
    const step = k % 2 === 0 ? k / 2 : -(k + 1) / 2;
    const angle = (step * 2 * Math.PI) / TURNS;
    const [dx, dy] = [Math.cos(angle), Math.sin(angle)];
    return {
      x: x + dx * reach + (dx > 0.2 ? 0 : dx < -0.2 ? -w : -w / 2),
      y: y + dy * reach + (dy > 0.2 ? 0 : dy < -0.2 ? -h : -h / 2),
      w, h,
    };
  }));
}

/** The point of a box nearest to a place: where the leader line ends. */
export function nearestPoint(box: Box, x: number, y: number): readonly [number, number] {
  return [Math.min(Math.max(x, box.x), box.x + box.w), Math.min(Math.max(y, box.y), box.y + box.h)];
}

function holds(outer: Box, inner: Box): boolean {
  return inner.x >= outer.x && inner.y >= outer.y && inner.x + inner.w <= outer.x + outer.w && inner.y + inner.h <= outer.y + outer.h;
}

function meets(a: Box, b: Box, gap: number): boolean {
  return a.x < b.x + b.w + gap && b.x < a.x + a.w + gap && a.y < b.y + b.h + gap && b.y < a.y + a.h + gap;
}

/** Whether a line runs through a box (slab test along both axes). */
function crosses([x0, y0, x1, y1]: Leader, box: Box): boolean {
  let [from, to] = [0, 1];
  for (const [start, delta, low, high] of [[x0, x1 - x0, box.x, box.x + box.w], [y0, y1 - y0, box.y, box.y + box.h]] as const) {
    if (Math.abs(delta) < 1e-9) {
      if (start < low || start > high) return false;
      continue;
    }
    const a = (low - start) / delta;
    const b = (high - start) / delta;
    from = Math.max(from, Math.min(a, b));
    to = Math.min(to, Math.max(a, b));
  }
  return from <= to;
}
