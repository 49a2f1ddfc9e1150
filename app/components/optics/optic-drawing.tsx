import type { ReactNode } from 'react';

export const opticDrawingKinds = [
  'metal-trim', 'window-pane', 'curved-building-face', 'curved-mirror', 'glass-ball', 'bowl-or-vase', 'bottle', 'dish', 'magnifier', 'flat-plastic-lens', 'telescope', 'water-on-dome', 'dont-know',
] as const;
export type OpticDrawingKind = (typeof opticDrawingKinds)[number];

export const opticDrawingNames: Record<OpticDrawingKind, string> = {
  'curved-mirror': 'Curved mirror',
  'glass-ball': 'Glass ball',
  'bowl-or-vase': 'Bowl or vase',
  bottle: 'Bottle',
  'window-pane': 'Window pane',
  'curved-building-face': 'Curved building face',
  'metal-trim': 'Metal trim or parapet',
  dish: 'Dish or cooker',
  magnifier: 'Magnifier or lens',
  'flat-plastic-lens': 'Flat plastic lens',
  telescope: 'Telescope',
  'water-on-dome': 'Water on a rooflight',
  'dont-know': "Don't know",
};

interface Drawing {
  /** The thing itself. */
  readonly thing: ReactNode;
  /** At most one fine detail. */
  readonly detail?: ReactNode;
  /** Rays, entering from the upper left and meeting where the light lands. */
  readonly rays: string;
  /** Centre of the landing bar. */
  readonly lands: readonly [number, number];
}

/** The things themselves, for other drawings of them. */
export const opticDrawings: Record<Exclude<OpticDrawingKind, 'dont-know'>, Drawing> = {
  'curved-mirror': {
    thing: <path d="M44 5c6 9 6 19 1 28l-3 9M35 45h15M42 42v3" />,
    detail: <path d="m49 8 4-2M51 14l4-1M51.5 20h4M51 26l4 1" />,
    rays: 'M4 5 47 12 17 25M4 18 48 26 17 25',
    lands: [15, 26],
  },
  'glass-ball': {
    thing: <path d="M26 34a14 14 0 1 1 .1 0M20 38h13" />,
    rays: 'M3 4 22 7 39 23 56 40M12 1 30 7 40 20 56 40M3 16 13 26 28 33 56 40',
    lands: [56, 41],
  },
  'bowl-or-vase': {
    thing: <path d="M10 12c1 16 8 23 22 23s21-7 22-23M32 35v4M23 39h18" />,
    detail: <path d="M12 19h40" />,
    rays: 'M3 1 20 19 40 45M20 1 33 19 42 33 40 45',
    lands: [40, 45],
  },
  bottle: {
    thing: <path d="M27 4h8v7c5 3 6 5 6 8v25H21V19c0-3 1-5 6-8Z" />,
    detail: <path d="M21 24h20" />,
    rays: 'M3 15 21 25 41 33 58 40M3 25 21 33 41 37 58 40',
    lands: [57, 41],
  },
  'window-pane': {
    thing: <path d="M42 4h7v40h-7Z" />,
    detail: <path d="M42 5c-3.5 12-3.5 26 0 38" />,
    rays: 'M4 2 40 16 12 42M4 13 40 30 12 42',
    lands: [11, 43],
  },
  'curved-building-face': {
    thing: <path d="M5 12c12 23 42 23 54 0" />,
    detail: <path d="m9 20-3 4M20 27l-2 4M32 30v4.5M44 27l2 4M55 20l3 4" />,
    rays: 'M21 1 16 23 31 15M32 1v28V15M45 1l4 22-17-8',
    lands: [32, 14],
  },
  'metal-trim': {
    thing: <path d="M42 4h9v36h-6M42 4c9 11 9 22 2 34M5 44h40" />,
    rays: 'M3 3 47.5 14 22 43M8 18 48 29 22 43',
    lands: [23, 43],
  },
  dish: {
    thing: <path d="M7 18c11 19 39 19 50 0M32 32v8M23 43l9-5 9 5M20 44h24" />,
    rays: 'M17 2 16 25 31 13M32 2v29V13M47 2l1 23-15-12',
    lands: [32, 12],
  },
  magnifier: {
    thing: <path d="M27 4c8 9 8 21 0 30-8-9-8-21 0-30ZM27 34v11" />,
    rays: 'M4 5 26 9 58 29M4 20 27 30 58 29',
    lands: [58, 29],
  },
  'flat-plastic-lens': {
    thing: <path d="M25 4v40M25 4l5 3v7h-5M30 14v7h-5M30 21v7h-5M30 30l-5 5M30 30v5l-5 6M30 38l-5 6M30 35v3" />,
    rays: 'M4 4 27 10 56 27M4 27 27 36 56 27',
    lands: [57, 27],
  },
  telescope: {
    thing: <path d="m23 3 25 25-7 7L16 10ZM45 31l5 5M33 28 24 46M33 28l9 18" />,
    rays: 'M4 2 20 7 52 43M6 12 17 13 52 43',
    lands: [53, 44],
  },
  'water-on-dome': {
    thing: <path d="M6 15v27M58 15v27M6 15c8 17 44 17 52 0M2 15h4M58 15h4" />,
    detail: <path d="M11.5 21.5h41" />,
    rays: 'M13 1 20 21.5 24 26 33 44M27 1 30 21.5 31 28 33 44M42 1 42 21.5 40.5 26.5 33 44',
    lands: [33, 44],
  },
};

