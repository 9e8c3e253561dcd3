import type { SubjectRef } from './entry-bodies';
import type { Sheet } from './sheet-types';

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

/** Points of a face that stand as not met, of which one report may put right some and not others. */
export function failingOnFace(
  sheet: Sheet,
  faceId: string,
): { key: string; label: string; asked: boolean }[] {
  const face = sheet.faces.find((state) => state.faceId === faceId);
  const failing = [...(face?.points ?? []), ...(face?.spots ?? [])].filter((point) =>
    point.governing.some((reading) => reading.judged.verdict === 'not-met' && reading.acceptedBy === null),
  );
  const asked = new Set(
    sheet.nonconformances
      .filter((state) => state.status === 'decision-asked')
      .flatMap((state) => state.entry.body.about.map((about) => about.id)),
  );
  return failing.map((point) => ({
    key: point.key,
    label: point.label,
    asked: asked.has(point.key) || point.readings.some((reading) => asked.has(reading.entry.id)),
  }));
}
