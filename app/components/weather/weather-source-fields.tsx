import { Select, TextInput } from '#app/components/forms/text-field.tsx';
import type { FieldLike } from '#app/components/forms/field-like.ts';
import { weatherNatureLabels, weatherNatures } from '#app/domain/weather.ts';

export const sourceLabels: Readonly<Record<string, string>> = { sourceName: 'Source', station: 'Station', stationDistanceKm: 'Distance', stationBearingDeg: 'Bearing', nature: 'Kind of numbers', licenceNote: 'Licence' };

/** Who the numbers come from, and what they can prove. */
export function WeatherSourceFields({ field }: { readonly field: (name: string) => FieldLike }) {
  return (
    <div className="grid gap-4 tablet:grid-cols-2 desk:grid-cols-3">
      <TextInput field={field('sourceName')} label="Source" help="Service, network, or who wrote it down." maxLength={160} />
      <TextInput field={field('station')} label="Station" maxLength={160} />
      <Select field={field('nature')} label="Kind of numbers" emptyLabel="Say which" options={weatherNatures.map((value) => ({ value, label: weatherNatureLabels[value] }))} />
      <TextInput field={field('stationDistanceKm')} label="Distance of the station, km" inputMode="decimal" help="30 km off cannot prove a clear gap." />
      <TextInput field={field('stationBearingDeg')} label="From here to it, ° true" inputMode="decimal" />
      <TextInput field={field('licenceNote')} label="Licence, if any" maxLength={300} />
    </div>
  );
}
