'use client';

import { createContext, useContext, type ReactNode } from 'react';
import type { JudgedSource } from '@/lib/inspection/judged-words';

const Sources = createContext<Readonly<Record<string, JudgedSource>>>({});

/** Keeps the trails of a page's requirements once, for all the verdicts that rest on them. */
export function JudgedSources({
  sources,
  children,
}: {
  sources: Readonly<Record<string, JudgedSource>>;
  children: ReactNode;
}) {
  return <Sources value={sources}>{children}</Sources>;
}

/** A kept trail by its name; null where there is none. */
export function useTrail(name: string | null): JudgedSource | null {
  const sources = useContext(Sources);
  return name === null ? null : (sources[name] ?? null);
}
