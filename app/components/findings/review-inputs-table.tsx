import { FieldError } from '#app/components/forms/field.tsx';
import { Cell, DataTable, GroupRow, HeadCell, Row, TableHead } from '#app/components/ui/data-table.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import type { CommentPin } from '#app/domain/finding-view.ts';
import type { InputGroup } from '#app/domain/review-inputs.ts';
import { CommentPinMark } from './comment-pin-mark.tsx';

export interface ReviewInputsTableProps {
  readonly groups: readonly InputGroup[];
  readonly pins: readonly CommentPin[];
  /** Id of the form to which the ticks belong; no ticks without it. */
  readonly formId: string | null;
  readonly ticked: readonly string[];
  readonly errors?: readonly string[] | undefined;
}

/** Inputs before conclusions: value, ±, method, and a check; one tick a group once it is read. */
export function ReviewInputsTable({ groups, pins, formId, ticked, errors }: ReviewInputsTableProps) {
  const count = groups.reduce((sum, group) => sum + group.rows.length, 0);
  return (
    <section aria-labelledby="inputs" id="read">
      <SectionHeading id="inputs" note={`${count} fields`}>Inputs</SectionHeading>
      <FieldError field={{ name: 'read', errors }} />
      <DataTable caption="Inputs of the case with uncertainty and method">
        <TableHead>
          <HeadCell className="min-w-36">Field</HeadCell>
          <HeadCell className="min-w-28">Value</HeadCell>
          <HeadCell>±</HeadCell>
          <HeadCell className="min-w-24">Method</HeadCell>
          <HeadCell className="min-w-36">Check</HeadCell>
        </TableHead>
        {groups.map((group) => (
          <tbody key={group.field}>
            <GroupRow columns={5}>
              <span className="flex flex-wrap items-center gap-x-4 gap-y-1">
                {group.heading}
                {pins.filter((pin) => pin.field === group.field).map((pin) => <CommentPinMark key={pin.id} pin={pin} linked />)}
                {formId ? (
                  <label className="ml-auto flex items-center gap-2 font-sans text-small">
                    <input type="checkbox" className="tick-box" name="read" value={group.field} form={formId} defaultChecked={ticked.includes(group.field)} />
                    read<span className="sr-only">: {group.heading}</span>
                  </label>
                ) : null}
              </span>
            </GroupRow>
            {group.rows.map((row) => (
              <Row key={row.label} tight className={pins.some((pin) => pin.field === group.field && pin.settled === null) ? 'bg-wash' : ''}>
                <Cell heading className="font-normal">{row.label}</Cell>
                <Cell>{row.value}</Cell>
                <Cell>{row.plusMinus}</Cell>
                <Cell className="text-second">{row.method}</Cell>
                <Cell>{row.check}</Cell>
              </Row>
            ))}
          </tbody>
        ))}
      </DataTable>
    </section>
  );
}
