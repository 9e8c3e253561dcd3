const HOUR_MS = 3_600_000;

export interface Updates {
  onReady(run: () => void): void;
  apply(): void;
}

/**
 * Registers the service worker and watches for a new version. It waits until somebody agrees; only the tab where
 * that happened loads again, so that no form is lost under anybody's hands elsewhere.
 */
export function watchUpdates(): Updates {
  const workers = navigator.serviceWorker;
  const listeners = new Set<() => void>();
  let registration: ServiceWorkerRegistration | null = null;
  let ready = false;
  let agreed = false;

  const tellOnceInstalled = (worker: ServiceWorker | null) => {
    const installed = () => {
      // The first worker of all takes over from nobody: there is nothing to ask.
      if (worker?.state !== 'installed' || !workers.controller) return;
      ready = true;
      listeners.forEach((tell) => tell());
    };
    installed();
    worker?.addEventListener('statechange', installed);
  };
  const register = async () => {
    const found = await workers.register('/sw.js', { scope: '/' });
    registration = found;
    tellOnceInstalled(found.waiting);
    tellOnceInstalled(found.installing);
    found.addEventListener('updatefound', () => tellOnceInstalled(found.installing));
  };
  workers.addEventListener('controllerchange', () => {
    if (agreed) location.reload();
  });
  // Its files are many: they come after what this page itself needs.
  const begin = () => void register().catch(() => undefined);
  if (process.env.NODE_ENV === 'production') {
    if (document.readyState === 'complete') begin();
    else window.addEventListener('load', begin, { once: true });
  }
  // A phone's page lives for days: without asking, it would never hear of a new version.
  const ask = () => void registration?.update().catch(() => undefined);
  document.addEventListener('visibilitychange', () => document.visibilityState === 'visible' && ask());
  setInterval(ask, HOUR_MS);
  return {
    onReady(run) {
      listeners.add(run);
      if (ready) run();
    },
    apply() {
      agreed = true;
      // Where another tab has let the new version in already, loading again is all that is left to do.
      if (registration?.waiting) registration.waiting.postMessage({ type: 'SKIP_WAITING' });
      else location.reload();
    },
  };
}
