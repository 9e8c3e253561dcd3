import { between, finite, notNegative, positive } from '@/lib/concrete/check-input';
import { ConcreteError } from '@/lib/concrete/concrete-error';
import { atLeast, formatLength, lengthArithmetic, withUnit, type LengthUnit } from '@/lib/concrete/length';
import { numberText } from '@/lib/concrete/number-text';
import type { TrailStep } from '@/lib/concrete/trail';
import { arithmetic, fromContract, trailSource } from '@/lib/concrete/trail-source';

/** One input of an estimate, as the screen shows it beside the formula. */
export interface EstimateInput {
  name: string;
  value: number;
  unit: string;
}

/** What every decision-support number carries: never the number alone. */
export interface EstimateContext {
  formula: string;
  inputs: EstimateInput[];
  trail: TrailStep[];
  caution: string;
}

const RATIO_CAUTION =
  'Decision support. A ratio for this place only, other things equal; it is no service life and no acceptance.';

const carbonation = trailSource('square-root law; BRE, DME 5.1 (x = k tⁿ, n usually 0.5)', '', 'seen');
const ageing = trailSource('fib Bulletin 34, Annex B2: D(t) = D0 (t0/t)^m', '2006', 'memory');

function coverInputs(measuredMm: number, specifiedMm: number): EstimateInput[] {
  return [
    { name: 'Measured cover c', value: positive('measured cover', measuredMm), unit: 'mm' },
    { name: 'Specified cover c₀', value: positive('specified cover', specifiedMm), unit: 'mm' },
  ];
}

/** Two lengths over each other; a fraction of an inch stands in brackets, so that one stroke divides and no other. */
function ratioText(upperMm: number, lowerMm: number, unit: LengthUnit): string {
  const shown = [upperMm, lowerMm].map((mm) => {
    const text = formatLength(mm, unit);
    return text.includes('/') ? `(${text})` : text;
  });
  return shown.join(' / ');
}

/**
 * Time for carbonation to reach the steel, measured against specified cover: (c/c₀)². Depth goes with the square root of
 * time, so the unknown rate drops out. Covers in mm.
 */
export function carbonationTimeRatio(
  measuredMm: number,
  specifiedMm: number,
  showIn: LengthUnit = 'mm',
): EstimateContext & { ratio: number } {
  const inputs = coverInputs(measuredMm, specifiedMm);
  const ratio = (measuredMm / specifiedMm) ** 2;
  const value = `(${ratioText(measuredMm, specifiedMm, showIn)})² = ${numberText(ratio, 3)}`;
  return {
    ratio,
    formula: '(c/c₀)²',
    inputs,
    trail: [carbonation('Time to carbonation at the bar, ratio (c/c₀)²', value)],
    caution: RATIO_CAUTION,
  };
}

/**
 * Time for chloride to reach its critical content at the steel by diffusion, measured against specified cover:
 * (c/c₀)^(2/(1−m)) for ageing exponent m (0 for none).
 * @throws ConcreteError where m is not from 0 to below 1
 */
export function chlorideTimeRatio(
  measuredMm: number,
  specifiedMm: number,
  m: number,
  showIn: LengthUnit = 'mm',
): EstimateContext & { ratio: number } {
  const exponent = 2 / (1 - ageingExponent(m));
  const inputs = [...coverInputs(measuredMm, specifiedMm), { name: 'Ageing exponent m', value: m, unit: '' }];
  const ratio = (measuredMm / specifiedMm) ** exponent;
  if (!Number.isFinite(ratio)) {
    throw new ConcreteError('ageing exponent m', 'It is so near to 1 that no ratio follows.');
  }
  const value = `(${ratioText(measuredMm, specifiedMm, showIn)})^${numberText(exponent, 3)} = ${numberText(ratio, 3)}`;
  return {
    ratio,
    formula: '(c/c₀)^(2/(1−m))',
    inputs,
    trail: [ageing('Time to critical chloride at the bar, ratio (c/c₀)^(2/(1−m))', value)],
    caution: `${RATIO_CAUTION} The exponent makes a large difference and is known for tens of years at most.`,
  };
}

