'use client';

import { useSyncExternalStore } from 'react';

/** What a browser hands over that can install the application; others never send it. */
interface InstallEvent extends Event {
  prompt(): Promise<unknown>;
}

let offered: InstallEvent | null = null;
const listeners = new Set<() => void>();
const tell = (event: InstallEvent | null) => {
  offered = event;
  listeners.forEach((listener) => listener());
};

// Sent once, soon after the page has loaded: whoever listens later has missed it.
if (typeof window !== 'undefined') {
  window.addEventListener('beforeinstallprompt', (event) => {
    event.preventDefault();
    tell(event as InstallEvent);
  });
  window.addEventListener('appinstalled', () => tell(null));
}

const subscribe = (listener: () => void) => {
  listeners.add(listener);
  return () => listeners.delete(listener);
};

/** Asks the browser to install the application; null where it does not offer to, or has done so already. */
export function useInstallOffer(): (() => Promise<void>) | null {
  const event = useSyncExternalStore(
    subscribe,
    () => offered,
    () => null,
  );
  if (!event) return null;
  return async () => {
    // An offer can be taken up once, whatever the answer.
    tell(null);
    await event.prompt().catch(() => undefined);
  };
}
