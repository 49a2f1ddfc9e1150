import { Numbers } from '#app/components/ui/numbers.tsx';
import { dateWords, monthNames } from '#app/components/burn-card/wall-clock.ts';
import { clockOfMinutes, dayIndex, litBands, plateGrid, plateHours, plateMonths, platePieces, plateSentence, yearStart } from '#app/domain/year-plate.ts';
import type { LitBand, YearPlateData } from '#app/domain/year-plate.ts';
import { NumberTable } from './number-table.tsx';
import { ChartFrame, PlotSvg, PlotText } from './plot.tsx';
import { textWidthPx } from './text-width.ts';

const left = 26;
const bottom = 20;

/** One year: day across, clock time down. Body from sunrise to sunset, lighter where the sun reaches the optic, cut where it lands on the mark. */
export function YearPlate({ width, ...data }: YearPlateData & { readonly width: number }) {
  const narrow = width < 500;
  const box = { widthPx: width, heightPx: narrow ? 230 : 300, left, right: 0, top: 8, bottom };
  const inner = { x1: left, x2: width, y1: 8, y2: box.heightPx - bottom };
  const days = data.days.length;
  const x = (index: number) => inner.x1 + (index / days) * (inner.x2 - inner.x1);
  const { fromHour, toHour } = plateHours(data.days);
  const y = (minutes: number) => inner.y1 + ((minutes / 60 - fromHour) / (toHour - fromHour)) * (inner.y2 - inner.y1);
  const hours = Array.from({ length: (toHour - fromHour) / 2 + 1 }, (_, index) => fromHour + index * 2);
  const start = yearStart(data);
  const bands = litBands(data);
  return (
    <PlotSvg box={box} label={plateSentence(data, dateWords)}>
      {hours.filter((hour) => !narrow || hour % 4 === 0).map((hour) => <text key={hour} x={left - 6} y={y(hour * 60) + 4} textAnchor="end" className="fill-second">{String(hour).padStart(2, '0')}</text>)}
      <path d={platePieces(data.days).map((piece) => `M${piece.map(([index, minutes]) => `${x(index).toFixed(1)} ${y(minutes).toFixed(1)}`).join('L')}Z`).join('')} className="fill-card stroke-card-edge" />
      {(data.reach ?? []).map((span) => {
        const at = dayIndex(span.on, start);
        return <rect key={`${span.on}${span.fromMin}`} x={x(at)} y={y(span.fromMin)} width={x(at + 1) - x(at) + 0.3} height={Math.max(0.5, y(span.toMin) - y(span.fromMin))} className="fill-card-rule" fillOpacity="0.55" />;
      })}
      <Grid data={data} x={x} y={y} hours={hours} />
      {bands.map((band) => <BandCells key={band.firstOn} band={band} x={x} y={y} />)}
      {bands.map((band) => <BandWords key={band.firstOn} band={band} x={x} y={y} width={width} narrow={narrow} />)}
      <Months data={data} x={x} foot={box.heightPx - 4} narrow={narrow} />
      {data.todayOn ? <Today at={x(dayIndex(data.todayOn, start) + 0.5)} inner={inner} words={narrow ? '' : `today, ${dateWords(data.todayOn, false).slice(4)}`} /> : null}
    </PlotSvg>
  );
}

type Place = (value: number) => number;

function Grid({ data, x, y, hours }: { readonly data: YearPlateData; readonly x: Place; readonly y: Place; readonly hours: readonly number[] }) {
  const lines = plateGrid(data, hours).map(([[x1, y1], [x2, y2]]) => `M${x(x1).toFixed(1)} ${y(y1).toFixed(1)}L${x(x2).toFixed(1)} ${y(y2).toFixed(1)}`);
  return <path d={lines.join('')} className="fill-none stroke-card-rule" strokeOpacity="0.6" strokeWidth="0.8" />;
}

