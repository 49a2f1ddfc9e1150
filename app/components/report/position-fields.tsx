import { useMemo, useRef, useState } from 'react';
import type { SyntheticEvent } from 'react';
import { fieldText } from '#app/components/forms/field-like.ts';
import { TextInput } from '#app/components/forms/text-field.tsx';
import type { PlacedPlan } from '#app/domain/plan-view.ts';
import { PointPicker } from '#app/components/scene/point-picker.tsx';
import type { Place, PlaceReading } from '#app/domain/coordinate-text.ts';
import { coordinateText, degreesWithLetter, placeText, readCoordinate, readPlace } from '#app/domain/coordinate-text.ts';
import { placeFieldNames, readReportPlaces, wallFields, wallIndexes, wallLabel, wallWords } from '#app/domain/report-place.ts';
import { answerField } from './form-words.ts';
import type { ReportField } from './report-fields.ts';
import { useHydrated } from './use-hydrated.ts';

export interface PositionFieldsProps {
  readonly field: ReportField;
  /** What the form holds at the moment. */
  readonly values: Readonly<Record<string, string>>;
  /** Where the map looks first. */
  readonly around: Place | null;
  readonly plans: readonly PlacedPlan[];
}

/** Exact position, pin of the optic and wall lines, folded away. The map is fetched when it is opened, not before: signal may be poor. */
export function PositionFields({ field, values, around, plans }: PositionFieldsProps) {
  const [opened, setOpened] = useState(false);
  const wrong = placeFieldNames.some((name) => (field(name).errors?.length ?? 0) > 0);
  const box = useRef<HTMLDivElement>(null);
  const set = (name: string, text: string) => {
    const form = box.current?.closest('form');
    if (form) answerField(form, name, text);
  };
  const move = (name: string, place: Place, decimals: number) => {
    if (name !== 'position') {
      set(name, placeText(place, decimals));
      return;
    }
    set('latitudeDeg', coordinateText(place.latitudeDeg, decimals));
    set('longitudeDeg', coordinateText(place.longitudeDeg, decimals));
    set('accuracyM', '');
  };
  // What the device said of its accuracy holds only as long as its figures stand.
  const typed = ({ nativeEvent, target }: SyntheticEvent) => {
    if (nativeEvent.isTrusted && target instanceof HTMLInputElement && (target.name === 'latitudeDeg' || target.name === 'longitudeDeg')) set('accuracyM', '');
  };
  return (
    <details className="border-t border-hair" open={wrong || undefined} onToggle={(event) => (event.currentTarget.open ? setOpened(true) : undefined)}>
      <summary className="flex min-h-11 items-center underline decoration-ember decoration-2 underline-offset-4">Show it on a map or plan, or type the position</summary>
      <div ref={box} className="space-y-4 pb-2" onInput={typed}>
        {opened ? <PlaceMap values={values} around={around} plans={plans} onMove={move} /> : null}
        <PositionBoxes field={field} values={values} />
        <TextInput field={field('opticPlace')} label="Where the thing stands that bent the light" help="Latitude, a comma, longitude. Leave it empty if you don't know." autoComplete="off" />
        <Reading reading={readPlace(values['opticPlace'] ?? '')} typed={values['opticPlace'] ?? ''} />
        <Walls field={field} values={values} />
      </div>
    </details>
  );
}

