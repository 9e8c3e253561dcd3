import { z } from 'zod';

export const measurementKinds = [
  'support-height',
  'support-spacing',
  'tie-share',
  'bar-spacing',
  'greatest-spacing',
  'bar-count',
  'bar-size',
  'clear-distance',
  'lap-length',
  'lap-stagger',
  'share-lapped',
  'coupler',
  'embedment',
  'bend-diameter',
  'hook-extension',
  'coating-damage',
  'frp-damage',
  'stainless-contact',
  'tendon-height',
  'fibre-dosage',
] as const;
export const measurementKind = z.enum(measurementKinds);
export type MeasurementKind = z.infer<typeof measurementKind>;

/**
 * What a measured value is: a length, a count, ties of intersections, a bar mark, a part of a whole, a starter with
 * its pull, a coupler, damage on a bar, a height between two named places, what a batch ticket says.
 */
export const quantities = [
  'length',
  'count',
  'share',
  'designation',
  'part',
  'starter',
  'coupler',
  'damage',
  'height',
  'ticket',
] as const;
export const quantity = z.enum(quantities);
export type Quantity = z.infer<typeof quantity>;
