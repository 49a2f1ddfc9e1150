/**
 * A report as a list of blocks, from which the page for the screen and the printed file are both made. Pure data: what is
 * not in it is in neither. Lengths of figures are in points of print (1/72 inch), y pointing down.
 */
export interface ReportDocument {
  /** Raised when blocks change their meaning, so that old documents are still read. */
  readonly format: 1;
  readonly title: string;
  readonly subtitle: string;
  /** At the head of each page: `Case 118, finding version 1`. */
  readonly running: string;
  /** At the foot of each page, such as hashes. */
  readonly foot: string;
  /** BCP 47. */
  readonly language: string;
  /** ISO 8601, UTC: written into the file as its date. */
  readonly dateUtc: string;
  readonly blocks: readonly ReportBlock[];
}

export type ReportBlock =
  | { readonly kind: 'heading'; readonly level: 1 | 2; readonly text: string }
  | { readonly kind: 'text'; readonly text: string; readonly voice?: 'plain' | 'serif' | 'small' }
  | { readonly kind: 'list'; readonly items: readonly string[] }
  | { readonly kind: 'facts'; readonly rows: readonly ReportFact[] }
  | { readonly kind: 'table'; readonly caption: string; readonly head: readonly string[]; readonly widths: readonly number[]; readonly rows: readonly (readonly string[])[] }
  | { readonly kind: 'caution'; readonly text: string }
  | ReportFigure;

export interface ReportFact {
  readonly term: string;
  readonly value: string;
  readonly note?: string;
}

export interface ReportFigure {
  readonly kind: 'figure';
  readonly number: number;
  readonly title: string;
  /** What the figure shows, for those who cannot see it. */
  readonly alt: string;
  readonly widthPt: number;
  readonly heightPt: number;
  readonly marks: readonly FigureMark[];
}

/** Inks of a figure; the page and the print have a colour for each. */
export type FigureInk = 'ink' | 'second' | 'hair' | 'edge' | 'card' | 'card-text' | 'pale' | 'slot' | 'burn' | 'clear' | 'paper';

/** `opacity` is the share of the ink that a fill takes, 0 to 1; all of it where it is left out. */
export type FigureMark =
  | { readonly mark: 'line'; readonly points: readonly FigurePoint[]; readonly ink: FigureInk; readonly widthPt: number; readonly dash?: readonly [number, number] }
  | { readonly mark: 'area'; readonly points: readonly FigurePoint[]; readonly fill?: FigureInk; readonly edge?: FigureInk; readonly widthPt?: number; readonly opacity?: number }
  | { readonly mark: 'rect'; readonly x: number; readonly y: number; readonly width: number; readonly height: number; readonly fill?: FigureInk; readonly edge?: FigureInk; readonly widthPt?: number; readonly roundPt?: number; readonly opacity?: number }
  | { readonly mark: 'dot'; readonly x: number; readonly y: number; readonly radiusPt: number; readonly fill?: FigureInk; readonly edge?: FigureInk; readonly opacity?: number }
  | FigureText;

export type FigurePoint = readonly [x: number, y: number];
export interface FigureText {
  readonly mark: 'text';
  readonly x: number;
  /** Base line. */
  readonly y: number;
  readonly text: string;
  readonly sizePt: number;
  readonly anchor?: 'start' | 'middle' | 'end';
  readonly ink?: FigureInk;
  readonly bold?: boolean;
  /** On a strip of the page's ground, or of a dark body, so that lines under it do not cut it. */
  readonly bed?: 'paper' | 'card';
}
