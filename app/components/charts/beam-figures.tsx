import { clockWords } from '#app/components/burn-card/wall-clock.ts';
import { Numbers } from '#app/components/ui/numbers.tsx';
import { beamAt, beamShape, extentOf } from '#app/domain/beam-shape.ts';
import { beamColumns, beamRows, beamSentence, distanceWords, planColumns, planRows, planSight, sectionSight, sunlitTrail, sunWords, surfaceWords } from '#app/domain/beam-words.ts';
import type { RunMinute } from '#app/domain/beam-words.ts';
import type { BeamMinuteView, BeamView } from '#app/domain/run-beam.ts';
import type { Sight } from '#app/domain/scale-drawing.ts';
import { BeamDrawing } from './beam-drawing.tsx';
import { NumberTable } from './number-table.tsx';
import type { NumberColumn } from './number-table.tsx';
import { ChartFrame } from './plot.tsx';

export interface BeamFigureProps {
  readonly beam: BeamView;
  readonly minutes: readonly RunMinute[];
  readonly cursorUtc: string | null;
  readonly bestUtc: string | null;
  readonly zone: string;
}

const minuteAt = (beam: BeamView, atUtc: string | null): BeamMinuteView | null => beam.minutes.find((minute) => minute.atUtc === atUtc) ?? null;

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

const columnsOf = (heads: readonly string[], text: readonly string[]): NumberColumn[] => heads.map((head) => ({ head, numeric: !text.includes(head) }));

function BeamTable({ beam, minutes, zone, caption }: BeamFigureProps & { readonly caption: string }) {
  return <NumberTable caption={caption} columns={columnsOf(beamColumns, ['Clock', 'Result'])} rows={beamRows(beam, minutes, (utc) => clockWords(utc, zone))} />;
}

/** The minute of the blue line alone: directions and lengths that a plan shows; every minute is in the section's table. */
function PlanTable({ beam, cursorUtc, caption }: BeamFigureProps & { readonly caption: string }) {
  return <NumberTable caption={caption} columns={columnsOf(planColumns, ['Direction'])} rows={planRows(beam, minuteAt(beam, cursorUtc))} />;
}

const methodWords = 'Chief ray and width by the closed form of the engine for the minute of the blue line; blue outline: four fifths of the light. Dash and dot: chief ray.';

/** The beam from the side: the upright plane through optic and mark. */
export function SectionFigure({ figure, ...props }: BeamFigureProps & { readonly figure: string }) {
  const { beam, cursorUtc, zone } = props;
  const sight = sectionSight(beam);
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
