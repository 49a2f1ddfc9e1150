import { FieldError } from '#app/components/forms/field.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import type { CommentPin } from '#app/domain/finding-view.ts';
import type { InputGroup, InputRow } from '#app/domain/review-inputs.ts';
import { CommentPinMark } from './comment-pin-mark.tsx';

export interface ReviewInputsProps {
  readonly groups: readonly InputGroup[];
  readonly pins: readonly CommentPin[];
  /** Id of the form to which the ticks belong; no ticks without it. */
  readonly formId: string | null;
  readonly ticked: readonly string[];
  readonly errors?: readonly string[] | undefined;
}

const columns = 'tablet:grid tablet:grid-cols-[minmax(9rem,1.2fr)_minmax(8rem,1.1fr)_4rem_minmax(7rem,1fr)_minmax(9rem,1.6fr)] tablet:gap-x-3';

/** Inputs before conclusions: value, ±, method, and a check; one tick a group once it is read. */
export function ReviewInputs({ groups, pins, formId, ticked, errors }: ReviewInputsProps) {
  const count = groups.reduce((sum, group) => sum + group.rows.length, 0);
  return (
    <section aria-labelledby="inputs" id="read">
      <SectionHeading id="inputs" note={`${count} fields`}>Inputs</SectionHeading>
      <FieldError field={{ name: 'read', errors }} />
      <div aria-hidden="true" className={`hidden border-b-[1.5px] border-ink pb-1.5 text-axis font-semibold text-second ${columns}`}>
        {['Field', 'Value', '±', 'Method', 'Check'].map((head) => <span key={head}>{head}</span>)}
      </div>
      {groups.map((group) => {
        const own = pins.filter((pin) => pin.field === group.field);
        return (
          <section key={group.field} aria-labelledby={`inputs-${group.field}`} className="avoid-break">
            <div className="flex flex-wrap items-center gap-x-4 gap-y-1 border-b-[1.5px] border-ink pt-4 pb-1">
              <h3 id={`inputs-${group.field}`} className="font-serif text-account leading-6 tablet:text-group">{group.heading}</h3>
              {own.map((pin) => <CommentPinMark key={pin.id} pin={pin} linked />)}
              {formId ? (
                <label className="relative ml-auto flex min-h-6 items-center gap-2 text-small max-tablet:min-h-11">
                  <input type="checkbox" className="tick-box" name="read" value={group.field} form={formId} defaultChecked={ticked.includes(group.field)} aria-label={`read: ${group.heading}`} />
                  read
                </label>
              ) : null}
            </div>
            <dl>{group.rows.map((row) => <InputLine key={row.label} row={row} remarked={own.some((pin) => pin.settled === null)} />)}</dl>
          </section>
        );
      })}
    </section>
  );
}

function InputLine({ row, remarked }: { readonly row: InputRow; readonly remarked: boolean }) {
  return (
    <div className={`border-b border-hair py-1.5 text-small ${columns} ${remarked ? 'bg-wash' : ''}`}>
      <dt className="text-second tablet:text-ink">{row.label}</dt>
      <dd className="max-tablet:inline">{row.value}</dd>
      <dd className="max-tablet:inline">{row.plusMinus ? <><span className="tablet:sr-only"> ± </span>{row.plusMinus}</> : null}</dd>
      <dd className="text-second max-tablet:inline">{row.method ? <><span aria-hidden="true" className="tablet:hidden">, </span>{row.method}</> : null}</dd>
      <dd>{row.check}</dd>
    </div>
  );
}
