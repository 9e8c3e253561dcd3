import erfc from '@stdlib/math-base-special-erfc';
import erfcinv from '@stdlib/math-base-special-erfcinv';
import { finite, notNegative, positive } from '@/lib/concrete/check-input';
import { ConcreteError } from '@/lib/concrete/concrete-error';
import type { EstimateContext, EstimateInput } from '@/lib/concrete/low-cover-cost';
import { numberText } from '@/lib/concrete/number-text';
import { trailSource } from '@/lib/concrete/trail-source';

/** Days of a year, as the Julian year of 365.25 days; 28 days are 0.0767 year. */
const YEAR_SECONDS = 365.25 * 86_400;
const REFERENCE_YEARS = 28 / 365.25;

const fick = trailSource('Fick’s second law, error-function solution (Crank; NIST, Bentz)', '', 'seen');
const ageingLaw = trailSource('fib Bulletin 34, Annex B2: D(t) = D28 (t28/t)^m', '2006', 'memory');

const CAUTION =
  'Decision support. Constant surface chloride, uncracked concrete, diffusion only; D and m are apparent values that the ' +
  'engineer enters. Real concrete scatters by a factor of several.';

/** What the engineer enters. Contents in one unit (% by mass of binder or of concrete), D in m²/s at 28 days. */
export interface ChlorideInputs {
  surfaceContent: number;
  initialContent: number;
  diffusionM2PerS: number;
  /** Ageing exponent m: D(t) = D28 (t28/t)^m; 0 for a constant D. */
  ageingExponent: number;
  coverMm: number;
}

function checked(inputs: ChlorideInputs): { rows: EstimateInput[]; coverM: number } {
  const surface = positive('surface chloride', inputs.surfaceContent);
  const initial = notNegative('initial chloride', inputs.initialContent);
  if (initial >= surface)
    throw new ConcreteError('initial chloride', 'It is not below the surface chloride.');
  const d = positive('D', inputs.diffusionM2PerS);
  if (d > 1e-6) throw new ConcreteError('D', 'It is far too large for concrete: enter m²/s, about 1e-12.');
  const m = finite('ageing exponent m', inputs.ageingExponent);
  if (m < 0 || m >= 1) throw new ConcreteError('ageing exponent m', 'It has to lie from 0 to below 1.');
  const cover = positive('cover', inputs.coverMm);
  return {
    coverM: cover / 1000,
    rows: [
      { name: 'Surface chloride Cs', value: surface, unit: 'as entered' },
      { name: 'Initial chloride C0', value: initial, unit: 'as entered' },
      { name: 'Diffusion coefficient D28', value: d, unit: 'm²/s' },
      { name: 'Ageing exponent m', value: m, unit: '' },
      { name: 'Cover x', value: cover, unit: 'mm' },
    ],
  };
}

/** D(t) = D28 (t28/t)^m, so D(t)·t = D28 t28^m t^(1−m), in m² with t in years. */
function diffusedM2(inputs: ChlorideInputs, years: number): number {
  const { diffusionM2PerS, ageingExponent } = inputs;
  return diffusionM2PerS * YEAR_SECONDS * REFERENCE_YEARS ** ageingExponent * years ** (1 - ageingExponent);
}

/**
 * Chloride content at the steel after `years`: C = C0 + (Cs − C0) erfc(x / (2 √(D t))). The error function is accurate to
 * the last digits of a double.
 */
export function chlorideAtSteel(
  inputs: ChlorideInputs,
  years: number,
): EstimateContext & { content: number } {
  const { rows, coverM } = checked(inputs);
  const age = positive('age', years);
  const z = coverM / (2 * Math.sqrt(diffusedM2(inputs, age)));
  const content = inputs.initialContent + (inputs.surfaceContent - inputs.initialContent) * erfc(z);
  return {
    content,
    formula: 'C = C0 + (Cs − C0) erfc(x / (2 √(D t)))',
    inputs: [...rows, { name: 'Age t', value: age, unit: 'years' }],
    trail: [
      ageingLaw('D at age t', `${(diffusedM2(inputs, age) / (age * YEAR_SECONDS)).toExponential(3)} m²/s`),
      fick(
        'C at the steel',
        `erfc(${numberText(z, 4)}) = ${numberText(erfc(z), 5)}: ${numberText(content, 5)}`,
      ),
    ],
    caution: CAUTION,
  };
}

/**
 * Years until the chloride at the steel reaches the critical content: from erfc(z) = (Ccrit − C0)/(Cs − C0),
 * t^(1−m) = x² / (4 z² D28 t28^m). `years` is null where the surface content never lets the steel reach it.
 * @throws ConcreteError where the critical content is not above the initial one
 */
export function yearsToCriticalChloride(
  inputs: ChlorideInputs,
  criticalContent: number,
): EstimateContext & { years: number | null } {
  const { rows, coverM } = checked(inputs);
  const critical = positive('critical chloride', criticalContent);
  if (critical <= inputs.initialContent) {
    throw new ConcreteError('critical chloride', 'It is not above the initial chloride.');
  }
  const context = {
    formula: 'erfc(z) = (Ccrit − C0)/(Cs − C0), t^(1−m) = x² / (4 z² D28 t28^m)',
    inputs: [...rows, { name: 'Critical chloride Ccrit', value: critical, unit: 'as entered' }],
    caution: CAUTION,
  };
  if (critical >= inputs.surfaceContent) {
    const trail = [fick('Years to the critical content', 'never: the surface content is not above it')];
    return { ...context, years: null, trail };
  }
  const z = erfcinv((critical - inputs.initialContent) / (inputs.surfaceContent - inputs.initialContent));
  const perYear = diffusedM2(inputs, 1);
  const years = (coverM ** 2 / (4 * z * z * perYear)) ** (1 / (1 - inputs.ageingExponent));
  if (!Number.isFinite(years)) {
    throw new ConcreteError(
      'critical chloride',
      'It is so near to the initial or surface content that no time follows.',
    );
  }
  return {
    ...context,
    years,
    trail: [
      ageingLaw('m of D(t) = D28 (t28/t)^m', numberText(inputs.ageingExponent, 3)),
      fick('Years to the critical content', `z = ${numberText(z, 4)}: ${numberText(years, 1)} years`),
    ],
  };
}
