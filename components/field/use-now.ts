'use client';

import { useSyncExternalStore } from 'react';

const STEP_MS = 15_000;
const listeners = new Set<() => void>();
let timer: ReturnType<typeof setInterval> | null = null;
let current = 0;

function subscribe(listener: () => void): () => void {
  listeners.add(listener);
  timer ??= setInterval(() => {
    current = Date.now();
    listeners.forEach((tell) => tell());
  }, STEP_MS);
  return () => {
    listeners.delete(listener);
    if (listeners.size > 0 || timer === null) return;
    clearInterval(timer);
    timer = null;
    current = 0;
  };
}

const read = () => (current === 0 ? (current = Date.now()) : current);

/** The time in ms, for "time left": it moves every quarter of a minute. 0 while the page is drawn ahead of time. */
export const useNow = (): number => useSyncExternalStore(subscribe, read, () => 0);
