import type { PointState, ReadingState } from '@/lib/inspection/sheet-types';

/**
 * The reading that still counts at a point where a more favourable one was read after it in the same round and to the
 * same steel; null where the given one counts itself, or counts neither way.
 */
export function governingBeside(point: PointState, reading: ReadingState): ReadingState | null {
  if (reading.current === null || reading.judged.verdict === 'not-verified') return null;
  const beside = point.governing.filter((one) => one.requirement?.id === reading.requirement?.id);
  if (beside.some((one) => one.entry.id === reading.entry.id)) return null;
  return beside[0] ?? null;
}
