import { finite } from '@/lib/concrete/check-input';

/** 1 psi in MPa: 1 lbf = 4.4482216152605 N and 1 in = 25.4 mm, both exact. */
export const MPA_PER_PSI = 4.4482216152605 / (25.4 * 25.4);

/** Pounds per square inch to megapascals. */
export function psiToMPa(psi: number): number {
  return finite('psi', psi) * MPA_PER_PSI;
}

/** Megapascals to pounds per square inch. */
export function mpaToPsi(mpa: number): number {
  return finite('MPa', mpa) / MPA_PER_PSI;
}

/** Feet to millimetres, exact. */
export const MM_PER_FOOT = 304.8;
