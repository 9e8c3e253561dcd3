import { readdirSync } from 'node:fs';
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { ConcreteError } from '@/lib/concrete/concrete-error';

type Callable = (...args: unknown[]) => unknown;
type Arguments = readonly unknown[];

const folder = new URL('../../../lib/concrete/', import.meta.url);
const files = readdirSync(folder).filter((file) => file.endsWith('.ts'));

const bar = {
  diameterMm: 16,
  fyMPa: 420,
  fcMPa: 28,
  lightweight: false,
  coating: 'epoxy',
  topBar: true,
  clearCoverMm: 40,
  clearSpacingMm: 100,
};
const development = { lengthMm: 600, beforeLeastMm: 590, trail: [] };
const bond = { strengthClass: 'C30/37', diameterMm: 16, condition: 'good', gammaC: 1.5, alphaCt: 1 };
const cover = (basis: string, exposure: string) => ({
  basis,
  element: 'slab',
  meeting: 'formed',
  soffit: true,
  exposure,
  barDiameterMm: 16,
  bundleOf: 2,
  behindTiesMm: 10,
  thicknessMm: 250,
  effectiveDepthMm: 200,
  aggregateMm: 20,
  structuralClass: 'S4',
  deltaCdevMm: 10,
  toleranceClass: 1,
  strengthMpa: 40,
  leastDimensionMm: 250,
});
const aci = cover('aci-318-19', 'not-exposed');
const en = cover('en-1992', 'XC3');
const requirement = {
  specifiedMm: 50,
  leastAcceptedMm: 40,
  mostAcceptedMm: 60,
  codeMinimumMm: 40,
  warnings: [],
  trail: [],
};
const chloride = {
  surfaceContent: 3,
  initialContent: 0.1,
  diffusionM2PerS: 1e-12,
  ageingExponent: 0.4,
  coverMm: 50,
};
const spots = [{ kind: 'damaged', fromMm: 100, lengthMm: 20, areaMm2: 60 }];
const readings = [38, 41, 40, 43, 39];
const rectangle = { xMm: 100, yMm: 100, widthMm: 300, heightMm: 200 };
const depth = { section: { sectionMm: 250, barDiameterMm: 16, toCentroidMm: 5 }, plannedMm: 200 };
const depthReading = {
  ...depth,
  readingMm: 40,
  touched: 'outermost',
  betweenMm: 10,
  tolerance: { minusMm: 10, plusMm: 10 },
};

