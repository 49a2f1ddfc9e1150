import { discWords, fluxSentence, halfSpanMm, scaleBarMm } from '#app/domain/flux-discs.ts';
import type { FluxDiscsData, FluxRing } from '#app/domain/flux-discs.ts';
import { plainNumber } from '#app/domain/plain-number.ts';
import type { FigureMark, FigurePoint, ReportFigure } from '#app/domain/report-document.ts';
import { clipArea, clipPath } from './clip.ts';
import type { FigureBox } from './clip.ts';
import { to2 } from './plot.ts';
import type { FigureOptions } from './window-figure.ts';

const side = 200;
const box: FigureBox = { left: 0.5, top: 0.5, right: side + 0.5, bottom: side + 0.5 };
const middle = side / 2 + 0.5;

interface Map extends FluxDiscsData {
  readonly rings: readonly FluxRing[];
  readonly pt: (mm: number) => number;
  readonly textSize: number;
}

/** Averaging discs to scale over the rings of the flux map; each figure names its disc. Null where no focus was computed. */
export function fluxMapFigure(data: FluxDiscsData, title: string, { number, width, textSize }: Omit<FigureOptions, 'zone'>): ReportFigure | null {
  if (data.discs.length === 0) return null;
  const half = halfSpanMm(data);
  const map: Map = { ...data, rings: (data.rings ?? []).toSorted((a, b) => b.radiusMm - a.radiusMm), pt: (mm) => (mm / half) * (side / 2), textSize };
  const rings = map.rings.map((ring) => ring.fluxKwm2).toSorted((a, b) => a - b);
  return {
    kind: 'figure',
    number,
    title,
    alt: `${fluxSentence(data)}. ${rings.length > 0 ? `${data.focusKind === 'line' ? 'Bands' : 'Rings'} at ${rings.join(', ')} kW/m².` : 'No ring is drawn.'}`,
    widthPt: width,
    heightPt: Math.max(side + 2, 14 + data.discs.length * textSize * 4.2),
    marks: [
      { mark: 'rect', x: box.left, y: box.top, width: side, height: side, edge: 'edge', widthPt: 0.8 },
      ...map.rings.flatMap((ring) => ringMarks(map, ring)),
      ...data.discs.flatMap((disc) => discMarks(map, disc.diameterMm / 2)),
      ...trackMarks(map),
      ...ringWords(map),
      ...(data.edges?.right ? [{ mark: 'text', x: side - 5, y: textSize + 4, text: data.edges.right, sizePt: textSize, anchor: 'end', ink: 'second', bed: 'paper' } satisfies FigureMark] : []),
      ...scaleMarks(map, half),
      ...callouts(map),
    ],
  };
}

/** A point of the target, right and up from the hot spot. */
const at = ({ pt }: Map, rightMm: number, upMm: number): FigurePoint => [middle + pt(rightMm), middle - pt(upMm)];
const rounded = (points: readonly FigurePoint[]): FigurePoint[] => points.map(([x, y]): FigurePoint => [to2(x), to2(y)]);

/** Corners of a band along the line focus, far beyond the picture on both sides, and the direction across it. */
function bandOf(map: Map, radiusMm: number): { readonly edges: readonly [FigurePoint[], FigurePoint[]]; readonly across: readonly [number, number] } {
  const turn = ((map.lineTurnDeg ?? 0) * Math.PI) / 180;
  const [alongX, alongY] = [Math.cos(turn), Math.sin(turn)];
  const across = [-alongY, alongX] as const;
  const farMm = (4 * side) / Math.max(map.pt(1), 1e-9);
  const edge = (sign: 1 | -1): FigurePoint[] => [-farMm, farMm].map((length) => at(map, alongX * length + across[0] * sign * radiusMm, alongY * length + across[1] * sign * radiusMm));
  return { edges: [edge(1), edge(-1)], across };
}

const ringOpacity = 0.17;

function ringMarks(map: Map, { radiusMm }: FluxRing): FigureMark[] {
  if (map.focusKind === 'point') return [{ mark: 'dot', x: middle, y: middle, radiusPt: to2(map.pt(radiusMm)), fill: 'burn', opacity: ringOpacity }];
  const { edges: [first, second] } = bandOf(map, radiusMm);
  const inside = clipArea([...first, ...second.toReversed()], box);
  return inside.length > 2 ? [{ mark: 'area', points: rounded(inside), fill: 'burn', opacity: ringOpacity }] : [];
}

