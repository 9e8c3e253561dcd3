import { describe, expect } from 'vitest';
import { z } from 'zod';
import {
  EVAPORATION_UNCERTAINTY_PERCENT,
  evaporationRate,
  evaporationRateUs,
} from '@/lib/concrete/evaporation';
import { numberAt, textAt, Topic } from './load-records';

const topic = new Topic('11-evaporation');

const mild = { concreteC: 25, airC: 25, humidity: 0.6, windKmh: 10 };
const mildUs = { concreteF: 77, airF: 77, humidity: 0.6, windMph: 6 };

describe('Uno 1998', () => {
  topic.check('uno.form', (values) => {
    expect(textAt(values, 'expr')).toBe('E = 5*((Tc+18)^2.5 - r*(Ta+18)^2.5)*(V+4)*1e-6');
    const { rate } = evaporationRate(mild, false);
    expect(rate).toBeCloseTo(5 * (43 ** 2.5 - 0.6 * 43 ** 2.5) * 14 * 1e-6, 14);
  });

  topic.check('uno.us', (values, { provenance }) => {
    expect(textAt(values, 'expr')).toBe('E = (Tc^2.5 - r*Ta^2.5)*(1 + 0.4*V)*1e-6');
    const { rate, trail } = evaporationRateUs(mildUs, false);
    expect(rate).toBeCloseTo((77 ** 2.5 - 0.6 * 77 ** 2.5) * (1 + 2.4) * 1e-6, 14);
    expect(trail[0]?.provenance).toBe(provenance);
  });

  topic.checkAll('uno.check.si', (values) => {
    const input = (key: string) => numberAt(values, 'inputs', key);
    const weather = { concreteC: input('Tc'), airC: input('Ta'), humidity: input('r'), windKmh: input('V') };
    expect(evaporationRate(weather, false).rate).toBeCloseTo(numberAt(values, 'expected', 'E'), 4);
  });

  const checkUs = (values: Record<string, unknown>, tolerance: unknown) => {
    const input = (key: string) => numberAt(values, 'inputs', key);
    const weather = {
      concreteF: input('Tc_F'),
      airF: input('Ta_F'),
      humidity: input('RH'),
      windMph: input('V_mph'),
    };
    const { rate } = evaporationRateUs(weather, false);
    expect(rate).toBeCloseTo(numberAt(values, 'expected', 'formula'), 4);
    const chart = numberAt(values, 'expected', 'E_lb_ft2_h');
    expect(Math.abs(rate - chart)).toBeLessThanOrEqual(z.number().parse(tolerance));
  };
  topic.checkAll('uno.check.pca', (values, { tolerance }) => checkUs(values, tolerance));
  topic.check('uno.check.305', (values, { tolerance }) => checkUs(values, tolerance));
});

describe('what the rate is compared with', () => {
  topic.check('uno.thresh', (values) => {
    const plain = evaporationRate(mild, false);
    const fume = evaporationRate(mild, true);
    expect(plain.threshold).toBe(numberAt(values, 'kg_m2_h'));
    expect(fume.threshold / plain.threshold).toBe(numberAt(values, 'silica_fume_fraction'));
    const us = evaporationRateUs(mildUs, false);
    expect(us.threshold).toBe(numberAt(values, 'lb_ft2_h'));
    expect(evaporationRateUs(mildUs, true).threshold / us.threshold).toBe(
      numberAt(values, 'silica_fume_fraction'),
    );
  });

  topic.check('uno.wind', (values) => {
    const step = evaporationRate(mild, false).trail.find((entry) => entry.rule.startsWith('Wind'));
    expect(step?.value).toBe(`${numberAt(values, 'm')} m`);
  });

  topic.check('uno.uncert', (values) => {
    const percent = numberAt(values, 'percent');
    expect(EVAPORATION_UNCERTAINTY_PERCENT).toBe(percent);
    const { rate, range, caution } = evaporationRate(mild, false);
    expect(range.low / rate).toBeCloseTo(1 - percent / 100, 12);
    expect(range.high / rate).toBeCloseTo(1 + percent / 100, 12);
    expect(caution).toContain(`${percent} %`);
  });
});
