import { Select, TextInput } from '#app/components/forms/text-field.tsx';
import type { FieldLike } from '#app/components/forms/field-like.ts';
import { siteUseLabels } from '#app/domain/site-form.ts';

export type SiteFieldOf = (name: string) => FieldLike;

/** Facts of a site; the code stands only where a new one is made. */
export function SiteFields({ field, withCode }: { readonly field: SiteFieldOf; readonly withCode: boolean }) {
  return (
    <div className="grid gap-4 tablet:grid-cols-2">
      {withCode ? <TextInput field={field('code')} label="Short code" help="Stands in addresses and report links, and stays." /> : null}
      <TextInput field={field('name')} label="Name" />
      <TextInput field={field('address')} label="Address" />
      <TextInput field={field('latitudeDeg')} label="Latitude" help="Such as 53.50, or 53 30 0 N" />
      <TextInput field={field('longitudeDeg')} label="Longitude" help="Such as -1.60, or 1 36 0 W" />
      <TextInput field={field('elevationM')} label="Height above sea level, m" inputMode="decimal" />
      <TextInput field={field('zone')} label="Time zone" help="Leave empty to take it from the coordinates." />
      <Select field={field('use')} label="Use" {...(withCode ? { emptyLabel: 'Choose one' } : {})} options={Object.entries(siteUseLabels).map(([value, label]) => ({ value, label }))} />
      <Select field={field('jurisdiction')} label="Jurisdiction" {...(withCode ? { emptyLabel: 'Choose one' } : {})} options={[{ value: 'GB', label: 'Great Britain' }, { value: 'EU', label: 'European Union' }, { value: 'US', label: 'United States' }, { value: 'other', label: 'Other' }]} />
    </div>
  );
}

export const siteFieldLabels: readonly { readonly name: string; readonly label: string }[] = [
  { name: 'code', label: 'Short code' },
  { name: 'name', label: 'Name' },
  { name: 'address', label: 'Address' },
  { name: 'latitudeDeg', label: 'Latitude' },
  { name: 'longitudeDeg', label: 'Longitude' },
  { name: 'elevationM', label: 'Height above sea level' },
  { name: 'zone', label: 'Time zone' },
  { name: 'use', label: 'Use' },
  { name: 'jurisdiction', label: 'Jurisdiction' },
];
