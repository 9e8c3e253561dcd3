import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { chlorideAtSteel, yearsToCriticalChloride } from '@/lib/concrete/chloride-estimate';
import { instrumentSees } from '@/lib/concrete/bar-materials';
import { judgeEpoxyCoating, judgeFrpDamage, type CoatingSpot } from '@/lib/concrete/coatings';
import { evaporationRate } from '@/lib/concrete/evaporation';
import {
  carbonationTimeRatio,
  chlorideTimeRatio,
  coverInDiameters,
  effectiveDepthChange,
  fireCover,
  predictedCover,
} from '@/lib/concrete/low-cover-cost';
import {
  capability,
  normalQuantileOf,
  pairedChange,
  rankQuantileOf,
  shareBelow,
  successRun,
  summarise,
  toleranceFactor,
} from '@/lib/concrete/statistics';

describe('coating damage on the worst foot', () => {
  const bar = { diameterMm: 16, lengthMm: 6000 };
  const footSurface = Math.PI * 16 * 304.8;
  const judge = (spots: CoatingSpot[], bareCutEnds = 0) =>
    judgeEpoxyCoating(bar, { spots, bareCutEnds, flameCutEnds: 0 });
  const nick = (fromMm: number, percent: number, kind: CoatingSpot['kind'] = 'damaged'): CoatingSpot => ({
    kind,
    fromMm,
    lengthMm: 0,
    areaMm2: (percent / 100) * footSurface,
  });

  test('two nicks within a foot count together, further apart they do not', () => {
    expect(judge([nick(1000, 1.2), nick(1304.8, 1.2)]).damaged.percent).toBeCloseTo(2.4, 9);
    expect(judge([nick(1000, 1.2), nick(1304.9, 1.2)]).damaged.percent).toBeCloseTo(1.2, 9);
  });

  test('2 % is within the limit, more is more than repair; any damage holds', () => {
    expect(judge([]).outcome).toBe('sound');
    expect(judge([nick(100, 0.01)]).outcome).toBe('repair');
    expect(judge([nick(100, 2)]).outcome).toBe('repair');
    expect(judge([nick(100, 2.001)]).outcome).toBe('more-than-repair');
    expect(judge([nick(100, 5, 'patched')]).outcome).toBe('sound');
    expect(judge([nick(100, 5.001, 'patched')]).outcome).toBe('more-than-repair');
    expect(judge([], 1).outcome).toBe('repair');
  });

  test('the words never show a failure as the limit', () => {
    expect(judge([nick(100, 2.0001)]).reasons[0]).toContain('2.0001 %');
  });

  test('a long scrape is spread over its length, and a short bar has only its own surface', () => {
    const scrape: CoatingSpot = { kind: 'damaged', fromMm: 0, lengthMm: 609.6, areaMm2: 0.04 * footSurface };
    expect(judge([scrape]).damaged.percent).toBeCloseTo(2, 9);
    const short = judgeEpoxyCoating(
      { diameterMm: 16, lengthMm: 152.4 },
      { spots: [nick(0, 1.5)], bareCutEnds: 0, flameCutEnds: 0 },
    );
    expect(short.damaged.percent).toBeCloseTo(3, 9);
  });

  test('spots off the bar, or larger than it, are refused', () => {
    expect(() => judge([nick(6001, 1)])).toThrow(/beyond the end/);
    expect(() => judge([{ kind: 'damaged', fromMm: 0, lengthMm: 10, areaMm2: 600 }])).toThrow(
      /more than the surface/,
    );
  });

  test('the worst foot is never better than the mean of the bar, and no foot is worse than it', () => {
    const spot = fc.record({
      kind: fc.constant('damaged' as const),
      fromMm: fc.double({ min: 0, max: 5000, noNaN: true }),
      lengthMm: fc.oneof(fc.constant(0), fc.double({ min: 1, max: 900, noNaN: true })),
      areaMm2: fc.double({ min: 0.01, max: 40, noNaN: true }),
    });
    fc.assert(
      fc.property(
        fc.array(spot, { minLength: 1, maxLength: 8 }),
        fc.double({ min: 0, max: 5695, noNaN: true }),
        (spots, from) => {
          const { damaged } = judge(spots);
          const total = spots.reduce((sum, { areaMm2 }) => sum + areaMm2, 0);
          expect(damaged.percent).toBeGreaterThanOrEqual((100 * total) / (Math.PI * 16 * 6000) - 1e-9);
          const to = from + 304.8;
          const inside = spots.reduce((sum, { fromMm, lengthMm, areaMm2 }) => {
            if (lengthMm === 0) return sum + (fromMm >= from && fromMm <= to ? areaMm2 : 0);
            const overlap = Math.max(0, Math.min(fromMm + lengthMm, to) - Math.max(fromMm, from));
            return sum + (areaMm2 * overlap) / lengthMm;
          }, 0);
          expect(damaged.areaMm2).toBeGreaterThanOrEqual(inside - 1e-6);
        },
      ),
    );
  });

  test('FRP on its worst metre', () => {
    const metre = Math.PI * 16 * 1000;
    expect(judgeFrpDamage(bar, [{ fromMm: 10, lengthMm: 0, areaMm2: 0.02 * metre }]).verdict).toBe('met');
    expect(judgeFrpDamage(bar, [{ fromMm: 10, lengthMm: 0, areaMm2: 0.0201 * metre }]).verdict).toBe(
      'not-met',
    );
    expect(instrumentSees('magnetic', 'epoxy').sees).toBe(true);
    expect(instrumentSees('magnetic', 'stainless').sees).toBe(false);
  });
});

