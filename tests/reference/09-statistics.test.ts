import normalQuantile from '@stdlib/stats-base-dists-normal-quantile';
import tQuantile from '@stdlib/stats-base-dists-t-quantile';
import { describe, expect, test } from 'vitest';
import { z } from 'zod';
import {
  lowerToleranceBound,
  shareBelow,
  shareLowerBound,
  successRun,
  summarise,
  toleranceFactor,
} from '@/lib/concrete/statistics';
import { agreeingDigits, numberAt, Topic, type ReferenceRecord } from './load-records';

const topic = new Topic('09-statistics');

describe('one-sided normal tolerance factor k', () => {
  const checkFactor = (values: Record<string, unknown>, { tolerance }: ReferenceRecord) => {
    const [n, p, gamma] = ['n', 'p', 'gamma'].map((key) => numberAt(values, 'inputs', key));
    const k = toleranceFactor(n ?? 0, p ?? 0, gamma ?? 0).value;
    expect(Math.abs(k - numberAt(values, 'expected', 'k1'))).toBeLessThanOrEqual(z.number().parse(tolerance));
    // The record's own exact value has four decimals.
    expect(Math.abs(k - numberAt(values, 'exact'))).toBeLessThanOrEqual(0.5e-4 + 1e-9);
  };
  for (const n of [5, 10, 20, 30, 50]) topic.checkAll(`k1.n${n}.`, checkFactor);

  topic.check('k1.nist', (values) => {
    const input = (key: string) => numberAt(values, 'inputs', key);
    const k = toleranceFactor(input('n'), input('p'), input('gamma')).value;
    expect(k).toBeCloseTo(numberAt(values, 'expected', 'k1_exact'), 3);
    // The handbook's approximation after Natrella is off in the third decimal; the exact factor is what is used.
    expect(Math.abs(k - numberAt(values, 'expected', 'k1_natrella'))).toBeLessThan(0.002);
    // Limits are printed with the approximate factor: mean ± k s.
    expect(input('mean') + k * input('sd')).toBeCloseTo(numberAt(values, 'expected', 'upper'), 3);
    expect(input('mean') - k * input('sd')).toBeCloseTo(numberAt(values, 'expected', 'lower'), 3);
  });

  test('the lower bound is mean − k s', () => {
    const readings = [38, 41, 40, 43, 39, 42, 40, 44, 37, 41];
    const { mean, deviation } = summarise(readings).value;
    const { bound, k } = lowerToleranceBound(readings, 0.95, 0.95).value;
    expect(k).toBeCloseTo(2.911, 3);
    expect(bound).toBeCloseTo(mean - k * (deviation ?? 0), 12);
  });
});

describe('success run', () => {
  topic.checkAll('srun.', (values) => {
    const reliability = numberAt(values, 'inputs', 'reliability');
    const run = successRun(1 - reliability, numberAt(values, 'inputs', 'confidence'));
    expect(run.value).toBe(numberAt(values, 'expected', 'n'));
  });
});

describe('Clopper-Pearson', () => {
  topic.checkAll('cp.', (values, { id }) => {
    const [x, n, confidence] = ['x', 'n', 'conf'].map((key) => numberAt(values, 'inputs', key));
    // A two-sided interval of confidence C has one-sided bounds of (1 + C)/2.
    const oneSided = (1 + (confidence ?? 0)) / 2;
    const upper = shareBelow(x ?? 0, n ?? 0, oneSided).value.upperBound;
    const lower = shareLowerBound(x ?? 0, n ?? 0, oneSided).value;
    // R prints seven digits; SciPy's own root search stops within 2e-12.
    const slack = id === 'cp.r' ? 0.5e-7 : 2e-12;
    expect(Math.abs(upper - numberAt(values, 'expected', 'upper'))).toBeLessThanOrEqual(slack);
    expect(Math.abs(lower - numberAt(values, 'expected', 'lower'))).toBeLessThanOrEqual(slack);
  });

  test('none of n below: the bound is 1 − (1 − γ)^(1/n), in closed form', () => {
    for (const n of [1, 5, 22, 59, 200]) {
      for (const confidence of [0.9, 0.95, 0.99]) {
        const closed = 1 - (1 - confidence) ** (1 / n);
        expect(agreeingDigits(shareBelow(0, n, confidence).value.upperBound, closed)).toBeGreaterThan(13);
      }
    }
  });
});

describe('NIST StRD, univariate summary statistics', () => {
  const data = z.union([
    z.array(z.number()),
    z
      .object({ first: z.number(), then_repeat: z.array(z.number()), times: z.number() })
      .transform((pattern) => [
        pattern.first,
        ...Array.from({ length: pattern.times }, () => pattern.then_repeat).flat(),
      ]),
  ]);
  /**
   * Least log relative errors (digits that agree) of mean and deviation. The data of NumAcc2 and NumAcc3 are decimals that
   * binary doubles hold to 15 digits only, so the certified deviation cannot be reached from them; all others can.
   */
  const least: Record<string, [number, number]> = {
    'strd.lew': [15, 14.5],
    'strd.mavro': [15, 13],
    'strd.pidigits': [15, 14.5],
    'strd.numacc1': [15, 15],
    'strd.numacc2': [15, 14],
    'strd.numacc3': [15, 9],
  };
  topic.checkAll('strd.', (values, { id }) => {
    const readings = data.parse(z.object({ data: z.unknown() }).parse(values.inputs).data);
    expect(readings).toHaveLength(numberAt(values, 'inputs', 'n'));
    const { mean, deviation } = summarise(readings).value;
    const digits = [
      agreeingDigits(mean, numberAt(values, 'expected', 'mean')),
      agreeingDigits(deviation ?? 0, numberAt(values, 'expected', 'sd')),
    ];
    console.log(
      `${id}: mean to ${digits[0]?.toFixed(1)} digits, deviation to ${digits[1]?.toFixed(1)} digits`,
    );
    const [leastMean, leastDeviation] = least[id] ?? [15, 15];
    expect(digits[0]).toBeGreaterThanOrEqual(leastMean);
    expect(digits[1]).toBeGreaterThanOrEqual(leastDeviation);
  });
});

describe('quantiles of the package against closed forms', () => {
  test('t with one degree of freedom is tan(π(p − 1/2)), with two (2p − 1)√(2/(4p(1 − p)))', () => {
    for (const p of [0.6, 0.9, 0.95, 0.975, 0.995, 0.9995]) {
      expect(agreeingDigits(tQuantile(p, 1), Math.tan(Math.PI * (p - 0.5)))).toBeGreaterThan(12);
      expect(agreeingDigits(tQuantile(p, 2), (2 * p - 1) * Math.sqrt(2 / (4 * p * (1 - p))))).toBeGreaterThan(
        12,
      );
    }
  });

  test('normal at 97.5 % is 1.959963984540054 (Abramowitz & Stegun, Table 26.5, more digits in print elsewhere)', () => {
    expect(normalQuantile(0.975, 0, 1)).toBeCloseTo(1.959963984540054, 14);
  });
});
