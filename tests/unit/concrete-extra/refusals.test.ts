import { describe, expect, test } from 'vitest';
import {
  enAnchorageLength,
  enBasicAnchorage,
  enBondCondition,
  enBondStrength,
} from '@/lib/concrete/anchorage-en';
import { barListMasses } from '@/lib/concrete/bar-list-masses';
import {
  barsAcrossBay,
  greatestSpacing,
  judgeBarCount,
  judgeClearDistances,
  judgeSpacing,
  leastClearDistance,
  spacingOverGaps,
} from '@/lib/concrete/bar-spacing';
import { barsInWidth } from '@/lib/concrete/bars-in-width';
import {
  hookExtension,
  judgeBend,
  leastBendDiameter,
  leastBetweenBends,
  leastScheduledRadius,
} from '@/lib/concrete/bends';
import { chlorideAtSteel, yearsToCriticalChloride } from '@/lib/concrete/chloride-estimate';
import { judgeEpoxyCoating, judgeFrpDamage } from '@/lib/concrete/coatings';
import { ConcreteError } from '@/lib/concrete/concrete-error';
import {
  aciDevelopmentCompression,
  aciDevelopmentGeneral,
  aciDevelopmentSimple,
  type AciBar,
} from '@/lib/concrete/development';
import { evaporationRate, evaporationRateUs } from '@/lib/concrete/evaporation';
import {
  enLapArrangement,
  judgeLap,
  judgeShareLapped,
  judgeStagger,
  shareLapped,
} from '@/lib/concrete/lap-layout';
import {
  aciCompressionLap,
  aciLapClass,
  enAlpha6Factor,
  enLapLength,
  lapTolerance,
  nonContactLapMost,
  typedLap,
} from '@/lib/concrete/laps';
import {
  carbonationTimeRatio,
  carbonationYears,
  chlorideTimeRatio,
  coverInDiameters,
  effectiveDepthChange,
  fireCover,
  predictedCover,
} from '@/lib/concrete/low-cover-cost';
import { fibreDosage, judgeFibreTicket } from '@/lib/concrete/fibres';
import { noncentralTCdf, noncentralTQuantile } from '@/lib/concrete/noncentral-t';
import {
  capability,
  lowerToleranceBound,
  normalQuantileOf,
  pairedChange,
  rankQuantileOf,
  shareBelow,
  shareLowerBound,
  successRun,
  summarise,
  toleranceFactor,
} from '@/lib/concrete/statistics';
import {
  judgeSupportSpacing,
  supportHeight,
  supportHeightLimits,
  supportSpacingLimit,
} from '@/lib/concrete/supports';
import { judgeTendonHeight, tendonBand, tendonHeightBetween, tendonHeightTo } from '@/lib/concrete/tendons';
import { intersectionsPerSquareMetre, judgeTies, requiredTies } from '@/lib/concrete/ties';

const aci: AciBar = {
  diameterMm: 25.4,
  fyMPa: 420,
  fcMPa: 28,
  lightweight: false,
  coating: 'uncoated',
  topBar: false,
  clearCoverMm: 50,
  clearSpacingMm: 150,
};
const en = { strengthClass: 'C30/37', diameterMm: 16, condition: 'good', gammaC: 1.5, alphaCt: 1 } as const;
const chloride = {
  surfaceContent: 3,
  initialContent: 0.1,
  diffusionM2PerS: 1e-12,
  ageingExponent: 0.3,
  coverMm: 50,
};

