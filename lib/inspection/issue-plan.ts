import { barsOf, findBarFor, type BarSystem } from '@/lib/concrete/bars';
import { ConcreteError } from '@/lib/concrete/concrete-error';
import type { CoverRequirement, CoverRequirementInput } from '@/lib/concrete/cover-input';
import { coverRequirement } from '@/lib/concrete/cover-requirement';
import { defaultPointCount, drawPoints } from '@/lib/concrete/reading-points';
import { depthTolerance } from '@/lib/concrete/tolerances';
import type { Face, Plan, ReadingPoint, Requirement } from './plan';
import type { PlanInput } from './plan-input';

export interface IssueContext {
  pourId: string;
  revision: number;
  /** ISO instant. */
  issuedAt: string;
  authorId: string;
  reason: string;
}

type ElementInput = PlanInput['elements'][number];
type FaceInput = ElementInput['faces'][number];

/** A problem of a named field of the form keeps its path, so that the message can stand beside it. */
function at<T>(path: string, compute: () => T): T {
  try {
    return compute();
  } catch (error) {
    if (error instanceof ConcreteError)
      throw new ConcreteError(`${path}.${error.field}`, error.reason, error.kind);
    throw error;
  }
}

function barDiameter(designation: string, basis: PlanInput['basis']): number {
  const bar = findBarFor(designation, basis);
  if (!bar)
    throw new ConcreteError(
      'barDesignation',
      `There is no bar "${designation}" in the bar tables. Write it as #5, 16 mm, 15M, N16 or IS 16.`,
    );
  return bar.diameterMm;
}

function issueRequirement(
  input: PlanInput,
  element: ElementInput,
  face: FaceInput,
  wanted: FaceInput['requirements'][number],
): Requirement {
  const barDiameterMm = barDiameter(wanted.barDesignation, input.basis);
  const coverFor = (diameterMm: number) =>
    coverRequirement(coverInputOf(input, element, face, wanted, diameterMm));
  const computed = coverFor(barDiameterMm);
  const depth = depthOf(input, element, face, wanted);
  return {
    id: wanted.id,
    steel: wanted.steel,
    barDesignation: wanted.barDesignation,
    barDiameterMm,
    ...(wanted.bundleOf === undefined ? {} : { bundleOf: wanted.bundleOf }),
    ...(wanted.mainBar === undefined ? {} : { mainBar: wanted.mainBar }),
    ...computed,
    warnings: [...computed.warnings],
    trail: [...computed.trail],
    asFound: stricterBars(input, wanted.barDesignation, computed.leastAcceptedMm, coverFor),
    ...(depth ? { depth } : {}),
  };
}

function coverInputOf(
  input: PlanInput,
  element: ElementInput,
  face: FaceInput,
  wanted: FaceInput['requirements'][number],
  barDiameterMm: number,
): CoverRequirementInput {
  return {
    basis: input.basis,
    element: element.type,
    meeting: face.meeting,
    soffit: face.soffit,
    exposure: face.exposure,
    barDiameterMm,
    thicknessMm: element.thicknessMm,
    ...(element.effectiveDepthMm === null ? {} : { effectiveDepthMm: element.effectiveDepthMm }),
    ...(wanted.contractSpecifiedMm === null ? {} : { contractSpecifiedMm: wanted.contractSpecifiedMm }),
    ...(wanted.contractMinusMm === null ? {} : { contractMinusMm: wanted.contractMinusMm }),
    ...(wanted.contractPlusMm === null ? {} : { contractPlusMm: wanted.contractPlusMm }),
    ...(wanted.neverLess ? { neverLess: true } : {}),
    ...(input.mix ? { aggregateMm: input.mix.aggregateMm } : {}),
    ...(wanted.bundleOf === undefined ? {} : { bundleOf: wanted.bundleOf }),
    ...input.concrete,
    showIn: input.units,
  };
}

