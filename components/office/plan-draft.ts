import type { TemplateFor } from '@/lib/inspection/checklist-items';
import type {
  CheckItem,
  DecisionRule,
  ElementType,
  MeasurementItem,
  Meeting,
  Plan,
  Requirement,
} from '@/lib/inspection/plan';
import type { PlanInput } from '@/lib/inspection/plan-input';
import { exactText } from './length-words';
import { measurementDraftOf, type MeasurementDraft } from './measurement-draft';

/**
 * The form as it was typed. Names follow `planInput` without "Mm": a length here is text, with or without its unit, so
 * that nothing typed is ever lost or changed while it is not valid yet.
 */
export interface RequirementDraft {
  id: string;
  steel: string;
  barDesignation: string;
  contractSpecified: string;
  deviation: 'basis' | 'contract' | 'never-less';
  contractMinus: string;
  contractPlus: string;
  mainBar: boolean;
  /** Empty: a single bar. */
  bundleOf: string;
}

export interface RectangleDraft {
  id: string;
  name: string;
  x: string;
  y: string;
  width: string;
  height: string;
  /** Of a recess; empty for an opening. */
  depth: string;
}

export interface ChosenPointDraft {
  id: string;
  x: string;
  y: string;
  reason: string;
}

export interface FaceDraft {
  id: string;
  name: string;
  meeting: Meeting;
  soffit: boolean;
  exposure: string;
  width: string;
  height: string;
  openings: RectangleDraft[];
  recesses: RectangleDraft[];
  requirements: RequirementDraft[];
  drawnPoints: string;
  chosenPoints: ChosenPointDraft[];
}

export interface LayerDraft {
  id: string;
  name: string;
  faceId: string;
  order: string;
  barDesignation: string;
  grade: string;
  coating: 'none' | 'epoxy' | 'galvanised' | 'stainless' | 'frp';
  spacing: string;
  count: string;
  direction: string;
}

export interface ElementDraft {
  id: string;
  type: ElementType;
  mark: string;
  location: string;
  level: string;
  thickness: string;
  effectiveDepth: string;
  drawing: { number: string; revision: string };
  faces: FaceDraft[];
  layers: LayerDraft[];
}

/** What some codes ask of the concrete; which of it is asked for depends on the basis. */
export interface ConcreteDraft {
  structuralClass: '' | 'S1' | 'S2' | 'S3' | 'S4' | 'S5' | 'S6';
  workingLifeYears: '' | '50' | '100';
  strengthClass: string;
  toleranceClass: '' | '1' | '2';
  deltaCdev: string;
  slabGeometry: boolean;
  specialQualityControl: boolean;
  strengthMpa: string;
  membrane: boolean;
}

export interface PlanDraft {
  number: string;
  title: string;
  location: string;
  /** `datetime-local` text in the project's time zone; empty while not planned. */
  plannedAt: string;
  reason: string;
  units: 'mm' | 'in';
  basis: PlanInput['basis'];
  rule: 'simple' | 'guarded';
  guard: string;
  validityHours: string;
  rainLimit: string;
  mixName: string;
  mixAggregate: string;
  concrete: ConcreteDraft;
  lastWalk: boolean;
  elements: ElementDraft[];
  /** The template to take; empty: by the types of the elements. */
  template: '' | TemplateFor;
  /** Checks of the templates that are left out, by id. */
  leftOut: string[];
  /** The checklist of an earlier revision or pour; null: by the types of the elements. */
  checklist: { template: string; version: number; items: CheckItem[] } | null;
  measurements: MeasurementDraft[];
}

/** A key that stays with a face or an element over revisions. */
export const newKey = (prefix: string): string =>
  `${prefix}-${globalThis.crypto.randomUUID().replaceAll('-', '').slice(0, 12)}`;

export const emptyRequirement = (): RequirementDraft => ({
  id: newKey('req'),
  steel: 'outermost bar',
  barDesignation: '',
  contractSpecified: '',
  deviation: 'contract',
  contractMinus: '',
  contractPlus: '',
  mainBar: false,
  bundleOf: '',
});

