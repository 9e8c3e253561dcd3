'use client';

import { useEffect, useState } from 'react';

/** Whole seconds until a time, counted down; 0 once it has come, or without one. */
export function useSecondsLeft(until: number | null): number {
  const [now, setNow] = useState(() => Date.now());
  const left = until === null ? 0 : Math.max(0, Math.ceil((until - now) / 1000));
  useEffect(() => {
    if (until === null) return undefined;
    const tick = () => setNow(Date.now());
    tick();
    const timer = setInterval(tick, 1000);
    return () => clearInterval(timer);
  }, [until]);
  return left;
}
