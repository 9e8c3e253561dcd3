import { ConcreteError, requirePositive } from '@/lib/concrete/concrete-error';

/**
 * Diameter in mm of a single bar with the area of a bundle of `bundleOf` equal bars (2 to 4); the bar's own diameter
 * where it stands alone. Source: ACI 318-19 25.6.1.6 and EN 1992-1-1 8.9.1 (from memory): d times the root of n.
 */
export function equivalentDiameter(barDiameterMm: number, bundleOf = 1): number {
  requirePositive('barDiameterMm', barDiameterMm);
  if (!Number.isInteger(bundleOf) || bundleOf < 1 || bundleOf > 4) {
    throw new ConcreteError('bundleOf', 'A bundle has two to four bars; write 1 for a single bar.');
  }
  return barDiameterMm * Math.sqrt(bundleOf);
}
