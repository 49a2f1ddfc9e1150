import { Cell, DataTable, HeadCell, Row, TableHead } from '#app/components/ui/data-table.tsx';
import type { BurnCardModel } from './model.ts';
import { runMinutes } from './model.ts';
import { clockWords, dateWords, localDate } from './wall-clock.ts';
import { verdictWords, zoneWords } from './words.ts';

export interface MinuteTableProps {
  readonly model: BurnCardModel;
}

/** The card in words: from, to, minutes, result, reason. */
export function MinuteTable({ model }: MinuteTableProps) {
  const dates = new Set(model.runs.map((run) => localDate(run.fromUtc, model.zone)));
  const moment = (utc: string) => `${dates.size > 1 ? `${dateWords(localDate(utc, model.zone), false)} ` : ''}${clockWords(utc, model.zone)}`;
  const zone = zoneWords(model);
  if (model.runs.length === 0) return <p className="py-2 text-second">Nothing examined yet.</p>;
  return (
    <DataTable caption={`The card in words. ${zone.date}${zone.rest}.`} captionShown>
      <TableHead>
        <HeadCell>From</HeadCell>
        <HeadCell>To</HeadCell>
        <HeadCell numeric>Minutes</HeadCell>
        <HeadCell>Sun on the mark</HeadCell>
        <HeadCell>Reason</HeadCell>
      </TableHead>
      <tbody>
        {model.runs.map((run) => (
          <Row key={run.fromUtc} tight>
            <Cell>{moment(run.fromUtc)}</Cell>
            <Cell>{moment(run.toUtc)}</Cell>
            <Cell numeric>{runMinutes(run)}</Cell>
            <Cell className={run.verdict === 'sunlit' ? 'font-semibold' : ''}>{verdictWords[run.verdict]}</Cell>
            <Cell>{run.reasonWords}</Cell>
          </Row>
        ))}
      </tbody>
    </DataTable>
  );
}
