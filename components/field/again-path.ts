import type { Entry } from '@/lib/inspection/entry';
import type { Sheet } from '@/lib/inspection/sheet-types';
import { fieldPaths } from './field-routes';
import { withRefused } from './use-refused-again';

/**
 * The screen on which a refused entry can be recorded again, with the entry to begin with; null where there is none.
 * @param anyPourId a pour of its project that is kept here, for what belongs to the project as a whole
 */
export function againPath(entry: Entry, sheet: Sheet | null, anyPourId: string | null): string | null {
  const pourId = entry.pourId ?? anyPourId;
  const path = pourId && screenOf(entry, pourId, sheet);
  return path ? withRefused(path, entry.id) : null;
}

function screenOf(entry: Entry, pourId: string, sheet: Sheet | null): string {
  switch (entry.type) {
    case 'reading':
      return fieldPaths.face(pourId, entry.body.faceId, entry.body.pointId ?? undefined);
    case 'answer':
      return fieldPaths.checks(
        pourId,
        sheet?.plan.checklist.items.find((item) => item.id === entry.body.checkId)?.group,
      );
    case 'measurement':
      return fieldPaths.measurements(pourId, entry.body.itemId);
    case 'photo':
      return fieldPaths.photos(pourId, entry.body.about);
    case 'nonconformance':
      return fieldPaths.nonconformance(pourId, entry.body.about[0]);
    case 'correction':
      return fieldPaths.correction(pourId, entry.body.about[0]);
    case 'amendment':
      return fieldPaths.entry(pourId, entry.body.rootId);
    case 'query':
      return fieldPaths.entry(pourId, entry.body.entryId);
    case 'query-answered':
      return fieldPaths.entry(pourId, entry.body.queryId);
    case 'recheck':
      return entry.body.about.kind === 'nonconformance'
        ? fieldPaths.nonconformanceShown(pourId, entry.body.about.id)
        : fieldPaths.pour(pourId);
    case 'condition-verified': {
      const decided = sheet?.nonconformances.find((state) =>
        state.conditions.some((one) => one.condition.id === entry.body.conditionId),
      );
      return decided ? fieldPaths.nonconformanceShown(pourId, decided.entry.id) : fieldPaths.pour(pourId);
    }
    case 'hold-lifted':
      return fieldPaths.entry(pourId, entry.body.holdId);
    case 'block-check':
    case 'instrument-status':
      return fieldPaths.instruments(pourId);
    case 'last-walk':
      return fieldPaths.lastWalk(pourId);
    case 'signature':
      return fieldPaths.sign(pourId);
    case 'site-event':
    case 'hold':
    case 'note':
    case 'verbal-instruction':
    case 'inspection-asked':
    case 'placement':
      return fieldPaths.events(pourId);
    default:
      return fieldPaths.pour(pourId);
  }
}
