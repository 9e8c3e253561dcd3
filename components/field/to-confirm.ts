import { measurerOf } from '@/lib/inspection/measurers';
import type { PointState, ReadingState } from '@/lib/inspection/sheet-types';
import type { FaceOfPlan, OpenSheet } from './open-sheet';
import { faceOfPlan } from './open-sheet';

/** A reading that another person typed in this person's name, and where it was taken. */
export interface ToConfirm {
  point: PointState;
  reading: ReadingState;
}

/** Readings typed by others that wait for this person's word, face by face in the order of the plan. */
export function readingsToConfirm(open: OpenSheet): { place: FaceOfPlan; readings: ToConfirm[] }[] {
  return open.sheet.faces.flatMap((face) => {
    const place = faceOfPlan(open.sheet, face.faceId);
    const readings = [...face.points, ...face.spots].flatMap((point) =>
      point.readings
        .filter((one) => one.onceConfirmed !== null && measurerOf(one.entry) === open.person.id)
        .map((reading) => ({ point, reading })),
    );
    return place && readings.length > 0 ? [{ place, readings }] : [];
  });
}
