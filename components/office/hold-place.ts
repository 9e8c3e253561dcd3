import type { Hold, Sheet } from '@/lib/inspection/sheet-types';

/** The part of a pour's page that shows what a hold is about; null where it is about the pour as a whole. */
export function holdPlace(hold: Hold, sheet: Sheet): string | null {
  const [first, ...others] = hold.subjects;
  if (first?.kind === 'point' && others.length === 0) return `#point-${first.id}`;
  if (hold.faceId && sheet.faces.some((face) => face.faceId === hold.faceId)) return `#face-${hold.faceId}`;
  const check = hold.subjects.find((subject) => subject.kind === 'check');
  if (check) return `#check-${check.id}`;
  const measurement = hold.subjects.find((subject) => subject.kind === 'measurement');
  if (measurement) return `#measurement-${measurement.id}`;
  if (hold.kind === 'photo-missing') return '#photos';
  if (hold.kind === 'signature-missing' || hold.kind === 'plan-revised') return '#signatures';
  return null;
}

/** The address of a hold on its pour's page. */
export const holdHref = (pourId: string, holdId: string): string =>
  `/pours/${pourId}#hold-${encodeURIComponent(holdId)}`;
