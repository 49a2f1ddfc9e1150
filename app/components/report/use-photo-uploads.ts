import { useCallback, useEffect, useRef, useState } from 'react';
import { z } from 'zod';

/** A photo on its way to the team. The file itself stays in this page until it has arrived. */
export interface PhotoUpload {
  readonly key: string;
  readonly file: File;
  readonly previewUrl: string;
  readonly state: 'waiting' | 'sending' | 'stored' | 'refused' | 'interrupted';
  /** Part that has arrived, 0 to 1. */
  readonly sentPart: number;
  /** Why it was refused. */
  readonly sentence: string;
  readonly photoId: string | null;
}

const answerSchema = z.object({
  photos: z.array(
    z.union([
      z.object({ ok: z.literal(true), photoId: z.string() }),
      z.object({ ok: z.literal(false), sentence: z.string() }),
    ]),
  ),
});
const problemSchema = z.object({ message: z.string() });

type Arrival = Pick<PhotoUpload, 'state' | 'sentence' | 'photoId'>;
const interrupted: Arrival = { state: 'interrupted', sentence: '', photoId: null };

/** The request that can say how far it is. */
function send(address: string, file: File, onProgress: (part: number) => void): Promise<Arrival> {
  return new Promise((resolve) => {
    const request = new XMLHttpRequest();
    request.open('POST', address);
    request.responseType = 'text';
    request.upload.onprogress = (event) => onProgress(event.lengthComputable ? event.loaded / event.total : 0);
    request.onerror = () => resolve(interrupted);
    request.onabort = () => resolve(interrupted);
    request.onload = () => resolve(readAnswer(request.status, request.responseText));
    const form = new FormData();
    form.append('photos', file, file.name);
    request.send(form);
  });
}

function readAnswer(status: number, text: string): Arrival {
  const json = parseJson(text);
  const answer = answerSchema.safeParse(json);
  const first = answer.success ? answer.data.photos[0] : undefined;
  if (first?.ok) return { state: 'stored', sentence: '', photoId: first.photoId };
  if (first) return { state: 'refused', sentence: first.sentence, photoId: null };
  const problem = problemSchema.safeParse(json);
  // A server in trouble may be well again in a minute; a refusal will not change.
  if (status >= 500 || status === 429 || status === 0) return interrupted;
  return { state: 'refused', sentence: problem.success ? problem.data.message : 'This file was refused. Choose another one.', photoId: null };
}

function parseJson(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    // Something in between answered in its own words.
    return null;
  }
}

/** Tells the team's side; a photo that never arrived needs no telling. */
async function removeStored(address: string, photoId: string | null): Promise<boolean> {
  if (photoId === null) return true;
  const form = new FormData();
  form.append('intent', 'remove');
  form.append('photoId', photoId);
  try {
    return (await fetch(address, { method: 'POST', body: form })).ok;
  } catch {
    // No connection: the photo stays in the list, and can be taken off later.
    return false;
  }
}

export interface PhotoUploads {
  readonly uploads: readonly PhotoUpload[];
  readonly add: (files: readonly File[]) => void;
  readonly retry: () => void;
  /** Takes a photo off the report, here and, if it has arrived, with the team. */
  readonly takeOff: (key: string) => void;
  /** Photos that are not with the team yet and still could be. */
  readonly onTheWay: number;
}

/** Sends photos one after the other as they are chosen, and again when the connection returns. */
export function usePhotoUploads(address: string): PhotoUploads {
  const [uploads, setUploads] = useState<readonly PhotoUpload[]>([]);
  const busy = useRef(false);

  const change = useCallback((key: string, patch: Partial<PhotoUpload>) => {
    setUploads((all) => all.map((upload) => (upload.key === key ? { ...upload, ...patch } : upload)));
  }, []);

  useEffect(() => {
    const next = uploads.find((upload) => upload.state === 'waiting');
    if (!next || busy.current) return;
    busy.current = true;
    change(next.key, { state: 'sending', sentPart: 0 });
    void send(address, next.file, (part) => change(next.key, { sentPart: part })).then((arrival) => {
      busy.current = false;
      change(next.key, { ...arrival, sentPart: arrival.state === 'stored' ? 1 : 0 });
    });
  }, [uploads, address, change]);

  const retry = useCallback(() => {
    setUploads((all) => all.map((upload) => (upload.state === 'interrupted' ? { ...upload, state: 'waiting' } : upload)));
  }, []);

  useEffect(() => {
    window.addEventListener('online', retry);
    return () => window.removeEventListener('online', retry);
  }, [retry]);

  const onTheWay = uploads.filter(({ state }) => state === 'waiting' || state === 'sending' || state === 'interrupted').length;
  useEffect(() => {
    if (onTheWay === 0) return;
    const warn = (event: BeforeUnloadEvent) => event.preventDefault();
    window.addEventListener('beforeunload', warn);
    return () => window.removeEventListener('beforeunload', warn);
  }, [onTheWay]);

  const add = useCallback((files: readonly File[]) => {
    const fresh = files.map((file): PhotoUpload => ({ key: crypto.randomUUID(), file, previewUrl: URL.createObjectURL(file), state: 'waiting', sentPart: 0, sentence: '', photoId: null }));
    setUploads((all) => [...all, ...fresh]);
  }, []);

  const takeOff = useCallback(
    (key: string) => {
      const upload = uploads.find((one) => one.key === key);
      if (!upload) return;
      void removeStored(address, upload.photoId).then((gone) => {
        if (!gone) return;
        URL.revokeObjectURL(upload.previewUrl);
        setUploads((all) => all.filter((one) => one.key !== key));
      });
    },
    [uploads, address],
  );

  return { uploads, add, retry, takeOff, onTheWay };
}