/** A call of every exported function that takes numbers, with several where the path through it differs. */
const calls: Record<string, Arguments[]> = {
  enBondCondition: [[{ depthMm: 400, aboveUndersideMm: 300, inclinationDegrees: 10 }]],
  enBondStrength: [[bond]],
  enBasicAnchorage: [[{ ...bond, sigmaSdMPa: 435 }]],
  checkedAlphas: [[{ alpha1: 0.8, alpha2: 0.9, alpha3: 0.9, alpha4: 0.9, alpha5: 0.9 }]],
  enAnchorageLength: [[{ ...bond, sigmaSdMPa: 435, inCompression: false, alpha1: 0.8 }]],
  barListMasses: [
    [[{ mark: 'A1', designation: '16 mm', lengthMm: 6000, count: 12 }], { system: 'en', planKg: 100 }],
  ],
  judgeStainlessContact: [[{ contactsFound: 1, forbidden: true }]],
  leastClearDistance: [
    [{ basis: 'aci-318-19', place: 'layer', diameterMm: 16, aggregateMm: 20 }],
    [{ basis: 'en-1992-1-1', place: 'layer', diameterMm: 16, aggregateMm: 20, k1: 1, k2Mm: 5 }],
  ],
  judgeClearDistances: [[[30, 25], 25]],
  barsInWidth: [
    [{ widthMm: 300, sideCoverMm: 40, tieDiameterMm: 8, diameterMm: 20, leastClearMm: 25, bars: 4 }],
  ],
  barsAcrossBay: [[{ widthMm: 4000, firstBarFromEdgeMm: 75, spacingMm: 150 }]],
  judgeBarCount: [[27, 27]],
  spacingOverGaps: [[{ overallMm: 1500, gaps: 10 }]],
  judgeSpacing: [[{ spacingMm: 150, specifiedMm: 150, minusMm: 10, plusMm: 10, codeMostMm: 400 }]],
  greatestSpacing: [[{ basis: 'aci-318-19', use: 'wall', thicknessMm: 200 }]],
  specifiedSpacingStep: [[150]],
  massOf: [[{ massKgPerM: 1.58 }, 6000]],
  leastBendDiameter: [
    [{ basis: 'aci-318-19', use: 'main', diameterMm: 16 }],
    [{ basis: 'en-1992-1-1', use: 'main', diameterMm: 16 }],
    [{ basis: 'bs-8666', use: 'main', diameterMm: 16 }],
  ],
  leastScheduledRadius: [[16]],
  leastBetweenBends: [[16]],
  hookExtension: [[{ use: 'tie', angle: 90, diameterMm: 16 }]],
  judgeBend: [[100, 96]],
  equivalentDiameter: [[16, 2]],
  finite: [['field', 5]],
  positive: [['field', 5]],
  notNegative: [['field', 5]],
  whole: [['field', 5, 1]],
  openShare: [['field', 0.5]],
  between: [['field', 5, 1, 9]],
  requirePositive: [['field', 5]],
  numberProblem: [[5]],
  positiveProblem: [[5]],
  chlorideAtSteel: [[chloride, 50]],
  yearsToCriticalChloride: [[chloride, 0.6]],
  judgeEpoxyCoating: [
    [
      { diameterMm: 16, lengthMm: 6000 },
      { spots, bareCutEnds: 1, flameCutEnds: 0 },
      { damagedMostPercent: 2, patchedMostPercent: 5 },
    ],
  ],
  epoxyLimits: [[{ damagedMostPercent: 1, patchedMostPercent: 4 }]],
  frpLimit: [[2]],
  judgeFrpDamage: [[{ diameterMm: 16, lengthMm: 6000 }, spots, 2]],
  coverByAci318: [[aci]],
  coverByAs3600: [[cover('as-3600', 'B1')]],
  coverByCsaA23: [[cover('csa-a23.1', 'C-1')]],
  coverByEn1992: [[en]],
  coverByIs456: [[cover('is-456', 'severe')]],
  specifiedCover: [
    [
      { ...aci, contractSpecifiedMm: 50 },
      { minimumMm: 40, warnings: [], trail: [] },
    ],
  ],
  governingDeviation: [
    [{ ...aci, contractMinusMm: 10, contractPlusMm: 20 }, 50],
    [{ ...en, contractMinusMm: 5 }, 50],
  ],
  coverMeterAccuracy: [[50]],
  blockCheckPasses: [[51, 50, 2]],
  coverRequirement: [
    [{ ...aci, contractSpecifiedMm: 50, contractMinusMm: 10, contractPlusMm: 20 }],
    [en],
    [cover('is-456', 'severe')],
    [cover('as-3600', 'B1')],
    [cover('csa-a23.1', 'C-1')],
    [{ ...aci, basis: 'contract', contractSpecifiedMm: 50, contractMinusMm: 10 }],
  ],
  stricterOf: [[requirement, { ...requirement, leastAcceptedMm: 45 }]],
  simpleCase: [[bar, true]],
  aciDevelopmentSimple: [[bar, 'confined']],
  aciDevelopmentGeneral: [
    [bar, { cbMm: 40, transverse: { areaMm2: 100, spacingMm: 150, bars: 2 } }],
    [bar, { cbMm: 40, transverse: null }],
  ],
  aciDevelopmentCompression: [[{ ...bar, confined: true }]],
  effectiveDepth: [[depth.section, 40]],
  judgeEffectiveDepth: [
    [depthReading, 'mm'],
    [{ ...depthReading, touched: 'main' }, 'in'],
  ],
  evaporationRate: [[{ concreteC: 30, airC: 30, humidity: 0.5, windKmh: 20 }, true]],
  evaporationRateUs: [[{ concreteF: 86, airF: 86, humidity: 0.5, windMph: 12 }, false]],
  judgeFibreTicket: [
    [
      { fibreType: 'steel', fibreKgPerM3: 30 },
      { fibreType: 'steel', fibreKgPerM3: 30, minusPercent: 10 },
    ],
  ],
  fibreDosage: [[120, 4]],
  measureText: [[30, 'mm', 31]],
  judgeLimits: [[30, { least: 20, most: 40 }, 'mm']],
  metReason: [[30, 20, 40, 'mm']],
  judgeReading: [
    [
      { mm: 45, sectionMm: 250 },
      { leastAcceptedMm: 40, mostAcceptedMm: 60 },
      { uncertaintyMm: 1, status: 'good' },
      { kind: 'guarded', guardMm: 2 },
      'mm',
    ],
    [
      { mm: 45, sectionMm: 250 },
      { leastAcceptedMm: 40, mostAcceptedMm: null },
      { uncertaintyMm: 1, status: 'good' },
      { kind: 'guarded' },
      'in',
    ],
    [
      { mm: null, goNoGo: { blockMm: 45, passes: true } },
      { leastAcceptedMm: 40, mostAcceptedMm: 60 },
      { uncertaintyMm: 1, status: 'good' },
      { kind: 'simple' },
      'mm',
    ],
  ],
  judgeLap: [[850, 860]],
  judgeEmbedment: [[{ measuredMm: 600, leastMm: 620, pulled: 'held' }, 'mm']],
  judgeCoupler: [
    [{ plannedType: 'a', foundType: 'a', witnessMarks: 'both-in', exposedThreads: 1, mostExposedThreads: 2 }],
  ],
  shareLapped: [[{ rule: 'en-1992-1-1', lapCentresMm: [0, 500, 2000], bars: 6, lapMm: 860 }]],
  lapSection: [['en-1992-1-1', 860]],
  enLeastStagger: [[860]],
  judgeShareLapped: [[0.5, 0.5]],
  enLapArrangement: [[{ diameterMm: 16, lapMm: 860 }]],
  judgeStagger: [[[300, 400], 258]],
  typedLap: [[860]],
  aciLapClass: [[2, 0.5]],
  aciTensionLap: [
    [{ diameterMm: 16, development, lapClass: 'B', largerBar: { diameterMm: 20, development } }],
  ],
  nonContactLapMost: [[860]],
  aciCompressionLap: [
    [
      {
        diameterMm: 16,
        fyMPa: 600,
        fcMPa: 18,
        tensionLapMm: 900,
        largerBar: { diameterMm: 20, compressionDevelopmentMm: 500 },
      },
    ],
  ],
  enAlpha6Factor: [[50]],
  enLapLength: [[{ ...bond, sigmaSdMPa: 435, sharePercent: 40, alpha1: 0.9 }]],
  lapTolerance: [
    ['aci-117-10', { diameterMm: 16, requiredMm: 860 }],
    ['en-13670', { diameterMm: 16, requiredMm: 860 }],
    [{ minusMm: 20 }, { diameterMm: 16, requiredMm: 860 }],
  ],
  formatLength: [[34.925, 'in', 35]],
  withUnit: [[34.925, 'in', 35]],
  lengthArithmetic: [[[304.8, 44.45, 15.875], '−', 244.475, 'in']],
  tapeNeighbours: [[17]],
  againstLimits: [['What', 30, { least: 20, most: 40 }, '%']],
  carbonationTimeRatio: [[30, 40]],
  chlorideTimeRatio: [[30, 40, 0.3]],
  carbonationYears: [[{ depthMm: 12, ageYears: 10, coverMm: 40 }]],
  effectiveDepthChange: [[200, 190]],
  coverInDiameters: [[30, 16]],
  fireCover: [[20, 25, 'cover']],
  predictedCover: [[30, 10]],
  noncentralTCdf: [[2, 10, 1]],
  noncentralTQuantile: [[0.95, 10, 1]],
  numberText: [[3.14159, 2]],
  apartText: [[3.1, 3.2, 1]],
  drawPoints: [[{ seed: 'a', widthMm: 4000, heightMm: 3000, count: 6, openings: [rectangle] }]],
  defaultPointCount: [['slab', 2e7]],
  neighboursOf: [
    [
      { xMm: 10, yMm: 10 },
      [
        { xMm: 20, yMm: 10 },
        { xMm: 10, yMm: 40 },
      ],
    ],
  ],
  spacingTolerance: [
    [{ basis: 'aci-318-19', steel: 'stirrups', specifiedMm: 150, memberMm: 600 }],
    [{ basis: 'as-3600', steel: 'stirrups', specifiedMm: 150, memberMm: 600 }],
  ],
  summarise: [[readings]],
  shareBelow: [[1, 20, 0.95]],
  shareLowerBound: [[1, 20, 0.95]],
  toleranceFactor: [[20, 0.9, 0.95]],
  lowerToleranceBound: [[readings, 0.9, 0.95]],
  normalQuantileOf: [[readings, 0.05]],
  rankQuantileOf: [[readings, 0.1]],
  capability: [[readings, 35]],
  successRun: [[0.1, 0.95]],
  pairedChange: [
    [
      [
        { before: 40, after: 38 },
        { before: 41, after: 40 },
        { before: 42, after: 39 },
      ],
      0.95,
    ],
  ],
  psiToMPa: [[5000]],
  mpaToPsi: [[28]],
  supportHeight: [
    [
      {
        thicknessMm: 300,
        topCoverMm: 50,
        carried: [{ name: 'T1', diameterMm: 16 }],
        standsOn: [{ name: 'Cover', sizeMm: 50 }],
      },
    ],
  ],
  supportHeightLimits: [[144, { coverMinusMm: 10, depthMinusMm: 8 }]],
  supportSpacingLimit: [
    [{ rule: 'plan', diameterMm: 16, planLimitMm: 1000 }],
    [{ rule: 'common-practice', diameterMm: 16 }],
    [{ rule: 'bs-7973-2-bars', diameterMm: 16 }],
  ],
  judgeSupportSpacing: [[[800, 900], 1000]],
  judgeLoadedBay: [
    [
      { before: 45, under: 41, after: 44 },
      { least: 40, most: 60 },
    ],
  ],
  tendonBand: [
    ['aci-117-10', 300],
    [{ minusMm: 3, plusMm: 6 }, 300],
  ],
  judgeTendonHeight: [
    [
      { from: 'soffit', to: 'centre', heightMm: 220 },
      { from: 'soffit', to: 'centre', heightMm: 220, minusMm: 5, plusMm: 5 },
      'mm',
    ],
  ],
  tendonHeightBetween: [[{ vertexHeightMm: 60, otherHeightMm: 220, runMm: 4000, fromVertexMm: 1000 }]],
  tendonHeightTo: [[{ from: 'soffit', to: 'centre', heightMm: 220 }, 'underside', 60]],
  intersectionsPerSquareMetre: [[150, 200]],
  requiredTies: [
    [{ pattern: { kind: 'share', share: 0.7 }, intersections: 49 }],
    [{ pattern: { kind: 'perimeter-every' }, intersections: 49, onPerimeter: 7 }],
    [{ pattern: { kind: 'by-spacing' }, intersections: 49, spacingXMm: 150, spacingYMm: 310 }],
  ],
  judgeTies: [[{ tied: 30, intersections: 49, required: 25 }]],
  judgeTieSamples: [[[{ tied: 30, intersections: 49, required: 25, atEdge: true }]]],
  en13670Plus: [[300, 1, true]],
  basisDeviation: [
    [aci, 50],
    [en, 50],
  ],
  depthTolerance: [
    [aci, 200],
    [en, 200],
    [cover('is-456', 'severe'), 200],
  ],
  usBarNumber: [[16]],
};

