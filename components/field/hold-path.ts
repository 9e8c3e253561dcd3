import type { Hold, Sheet } from '@/lib/inspection/sheet-types';
import { fieldPaths } from './field-routes';
import { pointOf } from './subject-words';

/** Where on the phone a hold is worked off. */
export function holdPath(hold: Hold, sheet: Sheet): string {
  const pourId = sheet.pourId;
  const subject = hold.subjects[0];
  switch (hold.kind) {
    case 'cover-not-met':
    case 'effective-depth':
    case 'bar-departs':
    case 'readings-missing':
    case 'not-verified':
    case 'recheck-awaited':
    case 'conflict':
      if (subject?.kind === 'point') {
        const faceId = hold.faceId ?? pointOf(sheet, subject.id)?.faceId;
        if (faceId) return fieldPaths.face(pourId, faceId, subject.id);
      }
      break;
    case 'last-walk-missing':
      return fieldPaths.lastWalk(pourId);
    case 'signature-missing':
    case 'plan-revised':
      return fieldPaths.sign(pourId);
    case 'photo-missing':
      return subject ? fieldPaths.photos(pourId, subject) : fieldPaths.photos(pourId);
    default:
      break;
  }
  switch (subject?.kind) {
    case 'check': {
      const item = sheet.plan.checklist.items.find((one) => one.id === subject.id);
      return fieldPaths.checks(pourId, item?.group);
    }
    case 'measurement':
      return fieldPaths.measurements(pourId, subject.id);
    case 'nonconformance':
      return fieldPaths.nonconformanceShown(pourId, subject.id);
    case 'face':
      return fieldPaths.face(pourId, subject.id);
    case 'entry':
      return fieldPaths.entry(pourId, subject.id);
    default:
      return fieldPaths.holds(pourId);
  }
}
