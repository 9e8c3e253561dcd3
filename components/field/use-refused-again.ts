'use client';

import { useState } from 'react';
import type { EntryOf, EntryType } from '@/lib/inspection/entry';
import { useSnapshot } from './use-device';

const ASKED = 'again';

/** The path of a form with the refused entry that it is to begin with. */
export const withRefused = (path: string, entryId: string): string => `${path}?${ASKED}=${entryId}`;

/**
 * The refused entry that this form begins with, as the address asks: what was refused is refilled, never typed twice.
 * Null where none of this type is asked for, or where `fits` says that it belongs to another form.
 */
export function useRefusedAgain<T extends EntryType>(
  type: T,
  fits: (body: EntryOf<T>['body']) => boolean = () => true,
): EntryOf<T> | null {
  const { refused } = useSnapshot();
  const [again] = useState(() => {
    const id = new URLSearchParams(window.location.search).get(ASKED);
    const entry = refused.find((one) => one.entry.id === id)?.entry;
    const own = entry?.type === type ? (entry as EntryOf<T>) : null;
    return own && fits(own.body) ? own : null;
  });
  return again;
}

/** The type of the refused entry that the address asks for, so that its form stands open; null where it asks for none. */
export function useRefusedType(): EntryType | null {
  const { refused } = useSnapshot();
  const [type] = useState(() => {
    const id = new URLSearchParams(window.location.search).get(ASKED);
    return refused.find((one) => one.entry.id === id)?.entry.type ?? null;
  });
  return type;
}

/** Recorded again: the address asks for it no more, so that a reload begins with an empty form. */
export function forgetAsked(): void {
  if (new URLSearchParams(window.location.search).has(ASKED))
    window.history.replaceState(null, '', window.location.pathname);
}
