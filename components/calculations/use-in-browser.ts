import { useSyncExternalStore } from 'react';

const whenPrinting = (changed: () => void) => {
  window.addEventListener('beforeprint', changed);
  return () => window.removeEventListener('beforeprint', changed);
};

/** A text that only the browser knows, read again when the sheet is printed; empty until then on the server. */
export function useInBrowser(read: () => string): string {
  return useSyncExternalStore(whenPrinting, read, () => '');
}

/** The date where the sheet is read. */
export const today = () =>
  new Date().toLocaleDateString('en-GB', { day: 'numeric', month: 'long', year: 'numeric' });

/** Where the program answers. */
export const origin = () => window.location.origin;
