import { ConcreteError } from '@/lib/concrete/concrete-error';
import { atLeast, atMost, formatLength, LENGTH_SLACK_MM, type LengthUnit } from '@/lib/concrete/length';

/** The three verdicts. Not verified counts neither way. */
export type Verdict = 'met' | 'not-met' | 'not-verified';

/** What a measured value is shown in; shares and counts are no lengths. */
export type MeasureUnit = LengthUnit | '%' | 'count';

export interface Limits {
  /** Least accepted value, inclusive. */
  least?: number | null;
  /** Most accepted value, inclusive. */
  most?: number | null;
}

export interface JudgedMeasurement {
  verdict: Verdict;
  side: 'low' | 'high' | null;
  reason: string;
  /** Distance to the nearer limit, in the value's own unit (mm for lengths); negative where it is not met. */
  margin: number | null;
}

/** A value in words, told apart from what it stands `beside`. */
export function measureText(value: number, unit: MeasureUnit, beside?: number): string {
  if (unit === 'mm' || unit === 'in') return `${formatLength(value, unit, beside)} ${unit}`;
  const digits = formatLength(value, 'mm', beside);
  return unit === '%' ? `${digits} %` : digits;
}

/**
 * Judges a measured value by its limits: unrounded, inclusive, with the slack of lengths, no snapping. Lengths are in
 * mm whatever `unit` they are shown in. Null (no unit, not measured) and no limit at all are not verified. Limits that
 * contradict each other, or are not finite, are a `ConcreteError`.
 */
export function judgeLimits(value: number | null, limits: Limits, unit: MeasureUnit): JudgedMeasurement {
  const least = limits.least ?? null;
  const most = limits.most ?? null;
  for (const [field, limit] of [
    ['least', least],
    ['most', most],
  ] as const) {
    if (limit !== null && !Number.isFinite(limit))
      throw new ConcreteError(field, 'This is not a finite number.');
  }
  if (least !== null && most !== null && !atLeast(most, least)) {
    throw new ConcreteError('most', 'The most accepted is less than the least accepted.');
  }
  const open = (reason: string): JudgedMeasurement => ({
    verdict: 'not-verified',
    side: null,
    reason,
    margin: null,
  });
  if (value === null) return open('The unit of this value is missing. Its measurer has to state it.');
  if (!Number.isFinite(value)) return open('This value is not a finite number.');
  if (least === null && most === null) return open('The plan sets no limit for this.');
  const margin = Math.min(least === null ? Infinity : value - least, most === null ? Infinity : most - value);
  if (least !== null && !atLeast(value, least)) {
    const short = measureText(least - value, unit, 0);
    const reason = `${measureText(value, unit, least)} is ${short} less than the least accepted ${measureText(least, unit, value)}.`;
    return { verdict: 'not-met', side: 'low', reason, margin };
  }
  if (most !== null && !atMost(value, most)) {
    const over = measureText(value - most, unit, 0);
    const reason = `${measureText(value, unit, most)} is ${over} more than the most accepted ${measureText(most, unit, value)}.`;
    return { verdict: 'not-met', side: 'high', reason, margin };
  }
  return { verdict: 'met', side: null, reason: metReason(value, least, most, unit), margin };
}

/** One sentence for a value inside its limits, which says so where it lies exactly on one. */
export function metReason(
  value: number,
  least: number | null,
  most: number | null,
  unit: MeasureUnit,
): string {
  for (const [limit, name] of [
    [least, 'least'],
    [most, 'most'],
  ] as const) {
    if (limit !== null && Math.abs(value - limit) <= LENGTH_SLACK_MM) {
      return `${measureText(value, unit, limit)} is exactly the ${name} accepted, which is met.`;
    }
  }
  if (least !== null && most !== null) {
    return `${measureText(value, unit, least)} lies between ${measureText(least, unit, value)} and ${measureText(most, unit, value)}.`;
  }
  if (least !== null) {
    return `${measureText(value, unit, least)} is more than the least accepted ${measureText(least, unit, value)}.`;
  }
  const upper = most ?? value;
  return `${measureText(value, unit, upper)} is less than the most accepted ${measureText(upper, unit, value)}.`;
}
