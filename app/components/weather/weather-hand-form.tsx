import { Form } from 'react-router';
import { formFields } from '#app/components/cases/form-fields.ts';
import type { RefusedForm } from '#app/components/cases/form-fields.ts';
import { ErrorSummary } from '#app/components/forms/error-summary.tsx';
import { FieldError } from '#app/components/forms/field.tsx';
import { fieldIds, fieldText, hasErrors } from '#app/components/forms/field-like.ts';
import { TextInput } from '#app/components/forms/text-field.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { Cell, DataTable, HeadCell, Row, TableHead } from '#app/components/ui/data-table.tsx';
import { handName, handRows } from '#app/domain/weather-form.ts';
import { weatherQuantities } from '#app/domain/weather.ts';
import { sourceLabels, WeatherSourceFields } from './weather-source-fields.tsx';

const columns = [{ key: 'start', head: 'From' }, { key: 'end', head: 'To' }, ...weatherQuantities.map(({ key, label, unit }) => ({ key, head: `${label}, ${unit}` }))];

/** A few values typed by hand: from a bulletin, a screen of the station, or an own instrument. */
export function WeatherHandForm({ day, zone, problem }: { readonly day: string; readonly zone: string; readonly problem: RefusedForm | undefined }) {
  const { field, refused } = formFields('add-hand', problem, 'hand');
  const rows = Array.from({ length: handRows }, (_unused, index) => index);
  const labels = [...Object.entries(sourceLabels).map(([name, label]) => ({ field: field(name), label })), { field: field('handDay'), label: 'Day' }, ...rows.flatMap((row) => columns.map(({ key, head }) => ({ field: field(handName(row, key)), label: `Row ${row + 1}, ${head}` })))];
  return (
    <Form method="post" className="space-y-5" preventScrollReset>
      {refused ? <ErrorSummary errors={refused.formErrors} fields={labels} /> : null}
      <input type="hidden" name="intent" value="add-hand" />
      <WeatherSourceFields field={field} />
      <div className="max-w-56"><TextInput field={field('handDay', day)} label="Day" type="date" help={`Clock times at the place, ${zone.replaceAll('_', ' ')}.`} /></div>
      <DataTable caption="Values, each the mean from start to end">
        <TableHead>{columns.map(({ key, head }) => <HeadCell key={key}>{head}</HeadCell>)}</TableHead>
        <tbody>
          {rows.map((row) => (
            <Row key={row} tight>
              {columns.map(({ key, head }) => {
                const one = field(handName(row, key));
                const clock = key === 'start' || key === 'end';
                return <Cell key={key}><input id={fieldIds(one).id} name={one.name} defaultValue={fieldText(one)} aria-label={`Row ${row + 1}, ${head}`} aria-invalid={hasErrors(one) || undefined} {...(clock ? { type: 'time' } : { inputMode: 'decimal' as const })} autoComplete="off" className={`field-box min-w-0 ${clock ? '!w-28' : '!w-24'}`} /><FieldError field={one} /></Cell>;
              })}
            </Row>
          ))}
        </tbody>
      </DataTable>
      <Button look="outlined">Keep these values</Button>
    </Form>
  );
}