/** Functions of which no argument is a number, or whose answer to a number is a comparison and nothing else. */
const withoutNumbers = new Set([
  'governingConcrete',
  'materialRules',
  'instrumentSees',
  'barsOf',
  'findBar',
  'findBarFor',
  'isSameBar',
  'judgeFieldBend',
  'noFlameCutting',
  'given',
  'listOf',
  'unknownChoice',
  'structuralClass',
  'shownUnit',
  'exposureClasses',
  'atLeast',
  'atMost',
  'parseLength',
  'worstFinding',
  'seededRandom',
  'supportSuitsCoating',
  'tieSampleSquares',
  'trailSource',
  'arithmetic',
  'fromContract',
  'commonPractice',
  'needsEditionCheck',
  'stepSource',
]);

async function exportedFunctions(): Promise<Map<string, Callable>> {
  const found = new Map<string, Callable>();
  for (const file of files) {
    const exported = (await import(/* @vite-ignore */ new URL(file, folder).pathname)) as Record<
      string,
      unknown
    >;
    for (const [name, value] of Object.entries(exported)) {
      // Classes are functions to the engine; the only one here is the error itself.
      if (typeof value === 'function' && value !== ConcreteError) found.set(name, value as Callable);
    }
  }
  return found;
}
const functions = await exportedFunctions();

