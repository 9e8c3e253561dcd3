import type { DevicePerson, OpenPour } from '@/lib/device/device-types';
import type { Element, Face } from '@/lib/inspection/plan';
import type { Sheet } from '@/lib/inspection/sheet-types';

/** A pour whose plan is on the device, and who works on it: what every screen of a pour is given. */
export interface OpenSheet extends OpenPour {
  sheet: Sheet;
  person: DevicePerson;
}

/** Person's name as the project knows it. */
export const nameOf = (open: OpenPour, personId: string): string =>
  open.project.people.find((person) => person.id === personId)?.name ?? 'someone no longer in this project';

export interface FaceOfPlan {
  element: Element;
  face: Face;
}

/** A face of the plan with its element; null where the plan has no such face. */
export function faceOfPlan(sheet: Sheet, faceId: string): FaceOfPlan | null {
  for (const element of sheet.plan.elements) {
    const face = element.faces.find((one) => one.id === faceId);
    if (face) return { element, face };
  }
  return null;
}