export const emptyFace = (name = ''): FaceDraft => ({
  id: newKey('face'),
  name,
  meeting: 'formed',
  soffit: false,
  exposure: '',
  width: '',
  height: '',
  openings: [],
  recesses: [],
  requirements: [emptyRequirement()],
  drawnPoints: '',
  chosenPoints: [],
});

export const emptyLayer = (faceId: string, order: number): LayerDraft => ({
  id: newKey('layer'),
  name: '',
  faceId,
  order: String(order),
  barDesignation: '',
  grade: '',
  coating: 'none',
  spacing: '',
  count: '',
  direction: '',
});

export const emptyElement = (): ElementDraft => ({
  id: newKey('el'),
  type: 'slab',
  mark: '',
  location: '',
  level: '',
  thickness: '',
  effectiveDepth: '',
  drawing: { number: '', revision: '' },
  faces: [emptyFace()],
  layers: [],
});

export const emptyConcrete = (): ConcreteDraft => ({
  structuralClass: '',
  workingLifeYears: '',
  strengthClass: '',
  toleranceClass: '',
  deltaCdev: '',
  slabGeometry: false,
  specialQualityControl: false,
  strengthMpa: '',
  membrane: false,
});

export const emptyPlanDraft = (): PlanDraft => ({
  number: '',
  title: '',
  location: '',
  plannedAt: '',
  reason: 'First issue',
  units: 'mm',
  basis: 'contract',
  rule: 'simple',
  guard: '',
  validityHours: '24',
  rainLimit: '5',
  mixName: '',
  mixAggregate: '',
  concrete: emptyConcrete(),
  lastWalk: true,
  elements: [emptyElement()],
  template: '',
  leftOut: [],
  checklist: null,
  measurements: [],
});

const ruleDraft = (rule: DecisionRule): Pick<PlanDraft, 'rule' | 'guard'> =>
  rule.kind === 'simple'
    ? { rule: 'simple', guard: '' }
    : { rule: 'guarded', guard: rule.guardMm === undefined ? '' : String(rule.guardMm) };

/**
 * A requirement as it was typed: what the trail says came from the contract. What came from a code stays empty, so that
 * issuing again works it out again. The words are those of lib/concrete/cover-contract; a test holds the two together.
 */
function requirementDraft(one: Requirement, shown: (mm: number) => string): RequirementDraft {
  const byContract = (rule: RegExp) =>
    one.trail.some((step) => step.provenance === 'contract' && rule.test(step.rule));
  const neverLess = byContract(/^Never less/);
  const minus = byContract(/^Permitted reduction/);
  const plus = byContract(/^Permitted increase/) && one.mostAcceptedMm !== null;
  return {
    id: one.id,
    steel: one.steel,
    barDesignation: one.barDesignation,
    contractSpecified: byContract(/^Specified cover/) ? shown(one.specifiedMm) : '',
    deviation: neverLess ? 'never-less' : minus || plus ? 'contract' : 'basis',
    contractMinus: minus ? shown(one.specifiedMm - one.leastAcceptedMm) : '',
    contractPlus: plus ? shown((one.mostAcceptedMm ?? 0) - one.specifiedMm) : '',
    mainBar: one.mainBar ?? false,
    bundleOf: one.bundleOf === undefined ? '' : String(one.bundleOf),
  };
}

function concreteDraft(of: Plan['concrete'], shown: (mm: number) => string): ConcreteDraft {
  if (!of) return emptyConcrete();
  return {
    structuralClass: of.structuralClass ?? '',
    workingLifeYears: of.workingLifeYears === 50 ? '50' : of.workingLifeYears === 100 ? '100' : '',
    strengthClass: of.strengthClass ?? '',
    toleranceClass: of.toleranceClass === 1 ? '1' : of.toleranceClass === 2 ? '2' : '',
    deltaCdev: of.deltaCdevMm === undefined ? '' : shown(of.deltaCdevMm),
    slabGeometry: of.slabGeometry ?? false,
    specialQualityControl: of.specialQualityControl ?? false,
    strengthMpa: of.strengthMpa === undefined ? '' : String(of.strengthMpa),
    membrane: of.membrane ?? false,
  };
}

