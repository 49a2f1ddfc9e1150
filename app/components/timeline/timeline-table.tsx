import { Form, href } from 'react-router';
import { TextInput } from '#app/components/forms/text-field.tsx';
import { problemFields } from '#app/components/findings/problem-fields.ts';
import type { FormAnswer } from '#app/components/findings/problem-fields.ts';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { Cell, DataTable, GroupRow, HeadCell, Row, TableHead } from '#app/components/ui/data-table.tsx';
import { noReading } from '#app/domain/timeline.ts';
import type { TimelineRow } from '#app/domain/timeline.ts';

export interface TimelineTableProps {
  readonly caseNumber: number;
  readonly rows: readonly TimelineRow[];
  readonly mayWrite: boolean;
  /** Answer about a withdrawal; it names its event. */
  readonly answer: FormAnswer | null;
}

/** Columns that a phone leaves out; it says the same under the event. */
const wide = 'max-tablet:hidden';

/** What happened when, day by day: the clock as read, the correction, the true time. */
export function TimelineTable({ caseNumber, rows, mayWrite, answer }: TimelineTableProps) {
  const days = [...new Set(rows.map((row) => row.day))];
  return (
    <DataTable caption="Timeline of the case, in the order of true time">
      <TableHead>
        <HeadCell>True time</HeadCell>
        <HeadCell className={wide}>Clock read</HeadCell>
        <HeadCell className={wide}>Correction</HeadCell>
        <HeadCell>What, and from which source</HeadCell>
      </TableHead>
      {days.map((day) => (
        <tbody key={day}>
          <GroupRow columns={4}>{day}</GroupRow>
          {rows.filter((row) => row.day === day).map((row) => <TimelineLine key={row.key} caseNumber={caseNumber} row={row} mayWrite={mayWrite} answer={answer} />)}
        </tbody>
      ))}
    </DataTable>
  );
}

function TimelineLine({ caseNumber, row, mayWrite, answer }: { readonly caseNumber: number; readonly row: TimelineRow; readonly mayWrite: boolean; readonly answer: FormAnswer | null }) {
  const struck = row.withdrawn === null ? '' : 'line-through';
  return (
    <Row>
      <Cell heading className={`whitespace-nowrap ${struck}`}>{row.trueTime}</Cell>
      <Cell className={`${wide} whitespace-nowrap ${row.reading === noReading ? 'text-second' : struck}`}>{row.reading}</Cell>
      <Cell className={`${wide} whitespace-nowrap`}>{row.correction}</Cell>
      <Cell>
        <span className={struck}>{row.path ? <AppLink href={`${href('/cases/:caseNumber', { caseNumber: String(caseNumber) })}${row.path}`}>{row.what}</AppLink> : row.what}</span>
        <span className="block text-axis text-second">{[row.source, row.basis].filter(Boolean).join('; ')}</span>
        {row.reading === noReading ? null : <span className="block text-axis text-second tablet:hidden">Clock read {row.reading}, correction {row.correction}</span>}
        {row.withdrawn === null ? null : <span className="block text-axis">Withdrawn: {row.withdrawn}</span>}
        {mayWrite && row.eventId && row.withdrawn === null ? <Withdraw eventId={row.eventId} what={row.what} answer={answer?.typed['eventId'] === row.eventId ? answer : null} /> : null}
      </Cell>
    </Row>
  );
}

function Withdraw({ eventId, what, answer }: { readonly eventId: string; readonly what: string; readonly answer: FormAnswer | null }) {
  const field = problemFields(answer, {}, `withdraw-${eventId}-`);
  return (
    <details open={answer !== null} data-print="no" className="pt-1 text-small">
      <summary className="inline-flex min-h-(--target-height) items-center underline decoration-ember decoration-2 underline-offset-4">Withdraw<span className="sr-only">: {what}</span></summary>
      <Form method="post" className="max-w-96 space-y-2 py-2">
        <input type="hidden" name="intent" value="withdraw" />
        <input type="hidden" name="eventId" value={eventId} />
        <TextInput field={field('reason', { required: true })} label="Why it is wrong" help="It stays here, struck through." />
        <Button look="outlined">Withdraw the event</Button>
      </Form>
    </details>
  );
}
