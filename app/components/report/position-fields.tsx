import { useState } from 'react';
import { fieldText } from '#app/components/forms/field-like.ts';
import { TextInput } from '#app/components/forms/text-field.tsx';
import { PointPicker } from '#app/components/scene/point-picker.tsx';
import type { ReportField } from './report-fields.ts';

export interface PositionFieldsProps {
  readonly field: ReportField;
  /** Where the map looks first. */
  readonly around: { readonly latitudeDeg: number; readonly longitudeDeg: number } | null;
}

type Typed = Record<'latitudeDeg' | 'longitudeDeg' | 'accuracyM', string>;

/** Latitude and longitude, folded away. The map is fetched when it is opened, not before: signal may be poor. */
export function PositionFields({ field, around }: PositionFieldsProps) {
  const [picking, setPicking] = useState<Typed | null>(null);
  const wrong = (field('latitudeDeg').errors?.length ?? 0) + (field('longitudeDeg').errors?.length ?? 0) > 0;
  const open = (details: HTMLDetailsElement) => {
    if (!details.open || picking) return;
    const value = (name: string) => {
      const input = details.querySelector(`[name="${name}"]`);
      return input instanceof HTMLInputElement ? input.value : '';
    };
    setPicking({ latitudeDeg: value('latitudeDeg'), longitudeDeg: value('longitudeDeg'), accuracyM: value('accuracyM') });
  };
  return (
    <details className="border-t border-hair" open={wrong || undefined} onToggle={(event) => open(event.currentTarget)}>
      <summary className="flex min-h-11 items-center underline decoration-ember decoration-2 underline-offset-4">Give the position, if that is easy</summary>
      <div className="pb-2">
        {picking ? (
          <PointPicker
            latitude={{ ...field('latitudeDeg'), defaultValue: picking.latitudeDeg }}
            longitude={{ ...field('longitudeDeg'), defaultValue: picking.longitudeDeg }}
            accuracy={{ ...field('accuracyM'), defaultValue: picking.accuracyM }}
            around={around}
          />
        ) : (
          <PlainPosition field={field} />
        )}
      </div>
    </details>
  );
}

function PlainPosition({ field }: { readonly field: ReportField }) {
  return (
    <div className="flex flex-wrap gap-2.5">
      <div className="min-w-36 flex-1"><TextInput field={field('latitudeDeg')} label="Latitude" help="Degrees, south negative" inputMode="text" autoComplete="off" /></div>
      <div className="min-w-36 flex-1"><TextInput field={field('longitudeDeg')} label="Longitude" help="Degrees, west negative" inputMode="text" autoComplete="off" /></div>
      <input type="hidden" name="accuracyM" defaultValue={fieldText(field('accuracyM'))} />
    </div>
  );
}
