import { fieldPaths } from './field-routes';
import { faceOfPlan, type OpenSheet } from './open-sheet';
import { walkProgress } from './walk-order';

/** Where to go once every point of a face is read: the next face with points left, else back to the sheet. */
export function onwardFrom(
  open: Pick<OpenSheet, 'sheet' | 'pour'>,
  faceId: string,
): { href: string; words: string } {
  const { faces, pourId } = open.sheet;
  const here = faces.findIndex((state) => state.faceId === faceId);
  const following = [...faces.slice(here + 1), ...faces.slice(0, Math.max(here, 0))];
  const next = following.find((state) => walkProgress(state.points).left > 0);
  const place = next ? faceOfPlan(open.sheet, next.faceId) : null;
  return place
    ? {
        href: fieldPaths.face(pourId, place.face.id),
        words: `Next: ${place.face.name}, ${place.element.mark}`,
      }
    : { href: fieldPaths.pour(pourId), words: `Back to ${open.pour.number}` };
}
