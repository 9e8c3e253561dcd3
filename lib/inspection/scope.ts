import type { Entry } from './entry';
import type { ReleaseScope, SubjectRef } from './entry-bodies';
import type { Plan } from './plan';

type ById = ReadonlyMap<string, Entry>;

/** Elements that a thing of the plan lies in; null: it has no place of its own and falls in every scope. */
function elementsOfSubject(subject: SubjectRef, byId: ById, plan: Plan): string[] | null {
  switch (subject.kind) {
    case 'element':
      return [subject.id];
    case 'face':
      return plan.elements
        .filter((element) => element.faces.some((face) => face.id === subject.id))
        .map(({ id }) => id);
    case 'point': {
      const spot = subject.id.startsWith('spot:') ? byId.get(subject.id.slice(5)) : undefined;
      if (spot?.type === 'reading')
        return elementsOfSubject({ kind: 'face', id: spot.body.faceId }, byId, plan);
      const holder = plan.elements.find((element) =>
        element.faces.some((face) => face.points.some((point) => point.id === subject.id)),
      );
      return holder ? [holder.id] : null;
    }
    case 'check': {
      const item = plan.checklist.items.find((one) => one.id === subject.id);
      return item?.elementId ? [item.elementId] : null;
    }
    case 'measurement': {
      const item = plan.measurements.find((one) => one.id === subject.id);
      return item ? [item.elementId] : null;
    }
    case 'nonconformance':
    case 'entry': {
      const entry = byId.get(subject.id);
      return entry ? elementsOf(entry, byId, plan) : null;
    }
    case 'pour':
      return null;
  }
}

function union(subjects: SubjectRef[], byId: ById, plan: Plan): string[] | null {
  const found = new Set<string>();
  for (const subject of subjects) {
    const elements = elementsOfSubject(subject, byId, plan);
    if (elements === null) return null;
    for (const id of elements) found.add(id);
  }
  return found.size > 0 ? [...found] : null;
}

/** The elements an entry touches; null when it touches the whole pour. */
export function elementsOf(entry: Entry, byId: ById, plan: Plan): string[] | null {
  switch (entry.type) {
    case 'reading':
      return elementsOfSubject({ kind: 'face', id: entry.body.faceId }, byId, plan);
    case 'answer':
      return elementsOfSubject({ kind: 'check', id: entry.body.checkId }, byId, plan);
    case 'measurement':
      return elementsOfSubject({ kind: 'measurement', id: entry.body.itemId }, byId, plan);
    case 'nonconformance':
      return union(entry.body.about, byId, plan);
    case 'correction':
      return union(entry.body.about, byId, plan);
    case 'recheck':
      return elementsOfSubject(entry.body.about, byId, plan);
    case 'hold':
      return entry.body.where.elementId ? [entry.body.where.elementId] : null;
    case 'site-event':
    case 'last-walk':
    case 'signature':
      return entry.body.elementIds;
    case 'amendment':
      return elementsOfSubject({ kind: 'entry', id: entry.body.rootId }, byId, plan);
    case 'query':
      return elementsOfSubject({ kind: 'entry', id: entry.body.entryId }, byId, plan);
    case 'disposition':
      return elementsOfSubject({ kind: 'entry', id: entry.body.nonconformanceId }, byId, plan);
    case 'drawing-received':
      return plan.elements
        .filter((element) => element.drawing.number === entry.body.number)
        .map(({ id }) => id);
    case 'release':
      return entry.body.scope.elementIds;
    case 'release-void': {
      const release = byId.get(entry.body.releaseId);
      return release ? elementsOf(release, byId, plan) : null;
    }
    default:
      return null;
  }
}

/** Do these elements lie in the scope? What has no place lies in every scope. */
export function inScope(elements: string[] | null, scope: Pick<ReleaseScope, 'elementIds'>): boolean {
  return (
    elements === null || scope.elementIds === null || elements.some((id) => scope.elementIds?.includes(id))
  );
}
