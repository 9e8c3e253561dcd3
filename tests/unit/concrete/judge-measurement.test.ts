import { describe, expect, test } from 'vitest';
import { judgeLimits, type Limits, type MeasureUnit } from '@/lib/concrete/judge-measurement';

describe('a measured value against its limits', () => {
  test.each<[number, Limits, MeasureUnit, string, string]>([
    [100, { least: 100 }, 'mm', 'met', '100 mm is exactly the least accepted, which is met.'],
    [
      99.9999,
      { least: 100 },
      'mm',
      'not-met',
      '99.9999 mm is 0.0001 mm less than the least accepted 100 mm.',
    ],
    [304.8, { most: 254 }, 'in', 'not-met', '12 in is 2 in more than the most accepted 10 in.'],
    [120, { least: 100, most: 150 }, 'mm', 'met', '120 mm lies between 100 mm and 150 mm.'],
    [48, { least: 50 }, '%', 'not-met', '48 % is 2 % less than the least accepted 50 %.'],
    [11, { least: 12 }, 'count', 'not-met', '11 is 1 less than the least accepted 12.'],
    [90, { most: 100 }, 'mm', 'met', '90 mm is less than the most accepted 100 mm.'],
  ])('%f', (value, limits, unit, verdict, reason) => {
    expect(judgeLimits(value, limits, unit)).toMatchObject({ verdict, reason });
  });

  test('is not verified without a unit, without a number, without a limit', () => {
    expect(judgeLimits(null, { least: 1 }, 'mm').verdict).toBe('not-verified');
    expect(judgeLimits(Number.POSITIVE_INFINITY, { least: 1 }, 'mm').verdict).toBe('not-verified');
    expect(judgeLimits(5, {}, 'mm').verdict).toBe('not-verified');
    expect(judgeLimits(5, { least: null, most: null }, 'mm').verdict).toBe('not-verified');
  });

  test('refuses limits that contradict each other, naming the field', () => {
    expect(() => judgeLimits(5, { least: 3, most: 2 }, 'mm')).toThrow(
      expect.objectContaining({ field: 'most' }),
    );
    expect(() => judgeLimits(5, { least: Number.NaN }, 'mm')).toThrow(
      expect.objectContaining({ field: 'least' }),
    );
  });
});