/** A measurement as it was typed; one of an older plan comes back with its limits typed. */
function measurementInputOf(item: MeasurementItem): PlanInput['measurements'][number] {
  const { id, title, elementId, required, loaded, kind, quantity, least, most, expected } = item;
  const rule = item.rule ?? { rule: 'typed', kind, quantity, least, most, expected };
  return { id, title, elementId, required, loaded, rule };
}

/**
 * The form filled from an issued plan. Ids are kept, so that a revision's points keep theirs; a copy for another pour
 * keeps them too, since they are unique within a plan only. A requirement comes back as the contract's: its specified
 * cover, and its deviations where the trail says that they were the contract's.
 */
export function draftOfPlan(plan: Plan): PlanDraft {
  const shown = (mm: number) => exactText(mm, plan.units);
  return {
    ...emptyPlanDraft(),
    reason: '',
    units: plan.units,
    basis: plan.basis,
    ...ruleDraft(plan.decisionRule),
    validityHours: String(plan.validityHours),
    rainLimit: exactText(plan.rainLimitMm, 'mm'),
    mixName: plan.mix?.name ?? '',
    mixAggregate: plan.mix ? shown(plan.mix.aggregateMm) : '',
    concrete: concreteDraft(plan.concrete, shown),
    lastWalk: plan.lastWalk,
    checklist: plan.checklist,
    measurements: plan.measurements.map((item) =>
      measurementDraftOf(measurementInputOf(item), plan.basis, shown),
    ),
    elements: plan.elements.map((element) => ({
      id: element.id,
      type: element.type,
      mark: element.mark,
      location: element.location,
      level: element.level,
      thickness: shown(element.thicknessMm),
      effectiveDepth: element.effectiveDepthMm ? shown(element.effectiveDepthMm) : '',
      drawing: element.drawing,
      layers: element.layers.map((layer) => ({
        id: layer.id,
        name: layer.name,
        faceId: layer.faceId,
        order: String(layer.order),
        barDesignation: layer.barDesignation,
        grade: layer.grade,
        coating: layer.coating,
        spacing: layer.spacingMm === null ? '' : shown(layer.spacingMm),
        count: layer.count === null ? '' : String(layer.count),
        direction: layer.direction,
      })),
      faces: element.faces.map((face) => ({
        id: face.id,
        name: face.name,
        meeting: face.meeting,
        soffit: face.soffit,
        exposure: face.exposure,
        width: shown(face.widthMm),
        height: shown(face.heightMm),
        openings: face.openings.map((one) => ({
          id: one.id,
          name: one.name,
          x: shown(one.xMm),
          y: shown(one.yMm),
          width: shown(one.widthMm),
          height: shown(one.heightMm),
          depth: '',
        })),
        recesses: face.recesses.map((one) => ({
          id: one.id,
          name: one.name,
          x: shown(one.xMm),
          y: shown(one.yMm),
          width: shown(one.widthMm),
          height: shown(one.heightMm),
          depth: shown(one.depthMm),
        })),
        drawnPoints: String(face.points.filter((point) => point.kind === 'drawn').length || ''),
        chosenPoints: face.points
          .filter((point) => point.kind === 'chosen' && !point.id.startsWith(`${face.id}.recess-`))
          .map((point) => ({
            // Issuing puts the face's id in front; a revision has to give the planner's own key back.
            id: point.id.startsWith(`${face.id}.`) ? point.id.slice(face.id.length + 1) : point.id,
            x: shown(point.xMm),
            y: shown(point.yMm),
            reason: point.reason ?? '',
          })),
        requirements: face.requirements.map((one) => requirementDraft(one, shown)),
      })),
    })),
  };
}
