import { ConcreteError } from '@/lib/concrete/concrete-error';
import { numberText } from '@/lib/concrete/number-text';
import { defaultPointCount, drawPoints } from '@/lib/concrete/reading-points';
import { issueMeasurement } from './issue-measurement';
import { barDiameter, issueRequirement } from './issue-requirement';
import type { Element, Face, Layer, Plan, ReadingPoint } from './plan';
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
  const elements = input.elements.map((element) => issueElement(input, context.pourId, element));
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
    elements,
    measurements: input.measurements.map((item) =>
      at(`measurements.${item.id}`, () => {
        const element = elements.find((one) => one.id === item.elementId);
        if (!element) throw new ConcreteError('elementId', 'Choose an element of this plan.', 'absent');
        return issueMeasurement(item, { basis: input.basis, units: input.units, mix: input.mix, element });
      }),
    ),
    checklist: input.checklist,
    lastWalk: input.lastWalk,
  };
  refuseSharedIds(plan);
  return plan;
}

function issueElement(input: PlanInput, pourId: string, element: ElementInput): Element {
  const issued: Element = {
    id: element.id,
    type: element.type,
    mark: element.mark,
    location: element.location,
    level: element.level,
    thicknessMm: element.thicknessMm,
    effectiveDepthMm: element.effectiveDepthMm,
    drawing: element.drawing,
    faces: element.faces.map((face) => issueFace(input, pourId, element, face)),
    layers: element.layers.map((layer) => ({
      ...layer,
      barDiameterMm: at(`elements.${element.id}.layers.${layer.id}`, () =>
        barDiameter(layer.barDesignation, input.basis),
      ),
    })),
  };
  for (const layer of issued.layers)
    at(`elements.${element.id}.layers.${layer.id}`, () => refuseWhatDoesNotFit(issued, layer));
  return issued;
}

/** Bars have to fit beside each other, and layers one behind the other between their face and the other side. */
function refuseWhatDoesNotFit(element: Element, layer: Layer): void {
  const face = element.faces.find((one) => one.id === layer.faceId);
  if (!face) throw new ConcreteError('faceId', 'Choose the face that the layer is counted from.', 'absent');
  if (layer.spacingMm !== null && layer.spacingMm <= layer.barDiameterMm) {
    throw new ConcreteError(
      'spacingMm',
      `Bars ${layer.barDesignation} do not fit beside each other at this spacing.`,
    );
  }
  const outside = element.layers.filter((one) => one.faceId === layer.faceId && one.order <= layer.order);
  const coverMm = face.requirements[0]?.specifiedMm ?? 0;
  const neededMm = outside.reduce((sum, one) => sum + one.barDiameterMm, coverMm);
  if (neededMm > element.thicknessMm) {
    throw new ConcreteError(
      'barDesignation',
      `The cover of ${face.name} and the layers to ${layer.name} need ${numberText(neededMm, 1)} mm, and the section has ${numberText(element.thicknessMm, 1)} mm.`,
    );
  }
}
