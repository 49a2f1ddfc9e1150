import { useRef, useState } from 'react';
import type { PointerEvent } from 'react';
import { Form } from 'react-router';
import { ChipGroup } from '#app/components/ui/chip-group.tsx';
import { useHydrated } from '#app/components/report/use-hydrated.ts';
import { ErrorSummary } from '#app/components/forms/error-summary.tsx';
import { TextInput } from '#app/components/forms/text-field.tsx';
import { problemFields } from '#app/components/findings/problem-fields.ts';
import type { FormAnswer } from '#app/components/findings/problem-fields.ts';
import { Button } from '#app/components/ui/button.tsx';
import { photoMarkKinds, photoMarkLabels, photoMarkSchema } from '#app/domain/photo-marks.ts';
import type { PhotoMark, PhotoMarkKind } from '#app/domain/photo-marks.ts';
import { MarksLayer } from './marks-layer.tsx';

export interface MarkDrawerProps {
  readonly photoId: string;
  readonly source: string;
  readonly alt: string;
  readonly widthPx: number;
  readonly heightPx: number;
  readonly marks: readonly PhotoMark[];
  readonly answer: FormAnswer | null;
}

type Values = Readonly<Record<'x' | 'y' | 'toX' | 'toY' | 'radius' | 'words', string>>;
const empty: Values = { x: '', y: '', toX: '', toY: '', radius: '', words: '' };
const percent = (part: number) => String(Math.round(Math.min(1, Math.max(0, part)) * 1000) / 10);

/** Draws a mark over a copy of the photo: by dragging on the picture, or by typing places in per cent. Both fill the same fields. */
export function MarkDrawer({ photoId, source, alt, widthPx, heightPx, marks, answer }: MarkDrawerProps) {
  const typed = answer?.typed;
  const [kind, setKind] = useState<PhotoMarkKind>(photoMarkKinds.find((one) => one === typed?.['markKind']) ?? 'arrow');
  const [values, setValues] = useState<Values>({ ...empty, ...typed });
  // Without scripts the fields of every kind stay in reach.
  const hydrated = useHydrated();
  const start = useRef<{ x: number; y: number } | null>(null);
  const field = problemFields(answer, {}, 'mark-');
  const input = (name: keyof Values) => ({ field: field(name), value: values[name], onChange: (event: { target: { value: string } }) => setValues((before) => ({ ...before, [name]: event.target.value })), autoComplete: 'off' });
  const preview = photoMarkSchema.safeParse({ markKind: kind, ...values });
  const place = (event: PointerEvent<HTMLDivElement>) => {
    const box = event.currentTarget.getBoundingClientRect();
    return { x: (event.clientX - box.left) / box.width, y: (event.clientY - box.top) / box.height };
  };
  const drag = (event: PointerEvent<HTMLDivElement>) => {
    const from = start.current;
    if (!from) return;
    const to = place(event);
    const radius = Math.hypot(to.x - from.x, ((to.y - from.y) * heightPx) / widthPx);
    setValues((before) => ({ ...before, x: percent(from.x), y: percent(from.y), toX: percent(to.x), toY: percent(to.y), radius: percent(radius) }));
  };
  return (
    <div className="grid gap-x-10 gap-y-6 desk:grid-cols-[minmax(0,1.7fr)_minmax(0,1fr)]">
      <div
        className="relative touch-none self-start bg-wash desk:cursor-crosshair"
        onPointerDown={(event) => {
          event.currentTarget.setPointerCapture(event.pointerId);
          start.current = place(event);
          drag(event);
        }}
        onPointerMove={drag}
        onPointerUp={() => { start.current = null; }}
        onPointerCancel={() => { start.current = null; }}
      >
        <img src={source} alt={alt} width={widthPx} height={heightPx} draggable={false} className="block h-auto w-full select-none" />
        <MarksLayer marks={preview.success ? [...marks, preview.data] : marks} widthPx={widthPx} heightPx={heightPx} />
      </div>
      <Form method="post" className="space-y-4">
        <input type="hidden" name="intent" value="add-mark" />
        <input type="hidden" name="photoId" value={photoId} />
        <ErrorSummary errors={answer?.formErrors} fields={[['x', 'From the left'], ['y', 'From the top'], ['toX', 'Point, from the left'], ['toY', 'Point, from the top'], ['radius', 'Radius'], ['words', 'Words']].map(([name = '', label = '']) => ({ field: field(name), label }))} />
        <fieldset>
          <legend className="pb-1 font-semibold">Draw</legend>
          <ChipGroup name="markKind" idPrefix="mark-kind" options={photoMarkKinds.map((value) => ({ value, label: photoMarkLabels[value] }))} chosen={[kind]} onChange={(value) => setKind(photoMarkKinds.find((one) => one === value) ?? 'arrow')} />
          <p className="pt-1 text-small text-second">Drag on the picture, or type places in per cent of width and height from the upper left corner. The original is never changed.</p>
        </fieldset>
        <div className="grid grid-cols-2 gap-3">
          <TextInput {...input('x')} label={kind === 'arrow' ? 'Start, from the left' : kind === 'circle' ? 'Middle, from the left' : 'From the left'} inputMode="decimal" />
          <TextInput {...input('y')} label={kind === 'arrow' ? 'Start, from the top' : kind === 'circle' ? 'Middle, from the top' : 'From the top'} inputMode="decimal" />
          <div hidden={hydrated && kind !== 'arrow'}><TextInput {...input('toX')} label="Point, from the left" inputMode="decimal" /></div>
          <div hidden={hydrated && kind !== 'arrow'}><TextInput {...input('toY')} label="Point, from the top" inputMode="decimal" /></div>
          <div hidden={hydrated && kind !== 'circle'}><TextInput {...input('radius')} label="Radius, of the width" inputMode="decimal" /></div>
        </div>
        <TextInput {...input('words')} label="Words" aside={kind === 'text' ? undefined : 'not required'} help="Short. No names." maxLength={80} />
        <Button>Add the mark</Button>
      </Form>
    </div>
  );
}
