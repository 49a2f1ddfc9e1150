import { radiusFromSagitta } from './sagitta.ts';
import { readNumber } from './scene-lines.ts';
import type { Typed } from './scene-form.ts';

/** What follows from numbers while they are typed, as sentences; a number that cannot be read gives none. */
export interface WorkedOut {
  readonly optic: string | null;
  readonly opening: string | null;
  readonly mark: string | null;
}

const number = (typed: Typed, name: string): number | null => {
  const value = readNumber((typed[name] ?? '').replace(/\s*(mm|m|°)$/u, ''));
  return Number.isNaN(value) ? null : value;
};
const measure = (typed: Typed, name: string) => {
  const value = number(typed, name);
  const plusMinus = number(typed, `${name}.plusMinus`);
  return value === null ? null : { value, ...(plusMinus === null ? {} : { plusMinus }) };
};
const shown = (value: number, digits = 3) => String(Number(value.toPrecision(digits)));

function radiusWords(typed: Typed): string | null {
  const [over, sagitta] = [measure(typed, 'optic.sagittaOverMm'), measure(typed, 'optic.sagittaMm')];
  if (!over || !sagitta) return null;
  const worked = radiusFromSagitta(over, sagitta);
  if (!worked) return 'The gap is deeper than half the straightedge is long: one of the two is wrong.';
  const plusMinus = worked.plusMinusM === null ? '' : ` ±${shown(worked.plusMinusM, 2)}`;
  return `So the radius is ${shown(worked.radiusM)} m${plusMinus}, and a mirror of it focuses about ${shown(worked.radiusM / 2)} m out. ${shown(over.value, 6)}² ÷ (8 × ${shown(sagitta.value, 6)}), plus half the gap.`;
}

const degrees = (rise: number, run: number) => (Math.atan2(rise, run) * 180) / Math.PI;

/** Seen from the centre of the optic, straight out through the opening. */
function openingWords(typed: Typed): string | null {
  const distance = number(typed, 'opening.distanceMm');
  const width = number(typed, 'opening.widthMm');
  const [sill, height] = [number(typed, 'opening.sillMm'), number(typed, 'opening.heightMm')];
  if (!distance || distance <= 0) return null;
  const sideways = width ? [`open ${degrees(width / 2, distance).toFixed(0)}° to each side, if the optic stands square to its middle`] : [];
  const upright = sill !== null && height ? [`sun let in from ${degrees(sill, distance).toFixed(0)}° to ${degrees(sill + height, distance).toFixed(0)}° up`] : [];
  const parts = [...sideways, ...upright];
  return parts.length === 0 ? null : `From the sizes: ${parts.join('; ')}. Write it in the fields below to use it.`;
}

function markWords(typed: Typed): string | null {
  const [elevation, slant] = [number(typed, 'mark.elevationDeg'), number(typed, 'mark.distanceMm')];
  if (elevation === null || slant === null || Math.abs(elevation) > 90) return null;
  const angle = (elevation * Math.PI) / 180;
  const height = slant * Math.sin(angle);
  return `So the mark lies ${shown(slant * Math.cos(angle))} mm away on the level, ${shown(Math.abs(height))} mm ${height < 0 ? 'below' : 'above'} the centre of the optic.`;
}

export function workedOut(typed: Typed): WorkedOut {
  return { optic: radiusWords(typed), opening: openingWords(typed), mark: markWords(typed) };
}
