import { openDB } from 'idb';
import type { DBSchema, IDBPDatabase } from 'idb';
import type { PhotoDetails } from '#app/domain/photo-details.ts';
import type { PhotoExif } from '#app/domain/photo.ts';
import type { ReportView } from './report-view.ts';
import type { ReportFormState } from './report-fields.ts';

/** Unfinished reports are kept on the device this long after the last word. */
export const keptDays = 14;

/** A report under way, kept on this device until the team has it. */
export interface KeptReport {
  readonly clientId: string;
  /** Whose it is: two people on one phone do not meet each other's words. */
  readonly holderKey: string;
  readonly guestCode: string | null;
  /** Last change, ms since 1970. */
  readonly savedAt: number;
  /** Past the make-safe card. */
  readonly begun: boolean;
  readonly values: Readonly<Record<string, string>>;
  /** Whether Send was pressed; `now`: without waiting for photos. */
  readonly wanted: 'no' | 'with-photos' | 'now';
  /** What the team's side asked to mend. */
  readonly problem: Omit<ReportFormState, 'typed'> | null;
  /** Why it did not go at the last try; null: it was not tried, or all is well. */
  readonly held: Held | null;
  /** The words are with the team; photos may still be on their way. */
  readonly receipt: string | null;
  /** Thrown away; kept a while so that it can be taken back. */
  readonly thrownAwayAt: number | null;
}

export interface Held {
  readonly why: 'no-signal' | 'sign-in';
  readonly sentence: string;
}

/** A photo of such a report. */
export interface KeptPhoto {
  readonly key: string;
  readonly clientId: string;
  readonly fileName: string;
  readonly bytes: number;
  /** The file itself; null: it is only with the team. */
  readonly blob: Blob | null;
  readonly state: 'waiting' | 'stored' | 'refused';
  /** Why it was refused. */
  readonly sentence: string;
  /** The team's name for it, once it is there. */
  readonly photoId: string | null;
  readonly exif: PhotoExif;
  readonly details: PhotoDetails;
  /** The details have changed since the team was told. */
  readonly changed: boolean;
  readonly removedAt: number | null;
}

interface DeviceSchema extends DBSchema {
  reports: { key: string; value: KeptReport };
  photos: { key: string; value: KeptPhoto; indexes: { clientId: string } };
  /** What the page shows of the place, by the code of the link; `''` for the signed-in person. */
  views: { key: string; value: { readonly key: string; readonly view: ReportView; readonly savedAt: number } };
}

/** Tells the pages of this site, and the service worker, that a report changed. */
export const reportChannel = 'scorchline-reports';

let opened: Promise<IDBPDatabase<DeviceSchema>> | null = null;

/** @throws when this browser keeps nothing. */
export async function device(): Promise<IDBPDatabase<DeviceSchema>> {
  const db = await (opened ??= open());
  if (isUsable(db)) return db;
  // Phones close the store of a page that slept, not always with a word.
  opened = open();
  return opened;
}

function isUsable(db: IDBPDatabase<DeviceSchema>): boolean {
  try {
    db.transaction('views');
    return true;
  } catch {
    // The connection is closing or closed.
    return false;
  }
}

function open(): Promise<IDBPDatabase<DeviceSchema>> {
  const forget = () => {
    opened = null;
  };
  const opening = openDB<DeviceSchema>('scorchline', 1, {
    upgrade(db) {
      db.createObjectStore('reports', { keyPath: 'clientId' });
      db.createObjectStore('photos', { keyPath: 'key' }).createIndex('clientId', 'clientId');
      db.createObjectStore('views', { keyPath: 'key' });
    },
    // Another tab brings a newer version: let it.
    blocking: (_now, _next, event) => {
      forget();
      if (event.target instanceof IDBDatabase) event.target.close();
    },
    terminated: forget,
  });
  opening.catch(forget);
  return opening;
}

/** A transaction that is on the disk when it ends, so that a flat battery takes nothing. */
export const safely = { durability: 'strict' } as const;

export function announce(clientId: string): void {
  if (typeof BroadcastChannel === 'undefined') return;
  const channel = new BroadcastChannel(reportChannel);
  channel.postMessage(clientId);
  channel.close();
}

/** @returns what ends the listening. */
export function listenForReports(onChange: (clientId: string) => void): () => void {
  if (typeof BroadcastChannel === 'undefined') return () => undefined;
  const channel = new BroadcastChannel(reportChannel);
  channel.onmessage = (event: MessageEvent<unknown>) => onChange(String(event.data));
  return () => channel.close();
}
