import { Form } from 'react-router';
import { Button } from '#app/components/ui/button.tsx';

export interface RunChoice {
  readonly number: number;
  readonly words: string;
}

/** Which two runs are compared; the choice is in the address. */
export function ChooseRuns({ runs, a, b }: { readonly runs: readonly RunChoice[]; readonly a: number | null; readonly b: number | null }) {
  return (
    <Form method="get" className="flex flex-wrap items-end gap-x-4 gap-y-3" data-print="no">
      <Choice name="a" label="Compare" runs={runs} value={a} />
      <Choice name="b" label="with" runs={runs} value={b} />
      <Button look="outlined">Show</Button>
    </Form>
  );
}

function Choice({ name, label, runs, value }: { readonly name: 'a' | 'b'; readonly label: string; readonly runs: readonly RunChoice[]; readonly value: number | null }) {
  return (
    <label className="flex items-center gap-2 max-tablet:w-full">
      <span className="flex-none font-semibold max-tablet:w-20">{label}</span>
      <select name={name} key={String(value)} defaultValue={String(value ?? '')} className="field-box min-w-0 tablet:!w-auto">
        {runs.map((run) => <option key={run.number} value={run.number}>{run.words}</option>)}
      </select>
    </label>
  );
}
