import { ChoiceChips } from '#app/components/forms/choice-chips.tsx';
import { TextInput } from '#app/components/forms/text-field.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { facingsOfWall } from '#app/domain/report-optic.ts';
import { readReportPlaces } from '#app/domain/report-place.ts';
import { answerField } from './form-words.ts';
import type { ReportField } from './report-fields.ts';
import { useHydrated } from './use-hydrated.ts';

const tilts = [
  { value: 'upright', label: 'Upright, like a wall' },
  { value: 'facing-up', label: 'Flat, facing up' },
  { value: 'dont-know', label: "Something else, or don't know", dashed: true },
];

/** Which way the thing faces. A wall line drawn on the map offers the two directions square to it. */
export function FacingFields({ field, values }: { readonly field: ReportField; readonly values: Readonly<Record<string, string>> }) {
  const hydrated = useHydrated();
  const walls = hydrated ? (readReportPlaces(values).places.onMap?.walls ?? []) : [];
  const facings = walls.flatMap((wall, index) => facingsOfWall(wall).map((deg) => ({ deg, words: `${deg}°, ${compassName(deg)} (wall ${index + 1})` })));
  return (
    <>
      <TextInput
        field={field('opticFacesDeg')}
        label="Which way does it face? Degrees from true north"
        help="North is 0, east 90, south 180, west 270. A wall drawn on the map above gives it best: a compass near steel is wrong. Leave it empty if you don't know."
        inputMode="decimal"
        autoComplete="off"
      />
      {facings.length > 0 ? (
        <div role="group" aria-label="Directions from your wall lines" className="flex flex-wrap gap-2">
          {facings.map(({ deg, words }) => (
            <Button key={words} type="button" look="outlined" className="min-h-11" onClick={(event) => (event.currentTarget.form ? answerField(event.currentTarget.form, 'opticFacesDeg', String(deg)) : undefined)}>{words}</Button>
          ))}
        </div>
      ) : null}
      <ChoiceChips field={field('opticTilt')} legend="How did it stand?" options={tilts} />
    </>
  );
}

const names = ['north', 'north-east', 'east', 'south-east', 'south', 'south-west', 'west', 'north-west'] as const;
const compassName = (deg: number): string => names[Math.round(deg / 45) % 8] ?? 'north';
