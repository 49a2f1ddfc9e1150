import { YearPlateFigure } from '#app/components/charts/year-plate.tsx';
import { Cell, DataTable, HeadCell, Row, TableHead } from '#app/components/ui/data-table.tsx';
import { plainNumber } from '#app/domain/plain-number.ts';
import type { ReturnBandView } from '#app/domain/run-returns.ts';
import type { RunView } from '#app/domain/run-view.ts';
import { StackTable } from './stack-table.tsx';

const whenWords = { past: 'past', window: 'holds the window' } as const;

/** When the sun lands on the mark again: a picture of twelve months, and each day with its clock times. */
export function ReturnsSection({ view, zone }: { readonly view: RunView; readonly zone: string }) {
  const { requiredSun } = view.result;
  return (
    <div className="space-y-4">
      <YearPlateFigure figure="Fig. 9" title="When this mark can be lit again: day and clock time" days={view.plate.days} reach={view.plate.reach} lit={view.plate.lit} todayOn={view.plate.todayOn} note={view.plate.note} />
      {requiredSun ? (
        <p className="text-small text-second">
          The mark asks for a sun at {requiredSun.azimuthDeg.toFixed(1)}° true and {requiredSun.apparentElevationDeg.toFixed(1)}° up, declination {requiredSun.declinationDeg.toFixed(2)}°
          {requiredSun.reachable ? '.' : ', which no day of the year has.'}
        </p>
      ) : null}
      {view.returns.length > 0 ? <BandTable bands={view.returns} zone={zone} /> : <p>{requiredSun?.reachable ? 'Skyline or opening keep the sun away on every day of the calendar.' : 'No fixed return can be listed: it needs an optic that stays in place, the mark, and a direction that the year offers.'}</p>}
    </div>
  );
}

function BandTable({ bands, zone }: { readonly bands: readonly ReturnBandView[]; readonly zone: string }) {
  return (
    <div>
      <p className="pb-1 text-small text-second">Clock of {zone.replaceAll('_', ' ')}</p>
      <StackTable
        caption="Days of return"
        heads={['Days', 'Clock', 'Closest', 'In all', 'Against today']}
        columns="tablet:grid-cols-[minmax(0,1.6fr)_minmax(0,1fr)_minmax(0,1.2fr)_6rem_9rem]"
        rows={bands.map((band) => ({
          key: band.bestWords,
          cells: [
            <Days key="days" band={band} />,
            band.clockWords,
            band.bestWords,
            `${band.minutes} min`,
            band.when ? whenWords[band.when] : 'to come',
          ],
        }))}
      />
      <details>
        <summary className="inline-flex min-h-8 items-center text-small underline decoration-ember decoration-2 underline-offset-4">Every day</summary>
        <DataTable caption={`Every day of return, clock of ${zone.replaceAll('_', ' ')}`}>
          <TableHead>
            <HeadCell>Day</HeadCell>
            <HeadCell>From</HeadCell>
            <HeadCell>To</HeadCell>
            <HeadCell>Closest</HeadCell>
            <HeadCell numeric>Minutes</HeadCell>
            <HeadCell numeric>Off the needed direction, °</HeadCell>
          </TableHead>
          <tbody>
            {bands.flatMap((band) => band.days).map((day) => (
              <Row key={`${day.on}${day.from}`} tight>
                <Cell heading className="!font-normal">{day.dayWords}</Cell>
                <Cell>{day.from}</Cell>
                <Cell>{day.to}</Cell>
                <Cell>{day.best}</Cell>
                <Cell numeric>{day.minutes}</Cell>
                <Cell numeric>{plainNumber(day.separationDeg)}</Cell>
              </Row>
            ))}
          </tbody>
        </DataTable>
      </details>
    </div>
  );
}

function Days({ band }: { readonly band: ReturnBandView }) {
  return <>{band.daysWords}<span className="block text-axis font-normal text-second">{band.dayCount} {band.dayCount === 1 ? 'day' : 'days'}</span></>;
}
