import { toLocalInput } from '#app/domain/local-time.ts';
import { device } from './device-store.ts';
import { personMark } from './forget-person.ts';
import { listReports, readReport } from './kept-reports.ts';
import type { ReportView } from './report-view.ts';
import { forgetTaken } from './taken-pages.ts';

/** Keeps what this page shows of the places, for a start without a connection. Photos and the report itself lie elsewhere. */
export async function keepView(view: ReportView): Promise<void> {
  const key = view.guestCode ?? '';
  await (await device()).put('views', { key, view: { ...view, clientId: '', photos: [] }, savedAt: Date.now() });
  if (!view.guest) localStorage.setItem(personMark, 'yes');
}

/** Nobody is signed in any more: the list of their sites and the pages taken along leave the device. Unsent reports stay. */
export async function forgetPersonView(): Promise<void> {
  const db = await device();
  for (const { key, view } of await db.getAll('views')) if (!view.guest) await db.delete('views', key);
  await forgetTaken();
  localStorage.removeItem(personMark);
}

/** Places that the links opened on this device lead to. */
export async function listGuestPlaces(): Promise<{ guestCode: string; name: string }[]> {
  const views = await (await device()).getAll('views');
  return views.flatMap(({ key, view }) => (key && view.sites[0] ? [{ guestCode: key, name: view.sites[0].name }] : []));
}

/**
 * The page at this address from what the device knows: the report that the address names, else the one that was left
 * unfinished, else a new one.
 *
 * @returns null when this device has not opened that page before.
 */
export async function viewFromDevice(address: URL): Promise<ReportView | null> {
  try {
    const kept = await (await device()).get('views', address.searchParams.get('at') ?? '');
    if (!kept) return null;
    const named = address.searchParams.get('report');
    const report = named ? await readReport(named) : null;
    const free = report ? null : named;
    const clientId = report?.holderKey === kept.view.holderKey ? report.clientId : ((await unfinishedReport(kept.view.holderKey)) ?? free ?? crypto.randomUUID());
    return { ...kept.view, fromDevice: true, clientId, sites: kept.view.sites.map((site) => atThisMoment(site, new Date())) };
  } catch {
    // Storage is switched off: the device knows nothing.
    return null;
  }
}

/** The newest report that was begun and not yet sent off. */
export async function unfinishedReport(holderKey: string): Promise<string | null> {
  const open = (await listReports(holderKey)).find((report) => report.wanted === 'no' && report.receipt === null && report.thrownAwayAt === null);
  return open?.clientId ?? null;
}

/** The clock of the place goes on; the daylight of the day that was kept is not that of today. */
function atThisMoment<Site extends ReportView['sites'][number]>(site: Site, now: Date): Site {
  return { ...site, nowLocal: toLocalInput(now, site.zone), nowUtc: new Date(Math.floor(now.getTime() / 60_000) * 60_000).toISOString(), today: null };
}
