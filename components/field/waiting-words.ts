import type { WaitingHere } from '@/lib/device/store/settings-store';
import { timeAway } from './field-time';

const counted = (count: number, one: string, many: string) => `${count} ${count === 1 ? one : many}`;

/** "12 entries", "1 entry". */
export const entriesWords = (count: number): string => counted(count, 'entry', 'entries');

/** "12 entries and 3 photos"; empty where nothing waits. */
export function waitingWords({ entries, photos }: Pick<WaitingHere, 'entries' | 'photos'>): string {
  return [entries > 0 && entriesWords(entries), photos > 0 && counted(photos, 'photo', 'photos')]
    .filter(Boolean)
    .join(' and ');
}

/** "12 entries not sent, oldest from 2 h ago": what of a person waits on this device; empty where nothing does. */
export function waitsWords(waiting: WaitingHere, now: number): string {
  const what = waitingWords(waiting);
  if (what === '' || waiting.oldestAt === null) return what && `${what} not sent`;
  const age = timeAway(waiting.oldestAt, now);
  return `${what} not sent, ${age === 'now' ? 'recorded just now' : `oldest from ${age}`}`;
}
