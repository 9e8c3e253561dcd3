import type { PlanDraft } from './plan-draft';

/** A form that was left before it was sent, as this browser keeps it. */
export interface KeptDraft {
  at: string;
  draft: PlanDraft;
}

const VERSION = 2;
const keyOf = (name: string) => `cagewright.plan-draft.${VERSION}.${name}`;

/** The draft kept under a name, or null where there is none or it cannot be read. */
export function readKeptDraft(name: string): KeptDraft | null {
  try {
    const text = window.localStorage.getItem(keyOf(name));
    const kept: unknown = text ? JSON.parse(text) : null;
    return isKept(kept) ? kept : null;
  } catch {
    return null;
  }
}

const isKept = (kept: unknown): kept is KeptDraft =>
  typeof kept === 'object' &&
  kept !== null &&
  'at' in kept &&
  typeof kept.at === 'string' &&
  'draft' in kept &&
  typeof kept.draft === 'object' &&
  kept.draft !== null &&
  'elements' in kept.draft &&
  Array.isArray(kept.draft.elements);

/** Keeps the form as typed. @returns false where the browser keeps nothing */
export function keepDraft(name: string, draft: PlanDraft, at: string): boolean {
  try {
    window.localStorage.setItem(keyOf(name), JSON.stringify({ at, draft } satisfies KeptDraft));
    return true;
  } catch {
    return false;
  }
}

export function forgetDraft(name: string): void {
  try {
    window.localStorage.removeItem(keyOf(name));
  } catch {
    // Where nothing can be kept there is nothing to forget.
  }
}
