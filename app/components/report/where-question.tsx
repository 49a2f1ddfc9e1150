import { useRef } from 'react';
import { FieldError } from '#app/components/forms/field.tsx';
import { Select, TextInput } from '#app/components/forms/text-field.tsx';
import type { PlacedPlan } from '#app/domain/plan-view.ts';
import { Button } from '#app/components/ui/button.tsx';
import { coordinateText } from '#app/domain/coordinate-text.ts';
import { farM } from '#app/domain/ground.ts';
import type { UnitSystem } from '#app/domain/lengths.ts';
import { distanceWords } from '#app/domain/lengths.ts';
import { readReportPlaces } from '#app/domain/report-place.ts';
import { answerField } from './form-words.ts';
import { PositionFields } from './position-fields.tsx';
import { Question } from './question.tsx';
import type { ReportField } from './report-fields.ts';
import { useDevicePlace } from './use-device-place.ts';
import { useHydrated } from './use-hydrated.ts';

export interface TodayAtSite {
  /** Span of the card. */
  readonly fromUtc: string;
  readonly toUtc: string;
  /** Null where the sun does not cross the horizon that day. */
  readonly riseUtc: string | null;
  readonly setUtc: string | null;
  readonly polar: 'day' | 'night' | null;
  /** "Daylight today 05:17 to 20:51." */
  readonly words: string;
}

export interface SiteChoice {
  readonly id: string;
  readonly name: string;
  readonly code: string;
  readonly zone: string;
  /** The present on the clock of the site, `YYYY-MM-DDTHH:MM`. */
  readonly nowLocal: string;
  readonly nowUtc: string;
  /** The local day, for the card under the second question; null: no card. */
  readonly today: TodayAtSite | null;
  /** To about 100 m; null for guests, who are told no position. */
  readonly around: { readonly latitudeDeg: number; readonly longitudeDeg: number } | null;
  /** Those of the person; for a guest, those of the country of the site. */
  readonly units: UnitSystem;
  /** Drawings of the site that are laid on the map. */
  readonly plans: readonly PlacedPlan[];
}

export interface WhereQuestionProps {
  readonly field: ReportField;
  readonly sites: readonly SiteChoice[];
  readonly chosen: SiteChoice | undefined;
  /** The link says where: nothing to choose. */
  readonly fixed: boolean;
  /** What the form holds at the moment. */
  readonly values: Readonly<Record<string, string>>;
  readonly onSite?: (siteId: string) => void;
}

interface NearSite {
  readonly site: SiteChoice;
  readonly distanceM: number | null;
}

/** First question. A site is always needed; the spot in words and a position help. */
export function WhereQuestion({ field, sites, chosen, fixed, values, onSite }: WhereQuestionProps) {
  const only = sites.length === 1 ? sites[0] : undefined;
  const { position } = readReportPlaces(values).places;
  const near = byNearness(sites, position);
  return (
    <Question number={1} answers="siteId" title="Where is it?">
      <DeviceButton accuracyM={position?.accuracyM ?? null} sorts={!fixed && sites.length > 1} units={chosen?.units ?? sites[0]?.units ?? 'metric'} />
      {fixed && only ? (
        <div id="siteId" tabIndex={-1}>
          <input type="hidden" name="siteId" value={only.id} />
          <p className="font-semibold">{only.name}</p>
          <p className="text-small text-second">The link is for this place.</p>
          <FieldError field={field('siteId')} />
        </div>
      ) : (
        <Select
          field={field('siteId', only?.id)}
          label="Site"
          emptyLabel="Choose the site"
          options={near.map(({ site, distanceM }) => ({ value: site.id, label: `${site.name} (${site.code})${distanceM === null ? '' : `, ${distanceWords(distanceM, site.units)}`}` }))}
          {...(onSite ? { onChange: (event) => onSite(event.currentTarget.value) } : {})}
        />
      )}
      <FarLine chosen={near.find(({ site }) => site.id === chosen?.id)} nearest={near[0]} />
      <TextInput field={field('placeDetail')} label="The spot, in words" help="Such as: roof, south edge by hatch 2. No names of people." autoComplete="off" maxLength={300} />
      <PositionFields field={field} values={values} around={chosen?.around ?? null} plans={chosen?.plans ?? []} />
    </Question>
  );
}

/** Nearest first once a position is given; the order of the list before. */
function byNearness(sites: readonly SiteChoice[], position: { readonly latitudeDeg: number; readonly longitudeDeg: number } | null): readonly NearSite[] {
  const measured = sites.map((site) => ({ site, distanceM: position && site.around ? farM(position, site.around) : null }));
  return position ? measured.toSorted((a, b) => (a.distanceM ?? Infinity) - (b.distanceM ?? Infinity)) : measured;
}

/** A site this far from the position is asked about. [m] */
const farFromSiteM = 5_000;

function FarLine({ chosen, nearest }: { readonly chosen: NearSite | undefined; readonly nearest: NearSite | undefined }) {
  if (!chosen || chosen.distanceM === null || chosen.distanceM < farFromSiteM) return null;
  const better = nearest && nearest.site.id !== chosen.site.id && nearest.distanceM !== null ? ` The nearest is ${nearest.site.name}, ${distanceWords(nearest.distanceM, nearest.site.units)}.` : '';
  return <p role="status" className="text-small">The position you gave lies {distanceWords(chosen.distanceM, chosen.site.units)} from this site. Check both.{better}</p>;
}

/** Asks the device where it is; the list of sites follows. */
function DeviceButton({ accuracyM, sorts, units }: { readonly accuracyM: number | null; readonly sorts: boolean; readonly units: UnitSystem }) {
  const hydrated = useHydrated();
  const box = useRef<HTMLDivElement>(null);
  const { words, ask } = useDevicePlace((place, within) => {
    const form = box.current?.closest('form');
    if (!form) return;
    answerField(form, 'latitudeDeg', coordinateText(place.latitudeDeg));
    answerField(form, 'longitudeDeg', coordinateText(place.longitudeDeg));
    answerField(form, 'accuracyM', within.toFixed(0));
  });
  if (!hydrated) return null;
  const said = accuracyM === null ? '' : `This device says it is within ${distanceWords(accuracyM, units)}.${sorts ? ' The nearest site stands first.' : ''}`;
  return (
    <div ref={box}>
      <Button type="button" look="outlined" onClick={ask}>Use this device's location</Button>
      <p role="status" className="pt-1 text-small text-second empty:hidden">{words || said}</p>
    </div>
  );
}
