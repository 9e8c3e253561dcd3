import type { ConcreteError } from '@/lib/concrete/concrete-error';
import type { FieldProblem } from '@/lib/inspection/app-error';
import type { PlanDraft } from './plan-draft';
import { draftPath } from './plan-from-draft';

/** Fields of the computation that the form asks for one level higher than where they were missed. */
const ofFace = new Set(['exposure', 'meeting', 'soffit']);
const ofElement = new Set(['thickness', 'effectiveDepth', 'element']);
const ofPlan: Record<string, string> = {
  basis: 'basis',
  aggregate: 'mixAggregate',
  structuralClass: 'concrete.structuralClass',
  workingLifeYears: 'concrete.workingLifeYears',
  strengthClass: 'concrete.strengthClass',
  toleranceClass: 'concrete.toleranceClass',
  deltaCdev: 'concrete.deltaCdev',
  strengthMpa: 'concrete.strengthMpa',
};
const renamed: Record<string, string> = { barDiameter: 'barDesignation' };

/**
 * Where in the form the computation of a plan found a problem. Its path names elements, faces and requirements by id;
 * the form counts them.
 */
export function issueProblem(error: Pick<ConcreteError, 'field' | 'reason'>, draft: PlanDraft): FieldProblem {
  const path = placeIn(draftPath(error.field).split('.'), draft);
  return { path, message: error.reason };
}

function placeIn(parts: string[], draft: PlanDraft): string {
  const last = parts.at(-1) ?? '';
  const elementAt = parts[0] === 'elements' ? indexOf(draft.elements, parts[1]) : -1;
  const element = draft.elements[elementAt];
  if (parts[0] === 'measurements') return placeInMeasurement(parts, draft);
  if (!element) return ofPlan[last] ?? renamed[last] ?? parts.join('.');
  const base = `elements.${elementAt}`;
  if (ofElement.has(last)) return `${base}.${last}`;
  if (ofPlan[last]) return ofPlan[last];
  if (parts[2] === 'layers') {
    return `${base}.layers.${Math.max(0, indexOf(element.layers, parts[3]))}.${renamed[last] ?? last}`;
  }
  const faceAt = indexOf(element.faces, parts[3]);
  const face = element.faces[faceAt];
  if (!face) return base;
  const facePath = `${base}.faces.${faceAt}`;
  if (ofFace.has(last)) return `${facePath}.${last}`;
  if (parts[4] === 'requirements') {
    const at = Math.max(0, indexOf(face.requirements, parts[5]));
    // The field for the minus is there only once "by contract" is chosen.
    if (last === 'contractMinus' && face.requirements[at]?.deviation === 'basis') {
      return `${facePath}.requirements.${at}.deviation`;
    }
    return `${facePath}.requirements.${at}.${renamed[last] ?? last}`;
  }
  return `${facePath}.${last === 'count' ? 'drawnPoints' : last}`;
}

/** A measurement's own field; what it takes from elsewhere in the plan is asked for there. */
function placeInMeasurement(parts: string[], draft: PlanDraft): string {
  const last = parts.at(-1) ?? '';
  const at = Math.max(0, indexOf(draft.measurements, parts[1]));
  const elementAt = indexOf(draft.elements, draft.measurements[at]?.elementId);
  if (ofPlan[last]) return ofPlan[last];
  if (ofElement.has(last) && elementAt >= 0) return `elements.${elementAt}.${last}`;
  return `measurements.${at}.${fieldOfMeasurement[last] ?? last}`;
}

/** Fields of a computation that the form does not ask for by that name. */
const fieldOfMeasurement: Record<string, string> = {
  'top cover': 'faceId',
  'layers carried': 'carriedLayerIds',
};

const indexOf = (list: readonly { id: string }[], idOrIndex: string | undefined): number => {
  const byId = list.findIndex((one) => one.id === idOrIndex);
  return byId >= 0 ? byId : /^\d+$/.test(idOrIndex ?? '') ? Number(idOrIndex) : -1;
};
