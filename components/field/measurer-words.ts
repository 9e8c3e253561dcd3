import type { EntryOf } from '@/lib/inspection/entry';
import { measurerOf, waitsForMeasurer } from '@/lib/inspection/measurers';
import type { ReadingState } from '@/lib/inspection/sheet-types';
import { bodyShown } from '@/lib/inspection/reading-text';
import { nameOf, type OpenSheet } from './open-sheet';

/** Who read, and who typed where that is another person: "Noor Valdés, typed by Tomasz Brük". */
export function readByWords(open: OpenSheet, entry: EntryOf<'reading'>): string {
  const reader = nameOf(open, measurerOf(entry));
  return measurerOf(entry) === entry.authorId
    ? reader
    : `${reader}, typed by ${nameOf(open, entry.authorId)}`;
}

/** "not verified until Noor Valdés confirms it"; null where the reading waits for nobody. */
export const waitsWordsOf = (open: OpenSheet, reading: ReadingState): string | null =>
  reading.current && waitsForMeasurer(bodyShown(reading))
    ? `not verified until ${nameOf(open, measurerOf(reading.entry))} confirms it`
    : null;
