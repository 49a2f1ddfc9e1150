import type { FigureInk, FigureMark, ReportFigure } from '#app/domain/report-document.ts';

const strokes: Record<FigureInk, string> = {
  ink: 'stroke-ink', second: 'stroke-second', hair: 'stroke-hair', edge: 'stroke-edge', card: 'stroke-card-edge', 'card-text': 'stroke-card-text',
  pale: 'stroke-pale-edge', slot: 'stroke-slot', burn: 'stroke-burn', clear: 'stroke-clear', paper: 'stroke-paper',
};
const fills: Record<FigureInk, string> = {
  ink: 'fill-ink', second: 'fill-second', hair: 'fill-hair', edge: 'fill-edge', card: 'fill-card', 'card-text': 'fill-card-text',
  pale: 'fill-pale', slot: 'fill-slot', burn: 'fill-burn', clear: 'fill-clear', paper: 'fill-paper',
};
const beds = { paper: 'stroke-sheet', card: 'stroke-card' } as const;
const path = (points: readonly (readonly [number, number])[]) => points.map(([x, y], index) => `${index === 0 ? 'M' : 'L'}${x.toFixed(2)} ${y.toFixed(2)}`).join(' ');

/** A figure of a report as a drawing that scales with its frame; the alternative text says what it shows. */
export function FigureSvg({ figure }: { readonly figure: ReportFigure }) {
  return (
    <svg viewBox={`0 0 ${figure.widthPt.toFixed(1)} ${figure.heightPt.toFixed(1)}`} width="100%" role="img" aria-label={figure.alt} className="block overflow-visible">
      {figure.marks.map((mark, index) => <Mark key={index} mark={mark} />)}
    </svg>
  );
}

function Mark({ mark }: { readonly mark: FigureMark }) {
  switch (mark.mark) {
    case 'line':
      return <path d={path(mark.points)} className={`fill-none ${strokes[mark.ink]}`} strokeWidth={mark.widthPt} strokeDasharray={mark.dash?.join(' ')} />;
    case 'area':
      return <path d={`${path(mark.points)} Z`} className={`${mark.fill ? fills[mark.fill] : 'fill-none'} ${mark.edge ? strokes[mark.edge] : 'stroke-none'}`} strokeWidth={mark.widthPt ?? 1} fillOpacity={mark.opacity} />;
    case 'rect':
      return <rect x={mark.x} y={mark.y} width={mark.width} height={mark.height} rx={mark.roundPt} className={`${mark.fill ? fills[mark.fill] : 'fill-none'} ${mark.edge ? strokes[mark.edge] : 'stroke-none'}`} strokeWidth={mark.widthPt ?? 1} fillOpacity={mark.opacity} />;
    case 'dot':
      return <circle cx={mark.x} cy={mark.y} r={mark.radiusPt} className={`${mark.fill ? fills[mark.fill] : 'fill-none'} ${mark.edge ? strokes[mark.edge] : 'stroke-none'}`} fillOpacity={mark.opacity} />;
    case 'text':
      return <text x={mark.x} y={mark.y} fontSize={mark.sizePt} textAnchor={mark.anchor ?? 'start'} className={`${fills[mark.ink ?? 'ink']} ${mark.bold ? 'font-semibold' : ''} ${mark.bed ? beds[mark.bed] : ''}`} {...(mark.bed ? { strokeWidth: 3, strokeLinejoin: 'round', paintOrder: 'stroke' } : {})}>{mark.text}</text>;
  }
}