/** One good call of each function that computes from numbers: what it takes as one object, and the call. */
const calls: Record<string, { input: object; run: (input: never) => unknown }> = {
  supportHeight: {
    input: {
      thicknessMm: 200,
      topCoverMm: 40,
      carried: [{ name: 'T1', diameterMm: 16 }],
      standsOn: [{ name: 'B1', sizeMm: 40 }],
    },
    run: supportHeight,
  },
  supportHeightLimits: {
    input: { height: 80, coverMinusMm: 5, depthMinusMm: 5 },
    run: (i: { height: number; coverMinusMm: number; depthMinusMm: number }) =>
      supportHeightLimits(i.height, i),
  },
  supportSpacingLimit: {
    input: { rule: 'plan', diameterMm: 12, planLimitMm: 800 },
    run: supportSpacingLimit,
  },
  judgeSupportSpacing: {
    input: { spacings: [900, 950], most: 1000 },
    run: (i: { spacings: number[]; most: number }) => judgeSupportSpacing(i.spacings, i.most),
  },
  intersectionsPerSquareMetre: {
    input: { x: 150, y: 200 },
    run: (i: { x: number; y: number }) => intersectionsPerSquareMetre(i.x, i.y),
  },
  requiredTies: {
    input: { pattern: { kind: 'by-spacing' }, intersections: 49, spacingXMm: 150, spacingYMm: 150 },
    run: requiredTies,
  },
  judgeTies: { input: { tied: 20, intersections: 40, required: 20 }, run: judgeTies },
  leastClearDistance: {
    input: { basis: 'en-1992-1-1', place: 'layer', diameterMm: 16, aggregateMm: 20, k1: 1, k2Mm: 5 },
    run: leastClearDistance,
  },
  judgeClearDistances: {
    input: { gaps: [30, 40], least: 25 },
    run: (i: { gaps: number[]; least: number }) => judgeClearDistances(i.gaps, i.least),
  },
  barsInWidth: {
    input: { widthMm: 300, sideCoverMm: 40, tieDiameterMm: 8, diameterMm: 20, leastClearMm: 25, bars: 4 },
    run: barsInWidth,
  },
  barsAcrossBay: { input: { widthMm: 4000, firstBarFromEdgeMm: 50, spacingMm: 150 }, run: barsAcrossBay },
  judgeBarCount: {
    input: { counted: 27, specified: 27 },
    run: (i: { counted: number; specified: number }) => judgeBarCount(i.counted, i.specified),
  },
  spacingOverGaps: { input: { overallMm: 1500, gaps: 10 }, run: spacingOverGaps },
  judgeSpacing: {
    input: { spacingMm: 150, specifiedMm: 150, minusMm: 10, plusMm: 10, codeMostMm: 450 },
    run: judgeSpacing,
  },
  greatestSpacing: {
    input: { basis: 'en-1992-1-1', use: 'slab-principal', thicknessMm: 200 },
    run: greatestSpacing,
  },
  aciDevelopmentSimple: { input: aci, run: (i: AciBar) => aciDevelopmentSimple(i, 'confined') },
  aciDevelopmentGeneral: {
    input: { ...aci, cbMm: 40, transverse: { areaMm2: 200, spacingMm: 200, bars: 2 } },
    run: (i: AciBar & Parameters<typeof aciDevelopmentGeneral>[1]) => aciDevelopmentGeneral(i, i),
  },
  aciDevelopmentCompression: {
    input: { diameterMm: 25.4, fyMPa: 420, fcMPa: 28, lightweight: false, confined: false },
    run: aciDevelopmentCompression,
  },
  enBondStrength: { input: en, run: enBondStrength },
  enBasicAnchorage: { input: { ...en, sigmaSdMPa: 435 }, run: enBasicAnchorage },
  enAnchorageLength: {
    input: { ...en, sigmaSdMPa: 435, inCompression: false, alpha1: 1, alpha2: 0.9, alpha5: 0.9 },
    run: enAnchorageLength,
  },
  enBondCondition: {
    input: { depthMm: 500, aboveUndersideMm: 40, inclinationDegrees: 0 },
    run: enBondCondition,
  },
  enLapLength: { input: { ...en, sigmaSdMPa: 435, sharePercent: 50, alpha1: 1 }, run: enLapLength },
  enAlpha6Factor: { input: { share: 30 }, run: (i: { share: number }) => enAlpha6Factor(i.share) },
  aciLapClass: {
    input: { provided: 2, share: 0.5 },
    run: (i: { provided: number; share: number }) => aciLapClass(i.provided, i.share),
  },
  aciCompressionLap: {
    input: {
      diameterMm: 25.4,
      fyMPa: 690,
      fcMPa: 28,
      tensionLapMm: 1500,
      largerBar: { diameterMm: 43, compressionDevelopmentMm: 900 },
    },
    run: aciCompressionLap,
  },
  nonContactLapMost: { input: { lap: 900 }, run: (i: { lap: number }) => nonContactLapMost(i.lap) },
  typedLap: { input: { lap: 900 }, run: (i: { lap: number }) => typedLap(i.lap) },
  lapTolerance: {
    input: { minusMm: 25, diameterMm: 20, requiredMm: 900 },
    run: (i: { minusMm: number; diameterMm: number; requiredMm: number }) =>
      lapTolerance({ minusMm: i.minusMm }, i),
  },
  judgeLap: {
    input: { measured: 880, least: 900 },
    run: (i: { measured: number; least: number }) => judgeLap(i.measured, i.least),
  },
  shareLapped: {
    input: { rule: 'en-1992-1-1', lapCentresMm: [0, 1200], bars: 10, lapMm: 900 },
    run: shareLapped,
  },
  judgeShareLapped: {
    input: { share: 0.5, permitted: 0.5 },
    run: (i: { share: number; permitted: number }) => judgeShareLapped(i.share, i.permitted),
  },
  enLapArrangement: { input: { diameterMm: 16, lapMm: 900 }, run: enLapArrangement },
  judgeStagger: {
    input: { distances: [300], least: 270 },
    run: (i: { distances: number[]; least: number }) => judgeStagger(i.distances, i.least),
  },
  leastBendDiameter: { input: { basis: 'aci-318-19', use: 'main', diameterMm: 16 }, run: leastBendDiameter },
  leastScheduledRadius: { input: { d: 16 }, run: (i: { d: number }) => leastScheduledRadius(i.d) },
  leastBetweenBends: { input: { d: 16 }, run: (i: { d: number }) => leastBetweenBends(i.d) },
  hookExtension: { input: { use: 'main', angle: 90, diameterMm: 16 }, run: hookExtension },
  judgeBend: {
    input: { inside: 64, least: 64 },
    run: (i: { inside: number; least: number }) => judgeBend(i.inside, i.least),
  },
  judgeEpoxyCoating: {
    input: {
      diameterMm: 16,
      lengthMm: 6000,
      spots: [{ kind: 'damaged', fromMm: 10, lengthMm: 20, areaMm2: 100 }],
      bareCutEnds: 1,
      flameCutEnds: 1,
      damagedMostPercent: 2,
      patchedMostPercent: 5,
    },
    run: (i: never) => judgeEpoxyCoating(i, i, i),
  },
  judgeFrpDamage: {
    input: { diameterMm: 16, lengthMm: 6000, spots: [{ fromMm: 10, lengthMm: 20, areaMm2: 100 }], most: 2 },
    run: (i: { diameterMm: number; lengthMm: number; spots: never[]; most: number }) =>
      judgeFrpDamage(i, i.spots, i.most),
  },
  judgeFibreTicket: {
    input: { ticketKg: 30, specifiedKg: 30, minusPercent: 5 },
    run: (i: { ticketKg: number; specifiedKg: number; minusPercent: number }) =>
      judgeFibreTicket(
        { fibreType: 'steel', fibreKgPerM3: i.ticketKg },
        { fibreType: 'steel', fibreKgPerM3: i.specifiedKg, minusPercent: i.minusPercent },
      ),
  },
  fibreDosage: {
    input: { mass: 240, volume: 8 },
    run: (i: { mass: number; volume: number }) => fibreDosage(i.mass, i.volume),
  },
  tendonBand: {
    input: { depth: 200, minusMm: 5, plusMm: 5 },
    run: (i: { depth: number; minusMm: number; plusMm: number }) => tendonBand(i, i.depth),
  },
  judgeTendonHeight: {
    input: { height: 42, heightMm: 40, minusMm: 5, plusMm: 5 },
    run: (i: { height: number; heightMm: number; minusMm: number; plusMm: number }) =>
      judgeTendonHeight(
        { from: 'soffit', to: 'centre', heightMm: i.height },
        { from: 'soffit', to: 'centre', ...i },
      ),
  },
  tendonHeightBetween: {
    input: { vertexHeightMm: 40, otherHeightMm: 160, runMm: 4000, fromVertexMm: 1000 },
    run: tendonHeightBetween,
  },
  tendonHeightTo: {
    input: { heightMm: 40, duct: 20 },
    run: (i: { heightMm: number; duct: number }) =>
      tendonHeightTo({ from: 'soffit', to: 'underside', heightMm: i.heightMm }, 'centre', i.duct),
  },
  carbonationTimeRatio: {
    input: { c: 30, c0: 40 },
    run: (i: { c: number; c0: number }) => carbonationTimeRatio(i.c, i.c0),
  },
  chlorideTimeRatio: {
    input: { c: 30, c0: 40, m: 0.3 },
    run: (i: { c: number; c0: number; m: number }) => chlorideTimeRatio(i.c, i.c0, i.m),
  },
  carbonationYears: { input: { depthMm: 5, ageYears: 15, coverMm: 30 }, run: carbonationYears },
  effectiveDepthChange: {
    input: { d0: 150, d: 140 },
    run: (i: { d0: number; d: number }) => effectiveDepthChange(i.d0, i.d),
  },
  coverInDiameters: {
    input: { c: 20, d: 16 },
    run: (i: { c: number; d: number }) => coverInDiameters(i.c, i.d),
  },
  fireCover: {
    input: { c: 20, required: 25 },
    run: (i: { c: number; required: number }) => fireCover(i.c, i.required, 'cover'),
  },
  predictedCover: {
    input: { reading: 30, change: 10 },
    run: (i: { reading: number; change: number }) => predictedCover(i.reading, i.change),
  },
  chlorideAtSteel: {
    input: { ...chloride, years: 50 },
    run: (i: typeof chloride & { years: number }) => chlorideAtSteel(i, i.years),
  },
  yearsToCriticalChloride: {
    input: { ...chloride, critical: 0.6 },
    run: (i: typeof chloride & { critical: number }) => yearsToCriticalChloride(i, i.critical),
  },
  evaporationRate: {
    input: { concreteC: 30, airC: 28, humidity: 0.5, windKmh: 15 },
    run: (i: never) => evaporationRate(i, false),
  },
  evaporationRateUs: {
    input: { concreteF: 85, airF: 80, humidity: 0.5, windMph: 10 },
    run: (i: never) => evaporationRateUs(i, false),
  },
  noncentralTCdf: {
    input: { t: 2, degrees: 9, delta: 1 },
    run: (i: { t: number; degrees: number; delta: number }) => noncentralTCdf(i.t, i.degrees, i.delta),
  },
  noncentralTQuantile: {
    input: { p: 0.9, degrees: 9, delta: 1 },
    run: (i: { p: number; degrees: number; delta: number }) => noncentralTQuantile(i.p, i.degrees, i.delta),
  },
  summarise: { input: { values: [38, 40, 42] }, run: (i: { values: number[] }) => summarise(i.values) },
  shareBelow: {
    input: { below: 1, n: 20, confidence: 0.95 },
    run: (i: { below: number; n: number; confidence: number }) => shareBelow(i.below, i.n, i.confidence),
  },
  shareLowerBound: {
    input: { below: 1, n: 20, confidence: 0.95 },
    run: (i: { below: number; n: number; confidence: number }) => shareLowerBound(i.below, i.n, i.confidence),
  },
  toleranceFactor: {
    input: { n: 10, p: 0.95, confidence: 0.95 },
    run: (i: { n: number; p: number; confidence: number }) => toleranceFactor(i.n, i.p, i.confidence),
  },
  lowerToleranceBound: {
    input: { values: [38, 40, 42], p: 0.95, confidence: 0.95 },
    run: (i: { values: number[]; p: number; confidence: number }) =>
      lowerToleranceBound(i.values, i.p, i.confidence),
  },
  normalQuantileOf: {
    input: { values: [38, 40, 42], p: 0.05 },
    run: (i: { values: number[]; p: number }) => normalQuantileOf(i.values, i.p),
  },
  rankQuantileOf: {
    input: { values: [38, 40, 42], p: 0.05 },
    run: (i: { values: number[]; p: number }) => rankQuantileOf(i.values, i.p),
  },
  capability: {
    input: { values: [38, 40, 42], least: 30 },
    run: (i: { values: number[]; least: number }) => capability(i.values, i.least),
  },
  successRun: {
    input: { share: 0.1, confidence: 0.9 },
    run: (i: { share: number; confidence: number }) => successRun(i.share, i.confidence),
  },
  pairedChange: {
    input: {
      pairs: [
        { before: 40, after: 38 },
        { before: 42, after: 41 },
      ],
      confidence: 0.95,
    },
    run: (i: { pairs: { before: number; after: number }[]; confidence: number }) =>
      pairedChange(i.pairs, i.confidence),
  },
  barListMasses: {
    input: { rows: [{ mark: 'A1', designation: '16 mm', lengthMm: 6000, count: 10 }], planKg: 95 },
    run: (i: { rows: never[]; planKg: number }) => barListMasses(i.rows, { planKg: i.planKg }),
  },
};

