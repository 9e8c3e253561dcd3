import type { Workbox } from 'workbox-window';

const HOUR_MS = 3_600_000;

export interface Updates {
  onReady(run: () => void): void;
  apply(): void;
}

/**
 * Registers the service worker and tells when a new version waits. Only a person lets it in; and only the tab in which
 * that happened loads again, so that no form is lost under anybody's hands elsewhere.
 */
export function watchUpdates(): Updates {
  const listeners = new Set<() => void>();
  let worker: Workbox | null = null;
  let waits = false;
  let agreed = false;

  const register = async () => {
    // Loaded apart and last: the worker's files are many, and come after what this page itself needs.
    const { Workbox } = await import('workbox-window');
    const found = new Workbox('/sw.js', { scope: '/' });
    worker = found;
    found.addEventListener('waiting', () => {
      waits = true;
      listeners.forEach((tell) => tell());
    });
    found.addEventListener('controlling', () => {
      waits = false;
      if (agreed) location.reload();
    });
    await found.register();
  };
  const begin = () => void register().catch(() => undefined);
  if (process.env.NODE_ENV === 'production') {
    if (document.readyState === 'complete') begin();
    else window.addEventListener('load', begin, { once: true });
  }
  // A phone's page lives for days: without asking, it would never hear of a new version.
  const ask = () => void worker?.update().catch(() => undefined);
  document.addEventListener('visibilitychange', () => document.visibilityState === 'visible' && ask());
  setInterval(ask, HOUR_MS);
  return {
    onReady(run) {
      listeners.add(run);
      if (waits) run();
    },
    apply() {
      agreed = true;
      // Where another tab has let the new version in already, loading again is all that is left to do.
      if (worker && waits) worker.messageSkipWaiting();
      else location.reload();
    },
  };
}
