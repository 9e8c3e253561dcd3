import { z } from 'zod';
import { measurementItem } from './measurement-item';
import {
  digest,
  instant,
  lengthUnit,
  millimetres,
  optionalText,
  planKey,
  positiveMillimetres,
  requiredText,
} from './primitives';
import { trailStep } from './trail-step';

export const elementTypes = [
  'slab',
  'wall',
  'column',
  'beam',
  'footing',
  'mat',
  'pier',
  'stair',
  'deck',
] as const;
export const elementType = z.enum(elementTypes);
export type ElementType = z.infer<typeof elementType>;

export const meetings = ['formed', 'cast-against-ground', 'finished-top', 'prepared-ground'] as const;
/** How the concrete of a face meets what is on the other side of it. */
export const meeting = z.enum(meetings);
export type Meeting = z.infer<typeof meeting>;

export const bases = ['aci-318-19', 'en-1992', 'is-456', 'as-3600', 'csa-a23.1', 'contract'] as const;
export const acceptanceBasis = z.enum(bases);
export type AcceptanceBasis = z.infer<typeof acceptanceBasis>;

/** Simple acceptance, or guarded acceptance with guard band g (JCGM 106:2012); g is U unless the project sets it. */
export const decisionRule = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('simple') }),
  z.object({ kind: z.literal('guarded'), guardMm: z.number().nonnegative().max(50).optional() }),
]);
export type DecisionRule = z.infer<typeof decisionRule>;

/** What a reading to one steel of a face is judged by; frozen when the plan is issued. */
export const requirement = z.object({
  id: planKey,
  /** The steel it is for, in the words of the trade: "outermost bar B1", "ties", "main bars of layer 2". */
  steel: requiredText(80),
  barDesignation: requiredText(20),
  barDiameterMm: positiveMillimetres,
  specifiedMm: positiveMillimetres,
  leastAcceptedMm: millimetres,
  mostAcceptedMm: millimetres.nullable(),
  codeMinimumMm: millimetres.nullable(),
  /** As typed: bars in a bundle, and whether this steel is the main bar. */
  bundleOf: z.number().int().min(2).max(4).optional(),
  mainBar: z.boolean().optional(),
  warnings: z.array(z.string()),
  trail: z.array(trailStep),
  /** Other bar sizes that would ask for more cover here: a bar found that was not planned is judged by the stricter. */
  asFound: z
    .array(
      z.object({
        barDesignation: requiredText(20),
        leastAcceptedMm: millimetres,
        mostAcceptedMm: millimetres.nullable(),
      }),
    )
    .optional(),
  /** Where the steel is the main bar: planned effective depth with its tolerance, judged apart from cover. */
  depth: z
    .object({
      plannedMm: positiveMillimetres,
      minusMm: millimetres,
      plusMm: millimetres,
      trail: z.array(trailStep),
    })
    .optional(),
});
export type Requirement = z.infer<typeof requirement>;

/** A place where cover is to be read: drawn at random, or chosen where failures live. */
export const readingPoint = z.object({
  id: planKey,
  label: requiredText(20),
  kind: z.enum(['drawn', 'chosen']),
  xMm: millimetres,
  yMm: millimetres,
  /** Why a chosen point was chosen: "edge of opening", "traffic route". */
  reason: optionalText(120).optional(),
});
export type ReadingPoint = z.infer<typeof readingPoint>;

const rectangle = {
  xMm: millimetres,
  yMm: millimetres,
  widthMm: positiveMillimetres,
  heightMm: positiveMillimetres,
};
export const opening = z.object({ id: planKey, name: requiredText(80), ...rectangle });
export const recess = z.object({
  id: planKey,
  name: requiredText(80),
  depthMm: positiveMillimetres,
  ...rectangle,
});

export const face = z.object({
  id: planKey,
  name: requiredText(80),
  meeting,
  soffit: z.boolean(),
  exposure: optionalText(80),
  widthMm: positiveMillimetres,
  heightMm: positiveMillimetres,
  openings: z.array(opening).max(50),
  recesses: z.array(recess).max(50),
  requirements: z.array(requirement).min(1).max(8),
  points: z.array(readingPoint).max(500),
});
export type Face = z.infer<typeof face>;

