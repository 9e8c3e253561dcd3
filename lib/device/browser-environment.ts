import { v7 as newId } from 'uuid';
import type { DeviceEnvironment, TabChannel } from './device-environment';
import { watchUpdates } from './register-worker';

const FOUR_HUNDRED_DAYS_S = 400 * 86_400;
const SYNC_TAG = 'cagewright-outbox';

/** The real browser. What it lacks (locks, channels, Background Sync) is left out; nothing depends on it to be safe. */
export function browserEnvironment(): DeviceEnvironment {
  return {
    now: () => Date.now(),
    newId: () => newId(),
    random: () => Math.random(),
    fetch: (address, init) => fetch(address, init),
    databaseName: (name) => name,
    ifFree: async <T>(lock: string, run: () => Promise<T>): Promise<T | 'taken'> =>
      navigator.locks
        ? ((await navigator.locks.request(lock, { ifAvailable: true }, (held) =>
            held ? run() : ('taken' as const),
          )) as T | 'taken')
        : run(),
    channel,
    marks: {
      names: () => Object.keys(cookies()),
      read: (name) => cookies()[name] ?? null,
      write: writeCookie,
    },
    tabNote,
    crypto: globalThis.crypto,
    after: (milliseconds, run) => {
      const timer = setTimeout(run, milliseconds);
      return () => clearTimeout(timer);
    },
    onWake,
    inSight: () => document.visibilityState === 'visible',
    storage: { estimate, keep: async () => void (await navigator.storage?.persist?.()) },
    askForBackgroundSync: () => void askForBackgroundSync().catch(() => undefined),
    preparePhoto: async (file) => {
      const [{ preparePhoto }, { browserPhotoTools }] = await Promise.all([
        import('./photos/prepare-photo'),
        import('./photos/browser-photo-tools'),
      ]);
      return preparePhoto(file, browserPhotoTools);
    },
    photoUrl: (bytes, contentType) => URL.createObjectURL(new Blob([bytes], { type: contentType })),
    updates: 'serviceWorker' in navigator ? watchUpdates() : null,
  };
}

function channel(name: string, heard: (message: { streams: string[]; send?: boolean }) => void): TabChannel {
  if (typeof BroadcastChannel === 'undefined') return { post: () => undefined, close: () => undefined };
  const open = new BroadcastChannel(name);
  open.onmessage = (event: MessageEvent<{ streams: string[]; send?: boolean }>) => heard(event.data);
  return { post: (message) => open.postMessage(message), close: () => open.close() };
}

const TAB_NOTE = 'cagewright.open';

/** A browser that keeps nothing for a tab asks once more who is holding the device. */
const tabNote: DeviceEnvironment['tabNote'] = {
  read: () => {
    try {
      return sessionStorage.getItem(TAB_NOTE);
    } catch {
      return null;
    }
  },
  write: (personId) => {
    try {
      sessionStorage.setItem(TAB_NOTE, personId);
    } catch {
      // Full, or forbidden: it asks.
    }
  },
};

function cookies(): Record<string, string> {
  return Object.fromEntries(
    document.cookie
      .split('; ')
      .map((pair) => pair.split('='))
      .map(([name = '', value = '']) => [name, decodeURIComponent(value)]),
  );
}

function writeCookie(name: string, value: string): void {
  const secure = location.protocol === 'https:' ? '; secure' : '';
  // Only the pages of the phone's side see it; it does not travel with requests to the interface.
  document.cookie = `${name}=${encodeURIComponent(value)}; path=/field; max-age=${FOUR_HUNDRED_DAYS_S}; samesite=strict${secure}`;
}

function onWake(run: () => void): () => void {
  const seen = () => {
    if (document.visibilityState === 'visible') run();
  };
  const told = (event: MessageEvent<unknown>) => {
    const { data } = event;
    if (data !== null && typeof data === 'object' && 'type' in data && data.type === 'send-outbox') run();
  };
  window.addEventListener('online', run);
  window.addEventListener('focus', run);
  document.addEventListener('visibilitychange', seen);
  navigator.serviceWorker?.addEventListener('message', told);
  return () => {
    window.removeEventListener('online', run);
    window.removeEventListener('focus', run);
    document.removeEventListener('visibilitychange', seen);
    navigator.serviceWorker?.removeEventListener('message', told);
  };
}

async function estimate() {
  const [{ usage, quota } = {}, persisted] = await Promise.all([
    navigator.storage?.estimate?.(),
    navigator.storage?.persisted?.(),
  ]);
  return { usedBytes: usage ?? null, quotaBytes: quota ?? null, persisted: persisted ?? null };
}

async function askForBackgroundSync(): Promise<void> {
  if (!('serviceWorker' in navigator)) return;
  const registration = await navigator.serviceWorker.ready;
  if ('sync' in registration) {
    await (registration.sync as { register(tag: string): Promise<void> }).register(SYNC_TAG);
  }
}