/** Numbers that may be below zero: a value, not a size. */
const SIGNED = new Set([
  'predictedCover.change',
  'noncentralTCdf.t',
  'noncentralTCdf.delta',
  'noncentralTQuantile.delta',
  'judgeTendonHeight.height',
  'evaporationRate.concreteC',
  'evaporationRate.airC',
  'shareLapped.lapCentresMm.0',
  'shareLapped.lapCentresMm.1',
  'capability.least',
  'pairedChange.pairs.0.before',
  'pairedChange.pairs.0.after',
  'pairedChange.pairs.1.before',
  'pairedChange.pairs.1.after',
]);
const signed = (path: string) => SIGNED.has(path) || /\.values\.\d$/.test(path);

type Path = (string | number)[];

function numberPaths(value: unknown, path: Path = []): Path[] {
  if (typeof value === 'number') return [path];
  if (value === null || typeof value !== 'object') return [];
  return Object.entries(value).flatMap(([key, inner]) => numberPaths(inner, [...path, key]));
}

function withNumber(input: object, path: Path, to: number): never {
  const copy: unknown = structuredClone(input);
  let holder = copy;
  for (const key of path.slice(0, -1)) holder = Reflect.get(Object(holder), key);
  Reflect.set(Object(holder), path.at(-1) ?? '', to);
  return copy as never;
}

const anyNaN = (value: unknown): boolean =>
  typeof value === 'number'
    ? Number.isNaN(value)
    : value !== null && typeof value === 'object' && Object.values(value).some(anyNaN);

describe.each(Object.entries(calls))('%s', (name, { input, run }) => {
  test('answers good input without NaN', () => {
    const answer = run(structuredClone(input) as never);
    expect(anyNaN(answer)).toBe(false);
    expect(JSON.stringify(answer)).not.toMatch(/NaN|Infinity|undefined/);
  });

  const paths = numberPaths(input).map((path) => [path.join('.'), path] as const);
  test.each(paths)('refuses a bad %s, naming a field and a reason', (label, path) => {
    const bad = [Number.NaN, Infinity, -Infinity, ...(signed(`${name}.${label}`) ? [] : [-1])];
    for (const value of bad) {
      let caught: unknown;
      try {
        run(withNumber(input, path, value));
      } catch (error) {
        caught = error;
      }
      expect(caught, `${label} = ${value}`).toBeInstanceOf(ConcreteError);
      if (caught instanceof ConcreteError) {
        expect(caught.field).not.toBe('');
        expect(caught.reason).toMatch(/^[A-Z"0-9].*\.$/);
      }
    }
  });
});
