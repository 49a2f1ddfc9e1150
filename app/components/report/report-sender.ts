import * as z from 'zod/mini';
import type { Held, KeptPhoto, KeptReport } from './device-store.ts';
import { forgetPhoto, listPhotos, patchPhoto, patchReport, readReport } from './kept-reports.ts';
import { photosAddress, wordsAddress } from './report-addresses.ts';

/** One request to the team's side. Status 0: it did not get there, or its answer did not get back. */
export interface Answer {
  readonly status: number;
  readonly text: string;
}
export interface Post {
  readonly address: string;
  readonly holderKey: string;
  readonly form: FormData;
  /** Part that has left, 0 to 1. */
  readonly onProgress?: (part: number) => void;
}
export interface SenderOptions {
  readonly post: (post: Post) => Promise<Answer>;
  readonly onProgress?: (photoKey: string, part: number) => void;
  /** Bytes of a photo that the device had no room for, while its page is open. */
  readonly fileOf?: (photoKey: string) => Blob | undefined;
}

/** Whether there is more to do: `stopped` waits for a connection or a person. */
export type Delivery = 'done' | 'stopped';

const photoAnswer = z.object({ photos: z.array(z.union([z.object({ ok: z.literal(true), photoId: z.string() }), z.object({ ok: z.literal(false), sentence: z.string() })])) });
const receiptAnswer = z.object({ receipt: z.string() });
const problemAnswer = z.object({
  problem: z.object({
    formErrors: z._default(z.array(z.string()), []),
    fieldErrors: z._default(z.record(z.string(), z.array(z.string())), {}),
    repeated: z._default(z.record(z.string(), z.object({ first: z.string(), second: z.string() })), {}),
    longWindowDays: z._default(z.nullable(z.number()), null),
  }),
});
const refusalAnswer = z.object({ message: z.string() });

function read<Schema extends z.ZodMiniType>(schema: Schema, { text }: Answer): z.infer<Schema> | null {
  try {
    return schema.safeParse(JSON.parse(text)).data ?? null;
  } catch {
    // Something in between answered in its own words.
    return null;
  }
}

const noSignal: Held = { why: 'no-signal', sentence: '' };

/** A server in trouble may be well again in a minute; a refusal will not change. */
function heldBy(answer: Answer): Held | null {
  if (answer.status === 401) return { why: 'sign-in', sentence: read(refusalAnswer, answer)?.message ?? 'Sign in, and the report goes by itself.' };
  const soonWell = answer.status === 0 || answer.status === 429 || answer.status >= 500;
  return soonWell ? noSignal : null;
}

/**
 * Brings one report to the team, as far as it goes: photos that were taken off, photos that are new, what is said of
 * them, and the words once the person pressed Send. Every step is kept on the device before the next begins, and the
 * team's side knows each report and each photo again, so that it may break off anywhere and be done again.
 */
export async function deliver(clientId: string, options: SenderOptions): Promise<Delivery> {
  for (;;) {
    const report = await readReport(clientId);
    if (!report || report.thrownAwayAt !== null || report.problem) return 'done';
    const photos = await listPhotos(clientId);
    const step = nextStep(report, photos, options);
    if (!step) return 'done';
    const held = await step();
    if (held) {
      await patchReport(clientId, { held });
      return 'stopped';
    }
    if (report.held) await patchReport(clientId, { held: null });
  }
}

/** As `deliver`, unless another page or the service worker is at it. */
export async function deliverAlone(clientId: string, options: SenderOptions): Promise<Delivery> {
  if (!('locks' in navigator)) return deliver(clientId, options);
  return navigator.locks.request(`scorchline-report-${clientId}`, { ifAvailable: true }, (lock): Promise<Delivery> => (lock ? deliver(clientId, options) : Promise.resolve('stopped')));
}

type Step = () => Promise<Held | null>;

/** Before the words go, what was taken off must be off; photos that can wait no longer come after them. */
function nextStep(report: KeptReport, photos: readonly KeptPhoto[], options: SenderOptions): Step | null {
  const sending = report.wanted !== 'no' && report.receipt === null;
  const gone = photos.find((photo) => photo.removedAt !== null);
  if (gone && sending) return () => takeOff(report, gone, options);
  if (report.wanted === 'now' && sending) return () => sendWords(report, options);
  const here = photos.filter((photo) => photo.removedAt === null);
  const next = here.find((photo) => photo.state === 'waiting');
  if (next) return () => sendPhoto(report, next, here, options);
  const changed = report.receipt === null ? here.find((photo) => photo.changed && photo.photoId !== null) : undefined;
  if (changed) return () => describe(report, changed, options);
  return sending ? () => sendWords(report, options) : null;
}

