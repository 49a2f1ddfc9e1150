import type { ReportView } from '#app/components/report/report-view.ts';
import type { TodayAtSite } from '#app/components/report/where-question.tsx';
import { formatClock, localDay, toLocalInput } from '#app/domain/local-time.ts';
import { homeFor } from '#app/domain/navigation.ts';
import { placedPlan } from '#app/domain/plan-view.ts';
import type { ReportHolder } from '#app/domain/report.ts';
import { env } from '#app/env.server.ts';
import type { Daylight } from '#app/physics/sun/daylight.ts';
import { daylightOn } from '#app/physics/sun/daylight.ts';
import { holderId, holderKeyOf } from '#app/services/reports/report-holder.server.ts';
import { db } from '#db/client.server.ts';
import { listDraftPhotos } from '#db/queries/photos.server.ts';
import { listReportSites } from '#db/queries/reports.server.ts';
import { listPlacedPlans } from '#db/queries/site-plans.server.ts';

/** Everything that the page of a report under way shows, for its holder. */
export async function reportView(holder: ReportHolder, clientId: string, guestCode: string | null): Promise<ReportView> {
  const now = new Date();
  const sites = await listReportSites(db, holder);
  // Where a drawing lies is the position of the site, which guests are not told.
  const plans = holder.kind === 'person' ? await listPlacedPlans(db, sites.map(({ id }) => id)) : [];
  const photos = await listDraftPhotos(db, { clientId, actorId: holderId(holder) });
  return {
    clientId,
    holderKey: holderKeyOf(holder),
    guestCode,
    guest: holder.kind === 'guest',
    sites: sites.map((site) => ({
      id: site.id,
      name: site.name,
      code: site.code,
      zone: site.zone,
      nowLocal: toLocalInput(now, site.zone),
      // To the minute, as the clock time beside it.
      nowUtc: new Date(Math.floor(now.getTime() / 60_000) * 60_000).toISOString(),
      today: sites.length <= sitesWithDaylight ? todayAt(site, now) : null,
      units: holder.kind === 'person' ? holder.actor.units : site.jurisdiction === 'US' ? ('us' as const) : ('metric' as const),
      plans: plans.flatMap((plan) => (plan.siteId === site.id ? (placedPlan(plan) ?? []) : [])),
      around: holder.kind === 'person' ? { latitudeDeg: Number(site.latitudeDeg.toFixed(3)), longitudeDeg: Number(site.longitudeDeg.toFixed(3)) } : null,
    })),
    emergencyNumber: env.EMERGENCY_NUMBER,
    photos,
    photoMaxBytes: env.PHOTO_MAX_BYTES,
    closeHref: holder.kind === 'person' ? homeFor(holder.actor) : '/',
  };
}

/** The same page with nobody's data in it. */
export const shellView = (): ReportView => ({ shell: true, clientId: '', holderKey: '', guestCode: null, guest: false, sites: [], emergencyNumber: env.EMERGENCY_NUMBER, photos: [], photoMaxBytes: env.PHOTO_MAX_BYTES, closeHref: '/' });

const hourMs = 3_600_000;
/** Houses with more sites than this do without the card: a sunrise takes milliseconds. */
const sitesWithDaylight = 40;
/** Sunrise and sunset by place and day, which many looks share. Emptied when it grows past a few days of sites. */
const daylights = new Map<string, Daylight>();

function daylightToday(place: SitePlace, now: Date): Daylight {
  const day = localDay(now, place.zone);
  const key = [day, place.zone, place.latitudeDeg, place.longitudeDeg].join(' ');
  const known = daylights.get(key);
  if (known) return known;
  if (daylights.size > 2_000) daylights.clear();
  const { latitudeDeg, longitudeDeg } = place;
  const daylight = daylightOn(day, place.zone, { latitudeDeg, longitudeDeg, elevationM: 0, ...standardAir });
  daylights.set(key, daylight);
  return daylight;
}

/** Sunrise and sunset are worked out for a level horizon without air; these two do not enter. */
const standardAir = { pressureHpa: 1013.25, temperatureC: 15 } as const;

interface SitePlace {
  readonly zone: string;
  readonly latitudeDeg: number;
  readonly longitudeDeg: number;
}

/** Daylight of the local day, with an hour on each side for the card. */
function todayAt(place: SitePlace, now: Date): TodayAtSite {
  const { zone } = place;
  const { sunriseMs, sunsetMs, polar } = daylightToday(place, now);
  const iso = (ms: number) => new Date(ms).toISOString();
  const rises = sunriseMs !== null && sunsetMs !== null && sunriseMs < sunsetMs;
  const fromMs = Math.floor((rises ? Math.min(sunriseMs, now.getTime()) - hourMs : now.getTime() - 12 * hourMs) / hourMs) * hourMs;
  const toMs = Math.ceil((rises ? Math.max(sunsetMs, now.getTime()) + hourMs : now.getTime() + 6 * hourMs) / hourMs) * hourMs;
  const words = rises
    ? `Daylight today ${formatClock(new Date(sunriseMs), zone)} to ${formatClock(new Date(sunsetMs), zone)}.`
    : polar === 'night' ? 'The sun does not rise today.' : polar === 'day' ? 'The sun does not set today.' : '';
  return { fromUtc: iso(fromMs), toUtc: iso(toMs), riseUtc: rises ? iso(sunriseMs) : null, setUtc: rises ? iso(sunsetMs) : null, polar, words };
}
