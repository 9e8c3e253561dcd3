import { positive } from '@/lib/concrete/check-input';
import { ConcreteError } from '@/lib/concrete/concrete-error';

/** Nominal diameters of ASTM A615/A706 bars in inches, by number. */
const DIAMETERS_IN: readonly (readonly [number, number])[] = [
  [3, 0.375],
  [4, 0.5],
  [5, 0.625],
  [6, 0.75],
  [7, 0.875],
  [8, 1],
  [9, 1.128],
  [10, 1.27],
  [11, 1.41],
  [14, 1.693],
  [18, 2.257],
];

/** Rounding of the tabled millimetre diameters (#6 is tabled as 19.1 mm against 19.05 exactly). */
const ROUNDING_MM = 0.06;

/**
 * The ASTM number whose row of an ACI table governs a bar of this diameter: its own, or the next larger for a bar that
 * is no ASTM size (16 mm takes the row of #6), so that the stricter row always applies.
 * @throws ConcreteError above #18
 */
export function usBarNumber(diameterMm: number): number {
  positive('bar diameter', diameterMm);
  const row = DIAMETERS_IN.find(([, inches]) => diameterMm <= inches * 25.4 + ROUNDING_MM);
  if (!row)
    throw new ConcreteError('bar diameter', 'It is larger than #18, the largest bar of the ACI tables.');
  return row[0];
}
