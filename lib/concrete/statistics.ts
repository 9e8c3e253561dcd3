import betaQuantile from '@stdlib/stats-base-dists-beta-quantile';
import normalQuantile from '@stdlib/stats-base-dists-normal-quantile';
import tQuantile from '@stdlib/stats-base-dists-t-quantile';
import { finite, given, listOf, openShare, whole } from '@/lib/concrete/check-input';
import { ConcreteError } from '@/lib/concrete/concrete-error';
import { noncentralTQuantile } from '@/lib/concrete/noncentral-t';
import { numberText } from '@/lib/concrete/number-text';
import type { TrailStep } from '@/lib/concrete/trail';
import { trailSource } from '@/lib/concrete/trail-source';

/**
 * Statistics of readings. Advice only: before the pour acceptance stays reading by reading. Distributions come from
 * @stdlib, proved in tests/reference to the last digits of the published values; the noncentral t is in noncentral-t.ts.
 */

/** Fewer drawn readings than this, and quantiles mean little. */
export const QUANTILES_NEED = 20;

const CAUTION = 'Advice. Acceptance before the pour is reading by reading.';
const FEW = `Fewer than ${QUANTILES_NEED} readings: quantiles mean little.`;
const NORMAL = 'Holds where the readings are about normally distributed.';

function cautionFor(n: number, ...more: string[]): string {
  return [CAUTION, ...(n < QUANTILES_NEED ? [FEW] : []), ...more].join(' ');
}

const definition = trailSource('definition', '', 'computed');
const clopper = trailSource('C. J. Clopper and E. S. Pearson, Biometrika 26', '1934', 'memory');
const nistTolerance = trailSource('NIST/SEMATECH e-Handbook, 7.2.6.3', '', 'seen');
const successRunSource = trailSource('success run, n = ln(1 − γ)/ln(1 − p), rounded up', '', 'partly-seen');

/** A number with its trail and what a reader has to keep in mind. */
export interface Statistic<Value> {
  value: Value;
  trail: TrailStep[];
  caution: string;
}

/** Sum with Neumaier's compensation, so that a large common part does not eat the digits. */
function sumOf(values: readonly number[]): number {
  let sum = 0;
  let lost = 0;
  for (const value of values) {
    const next = sum + value;
    lost += Math.abs(sum) >= Math.abs(value) ? sum - next + value : value - next + sum;
    sum = next;
  }
  return sum + lost;
}

function checkedValues(values: readonly number[], least: number): readonly number[] {
  for (const [index, value] of listOf('readings', values, least).entries())
    finite(`reading ${index + 1}`, value);
  return values;
}

function meanOf(values: readonly number[]): number {
  const rough = sumOf(values) / values.length;
  return rough + sumOf(values.map((value) => value - rough)) / values.length;
}

/** Sample standard deviation (n − 1), two passes with the correction for a mean that is not exact. */
function deviationOf(values: readonly number[], mean: number): number {
  const gaps = values.map((value) => value - mean);
  const correction = sumOf(gaps) ** 2 / values.length;
  const squares = sumOf(gaps.map((gap) => gap * gap)) - correction;
  return Math.sqrt(Math.max(squares, 0) / (values.length - 1));
}

/** Number, mean, least and greatest of readings, and their sample standard deviation (null for a single one). */
export interface Summary {
  n: number;
  mean: number;
  deviation: number | null;
  least: number;
  greatest: number;
}

/**
 * Mean, sample standard deviation (n − 1), least and greatest, in the unit of the readings.
 * @throws ConcreteError where there is no reading, or one is no number
 */
export function summarise(values: readonly number[]): Statistic<Summary> {
  const n = checkedValues(values, 1).length;
  const mean = meanOf(values);
  const deviation = n > 1 ? deviationOf(values, mean) : null;
  const least = values.reduce((lowest, value) => Math.min(lowest, value), Infinity);
  const greatest = values.reduce((highest, value) => Math.max(highest, value), -Infinity);
  return {
    value: { n, mean, deviation, least, greatest },
    trail: [
      definition('Mean = sum / n', `${numberText(mean, 3)} of ${n}`),
      definition(
        'Sample standard deviation s = √(Σ(x − mean)²/(n − 1))',
        deviation === null ? 'none for one reading' : numberText(deviation, 3),
      ),
    ],
    caution: cautionFor(n),
  };
}

