import { useCallback, useEffect, useRef, useState } from 'react';
import type { KeptReport } from './device-store.ts';
import { listUnsent, patchReport } from './kept-reports.ts';
import { postFromPage } from './post-report.ts';
import { deliverAlone } from './report-sender.ts';

export interface ReportSending {
  /** Something is being sent at this moment. */
  readonly busy: boolean;
  /** Part of each photo that has left, 0 to 1, by its key. */
  readonly progress: Readonly<Record<string, number>>;
  /** Sends now, or as soon as photos and connection allow. A second press no longer waits for photos. */
  readonly send: () => Promise<void>;
  /** Back to the form, to add something. */
  readonly hold: () => Promise<void>;
  /** Photos changed, or the person asks: try at once. */
  readonly tryNow: () => void;
}

interface Params {
  readonly clientId: string;
  readonly holderKey: string;
  readonly report: KeptReport | null;
  readonly fileOf: (photoKey: string) => Blob | undefined;
}

const firstRetryMs = 2_000;
const longestRetryMs = 60_000;

/**
 * Sends what is ready and tries again by itself: when the connection returns, when the page is looked at again, and after
 * growing pauses. Other reports of the same person that wait on this device go after this one.
 */
export function useReportSending({ clientId, holderKey, report, fileOf }: Params): ReportSending {
  const [progress, setProgress] = useState<Readonly<Record<string, number>>>({});
  const [busy, setBusy] = useState(false);
  const kick = useRef<() => void>(() => undefined);

  useEffect(() => {
    let left = false;
    let running = false;
    let again = false;
    let timer = 0;
    let pauseMs = firstRetryMs;
    const options = { post: postFromPage, fileOf, onProgress: (key: string, part: number) => setProgress((all) => ({ ...all, [key]: part })) };
    const round = async (): Promise<boolean> => {
      const done = (await deliverAlone(clientId, options)) === 'done';
      // What was written by the link of a site, anybody on this device may bring there.
      const others = (await listUnsent()).filter((other) => other.clientId !== clientId && (other.holderKey === holderKey || other.guestCode !== null));
      for (const other of others) await deliverAlone(other.clientId, options);
      return done && others.length === 0;
    };
    const attempt = async () => {
      if (running) {
        again = true;
        return;
      }
      running = true;
      window.clearTimeout(timer);
      setBusy(true);
      do {
        again = false;
        const settled = await round().catch(() => false);
        pauseMs = settled ? firstRetryMs : Math.min(pauseMs * 2, longestRetryMs);
        if (!settled && !left) timer = window.setTimeout(() => void attempt(), pauseMs);
      } while (again && !left);
      running = false;
      setBusy(false);
    };
    const atOnce = () => {
      pauseMs = firstRetryMs;
      void attempt();
    };
    const whenSeen = () => {
      if (document.visibilityState === 'visible') atOnce();
    };
    kick.current = atOnce;
    atOnce();
    window.addEventListener('online', atOnce);
    document.addEventListener('visibilitychange', whenSeen);
    return () => {
      left = true;
      window.clearTimeout(timer);
      window.removeEventListener('online', atOnce);
      document.removeEventListener('visibilitychange', whenSeen);
    };
  }, [clientId, holderKey, fileOf]);

  const tryNow = useCallback(() => kick.current(), []);
  const send = useCallback(async () => {
    await patchReport(clientId, { wanted: report === null || report.wanted === 'no' ? 'with-photos' : 'now', problem: null });
    kick.current();
    await askForBackground();
  }, [clientId, report]);
  const hold = useCallback(() => patchReport(clientId, { wanted: 'no' }), [clientId]);
  return { busy, progress, send, hold, tryNow };
}

/** Where the browser can send with the page closed, it is asked to. */
async function askForBackground(): Promise<void> {
  const registration: (ServiceWorkerRegistration & { sync?: { register: (tag: string) => Promise<void> } }) | undefined = await navigator.serviceWorker?.getRegistration();
  // Refused by the person or the browser: the page sends, once it is open.
  await registration?.sync?.register('send-reports').catch(() => undefined);
}
