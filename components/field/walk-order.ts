import type { PointState } from '@/lib/inspection/sheet-types';

/** Has this point to be read, or read again? A reading that is not verified does not count. */
export function isAsked(state: PointState): boolean {
  return state.governing.length === 0 || state.recheck !== null || state.conflict;
}

const distance = (from: { xMm: number; yMm: number }, to: PointState) =>
  Math.hypot(from.xMm - to.xMm, from.yMm - to.yMm);

/**
 * The next point of the walk: the nearest that is still asked for, from where the last one was read; from the corner
 * where nothing has been read. Null when every point has been read.
 */
export function nextPoint(
  points: readonly PointState[],
  from: { xMm: number; yMm: number; key?: string } | null,
): PointState | null {
  const start = from ?? { xMm: 0, yMm: 0 };
  return points
    .filter((state) => state.key !== from?.key && isAsked(state))
    .reduce<PointState | null>(
      (nearest, state) =>
        nearest === null || distance(start, state) < distance(start, nearest) - 1e-9 ? state : nearest,
      null,
    );
}

/** How many of a face's points have been read, and how many there are. */
export function walkProgress(points: readonly PointState[]): { read: number; total: number; left: number } {
  const left = points.filter(isAsked).length;
  return { read: points.length - left, total: points.length, left };
}
