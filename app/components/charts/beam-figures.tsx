import { clockWords } from '#app/components/burn-card/wall-clock.ts';
import { verdictWords } from '#app/components/burn-card/words.ts';
import { Numbers } from '#app/components/ui/numbers.tsx';
import type { BeamMinuteView, BeamView } from '#app/domain/run-beam.ts';
import { add, azimuthOf, elevationOf, lengthOf, scale, subtract } from '#app/physics/vector.ts';
import type { Vector } from '#app/physics/vector.ts';
import { BeamDrawing } from './beam-drawing.tsx';
import { beamAt, beamShape, extentOf } from './beam-shape.ts';
import { NumberTable, plainNumber } from './number-table.tsx';
import { ChartFrame } from './plot.tsx';
import { metresWords, seenFrom } from './scale-drawing.ts';
import type { Flat, Sight } from './scale-drawing.ts';

export interface RunMinute {
  readonly atUtc: string;
  readonly verdict: 'sunlit' | 'not-sunlit' | 'cannot-tell';
}
export interface BeamFigureProps {
  readonly beam: BeamView;
  readonly minutes: readonly RunMinute[];
  readonly cursorUtc: string | null;
  readonly bestUtc: string | null;
  readonly zone: string;
}

const up: Vector = [0, 0, 1];
const planSight: Sight = { right: [1, 0, 0], up: [0, 1, 0] };

const minuteAt = (beam: BeamView, atUtc: string | null): BeamMinuteView | null => beam.minutes.find((minute) => minute.atUtc === atUtc) ?? null;
const sunWords = (minute: BeamMinuteView): string => `sun ${elevationOf(minute.towardsSun).toFixed(1)}° up, ${azimuthOf(minute.towardsSun).toFixed(1)}°`;

/** Where the spot lay through the sunlit minutes, as seen in a drawing. */
function sunlitTrail(beam: BeamView, minutes: readonly RunMinute[], sight: Sight): Flat[] {
  const { mark, facing } = beam;
  if (!mark || !facing) return [];
  const lit = new Set(minutes.filter((minute) => minute.verdict === 'sunlit').map((minute) => minute.atUtc));
  const flat = seenFrom(sight);
  return beam.minutes.flatMap(({ atUtc, spotMm }) => (lit.has(atUtc) && spotMm ? [flat(add(mark.position, add(scale(facing.right, spotMm.rightMm / 1000), scale(facing.up, spotMm.upMm / 1000))))] : []));
}

interface DrawnProps extends BeamFigureProps {
  readonly sight: Sight;
  readonly north: boolean;
  readonly what: string;
}

function Drawn({ beam, minutes, cursorUtc, bestUtc, zone, sight, north, what }: DrawnProps) {
  const shape = beamShape(beam, sight);
  const reference = minuteAt(beam, bestUtc) ?? beam.minutes[Math.floor(beam.minutes.length / 2)] ?? null;
  const extent = extentOf(shape, beam, reference ? beamAt(beam, reference, sight) : null);
  const minute = minuteAt(beam, cursorUtc);
  const at = minute ? beamAt(beam, minute, sight) : null;
  const clock = cursorUtc ? clockWords(cursorUtc, zone) : '';
  const label = minute ? `${what} at ${clock}: ${sunWords(minute)}. ${beamSentence(beam, minute)}` : `${what}: at ${clock} no sun meets the working face.`;
  return (
    <>
      <ChartFrame draw={(width) => <BeamDrawing width={width} beam={beam} shape={shape} extent={extent} at={at} trail={sunlitTrail(beam, minutes, sight)} sunWords={minute ? sunWords(minute) : ''} label={label} north={north} />} />
      <p className="pt-1 text-small" aria-hidden="true">{minute ? beamSentence(beam, minute) : `At ${clock} no sun meets the working face.`}</p>
    </>
  );
}

/** Where the chief ray goes and how far from the mark it lands. */
export function beamSentence(beam: BeamView, minute: BeamMinuteView): string {
  const elevation = elevationOf(minute.direction);
  const way = `The beam runs towards ${azimuthOf(minute.direction).toFixed(1)}°, ${Math.abs(elevation).toFixed(1)}° ${elevation < 0 ? 'down' : 'up'}`;
  if (!beam.mark) return `${way}.`;
  if (!minute.spotMm || !beam.facing) return `${way}, and does not meet the plane of the target near the mark.`;
  const { rightMm, upMm } = minute.spotMm;
  return `${way}; its middle lands ${metresWords(Math.hypot(rightMm, upMm) / 1000)} from the mark.`;
}