/** A set of parallel bars. `order` counts from the face that the layer belongs to, 1 is outermost. */
export const layer = z.object({
  id: planKey,
  name: requiredText(40),
  faceId: planKey,
  order: z.number().int().min(1).max(12),
  barDesignation: requiredText(20),
  barDiameterMm: positiveMillimetres,
  grade: optionalText(40),
  coating: z.enum(['none', 'epoxy', 'galvanised', 'stainless', 'frp']),
  spacingMm: positiveMillimetres.nullable(),
  count: z.number().int().positive().max(10_000).nullable(),
  direction: requiredText(40),
});
export type Layer = z.infer<typeof layer>;

export type MeasurementItem = z.infer<typeof measurementItem>;

export const element = z.object({
  id: planKey,
  type: elementType,
  mark: requiredText(40),
  location: requiredText(120),
  level: optionalText(40),
  thicknessMm: positiveMillimetres,
  /** As planned; absent in plans issued before it was kept. */
  effectiveDepthMm: positiveMillimetres.nullable().optional(),
  drawing: z.object({ number: requiredText(40), revision: requiredText(20) }),
  faces: z.array(face).min(1).max(12),
  layers: z.array(layer).max(24),
});
export type Element = z.infer<typeof element>;

export const checkGroups = [
  'documents',
  'formwork',
  'steel',
  'placing',
  'supports',
  'cover',
  'laps',
  'embedded',
  'cleanliness',
  'access',
  'sign-off',
] as const;
export const checkGroup = z.enum(checkGroups);
export type CheckGroup = z.infer<typeof checkGroup>;

/** One question of the checklist, with what it rests on and the evidence it needs. */
export const checkItem = z.object({
  id: planKey,
  group: checkGroup,
  question: requiredText(300),
  basis: requiredText(200),
  evidence: z.enum(['none', 'photo']),
  critical: z.boolean(),
  notApplicable: z.boolean(),
  /** Work does not go on past a hold point; a witness point asks somebody to be there. */
  attendance: z.enum(['none', 'hold-point', 'witness-point']),
  /** The contractor's own items (housekeeping) may be closed by the superintendent. */
  closedBy: z.enum(['inspector', 'superintendent']),
  elementId: planKey.nullable(),
});
export type CheckItem = z.infer<typeof checkItem>;

export const mix = z.object({ id: planKey, name: requiredText(80), aggregateMm: positiveMillimetres });
export type Mix = z.infer<typeof mix>;

/** What some codes ask of the concrete before they give a cover; each is only needed by the basis that names it. */
export const concreteInput = z.object({
  /** EN 1992-1-1: the structural class, or the working life it is found from. */
  structuralClass: z.enum(['S1', 'S2', 'S3', 'S4', 'S5', 'S6']).optional(),
  workingLifeYears: z.union([z.literal(50), z.literal(100)]).optional(),
  strengthClass: optionalText(20).optional(),
  slabGeometry: z.boolean().optional(),
  specialQualityControl: z.boolean().optional(),
  deltaCdevMm: z.number().nonnegative().max(50).optional(),
  toleranceClass: z.union([z.literal(1), z.literal(2)]).optional(),
  /** IS 456 and AS 3600: characteristic strength, MPa. */
  strengthMpa: z.number().positive().max(150).optional(),
  membrane: z.boolean().optional(),
});

/** What must be in the form: a dated revision, never edited, its numbers frozen when it was issued. */
export const plan = z.object({
  schema: z.literal(1),
  pourId: z.uuid(),
  revision: z.number().int().positive(),
  issuedAt: instant,
  authorId: z.uuid(),
  reason: requiredText(300),
  units: lengthUnit,
  basis: acceptanceBasis,
  decisionRule,
  /** Hours that a release stands until the start of placing. */
  validityHours: z.number().positive().max(168),
  /** Rain at or over this depth voids a release; rain of unknown amount always does. */
  rainLimitMm: z.number().nonnegative().max(100),
  mix: mix.nullable(),
  /** What was typed for it, so that a revision starts from the same figures. */
  concrete: concreteInput.optional(),
  elements: z.array(element).min(1).max(60),
  measurements: z.array(measurementItem).max(200),
  checklist: z.object({
    template: requiredText(80),
    version: z.number().int().positive(),
    items: z.array(checkItem).max(200),
  }),
  /** The walk over traffic routes, openings and reworked places right before the release. */
  lastWalk: z.boolean(),
});
export type Plan = z.infer<typeof plan>;

export const planDigest = digest;
