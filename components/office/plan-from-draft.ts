import { pourInput, planInput, type PlanInput, type PourInput } from '@/lib/inspection/plan-input';
import { checklistTemplate } from '@/lib/inspection/checklist-templates';
import type { FieldProblem } from '@/lib/inspection/app-error';
import { DraftReader } from './draft-reader';
import { readMeasurement } from './measurement-from-draft';
import type { ElementDraft, FaceDraft, PlanDraft } from './plan-draft';
import { instantFromField } from './project-time';

function readFace(
  reader: DraftReader,
  at: string,
  face: FaceDraft,
): PlanInput['elements'][number]['faces'][number] {
  const rectangle = (path: string, one: FaceDraft['openings'][number]) => ({
    id: one.id,
    name: one.name,
    xMm: reader.length(`${path}.x`, one.x),
    yMm: reader.length(`${path}.y`, one.y),
    widthMm: reader.length(`${path}.width`, one.width),
    heightMm: reader.length(`${path}.height`, one.height),
  });
  return {
    id: face.id,
    name: face.name,
    meeting: face.meeting,
    soffit: face.soffit,
    exposure: face.exposure,
    widthMm: reader.length(`${at}.width`, face.width),
    heightMm: reader.length(`${at}.height`, face.height),
    openings: face.openings.map((one, index) => rectangle(`${at}.openings.${index}`, one)),
    recesses: face.recesses.map((one, index) => ({
      ...rectangle(`${at}.recesses.${index}`, one),
      depthMm: reader.length(`${at}.recesses.${index}.depth`, one.depth),
    })),
    drawnPoints: reader.optionalNumber(`${at}.drawnPoints`, face.drawnPoints),
    chosenPoints: face.chosenPoints.map((one, index) => ({
      id: one.id,
      xMm: reader.length(`${at}.chosenPoints.${index}.x`, one.x),
      yMm: reader.length(`${at}.chosenPoints.${index}.y`, one.y),
      reason: one.reason,
    })),
    requirements: face.requirements.map((one, index) => {
      const path = `${at}.requirements.${index}`;
      return {
        id: one.id,
        steel: one.steel,
        barDesignation: one.barDesignation,
        contractSpecifiedMm: reader.optionalLength(`${path}.contractSpecified`, one.contractSpecified),
        contractMinusMm:
          one.deviation === 'contract'
            ? reader.optionalLength(`${path}.contractMinus`, one.contractMinus)
            : null,
        contractPlusMm:
          one.deviation === 'basis' ? null : reader.optionalLength(`${path}.contractPlus`, one.contractPlus),
        neverLess: one.deviation === 'never-less',
        ...(one.bundleOf === '' ? {} : { bundleOf: reader.number(`${path}.bundleOf`, one.bundleOf) }),
        ...(one.mainBar ? { mainBar: true } : {}),
      };
    }),
  };
}

function readElement(reader: DraftReader, at: string, element: ElementDraft): PlanInput['elements'][number] {
  return {
    id: element.id,
    type: element.type,
    mark: element.mark,
    location: element.location,
    level: element.level,
    thicknessMm: reader.length(`${at}.thickness`, element.thickness),
    effectiveDepthMm: reader.optionalLength(`${at}.effectiveDepth`, element.effectiveDepth),
    drawing: element.drawing,
    faces: element.faces.map((face, index) => readFace(reader, `${at}.faces.${index}`, face)),
    layers: element.layers.map((layer, index) => {
      const path = `${at}.layers.${index}`;
      return {
        id: layer.id,
        name: layer.name,
        faceId: layer.faceId,
        order: reader.number(`${path}.order`, layer.order),
        barDesignation: layer.barDesignation,
        grade: layer.grade,
        coating: layer.coating,
        spacingMm: reader.optionalLength(`${path}.spacing`, layer.spacing),
        count: reader.optionalNumber(`${path}.count`, layer.count),
        direction: layer.direction,
      };
    }),
  };
}

/** The checks that the plan carries: an earlier revision's own, a template, or those of its element types together. */
export function draftChecklist(
  draft: Pick<PlanDraft, 'checklist' | 'elements' | 'leftOut' | 'template'>,
): PlanInput['checklist'] {
  const whole = wholeChecklist(draft);
  return { ...whole, items: whole.items.filter((item) => !draft.leftOut.includes(item.id)) };
}

/** The same, with what is left out. */
export function wholeChecklist(
  draft: Pick<PlanDraft, 'checklist' | 'elements' | 'template'>,
): PlanInput['checklist'] {
  if (draft.checklist) return draft.checklist;
  const kinds = draft.template
    ? [draft.template]
    : [...new Set(draft.elements.map((element) => element.type))];
  const templates = kinds.map((kind) => checklistTemplate(kind));
  const items = new Map(templates.flatMap((one) => one.items.map((item) => [item.id, item] as const)));
  return {
    template: templates
      .map((one) => one.template)
      .join(' + ')
      .slice(0, 80),
    version: Math.max(1, ...templates.map((one) => one.version)),
    items: [...items.values()],
  };
}

