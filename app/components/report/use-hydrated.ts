import { useSyncExternalStore } from 'react';

const never = () => () => undefined;

/** False on the server and in the first render, true once the script runs: parts that need one appear then. */
export function useHydrated(): boolean {
  return useSyncExternalStore(never, () => true, () => false);
}