type Path = readonly (string | number)[];

/** Where the numbers of some arguments are. */
function numbersIn(value: unknown, path: Path = []): Path[] {
  if (typeof value === 'number') return [path];
  if (typeof value !== 'object' || value === null) return [];
  return Object.entries(value).flatMap(([key, inner]) => numbersIn(inner, [...path, key]));
}

function replaced(value: unknown, path: Path, by: number): unknown {
  const [first, ...rest] = path;
  if (first === undefined) return by;
  if (Array.isArray(value))
    return value.map((one, index) => (String(index) === String(first) ? replaced(one, rest, by) : one));
  const record = value as Record<string, unknown>;
  return { ...record, [first]: replaced(record[first], rest, by) };
}

/** What must never leave: a number that is none, or a text that shows one. */
function strays(value: unknown, at = 'result'): string[] {
  if (typeof value === 'number') return Number.isFinite(value) ? [] : [`${at} = ${value}`];
  if (typeof value === 'string') return /NaN|Infinity|undefined/.test(value) ? [`${at} = "${value}"`] : [];
  if (typeof value !== 'object' || value === null) return [];
  return Object.entries(value).flatMap(([key, inner]) => strays(inner, `${at}.${key}`));
}

/** Calls it: a result without strays, or the typed error with its field and its reason. */
function outcome(name: string, args: Arguments): string[] {
  const call = functions.get(name);
  if (!call) return [`${name} is not exported`];
  try {
    return strays(call(...args));
  } catch (error) {
    if (!(error instanceof ConcreteError)) return [`${name} threw ${String(error)}`];
    return error.field !== '' && error.reason !== '' ? [] : [`${name}: an error without field or reason`];
  }
}

