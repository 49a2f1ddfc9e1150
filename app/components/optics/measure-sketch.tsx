import type { ReactNode } from 'react';
import type { ReportDimension } from '#app/domain/report-optic-sizes.ts';
import { sizeQuestions } from '#app/domain/report-optic-sizes.ts';
import type { SceneOpticKind } from '#app/domain/scene.ts';
import { opticDrawingNames, opticDrawings } from './optic-drawing.tsx';

/** Where one size is taken: a line with a tick at each end, and the place of its letter. */
interface SizeMark {
  readonly dimension: ReportDimension;
  readonly from: readonly [number, number];
  readonly to: readonly [number, number];
  readonly letterAt: readonly [number, number];
}

interface Sketch {
  /** The thing; left out: as in the picker. */
  readonly thing?: ReactNode;
  /** A straight edge laid on it, dashed. */
  readonly edge?: string;
  readonly marks: readonly SizeMark[];
}

const mark = (dimension: ReportDimension, from: readonly [number, number], to: readonly [number, number], letterAt: readonly [number, number]): SizeMark => ({ dimension, from, to, letterAt });

const sketches: Record<Exclude<SceneOpticKind, 'dont-know'>, Sketch> = {
  'curved-mirror': { edge: 'M44 3.5 45 34.5', marks: [mark('diameterMm', [34, 5], [34, 33], [29.5, 21]), mark('sagittaMm', [44.5, 19], [48.8, 19], [60, 21])] },
  'glass-ball': { marks: [mark('diameterMm', [12, 3], [40, 3], [45, 5])] },
  'bowl-or-vase': { marks: [mark('diameterMm', [11, 7], [53, 7], [58, 9]), mark('liquidDepthMm', [32, 19], [32, 34], [37, 29])] },
  bottle: { marks: [mark('diameterMm', [21, 46], [41, 46], [46, 47.5]), mark('heightMm', [48, 24], [48, 42], [53, 35])] },
  'window-pane': {
    thing: <><path d="M8 6h20v32H8Z" /><path d="M45 6c-5 10-5 22 0 32h5V6Z" /></>,
    edge: 'M41.2 4v36',
    marks: [mark('widthMm', [8, 42], [28, 42], [33, 44]), mark('heightMm', [3, 6], [3, 38], [3, 45.5]), mark('centreBowMm', [41.2, 10], [43.6, 10], [36, 12])],
  },
  'curved-building-face': { marks: [mark('widthMm', [5, 8], [59, 8], [32, 5.5]), mark('radiusOfCurvatureM', [32, 10], [32, 29], [36.5, 21]), mark('paneWidthMm', [44.5, 26], [54, 19], [54, 27])] },
  'metal-trim': { edge: 'M42 2.5 44.2 39', marks: [mark('widthMm', [34, 4], [36, 38], [30, 22]), mark('sagittaMm', [43, 20], [48.4, 20], [55, 22])] },
  dish: { edge: 'M4 18h56', marks: [mark('diameterMm', [7, 12], [57, 12], [61, 9]), mark('sagittaMm', [32, 18], [32, 31.5], [37, 26])] },
  magnifier: { marks: [mark('diameterMm', [17, 4], [17, 34], [11.5, 21])] },
  'flat-plastic-lens': {
    thing: <><path d="M16 5h32v32H16Z" /><circle cx="32" cy="21" r="4" strokeWidth="1" /><circle cx="32" cy="21" r="9" strokeWidth="1" /><circle cx="32" cy="21" r="14" strokeWidth="1" /></>,
    marks: [mark('widthMm', [16, 42], [48, 42], [53, 44]), mark('heightMm', [10, 5], [10, 37], [5, 23])],
  },
  telescope: { marks: [mark('diameterMm', [12.5, 7.5], [20.5, -0.5], [10, 4])] },
  'water-on-dome': { marks: [mark('diameterMm', [11.5, 10], [52.5, 10], [32, 7.5]), mark('sagittaMm', [32, 21.5], [32, 27.6], [37, 34])] },
};

/** Letter of a size in the sketch of its kind; null where the sketch does not show it. */
export function sizeLetter(kind: SceneOpticKind, dimension: ReportDimension): string | null {
  if (kind === 'dont-know' || !sketches[kind].marks.some((one) => one.dimension === dimension)) return null;
  const drawn = sizeQuestions[kind].filter((question) => sketches[kind].marks.some((one) => one.dimension === question.dimension));
  return String.fromCodePoint(65 + drawn.findIndex((question) => question.dimension === dimension));
}

/** Where to measure: the thing in ink, the sizes as lines with the letters of the questions. */
export function MeasureSketch({ kind }: { readonly kind: SceneOpticKind }) {
  if (kind === 'dont-know') return null;
  const { thing, edge, marks } = sketches[kind];
  const drawing = opticDrawings[kind];
  const said = marks.map(({ dimension }) => sizeLetter(kind, dimension)).join(', ');
  return (
    <svg viewBox="-2 -4 68 54" width="272" height="216" className="max-w-full" role="img" aria-label={`${opticDrawingNames[kind]}: where to measure ${said}. Each letter is explained below.`}>
      <g className="fill-none stroke-ink" strokeLinecap="round" strokeLinejoin="round" strokeWidth="1.5">
        {thing ?? <>{drawing.thing}<g strokeWidth="0.8">{drawing.detail}</g></>}
      </g>
      {edge ? <path d={edge} className="fill-none stroke-second" strokeWidth="0.8" strokeDasharray="2 1.4" /> : null}
      {marks.map((one) => <SizeLine key={one.dimension} size={one} letter={sizeLetter(kind, one.dimension) ?? ''} />)}
    </svg>
  );
}

function SizeLine({ size: { from, to, letterAt }, letter }: { readonly size: SizeMark; readonly letter: string }) {
  const [dx, dy] = [to[0] - from[0], to[1] - from[1]];
  const length = Math.hypot(dx, dy);
  const tick = [(-dy / length) * 1.6, (dx / length) * 1.6] as const;
  const end = ([x, y]: readonly [number, number]) => `M${x - tick[0]} ${y - tick[1]}L${x + tick[0]} ${y + tick[1]}`;
  return (
    <g>
      <path d={`M${from.join(' ')}L${to.join(' ')}${end(from)}${end(to)}`} className="fill-none stroke-burn" strokeWidth="1" />
      <text x={letterAt[0]} y={letterAt[1]} className="fill-ink font-semibold" fontSize="5" textAnchor="middle">{letter}</text>
    </g>
  );
}
