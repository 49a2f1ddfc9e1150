import { FieldError } from '#app/components/forms/field.tsx';
import { Select, TextInput } from '#app/components/forms/text-field.tsx';
import { PositionFields } from './position-fields.tsx';
import { Question } from './question.tsx';
import type { ReportField } from './report-fields.ts';

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
}

export interface WhereQuestionProps {
  readonly field: ReportField;
  readonly sites: readonly SiteChoice[];
  readonly chosen: SiteChoice | undefined;
  /** The link says where: nothing to choose. */
  readonly fixed: boolean;
  readonly onSite?: (siteId: string) => void;
}

/** First question. A site is always needed; the spot in words and a position help. */
export function WhereQuestion({ field, sites, chosen, fixed, onSite }: WhereQuestionProps) {
  const only = sites.length === 1 ? sites[0] : undefined;
  return (
    <Question number={1} answers="siteId" title="Where is it?">
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
          options={sites.map((site) => ({ value: site.id, label: `${site.name} (${site.code})` }))}
          {...(onSite ? { onChange: (event) => onSite(event.currentTarget.value) } : {})}
        />
      )}
      <TextInput field={field('placeDetail')} label="The spot, in words" help="Such as: roof, south edge by hatch 2. No names of people." autoComplete="off" maxLength={300} />
      <PositionFields field={field} around={chosen?.around ?? null} />
    </Question>
  );
}
