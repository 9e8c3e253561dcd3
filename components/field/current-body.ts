import type { Entry, EntryOf } from '@/lib/inspection/entry';
import type { Sheet } from '@/lib/inspection/sheet-types';

/** Amendments of an entry, oldest first. */
export const amendmentsOf = (sheet: Sheet, rootId: string): EntryOf<'amendment'>[] =>
  sheet.entries.filter(
    (entry): entry is EntryOf<'amendment'> => entry.type === 'amendment' && entry.body.rootId === rootId,
  );

/** An entry's body with its last amendment, as JSON; null once withdrawn. What counts is judged by the sheet itself. */
export function currentBody(sheet: Sheet, entry: Entry): Record<string, unknown> | null {
  const last = amendmentsOf(sheet, entry.id).at(-1);
  return last ? last.body.replacement : { ...entry.body };
}
