import type { Entry } from '@/lib/inspection/entry';
import { fieldPaths } from './field-routes';

/** The screen on which a refused entry can be recorded again; null where it belongs to no pour. */
export function againPath(entry: Entry): string | null {
  const { pourId } = entry;
  if (pourId === null) return null;
  switch (entry.type) {
    case 'reading':
      return fieldPaths.face(pourId, entry.body.faceId, entry.body.pointId ?? undefined);
    case 'answer':
      return fieldPaths.checks(pourId);
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