const bad = [Number.NaN, Infinity, -Infinity, -1, 0, -0, 0.5, 1e15, 1e300, -1e300, 1e-300, Number.MIN_VALUE];
const names = [...functions.keys()].filter((name) => !withoutNumbers.has(name)).sort();

describe('no number that is none ever leaves lib/concrete', () => {
  test('every exported function that takes numbers is called here', () => {
    expect(names).toEqual(Object.keys(calls).sort());
    expect([...withoutNumbers].filter((name) => !functions.has(name))).toEqual([]);
  });

  test.each(names)('%s', (name) => {
    for (const args of calls[name] ?? []) {
      expect(outcome(name, args), 'as it is meant to be called').toEqual([]);
      for (const path of numbersIn(args)) {
        for (const number of bad) {
          const found = outcome(name, replaced(args, path, number) as Arguments);
          expect(found, `${path.join('.')} = ${number}`).toEqual([]);
        }
      }
    }
  });

  test('nor with any other numbers in their places', () => {
    const any = fc.oneof(
      fc.double(),
      fc.double({ min: -1e4, max: 1e4, noNaN: true }),
      fc.integer({ min: -5, max: 500 }),
    );
    fc.assert(
      fc.property(
        fc.constantFrom(...names),
        fc.nat(),
        fc.array(any, { minLength: 12, maxLength: 12 }),
        (name, pick, numbers) => {
          // The tail of a distribution takes its time; its own properties are in tests/reference.
          if (name.startsWith('noncentralT') || name === 'toleranceFactor' || name === 'lowerToleranceBound')
            return;
          const list = calls[name] ?? [];
          const args = list[pick % Math.max(1, list.length)] ?? [];
          const changed = numbersIn(args).reduce<unknown>(
            (made, path, index) => replaced(made, path, numbers[index % numbers.length] ?? 0),
            args,
          );
          expect(outcome(name, changed as Arguments)).toEqual([]);
        },
      ),
      { numRuns: 3000 },
    );
  });
});