function BandCells({ band, x, y }: { readonly band: LitBand; readonly x: Place; readonly y: Place }) {
  const cells = band.cells.map((cell) => ({ x: x(cell.index), width: Math.max(1.6, x(cell.index + 1) - x(cell.index)), y: y(cell.fromMin), height: Math.max(3, y(cell.toMin) - y(cell.fromMin)) }));
  return (
    <g>
      {cells.map((cell) => <rect key={cell.x} x={cell.x - 1.2} y={cell.y - 1.2} width={cell.width + 2.4} height={cell.height + 2.4} className="fill-char" />)}
      {cells.map((cell) => <rect key={cell.x} x={cell.x} y={cell.y} width={cell.width} height={cell.height} className="fill-slot" />)}
    </g>
  );
}

function BandWords({ band, x, y, width, narrow }: { readonly band: LitBand; readonly x: Place; readonly y: Place; readonly width: number; readonly narrow: boolean }) {
  const days = daysWords(band.firstOn, band.lastOn);
  const times = `${clockOfMinutes(band.fromMin)} to ${clockOfMinutes(band.toMin)}`;
  const room = Math.max(textWidthPx(days, 12, true), textWidthPx(times, 12));
  const last = band.cells.at(-1);
  const first = band.cells[0];
  if (!first || !last || narrow) return null;
  const rightwards = x(last.index) + 34 + room < width - 30;
  const edge = rightwards ? x(last.index + 1) : x(first.index);
  const textX = edge + (rightwards ? 26 : -26);
  const textY = y(band.toMin) + 22;
  return (
    <g>
      <line x1={edge + (rightwards ? 2 : -2)} y1={y(band.toMin) + 2} x2={textX + (rightwards ? -3 : 3)} y2={textY - 6} className="stroke-card-text" />
      <g textAnchor={rightwards ? 'start' : 'end'} className="fill-card-text stroke-card" strokeWidth="3" paintOrder="stroke" strokeLinejoin="round">
        <text x={textX} y={textY} className="font-semibold">{days}</text>
        <text x={textX} y={textY + 15}>{times}</text>
      </g>
    </g>
  );
}

const short = (on: string) => dateWords(on, false).slice(4);

/** "30 Jan to 6 Feb", "4 to 9 Nov", "5 May". */
function daysWords(firstOn: string, lastOn: string): string {
  if (firstOn === lastOn) return short(firstOn);
  const sameMonth = firstOn.slice(0, 7) === lastOn.slice(0, 7);
  return `${sameMonth ? short(firstOn).split(' ')[0] : short(firstOn)} to ${short(lastOn)}`;
}

function Months({ data, x, foot, narrow }: { readonly data: YearPlateData; readonly x: Place; readonly foot: number; readonly narrow: boolean }) {
  return (
    <g>
      {plateMonths(data).map(({ month, from, to }) => {
        const name = monthNames[month] ?? '';
        return <text key={from} x={(x(from) + x(to)) / 2} y={foot} textAnchor="middle" className="fill-second">{narrow ? name.slice(0, 1) : name}</text>;
      })}
    </g>
  );
}

function Today({ at, inner, words }: { readonly at: number; readonly inner: { readonly y1: number; readonly y2: number }; readonly words: string }) {
  return (
    <g>
      <line x1={at} x2={at} y1={inner.y1} y2={inner.y2} className="stroke-clear" strokeWidth="1.6" />
      {words ? <PlotText x={at + 5} y={inner.y1 + 4} tone="clear">{words}</PlotText> : null}
    </g>
  );
}

export function YearPlateFigure({ figure, title, note, ...data }: YearPlateData & { readonly figure?: string; readonly title: string; readonly note?: string }) {
  return (
    <Numbers
      csv="returns"
      {...(figure ? { figure } : {})}
      title={title}
      {...(note ? { note } : {})}
      picture={<ChartFrame widthsPx={[328, 640, 1160]} draw={(width) => <YearPlate width={width} {...data} />} />}
      numbers={<NumberTable caption={title} columns={[{ head: 'Day' }, { head: 'From', numeric: true }, { head: 'To', numeric: true }, { head: 'Minutes', numeric: true }]} rows={data.lit.map((span) => [dateWords(span.on), clockOfMinutes(span.fromMin), clockOfMinutes(span.toMin), Math.round(span.toMin - span.fromMin)])} />}
    />
  );
}
