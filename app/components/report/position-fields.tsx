import { useState } from 'react';
import { TextInput } from '#app/components/forms/text-field.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { useHydrated } from './use-hydrated.ts';
import type { ReportField } from './report-fields.ts';

/** Latitude and longitude, folded away; this device may fill them in when asked. */
export function PositionFields({ field }: { readonly field: ReportField }) {
  const wrong = (field('latitudeDeg').errors?.length ?? 0) + (field('longitudeDeg').errors?.length ?? 0) > 0;
  return (
    <details className="border-t border-hair" open={wrong || undefined}>
      <summary className="flex min-h-11 items-center underline decoration-ember decoration-2 underline-offset-4">Give the position, if that is easy</summary>
      <div className="space-y-3 pb-2">
        <DeviceLocation />
        <div className="flex flex-wrap gap-2.5">
          <div className="min-w-36 flex-1"><TextInput field={field('latitudeDeg')} label="Latitude" help="Degrees, south negative" inputMode="decimal" autoComplete="off" /></div>
          <div className="min-w-36 flex-1"><TextInput field={field('longitudeDeg')} label="Longitude" help="Degrees, west negative" inputMode="decimal" autoComplete="off" /></div>
        </div>
        <input type="hidden" name="accuracyM" defaultValue={String(field('accuracyM').defaultValue ?? '')} />
      </div>
    </details>
  );
}

/** Asks the device once, on a press, and says how exact its answer is. */
function DeviceLocation() {
  const hydrated = useHydrated();
  const [words, setWords] = useState('');
  if (!hydrated || !('geolocation' in navigator)) return null;
  const locate = (form: HTMLFormElement | null) => {
    setWords('Asking this device…');
    navigator.geolocation.getCurrentPosition(
      ({ coords }) => {
        const values = { latitudeDeg: coords.latitude.toFixed(6), longitudeDeg: coords.longitude.toFixed(6), accuracyM: coords.accuracy.toFixed(0) };
        for (const [name, value] of Object.entries(values)) {
          const input = form?.elements.namedItem(name);
          if (input instanceof HTMLInputElement) input.value = value;
        }
        form?.dispatchEvent(new Event('input', { bubbles: true }));
        setWords(`Filled in; this device says it is within ${coords.accuracy.toFixed(0)} m.`);
      },
      (error) => setWords(error.code === error.PERMISSION_DENIED ? 'This device was told not to say where it is. Type the position, or leave it empty.' : 'This device does not know where it is. Type the position, or leave it empty.'),
      { enableHighAccuracy: true, timeout: 20_000, maximumAge: 60_000 },
    );
  };
  return (
    <div>
      <Button type="button" look="outlined" onClick={(event) => locate(event.currentTarget.form)}>Use this device's location</Button>
      <p role="status" className="pt-1 text-small text-second">{words}</p>
    </div>
  );
}
