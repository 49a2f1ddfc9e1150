import { clockWords } from '#app/components/burn-card/wall-clock.ts';
import { Cell, DataTable, HeadCell, Row, TableHead } from '#app/components/ui/data-table.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import { formatIsoDay } from '#app/domain/local-time.ts';
import { plainNumber } from '#app/domain/plain-number.ts';
import type { LightOnMark } from '#app/physics/model/minutes.ts';
import { localDay } from '#app/physics/sun/zone-days.ts';

export interface LightIntervalsProps {
  readonly light: LightOnMark;
  readonly zone: string;
}

/** When any part of the optic lights the mark, apart from when that light is focused there. */
export function LightIntervals({ light, zone }: LightIntervalsProps) {
  const rows = [
    ...light.lit.map((interval) => ({ ...interval, kind: 'Lit' })),
    ...light.focused.map((interval) => ({ ...interval, kind: 'Focused' })),
  ].sort((a, b) => (a.fromUtc === b.fromUtc ? (a.kind === 'Lit' ? -1 : 1) : a.fromUtc < b.fromUtc ? -1 : 1));
  const several = new Set(rows.map((row) => localDay(Date.parse(row.fromUtc), zone))).size > 1;
  const day = (utc: string) => (several ? `${formatIsoDay(localDay(Date.parse(utc), zone))}, ` : '');
  return (
    <section aria-labelledby="light-on-mark">
      <SectionHeading id="light-on-mark" note={`Lit: some part of the optic throws light on the middle of the mark, ${plainNumber(light.litFromSuns)} suns or more. Focused: ${plainNumber(light.focusedFromSuns)} suns or more. Both limits are our own choice, unverified.`}>
        Lit and focused
      </SectionHeading>
      {rows.length === 0 ? (
        <p className="pt-2">No light from the optic reaches the middle of the mark in the window.</p>
      ) : (
        <DataTable caption="Intervals with light on the middle of the mark; suns on 5 mm, likely">
          <TableHead>
            <HeadCell>Light</HeadCell>
            <HeadCell>From</HeadCell>
            <HeadCell>To</HeadCell>
            <HeadCell numeric>Minutes</HeadCell>
            <HeadCell numeric>Suns at most</HeadCell>
          </TableHead>
          <tbody>
            {rows.map((row) => (
              <Row key={`${row.kind}${row.fromUtc}`} tight>
                <Cell heading className={row.kind === 'Focused' ? '' : '!font-normal'}>{row.kind}</Cell>
                <Cell>{day(row.fromUtc)}{clockWords(row.fromUtc, zone)}</Cell>
                <Cell>{clockWords(row.toUtc, zone)}</Cell>
                <Cell numeric>{row.minutes}</Cell>
                <Cell numeric>{plainNumber(row.greatestSuns)}</Cell>
              </Row>
            ))}
          </tbody>
        </DataTable>
      )}
    </section>
  );
}
