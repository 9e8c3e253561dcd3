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

/** The number, or a typed error where it is absent, not finite, or not more than zero. */
export function requirePositive(field: string, value: number | undefined | null): number {
  if (value === undefined || value === null)
    throw new ConcreteError(field, 'This number is missing.', 'absent');
  if (!Number.isFinite(value)) throw new ConcreteError(field, 'This is not a finite number.');
  if (value <= 0) throw new ConcreteError(field, 'This has to be more than zero.');
  return value;
}
