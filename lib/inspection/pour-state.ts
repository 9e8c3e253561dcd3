import type { Hold, PourState, ReleaseState, Sheet } from './sheet-types';

/**
 * The releases that stand at an instant: not void, and in force until the start of placing. A validity that has run
 * out is judged here, whenever it is read; the void that says so is written later.
 */
export function standingReleases(sheet: Sheet, now: string): ReleaseState[] {
  const started = sheet.placing.started?.body.at ?? null;
  return sheet.releases.filter(
    ({ entry, voided }) => voided === null && (started ?? now) <= entry.body.validUntil,
  );
}

/** The latest release that stands, or null. */
export function currentRelease(sheet: Sheet, now: string): ReleaseState | null {
  return standingReleases(sheet, now).at(-1) ?? null;
}

/** Where a pour stands, in one word. Derived whenever it is read. */
export function pourState(sheet: Sheet, holds: readonly Hold[], now: string): PourState {
  if (sheet.placing.withoutRelease) return 'placed-without-release';
  if (sheet.placing.finished) return 'placed';
  if (sheet.placing.started) return 'placing';
  if (currentRelease(sheet, now)) return 'released';
  const worked = sheet.entries.some(
    (entry) => entry.type === 'reading' || entry.type === 'answer' || entry.type === 'measurement',
  );
  if (!worked) return 'not-read';
  return holds.length > 0 ? 'held' : 'ready';
}

/** The word for each state on screens and documents. */
export const pourStateWords: Record<PourState, string> = {
  'no-plan': 'no plan',
  'not-read': 'not read yet',
  held: 'held',
  ready: 'ready for release',
  released: 'released',
  placing: 'placing',
  placed: 'placed',
  'placed-without-release': 'placed without release',
};
