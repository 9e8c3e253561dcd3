import type { SubjectRef } from '@/lib/inspection/entry-bodies';
import type { PointState, Sheet } from '@/lib/inspection/sheet-types';
import { readingText } from './reading-words';

/** Something not met that a decision can accept, by the entry that says so. */
export interface AcceptableEntry {
  id: string;
  label: string;
}

/**
 * What stands as not met in the matter of a nonconformance: its readings, measurements and answers, by entry. A
 * decision accepts the ones that it names, nothing else and nothing worse.
 */
export function acceptableEntries(sheet: Sheet, about: readonly SubjectRef[]): AcceptableEntry[] {
  const found = new Map<string, AcceptableEntry>();
  const add = (id: string, label: string) => found.set(id, { id, label });
  const names = (kind: SubjectRef['kind'], id: string) =>
    about.some((subject) => (subject.kind === kind && subject.id === id) || subject.kind === 'pour');
  const namesReadingOf = (point: PointState) =>
    point.readings.some((reading) => names('entry', reading.entry.id));

  for (const face of sheet.faces) {
    const whole = names('face', face.faceId) || names('element', face.elementId);
    for (const point of [...face.points, ...face.spots]) {
      if (whole || names('point', point.key) || namesReadingOf(point))
        addReadings(sheet, point, face.faceId, add);
    }
  }
  for (const state of sheet.measurements) {
    const whole = names('measurement', state.item.id) || names('element', state.item.elementId);
    for (const place of state.governing) {
      if (!whole && !names('entry', place.entry.id)) continue;
      if (place.verdict === 'not-met')
        add(
          place.entry.id,
          `${state.item.title}${place.current?.place ? `, ${place.current.place}` : ''}: ${place.reason}`,
        );
    }
  }
  for (const check of sheet.checks) {
    const named =
      names('check', check.item.id) ||
      (check.governing !== null && names('entry', check.governing.id)) ||
      (check.item.elementId !== null && names('element', check.item.elementId));
    if (named && check.governing?.body.answer === 'not-met')
      add(check.governing.id, `${check.item.question}: not met`);
  }
  return [...found.values()];
}

function addReadings(
  sheet: Sheet,
  point: PointState,
  faceId: string,
  add: (id: string, label: string) => void,
): void {
  const face = sheet.plan.elements.flatMap((element) => element.faces).find((one) => one.id === faceId);
  for (const reading of point.governing) {
    if (reading.judged.verdict !== 'not-met' || reading.current === null) continue;
    add(
      reading.entry.id,
      `${point.label}, ${face?.name ?? 'face'}: ${readingText(reading.current, sheet.plan.units)} to ${reading.current.steel}, ${reading.judged.side === 'high' ? 'high' : 'low'}`,
    );
  }
}

/** Faces that a nonconformance is about, by the places it names. */
export function facesConcerned(
  sheet: Sheet,
  body: { about: readonly SubjectRef[]; where: { faceId: string | null } },
): { elementId: string; faceId: string; points: string[] }[] {
  return sheet.faces.flatMap((face) => {
    const points = [...face.points, ...face.spots]
      .filter((point) =>
        body.about.some(
          (subject) =>
            (subject.kind === 'point' && subject.id === point.key) ||
            (subject.kind === 'entry' && point.readings.some((reading) => reading.entry.id === subject.id)),
        ),
      )
      .map((point) => point.key);
    const named = body.about.some((subject) => subject.kind === 'face' && subject.id === face.faceId);
    return points.length > 0 || named || body.where.faceId === face.faceId
      ? [{ elementId: face.elementId, faceId: face.faceId, points }]
      : [];
  });
}
