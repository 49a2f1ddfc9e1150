import { Form } from 'react-router';
import { formFields } from '#app/components/cases/form-fields.ts';
import type { RefusedForm } from '#app/components/cases/form-fields.ts';
import { entryLabel, EntryRows } from '#app/components/forms/entry-rows.tsx';
import { ErrorSummary } from '#app/components/forms/error-summary.tsx';
import { describedBy, fieldIds, fieldText, hasErrors } from '#app/components/forms/field-like.ts';
import { TextInput } from '#app/components/forms/text-field.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { handName, handRows } from '#app/domain/weather-form.ts';
import { weatherQuantities } from '#app/domain/weather.ts';
import { sourceLabels, WeatherSourceFields } from './weather-source-fields.tsx';

const half = 'max-desk:col-span-3';
const third = 'max-desk:col-span-2';
const columns = [
  { key: 'start', head: 'From', span: half },
  { key: 'end', head: 'To', span: half },
  ...weatherQuantities.map(({ key, label, unit }, index) => ({ key, head: `${label}, ${unit}`, span: index >= 2 && index <= 4 ? third : half })),
];
const grid = 'desk:grid-cols-[1.5rem_7rem_7rem_repeat(7,minmax(0,1fr))]';
const rows = Array.from({ length: handRows }, (_unused, index) => index);

/** A few values typed by hand: from a bulletin, a screen of the station, or an own instrument. */
export function WeatherHandForm({ day, zone, problem }: { readonly day: string; readonly zone: string; readonly problem: RefusedForm | undefined }) {
  const { field, refused } = formFields('add-hand', problem, 'hand');
  const cell = (row: number, key: string) => field(handName(row, key));
  const labels = [...Object.entries(sourceLabels).map(([name, label]) => ({ field: field(name), label })), { field: field('handDay'), label: 'Day' }, ...rows.flatMap((row) => columns.map(({ key, head }) => ({ field: cell(row, key), label: entryLabel(row, head) })))];
  return (
    <Form method="post" className="space-y-5" preventScrollReset>
      {refused ? <ErrorSummary errors={refused.formErrors} fields={labels} /> : null}
      <input type="hidden" name="intent" value="add-hand" />
      <WeatherSourceFields field={field} />
      <div className="max-w-56"><TextInput field={field('handDay', day)} label="Day" type="date" help={`Clock times at the place, ${zone.replaceAll('_', ' ')}.`} /></div>
      <p className="text-small text-second">Each value is the mean from its start to its end. Leave out what you do not have.</p>
      <EntryRows
        caption="Values, each the mean from start to end"
        columns={columns}
        grid={grid}
        rowCount={handRows}
        fieldOf={cell}
        control={(row, key, label) => {
          const one = cell(row, key);
          const clock = key === 'start' || key === 'end';
          return <input id={fieldIds(one).id} name={one.name} defaultValue={fieldText(one)} aria-label={label} aria-invalid={hasErrors(one) || undefined} aria-describedby={describedBy(one, false)} {...(clock ? { type: 'time' } : { inputMode: 'decimal' as const })} autoComplete="off" className="field-box min-w-0" />;
        }}
      />
      <Button look="outlined">Keep these values</Button>
    </Form>
  );
}
