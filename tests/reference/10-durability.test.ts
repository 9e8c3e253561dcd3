import { describe, expect } from 'vitest';
import { z } from 'zod';
import {
  chlorideAtSteel,
  yearsToCriticalChloride,
  type ChlorideInputs,
} from '@/lib/concrete/chloride-estimate';
import {
  ageingExponents,
  carbonationTimeRatio,
  carbonationYears,
  chlorideTimeRatio,
} from '@/lib/concrete/low-cover-cost';
import { numberAt, textAt, Topic } from './load-records';

const topic = new Topic('10-durability');
const YEAR_SECONDS = 365.25 * 86_400;

/** The Maclaurin series of the error function (Abramowitz & Stegun 7.1.5), apart from the package that the program uses. */
function erf(z: number): number {
  let term = z;
  let sum = z;
  for (let n = 1; n < 60; n += 1) {
    term *= (-z * z) / n;
    sum += term / (2 * n + 1);
  }
  return (2 / Math.sqrt(Math.PI)) * sum;
}

/** Concrete whose D t is 1 m² at t years, so that the content at the steel is erfc(x/2). */
const concrete = (over: Partial<ChlorideInputs>): ChlorideInputs => ({
  surfaceContent: 1,
  initialContent: 0,
  diffusionM2PerS: 1e-12,
  ageingExponent: 0,
  coverMm: 50,
  ...over,
});

describe('error function', () => {
  topic.checkAll('erf.', (values) => {
    const z0 = numberAt(values, 'inputs', 'z');
    const published = numberAt(values, 'expected', 'erf');
    // Through the program's own formula: x chosen so that x/(2√(D t)) is z.
    const years = 50;
    const coverMm = 1000 * z0 * 2 * Math.sqrt(1e-12 * YEAR_SECONDS * years);
    const { content } = chlorideAtSteel(concrete({ coverMm }), years);
    expect(1 - content).toBeCloseTo(published, 9);
    // And backwards.
    const back = yearsToCriticalChloride(concrete({ coverMm }), 1 - published).years;
    expect((back ?? 0) / years).toBeCloseTo(1, 7);
  });
});

describe('chloride', () => {
  topic.check('fick.form', (values) => {
    expect(textAt(values, 'expr')).toBe('C(x,t) = Cs*(1 - erf(x/(2*sqrt(D*t))))');
    const { content } = chlorideAtSteel(concrete({ surfaceContent: 0.6 }), 30);
    expect(content).toBeCloseTo(0.6 * (1 - erf(0.05 / (2 * Math.sqrt(1e-12 * YEAR_SECONDS * 30)))), 14);
  });

  topic.checkAll('fick.check.1', checkContent);
  topic.checkAll('fick.check.3', checkContent);

  function checkContent(values: Record<string, unknown>): void {
    const input = (key: string) => numberAt(values, 'inputs', key);
    expect(input('year_days')).toBe(365.25);
    const { content } = chlorideAtSteel(
      concrete({
        surfaceContent: input('Cs'),
        diffusionM2PerS: input('D_m2_s'),
        coverMm: 1000 * input('cover_m'),
      }),
      input('t_years'),
    );
    expect(content).toBeCloseTo(numberAt(values, 'expected', 'C'), 5);
  }

  topic.check('fick.check.callister', (values) => {
    const input = (key: string) => numberAt(values, 'inputs', key);
    const { years } = yearsToCriticalChloride(
      {
        surfaceContent: input('Cs'),
        initialContent: input('C0'),
        diffusionM2PerS: input('D'),
        ageingExponent: 0,
        coverMm: 1000 * input('x_m'),
      },
      input('C'),
    );
    const seconds = (years ?? 0) * YEAR_SECONDS;
    // The textbook reads z from a table (0.392), so its seconds are good to half a per cent.
    expect(Math.abs(seconds / numberAt(values, 'expected', 't_s') - 1)).toBeLessThan(0.005);
  });

  topic.check('fib.form', (values) => {
    expect(numberAt(values, 't0_year')).toBeCloseTo(28 / 365.25, 4);
    const rows = [
      ['fib-cem-i', 'CEM_I'],
      ['fib-fly-ash', 'fly_ash'],
      ['fib-cem-iii', 'CEM_III'],
    ] as const;
    for (const [id, key] of rows) {
      const row = ageingExponents.find((entry) => entry.id === id);
      expect(row?.m).toBe(numberAt(values, 'a_ageing', key, 'mean'));
      expect(row?.sd).toBe(numberAt(values, 'a_ageing', key, 'sd'));
      expect(row?.step.provenance).toBe('memory');
    }
    // D(t) = D28 (t28/t)^m: at 28 days nothing changes, later the content is lower than with a constant D.
    const at = (years: number, m: number) =>
      chlorideAtSteel(concrete({ ageingExponent: m, coverMm: 5 }), years).content;
    expect(at(28 / 365.25, 0.3)).toBeCloseTo(at(28 / 365.25, 0), 12);
    expect(at(20, 0.3)).toBeLessThan(at(20, 0));
    // The ratio of times to the critical content is the one the reading is told: (c/c₀)^(2/(1−m)).
    const years = (coverMm: number) =>
      z.number().parse(yearsToCriticalChloride(concrete({ coverMm, ageingExponent: 0.3 }), 0.4).years);
    expect(chlorideTimeRatio(30, 50, 0.3).ratio).toBeCloseTo(years(30) / years(50), 10);
  });

  topic.check('dura.n', (values) => {
    const rows = [
      ['dura-submerged', 'submerged'],
      ['dura-tidal-splash', 'tidal_splash'],
      ['dura-atmospheric', 'atmospheric'],
    ] as const;
    for (const [id, key] of rows) {
      const row = ageingExponents.find((entry) => entry.id === id);
      expect([row?.m, row?.sd]).toEqual([numberAt(values, key, 'mean'), numberAt(values, key, 'sd')]);
    }
  });
});

describe('carbonation', () => {
  topic.check('carb.form', (values) => {
    expect(textAt(values, 'expr')).toBe('x = k t^n, n usually 0.5');
    expect(carbonationTimeRatio(20, 40).ratio).toBe(0.25);
    expect(carbonationTimeRatio(40, 40).ratio).toBe(1);
  });

  topic.check('carb.check.avg', (values) => {
    const found = carbonationYears({
      depthMm: numberAt(values, 'inputs', 'carbonation_mm'),
      ageYears: numberAt(values, 'inputs', 'age_years'),
      coverMm: numberAt(values, 'inputs', 'cover_mm'),
    });
    expect(found.kMmPerRootYear).toBeCloseTo(numberAt(values, 'expected', 'k'), 2);
    expect(Math.round(found.years)).toBe(numberAt(values, 'expected', 't_years'));
  });
});
