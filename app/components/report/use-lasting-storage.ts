import { useEffect, useState } from 'react';

/** What the browser said about keeping what is stored here; `unknown` where it does not say. */
export type Lasting = 'promised' | 'may-clear' | 'unknown';

/**
 * Asks the browser not to clear what this site keeps, once there is something that must not be lost. Some browsers ask
 * the person; others decide by themselves.
 */
export function useLastingStorage(needed: boolean): Lasting {
  const [lasting, setLasting] = useState<Lasting>('unknown');
  useEffect(() => {
    if (!needed || !('storage' in navigator) || !('persist' in navigator.storage)) return;
    let left = false;
    const ask = async () => {
      const promised = (await navigator.storage.persisted()) || (await navigator.storage.persist());
      if (!left) setLasting(promised ? 'promised' : 'may-clear');
    };
    // A browser that refuses the question has not promised anything.
    ask().catch(() => setLasting('unknown'));
    return () => {
      left = true;
    };
  }, [needed]);
  return lasting;
}

export const lastingWords: Record<Lasting, string> = {
  promised: 'The browser has agreed not to clear it.',
  'may-clear': 'The browser may clear it if space runs short, or if you clear its data. Send it as soon as you can.',
  unknown: 'Do not clear the data of the browser before it is sent.',
};
