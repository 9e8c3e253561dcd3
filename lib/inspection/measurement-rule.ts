import { z } from 'zod';
import { optionalText, planKey, positiveMillimetres, requiredText } from './primitives';
import { measurementKind, quantity } from './measurement-kind';

const tolerance = z.number().nonnegative('Not below zero.').max(1000);
const percent = z.number().nonnegative('Not below zero.').max(100, 'At most 100 %.');
const strength = z.number().positive('More than zero.').max(1000);
const layer = { layerId: planKey };

/** By which permitted deviation: the one that goes with the plan's basis, a named one, none, or the contract's own. */
export const lapTolerance = z.enum(['basis', 'none', 'aci-117-10', 'en-13670', 'own']);
const lapped = { tolerance: lapTolerance, ownMinusMm: tolerance.nullable() };

export const spacingUses = [
  'one-way-slab',
  'two-way-critical',
  'two-way-other',
  'shrinkage-temperature',
  'wall',
  'slab-principal',
  'slab-secondary',
  'slab-principal-high-moment',
  'slab-secondary-high-moment',
] as const;
/** Which code gives a distance or a bend; by itself where the plan's basis has no table of its own. */
export const detailCode = z.enum(['aci-318-19', 'en-1992-1-1']);

/** How a required lap length is found. */
const lapBy = z.discriminatedUnion('by', [
  z.object({ by: z.literal('typed'), lengthMm: positiveMillimetres }),
  z.object({
    by: z.literal('aci-tension'),
    fyMpa: strength,
    fcMpa: strength,
    lightweight: z.boolean(),
    topBar: z.boolean(),
    equation: z.enum(['simple', 'general']),
    tiesAlongLap: z.boolean(),
    providedOverRequired: z.number().positive('More than zero.').max(100),
    sharePercent: percent,
  }),
  z.object({
    by: z.literal('aci-compression'),
    fyMpa: strength,
    fcMpa: strength,
    tensionLapMm: positiveMillimetres.nullable(),
  }),
  z.object({
    by: z.literal('en'),
    strengthClass: requiredText(20),
    stressMpa: strength,
    sharePercent: percent,
    goodBond: z.boolean(),
  }),
]);

/**
 * How the limits of one measurement are found: typed, or from the plan's own data when it is issued. What was typed is
 * kept in the plan, so that a revision starts from the same figures. Lengths in mm, strengths in MPa, shares in per cent.
 */
export const measurementRule = z.discriminatedUnion('rule', [
  z.object({
    rule: z.literal('typed'),
    kind: measurementKind,
    quantity,
    least: z.number().finite().nullable(),
    most: z.number().finite().nullable(),
    expected: optionalText(40).nullable(),
  }),
  z.object({ rule: z.literal('bar-size'), ...layer }),
  z.object({
    rule: z.literal('bar-count'),
    ...layer,
    /** Null: the count that the layer names. */
    bay: z.object({ widthMm: positiveMillimetres, edgeMm: tolerance }).nullable(),
  }),
  z.object({
    rule: z.literal('bar-spacing'),
    ...layer,
    gaps: z.number().int('A whole number.').min(1).max(100),
    /** Null: the deviation of the plan's basis. */
    ownMm: z.object({ minus: tolerance, plus: tolerance }).nullable(),
    steel: z.enum(['slab-or-wall', 'stirrups', 'column-ties']),
    use: z.enum(spacingUses).nullable(),
  }),
  z.object({ rule: z.literal('greatest-spacing'), ...layer, use: z.enum(spacingUses) }),
  z.object({
    rule: z.literal('clear-distance'),
    ...layer,
    place: z.enum(['layer', 'between-layers', 'column']),
    code: detailCode,
  }),
  z.object({
    rule: z.literal('support-height'),
    /** The upper face, whose cover the support keeps. */
    faceId: planKey,
    carriedLayerIds: z.array(planKey).min(1, 'Name the layers that it carries.').max(8),
    /** What it stands on: the bars of layers, with the cover of the lower face below them, and anything else. */
    standsOn: z.object({
      faceId: planKey.nullable(),
      layerIds: z.array(planKey).max(8),
      otherMm: tolerance,
    }),
    /** Null: what the effective depth may lose by the plan's basis. */
    ownMinusMm: tolerance.nullable(),
  }),
  z.object({
    rule: z.literal('support-spacing'),
    ...layer,
    by: z.enum(['common-practice', 'bs-7973-2-bars', 'bs-7973-2-fabric', 'plan']),
    planMm: positiveMillimetres.nullable(),
  }),
  z.object({
    rule: z.literal('tie-share'),
    ...layer,
    otherLayerId: planKey,
    pattern: z.enum(['every', 'alternate', 'perimeter-every', 'by-spacing', 'share']),
    sharePercent: percent.nullable(),
  }),
  z.object({ rule: z.literal('lap-length'), ...layer, ...lapped, length: lapBy }),
  z.object({
    rule: z.literal('lap-stagger'),
    lapMm: positiveMillimetres,
    leastMm: positiveMillimetres.nullable(),
  }),
  z.object({
    rule: z.literal('share-lapped'),
    lapMm: positiveMillimetres,
    code: detailCode,
    mostPercent: percent,
  }),
  z.object({
    rule: z.literal('coupler'),
    type: requiredText(60),
    mostThreads: z.number().int('A whole number.').nonnegative().max(100).nullable(),
  }),
  z.object({
    rule: z.literal('embedment'),
    ...layer,
    ...lapped,
    lengthMm: positiveMillimetres,
    /** A starter is pulled; a hook or a bar end is only measured. */
    starter: z.boolean(),
  }),
  z.object({
    rule: z.literal('bend-diameter'),
    ...layer,
    code: z.enum(['aci-318-19', 'en-1992-1-1', 'bs-8666']),
    use: z.enum(['main', 'tie']),
  }),
  z.object({
    rule: z.literal('hook-extension'),
    ...layer,
    use: z.enum(['main', 'tie']),
    angle: z.union([z.literal(90), z.literal(135), z.literal(180)]),
  }),
  z.object({
    rule: z.literal('coating-damage'),
    ...layer,
    /** Null: the limits of ASTM D3963. */
    damagedMostPercent: percent.nullable(),
    patchedMostPercent: percent.nullable(),
  }),
  z.object({ rule: z.literal('frp-damage'), ...layer, mostPercent: percent.nullable() }),
  z.object({ rule: z.literal('stainless-contact'), ...layer }),
  z.object({
    rule: z.literal('tendon-height'),
    heightMm: positiveMillimetres,
    from: z.enum(['soffit', 'top']),
    to: z.enum(['underside', 'centre', 'topside']),
    band: z.enum(['aci-117-10', 'as-3600', 'own']),
    ownMm: z.object({ minus: tolerance, plus: tolerance }).nullable(),
  }),
  z.object({
    rule: z.literal('fibre-dosage'),
    fibreType: requiredText(60),
    kgPerM3: z.number().positive('More than zero.').max(500),
    minusPercent: percent,
  }),
]);
export type MeasurementRule = z.infer<typeof measurementRule>;
export type RuleOf<R extends MeasurementRule['rule']> = Extract<MeasurementRule, { rule: R }>;
export type LapBy = z.infer<typeof lapBy>;
