import type { Hold } from './sheet-types';

/** The hold of a check or a measurement of which two people spoke without having heard each other. */
export const conflictHold = (
  key: string,
  label: string,
  place: { elementId: string | null; faceId: string | null; where: string },
  subjects: Hold['subjects'],
): Hold => ({
  id: `conflict:${key}`,
  kind: 'conflict',
  title: `Two records of "${label}" that had not seen each other`,
  detail: 'Both are kept; the less favourable governs.',
  ...place,
  since: null,
  clearedBy: 'inspector',
  need: 'Record it once more in sight of both, or amend the one that was recorded in error.',
  subjects,
});
