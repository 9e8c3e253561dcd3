import type { WaitingHere } from '@/lib/device/store/settings-store';

const counted = (count: number, one: string, many: string) => `${count} ${count === 1 ? one : many}`;

/** "12 entries", "1 entry". */
export const entriesWords = (count: number): string => counted(count, 'entry', 'entries');

/** "12 entries and 3 photos"; empty where nothing waits. */
export function waitingWords({ entries, photos }: Pick<WaitingHere, 'entries' | 'photos'>): string {
  return [entries > 0 && entriesWords(entries), photos > 0 && counted(photos, 'photo', 'photos')]
    .filter(Boolean)
    .join(' and ');
}
