import type { BodyOf } from '@/lib/inspection/entry';
import type { SubjectRef } from '@/lib/inspection/entry-bodies';
import type { PointState, Sheet } from '@/lib/inspection/sheet-types';
import { faceOfPlan } from './open-sheet';

/** The point or spot of a key, on whatever face. */
export function pointOf(sheet: Sheet, key: string): PointState | null {
  for (const face of sheet.faces) {
    const found = [...face.points, ...face.spots].find((point) => point.key === key);
    if (found) return found;
  }
  return null;
}

/** What something is called on site: "A5, Soffit of Bay 3". */
export function subjectWords(sheet: Sheet, subject: SubjectRef): string {
  switch (subject.kind) {
    case 'pour':
      return 'the whole pour';
    case 'element':
      return (
        sheet.plan.elements.find((one) => one.id === subject.id)?.mark ?? 'an element no longer in the plan'
      );
    case 'face': {
      const found = faceOfPlan(sheet, subject.id);
      return found ? `${found.element.mark}, ${found.face.name}` : 'a face no longer in the plan';
    }
    case 'point': {
      const point = pointOf(sheet, subject.id);
      return point
        ? `${point.label}, ${subjectWords(sheet, { kind: 'face', id: point.faceId })}`
        : 'a point no longer in the plan';
    }
    case 'check':
      return (
        sheet.plan.checklist.items.find((item) => item.id === subject.id)?.question ??
        'a check no longer in the plan'
      );
    case 'measurement':
      return (
        sheet.plan.measurements.find((item) => item.id === subject.id)?.title ??
        'a measurement no longer in the plan'
      );
    case 'nonconformance':
      return (
        sheet.nonconformances.find((state) => state.entry.id === subject.id)?.entry.body.title ??
        'a nonconformance that is not here'
      );
    case 'entry':
      return 'an entry of the record';
  }
}

/** The place that a subject names, for entries that have one. */
export function whereOf(sheet: Sheet, subject: SubjectRef): BodyOf<'nonconformance'>['where'] {
  const text = subject.kind === 'pour' ? '' : subjectWords(sheet, subject).slice(0, 200);
  switch (subject.kind) {
    case 'element':
      return { elementId: subject.id, faceId: null, text };
    case 'face':
      return { elementId: faceOfPlan(sheet, subject.id)?.element.id ?? null, faceId: subject.id, text };
    case 'point': {
      const point = pointOf(sheet, subject.id);
      return { elementId: point?.elementId ?? null, faceId: point?.faceId ?? null, text };
    }
    case 'check': {
      const item = sheet.plan.checklist.items.find((one) => one.id === subject.id);
      return { elementId: item?.elementId ?? null, faceId: null, text };
    }
    case 'measurement': {
      const item = sheet.plan.measurements.find((one) => one.id === subject.id);
      return { elementId: item?.elementId ?? null, faceId: null, text };
    }
    case 'nonconformance':
      return (
        sheet.nonconformances.find((state) => state.entry.id === subject.id)?.entry.body.where ?? {
          elementId: null,
          faceId: null,
          text,
        }
      );
    default:
      return { elementId: null, faceId: null, text };
  }
}

/** What a place names, as near as it says: its face, else its element; null where it names neither. */
export function subjectAt(where: BodyOf<'hold'>['where']): SubjectRef | null {
  if (where.faceId) return { kind: 'face', id: where.faceId };
  return where.elementId ? { kind: 'element', id: where.elementId } : null;
}

/** Every thing of the plan that a photo, a nonconformance or a correction can be about, nearest first. */
export function subjectChoices(sheet: Sheet): { subject: SubjectRef; words: string }[] {
  const subjects: SubjectRef[] = [
    { kind: 'pour', id: sheet.pourId },
    ...sheet.nonconformances
      .filter((state) => !state.withdrawn)
      .map((state) => ({ kind: 'nonconformance' as const, id: state.entry.id })),
    ...sheet.plan.elements.flatMap((element) => [
      { kind: 'element' as const, id: element.id },
      ...element.faces.map((face) => ({ kind: 'face' as const, id: face.id })),
    ]),
    ...sheet.plan.checklist.items.map((item) => ({ kind: 'check' as const, id: item.id })),
    ...sheet.plan.measurements.map((item) => ({ kind: 'measurement' as const, id: item.id })),
  ];
  return subjects.map((subject) => ({ subject, words: subjectWords(sheet, subject) }));
}

export const subjectValue = (subject: SubjectRef): string => `${subject.kind}|${subject.id}`;