function discMarks(map: Map, radiusMm: number): FigureMark[] {
  if (map.focusKind === 'point') return [{ mark: 'dot', x: middle, y: middle, radiusPt: to2(Math.max(1.5, map.pt(radiusMm))), edge: 'ink' }];
  return bandOf(map, radiusMm).edges.flatMap((edge) => clipPath(edge, box)).map((piece): FigureMark => ({ mark: 'line', points: rounded(piece), ink: 'ink', widthPt: 1.3 }));
}

function trackMarks(map: Map): FigureMark[] {
  const points = map.track?.points ?? [];
  return clipPath(points.map(([right, up]) => at(map, right, up)), box).map((piece): FigureMark => ({ mark: 'line', points: rounded(piece), ink: 'ink', widthPt: 1.1, dash: [4, 3] }));
}

/** Flux of each ring on its lower left edge, from outside inward, as long as there is room. */
function ringWords(map: Map): FigureMark[] {
  const [downX, downY] = map.focusKind === 'line' ? bandOf(map, 1).across : [Math.SQRT1_2, Math.SQRT1_2];
  const sign = downY > 0 ? -1 : 1;
  let free = Infinity;
  return map.rings.flatMap(({ fluxKwm2, radiusMm }): FigureMark[] => {
    const radius = map.pt(radiusMm);
    if (radius > free || radius < map.textSize * 1.4) return [];
    free = radius - map.textSize * 1.6;
    const [x, y] = [middle + sign * downX * radius, middle - sign * downY * radius + map.textSize * 0.35];
    return [{ mark: 'text', x: to2(Math.min(Math.max(x, 14), side - 14)), y: to2(y), text: `${fluxKwm2}`, sizePt: map.textSize, anchor: 'middle', ink: 'burn', bed: 'paper' }];
  });
}

function scaleMarks({ pt, textSize }: Map, halfMm: number): FigureMark[] {
  const mm = scaleBarMm(halfMm);
  const [x, y] = [8, side - 8];
  const tick = (from: number): FigureMark => ({ mark: 'line', points: [[to2(from), y - 3], [to2(from), y + 3]], ink: 'ink', widthPt: 1.2 });
  return [{ mark: 'line', points: [[x, y], [to2(x + pt(mm)), y]], ink: 'ink', widthPt: 1.2 }, tick(x), tick(x + pt(mm)), { mark: 'text', x: to2(x + pt(mm) + 5), y: y + 3, text: `${mm} mm`, sizePt: textSize, bed: 'paper' }];
}

function callouts(map: Map): FigureMark[] {
  const { textSize } = map;
  const x = side + 34;
  const [outX, outY] = map.focusKind === 'line' ? bandOf(map, 1).across : [Math.SQRT1_2, Math.SQRT1_2];
  const sign = outY >= 0 ? 1 : -1;
  // The widest disc is left highest up, so that no two leaders cross.
  const words = map.discs.toSorted((a, b) => b.diameterMm - a.diameterMm).flatMap((disc, index): FigureMark[] => {
    const y = 14 + index * textSize * 4.2;
    const radius = Math.max(1.5, map.pt(disc.diameterMm / 2));
    return [
      { mark: 'line', points: [[to2(middle + sign * outX * radius), to2(middle - sign * outY * radius)], [x - 4, to2(y - 3)]], ink: 'second', widthPt: 0.7 },
      { mark: 'text', x, y: to2(y), text: `${plainNumber(disc.fluxKwm2.mid)} kW/m², mean over the ${disc.disc === 'sun-image' ? `${discWords(disc.disc)}, a ${plainNumber(disc.diameterMm)} mm disc` : discWords(disc.disc)}`, sizePt: textSize, bold: true },
      { mark: 'text', x, y: to2(y + textSize * 1.4), text: `${plainNumber(disc.fluxKwm2.low)} to ${plainNumber(disc.fluxKwm2.high)}; centred on the ${disc.centre}`, sizePt: textSize, ink: 'second' },
    ];
  });
  return map.track ? [...words, { mark: 'text', x, y: to2(14 + map.discs.length * textSize * 4.2), text: map.track.words, sizePt: textSize, ink: 'second' }] : words;
}
