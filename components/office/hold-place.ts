import type { Hold, Sheet } from '@/lib/inspection/sheet-types';

/** The part of a pour's page that shows what a hold is about; null where it is about the pour as a whole. */
export function holdPlace(hold: Hold, sheet: Sheet): string | null {
  if (hold.faceId && sheet.faces.some((face) => face.faceId === hold.faceId)) return `#face-${hold.faceId}`;
  const check = hold.subjects.find((subject) => subject.kind === 'check');
  if (check) return `#check-${check.id}`;
  if (hold.subjects.some((subject) => subject.kind === 'measurement')) return '#measurements';
  if (hold.kind === 'photo-missing') return '#photos';
  if (hold.kind === 'signature-missing' || hold.kind === 'plan-revised') return '#signatures';
  return null;
}
