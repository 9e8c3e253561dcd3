import { useEffect, useRef } from 'react';

/** Browsers refuse an address that changes with every key. */
const SETTLED_MS = 250;

/** Keeps the query of the address in step with the inputs once they were changed, without a new entry of the history. */
export function useAddress(query: string): void {
  const opened = useRef<string | null>(query);
  useEffect(() => {
    if (opened.current === query) return;
    const timer = setTimeout(() => {
      opened.current = null;
      window.history.replaceState(null, '', `${window.location.pathname}?${query}`);
    }, SETTLED_MS);
    return () => clearTimeout(timer);
  }, [query]);
}
