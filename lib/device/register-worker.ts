import { Workbox } from 'workbox-window';

export interface Updates {
  onReady(run: () => void): void;
  apply(): void;
}

/**
 * Registers the service worker and watches for a new version. It waits until somebody agrees; only the tab where
 * that happened loads again, so that no form is lost under anybody's hands elsewhere.
 */
export function watchUpdates(): Updates {
  const worker = new Workbox('/sw.js', { scope: '/' });
  const listeners = new Set<() => void>();
  let ready = false;
  let agreed = false;
  worker.addEventListener('waiting', () => {
    ready = true;
    listeners.forEach((tell) => tell());
  });
  worker.addEventListener('controlling', () => {
    if (agreed) location.reload();
  });
  if (process.env.NODE_ENV === 'production') void worker.register().catch(() => undefined);
  // A phone's page lives for days: without asking, it would never hear of a new version.
  document.addEventListener('visibilitychange', () => {
    if (document.visibilityState === 'visible') void worker.update().catch(() => undefined);
  });
  return {
    onReady(run) {
      listeners.add(run);
      if (ready) run();
    },
    apply() {
      agreed = true;
      worker.messageSkipWaiting();
    },
  };
}