describe('what low cover costs', () => {
  test('each carries formula, inputs, trail and caution', () => {
    const all = [
      carbonationTimeRatio(30, 40),
      chlorideTimeRatio(30, 40, 0.3),
      effectiveDepthChange(150, 140),
      coverInDiameters(12, 16),
      fireCover(20, 25, 'cover'),
      predictedCover(30, 10),
    ];
    for (const estimate of all) {
      expect(estimate.formula).not.toBe('');
      expect(estimate.inputs.length).toBeGreaterThan(1);
      expect(estimate.trail.length).toBeGreaterThan(0);
      expect(estimate.caution).not.toBe('');
    }
  });

  test('numbers by hand', () => {
    expect(carbonationTimeRatio(30, 40).ratio).toBe(0.5625);
    expect(chlorideTimeRatio(30, 40, 0).ratio).toBe(0.5625);
    expect(chlorideTimeRatio(20, 40, 0.5).ratio).toBe(0.0625);
    expect(effectiveDepthChange(200, 180).bendingChangePercent).toBe(-10);
    expect(coverInDiameters(16, 16).enough).toBe(true);
    expect(coverInDiameters(15.9, 16).enough).toBe(false);
    expect(fireCover(20, 25, 'cover').shortByMm).toBe(5);
    expect(predictedCover(30, 10).caution).toContain('not a reading');
  });

  const inputs = {
    surfaceContent: 3,
    initialContent: 0.1,
    diffusionM2PerS: 1e-12,
    ageingExponent: 0.4,
    coverMm: 50,
  };

  test('years to the critical content give that content back', () => {
    const { years } = yearsToCriticalChloride(inputs, 0.6);
    expect(chlorideAtSteel(inputs, years ?? 1).content).toBeCloseTo(0.6, 9);
  });

  test('never reached is an answer; contradictions are refused', () => {
    expect(yearsToCriticalChloride(inputs, 3).years).toBeNull();
    expect(() => yearsToCriticalChloride(inputs, 0.1)).toThrow(/critical chloride/);
    expect(() => chlorideAtSteel({ ...inputs, initialContent: 3 }, 10)).toThrow(/initial chloride/);
    expect(() => chlorideAtSteel({ ...inputs, ageingExponent: 1 }, 10)).toThrow(/below 1/);
    expect(() => chlorideAtSteel({ ...inputs, diffusionM2PerS: 3 }, 10)).toThrow(/m²\/s/);
  });
});