function ageingExponent(m: number): number {
  if (finite('ageing exponent m', m) < 0 || m >= 1) {
    throw new ConcreteError('ageing exponent m', 'It has to lie from 0 to below 1.');
  }
  return m;
}

const fib = trailSource('fib Bulletin 34, Annex B2', '2006', 'memory');
const duraCrete = trailSource('DuraCrete final report, as coded in a public repository', '1999/2000', 'seen');
const LONG =
  'Fitted to data of some tens of years at most; the models keep it to design ages, which is extrapolation.';

/** Typical ageing exponents, mean and standard deviation, by cement or by exposure, with their source. */
export const ageingExponents = [
  {
    id: 'fib-cem-i',
    name: 'Portland cement (CEM I)',
    m: 0.3,
    sd: 0.12,
    step: fib('m, CEM I', '0.30 ± 0.12', LONG),
  },
  {
    id: 'fib-fly-ash',
    name: 'With fly ash',
    m: 0.6,
    sd: 0.15,
    step: fib('m, with fly ash', '0.60 ± 0.15', LONG),
  },
  {
    id: 'fib-cem-iii',
    name: 'Slag cement (CEM III)',
    m: 0.45,
    sd: 0.2,
    step: fib('m, CEM III', '0.45 ± 0.20', LONG),
  },
  {
    id: 'dura-submerged',
    name: 'Portland cement, submerged',
    m: 0.3,
    sd: 0.05,
    step: duraCrete('m, Portland cement, submerged', '0.30 ± 0.05', LONG),
  },
  {
    id: 'dura-tidal-splash',
    name: 'Portland cement, tidal and splash',
    m: 0.37,
    sd: 0.07,
    step: duraCrete('m, Portland cement, tidal and splash', '0.37 ± 0.07', LONG),
  },
  {
    id: 'dura-atmospheric',
    name: 'Portland cement, atmospheric',
    m: 0.65,
    sd: 0.07,
    step: duraCrete('m, Portland cement, atmospheric', '0.65 ± 0.07', LONG),
  },
] as const satisfies readonly { id: string; name: string; m: number; sd: number; step: TrailStep }[];

/**
 * Carbonation from a depth seen at an age: k = x/√t in mm/√year, and the years until it reaches the cover, (c/k)².
 */
export function carbonationYears(seen: {
  depthMm: number;
  ageYears: number;
  coverMm: number;
}): EstimateContext & {
  kMmPerRootYear: number;
  years: number;
} {
  const depth = positive('carbonation depth', seen.depthMm);
  const age = positive('age', seen.ageYears);
  const cover = positive('cover', seen.coverMm);
  const k = depth / Math.sqrt(age);
  const years = (cover / k) ** 2;
  return {
    kMmPerRootYear: k,
    years,
    formula: 'k = x/√t, t = (c/k)²',
    inputs: [
      { name: 'Carbonation depth x', value: depth, unit: 'mm' },
      { name: 'Age t', value: age, unit: 'years' },
      { name: 'Cover c', value: cover, unit: 'mm' },
    ],
    trail: [
      carbonation('k = x/√t', `${numberText(k, 4)} mm/√year`),
      carbonation('t = (c/k)²', `${numberText(years, 0)} years from casting`),
    ],
    caution: RATIO_CAUTION,
  };
}

const bending = trailSource('M ≈ As fy j d with j unchanged, first order', '', 'computed');

/**
 * What a change of effective depth does: in % of d, and the bending strength by the same share to first order. Depths in
 * mm; d is to the centre of the main bars.
 */