function PlaceMap({ values, around, plans, onMove }: Pick<PositionFieldsProps, 'values' | 'around' | 'plans'> & { readonly onMove: (name: string, place: Place, decimals: number) => void }) {
  // Only these boxes matter here: the map is drawn anew when one of them changes, not with every letter of the story.
  const key = JSON.stringify(placeFieldNames.map((name) => values[name] ?? ''));
  const { points, lines, accuracyM } = useMemo(() => {
    const texts: unknown = JSON.parse(key);
    const held = Object.fromEntries(placeFieldNames.map((name, index) => [name, Array.isArray(texts) ? String(texts[index]) : '']));
    const { position, onMap } = readReportPlaces(held).places;
    const pin = (name: string): Place | null => {
      const reading = readPlace(held[name] ?? '');
      return reading.ok ? reading.place : null;
    };
    // One wall more than there are is offered, so that lines can be drawn without opening anything else.
    const drawn = wallIndexes.filter((index) => pin(wallFields(index).from) ?? pin(wallFields(index).to)).length;
    const ends = wallIndexes.slice(0, drawn + 1).flatMap((index) => {
      const names = wallFields(index);
      return [{ name: names.from, label: `Wall ${index}, start`, place: pin(names.from), named: false }, { name: names.to, label: `Wall ${index}, end`, place: pin(names.to), named: false }];
    });
    return {
      points: [{ name: 'position', label: 'The mark', place: position, named: true }, { name: 'opticPlace', label: 'What bent the light', place: pin('opticPlace'), named: true }, ...ends],
      lines: (onMap?.walls ?? []).map((wall) => ({ ...wall, label: wallLabel(wall) })),
      accuracyM: position?.accuracyM ?? null,
    };
  }, [key]);
  return <PointPicker points={points} lines={lines} around={around} accuracyM={accuracyM} plans={plans} onMove={onMove} />;
}

function PositionBoxes({ field, values }: Pick<PositionFieldsProps, 'field' | 'values'>) {
  const latitude = values['latitudeDeg'] ?? '';
  const longitude = values['longitudeDeg'] ?? '';
  const reading: PlaceReading = ((): PlaceReading => {
    const [north, east] = [readCoordinate(latitude, 'latitude'), readCoordinate(longitude, 'longitude')];
    if (!north.ok) return north;
    return east.ok ? { ok: true, place: { latitudeDeg: north.valueDeg, longitudeDeg: east.valueDeg } } : east;
  })();
  return (
    <div>
      <div className="flex flex-wrap gap-2.5">
        <div className="min-w-36 flex-1"><TextInput field={field('latitudeDeg')} label="Latitude" help="Of the mark, such as 53.4961, or 53 29 46 N" autoComplete="off" /></div>
        <div className="min-w-36 flex-1"><TextInput field={field('longitudeDeg')} label="Longitude" help="Of the mark, such as -1.6022, or 1 36 8 W" autoComplete="off" /></div>
        <input type="hidden" name="accuracyM" defaultValue={fieldText(field('accuracyM'))} />
      </div>
      <Reading reading={reading} typed={latitude && longitude} />
    </div>
  );
}

/** How a typed place is read, said once it can be; until then how to write it, for the eye only. Nothing while it is empty. */
function Reading({ reading, typed }: { readonly reading: PlaceReading; readonly typed: string }) {
  const hydrated = useHydrated();
  if (!hydrated || typed.trim() === '') return null;
  if (!reading.ok) return <p className="pt-1 text-small text-second">{reading.sentence}</p>;
  const { latitudeDeg, longitudeDeg } = reading.place;
  return <p role="status" className="pt-1 text-small text-second">Read as {degreesWithLetter(latitudeDeg, 'latitude', 5)}, {degreesWithLetter(longitudeDeg, 'longitude', 5)}.</p>;
}

/** Lines along walls: their direction and length follow from their ends. */
function Walls({ field, values }: Pick<PositionFieldsProps, 'field' | 'values'>) {
  return (
    <fieldset className="space-y-3">
      <legend className="font-semibold">Walls, as lines</legend>
      <p className="text-small text-second">A line along a wall, from corner to corner, gives its true direction and length better than a compass. Put the cross on each end, or type both ends.</p>
      {wallIndexes.map((index) => {
        const names = wallFields(index);
        const ends = { [names.from]: values[names.from] ?? '', [names.to]: values[names.to] ?? '' };
        const [wall] = readReportPlaces(ends).places.onMap?.walls ?? [];
        return (
          <div key={index}>
            <div className="flex flex-wrap gap-2.5">
              <div className="min-w-36 flex-1"><TextInput field={field(names.from)} label={`Wall ${index}, first end`} autoComplete="off" /></div>
              <div className="min-w-36 flex-1"><TextInput field={field(names.to)} label={`Wall ${index}, other end`} autoComplete="off" /></div>
            </div>
            {wall ? <p role="status" className="pt-1 text-small text-second">{wallWords(wall)}.</p> : null}
          </div>
        );
      })}
    </fieldset>
  );
}
