import { useState } from 'react';
import { Button } from '#app/components/ui/button.tsx';
import { Caution } from '#app/components/ui/caution.tsx';
import { cautions } from '#app/components/layout/cautions.ts';
import { TextInput } from '#app/components/forms/text-field.tsx';
import { useHydrated } from '#app/components/report/use-hydrated.ts';
import { readShadow } from '#app/domain/shadow-reading.ts';
import type { ShadowPlace } from '#app/domain/shadow-reading.ts';
import type { FieldOf } from './scene-form-part.tsx';
import { Part } from './scene-form-part.tsx';

export interface NorthFacts {
  readonly today: string;
  readonly declinationWords: string;
  readonly declinationDeg: number | null;
  readonly place: ShadowPlace;
}

/** Who measured, when, and how bearings are turned to true north. */
export function NorthPart({ field, north, measurer }: { readonly field: FieldOf; readonly north: NorthFacts; readonly measurer: string }) {
  const start = (name: string, fallback: string) => ({ ...field(name), defaultValue: field(name).defaultValue || fallback });
  return (
    <Part title="Who, when and north" note="kept with each number that is new or changed; stored bearings are always from true north">
      <div className="grid gap-4 tablet:grid-cols-2 desk:grid-cols-4">
        <TextInput field={start('measuredBy', measurer)} label="Measured by" help="Name or role." maxLength={120} />
        <TextInput field={start('measuredOn', north.today)} label="Day of the measurements" type="date" max={north.today} help={north.declinationWords} />
        <TextInput field={field('gridConvergenceDeg')} label="Grid convergence, °" inputMode="decimal" help="For grid bearings: from the margin of the map, added, east positive." />
        <TextInput field={field('shadowCorrectionDeg')} label="Correction by shadow, °" inputMode="decimal" help="For an instrument set right by a timed shadow, below: added to what it reads." />
      </div>
      <ShadowNorth north={north} />
    </Part>
  );
}

/** True north from the shadow of an upright edge, worked out on this device so that it answers without a signal. */
function ShadowNorth({ north }: { readonly north: NorthFacts }) {
  const hydrated = useHydrated();
  const [at, setAt] = useState('');
  const [bearing, setBearing] = useState('');
  const asked = at !== '' && bearing !== '';
  const reading = asked ? readShadow(at, bearing, north.place, north.declinationDeg) : null;
  const take = () => {
    const box = document.querySelector<HTMLInputElement>('#scene-shadowCorrectionDeg');
    if (!box || !reading?.ok) return;
    box.value = String(reading.correctionDeg);
    box.dispatchEvent(new Event('input', { bubbles: true }));
    box.focus();
  };
  return (
    <details>
      <summary className="inline-flex min-h-11 items-center underline decoration-ember decoration-2 underline-offset-4 desk:min-h-8">True north from a timed shadow</summary>
      <div className="space-y-3 border-l border-hair py-2 pl-4">
        <p className="max-w-[64ch]">Hang a plumb line in the sun. Lay the instrument along its shadow, pointing away from the line, and read it together with the time of a clock that is right. Works with the sun between 2 and 75° up.</p>
        <Caution title="Look at the shadow only.">{cautions.eyes}</Caution>
        {hydrated ? (
          <>
            <div className="grid gap-4 tablet:grid-cols-[minmax(0,16rem)_minmax(0,16rem)]">
              <TextInput field={{ name: '', id: 'shadow-at' }} label="Clock time at the place" type="datetime-local" step={1} value={at} onChange={(event) => setAt(event.currentTarget.value)} help={north.place.zone.replaceAll('_', ' ')} />
              <TextInput field={{ name: '', id: 'shadow-read' }} label="The shadow reads, °" inputMode="decimal" value={bearing} onChange={(event) => setBearing(event.currentTarget.value)} />
            </div>
            <div role="status" className="space-y-1">
              {reading === null ? null : reading.ok ? reading.sentences.map((sentence) => <p key={sentence}>{sentence}</p>) : <p className="font-semibold">{reading.sentence}</p>}
            </div>
            {reading?.ok ? <Button type="button" look="outlined" onClick={take}>Use {reading.correctionDeg > 0 ? '+' : ''}{reading.correctionDeg}° as the correction</Button> : null}
          </>
        ) : (
          <p>Needs a script to run in this browser. The bearing of the sun at any time is at <a href={`/api/v1/sun?latitudeDeg=${north.place.latitudeDeg}&longitudeDeg=${north.place.longitudeDeg}`}>the sun’s position</a>; a shadow points the opposite way.</p>
        )}
      </div>
    </details>
  );
}
