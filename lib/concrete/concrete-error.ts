/**
 * Input that cannot be computed with: a number that is impossible, or one that is absent and must not be guessed.
 * It names the field and says why in one plain sentence; a computation never answers with NaN or a silent default.
 */
export class ConcreteError extends Error {
  /** Name of the input field, as in the function's input type. */
  readonly field: string;
  /** One sentence for people. */
  readonly reason: string;
  /** `absent`: something has to be filled in first. `impossible`: what is there cannot be right. */
  readonly kind: 'absent' | 'impossible';

  constructor(field: string, reason: string, kind: 'absent' | 'impossible' = 'impossible') {
    super(`${field}: ${reason}`);
    this.name = 'ConcreteError';
    this.field = field;
    this.reason = reason;
    this.kind = kind;
  }
}

/**
 * The range of numbers that anything here is computed with. Beyond it there is no length, mass, stress or time of a
 * building, and within it no product of the formulas overflows.
 */
const LARGEST = 1e12;
const SMALLEST_POSITIVE = 1e-18;

/** Why a number cannot be computed with, in one sentence; null where it can. */
export function numberProblem(value: number): string | null {
  if (typeof value !== 'number' || !Number.isFinite(value)) return 'It has to be a number.';
  return Math.abs(value) > LARGEST ? 'It is larger than anything that is measured here.' : null;
}

/** Why a number cannot be computed with where it has to be more than zero; null where it can. */
export function positiveProblem(value: number): string | null {
  const problem = numberProblem(value);
  if (problem !== null) return problem;
  if (value <= 0) return 'It has to be more than zero.';
  return value < SMALLEST_POSITIVE ? 'It is smaller than anything that is measured here.' : null;
}

/** The number, or a typed error where it is absent, not finite, or not more than zero. */
export function requirePositive(field: string, value: number | undefined | null): number {
  if (value === undefined || value === null)
    throw new ConcreteError(field, 'This number is missing.', 'absent');
  const problem = positiveProblem(value);
  if (problem !== null) throw new ConcreteError(field, problem);
  return value;
}
