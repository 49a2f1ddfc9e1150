/** Direction of the sun at one minute of the window, with the engine's result. */
export interface SunMinute {
  readonly atUtc: string;
  readonly azimuthDeg: number;
  readonly apparentElevationDeg: number;
  readonly verdict: 'sunlit' | 'not-sunlit' | 'cannot-tell';
}
export interface SunDirection {
  readonly azimuthDeg: number;
  readonly elevationDeg: number;
}
export interface SunPathData {
  readonly zone: string;
  readonly minutes: readonly SunMinute[];
  /** Path of the whole day, where it is known beyond the window. */
  readonly day?: readonly SunDirection[];
  readonly dayLabel?: string;
  /** Other days for comparison, such as the solstice. */
  readonly references?: readonly { readonly label: string; readonly points: readonly SunDirection[] }[];
  readonly skyline?: readonly (SunDirection & { readonly name?: string })[];
  readonly required?: (SunDirection & { readonly azimuthSigmaDeg: number; readonly elevationSigmaDeg: number }) | null;
  /** Bearings between which the opening lets the sun in, left to right. */
  readonly opening?: { readonly fromAzimuthDeg: number; readonly toAzimuthDeg: number; readonly name?: string } | null;
  readonly cursorUtc?: string | null;
}

interface Point {
  readonly az: number;
  readonly alt: number;
}
export interface SunPathView {
  readonly fromAz: number;
  readonly toAz: number;
  readonly lowest: number;
  readonly highest: number;
  readonly window: readonly Point[];
  readonly stretches: readonly { readonly verdict: SunMinute['verdict']; readonly points: readonly Point[] }[];
  readonly day: readonly Point[];
  readonly dayLabel: string;
  readonly references: readonly { readonly label: string; readonly points: readonly Point[] }[];
  readonly skyline: readonly (Point & { readonly name?: string })[];
  readonly required: (Point & { readonly azSigma: number; readonly altSigma: number }) | null;
  readonly opening: { readonly fromAz: number; readonly toAz: number; readonly name?: string } | null;
  readonly cursor: Point | null;
}

/** Brings a bearing within 180° of the middle of the plot, so that a path across north stays in one piece. */
export function nearBearing(azimuthDeg: number, middleDeg: number): number {
  return middleDeg + ((((azimuthDeg - middleDeg + 180) % 360) + 360) % 360) - 180;
}

function middleBearing(minutes: readonly SunMinute[]): number {
  const sum = minutes.reduce(
    (total, minute) => {
      const angle = (minute.azimuthDeg * Math.PI) / 180;
      return { x: total.x + Math.sin(angle), y: total.y + Math.cos(angle) };
    },
    { x: 0, y: 0 },
  );
  return (Math.atan2(sum.x, sum.y) * 180) / Math.PI;
}

function stretchesOf(minutes: readonly SunMinute[], points: readonly Point[]) {
  const stretches: { verdict: SunMinute['verdict']; points: Point[] }[] = [];
  for (const [index, minute] of minutes.entries()) {
    const point = points[index];
    if (!point) continue;
    const last = stretches.at(-1);
    if (last?.verdict === minute.verdict) last.points.push(point);
    else stretches.push({ verdict: minute.verdict, points: [point] });
  }
  return stretches;
}

/** Lines broken where a bearing jumps across the edge behind the viewer are cut to the shown half circle. */
function inOrder<T extends Point>(points: readonly T[]): T[] {
  return points.toSorted((a, b) => a.az - b.az);
}

/** Works out what the sun-path plot shows: window, needed direction and ten degrees around them, at least 60° wide. */
export function sunPathView(data: SunPathData): SunPathView {
  const middle = middleBearing(data.minutes);
  const at = (direction: SunDirection): Point => ({ az: nearBearing(direction.azimuthDeg, middle), alt: direction.elevationDeg });
  const window = data.minutes.map((minute) => at({ azimuthDeg: minute.azimuthDeg, elevationDeg: minute.apparentElevationDeg }));
  const need = data.required ? { ...at(data.required), azSigma: data.required.azimuthSigmaDeg, altSigma: data.required.elevationSigmaDeg } : null;
  const reach = [...window.map((point) => point.az), ...(need && Math.abs(need.az - middle) < 120 ? [need.az] : [])];
  const least = Math.min(...reach, middle) - 12;
  const most = Math.max(...reach, middle) + 12;
  const extra = Math.max(0, 60 - (most - least)) / 2;
  const [fromAz, toAz] = [Math.floor((least - extra) / 5) * 5, Math.ceil((most + extra) / 5) * 5];
  const inView = (point: Point) => point.az >= fromAz && point.az <= toAz;
  const skyline = inOrder((data.skyline ?? []).map((point) => ({ ...at(point), ...(point.name ? { name: point.name } : {}) })));
  const heights = [...window, ...skyline.filter(inView), ...(need ? [need] : [])].map((point) => point.alt);
  const cursor = data.minutes.find((minute) => minute.atUtc === data.cursorUtc);
  return {
    fromAz,
    toAz,
    lowest: Math.min(0, ...window.map((point) => Math.floor(point.alt / 5) * 5)),
    highest: Math.min(95, Math.ceil((Math.max(10, ...heights) + 6) / 5) * 5),
    window,
    stretches: stretchesOf(data.minutes, window),
    day: inOrder((data.day ?? []).map(at)),
    dayLabel: data.dayLabel ?? '',
    references: (data.references ?? []).map((reference) => ({ label: reference.label, points: inOrder(reference.points.map(at)) })),
    skyline,
    required: need,
    opening: data.opening ? { fromAz: nearBearing(data.opening.fromAzimuthDeg, middle), toAz: nearBearing(data.opening.toAzimuthDeg, middle), ...(data.opening.name ? { name: data.opening.name } : {}) } : null,
    cursor: cursor ? at({ azimuthDeg: cursor.azimuthDeg, elevationDeg: cursor.apparentElevationDeg }) : null,
  };
}
