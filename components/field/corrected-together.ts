import type { SubjectRef } from '@/lib/inspection/entry-bodies';
import type { Sheet } from '@/lib/inspection/sheet-types';

/**
 * What one correction puts right: the subject itself, and for a nonconformance the points, checks and measurements
 * that it is about, so that the inspector is asked to read exactly those again.
 */
export function correctedTogether(sheet: Sheet, about: SubjectRef): SubjectRef[] {
  if (about.kind !== 'nonconformance') return [about];
  const state = sheet.nonconformances.find((one) => one.entry.id === about.id);
  const named =
    state?.entry.body.about.filter((one) => one.kind !== 'entry' && one.kind !== 'nonconformance') ?? [];
  return [about, ...named].slice(0, 100);
}
