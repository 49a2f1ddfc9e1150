import { useRef, useState } from 'react';
import type { MouseEvent } from 'react';
import { Form } from 'react-router';
import { ErrorSummary } from '#app/components/forms/error-summary.tsx';
import type { FieldLike } from '#app/components/forms/field-like.ts';
import { TextInput } from '#app/components/forms/text-field.tsx';
import { answerField } from '#app/components/report/form-words.ts';
import { useHydrated } from '#app/components/report/use-hydrated.ts';
import { Button } from '#app/components/ui/button.tsx';
import { SegmentButtons } from '#app/components/ui/segment-buttons.tsx';
import { pointFields, pointIndexes } from '#app/domain/site-plan-form.ts';
import { knownPointCount } from '#app/domain/site-plan.ts';

export interface KnownPointsFormProps {
  readonly plan: { readonly name: string; readonly address: string; readonly widthPx: number; readonly heightPx: number };
  readonly typed: Readonly<Record<string, string>>;
  readonly formErrors: readonly string[];
  readonly fieldErrors: Readonly<Record<string, readonly string[]>>;
}

/** The drawing, and points that are known on it and on the ground. A point is chosen with a click, or typed as column and row. */
export function KnownPointsForm({ plan, typed, formErrors, fieldErrors }: KnownPointsFormProps) {
  const form = useRef<HTMLFormElement>(null);
  const hydrated = useHydrated();
  const [active, setActive] = useState('1');
  const [pins, setPins] = useState(() => pinsOf((name) => typed[name] ?? ''));
  const field = (name: string): FieldLike => ({ name, id: name, defaultValue: typed[name] ?? '', errors: fieldErrors[name] ?? [] });
  const read = () => {
    const data = new FormData(form.current ?? undefined);
    setPins(pinsOf((name) => String(data.get(name) ?? '')));
  };
  const choose = (event: MouseEvent<HTMLElement>) => {
    const box = event.currentTarget.getBoundingClientRect();
    const share = (at: number, from: number, size: number) => Math.min(1, Math.max(0, (at - from) / size));
    const names = pointFields(Number(active));
    if (!form.current) return;
    answerField(form.current, names.x, String(Math.round(share(event.clientX, box.left, box.width) * plan.widthPx)));
    answerField(form.current, names.y, String(Math.round(share(event.clientY, box.top, box.height) * plan.heightPx)));
  };
  return (
    <Form method="post" ref={form} onInput={read} className="gap-x-8 space-y-4 desk:grid desk:grid-cols-[minmax(0,1fr)_24rem]" noValidate>
      <div className="min-w-0 space-y-2">
        {hydrated ? <SegmentButtons label="A click sets" options={pointIndexes.map((index) => ({ value: String(index), label: `Point ${index}` }))} chosen={active} onChoose={setActive} /> : null}
        <div className="relative w-fit max-w-full border border-edge bg-white">
          {/* eslint-disable-next-line jsx-a11y/click-events-have-key-events, jsx-a11y/no-noninteractive-element-interactions -- the boxes beside it take the same figures by keyboard */}
          <img src={plan.address} width={plan.widthPx} height={plan.heightPx} alt={`Drawing: ${plan.name}`} className={`block h-auto max-w-full ${hydrated ? 'cursor-crosshair' : ''}`} onClick={choose} />
          <svg viewBox={`0 0 ${plan.widthPx} ${plan.heightPx}`} aria-hidden="true" className="pointer-events-none absolute inset-0 h-full w-full">
            {pins.map((pin) => <Pin key={pin.index} {...pin} size={plan.widthPx / 60} />)}
          </svg>
        </div>
      </div>
      <div className="space-y-5">
        <input type="hidden" name="intent" value="place-plan" />
        <ErrorSummary errors={formErrors} fields={pointIndexes.flatMap((index) => Object.values(pointFields(index)).map((name) => ({ field: field(name), label: `Point ${index}` })))} />
        <p>Choose {knownPointCount.least} to {knownPointCount.most} points far apart, such as corners of the building. Scale and north follow from them; three or more also show how well the drawing fits.</p>
        {pointIndexes.map((index) => <PointBoxes key={index} index={index} field={field} />)}
        <Button>Place the drawing</Button>
      </div>
    </Form>
  );
}

interface PinAt {
  readonly index: number;
  readonly xPx: number;
  readonly yPx: number;
}

function pinsOf(value: (name: string) => string): readonly PinAt[] {
  return pointIndexes.flatMap((index) => {
    const names = pointFields(index);
    const [x, y] = [value(names.x), value(names.y)];
    const [xPx, yPx] = [Number(x), Number(y)];
    return x !== '' && y !== '' && Number.isFinite(xPx) && Number.isFinite(yPx) ? [{ index, xPx, yPx }] : [];
  });
}

function Pin({ index, xPx, yPx, size }: PinAt & { readonly size: number }) {
  return (
    <g>
      <path d={`M${xPx - size} ${yPx}h${2 * size}M${xPx} ${yPx - size}v${2 * size}`} stroke="#ffffff" strokeWidth={size / 3} />
      <path d={`M${xPx - size} ${yPx}h${2 * size}M${xPx} ${yPx - size}v${2 * size}`} stroke="#1c2430" strokeWidth={size / 8} />
      <text x={xPx + size / 2} y={yPx - size / 2} fontSize={size * 1.6} fill="#1c2430" stroke="#ffffff" strokeWidth={size / 6} paintOrder="stroke" fontWeight="600">{index}</text>
    </g>
  );
}

function PointBoxes({ index, field }: { readonly index: number; readonly field: (name: string) => FieldLike }) {
  const names = pointFields(index);
  return (
    <fieldset className="space-y-2 border-t border-hair pt-2">
      <legend className="pr-3 font-semibold">Point {index}{index > knownPointCount.least ? <span className="font-normal text-second">, not required</span> : null}</legend>
      <TextInput field={field(names.name)} label="What it is" help={index === 1 ? 'Such as: north-east corner of block D.' : undefined} autoComplete="off" maxLength={60} />
      <TextInput field={field(names.place)} label="Position on the ground" help={index === 1 ? 'Latitude, a comma, longitude: 53.4961, -1.6022 or 53 29 46 N, 1 36 8 W.' : undefined} autoComplete="off" />
      <div className="flex gap-2.5">
        <div className="flex-1"><TextInput field={field(names.x)} label="Column, px" inputMode="numeric" autoComplete="off" /></div>
        <div className="flex-1"><TextInput field={field(names.y)} label="Row, px" inputMode="numeric" autoComplete="off" /></div>
      </div>
    </fieldset>
  );
}