const barSystems: Record<PlanInput['basis'], BarSystem | null> = {
  'aci-318-19': 'astm',
  'en-1992': 'en',
  'csa-a23.1': 'csa',
  'as-3600': 'as-nzs',
  'is-456': 'is',
  contract: null,
};

/** The bar sizes of the basis that would ask for more cover than the planned one: kept, so that a device needs no tables. */
function stricterBars(
  input: PlanInput,
  planned: string,
  leastAcceptedMm: number,
  coverFor: (diameterMm: number) => CoverRequirement,
): NonNullable<Requirement['asFound']> {
  const system = barSystems[input.basis];
  if (!system) return [];
  return barsOf(system).flatMap((bar) => {
    if (bar.designation === findBarFor(planned, input.basis)?.designation) return [];
    try {
      const found = coverFor(bar.diameterMm);
      return found.leastAcceptedMm > leastAcceptedMm
        ? [
            {
              barDesignation: bar.designation,
              leastAcceptedMm: found.leastAcceptedMm,
              mostAcceptedMm: found.mostAcceptedMm,
            },
          ]
        : [];
    } catch (error) {
      // A size that does not fit this section at all is no size to be judged by here.
      if (error instanceof ConcreteError) return [];
      throw error;
    }
  });
}

/** Effective depth is judged where the steel is the main bar, the element has one planned, and the basis has a tolerance. */
function depthOf(
  input: PlanInput,
  element: ElementInput,
  face: FaceInput,
  wanted: FaceInput['requirements'][number],
): Requirement['depth'] {
  if (!wanted.mainBar || element.effectiveDepthMm === null) return undefined;
  if (input.basis === 'contract') {
    // The contract's own deviations of cover move the steel by as much: down by the plus, up by the minus.
    const { contractMinusMm, contractPlusMm } = wanted;
    if (contractPlusMm === null) return undefined;
    return {
      plannedMm: element.effectiveDepthMm,
      minusMm: contractPlusMm,
      plusMm: contractMinusMm ?? 0,
      trail: [],
    };
  }
  const tolerance = depthTolerance(
    {
      basis: input.basis,
      element: element.type,
      meeting: face.meeting,
      thicknessMm: element.thicknessMm,
      showIn: input.units,
      ...(input.concrete?.toleranceClass === undefined
        ? {}
        : { toleranceClass: input.concrete.toleranceClass }),
    },
    element.effectiveDepthMm,
  );
  return { plannedMm: element.effectiveDepthMm, ...tolerance };
}

/**
 * Points of a face. Drawn ones come from pour and face alone, so that every device, year and revision draws the same;
 * a recess brings a chosen point of its own, since only steel that passes over it is measured from its bottom.
 */
function issuePoints(pourId: string, element: ElementInput, face: FaceInput): ReadingPoint[] {
  const count = face.drawnPoints ?? defaultPointCount(element.type, face.widthMm * face.heightMm);
  const drawn = drawPoints({
    seed: `${pourId}/${face.id}`,
    widthMm: face.widthMm,
    heightMm: face.heightMm,
    count,
    openings: face.openings,
  });
  const inside =
    (box: { xMm: number; yMm: number; widthMm: number; heightMm: number }) =>
    (point: { xMm: number; yMm: number }) =>
      point.xMm >= box.xMm &&
      point.xMm <= box.xMm + box.widthMm &&
      point.yMm >= box.yMm &&
      point.yMm <= box.yMm + box.heightMm;
  const atRecesses = face.recesses
    .filter((recess) => !face.chosenPoints.some(inside(recess)))
    .map((recess) => ({
      id: `recess-${recess.id}`,
      xMm: recess.xMm + recess.widthMm / 2,
      yMm: recess.yMm + recess.heightMm / 2,
      reason: `${recess.name}: read from its bottom`,
    }));
  const chosen = [...face.chosenPoints, ...atRecesses];
  for (const point of chosen) {
    if (point.xMm > face.widthMm || point.yMm > face.heightMm) {
      throw new ConcreteError('chosenPoints', `The chosen point "${point.reason}" lies outside the face.`);
    }
  }
  return [
    ...drawn.map((point) => ({
      id: `${face.id}.${point.cell}`,
      label: point.cell,
      kind: 'drawn' as const,
      xMm: point.xMm,
      yMm: point.yMm,
    })),
    ...chosen.map((point, index) => ({
      id: `${face.id}.${point.id}`,
      label: `x${index + 1}`,
      kind: 'chosen' as const,
      xMm: point.xMm,
      yMm: point.yMm,
      reason: point.reason,
    })),
  ];
}

