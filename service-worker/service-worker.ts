import { clientsClaim } from 'workbox-core';
import { PrecacheController, PrecacheRoute } from 'workbox-precaching';
import { NavigationRoute, registerRoute } from 'workbox-routing';
import { cleanUpLate } from './clean-up-late';

declare const self: ServiceWorkerGlobalScope;

interface SyncEvent extends ExtendableEvent {
  tag: string;
}

const CACHE = 'cagewright-shell';
/** Filled in by the build: the shell, its chunks, fonts and icons. */
const manifest = self.__WB_MANIFEST.map((entry) =>
  typeof entry === 'string' ? { url: entry, revision: null } : entry,
);

const shell = new PrecacheController({ cacheName: CACHE });
// The worker never caches anything of the interface: people's work has its own store, with its own rules.
shell.addToCacheList(manifest);
registerRoute(new PrecacheRoute(shell));
registerRoute(
  new NavigationRoute(shell.createHandlerBoundToURL('/field'), { allowlist: [/^\/field(\/|$)/] }),
);
// A tab of an earlier version asks for its own chunks: they are kept for a while, and hashed, so never mistaken.
registerRoute(
  ({ url, sameOrigin }) => sameOrigin && url.pathname.startsWith('/_next/static/'),
  async ({ request }) => (await (await caches.open(CACHE)).match(request)) ?? fetch(request),
);

self.addEventListener('install', (event) => {
  event.waitUntil(shell.install(event));
});

self.addEventListener('activate', (event) => {
  event.waitUntil(
    cleanUpLate(
      CACHE,
      manifest.map((entry) => shell.getCacheKeyForURL(entry.url) ?? entry.url),
    ),
  );
});

self.addEventListener('message', (event) => {
  const { data } = event as { data: unknown };
  if (data !== null && typeof data === 'object' && 'type' in data && data.type === 'SKIP_WAITING')
    void self.skipWaiting();
});

/** Background Sync: a network is there again. The pages hold people's work and send it; the worker only wakes them. */
self.addEventListener('sync' as 'activate', (event) => {
  if ((event as SyncEvent).tag !== 'cagewright-outbox') return;
  event.waitUntil(
    self.clients
      .matchAll({ type: 'window', includeUncontrolled: true })
      .then((pages) => pages.forEach((page) => page.postMessage({ type: 'send-outbox' }))),
  );
});

clientsClaim();
