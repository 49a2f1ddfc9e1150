import { useCallback, useEffect, useState } from 'react';
import type { RefObject } from 'react';
import { useNavigation, useSubmit } from 'react-router';

export type SendingState = 'idle' | 'waiting-for-photos' | 'waiting-for-signal' | 'sending';

interface Params {
  readonly form: RefObject<HTMLFormElement | null>;
  readonly address: string;
  readonly photosOnTheWay: number;
}

export interface ReportSending {
  readonly state: SendingState;
  /** Sends now, or as soon as photos and connection allow. A second press no longer waits for photos. */
  readonly send: () => void;
  /** For the other buttons of the form. */
  readonly submitOther: (submitter: HTMLElement) => void;
}

const retryMs = 15_000;

async function isReachable(): Promise<boolean> {
  if (!navigator.onLine) return false;
  try {
    return (await fetch('/healthz', { cache: 'no-store' })).ok;
  } catch {
    // No connection, or none that reaches the team.
    return false;
  }
}

/**
 * Sends the report once the photos are with the team and the server answers; until then it waits and tries again by
 * itself. The client id makes a repeated sending harmless.
 */
export function useReportSending({ form, address, photosOnTheWay }: Params): ReportSending {
  const submit = useSubmit();
  const navigation = useNavigation();
  const [wanted, setWanted] = useState<'no' | 'with-photos' | 'now'>('no');
  const [unreachable, setUnreachable] = useState(false);

  const post = useCallback(
    (data: FormData) => submit(data, { method: 'post', action: address, encType: 'multipart/form-data', preventScrollReset: false }),
    [submit, address],
  );

  const tryNow = useCallback(async () => {
    if (!form.current) return;
    const reachable = await isReachable();
    setUnreachable(!reachable);
    if (!reachable) return;
    setWanted('no');
    const data = new FormData(form.current);
    data.set('intent', 'send');
    await post(data);
  }, [form, post]);

  const ready = wanted === 'now' || (wanted === 'with-photos' && photosOnTheWay === 0);
  useEffect(() => {
    if (!ready) return;
    const attempt = () => void tryNow();
    attempt();
    const timer = setInterval(attempt, retryMs);
    window.addEventListener('online', attempt);
    return () => {
      clearInterval(timer);
      window.removeEventListener('online', attempt);
    };
  }, [ready, tryNow]);

  const sending = navigation.state !== 'idle' && navigation.formMethod === 'POST';
  return {
    state: sending ? 'sending' : wanted === 'no' ? 'idle' : !ready ? 'waiting-for-photos' : unreachable ? 'waiting-for-signal' : 'sending',
    send: () => setWanted((before) => (before === 'no' ? 'with-photos' : 'now')),
    submitOther: (submitter) => {
      if (form.current) void post(new FormData(form.current, submitter));
    },
  };
}
