import { requirePositive } from '@/lib/concrete/concrete-error';

/**
 * Accuracy in mm asked of a cover meter on a single bar in a block: the greater of 5 % and 2 mm (BS 1881-204:1988, seen
 * in a paper on it). It suits as the tolerance of a block check; on site the standard gives no number.
 */
export function coverMeterAccuracy(coverMm: number): number {
  return Math.max(2, 0.05 * requirePositive('coverMm', coverMm));
}

/** Whether a block check passes: read and known cover no further apart than the tolerance, inclusive; mm. */
export function blockCheckPasses(readMm: number, blockMm: number, toleranceMm?: number): boolean {
  const known = requirePositive('blockMm', blockMm);
  const tolerance = toleranceMm === undefined ? coverMeterAccuracy(known) : toleranceMm;
  return Math.abs(readMm - known) <= tolerance + 1e-6;
}
