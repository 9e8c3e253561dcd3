import { z } from 'zod';
import { instant, lengthUnit, optionalText, planKey, positiveMillimetres, requiredText } from './primitives';
import { measurementInput } from './measurement-item';
import {
  acceptanceBasis,
  checkItem,
  concreteInput,
  decisionRule,
  elementType,
  layer,
  meeting,
  mix,
  opening,
  recess,
} from './plan';

/** What the form says of one steel's cover; the numbers that follow from it are computed when the plan is issued. */
export const requirementInput = z.object({
  id: planKey,
  steel: requiredText(80),
  barDesignation: requiredText(20),
  /** The value of the contract documents: it governs. Null: take the code's minimum. */
  contractSpecifiedMm: positiveMillimetres.nullable(),
  /** Permitted minus and plus deviation by contract; null: by the basis. */
  contractMinusMm: z.number().nonnegative().max(100).nullable(),
  contractPlusMm: z.number().nonnegative().max(300).nullable(),
  neverLess: z.boolean(),
  /** Bars in a bundle, judged by their equivalent diameter; absent: a single bar. */
  bundleOf: z.number().int().min(2).max(4).optional(),
  /** The steel is the main bar: effective depth is judged from readings to it, where the element has one planned. */
  mainBar: z.boolean().optional(),
});

export const chosenPointInput = z.object({
  id: planKey,
  xMm: z.number().finite().nonnegative(),
  yMm: z.number().finite().nonnegative(),
  reason: requiredText(120),
});

export const faceInput = z.object({
  id: planKey,
  name: requiredText(80),
  meeting,
  soffit: z.boolean(),
  exposure: optionalText(80),
  widthMm: positiveMillimetres,
  heightMm: positiveMillimetres,
  openings: z.array(opening).max(50),
  recesses: z.array(recess).max(50),
  requirements: z.array(requirementInput).min(1, 'Name at least one steel with its cover.').max(8),
  /** How many points are drawn; null: the default by element and area. */
  drawnPoints: z.number().int().min(1).max(400).nullable(),
  chosenPoints: z.array(chosenPointInput).max(60),
});

export const elementInput = z.object({
  id: planKey,
  type: elementType,
  mark: requiredText(40),
  location: requiredText(120),
  level: optionalText(40),
  thicknessMm: positiveMillimetres,
  effectiveDepthMm: positiveMillimetres.nullable(),
  drawing: z.object({ number: requiredText(40), revision: requiredText(20) }),
  faces: z.array(faceInput).min(1, 'Add at least one face.').max(12),
  layers: z.array(layer.omit({ barDiameterMm: true })).max(24),
});

/** What a person types to say what must be in the form. */
export const planInput = z.object({
  units: lengthUnit,
  basis: acceptanceBasis,
  decisionRule,
  validityHours: z.number().positive('More than zero hours.').max(168),
  rainLimitMm: z.number().nonnegative().max(100),
  mix: mix.nullable(),
  concrete: concreteInput.optional(),
  elements: z.array(elementInput).min(1, 'Add at least one element.').max(60),
  measurements: z.array(measurementInput).max(200),
  checklist: z.object({
    template: requiredText(80),
    version: z.number().int().positive(),
    items: z.array(checkItem).max(200),
  }),
  lastWalk: z.boolean(),
});
export type PlanInput = z.infer<typeof planInput>;

/** What a person types to plan a pour, its first plan included. */
export const pourInput = z.object({
  projectId: z.uuid(),
  number: requiredText(20),
  title: requiredText(120),
  location: requiredText(120),
  plannedAt: instant.nullable(),
  reason: requiredText(300),
  plan: planInput,
});
export type PourInput = z.infer<typeof pourInput>;