function Unknown() {
  return (
    <g className="fill-none stroke-ink" strokeWidth="1.9" strokeLinecap="round">
      <circle cx="32" cy="24" r="15" strokeDasharray="2.6 3.68" />
      <path d="M28 20c0-6 8.5-6 8.5 0 0 4-4.5 3.5-4.5 8" />
      <path d="M32 32.5v.01" strokeWidth="2.6" />
    </g>
  );
}

export interface OpticDrawingProps {
  readonly kind: OpticDrawingKind;
  /** Drawn width; height follows as 3 to 4. [px] 38 and up in rows, 88 in the picker */
  readonly width?: number;
  /** Say the name: where no words stand beside the drawing. */
  readonly named?: boolean;
  /** Said in place of the name. */
  readonly label?: string;
}

/** The thing in ink, light in blue, and where it lands in brown. */
export function OpticDrawing({ kind, width = 38, named = false, label }: OpticDrawingProps) {
  const said = label ?? (named ? opticDrawingNames[kind] : undefined);
  const drawing = kind === 'dont-know' ? null : opticDrawings[kind];
  return (
    <svg width={width} height={(width * 3) / 4} viewBox="0 0 64 48" className="flex-none" {...(said ? { role: 'img', 'aria-label': said } : { 'aria-hidden': true })}>
      {drawing === null ? <Unknown /> : (
        <>
          <path d={drawing.rays} className="fill-none stroke-clear" strokeWidth="1.2" strokeLinejoin="round" />
          <g className="fill-none stroke-ink" strokeLinecap="round" strokeLinejoin="round">
            <g strokeWidth="1.9">{drawing.thing}</g>
            <g strokeWidth="1">{drawing.detail}</g>
          </g>
          <rect x={drawing.lands[0] - 6} y={drawing.lands[1] - 2} width="12" height="4" rx="2" className="fill-burn" />
        </>
      )}
    </svg>
  );
}

export interface OpticPickerProps {
  readonly name: string;
  readonly legend: ReactNode;
  readonly help?: ReactNode;
  readonly chosen?: string | undefined;
}

/** The shapes to pick from; native radios, so it works without a script. */
export function OpticPicker({ name, legend, help, chosen }: OpticPickerProps) {
  return (
    <fieldset id={name} tabIndex={-1}>
      <legend className="pb-1 text-account font-semibold">{legend}</legend>
      {help ? <p className="pb-2 text-small text-second">{help}</p> : null}
      <div className="grid grid-cols-3 gap-px border-[1.5px] border-edge bg-edge tablet:grid-cols-4">
        {opticDrawingKinds.map((kind) => (
          <label key={kind} className={`relative flex cursor-pointer flex-col items-center gap-1 bg-sheet px-1 pt-3 pb-2 text-center text-small ${kind === 'dont-know' ? 'col-span-full' : 'min-h-32'} has-checked:bg-pale has-checked:font-semibold has-checked:outline-4 has-checked:-outline-offset-4 has-checked:outline-card-edge has-focus-visible:z-10 has-focus-visible:outline-3 has-focus-visible:outline-offset-2 has-focus-visible:outline-ink`}>
            <input type="radio" name={name} value={kind} defaultChecked={chosen === kind} className="absolute inset-0 h-full w-full cursor-pointer opacity-0" />
            <OpticDrawing kind={kind} width={kind === 'dont-know' ? 60 : 88} />
            <span>{opticDrawingNames[kind]}</span>
          </label>
        ))}
      </div>
    </fieldset>
  );
}
