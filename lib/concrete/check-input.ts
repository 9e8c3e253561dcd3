import { ConcreteError, numberProblem, positiveProblem } from '@/lib/concrete/concrete-error';

/**
 * Checks on typed numbers. Each returns what it was given, or throws a `ConcreteError` that names the field and the
 * reason, so that no computation ever answers with NaN or takes a silent default.
 */

/** What was entered, or the refusal that says it is missing. */
export function given<T>(field: string, value: T | undefined | null): T {
  if (value === undefined || value === null) throw new ConcreteError(field, 'It is missing.', 'absent');
  return value;
}

/** A finite number. */
export function finite(field: string, value: number): number {
  const problem = numberProblem(value);
  if (problem !== null) throw new ConcreteError(field, problem);
  return value;
}

/** A finite number above zero. */
export function positive(field: string, value: number): number {
  const problem = positiveProblem(value);
  if (problem !== null) throw new ConcreteError(field, problem);
  return value;
}

/** A finite number, zero or more. */
export function notNegative(field: string, value: number): number {
  if (finite(field, value) < 0) throw new ConcreteError(field, 'It may not be below zero.');
  return value;
}

/** A whole number, `least` or more. */
export function whole(field: string, value: number, least: number): number {
  if (!Number.isInteger(finite(field, value))) throw new ConcreteError(field, 'It has to be a whole number.');
  if (value < least) throw new ConcreteError(field, `It has to be ${least} or more.`);
  return value;
}

/** A number between 0 and 1, both excluded: a share or a confidence. */
export function openShare(field: string, value: number): number {
  if (finite(field, value) <= 0 || value >= 1) {
    throw new ConcreteError(field, 'It has to lie between 0 and 1, both excluded.');
  }
  return value;
}

/** A number between `least` and `most`, both included. */
export function between(field: string, value: number, least: number, most: number): number {
  if (finite(field, value) < least || value > most) {
    throw new ConcreteError(field, `It has to lie from ${least} to ${most}.`);
  }
  return value;
}

/** A list that holds at least `least` entries, none of them a hole. */
export function listOf<T>(field: string, list: readonly T[], least: number): readonly T[] {
  if (list.length < least) {
    const reason = least === 1 ? 'It is empty.' : `It needs at least ${least} entries.`;
    throw new ConcreteError(field, reason, 'absent');
  }
  return list;
}

/** The refusal for a choice that no code path knows, for `default` branches that data from outside can reach. */
export function unknownChoice(field: string, value: unknown): ConcreteError {
  return new ConcreteError(field, `"${String(value)}" is not one of the choices.`);
}
