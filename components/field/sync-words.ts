import type { SyncState } from '@/lib/device/device-types';

const phaseWords: Record<SyncState['phase'], string> = {
  idle: 'up to date',
  sending: 'sending',
  fetching: 'fetching',
  offline: 'no network',
  'sign-in-needed': 'sign in to send',
  'server-trouble': 'server does not answer',
  'strange-network': 'network asks for a sign-in',
};

/** Where sending stands, in two or three words. Something that waits is never called up to date. */
export function syncWords(sync: SyncState): string {
  const waits = sync.waitingEntries + sync.waitingPhotos + sync.refusedEntries > 0;
  return sync.phase === 'idle' && waits ? 'waits to be sent' : phaseWords[sync.phase];
}

/** How much of this device's work the server has not taken in yet. */
export const notSentCount = (sync: SyncState): number =>
  sync.waitingEntries + sync.waitingPhotos + sync.refusedEntries;

/** "3 not sent yet", "everything is sent". */
export function notSentWords(sync: SyncState): string {
  const count = notSentCount(sync);
  return count === 0 ? 'all sent' : `${count} not sent yet`;
}

export const DOUBTFUL_CLOCK_MINUTES = 5;

/** Says by how much this device's clock is off, where that is more than five minutes; null otherwise. */
export function clockWords(offsetMs: number | null): string | null {
  if (offsetMs === null) return null;
  const minutes = Math.round(Math.abs(offsetMs) / 60_000);
  if (minutes <= DOUBTFUL_CLOCK_MINUTES) return null;
  const size =
    minutes < 120
      ? `${minutes} minutes`
      : minutes < 2880
        ? `${Math.round(minutes / 60)} hours`
        : `${Math.round(minutes / 1440)} days`;
  const side = offsetMs > 0 ? 'slow' : 'fast';
  return `This device's clock is ${size} ${side}. Your entries keep their order and are marked. Set the clock when you can.`;
}

/** Bytes as people read them: 3.2 MB. */
export function bytesWords(bytes: number): string {
  if (bytes < 1000) return `${bytes} bytes`;
  if (bytes < 1_000_000) return `${Math.round(bytes / 1000)} kB`;
  if (bytes < 1_000_000_000) return `${(bytes / 1_000_000).toFixed(1)} MB`;
  return `${(bytes / 1_000_000_000).toFixed(1)} GB`;
}