/** What the basis asks of the concrete; what it does not ask for is left out, whatever was typed for another basis. */
function readConcrete(reader: DraftReader, draft: PlanDraft): PlanInput['concrete'] {
  const { concrete: typed, basis } = draft;
  const strength =
    typed.strengthMpa === '' ? {} : { strengthMpa: reader.number('concrete.strengthMpa', typed.strengthMpa) };
  if (basis === 'is-456') return strength;
  if (basis === 'as-3600') return { ...strength, ...(typed.membrane ? { membrane: true } : {}) };
  if (basis !== 'en-1992') return undefined;
  return {
    ...(typed.structuralClass ? { structuralClass: typed.structuralClass } : {}),
    ...(typed.workingLifeYears ? { workingLifeYears: typed.workingLifeYears === '50' ? 50 : 100 } : {}),
    ...(typed.strengthClass.trim() ? { strengthClass: typed.strengthClass } : {}),
    ...(typed.toleranceClass ? { toleranceClass: typed.toleranceClass === '1' ? 1 : 2 } : {}),
    ...(typed.deltaCdev === '' ? {} : { deltaCdevMm: reader.length('concrete.deltaCdev', typed.deltaCdev) }),
    ...(typed.slabGeometry ? { slabGeometry: true } : {}),
    ...(typed.specialQualityControl ? { specialQualityControl: true } : {}),
  };
}

function readPlan(reader: DraftReader, draft: PlanDraft): PlanInput {
  const concrete = readConcrete(reader, draft);
  const guardMm = draft.rule === 'guarded' ? reader.optionalLength('guard', draft.guard) : null;
  return {
    units: draft.units,
    basis: draft.basis,
    decisionRule:
      draft.rule === 'simple'
        ? { kind: 'simple' }
        : { kind: 'guarded', ...(guardMm === null ? {} : { guardMm }) },
    validityHours: reader.number('validityHours', draft.validityHours),
    rainLimitMm: reader.number('rainLimit', draft.rainLimit),
    mix:
      draft.mixName.trim() === ''
        ? null
        : {
            id: 'mix-1',
            name: draft.mixName,
            aggregateMm: reader.length('mixAggregate', draft.mixAggregate),
          },
    ...(concrete && Object.keys(concrete).length > 0 ? { concrete } : {}),
    elements: draft.elements.map((element, index) => readElement(reader, `elements.${index}`, element)),
    measurements: draft.measurements.map((one, index) =>
      readMeasurement(reader, `measurements.${index}`, one, draft.elements),
    ),
    checklist: draftChecklist(draft),
    lastWalk: draft.lastWalk,
  };
}

/** Fields of a measurement's rule that the form names in its own way; the others go by their last name. */
const fieldsOfRules: Record<string, string> = {
  'bay.widthMm': 'bayWidth',
  'bay.edgeMm': 'edge',
  'ownMm.minus': 'ownMinus',
  'ownMm.plus': 'ownPlus',
  'standsOn.faceId': 'standsOnFaceId',
  'standsOn.layerIds': 'standsOnLayerIds',
  'standsOn.otherMm': 'other',
};

/** Where a schema's path is in the draft: no "Mm", no "plan." in front, and the mix's two fields by name. */
export function draftPath(path: string): string {
  return path
    .replace(/^plan\./, '')
    .replace(/^mix\.name$/, 'mixName')
    .replace(/^mix\.aggregateMm$/, 'mixAggregate')
    .replace(/^decisionRule\b.*$/, 'guard')
    .replace(/^(measurements\.\d+)\.rule\.(.+)$/, (_, at: string, field: string) => {
      const last = field.split('.').at(-1) ?? '';
      return `${at}.${fieldsOfRules[field] ?? last}`;
    })
    .replace(/Mm(?=\.|$)/g, '');
}

const mergeProblems = (reader: DraftReader, found: FieldProblem[]): FieldProblem[] => {
  const named = new Set(reader.problems.map((problem) => problem.path));
  return [...reader.problems, ...found.filter((problem) => !named.has(problem.path))];
};

export type ReadDraft<T> = { ok: true; input: T } | { ok: false; problems: FieldProblem[] };

/** What the form says of a new pour, or what is wrong with it, by the draft's own field names. */
export function pourFromDraft(draft: PlanDraft, projectId: string, timeZone: string): ReadDraft<PourInput> {
  const reader = new DraftReader(draft.units);
  const plannedAt = draft.plannedAt === '' ? null : instantFromField(draft.plannedAt, timeZone);
  if (draft.plannedAt !== '' && plannedAt === null) {
    reader.problems.push({
      path: 'plannedAt',
      message: "That time does not exist in the project's time zone.",
    });
  }
  const parsed = pourInput.safeParse({
    projectId,
    number: draft.number,
    title: draft.title,
    location: draft.location,
    plannedAt,
    reason: draft.reason,
    plan: readPlan(reader, draft),
  });
  if (parsed.success && reader.problems.length === 0) return { ok: true, input: parsed.data };
  return {
    ok: false,
    problems: mergeProblems(
      reader,
      (parsed.error?.issues ?? []).map((issue) => ({
        path: draftPath(issue.path.join('.')),
        message: issue.message,
      })),
    ),
  };
}

/** What the form says of a plan alone (a revision, or one face for the preview). */
export function planFromDraft(draft: PlanDraft): ReadDraft<PlanInput> {
  const reader = new DraftReader(draft.units);
  const parsed = planInput.safeParse(readPlan(reader, draft));
  if (parsed.success && reader.problems.length === 0) return { ok: true, input: parsed.data };
  return {
    ok: false,
    problems: mergeProblems(
      reader,
      (parsed.error?.issues ?? []).map((issue) => ({
        path: draftPath(issue.path.join('.')),
        message: issue.message,
      })),
    ),
  };
}
