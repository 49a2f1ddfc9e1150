import { z } from 'zod';
import type { Route } from './+types/report-sun';
import { actorContext } from '#app/auth/actor-context.ts';
import { limitReporting } from '#app/auth/report-limits.server.ts';
import { DomainError } from '#app/domain/errors.ts';
import { readNumber } from '#app/domain/report-optic.ts';
import { readReportPlaces } from '#app/domain/report-place.ts';
import { readReportTimes } from '#app/domain/report-times.ts';
import type { SunPreview } from '#app/domain/sun-preview.ts';
import { sunPreview } from '#app/domain/sun-preview.ts';
import { clientAddressContext } from '#app/http/client-address.ts';
import { identifyHolder } from '#app/services/reports/report-holder.server.ts';
import { zoneAt } from '#app/services/sites/zone-at.server.ts';
import { db } from '#db/client.server.ts';
import { getReportSitePlace } from '#db/queries/reports.server.ts';
import { inJson } from './report-holder.server.ts';

/**
 * What the sun did in the window of a report under way: `GET /report/sun?siteId=…&foundWhen=…`, with the fields of the form
 * under their own names, and `at` for a guest. It answers with sentences about the sun and nothing of the place.
 */
export function loader({ request, context }: Route.LoaderArgs): Promise<Response> {
  return inJson(async () => {
    const typed = Object.fromEntries(new URL(request.url).searchParams);
    const holder = await identifyHolder(context.get(actorContext), typed['at'] ?? null);
    if (!holder) throw new DomainError('forbidden', 'Sign in, or use the link at the place.');
    await limitReporting('sun', holder, context.get(clientAddressContext));
    const now = new Date();
    const { position } = readReportPlaces(typed).places;
    const siteId = z.uuid().safeParse(typed['siteId']).data;
    const site = siteId ? await getReportSitePlace(db, holder, siteId) : null;
    const zone = site?.zone ?? (position ? zoneAt(position) : null);
    const place = position ?? site;
    if (!zone || !place) return answer(null);
    const { times, errors } = readReportTimes(typed, { zone, now });
    if (Object.keys(errors).length > 0) return answer(null);
    const facesDeg = readNumber(typed['opticFacesDeg'] ?? '');
    const { latitudeDeg, longitudeDeg } = place;
    return answer(sunPreview({ latitudeDeg, longitudeDeg, elevationM: site?.elevationM ?? 0, zone, skyline: site?.skyline ?? null, facesDeg: facesDeg !== null && facesDeg >= 0 && facesDeg <= 360 ? facesDeg : null }, times, now));
  });
}

/** Nothing to say while times or place are incomplete. */
const answer = (preview: SunPreview | null) => ({ sentences: preview?.sentences ?? [], check: preview?.check ?? false });
