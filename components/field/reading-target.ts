import type { FaceState, PointState } from '@/lib/inspection/sheet-types';
import { nextPoint } from './walk-order';

/** What a person chose to read out of order: a point, or a new spot on the map. */
export type Chosen = { kind: 'point'; key: string } | { kind: 'spot'; place: { xMm: number; yMm: number } };

/** Where the next reading goes. Without `point` it is a new spot. */
export interface ReadingTarget {
  point?: PointState;
  place: { xMm: number; yMm: number };
  label: string;
}

/** The chosen place, else the next point of the walk; null when every point has been read and none is chosen. */
export function readingTarget(
  state: FaceState,
  chosen: Chosen | null,
  from: { xMm: number; yMm: number; key?: string } | null,
): ReadingTarget | null {
  if (chosen?.kind === 'spot') return { place: chosen.place, label: 'spot' };
  const point =
    (chosen ? [...state.points, ...state.spots].find((one) => one.key === chosen.key) : undefined) ??
    nextPoint(state.points, from) ??
    nextPoint(state.points, null);
  return point ? { point, place: { xMm: point.xMm, yMm: point.yMm }, label: point.label } : null;
}
