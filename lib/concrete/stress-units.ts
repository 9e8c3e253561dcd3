import { ConcreteError } from '@/lib/concrete/concrete-error';

/** 1 psi in MPa: 1 lbf = 4.4482216152605 N and 1 in = 25.4 mm, both exact. */
export const MPA_PER_PSI = 4.4482216152605 / (25.4 * 25.4);

/** A conversion keeps what it is given, however large: whether it can be computed with is for the computation to say. */
function converted(field: string, value: number): number {
  if (!Number.isFinite(value)) throw new ConcreteError(field, 'It has to be a number.');
  return value;
}

/** Pounds per square inch to megapascals. @throws ConcreteError where it is no number */
export function psiToMPa(psi: number): number {
  return converted('psi', psi * MPA_PER_PSI);
}

/** Megapascals to pounds per square inch. @throws ConcreteError where it is no number */
export function mpaToPsi(mpa: number): number {
  return converted('MPa', mpa / MPA_PER_PSI);
}

/** Feet to millimetres, exact. */
export const MM_PER_FOOT = 304.8;
