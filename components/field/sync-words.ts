import { timeAway } from './field-time';
import type { SyncState } from '@/lib/device/device-types';
import { barWords } from './bar-words';
import type { FixLanguage } from './fix-list-words';

/** What waits to be sent by itself; what was refused waits for a person. */
export const waitingCount = (sync: SyncState): number => sync.waitingEntries + sync.waitingPhotos;

/** How much of this device's work the server has not taken in yet. */
export const notSentCount = (sync: SyncState): number => waitingCount(sync) + sync.refusedEntries;

/**
 * Where sending stands, in two or three words. Something that waits is never called up to date, and something that
 * was refused is never called waiting.
 */
export function syncWords(sync: SyncState, language: FixLanguage = 'en'): string {
  const words = barWords[language];
  const refused = sync.refusedEntries > 0 && waitingCount(sync) > 0;
  if (refused) return words.refused(sync.refusedEntries);
  if (sync.phase !== 'idle') return words.phases[sync.phase];
  if (waitingCount(sync) > 0) return words.waits;
  return sync.refusedEntries > 0 ? words.seeWhy : words.phases.idle;
}

/** "3 not sent yet", "1 refused", "all sent". */
export function notSentWords(sync: SyncState, language: FixLanguage = 'en'): string {
  const words = barWords[language];
  const waiting = waitingCount(sync);
  if (waiting > 0) return words.notSent(waiting);
  return sync.refusedEntries > 0 ? words.refused(sync.refusedEntries) : words.allSent;
}

export const DOUBTFUL_CLOCK_MINUTES = 5;

/** "23 minutes slow": by how much a device's clock was off, where that is more than five minutes; null otherwise. */
export function clockOff(offsetMs: number | null): string | null {
  if (offsetMs === null) return null;
  const minutes = Math.round(Math.abs(offsetMs) / 60_000);
  if (minutes <= DOUBTFUL_CLOCK_MINUTES) return null;
  const size =
    minutes < 120
      ? `${minutes} minutes`
      : minutes < 2880
        ? `${Math.round(minutes / 60)} hours`
        : `${Math.round(minutes / 1440)} days`;
  return `${size} ${offsetMs > 0 ? 'slow' : 'fast'}`;
}

/** Says that this device's clock is off, and what follows from it; null where it is right or nothing is known. */
export function clockWords(offsetMs: number | null): string | null {
  const off = clockOff(offsetMs);
  return (
    off &&
    `This device's clock is ${off}. Your entries keep their order and are marked. Set the clock when you can.`
  );
}

/** Bytes as people read them: 3.2 MB. */
export function bytesWords(bytes: number): string {
  if (bytes < 1000) return `${bytes} bytes`;
  if (bytes < 1_000_000) return `${Math.round(bytes / 1000)} kB`;
  if (bytes < 1_000_000_000) return `${(bytes / 1_000_000).toFixed(1)} MB`;
  return `${(bytes / 1_000_000_000).toFixed(1)} GB`;
}

/** When the server last answered, in a sentence. */
export function answeredWords(lastSuccessAt: string, nowMs: number): string {
  const away = timeAway(lastSuccessAt, nowMs);
  return `The server last answered ${away === 'now' ? 'just now' : away}.`;
}
