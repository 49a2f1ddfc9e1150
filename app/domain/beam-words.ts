import { minuteVerdictWords } from './run-words.ts';
import { plainNumber } from './plain-number.ts';
import type { BeamMinuteView, BeamView } from './run-beam.ts';
import { metresWords, seenFrom } from './scale-drawing.ts';
import type { Flat, Sight } from './scale-drawing.ts';
import { add, azimuthOf, elevationOf, lengthOf, scale, subtract } from '#app/physics/vector.ts';
import type { Vector } from '#app/physics/vector.ts';

/** What plan and section of a beam say in words and numbers, on screen and in print. */
export interface RunMinute {
  readonly atUtc: string;
  readonly verdict: 'sunlit' | 'not-sunlit' | 'cannot-tell';
}

export const planSight: Sight = { right: [1, 0, 0], up: [0, 1, 0] };
/** The upright plane through optic and mark. */
export const sectionSight = (beam: BeamView): Sight => ({ right: beam.sectionAlong, up: [0, 0, 1] });

export const sunWords = ({ towardsSun }: BeamMinuteView): string => `sun ${elevationOf(towardsSun).toFixed(1)}° up, ${azimuthOf(towardsSun).toFixed(1)}°`;

/** Where the chief ray goes and how far from the mark it lands. */
export function beamSentence(beam: BeamView, minute: BeamMinuteView): string {
  const elevation = elevationOf(minute.direction);
  const way = `The beam runs towards ${azimuthOf(minute.direction).toFixed(1)}°, ${Math.abs(elevation).toFixed(1)}° ${elevation < 0 ? 'down' : 'up'}`;
  if (!beam.mark) return `${way}.`;
  if (!minute.spotMm || !beam.facing) return `${way}, and does not meet the plane of the target near the mark.`;
  const { rightMm, upMm } = minute.spotMm;
  return `${way}; its middle lands ${metresWords(Math.hypot(rightMm, upMm) / 1000)} from the mark.`;
}

/** Where the spot lay through the sunlit minutes, as seen in a drawing. */
export function sunlitTrail(beam: BeamView, minutes: readonly RunMinute[], sight: Sight): Flat[] {
  const { mark, facing } = beam;
  if (!mark || !facing) return [];
  const lit = new Set(minutes.filter((minute) => minute.verdict === 'sunlit').map((minute) => minute.atUtc));
  const flat = seenFrom(sight);
  return beam.minutes.flatMap(({ atUtc, spotMm }) => (lit.has(atUtc) && spotMm ? [flat(add(mark.position, add(scale(facing.right, spotMm.rightMm / 1000), scale(facing.up, spotMm.upMm / 1000))))] : []));
}

export const beamColumns = ['Clock', 'Beam towards, ° true', 'Beam, ° above level', 'Focus, m', 'Spot right of mark, mm', 'Spot above mark, mm', 'Result'] as const;

/** Every so many minutes, the last, and each at which the result changes; as `beamColumns` names them. */
export function beamRows(beam: BeamView, minutes: readonly RunMinute[], clock: (utc: string) => string, every = 10): string[][] {
  const verdicts = new Map(minutes.map((minute) => [minute.atUtc, minute.verdict]));
  const rows = beam.minutes.filter(({ atUtc }, index) => index % every === 0 || index === beam.minutes.length - 1 || verdicts.get(atUtc) !== verdicts.get(beam.minutes[index - 1]?.atUtc ?? ''));
  return rows.map((minute) => [
    clock(minute.atUtc), azimuthOf(minute.direction).toFixed(1), elevationOf(minute.direction).toFixed(1), plainNumber(beam.profiles[minute.profile]?.focusM ?? Number.NaN),
    minute.spotMm ? plainNumber(minute.spotMm.rightMm) : 'off', minute.spotMm ? plainNumber(minute.spotMm.upMm) : 'off', minuteVerdictWords[verdicts.get(minute.atUtc) ?? 'cannot-tell'],
  ]);
}

export const planColumns = ['Direction', 'Bearing, ° true', 'Above level, °', 'Length, m'] as const;

/** Directions and lengths of one minute; of optic and mark alone where no light meets the working face. */
export function planRows(beam: BeamView, minute: BeamMinuteView | null): string[][] {
  const reach = beam.mark ? subtract(beam.mark.position, beam.startsAt) : null;
  const direction = (vector: Vector) => [azimuthOf(vector).toFixed(1), elevationOf(vector).toFixed(1)];
  return [
    ...(minute ? [['Towards the sun', ...direction(minute.towardsSun), ''], ['Chief ray', ...direction(minute.direction), `${plainNumber(beam.profiles[minute.profile]?.focusM ?? Number.NaN)} to the focus`]] : []),
    ...(reach ? [['From optic to mark', ...direction(reach), plainNumber(lengthOf(reach))]] : []),
  ];
}

export function surfaceWords(beam: BeamView): string {
  if (!beam.facing) return 'The mark was not surveyed, so no target is drawn.';
  return beam.facing.recorded ? 'Brown: the surface of the target, drawn a little way to both sides.' : 'Brown: the surface of the target; its direction was not recorded and is taken square to the line from the optic.';
}

export function distanceWords({ mark, startsAt }: BeamView): string {
  if (!mark) return '';
  const reach = subtract(mark.position, startsAt);
  return `Optic to mark ${metresWords(lengthOf(reach))}, ${metresWords(Math.hypot(reach[0], reach[1]))} of it level.`;
}
