import { useEffect, useRef } from 'react';

/** The value of the newest render, for handlers that live longer than one. */
export function useLatest<T>(value: T): { readonly current: T } {
  const latest = useRef(value);
  useEffect(() => {
    latest.current = value;
  });
  return latest;
}
