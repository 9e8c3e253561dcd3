import normalQuantile from '@stdlib/stats-base-dists-normal-quantile';
import tQuantile from '@stdlib/stats-base-dists-t-quantile';
import { describe, expect, test } from 'vitest';
import { z } from 'zod';
import { noncentralTCdf, noncentralTQuantile } from '@/lib/concrete/noncentral-t';
import { numberAt, Topic } from './load-records';

const topic = new Topic('09-noncentral-t');

describe('noncentral t', () => {
  topic.checkAll('nct.', (values, { tolerance }) => {
    const [t, degrees, delta] = ['t', 'degrees', 'delta'].map((key) => numberAt(values, 'inputs', key));
    const found = noncentralTCdf(t ?? 0, degrees ?? 0, delta ?? 0);
    expect(Math.abs(found - numberAt(values, 'expected', 'cdf'))).toBeLessThanOrEqual(
      z.number().parse(tolerance),
    );
  });

  test('with noncentrality 0 it is the t distribution', () => {
    for (const degrees of [1, 2, 4, 19, 199]) {
      for (const p of [0.1, 0.5, 0.9, 0.99]) {
        expect(noncentralTCdf(tQuantile(p, degrees), degrees, 0)).toBeCloseTo(p, 13);
      }
    }
  });

  test('the quantile gives its probability back, from 2 to 10 000 readings', () => {
    for (const n of [2, 5, 43, 500, 10_000]) {
      for (const p of [0.9, 0.99]) {
        for (const gamma of [0.5, 0.95, 0.99]) {
          const delta = normalQuantile(p, 0, 1) * Math.sqrt(n);
          expect(noncentralTCdf(noncentralTQuantile(gamma, n - 1, delta), n - 1, delta)).toBeCloseTo(
            gamma,
            11,
          );
        }
      }
    }
  });
});