/** A share with its exact one-sided upper bound. */
export interface ShareBelow {
  below: number;
  n: number;
  share: number;
  upperBound: number;
}

/**
 * Share of readings below the limit with the exact one-sided upper confidence bound of Clopper and Pearson: the quantile
 * γ of the beta distribution (x + 1, n − x). For a two-sided interval of confidence C pass γ = (1 + C)/2 to each side.
 * @param below readings below the limit; @param n readings in all; @param confidence γ, for example 0.95
 */
export function shareBelow(below: number, n: number, confidence: number): Statistic<ShareBelow> {
  whole('readings', n, 1);
  whole('readings below', below, 0);
  openShare('confidence', confidence);
  if (below > n) throw new ConcreteError('readings below', 'There are more than readings.');
  const upperBound = below === n ? 1 : betaQuantile(confidence, below + 1, n - below);
  const value = `${below} of ${n}: at most ${numberText(100 * upperBound, 2)} % with ${numberText(100 * confidence)} % confidence`;
  return {
    value: { below, n, share: below / n, upperBound },
    trail: [clopper('Upper bound = beta quantile γ of (x + 1, n − x)', value)],
    caution: cautionFor(n),
  };
}

/** The exact one-sided lower bound of Clopper and Pearson: the quantile 1 − γ of beta (x, n − x + 1). */
export function shareLowerBound(count: number, n: number, confidence: number): Statistic<number> {
  whole('readings', n, 1);
  whole('readings counted', count, 0);
  openShare('confidence', confidence);
  if (count > n) throw new ConcreteError('readings counted', 'There are more than readings.');
  const bound = count === 0 ? 0 : betaQuantile(1 - confidence, count, n - count + 1);
  return {
    value: bound,
    trail: [clopper('Lower bound = beta quantile 1 − γ of (x, n − x + 1)', numberText(bound, 6))],
    caution: cautionFor(n),
  };
}

/**
 * One-sided normal tolerance factor k: with confidence γ at least the share p of all values lies above mean − k s.
 * k = t′(γ; n − 1, z_p √n)/√n with t′ the noncentral t quantile (exact; NIST/SEMATECH e-Handbook 7.2.6.3, whose own
 * approximation differs in the third decimal).
 * @throws ConcreteError below two readings, or where p or γ is not between 0 and 1
 */
export function toleranceFactor(n: number, share: number, confidence: number): Statistic<number> {
  whole('readings', n, 2);
  openShare('share', share);
  openShare('confidence', confidence);
  const root = Math.sqrt(n);
  const k = noncentralTQuantile(confidence, n - 1, normalQuantile(share, 0, 1) * root) / root;
  const value = `n = ${n}, p = ${numberText(share, 4)}, γ = ${numberText(confidence, 4)}: k = ${numberText(k, 4)}`;
  return {
    value: k,
    trail: [nistTolerance('k = t′(γ; n − 1, z_p √n)/√n, noncentral t', value)],
    caution: cautionFor(n, NORMAL),
  };
}

/** The lower tolerance bound mean − k s: with confidence γ the share p of the face lies above it. */
export function lowerToleranceBound(
  values: readonly number[],
  share: number,
  confidence: number,
): Statistic<{ bound: number; k: number }> {
  checkedValues(values, 2);
  const { mean, deviation } = summarise(values).value;
  const factor = toleranceFactor(values.length, share, confidence);
  const bound = mean - factor.value * (deviation ?? 0);
  const text = `${numberText(mean, 3)} − ${numberText(factor.value, 4)} × ${numberText(deviation ?? 0, 3)}`;
  return {
    value: { bound, k: factor.value },
    trail: [...factor.trail, nistTolerance('Lower bound = mean − k s', `${text} = ${numberText(bound, 3)}`)],
    caution: factor.caution,
  };
}

/** The quantile of a normal distribution with the sample's mean and deviation: mean + z_p s. */
export function normalQuantileOf(values: readonly number[], share: number): Statistic<number> {
  checkedValues(values, 2);
  openShare('share', share);
  const { mean, deviation } = summarise(values).value;
  const z = normalQuantile(share, 0, 1);
  const value = mean + z * (deviation ?? 0);
  const text = `${numberText(mean, 3)} + (${numberText(z, 4)}) × ${numberText(deviation ?? 0, 3)} = ${numberText(value, 3)}`;
  return {
    value,
    trail: [definition(`${numberText(100 * share)} % quantile, normal: mean + z s`, text)],
    caution: cautionFor(values.length, NORMAL),
  };
}

