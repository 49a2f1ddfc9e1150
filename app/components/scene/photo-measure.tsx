import { useState } from 'react';
import { Form } from 'react-router';
import { formFields } from '#app/components/cases/form-fields.ts';
import type { RefusedForm } from '#app/components/cases/form-fields.ts';
import { ChoiceChips } from '#app/components/forms/choice-chips.tsx';
import { ErrorSummary } from '#app/components/forms/error-summary.tsx';
import { TextInput } from '#app/components/forms/text-field.tsx';
import { useHydrated } from '#app/components/report/use-hydrated.ts';
import { Button } from '#app/components/ui/button.tsx';
import { FactList } from '#app/components/ui/fact-list.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import { measurePhoto, pointLabels, readClicks } from '#app/domain/photo-measure.ts';
import type { PhotoMeasures, PointName, WithError } from '#app/domain/photo-measure.ts';
import { PhotoClicks, pointMarks } from './photo-clicks.tsx';
import { SquareOnView } from './square-on-view.tsx';

export interface PhotoMeasureProps {
  readonly label: string;
  readonly source: string;
  readonly alt: string;
  readonly baseVersion: number;
  readonly mayEdit: boolean;
  readonly whoEdits: string;
  readonly problem: RefusedForm | undefined;
}

const rectangleNames: readonly PointName[] = ['a', 'b', 'c', 'd', 'p', 'q', 'r', 's'];
const scaleNames: readonly PointName[] = ['a', 'b', 'p', 'q', 'r', 's'];
const startValues: Readonly<Record<string, string>> = { kind: 'rectangle', sizePlusMinusMm: '0.5', clickPx: '3', edgePlusMinusDeg: '2' };

/** Four corners of a known size, or a scale, make a photo square-on; length, width and direction of the mark follow. */
export function PhotoMeasure({ label, source, alt, baseVersion, mayEdit, whoEdits, problem }: PhotoMeasureProps) {
  const { field: fieldOf, refused } = formFields('use-photo', problem, 'photo');
  const [values, setValues] = useState<Readonly<Record<string, string>>>({ ...startValues, ...refused?.typed });
  const [active, setActive] = useState<PointName>('a');
  const hydrated = useHydrated();
  const names = values['kind'] === 'scale' ? scaleNames : rectangleNames;
  const put = (more: Record<string, string>) => setValues((before) => ({ ...before, ...more }));
  const points = Object.fromEntries(names.flatMap((name) => (isNumber(values[`${name}x`]) && isNumber(values[`${name}y`]) ? [[name, { x: Number(values[`${name}x`]), y: Number(values[`${name}y`]) }]] : [])));
  const setPoint = (name: PointName, x: number, y: number) => put({ [`${name}x`]: x.toFixed(1), [`${name}y`]: y.toFixed(1) });
  const click = (name: PointName, x: number, y: number) => {
    const isNew = !(name in points);
    setPoint(name, x, y);
    if (isNew) setActive(names.find((other) => other !== name && !(other in points)) ?? name);
  };
  const reading = readClicks(values);
  const measures = reading.ok ? measurePhoto(reading.clicks) : null;
  const box = (name: string, text: string, help?: string) => <TextInput field={fieldOf(name)} label={text} inputMode="decimal" value={values[name] ?? ''} onChange={(event) => put({ [name]: event.currentTarget.value })} {...(help ? { help } : {})} />;
  return (
    <Form method="post" className="space-y-6" preventScrollReset>
      {refused ? <ErrorSummary errors={refused.formErrors} fields={Object.keys(refused.fieldErrors).map((name) => ({ field: fieldOf(name), label: fieldNames[name] ?? name }))} /> : null}
      <input type="hidden" name="intent" value="use-photo" />
      <input type="hidden" name="baseVersion" value={baseVersion} />
      <div className="grid gap-8 desk:grid-cols-[minmax(0,1fr)_380px]">
        <div className="min-w-0 space-y-4">
          <ChoiceChips field={{ ...fieldOf('kind'), defaultValue: values['kind'] }} legend="Known in the photo, in the plane of the mark" options={[{ value: 'rectangle', label: 'Four corners of a rectangle' }, { value: 'scale', label: 'A scale, photo taken square-on' }]} onChange={(kind) => { put({ kind }); setActive('a'); }} />
          <div className="grid gap-4 tablet:grid-cols-3">
            {box('widthMm', values['kind'] === 'scale' ? 'Length of the scale, mm' : 'Corner 1 to 2, mm')}
            {values['kind'] === 'scale' ? null : box('heightMm', 'Corner 2 to 3, mm')}
            {box('sizePlusMinusMm', '± of these, mm')}
          </div>
          {hydrated ? <PhotoClicks source={source} alt={alt} names={names} active={active} points={points} onActive={setActive} onPoint={click} /> : <img src={source} alt={alt} className="block w-full" />}
          <PointTable names={names} values={values} put={put} />
        </div>
        <div className="min-w-0 space-y-5">
          <section>
            <SectionHeading note={`photo ${label}`}>Read from the photo</SectionHeading>
            {measures ? <Measures measures={measures} /> : <p className="text-second">{whatIsMissing(reading, names, points)}</p>}
          </section>
          {reading.ok && measures ? <SquareOnView clicks={reading.clicks} source={source} alt={`${alt}, made square-on`} /> : null}
          <div className="grid grid-cols-2 gap-4">
            {box('edgeBearingDeg', '1 to 2 runs to, ° true', 'On a level surface seen from above; left empty on a wall.')}
            {box('edgePlusMinusDeg', '± of it, °')}
            {box('clickPx', '± of a click, px')}
          </div>
          <p className="text-small text-second">The ± comes from the clicks and the known size. The bending of the lens is not in it: keep the mark near the middle, and the rectangle round it.</p>
          {mayEdit ? <Button look={measures ? 'filled' : 'waiting'}>Use as measurement, version {baseVersion + 1}</Button> : <p className="text-small text-second">Using it as a measurement now: {whoEdits}</p>}
        </div>
      </div>
    </Form>
  );
}