function issueFace(input: PlanInput, pourId: string, element: ElementInput, face: FaceInput): Face {
  const path = `elements.${element.id}.faces.${face.id}`;
  return {
    id: face.id,
    name: face.name,
    meeting: face.meeting,
    soffit: face.soffit,
    exposure: face.exposure,
    widthMm: face.widthMm,
    heightMm: face.heightMm,
    openings: face.openings,
    recesses: face.recesses,
    requirements: face.requirements.map((wanted) =>
      at(`${path}.requirements.${wanted.id}`, () => issueRequirement(input, element, face, wanted)),
    ),
    points: at(path, () => issuePoints(pourId, element, face)),
  };
}

/** Ids are what entries hold on to: two things of one plan never share one. */
function refuseSharedIds(plan: Plan): void {
  const seen = new Set<string>();
  const take = (id: string, what: string) => {
    if (seen.has(`${what}/${id}`))
      throw new ConcreteError(what, `Two things of this plan share the id "${id}".`);
    seen.add(`${what}/${id}`);
  };
  for (const element of plan.elements) {
    take(element.id, 'element');
    for (const face of element.faces) {
      take(face.id, 'face');
      for (const point of face.points) take(point.id, 'point');
    }
  }
  for (const item of plan.measurements) take(item.id, 'measurement');
  for (const item of plan.checklist.items) take(item.id, 'check');
}

/**
 * Issues a plan: computes requirements, their trails and the reading points, and freezes them in the document. From
 * then on nothing in the program re-judges the pour by other numbers; a change is a revision.
 * @throws ConcreteError with the path of the field and the reason (unknown bar, impossible section, exposure missing)
 */
export function issuePlan(input: PlanInput, context: IssueContext): Plan {
  const plan: Plan = {
    schema: 1,
    ...context,
    units: input.units,
    basis: input.basis,
    decisionRule: input.decisionRule,
    validityHours: input.validityHours,
    rainLimitMm: input.rainLimitMm,
    mix: input.mix,
    ...(input.concrete ? { concrete: input.concrete } : {}),
    elements: input.elements.map((element) => ({
      id: element.id,
      type: element.type,
      mark: element.mark,
      location: element.location,
      level: element.level,
      thicknessMm: element.thicknessMm,
      effectiveDepthMm: element.effectiveDepthMm,
      drawing: element.drawing,
      faces: element.faces.map((face) => issueFace(input, context.pourId, element, face)),
      layers: element.layers.map((layer) => ({
        ...layer,
        barDiameterMm: at(`elements.${element.id}.layers.${layer.id}`, () =>
          barDiameter(layer.barDesignation, input.basis),
        ),
      })),
    })),
    measurements: input.measurements.map((item) => ({
      ...item,
      trail: [
        {
          rule: 'Limits typed for this plan',
          clause: '',
          edition: '',
          value: limitWords(item),
          provenance: 'contract' as const,
        },
      ],
    })),
    checklist: input.checklist,
    lastWalk: input.lastWalk,
  };
  refuseSharedIds(plan);
  return plan;
}

function limitWords(item: PlanInput['measurements'][number]): string {
  if (item.expected) return item.expected;
  const unit = item.quantity === 'length' ? ' mm' : item.quantity === 'share' ? ' %' : '';
  if (item.least !== null && item.most !== null) return `${item.least} to ${item.most}${unit}`;
  if (item.least !== null) return `at least ${item.least}${unit}`;
  if (item.most !== null) return `at most ${item.most}${unit}`;
  return 'no limit';
}
