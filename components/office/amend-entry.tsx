'use client';

import { EntryButton } from './entry-button';
import { amendAction, type AmendedEntry } from './row-actions';

/** The button with which the author of an entry corrects its words or withdraws it. */
export function AmendEntry({
  amended,
  pourId,
  seenSeq,
  about,
}: {
  amended: AmendedEntry;
  pourId: string;
  seenSeq: number;
  about: string;
}) {
  return (
    <EntryButton
      pourId={pourId}
      seenSeq={seenSeq}
      action={amendAction(amended)}
      about={about}
      variant="quiet"
    />
  );
}
