import gammaln from '@stdlib/math-base-special-gammaln';
import normalCdf from '@stdlib/stats-base-dists-normal-cdf';
import { finite, openShare, whole } from '@/lib/concrete/check-input';
import { ConcreteError } from '@/lib/concrete/concrete-error';

/** Nodes and weights of 16-point Gauss-Legendre quadrature on [−1, 1], positive half (Abramowitz & Stegun, Table 25.4). */
const NODES: readonly (readonly [number, number])[] = [
  [0.0950125098376374, 0.1894506104550685],
  [0.2816035507792589, 0.1826034150449236],
  [0.4580167776572274, 0.1691565193950025],
  [0.6178762444026438, 0.1495959888165767],
  [0.755404408355003, 0.1246289712555339],
  [0.8656312023878318, 0.0951585116824928],
  [0.9445750230732326, 0.0622535239386479],
  [0.9894009349916499, 0.0271524594117541],
];

function panel(f: (x: number) => number, from: number, to: number): number {
  const centre = (from + to) / 2;
  const half = (to - from) / 2;
  let sum = 0;
  for (const [node, weight] of NODES) sum += weight * (f(centre - half * node) + f(centre + half * node));
  return sum * half;
}

/** Most degrees of freedom that the series of panels is proved for. */
const MOST_DEGREES = 100_000;

/**
 * P(T ≤ t) for T noncentral t with `degrees` degrees of freedom and noncentrality `delta`, by its definition as a mixture
 * (D. B. Owen, A survey of properties and applications of the noncentral t-distribution, Technometrics 10, 1968):
 *
 *   P = ∫₀^∞ Φ(t s − δ) f(s) ds,  s = χ/√ν,  f(s) = 2 (ν/2)^(ν/2) / Γ(ν/2) s^(ν−1) e^(−ν s²/2)
 *
 * with 16-point Gauss-Legendre panels laid around the mode of f and around the step of Φ. Series forms (AS 243) lose
 * their digits for the large δ of a tolerance factor; the integral does not. Shown in the tests to 1e-10.
 * @throws ConcreteError where a value is no number or there are more than 100 000 degrees of freedom
 */
export function noncentralTCdf(t: number, degrees: number, delta: number): number {
  finite('t', t);
  finite('noncentrality', delta);
  const nu = whole('degrees of freedom', degrees, 1);
  if (nu > MOST_DEGREES) throw new ConcreteError('degrees of freedom', `More than ${MOST_DEGREES}.`);
  const logConstant = Math.LN2 + (nu / 2) * Math.log(nu / 2) - gammaln(nu / 2);
  const density = (s: number) => {
    if (s <= 0) return nu === 1 ? Math.exp(logConstant) : 0;
    return Math.exp(logConstant + (nu - 1) * Math.log(s) - (nu * s * s) / 2);
  };
  // χ/√ν has mean near 1 and standard deviation near 1/√(2ν); 12 of them leave nothing that a double could show.
  const spread = 12 / Math.sqrt(2 * nu);
  const from = Math.max(0, 1 - spread);
  const to = 1 + spread;
  const cuts = [from, to];
  for (let index = 1; index < 24; index += 1) cuts.push(from + ((to - from) * index) / 24);
  if (t !== 0) {
    const step = delta / t;
    for (const widths of [-8, -4, -2, -1, 0, 1, 2, 4, 8]) cuts.push(step + widths / Math.abs(t));
  }
  const inside = cuts.filter((cut) => cut >= from && cut <= to).sort((a, b) => a - b);
  let sum = 0;
  for (let index = 1; index < inside.length; index += 1) {
    const a = inside[index - 1] ?? from;
    const b = inside[index] ?? to;
    if (b > a) sum += panel((s) => normalCdf(t * s - delta, 0, 1) * density(s), a, b);
  }
  return Math.min(Math.max(sum, 0), 1);
}

/** The t below which a noncentral t lies with probability `share`, by bisection of `noncentralTCdf` to the last digits. */
export function noncentralTQuantile(share: number, degrees: number, delta: number): number {
  openShare('probability', share);
  let reach = 1;
  let low = delta - reach;
  let high = delta + reach;
  while (noncentralTCdf(low, degrees, delta) > share) {
    reach *= 2;
    low = delta - reach;
  }
  reach = 1;
  while (noncentralTCdf(high, degrees, delta) < share) {
    reach *= 2;
    high = delta + reach;
  }
  for (let turn = 0; turn < 200; turn += 1) {
    const middle = (low + high) / 2;
    if (middle <= low || middle >= high) break;
    if (noncentralTCdf(middle, degrees, delta) < share) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}