describe('evaporation', () => {
  const day = { concreteC: 30, airC: 30, humidity: 0.5, windKmh: 20 };

  test('advice counts the stated uncertainty', () => {
    expect(evaporationRate(day, false)).toMatchObject({ advice: 'maybe' });
    expect(evaporationRate(day, true)).toMatchObject({ advice: 'over' });
    expect(evaporationRate({ ...day, humidity: 0.95, windKmh: 0 }, false)).toMatchObject({ advice: 'below' });
  });

  test('a percentage in the place of a share is refused, not guessed', () => {
    expect(() => evaporationRate({ ...day, humidity: 50 }, false)).toThrow(/50 % is 0.5/);
    expect(() => evaporationRate({ ...day, airC: 90 }, false)).toThrow(/air temperature/);
  });
});

describe('statistics', () => {
  const readings = [38, 41, 40, 43, 39, 42, 40, 44, 37, 41];

  test('summary by hand', () => {
    const { n, mean, deviation, least, greatest } = summarise(readings).value;
    expect([n, mean, least, greatest]).toEqual([10, 40.5, 37, 44]);
    expect(deviation).toBeCloseTo(Math.sqrt(42.5 / 9), 14);
    expect(summarise([40]).value.deviation).toBeNull();
  });

  test('few readings say so', () => {
    expect(summarise(readings).caution).toContain('Fewer than 20 readings');
    expect(summarise([...readings, ...readings]).caution).not.toContain('Fewer than 20');
    expect(toleranceFactor(19, 0.95, 0.95).caution).toContain('Fewer than 20');
    expect(toleranceFactor(20, 0.95, 0.95).caution).not.toContain('Fewer than 20');
  });

  test('quantiles, capability and success run', () => {
    expect(normalQuantileOf(readings, 0.5).value).toBeCloseTo(40.5, 12);
    expect(normalQuantileOf(readings, 0.05).value).toBeCloseTo(
      40.5 - 1.6448536269514722 * Math.sqrt(42.5 / 9),
      10,
    );
    expect(rankQuantileOf(readings, 0.5).value).toBe(40.5);
    // 10 readings: rank 0.55 of the 5 % quantile is before the first, so the least governs.
    expect(rankQuantileOf(readings, 0.05).value).toBe(37);
    expect(rankQuantileOf(readings, 0.1).value).toBeCloseTo(37.1, 12);
    expect(capability(readings, 35).value).toBeCloseTo(5.5 / (3 * Math.sqrt(42.5 / 9)), 12);
    expect(capability([40, 40, 40], 35).value).toBeNull();
    // An exact whole number is not pushed up: ln(0.25)/ln(0.5) = 2.
    expect(successRun(0.5, 0.75).value).toBe(2);
  });

  test('paired change with its t-interval', () => {
    // Changes −2, −1, −3, −2: mean −2, s = √(2/3), t(0.975; 3) = 3.182446.
    const pairs = [
      { before: 40, after: 38 },
      { before: 41, after: 40 },
      { before: 42, after: 39 },
      { before: 43, after: 41 },
    ];
    const { mean, low, high } = pairedChange(pairs, 0.95).value;
    const half = (3.182446305284263 * Math.sqrt(2 / 3)) / 2;
    expect(mean).toBe(-2);
    expect(low).toBeCloseTo(-2 - half, 10);
    expect(high).toBeCloseTo(-2 + half, 10);
  });

  test('the upper bound covers the share and falls with more readings', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 300 }), fc.integer({ min: 0, max: 300 }), (n, x) => {
        fc.pre(x <= n);
        const { share, upperBound } = shareBelow(x, n, 0.95).value;
        expect(upperBound).toBeGreaterThanOrEqual(share);
        expect(upperBound).toBeLessThanOrEqual(1);
        expect(shareBelow(2 * x, 2 * n, 0.95).value.upperBound).toBeLessThanOrEqual(upperBound + 1e-12);
      }),
    );
  });

  test('impossible counts are refused', () => {
    expect(() => shareBelow(6, 5, 0.95)).toThrow(/more than readings/);
    expect(() => toleranceFactor(1, 0.95, 0.95)).toThrow(/2 or more/);
    expect(() => summarise([])).toThrow(/empty/);
  });
});
