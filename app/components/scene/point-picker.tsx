import { useEffect, useRef, useState } from 'react';
import { Field } from '#app/components/forms/field.tsx';
import { describedBy, fieldIds, fieldText, hasErrors } from '#app/components/forms/field-like.ts';
import type { FieldLike } from '#app/components/forms/field-like.ts';
import { Button } from '#app/components/ui/button.tsx';
import { useHydrated } from '#app/components/report/use-hydrated.ts';
import { PickerMap } from './base-map-lazy.tsx';
import type { Axis, Place } from './coordinate-text.ts';
import { coordinateText, readCoordinate } from './coordinate-text.ts';

export interface PointPickerProps {
  /** Named `latitudeDeg`, `longitudeDeg` and `accuracyM` in most forms; any names will do. */
  readonly latitude: FieldLike;
  readonly longitude: FieldLike;
  readonly accuracy: FieldLike;
  /** Where the map looks while no place is given: the site, or the whole world. */
  readonly around?: Place | null;
  readonly onChange?: () => void;
}

interface Typed {
  readonly latitude: string;
  readonly longitude: string;
  readonly accuracyM: string;
}

/**
 * A place as two boxes and, with scripts, a map with a cross and a button that asks this device. The boxes are what is
 * sent: decimal degrees. Degrees, minutes and seconds may be typed and are turned into decimals on leaving the box.
 * The accuracy the device gave goes along in a hidden box, and is dropped as soon as the place is changed by hand.
 */
export function PointPicker({ latitude, longitude, accuracy, around = null, onChange }: PointPickerProps) {
  const [typed, setTyped] = useState<Typed>({ latitude: fieldText(latitude), longitude: fieldText(longitude), accuracyM: fieldText(accuracy) });
  const box = useRef<HTMLDivElement>(null);
  const changed = useChanged(typed, box, onChange);
  const place = placeOf(typed);
  const type = (axis: Axis, text: string) => setTyped((old) => ({ ...old, [axis]: text, accuracyM: '' }));
  const move = (next: Place, decimals: number) => {
    changed();
    setTyped({ latitude: coordinateText(next.latitudeDeg, decimals), longitude: coordinateText(next.longitudeDeg, decimals), accuracyM: '' });
  };
  const locate = (next: Place, accuracyM: number) => {
    changed();
    setTyped({ latitude: coordinateText(next.latitudeDeg), longitude: coordinateText(next.longitudeDeg), accuracyM: accuracyM.toFixed(0) });
  };
  const accuracyM = typed.accuracyM === '' ? null : Number(typed.accuracyM);
  return (
    <div ref={box} className="space-y-3">
      <PickerMap place={place} around={around} accuracyM={accuracyM} onMove={move} />
      <div className="flex flex-wrap gap-2.5">
        <CoordinateBox axis="latitude" field={latitude} text={typed.latitude} help="Degrees, south negative" onText={type} />
        <CoordinateBox axis="longitude" field={longitude} text={typed.longitude} help="Degrees, west negative" onText={type} />
      </div>
      <input type="hidden" name={accuracy.name} value={typed.accuracyM} readOnly />
      <DeviceLocation accuracyM={accuracyM} onPlace={locate} />
    </div>
  );
}

function placeOf(typed: Typed): Place | null {
  const [lat, lon] = [readCoordinate(typed.latitude, 'latitude'), readCoordinate(typed.longitude, 'longitude')];
  return lat.ok && lon.ok ? { latitudeDeg: lat.valueDeg, longitudeDeg: lon.valueDeg } : null;
}

/** Lets the form know of a change the map made, once the boxes hold it, as typing would have. */
function useChanged(typed: Typed, box: { readonly current: HTMLElement | null }, onChange?: () => void): () => void {
  const pending = useRef(false);
  useEffect(() => {
    if (!pending.current) return;
    pending.current = false;
    box.current?.closest('form')?.dispatchEvent(new Event('input', { bubbles: true }));
    onChange?.();
  }, [typed, box, onChange]);
  return () => {
    pending.current = true;
  };
}

interface CoordinateBoxProps {
  readonly axis: Axis;
  readonly field: FieldLike;
  readonly text: string;
  readonly help: string;
  readonly onText: (axis: Axis, text: string) => void;
}

function CoordinateBox({ axis, field, text, help, onText }: CoordinateBoxProps) {
  const [left, setLeft] = useState(false);
  const reading = readCoordinate(text, axis);
  const own = left && text.trim() !== '' && !reading.ok ? [reading.sentence] : field.errors;
  const shown: FieldLike = { ...fieldIds(field), name: field.name, errors: own };
  return (
    <div className="min-w-36 flex-1">
      <Field field={shown} label={axis === 'latitude' ? 'Latitude' : 'Longitude'} help={help}>
        <input
          id={fieldIds(shown).id}
          name={field.name}
          value={text}
          className="field-box"
          autoComplete="off"
          aria-invalid={hasErrors(shown) || undefined}
          aria-describedby={describedBy(shown, true)}
          required={field.required ?? false}
          onChange={(event) => onText(axis, event.currentTarget.value)}
          onFocus={() => setLeft(false)}
          onBlur={() => {
            setLeft(true);
            if (reading.ok && !/^-?\d+(\.\d+)?$/.test(text.trim())) onText(axis, coordinateText(reading.valueDeg));
          }}
        />
      </Field>
    </div>
  );
}

/** Asks the device once, on a press, and says how exact its answer is. */
function DeviceLocation({ accuracyM, onPlace }: { readonly accuracyM: number | null; readonly onPlace: (place: Place, accuracyM: number) => void }) {
  const hydrated = useHydrated();
  const [words, setWords] = useState('');
  if (!hydrated || !('geolocation' in navigator)) return null;
  const ask = () => {
    setWords('Asking this device');
    navigator.geolocation.getCurrentPosition(
      ({ coords }) => {
        setWords('');
        onPlace({ latitudeDeg: coords.latitude, longitudeDeg: coords.longitude }, coords.accuracy);
      },
      (error) => setWords(error.code === error.PERMISSION_DENIED
        ? 'This device was told not to say where it is. Move the map, or type the position.'
        : 'This device does not know where it is. Move the map, or type the position.'),
      { enableHighAccuracy: true, timeout: 20_000, maximumAge: 60_000 },
    );
  };
  return (
    <div>
      <Button type="button" look="outlined" onClick={ask}>Use this device's location</Button>
      <p role="status" className="pt-1 text-small text-second">{words || (accuracyM === null ? '' : `This device says it is within ${accuracyM} m. Moving the cross or typing drops that figure.`)}</p>
    </div>
  );
}