const post = (report: KeptReport, form: FormData, options: SenderOptions, onProgress?: (part: number) => void) =>
  options.post({ address: photosAddress(report.clientId, report.guestCode), holderKey: report.holderKey, form, ...(onProgress ? { onProgress } : {}) });

const detailsPart = (photo: KeptPhoto) => new Blob([JSON.stringify(photo.details)], { type: 'application/json' });

/** Whether more was said of the photo while what had been said was on its way. */
const isOther = (now: KeptPhoto, sent: KeptPhoto): boolean => JSON.stringify(now.details) !== JSON.stringify(sent.details);

async function takeOff(report: KeptReport, photo: KeptPhoto, options: SenderOptions): Promise<Held | null> {
  if (photo.photoId !== null) {
    const form = new FormData();
    form.append('intent', 'remove');
    form.append('photoId', photo.photoId);
    const held = heldBy(await post(report, form, options));
    if (held) return held;
  }
  await forgetPhoto(photo.key);
  return null;
}

async function sendPhoto(report: KeptReport, photo: KeptPhoto, all: readonly KeptPhoto[], options: SenderOptions): Promise<Held | null> {
  const file = photo.blob ?? options.fileOf?.(photo.key);
  if (!file) {
    await patchPhoto(photo.key, { state: 'refused', sentence: `“${photo.fileName}” was lost with the page that held it: this device had no room to keep it. Add it again.` });
    return null;
  }
  const form = new FormData();
  // Ahead of the file, so that the team's side knows it when the file is stored.
  form.append('details', detailsPart(photo), 'details.json');
  form.append('photos', file, photo.fileName);
  const answer = await post(report, form, options, (part) => options.onProgress?.(photo.key, part));
  const held = heldBy(answer);
  if (held) return held;
  const outcome = read(photoAnswer, answer)?.photos[0];
  if (!outcome?.ok) {
    await patchPhoto(photo.key, { state: 'refused', sentence: outcome?.sentence ?? read(refusalAnswer, answer)?.message ?? (answer.status === 413 ? `“${photo.fileName}” is too large to send. Send it in a smaller size, or a part of it.` : `“${photo.fileName}” was refused. Choose another file.`) });
  } else if (all.some((other) => other.photoId === outcome.photoId && other.key !== photo.key)) {
    await patchPhoto(photo.key, { state: 'refused', sentence: `“${photo.fileName}” is already among the photos of this report.` });
  } else {
    await patchPhoto(photo.key, (now) => ({ state: 'stored', photoId: outcome.photoId, changed: isOther(now, photo) }));
  }
  return null;
}

async function describe(report: KeptReport, photo: KeptPhoto, options: SenderOptions): Promise<Held | null> {
  const form = new FormData();
  form.append('intent', 'describe');
  form.append('photoId', photo.photoId ?? '');
  form.append('details', detailsPart(photo), 'details.json');
  const held = heldBy(await post(report, form, options));
  if (held) return held;
  await patchPhoto(photo.key, (now) => ({ changed: isOther(now, photo) }));
  return null;
}

async function sendWords(report: KeptReport, options: SenderOptions): Promise<Held | null> {
  const form = new FormData();
  for (const [name, value] of Object.entries(report.values)) form.append(name, value);
  const answer = await options.post({ address: wordsAddress(report.clientId, report.guestCode), holderKey: report.holderKey, form });
  const held = heldBy(answer);
  if (held) return held;
  const receipt = read(receiptAnswer, answer)?.receipt;
  if (receipt) {
    await patchReport(report.clientId, { receipt, held: null });
    return null;
  }
  const problem = read(problemAnswer, answer)?.problem ?? { formErrors: [read(refusalAnswer, answer)?.message ?? 'The report was refused. Nothing is lost: it is kept on this device.'], fieldErrors: {}, repeated: {}, longWindowDays: null };
  await patchReport(report.clientId, { wanted: 'no', problem, held: null });
  return null;
}
