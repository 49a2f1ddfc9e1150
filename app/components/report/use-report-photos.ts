import { useCallback, useEffect, useRef, useState } from 'react';
import type { PhotoDetails } from '#app/domain/photo-details.ts';
import type { KeptPhoto } from './device-store.ts';
import { listenForReports } from './device-store.ts';
import { forgetPhoto, keepPhotos, listPhotos, patchPhoto } from './kept-reports.ts';
import { asKept, lookAt } from './new-photos.ts';
import type { StoredPhoto } from './report-view.ts';

export interface ReportPhotos {
  /** In the order the person gave; those that were taken off stay until the report is sent, for taking back. */
  readonly photos: readonly KeptPhoto[];
  /** Photos that are not with the team yet and still could be. */
  readonly onTheWay: number;
  /** This device had no room for some: they live as long as the page. */
  readonly roomless: boolean;
  readonly add: (files: readonly File[], smaller: boolean) => Promise<void>;
  /** Resolves once every chosen file is kept: until then a report would leave without it. */
  readonly added: () => Promise<void>;
  readonly say: (key: string, details: Partial<PhotoDetails>) => void;
  readonly move: (key: string, by: -1 | 1) => void;
  readonly takeOff: (key: string) => void;
  readonly takeBack: (key: string) => void;
  /** A refused file has been read about. */
  readonly dismiss: (key: string) => void;
  /** All of those, when the report is sent without them. */
  readonly dismissRefused: () => Promise<void>;
  /** Address of the picture on this device; empty where it is not here. */
  readonly previewOf: (photo: KeptPhoto) => string;
  /** Address of the team's copy; empty while there is none. */
  readonly copyOf: (photo: KeptPhoto) => string;
}

interface Params {
  readonly clientId: string;
  /** What the team has of this report, as the page was opened; null: it was not asked. */
  readonly stored: readonly StoredPhoto[] | null;
  readonly maxBytes: number;
  /** Takes files that the device has no room for, while the page is open. */
  readonly roomless: Map<string, Blob>;
  /** Makes sure that the report itself is kept before its photos are. */
  readonly keep: () => Promise<void>;
  /** Something is to be sent. */
  readonly onChange: () => void;
}

/** What is said of a photo goes to the team once the typing pauses. [ms] */
const pauseMs = 800;

/** The photos of a report under way, kept on this device. */
export function useReportPhotos({ clientId, stored, maxBytes, roomless: files, keep, onChange }: Params): ReportPhotos {
  const [photos, setPhotos] = useState<readonly KeptPhoto[]>([]);
  const [roomless, setRoomless] = useState(false);
  const previews = useRef(new Map<string, string>());
  const pause = useRef(0);
  const adding = useRef<Promise<void>>(Promise.resolve());

  const reload = useCallback(() => listPhotos(clientId).then(setPhotos, () => undefined), [clientId]);
  useEffect(() => {
    const urls = previews.current;
    const open = async () => {
      if (stored) await reconcile(clientId, stored);
      await reload();
    };
    open().catch(() => undefined);
    const listening = listenForReports((changed) => {
      if (changed === clientId) void reload();
    });
    return () => {
      listening();
      for (const url of urls.values()) URL.revokeObjectURL(url);
      urls.clear();
    };
  }, [clientId, stored, reload]);

  const soon = useCallback(() => {
    window.clearTimeout(pause.current);
    pause.current = window.setTimeout(onChange, pauseMs);
  }, [onChange]);

  const keepChosen = useCallback(
    async (chosen: readonly File[], smaller: boolean) => {
      await keep();
      const from = (await listPhotos(clientId)).length;
      for (const [index, file] of chosen.entries()) {
        const { photo, blob } = await lookAt(file, { clientId, position: from + index, smaller, maxBytes });
        try {
          await keepPhotos([photo]);
        } catch {
          // No room: the file stays in this page, and the page says so.
          if (blob) files.set(photo.key, blob);
          setRoomless(true);
          await keepPhotos([{ ...photo, blob: null }]);
        }
        await reload();
      }
      onChange();
    },
    [clientId, maxBytes, files, keep, reload, onChange],
  );
  const add = useCallback(
    (chosen: readonly File[], smaller: boolean) => {
      // One choice after the other, so that each photo has a place of its own; a choice that failed stops no later one.
      const adds = adding.current.then(() => keepChosen(chosen, smaller));
      adding.current = adds.catch(() => undefined);
      return adds;
    },
    [keepChosen],
  );
  const added = useCallback(() => adding.current, []);

  const say = useCallback(
    (key: string, details: Partial<PhotoDetails>) => {
      const change = (before: KeptPhoto) => ({ details: { ...before.details, ...details }, changed: true });
      setPhotos((all) => all.map((photo) => (photo.key === key ? { ...photo, ...change(photo) } : photo)));
      void patchPhoto(key, change).then(soon, () => undefined);
    },
    [soon],
  );

  const move = useCallback(
    (key: string, by: -1 | 1) => {
      const shown = photos.filter((photo) => photo.removedAt === null && photo.state !== 'refused');
      const from = shown.findIndex((photo) => photo.key === key);
      const [one, other] = [shown[from], shown[from + by]];
      if (!one || !other) return;
      const order = shown.map((photo) => (photo === one ? other : photo === other ? one : photo));
      for (const [position, photo] of order.entries()) if (photo.details.position !== position) say(photo.key, { position });
      setPhotos((all) => [...all].sort((a, b) => (a.details.position ?? 0) - (b.details.position ?? 0)));
    },
    [photos, say],
  );

  const takeOff = useCallback((key: string) => void patchPhoto(key, { removedAt: Date.now() }), []);
  const takeBack = useCallback((key: string) => void patchPhoto(key, { removedAt: null }).then(onChange, () => undefined), [onChange]);
  const dismiss = useCallback((key: string) => void forgetPhoto(key), []);
  const dismissRefused = useCallback(async () => {
    for (const photo of photos) if (photo.state === 'refused') await forgetPhoto(photo.key);
  }, [photos]);
  const previewOf = useCallback(
    (photo: KeptPhoto) => {
      const blob = photo.blob ?? files.get(photo.key);
      if (!blob) return '';
      const url = previews.current.get(photo.key) ?? URL.createObjectURL(blob);
      previews.current.set(photo.key, url);
      return url;
    },
    [files],
  );
  const copyOf = useCallback((photo: KeptPhoto) => (photo.photoId ? `/photos/${photo.photoId}/thumbnail?report=${clientId}` : ''), [clientId]);
  const onTheWay = photos.filter((photo) => photo.state === 'waiting' && photo.removedAt === null).length;
  return { photos, onTheWay, roomless: roomless && onTheWay > 0, add, added, say, move, takeOff, takeBack, dismiss, dismissRefused, previewOf, copyOf };
}

/** The page and the team's side may have parted: another device, a page without a script, a store put back from a copy. */
async function reconcile(clientId: string, stored: readonly StoredPhoto[]): Promise<void> {
  const kept = await listPhotos(clientId);
  const known = new Set(kept.map((photo) => photo.photoId));
  const there = new Set(stored.map((photo) => photo.id));
  await keepPhotos(stored.filter((photo) => !known.has(photo.id)).map((photo, index) => asKept(photo, clientId, kept.length + index)));
  for (const photo of kept) {
    if (photo.photoId === null || there.has(photo.photoId)) continue;
    if (photo.blob) await patchPhoto(photo.key, { state: 'waiting', photoId: null });
    else await forgetPhoto(photo.key);
  }
}
