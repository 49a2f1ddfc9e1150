import type { KeptPhoto, KeptReport } from './device-store.ts';
import { announce, device, keptDays, safely } from './device-store.ts';

const dayMs = 86_400_000;

/** A thrown-away report can be taken back until the page is left; this bounds it for pages that are never left. */
const takeBackMs = dayMs;

/** A report whose Send was pressed waits as long as it takes; what was left unfinished, or is with the team, grows too old. */
export const isTooOld = (report: Pick<KeptReport, 'savedAt' | 'thrownAwayAt' | 'wanted' | 'receipt'>, nowMs: number): boolean =>
  ((report.wanted === 'no' || report.receipt !== null) && report.savedAt < nowMs - keptDays * dayMs) || (report.thrownAwayAt !== null && report.thrownAwayAt < nowMs - takeBackMs);

export async function readReport(clientId: string): Promise<KeptReport | null> {
  const report = await (await device()).get('reports', clientId);
  return report && !isTooOld(report, Date.now()) ? report : null;
}

/** Reports of this holder on this device, newest first. */
export async function listReports(holderKey: string): Promise<KeptReport[]> {
  const now = Date.now();
  const all = await (await device()).getAll('reports');
  return all.filter((report) => report.holderKey === holderKey && !isTooOld(report, now)).sort((a, b) => b.savedAt - a.savedAt);
}

/** Reports of anybody that are to be sent, or whose photos are still to go. */
export async function listUnsent(): Promise<KeptReport[]> {
  const now = Date.now();
  return (await (await device()).getAll('reports')).filter((report) => report.wanted !== 'no' && !report.problem && report.thrownAwayAt === null && !isTooOld(report, now));
}

/** Writes the words; what belongs to the sending is left as it is. */
export async function keepWords(words: Pick<KeptReport, 'clientId' | 'holderKey' | 'guestCode' | 'begun' | 'values'>): Promise<KeptReport> {
  const tx = (await device()).transaction('reports', 'readwrite', safely);
  const before = await tx.store.get(words.clientId);
  const after: KeptReport = { wanted: 'no', problem: null, held: null, receipt: null, thrownAwayAt: null, ...before, ...words, savedAt: Date.now() };
  await tx.store.put(after);
  await tx.done;
  return after;
}

export async function patchReport(clientId: string, patch: Partial<Omit<KeptReport, 'clientId'>>): Promise<void> {
  const tx = (await device()).transaction('reports', 'readwrite', safely);
  const before = await tx.store.get(clientId);
  if (before) await tx.store.put({ ...before, ...patch });
  await tx.done;
  announce(clientId);
}

/** The team has all of it, or it is not wanted any more. */
export async function forgetReport(clientId: string): Promise<void> {
  const tx = (await device()).transaction(['reports', 'photos'], 'readwrite', safely);
  await tx.objectStore('reports').delete(clientId);
  for (const key of await tx.objectStore('photos').index('clientId').getAllKeys(clientId)) await tx.objectStore('photos').delete(key);
  await tx.done;
  announce(clientId);
}

/** Removes unfinished reports that are older than 14 days, and what was thrown away before this page was opened. */
export async function sweep(): Promise<void> {
  const db = await device();
  const now = Date.now();
  for (const report of await db.getAll('reports')) if (isTooOld(report, now) || report.thrownAwayAt !== null) await forgetReport(report.clientId);
  for (const photo of await db.getAll('photos')) if (photo.removedAt !== null && photo.photoId === null) await db.delete('photos', photo.key);
}

/** Photos of a report in the order the person gave, removed ones among them. */
export async function listPhotos(clientId: string): Promise<KeptPhoto[]> {
  const photos = await (await device()).getAllFromIndex('photos', 'clientId', clientId);
  return photos.sort((a, b) => (a.details.position ?? 0) - (b.details.position ?? 0));
}

/** @throws when the device has no room for them; none is kept then. */
export async function keepPhotos(photos: readonly KeptPhoto[]): Promise<void> {
  const tx = (await device()).transaction('photos', 'readwrite', safely);
  for (const photo of photos) await tx.store.put(photo);
  await tx.done;
  for (const clientId of new Set(photos.map((photo) => photo.clientId))) announce(clientId);
}

type PhotoPatch = Partial<Omit<KeptPhoto, 'key' | 'clientId'>>;

/** @param patch what changes, or what follows from the photo as it stands. */
export async function patchPhoto(key: string, patch: PhotoPatch | ((before: KeptPhoto) => PhotoPatch)): Promise<void> {
  const tx = (await device()).transaction('photos', 'readwrite', safely);
  const before = await tx.store.get(key);
  if (before) await tx.store.put({ ...before, ...(typeof patch === 'function' ? patch(before) : patch) });
  await tx.done;
  if (before) announce(before.clientId);
}

export async function forgetPhoto(key: string): Promise<void> {
  const db = await device();
  const photo = await db.get('photos', key);
  await db.delete('photos', key);
  if (photo) announce(photo.clientId);
}
