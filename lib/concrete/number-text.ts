import { ConcreteError } from '@/lib/concrete/concrete-error';

/** A number for people: at most `digits` decimals, no trailing zeros, never "-0". */
export function numberText(value: number, digits = 2): string {
  if (!Number.isFinite(value)) throw new ConcreteError('number', 'This is not a finite number.');
  if (!(digits >= 0 && digits <= 20))
    throw new ConcreteError('digits', 'Between 0 and 20 decimals are shown.');
  const text = value.toFixed(digits);
  const trimmed = text.includes('.') ? text.replace(/0+$/, '').replace(/\.$/, '') : text;
  return trimmed === '-0' ? '0' : trimmed;
}

/**
 * Two numbers side by side, with as many decimals as it takes to tell them apart: rounding never makes a failure look
 * like the limit. Numbers within 1e-6 of each other count as the same and are shown the same.
 */
export function apartText(value: number, limit: number, digits = 1): [string, string] {
  if (!Number.isFinite(digits)) throw new ConcreteError('digits', 'Between 0 and 20 decimals are shown.');
  for (let decimals = digits; decimals <= 7; decimals += 1) {
    const pair: [string, string] = [numberText(value, decimals), numberText(limit, decimals)];
    if (pair[0] !== pair[1] || Math.abs(value - limit) <= 1e-6) return pair;
  }
  return [String(value), String(limit)];
}