/**
 * The quantile by ranks, without a distribution: position p (n + 1) among the ordered readings, interpolated (Hyndman
 * and Fan, type 6); outside the first and the last rank it is the first or the last reading.
 */
export function rankQuantileOf(values: readonly number[], share: number): Statistic<number> {
  const ordered = [...checkedValues(values, 1)].sort((a, b) => a - b);
  openShare('share', share);
  const position = Math.min(Math.max(share * (ordered.length + 1), 1), ordered.length);
  const lower = Math.floor(position);
  const low = given('reading', ordered[lower - 1]);
  const high = given('reading', ordered[Math.min(lower, ordered.length - 1)]);
  const value = low + (position - lower) * (high - low);
  const byRanks = trailSource(
    'R. J. Hyndman and Y. Fan, The American Statistician 50, type 6',
    '1996',
    'memory',
  );
  const text = `rank ${numberText(position, 2)} of ${ordered.length}: ${numberText(value, 3)}`;
  return {
    value,
    trail: [byRanks(`${numberText(100 * share)} % quantile by ranks`, text)],
    caution: cautionFor(ordered.length),
  };
}

/** Capability (mean − least accepted)/(3 s); null where all readings are the same. */
export function capability(values: readonly number[], leastAccepted: number): Statistic<number | null> {
  checkedValues(values, 2);
  finite('least accepted', leastAccepted);
  const { mean, deviation } = summarise(values).value;
  const value = deviation ? (mean - leastAccepted) / (3 * deviation) : null;
  const spread = `(${numberText(mean, 3)} − ${numberText(leastAccepted, 3)}) / (3 × ${numberText(deviation ?? 0, 3)})`;
  return {
    value,
    trail: [
      definition(
        'Capability = (mean − least accepted)/(3 s)',
        value === null ? 'none: all readings are the same' : `${spread} = ${numberText(value, 3)}`,
      ),
    ],
    caution: cautionFor(values.length, NORMAL),
  };
}

/**
 * Readings, none below, that show with confidence γ that at most the share p is below: the classical success run
 * n = ln(1 − γ)/ln(1 − p), rounded up. (A form with n − 1, from a uniform prior, is also in print and is not used.)
 */
export function successRun(mostShareBelow: number, confidence: number): Statistic<number> {
  openShare('share below', mostShareBelow);
  openShare('confidence', confidence);
  const exact = Math.log(1 - confidence) / Math.log1p(-mostShareBelow);
  // The slack keeps an exact whole number from being pushed up by its last binary digit.
  const value = Math.max(1, Math.ceil(exact - 1e-9));
  const text = `ln(${numberText(1 - confidence, 4)})/ln(${numberText(1 - mostShareBelow, 4)}) = ${numberText(exact, 3)}: ${value}`;
  return {
    value,
    trail: [successRunSource('Readings needed, none of them below', text)],
    caution: 'Advice. Holds for points drawn at random; chosen points do not count.',
  };
}

/** The mean change per point with its interval. */
export interface PairedChange {
  n: number;
  mean: number;
  deviation: number;
  low: number;
  high: number;
}

/**
 * Change from before to after placing, paired by point: mean change with the two-sided t-interval
 * mean ± t((1 + C)/2; n − 1) s/√n. Readings in mm.
 * @throws ConcreteError below two pairs
 */
export function pairedChange(
  pairs: readonly { before: number; after: number }[],
  confidence: number,
): Statistic<PairedChange> {
  openShare('confidence', confidence);
  const changes = listOf('pairs', pairs, 2).map(
    (pair, index) =>
      finite(`pair ${index + 1}, after`, pair.after) - finite(`pair ${index + 1}, before`, pair.before),
  );
  const n = changes.length;
  const mean = meanOf(changes);
  const deviation = deviationOf(changes, mean);
  const t = tQuantile((1 + confidence) / 2, n - 1);
  const half = (t * deviation) / Math.sqrt(n);
  const student = trailSource('Student’s t-interval of paired differences', '', 'computed');
  const text = `${numberText(mean, 3)} ± ${numberText(t, 4)} × ${numberText(deviation, 3)}/√${n}`;
  return {
    value: { n, mean, deviation, low: mean - half, high: mean + half },
    trail: [student(`Mean change, ${numberText(100 * confidence)} % interval`, `${text} mm`)],
    caution: cautionFor(n, NORMAL),
  };
}