function BeamTable({ beam, minutes, zone, caption }: BeamFigureProps & { readonly caption: string }) {
  const verdicts = new Map(minutes.map((minute) => [minute.atUtc, minute.verdict]));
  const rows = beam.minutes.filter(({ atUtc }, index) => index % 10 === 0 || index === beam.minutes.length - 1 || verdicts.get(atUtc) !== verdicts.get(beam.minutes[index - 1]?.atUtc ?? ''));
  return (
    <NumberTable
      caption={caption}
      columns={[{ head: 'Clock' }, { head: 'Beam towards, ° true', numeric: true }, { head: 'Beam, ° above level', numeric: true }, { head: 'Focus, m', numeric: true }, { head: 'Spot right of mark, mm', numeric: true }, { head: 'Spot above mark, mm', numeric: true }, { head: 'Result' }]}
      rows={rows.map((minute) => [
        clockWords(minute.atUtc, zone), azimuthOf(minute.direction).toFixed(1), elevationOf(minute.direction).toFixed(1), plainNumber(beam.profiles[minute.profile]?.focusM ?? Number.NaN),
        minute.spotMm ? plainNumber(minute.spotMm.rightMm) : 'off', minute.spotMm ? plainNumber(minute.spotMm.upMm) : 'off', verdictWords[verdicts.get(minute.atUtc) ?? 'cannot-tell'],
      ])}
    />
  );
}

/** The minute of the blue line alone: directions and lengths that a plan shows; every minute is in the section's table. */
function PlanTable({ beam, cursorUtc, caption }: BeamFigureProps & { readonly caption: string }) {
  const minute = minuteAt(beam, cursorUtc);
  const reach = beam.mark ? subtract(beam.mark.position, beam.startsAt) : null;
  const direction = (vector: Vector) => [`${azimuthOf(vector).toFixed(1)}`, `${elevationOf(vector).toFixed(1)}`];
  const rows = [
    ...(minute ? [['Towards the sun', ...direction(minute.towardsSun), ''], ['Chief ray', ...direction(minute.direction), `${plainNumber(beam.profiles[minute.profile]?.focusM ?? Number.NaN)} to the focus`]] : []),
    ...(reach ? [['From optic to mark', ...direction(reach), plainNumber(lengthOf(reach))]] : []),
  ];
  return <NumberTable caption={caption} columns={[{ head: 'Direction' }, { head: 'Bearing, ° true', numeric: true }, { head: 'Above level, °', numeric: true }, { head: 'Length, m', numeric: true }]} rows={rows} />;
}

const methodWords = 'Chief ray and width by the closed form of the engine for the minute of the blue line; blue outline: four fifths of the light. Dash and dot: chief ray.';

/** The beam from the side: the upright plane through optic and mark. */
export function SectionFigure({ figure, ...props }: BeamFigureProps & { readonly figure: string }) {
  const { beam, cursorUtc, zone } = props;
  const sight: Sight = { right: beam.sectionAlong, up };
  const minute = minuteAt(beam, cursorUtc);
  const at = minute ? beamAt(beam, minute, sight) : null;
  const title = `Section along ${beam.sectionBearingDeg.toFixed(1)}°${cursorUtc ? ` at ${clockWords(cursorUtc, zone)}` : ''}, to scale`;
  return (
    <Numbers
      csv="beam"
      figure={figure}
      title={title}
      picture={<Drawn {...props} sight={sight} north={false} what="Section" />}
      numbers={<BeamTable {...props} caption={title} />}
      note={`Upright plane through optic and mark; up is up. ${methodWords}${at && at.leavesPlaneDeg > 1 ? ` At this minute the beam leaves the plane by ${at.leavesPlaneDeg.toFixed(0)}°.` : ''} ${surfaceWords(beam)}`}
    />
  );
}

/** The same from above, north up. */
export function PlanFigure({ figure, ...props }: BeamFigureProps & { readonly figure: string }) {
  const { beam, cursorUtc, zone } = props;
  const title = `Plan${cursorUtc ? ` at ${clockWords(cursorUtc, zone)}` : ''}, to scale`;
  return (
    <Numbers
      csv="beam"
      figure={figure}
      title={title}
      picture={<Drawn {...props} sight={planSight} north what="Plan" />}
      numbers={<PlanTable {...props} caption={title} />}
      note={`True north up. ${methodWords} ${distanceWords(beam)}`}
    />
  );
}

function surfaceWords(beam: BeamView): string {
  if (!beam.facing) return 'The mark was not surveyed, so no target is drawn.';
  return beam.facing.recorded ? 'Brown: the surface of the target, drawn a little way to both sides.' : 'Brown: the surface of the target; its direction was not recorded and is taken square to the line from the optic.';
}

function distanceWords({ mark, startsAt }: BeamView): string {
  if (!mark) return '';
  const reach = subtract(mark.position, startsAt);
  return `Optic to mark ${metresWords(lengthOf(reach))}, ${metresWords(Math.hypot(reach[0], reach[1]))} of it level.`;
}
