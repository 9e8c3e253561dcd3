import type { Entry } from '@/lib/inspection/entry';

const RECORD_ID = /^[0-9a-f]{8}(-[0-9a-f]{4}){3}-[0-9a-f]{12}$/i;

/** Every record id that a body mentions, wherever it stands in it: what the entry may depend on. */
export function referredIds(value: unknown, found: Set<string> = new Set()): Set<string> {
  if (typeof value === 'string') {
    // A spot reading is named by its entry: "spot:<id>".
    const id = value.startsWith('spot:') ? value.slice(5) : value;
    if (RECORD_ID.test(id)) found.add(id);
  } else if (Array.isArray(value)) {
    for (const one of value) referredIds(one, found);
  } else if (typeof value === 'object' && value !== null) {
    for (const one of Object.values(value)) referredIds(one, found);
  }
  return found;
}

/** The ids by which later entries can name this one, or a thing that it brings. */
export function introducedIds(entry: Entry): string[] {
  if (entry.type === 'photo') return [entry.id, entry.body.photoId];
  if (entry.type === 'disposition') return [entry.id, ...entry.body.conditions.map(({ id }) => id)];
  return [entry.id];
}