export function effectiveDepthChange(
  plannedMm: number,
  foundMm: number,
  showIn: LengthUnit = 'mm',
): EstimateContext & { changePercent: number; bendingChangePercent: number } {
  const planned = positive('planned effective depth', plannedMm);
  const found = positive('effective depth found', foundMm);
  const changePercent = (100 * (found - planned)) / planned;
  const shown = (mm: number) => formatLength(mm, showIn);
  const value = `(${shown(found)} − ${shown(planned)}) / ${shown(planned)} = ${numberText(changePercent, 2)} %`;
  return {
    changePercent,
    bendingChangePercent: changePercent,
    formula: 'ΔM/M ≈ Δd/d',
    inputs: [
      { name: 'Planned d', value: planned, unit: 'mm' },
      { name: 'Found d', value: found, unit: 'mm' },
    ],
    trail: [
      arithmetic('Change of effective depth', value),
      bending('Change of bending strength ≈ change of d', value),
    ],
    caution: 'Decision support, to first order. The engineer of record judges strength by calculation.',
  };
}

const enBondCover = trailSource('EN 1992-1-1, Table 4.2 (cmin,b = φ)', '2004', 'seen');

/** Cover in bar diameters. Below one diameter the bond that laps and anchorages are computed from is not there. */
export function coverInDiameters(
  coverMm: number,
  diameterMm: number,
  showIn: LengthUnit = 'mm',
): EstimateContext & { diameters: number; enough: boolean } {
  const cover = notNegative('cover', coverMm);
  const diameter = positive('bar diameter', diameterMm);
  const enough = atLeast(cover, diameter);
  const value = `${ratioText(cover, diameter, showIn)} = ${numberText(cover / diameter, 3)}`;
  return {
    diameters: cover / diameter,
    enough,
    formula: 'c/φ ≥ 1',
    inputs: [
      { name: 'Cover c', value: cover, unit: 'mm' },
      { name: 'Bar diameter φ', value: diameter, unit: 'mm' },
    ],
    trail: [enBondCover('Cover in bar diameters, at least one', value)],
    caution:
      'Decision support. Less than one diameter also lengthens laps and anchorages; the engineer computes them.',
  };
}

/** Cover (or axis distance) against what the engineer entered for fire; the program knows no fire table. */
export function fireCover(
  foundMm: number,
  requiredMm: number,
  kind: 'cover' | 'axis-distance',
  showIn: LengthUnit = 'mm',
): EstimateContext & { enough: boolean; shortByMm: number } {
  const found = notNegative(kind === 'cover' ? 'cover' : 'axis distance', foundMm);
  const required = positive('required for fire', requiredMm);
  const enough = atLeast(found, required);
  const name = kind === 'cover' ? 'cover' : 'axis distance';
  return {
    enough,
    shortByMm: enough ? 0 : required - found,
    formula: `${name} ≥ required`,
    inputs: [
      { name: `Found ${name}`, value: found, unit: 'mm' },
      { name: 'Required for fire', value: required, unit: 'mm' },
    ],
    trail: [
      fromContract(`Required ${name} for fire, as the engineer entered it`, withUnit(required, showIn)),
    ],
    caution: 'Compared as entered. Fire resistance is the engineer’s.',
  };
}

/**
 * Cover after a measure that has not been taken yet, for example raising a level. A prediction, never a reading: it
 * clears no hold and enters no statistic.
 */
export function predictedCover(
  readingMm: number,
  changeMm: number,
  showIn: LengthUnit = 'mm',
): EstimateContext & { predictedMm: number } {
  const reading = between('reading', readingMm, 0, 1_000_000);
  const predictedMm = reading + finite('change', changeMm);
  if (predictedMm < 0) throw new ConcreteError('change', 'The bar would stand out of the concrete.');
  return {
    predictedMm,
    formula: 'reading + change',
    inputs: [
      { name: 'Reading', value: reading, unit: 'mm' },
      { name: 'Change', value: changeMm, unit: 'mm' },
    ],
    trail: [arithmetic('Predicted cover', lengthArithmetic([reading, changeMm], '+', predictedMm, showIn))],
    caution: 'A prediction, not a reading. Measure again after the work.',
  };
}
