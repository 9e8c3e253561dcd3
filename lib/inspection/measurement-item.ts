import { z } from 'zod';
import { measurementKind, quantity } from './measurement-kind';
import { measurementRule } from './measurement-rule';
import { optionalText, planKey, positiveMillimetres, requiredText } from './primitives';
import { trailStep } from './trail-step';

/** What a value is judged by beside its limits, frozen when the plan is issued. */
export const judgedAgainst = z.discriminatedUnion('by', [
  /** Ties: with the pattern that treats the perimeter apart, and whether one square has to lie at an edge. */
  z.object({ by: z.literal('tie-pattern'), perimeterApart: z.boolean(), oneAtEdge: z.boolean() }),
  z.object({
    by: z.literal('epoxy'),
    diameterMm: positiveMillimetres,
    damagedMostPercent: z.number().nonnegative(),
    patchedMostPercent: z.number().nonnegative(),
  }),
  z.object({ by: z.literal('frp'), diameterMm: positiveMillimetres, mostPercent: z.number().nonnegative() }),
  z.object({ by: z.literal('coupler'), type: requiredText(60), mostThreads: z.number().int().nullable() }),
  z.object({
    by: z.literal('datum'),
    from: z.enum(['soffit', 'top']),
    to: z.enum(['underside', 'centre', 'topside']),
  }),
  z.object({ by: z.literal('fibre'), type: requiredText(60) }),
]);
export type JudgedAgainst = z.infer<typeof judgedAgainst>;

/**
 * A measurement that the plan asks for, with the limits it is judged by. Lengths in mm, shares in per cent, dosages in
 * kg/m³, counts as such.
 */
export const measurementItem = z.object({
  id: planKey,
  kind: measurementKind,
  title: requiredText(120),
  elementId: planKey,
  quantity,
  least: z.number().finite().nullable(),
  most: z.number().finite().nullable(),
  expected: optionalText(40).nullable(),
  /** How many places have to be measured. */
  required: z.number().int().min(1).max(50),
  /** Measured before, under and after a person's weight. */
  loaded: z.boolean(),
  /** What a value of more than one number is judged by; absent where the limits say all. */
  against: judgedAgainst.optional(),
  /** As typed; absent in plans issued before it was kept. */
  rule: measurementRule.optional(),
  trail: z.array(trailStep),
});
export type MeasurementItem = z.infer<typeof measurementItem>;

/** What the form says of one measurement; its limits are computed when the plan is issued. */
export const measurementInput = measurementItem
  .pick({ id: true, title: true, elementId: true, required: true, loaded: true })
  .extend({ rule: measurementRule });
export type MeasurementInput = z.infer<typeof measurementInput>;