const isNumber = (text: string | undefined) => text !== undefined && text.trim() !== '' && Number.isFinite(Number(text));
const fieldNames: Readonly<Record<string, string>> = { widthMm: 'Known size', heightMm: 'Corner 2 to 3', sizePlusMinusMm: '± of the size', clickPx: '± of a click', edgeBearingDeg: 'Bearing of the edge', edgePlusMinusDeg: '± of the bearing', ...Object.fromEntries(Object.entries(pointLabels).flatMap(([name, label]) => [[`${name}x`, label], [`${name}y`, label]])) };

function whatIsMissing(reading: ReturnType<typeof readClicks>, names: readonly PointName[], points: Readonly<Record<string, unknown>>): string {
  const open = names.filter((name) => name !== 'r' && name !== 's' && !(name in points));
  if (open.length > 0) return `Still to click: ${open.map((name) => pointMarks[name]).join(', ')}. C and D, the width, may be left out.`;
  return reading.ok ? 'These corners cross each other, or three lie on a line. Click them in turn round the rectangle, clockwise from the upper left.' : 'Give the known size in millimetres.';
}

/** As many digits as the ± supports. */
export function withError({ value, plusMinus }: WithError, unit: string): string {
  const digits = plusMinus >= 10 ? 0 : plusMinus >= 1 ? 1 : plusMinus >= 0.1 ? 2 : 3;
  return `${value.toFixed(digits)} ±${plusMinus.toFixed(digits)}${unit.startsWith('°') ? '' : ' '}${unit}`;
}

function Measures({ measures }: { readonly measures: PhotoMeasures }) {
  return (
    <FactList
      facts={[
        { term: 'Mark, A to B', value: withError(measures.lengthMm, 'mm') },
        ...(measures.widthMm ? [{ term: 'Width, C to D', value: withError(measures.widthMm, 'mm') }] : []),
        { term: 'Slope against the edge 1 to 2', value: withError(measures.slopeDeg, '°'), note: 'clockwise' },
        ...(measures.headingDeg ? [{ term: 'A to B runs to', value: withError(measures.headingDeg, '° true') }] : []),
        { term: 'One pixel', value: `${measures.mmPerPx.toPrecision(2)} mm` },
      ]}
    />
  );
}

/** Where each point lies, in pixels of the view copy: the way without a mouse. */
function PointTable({ names, values, put }: { readonly names: readonly PointName[]; readonly values: Readonly<Record<string, string>>; readonly put: (more: Record<string, string>) => void }) {
  return (
    <details>
      <summary className="inline-flex min-h-11 items-center underline decoration-ember decoration-2 underline-offset-4 desk:min-h-8">Points as numbers</summary>
      <p className="text-small text-second">Pixels of the view copy, right and down from its upper left corner.</p>
      <div className="grid gap-x-8 tablet:grid-cols-2">
        {names.map((name) => (
          <div key={name} className="grid grid-cols-[minmax(0,1fr)_5.5rem_5.5rem] items-center gap-2 border-b border-hair py-1.5">
            <span><b className="font-semibold">{pointMarks[name]}</b> {pointLabels[name]}</span>
            {(['x', 'y'] as const).map((axis) => <input key={axis} id={`photo-${name}${axis}`} name={`${name}${axis}`} value={values[`${name}${axis}`] ?? ''} onChange={(event) => put({ [`${name}${axis}`]: event.currentTarget.value })} aria-label={`${pointLabels[name]}, ${axis === 'x' ? 'right' : 'down'}`} inputMode="decimal" autoComplete="off" className="field-box min-w-0" />)}
          </div>
        ))}
      </div>
    </details>
  );
}
