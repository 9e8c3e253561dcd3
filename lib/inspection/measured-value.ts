import { z } from 'zod';
import { lengthAsEntered, millimetres, optionalText, positiveMillimetres, requiredText } from './primitives';

const count = z.number().int('A whole number.').nonnegative('Not below zero.').max(100_000);
const notMoreThanAll = 'Not more than the total.';

const damagedSpot = z.object({
  kind: z.enum(['damaged', 'patched']),
  /** From the end of the bar to where the spot begins, and how far it goes on (0 for a nick). */
  fromMm: millimetres.nonnegative('Not below zero.'),
  lengthMm: millimetres.nonnegative('Not below zero.'),
  areaMm2: z.number().positive('More than zero.').max(1_000_000),
});
export type DamagedSpot = z.infer<typeof damagedSpot>;

/** What was measured, counted or found, in the quantity that the plan's item asks for. */
export const measuredValue = z.discriminatedUnion('quantity', [
  z.object({ quantity: z.literal('length'), length: lengthAsEntered }),
  z.object({ quantity: z.literal('count'), count }),
  z
    .object({
      quantity: z.literal('share'),
      of: count.positive('More than zero.'),
      tied: count,
      /** Intersections of the square that lie in the mat's outermost rows, and whether it lies at an edge. */
      onPerimeter: count.optional(),
      atEdge: z.boolean().optional(),
    })
    .refine((share) => share.tied <= share.of, { path: ['tied'], message: notMoreThanAll })
    .refine((share) => (share.onPerimeter ?? 0) <= share.of, {
      path: ['onPerimeter'],
      message: notMoreThanAll,
    }),
  z.object({ quantity: z.literal('designation'), designation: requiredText(20) }),
  z
    .object({ quantity: z.literal('part'), count, of: count.positive('More than zero.') })
    .refine((part) => part.count <= part.of, { path: ['count'], message: notMoreThanAll }),
  z.object({
    quantity: z.literal('starter'),
    length: lengthAsEntered,
    pulled: z.enum(['held', 'moved', 'not-pulled']),
  }),
  z.object({
    quantity: z.literal('coupler'),
    type: requiredText(60),
    marks: z.enum(['both-in', 'one-short', 'not-marked']),
    /** Null: not counted. */
    threads: count.nullable(),
  }),
  z.object({
    quantity: z.literal('damage'),
    spots: z.array(damagedSpot).max(60),
    /** Null: longer than the stretch that is judged. */
    barLengthMm: positiveMillimetres.nullable(),
    bareCutEnds: count,
    flameCutEnds: count,
  }),
  z.object({
    quantity: z.literal('height'),
    length: lengthAsEntered,
    from: z.enum(['soffit', 'top']),
    to: z.enum(['underside', 'centre', 'topside']),
  }),
  z.object({
    quantity: z.literal('ticket'),
    ticket: optionalText(60),
    /** Null where the ticket says nothing of it. */
    fibreType: optionalText(60).nullable(),
    kgPerM3: z.number().nonnegative('Not below zero.').max(500).nullable(),
  }),
]);
export type MeasuredValue = z.infer<typeof measuredValue>;
